import { Page } from '#components/page.tsx';

export function RecipesPage() {
  return <Page title="RecipesPage">{null}</Page>;
}
