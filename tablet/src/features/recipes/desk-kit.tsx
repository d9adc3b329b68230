import { useMemo } from 'react';
import { useQuery } from '@tanstack/react-query';
import type { Equipment } from '@steepfall/shared/contracts';
import type { DeskKit } from '@steepfall/shared/desk';
import { Disclosure, DisclosureButton, DisclosurePanel } from '@headlessui/react';
import { SelectField } from '#components/field.tsx';
import { equipmentQuery } from '#lib/hub-queries.ts';
import { useKnown } from '#lib/session.ts';
import { useStored } from '#lib/value-store.ts';
import { Chevron } from './chevron.tsx';
import { chooseKit, chosenKit } from './chosen-kit.ts';
import { SmallLabel } from './number-field.tsx';

type Kettle = Extract<Equipment, { kind: 'kettle' }>;
type Chiller = Extract<Equipment, { kind: 'chiller' }>;

const none: Equipment[] = [];

interface KitChoice {
  /** Null until it is known what the house has, so that no figure jumps when it comes. */
  kit: DeskKit | null;
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
  const choice = useStored(chosenKit);
  const { data = none, isLoading, failureCount } = useQuery(equipmentQuery);
  const isAwaited = isLoading && failureCount === 0;
  return useMemo(() => {
    const kettles = data.filter((item) => item.kind === 'kettle');
    const chillers = data.filter((item) => item.kind === 'chiller');
    const scales = data.filter((item) => item.kind === 'scale').map(({ facts }) => facts.resolutionG);
    const pick = <Item extends { id: string }>(items: readonly Item[], id: string | null | undefined) =>
      id === null ? null : (items.find((item) => item.id === id) ?? items[0] ?? null);
    const kettle = pick(kettles, choice.kettleId);
    const chiller = pick(chillers, choice.chillerId);
    return {
      kit: isAwaited
        ? null
        : { altitudeM: house.altitudeM, kettle: kettle?.facts ?? null, chiller: chiller?.facts ?? null },
      kettles,
      chillers,
      kettleId: kettle?.id ?? '',
      chillerId: chiller?.id ?? '',
      resolutionG: scales.length > 0 ? Math.min(...scales) : undefined,
    };
  }, [data, isAwaited, choice, house.altitudeM]);
}

/** Which kettle, which chiller: the day and everything that hangs on it follow. One line until it is to be changed. */
export function KitChooser() {
  const { kettles, chillers, kettleId, chillerId } = useDeskKit();
  const nameOf = (items: readonly Equipment[], id: string) => items.find((item) => item.id === id)?.name;
  const kettle = nameOf(kettles, kettleId) ?? 'a usual kettle';
  const chiller = nameOf(chillers, chillerId) ?? 'no chiller';
  return (
    <Disclosure as="div">
      <DisclosureButton className="group flex min-h-12 w-full cursor-pointer items-center justify-between gap-3 text-left text-body">
        <span>
          <span className="text-soft">Worked out for </span>
          {kettle}, {chiller}
        </span>
        <span className="group-data-open:rotate-180">
          <Chevron isOpen={false} />
        </span>
      </DisclosureButton>
      <DisclosurePanel className="grid gap-3 py-3">
        <SelectField
          label={<SmallLabel>Kettle</SmallLabel>}
          value={kettleId}
          onChange={({ target }) => chooseKit({ kettleId: target.value || null })}
        >
          {kettles.map(({ id, name }) => (
            <option key={id} value={id}>
              {name}
            </option>
          ))}
          <option value="">a usual kettle</option>
        </SelectField>
        <SelectField
          label={<SmallLabel>Chiller</SmallLabel>}
          value={chillerId}
          onChange={({ target }) => chooseKit({ chillerId: target.value || null })}
        >
          {chillers.map(({ id, name }) => (
            <option key={id} value={id}>
              {name}
            </option>
          ))}
          <option value="">no chiller</option>
        </SelectField>
      </DisclosurePanel>
    </Disclosure>
  );
}
