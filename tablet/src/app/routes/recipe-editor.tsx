import { RecipeEditorPage } from '#features/recipes/recipe-editor-page.tsx';

export function RecipeEditorRoute() {
  return <RecipeEditorPage />;
}
