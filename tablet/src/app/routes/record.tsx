import { RecordPage } from '#features/batches/record-page.tsx';

export function RecordRoute() {
  return <RecordPage />;
}
