import { Page } from '#components/page.tsx';

export function HomePage() {
  return <Page title="HomePage">{null}</Page>;
}
