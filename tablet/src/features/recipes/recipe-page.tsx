import { Page } from '#components/page.tsx';

export function RecipePage() {
  return <Page title="RecipePage">{null}</Page>;
}
