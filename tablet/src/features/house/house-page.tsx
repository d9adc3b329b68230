import { Page } from '#components/page.tsx';

export function HousePage() {
  return <Page title="HousePage">{null}</Page>;
}
