import { RunSheetPage } from '#features/run-sheet/run-sheet-page.tsx';

export function RunRoute() {
  return <RunSheetPage />;
}
