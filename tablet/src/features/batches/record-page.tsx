import { Page } from '#components/page.tsx';

export function RecordPage() {
  return <Page title="RecordPage">{null}</Page>;
}
