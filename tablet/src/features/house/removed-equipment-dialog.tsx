import { useMutation, useQuery, useQueryClient } from '@tanstack/react-query';
import { equipmentSchema } from '@steepfall/shared/contracts';
import { Button } from '#components/button.tsx';
import { Dialog } from '#components/dialog.tsx';
import { callHubFor } from '#lib/api-client.ts';
import { equipmentQuery, removedEquipmentQuery } from '#lib/hub-queries.ts';
import { useUnits } from '#lib/units.ts';
import { failureWords } from '#lib/words.ts';
import { factWords, kindWords } from './equipment-facts.ts';

/** What was removed is kept: batches of the past were brewed on it, and it can come back. */
export function RemovedEquipmentDialog({ onClose }: { onClose: () => void }) {
  const units = useUnits();
  const client = useQueryClient();
  const removed = useQuery(removedEquipmentQuery);
  const restore = useMutation({
    mutationFn: (id: string) => callHubFor(equipmentSchema, `equipment/${id}/restore`, { method: 'POST' }),
    onSuccess: () => client.invalidateQueries({ queryKey: equipmentQuery.queryKey }),
  });
  const error = removed.error ?? restore.error;
  return (
    <Dialog isOpen onClose={onClose} title="Removed equipment" actions={<Button onClick={onClose}>Close</Button>}>
      {error ? (
        <p role="alert" className="font-medium text-ember">
          {failureWords(error)}
        </p>
      ) : null}
      {removed.isPending ? <p role="status">Looking for it.</p> : null}
      {removed.data?.length === 0 ? (
        <p className="text-soft">Nothing. What is removed is kept here, with what is known of it.</p>
      ) : null}
      <ul>
        {removed.data?.map((item) => (
          <li key={item.id} className="flex flex-wrap items-center gap-x-5 gap-y-2 border-b border-hair py-3">
            <span className="min-w-40 flex-1">
              <span className="block font-medium">{item.name}</span>
              <span className="block text-note text-soft">
                {kindWords[item.kind]}, {factWords(item, units)}
              </span>
            </span>
            <Button disabled={restore.isPending} onClick={() => restore.mutate(item.id)}>
              Bring back<span className="sr-only"> {item.name}</span>
            </Button>
          </li>
        ))}
      </ul>
    </Dialog>
  );
}
