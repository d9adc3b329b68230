import { useState } from 'react';
import { useMutation, useQueryClient } from '@tanstack/react-query';
import { recipeSchema, recipeSummarySchema, type Recipe, type Revision } from '@steepfall/shared/contracts';
import type { RecipeDocument } from '@steepfall/shared/sheets';
import { callHubFor } from '#lib/api-client.ts';
import { HubProblemError } from '#lib/http.ts';
import { recipeQuery } from '#lib/hub-queries.ts';
import type { Conflict, Way } from './conflict-dialog.tsx';
import { isSameJson, type RecipeForm } from './recipe-form.ts';

interface SaveOptions {
  /** Null for a recipe that is new. */
  recipe: Recipe | null;
  /** The revision that the form started from. */
  base: Revision | null;
  onSaved: (recipe: Recipe) => void;
  onRefused: (error: Error) => void;
}

interface Wanted {
  form: RecipeForm;
  note: string;
}

function createRecipe({ form, note }: Wanted): Promise<Recipe> {
  return callHubFor(recipeSchema, 'recipes', { method: 'POST', body: { ...form, note } });
}

function addRevision(
  recipeId: string,
  baseRevisionId: string,
  document: RecipeDocument,
  note: string,
): Promise<Recipe> {
  const body = { baseRevisionId, note, document };
  return callHubFor(recipeSchema, `recipes/${recipeId}/revisions`, { method: 'POST', body });
}

async function rename(recipe: Recipe, { name, summary }: RecipeForm): Promise<Recipe> {
  if (name === recipe.name && summary === recipe.summary) return recipe;
  const body = { name, summary };
  const answer = await callHubFor(recipeSummarySchema, `recipes/${recipe.id}`, { method: 'PATCH', body });
  return { ...recipe, ...answer };
}

const MOST_NAME = 80;
const MOST_NOTE = 400;

/** Saving in all its ways: new, a revision more, or beside somebody who was faster. */
export function useSave({ recipe, base, onSaved, onRefused }: SaveOptions) {
  const client = useQueryClient();
  const [conflict, setConflict] = useState<(Conflict & { form: RecipeForm }) | null>(null);
  const done = (saved: Recipe) => {
    client.setQueryData(recipeQuery(saved.id).queryKey, saved);
    void client.invalidateQueries({ queryKey: ['recipes'] });
    setConflict(null);
    onSaved(saved);
  };

  /**
   * Somebody was faster: what they saved is fetched, so that there is something to choose between. When it is the same, it was most
   * likely this desk, whose answer was lost or whose new name was refused: then only the name is left to do.
   */
  const meet = async (error: unknown, { form, note }: Wanted, sent = form.document): Promise<Recipe | null> => {
    const isChanged = error instanceof HubProblemError && error.type === 'changed-meanwhile';
    if (!isChanged || !recipe || !base) throw error;
    const fresh = await client.fetchQuery({ ...recipeQuery(recipe.id), staleTime: 0 });
    const theirs = fresh.revisions.toSorted((a, b) => b.number - a.number)[0];
    if (!theirs || theirs.id === base.id) throw error;
    if (isSameJson(theirs.document, sent)) return rename(fresh, form);
    setConflict({ base, theirs, mine: form.document, note, form });
    return null;
  };

  const save = useMutation({
    mutationFn: async (wanted: Wanted): Promise<Recipe | null> => {
      if (!recipe || !base) return createRecipe(wanted);
      try {
        const isSame = isSameJson(wanted.form.document, base.document);
        const saved = isSame ? recipe : await addRevision(recipe.id, base.id, wanted.form.document, wanted.note);
        return await rename(saved, wanted.form);
      } catch (error) {
        return await meet(error, wanted);
      }
    },
    onSuccess: (saved) => saved && done(saved),
    onError: onRefused,
  });

  const settle = useMutation({
    mutationFn: async ({ way, document }: { way: Way; document: RecipeDocument }): Promise<Recipe | null> => {
      if (!conflict || !recipe) return null;
      const { form, note, theirs } = conflict;
      if (way === 'own-recipe') {
        const name = `${form.name.slice(0, MOST_NAME - 12)}, my version`;
        return createRecipe({ form: { ...form, name }, note });
      }
      const words = way === 'join' ? `${note} Joined with revision ${theirs.number}.`.trim().slice(0, MOST_NOTE) : note;
      try {
        return await rename(await addRevision(recipe.id, theirs.id, document, words), form);
      } catch (error) {
        return await meet(error, { form, note }, document);
      }
    },
    onSuccess: (saved) => saved && done(saved),
  });

  return {
    save: (wanted: Wanted) => save.mutate(wanted),
    isSaving: save.isPending,
    error: save.error,
    forget: save.reset,
    conflict,
    settle: (way: Way, document: RecipeDocument) => settle.mutate({ way, document }),
    isSettling: settle.isPending,
    settleError: settle.error,
    goOn: () => setConflict(null),
  };
}
