import { Page } from '#components/page.tsx';

export function BatchesPage() {
  return <Page title="BatchesPage">{null}</Page>;
}
