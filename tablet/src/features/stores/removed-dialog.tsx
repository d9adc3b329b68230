import { useQuery } from '@tanstack/react-query';
import { Button } from '#components/button.tsx';
import { Dialog } from '#components/dialog.tsx';
import { removedStoresQuery } from '#lib/hub-queries.ts';
import { failureWords } from '#lib/words.ts';
import { factsWords } from './facts-words.ts';
import { useStoresAct } from './use-stores.ts';

/** What was taken out of the stores is kept, with its ledger, and can come back. */
export function RemovedDialog({ onClose }: { onClose: () => void }) {
  const removed = useQuery(removedStoresQuery);
  const restore = useStoresAct((id: string) => [`stores/ingredients/${id}/restore`, { method: 'POST' }]);
  const error = removed.error ?? restore.error;
  return (
    <Dialog isOpen onClose={onClose} title="Taken out of the stores" actions={<Button onClick={onClose}>Close</Button>}>
      {error ? (
        <p role="alert" className="font-medium text-ember">
          {failureWords(error)}
        </p>
      ) : null}
      {removed.isPending ? <p role="status">Looking for it.</p> : null}
      {removed.data?.length === 0 ? (
        <p className="text-soft">Nothing. What is taken out is kept here with its lots and its ledger.</p>
      ) : null}
      <ul>
        {removed.data?.map(({ id, facts }) => (
          <li key={id} className="flex flex-wrap items-center gap-x-5 gap-y-2 border-b border-hair py-3">
            <span className="min-w-40 flex-1">
              <span className="block font-medium">{facts.name}</span>
              <span className="block text-note text-soft">{factsWords(facts)}</span>
            </span>
            <Button disabled={restore.isPending} onClick={() => restore.mutate(id)}>
              Bring back<span className="sr-only"> {facts.name}</span>
            </Button>
          </li>
        ))}
      </ul>
    </Dialog>
  );
}
