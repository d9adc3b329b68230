import { ImportPage } from '#features/stores/import-page.tsx';
import { IngredientPage } from '#features/stores/ingredient-page.tsx';
import { StoresPage } from '#features/stores/stores-page.tsx';

export function StoresRoute() {
  return <StoresPage />;
}

export function IngredientRoute() {
  return <IngredientPage />;
}

export function ImportRoute() {
  return <ImportPage />;
}
