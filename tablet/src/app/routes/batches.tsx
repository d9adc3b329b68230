import { BatchesPage } from '#features/batches/batches-page.tsx';

export function BatchesRoute() {
  return <BatchesPage />;
}
