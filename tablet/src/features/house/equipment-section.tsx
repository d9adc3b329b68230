import { useState } from 'react';
import { useMutation, useQuery, useQueryClient } from '@tanstack/react-query';
import { equipmentSchema, type Equipment } from '@steepfall/shared/contracts';
import { Banner } from '#components/banner.tsx';
import { Button } from '#components/button.tsx';
import { EmptyState } from '#components/empty-state.tsx';
import { LevelRule } from '#components/level-rule.tsx';
import { Menu } from '#components/menu.tsx';
import { Failed, Waiting } from '#components/quiet-state.tsx';
import { callHub, callHubFor } from '#lib/api-client.ts';
import { equipmentQuery } from '#lib/hub-queries.ts';
import { useMay } from '#lib/session.ts';
import { offerUndo } from '#lib/undo.ts';
import { useUnits } from '#lib/units.ts';
import { failureWords } from '#lib/words.ts';
import { EquipmentDialog } from './equipment-dialog.tsx';
import { factWords, kindWords, learnedWords } from './equipment-facts.ts';
import { RemovedEquipmentDialog } from './removed-equipment-dialog.tsx';

/** Kettles, chillers, kegs and scales of the house. */
export function EquipmentSection() {
  const mayManage = useMay()('equipment:manage');
  const units = useUnits();
  const [open, setOpen] = useState<Equipment | 'new' | null>(null);
  const [isLookingBack, setIsLookingBack] = useState(false);
  const equipment = useQuery(equipmentQuery);
  const remove = useRemove();
  const add = mayManage ? <Button onClick={() => setOpen('new')}>Add equipment</Button> : null;
  return (
    <section aria-labelledby="equipment" className="grid gap-4">
      <LevelRule id="equipment" aside={add}>
        Equipment
      </LevelRule>
      {equipment.error ? (
        <Failed title="The equipment may be old" onRetry={() => void equipment.refetch()}>
          {failureWords(equipment.error)}
        </Failed>
      ) : null}
      {remove.isError ? (
        <Banner tone="act" title="Nothing was removed">
          {failureWords(remove.error)}
        </Banner>
      ) : null}
      {equipment.isPending ? <Waiting>Fetching the equipment.</Waiting> : null}
      {equipment.data?.length === 0 ? (
        <EmptyState>
          A batch needs a kettle and a keg. Add them once, with what is stamped or written on them: the figures of every
          recipe are worked out for them. A scale tells how finely amounts are rounded.
        </EmptyState>
      ) : null}
      <ul>
        {(equipment.data ?? []).toSorted(byKind).map((item) => (
          <li
            key={item.id}
            className="grid grid-cols-[1fr_auto] items-center gap-x-6 border-b border-hair py-3 sm:grid-cols-[5rem_1fr_auto]"
          >
            <span className="col-span-2 text-body text-soft sm:col-span-1 sm:row-span-2">
              {kindWords[item.kind].toLowerCase()}
            </span>
            <p className="text-lead font-medium sm:col-start-2">{item.name}</p>
            {mayManage ? (
              <div className="col-start-2 row-start-2 sm:col-start-3 sm:row-span-2 sm:row-start-1">
                <Menu
                  label={
                    <>
                      Change<span className="sr-only"> {item.name}</span>
                    </>
                  }
                  choices={[
                    { label: 'Edit', onChoose: () => setOpen(item) },
                    { label: 'Remove', isDanger: true, onChoose: () => remove.mutate(item) },
                  ]}
                />
              </div>
            ) : null}
            <div className="col-span-2 text-body tabular-nums text-soft sm:col-span-1 sm:col-start-2">
              <p>{factWords(item, units)}</p>
              {learnedWords(item) ? <p>{learnedWords(item)}</p> : null}
            </div>
          </li>
        ))}
      </ul>
      {mayManage ? (
        <div>
          <Button look="quiet" className="-ml-5" onClick={() => setIsLookingBack(true)}>
            Removed<span className="sr-only"> equipment</span>
          </Button>
        </div>
      ) : null}
      {isLookingBack ? <RemovedEquipmentDialog onClose={() => setIsLookingBack(false)} /> : null}
      {open ? <EquipmentDialog item={open === 'new' ? null : open} onClose={() => setOpen(null)} /> : null}
    </section>
  );
}

const kinds = Object.keys(kindWords);

/** The order in which the day meets them; within a kind by name, as the hub has them. */
function byKind(a: Equipment, b: Equipment): number {
  return kinds.indexOf(a.kind) - kinds.indexOf(b.kind);
}

function useRemove() {
  const client = useQueryClient();
  const again = () => client.invalidateQueries({ queryKey: equipmentQuery.queryKey });
  return useMutation({
    mutationFn: ({ id }: Equipment) => callHub(`equipment/${id}`, { method: 'DELETE' }),
    onSuccess: (_answer, { id, name }) => {
      void again();
      offerUndo(`${name} removed.`, async () => {
        await callHubFor(equipmentSchema, `equipment/${id}/restore`, { method: 'POST' });
        await again();
      });
    },
  });
}
