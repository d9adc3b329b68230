import { RecipesPage } from '#features/recipes/recipes-page.tsx';

export function RecipesRoute() {
  return <RecipesPage />;
}
