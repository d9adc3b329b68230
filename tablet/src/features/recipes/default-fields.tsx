import type { Assumptions } from '@steepfall/shared/sheets';
import { litersToUsFluidOunces, usFluidOuncesToLiters } from '@steepfall/shared/units';
import { Segmented } from '#components/segmented.tsx';
import { quantityOf, useUnits } from '#lib/units.ts';
import { NumberField, plainScale, type Scale } from './number-field.tsx';
import { usePart } from './use-part.ts';

type NumberName = Exclude<keyof Assumptions, 'lidOn'>;

const labels: Record<NumberName, string> = {
  fillC: 'Water from the tap',
  roomC: 'Room',
  servingMl: 'Serving',
  chillerConstantPerS: 'Chiller constant, stirred',
  teaBaseRatio: 'Base of this tea, against the usual',
  hopBaseRatio: 'Base of these hops, against the usual',
};

const fluidOunces: Scale = {
  symbol: 'fl oz',
  fromInside: (ml) => litersToUsFluidOunces(ml / 1000),
  toInside: (ounces) => usFluidOuncesToLiters(ounces) * 1000,
};

interface DefaultFieldsProps {
  /** Members of `assume`. */
  names: readonly string[];
  /** The same default may stand under several figures. */
  rowId: string;
}

/** What is taken for granted, to be changed where it is told. An empty field takes the usual again. */
export function DefaultFields({ names, rowId }: DefaultFieldsProps) {
  const units = useUnits();
  const { value: assume, change, errorAt } = usePart('assume');
  const scales: Record<NumberName, Scale> = {
    fillC: quantityOf('temperature', units),
    roomC: quantityOf('temperature', units),
    servingMl: units.volume === 'L' ? plainScale('mL') : fluidOunces,
    chillerConstantPerS: plainScale('1/s'),
    teaBaseRatio: plainScale('times'),
    hopBaseRatio: plainScale('times'),
  };
  const known = names.filter((name): name is NumberName => name in labels);
  return (
    <div className="grid gap-3" role="group" aria-label="Change what is taken for granted">
      {known.map((name) => (
        <NumberField
          key={name}
          label={labels[name]}
          path={`assume.${name}@${rowId}`}
          scale={scales[name]}
          isOptional
          placeholder="usual"
          value={assume[name]}
          error={errorAt(name)}
          onChange={(value) => change(without(assume, name, value))}
        />
      ))}
      {names.includes('lidOn') ? (
        <Segmented
          label="Lid"
          value={assume.lidOn === undefined ? 'usual' : assume.lidOn ? 'on' : 'off'}
          onChange={(lid) => change(without(assume, 'lidOn', lid === 'usual' ? undefined : lid === 'on'))}
          segments={[
            { value: 'usual', label: 'as the kettle has it' },
            { value: 'on', label: 'on' },
            { value: 'off', label: 'off' },
          ]}
        />
      ) : null}
    </div>
  );
}

function without<Name extends keyof Assumptions>(
  assume: Assumptions,
  name: Name,
  value: Assumptions[Name],
): Assumptions {
  const { [name]: _old, ...rest } = assume;
  return value === undefined ? (rest as Assumptions) : { ...assume, [name]: value };
}
