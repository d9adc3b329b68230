import { useMemo } from 'react';
import { useQuery } from '@tanstack/react-query';
import type { Equipment } from '@steepfall/shared/contracts';
import type { DeskKit } from '@steepfall/shared/desk';
import { SelectField } from '#components/field.tsx';
import { equipmentQuery } from '#lib/hub-queries.ts';
import { useKnown } from '#lib/session.ts';
import { useStored, ValueStore } from '#lib/value-store.ts';
import { SmallLabel } from './number-field.tsx';

type Kettle = Extract<Equipment, { kind: 'kettle' }>;
type Chiller = Extract<Equipment, { kind: 'chiller' }>;

/** What this station looked at last, so that the next recipe opens on the same kit. `null`: the usual one on purpose. */
const chosen = new ValueStore<{ kettleId?: string | null; chillerId?: string | null }>({});
const none: Equipment[] = [];

interface KitChoice {
  kit: DeskKit;
  kettles: readonly Kettle[];
  chillers: readonly Chiller[];
  kettleId: string;
  chillerId: string;
  /** The finest step of the house's scales, g. */
  resolutionG: number | undefined;
}

/** The kit that the figures are worked out on: what was chosen, or the first of each kind. */
export function useDeskKit(): KitChoice {
  const { house } = useKnown();
  const choice = useStored(chosen);
  const { data = none } = useQuery(equipmentQuery);
  return useMemo(() => {
    const kettles = data.filter((item) => item.kind === 'kettle');
    const chillers = data.filter((item) => item.kind === 'chiller');
    const scales = data.filter((item) => item.kind === 'scale').map(({ facts }) => facts.resolutionG);
    const pick = <Item extends { id: string }>(items: readonly Item[], id: string | null | undefined) =>
      id === null ? null : (items.find((item) => item.id === id) ?? items[0] ?? null);
    const kettle = pick(kettles, choice.kettleId);
    const chiller = pick(chillers, choice.chillerId);
    return {
      kit: { altitudeM: house.altitudeM, kettle: kettle?.facts ?? null, chiller: chiller?.facts ?? null },
      kettles,
      chillers,
      kettleId: kettle?.id ?? '',
      chillerId: chiller?.id ?? '',
      resolutionG: scales.length > 0 ? Math.min(...scales) : undefined,
    };
  }, [data, choice, house.altitudeM]);
}

/** Which kettle, which chiller: the day and everything that hangs on it follow. */
export function KitChooser() {
  const { kettles, chillers, kettleId, chillerId } = useDeskKit();
  return (
    <div className="grid grid-cols-2 gap-3">
      <SelectField
        label={<SmallLabel>Worked out for</SmallLabel>}
        value={kettleId}
        onChange={({ target }) => chosen.set({ ...chosen.get(), kettleId: target.value || null })}
      >
        {kettles.map(({ id, name }) => (
          <option key={id} value={id}>
            {name}
          </option>
        ))}
        <option value="">a usual kettle</option>
      </SelectField>
      <SelectField
        label={<SmallLabel>with</SmallLabel>}
        value={chillerId}
        onChange={({ target }) => chosen.set({ ...chosen.get(), chillerId: target.value || null })}
      >
        {chillers.map(({ id, name }) => (
          <option key={id} value={id}>
            {name}
          </option>
        ))}
        <option value="">no chiller</option>
      </SelectField>
    </div>
  );
}
