import { useMutation, useQueryClient, type QueryClient } from '@tanstack/react-query';
import { ingredientSchema, type Ingredient } from '@steepfall/shared/contracts';
import type { FieldPath, FieldValues, UseFormSetError } from 'react-hook-form';
import { callHub, callHubFor } from '#lib/api-client.ts';
import { HubProblemError, type HubRequest } from '#lib/http.ts';
import { storesQuery } from '#lib/hub-queries.ts';
import type { ProblemType } from '@steepfall/shared/problems';
import { useVersion } from '#lib/save-at-version.ts';
import { offerUndo } from '#lib/undo.ts';
import { fieldProblems } from '#lib/words.ts';

/** What the hub answered is shown at once; the rest of the stores is asked for again. */
export function noteIngredient(client: QueryClient, ingredient: Ingredient): void {
  client.setQueryData(storesQuery.queryKey, (list) =>
    list?.some(({ id }) => id === ingredient.id)
      ? list.map((each) => (each.id === ingredient.id ? ingredient : each))
      : list && [...list, ingredient],
  );
}

/** An act on the stores that is answered with the ingredient as it is then. */
export function useStoresAct<Input>(ask: (input: Input) => [path: string, request: Omit<HubRequest, 'accessToken'>]) {
  const client = useQueryClient();
  return useMutation({
    mutationFn: (input: Input) => callHubFor(ingredientSchema, ...ask(input)),
    onSuccess: (ingredient) => noteIngredient(client, ingredient),
    onSettled: () => void client.invalidateQueries({ queryKey: storesQuery.queryKey }),
  });
}

/**
 * The same for a form that changes something: at the version that the form was opened with, whatever the list has fetched since. When
 * somebody else was faster, a second press is meant.
 */
export function useStoresChange<Input extends object>(
  path: string,
  openedAt: number,
  versionIn: (stores: readonly Ingredient[]) => number | undefined,
) {
  const client = useQueryClient();
  const { version, meet } = useVersion(openedAt);
  const act = useStoresAct((body: Input) => [path, { method: 'PATCH', body: { ...body, version } }]);
  return {
    ...act,
    send: (body: Input, options: { onSuccess: () => void; onError: (error: Error) => void }) =>
      act.mutate(body, {
        onSuccess: options.onSuccess,
        onError: (error) => {
          options.onError(error);
          void meet(error, async () => versionIn(await client.fetchQuery({ ...storesQuery, staleTime: 0 })));
        },
      }),
  };
}

/** Takes an ingredient or a lot off the shelf, and offers it back. */
export function useRemove(kind: 'ingredients' | 'lots') {
  const client = useQueryClient();
  const again = () => client.invalidateQueries({ queryKey: storesQuery.queryKey });
  return useMutation({
    mutationFn: ({ id }: { id: string; words: string }) => callHub(`stores/${kind}/${id}`, { method: 'DELETE' }),
    onSuccess: (_, { id, words }) => {
      offerUndo(words, async () => {
        await callHub(`stores/${kind}/${id}/restore`, { method: 'POST' });
        await again();
      });
    },
    onSettled: () => void again(),
  });
}

export function isProblem(error: unknown, type: ProblemType): boolean {
  return error instanceof HubProblemError && error.type === type;
}

/** Puts what the hub says of single fields at these fields. */
export function spreadProblems<Values extends FieldValues>(error: Error, setError: UseFormSetError<Values>): void {
  for (const { field, detail } of fieldProblems(error)) setError(field as FieldPath<Values>, { message: detail });
}

/** What no field says. */
export function restOf(error: Error | null): Error | null {
  return error && fieldProblems(error).length > 0 ? null : error;
}
