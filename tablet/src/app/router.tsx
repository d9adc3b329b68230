import { createBrowserRouter, type RouteObject } from 'react-router-dom';
import type { Permission } from '@steepfall/shared/contracts';
import { DeskLayout } from './desk-layout.tsx';
import { Needs } from './needs.tsx';
import { NotFoundPage } from './not-found-page.tsx';
import { RouteError } from './route-error.tsx';
import { SignedIn } from './signed-in.tsx';
import { Starting } from './starting.tsx';

/** Every page that is fetched on its own. All are fetched soon after the first paint, so that none is missing later. */
const pages = {
  signIn: () => import('./routes/sign-in.tsx').then(({ SignInRoute }) => SignInRoute),
  follow: () => import('./routes/follow.tsx').then(({ FollowRoute }) => FollowRoute),
  home: () => import('./routes/home.tsx').then(({ HomeRoute }) => HomeRoute),
  recipes: () => import('./routes/recipes.tsx').then(({ RecipesRoute }) => RecipesRoute),
  recipe: () => import('./routes/recipe.tsx').then(({ RecipeRoute }) => RecipeRoute),
  recipeEditor: () => import('./routes/recipe-editor.tsx').then(({ RecipeEditorRoute }) => RecipeEditorRoute),
  stores: () => import('./routes/stores.tsx').then(({ StoresRoute }) => StoresRoute),
  ingredient: () => import('./routes/stores.tsx').then(({ IngredientRoute }) => IngredientRoute),
  storesImport: () => import('./routes/stores.tsx').then(({ ImportRoute }) => ImportRoute),
  batches: () => import('./routes/batches.tsx').then(({ BatchesRoute }) => BatchesRoute),
  batch: () => import('./routes/batch.tsx').then(({ BatchRoute }) => BatchRoute),
  record: () => import('./routes/record.tsx').then(({ RecordRoute }) => RecordRoute),
  run: () => import('./routes/run.tsx').then(({ RunRoute }) => RunRoute),
  house: () => import('./routes/house.tsx').then(({ HouseRoute }) => HouseRoute),
  about: () => import('./routes/about.tsx').then(({ AboutRoute }) => AboutRoute),
};

function page(name: keyof typeof pages): Pick<RouteObject, 'lazy' | 'errorElement' | 'hydrateFallbackElement'> {
  return {
    lazy: async () => ({ Component: await pages[name]() }),
    errorElement: <RouteError />,
    hydrateFallbackElement: <Starting />,
  };
}

function needs(permission: Permission): Pick<RouteObject, 'element' | 'errorElement'> {
  return { element: <Needs permission={permission} />, errorElement: <RouteError /> };
}

export const router = createBrowserRouter([
  { path: '/sign-in', ...page('signIn') },
  { path: '/follow', ...page('follow') },
  {
    element: <SignedIn />,
    errorElement: <RouteError />,
    hydrateFallbackElement: <Starting />,
    children: [
      { ...needs('runs:read'), children: [{ path: '/runs/:runId', ...page('run') }] },
      {
        element: <DeskLayout />,
        errorElement: <RouteError />,
        children: [
          { path: '/', ...page('home') },
          {
            ...needs('recipes:read'),
            children: [
              { path: '/recipes', ...page('recipes') },
              { path: '/recipes/:recipeId', ...page('recipe') },
            ],
          },
          {
            ...needs('recipes:manage'),
            children: [
              { path: '/recipes/new', ...page('recipeEditor') },
              { path: '/recipes/:recipeId/edit', ...page('recipeEditor') },
            ],
          },
          {
            ...needs('stores:read'),
            children: [
              { path: '/stores', ...page('stores') },
              { path: '/stores/:ingredientId', ...page('ingredient') },
            ],
          },
          { ...needs('stores:manage'), children: [{ path: '/stores/import', ...page('storesImport') }] },
          {
            ...needs('batches:read'),
            children: [
              { path: '/batches', ...page('batches') },
              { path: '/batches/:batchId', ...page('batch') },
            ],
          },
          { ...needs('runs:read'), children: [{ path: '/runs/:runId/record', ...page('record') }] },
          { ...needs('equipment:read'), children: [{ path: '/house', ...page('house') }] },
          { path: '/about', ...page('about') },
          { path: '*', element: <NotFoundPage />, errorElement: <RouteError /> },
        ],
      },
    ],
  },
]);

function prefetchPages(): void {
  for (const load of Object.values(pages)) void load().catch(() => undefined);
}

// Safari has no requestIdleCallback.
const whenIdle = (window as Partial<Window>).requestIdleCallback;
if (whenIdle) whenIdle(prefetchPages, { timeout: 4000 });
else setTimeout(prefetchPages, 2500);
