import { BatchPage } from '#features/batches/batch-page.tsx';
import { StartRun } from '#features/home/planned-batch.tsx';

export function BatchRoute() {
  return <BatchPage startRun={(batch) => <StartRun batch={batch} isDue />} />;
}
