import { RecipePage } from '#features/recipes/recipe-page.tsx';

export function RecipeRoute() {
  return <RecipePage />;
}
