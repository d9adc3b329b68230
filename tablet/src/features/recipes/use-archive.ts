import { useMutation, useQueryClient } from '@tanstack/react-query';
import { recipeSummarySchema } from '@steepfall/shared/contracts';
import { callHubFor } from '#lib/api-client.ts';
import { offerUndo } from '#lib/undo.ts';

interface Wanted {
  id: string;
  name: string;
  isArchived: boolean;
}

/** Puts a recipe away or brings it back; either can be taken back. */
export function useArchive() {
  const client = useQueryClient();
  const send = async ({ id, isArchived }: Wanted) => {
    await callHubFor(recipeSummarySchema, `recipes/${id}`, { method: 'PATCH', body: { isArchived } });
    await client.invalidateQueries({ queryKey: ['recipes'] });
  };
  return useMutation({
    mutationFn: send,
    onSuccess: (_answer, wanted) => {
      const words = wanted.isArchived ? `${wanted.name} archived.` : `${wanted.name} is in use again.`;
      offerUndo(words, () => send({ ...wanted, isArchived: !wanted.isArchived }));
    },
  });
}
