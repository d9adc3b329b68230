import { BatchPage } from '#features/batches/batch-page.tsx';

export function BatchRoute() {
  return <BatchPage />;
}
