import { Page } from '#components/page.tsx';

export function BatchPage() {
  return <Page title="BatchPage">{null}</Page>;
}
