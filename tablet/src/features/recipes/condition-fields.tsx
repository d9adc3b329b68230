import type { Addition, AdditionIn, AdditionOut } from '@steepfall/shared/sheets';
import { SelectField } from '#components/field.tsx';
import { quantityOf, useUnits } from '#lib/units.ts';
import { minutesScale, NumberField, SmallLabel } from './number-field.tsx';
import { useValueOf } from './use-part.ts';

interface ConditionFieldsProps {
  addition: Addition;
  path: string;
  errorAt: (path: string) => string | undefined;
  onChange: (next: Addition) => void;
}

const twoFields = 'grid grid-cols-[1.25fr_1fr] items-end gap-3';
const USUAL_IN_C = 62;
const USUAL_OUT_C = 30;
const USUAL_STAY_S = 180;

/** When it goes in and when it comes out, in plain words. */
export function ConditionFields({ addition, path, errorAt, onChange }: ConditionFieldsProps) {
  const units = useUnits();
  const transferC = useValueOf('transferC');
  const changeIn = (at: AdditionIn['at']) => {
    const next: Record<AdditionIn['at'], AdditionIn> = {
      fill: { at: 'fill' },
      steep: { at: 'steep', afterS: 0 },
      falling: { at: 'falling', tempC: USUAL_IN_C },
      transfer: { at: 'transfer' },
    };
    onChange({ ...addition, in: next[at] });
  };
  const degrees = quantityOf('temperature', units);
  const hasField = addition.in.at === 'steep' || addition.in.at === 'falling';
  return (
    <>
      <div className={hasField ? twoFields : 'grid'}>
        <SelectField
          label={<SmallLabel>Goes in</SmallLabel>}
          name={`${path}.in.at`}
          value={addition.in.at}
          onChange={({ target }) => changeIn(target.value as AdditionIn['at'])}
        >
          <option value="fill">cold, with the water</option>
          <option value="steep">at the steep</option>
          <option value="falling">on the fall</option>
          <option value="transfer">into the keg</option>
        </SelectField>
        {addition.in.at === 'steep' ? (
          <NumberField
            label={<Way way="in">into the steep</Way>}
            path={`${path}.in.afterS`}
            scale={minutesScale}
            value={addition.in.afterS}
            error={errorAt('in.afterS')}
            onChange={(afterS = Number.NaN) => onChange({ ...addition, in: { at: 'steep', afterS } })}
          />
        ) : addition.in.at === 'falling' ? (
          <NumberField
            label={<Way way="in">at</Way>}
            path={`${path}.in.tempC`}
            scale={degrees}
            value={addition.in.tempC}
            error={errorAt('in.tempC')}
            onChange={(tempC = Number.NaN) => onChange({ ...addition, in: { at: 'falling', tempC } })}
          />
        ) : null}
      </div>
      {'out' in addition && addition.in.at !== 'transfer' ? (
        <OutFields
          out={addition.out}
          path={path}
          errorAt={errorAt}
          lowestC={transferC}
          onChange={(out) => onChange({ ...addition, out })}
        />
      ) : null}
    </>
  );
}

interface OutFieldsProps {
  out: AdditionOut;
  path: string;
  errorAt: (path: string) => string | undefined;
  lowestC: number;
  onChange: (out: AdditionOut) => void;
}

function OutFields({ out, path, errorAt, lowestC, onChange }: OutFieldsProps) {
  const units = useUnits();
  const changeOut = (at: AdditionOut['at']) => {
    const next: Record<AdditionOut['at'], AdditionOut> = {
      timer: { at: 'timer', durationS: USUAL_STAY_S },
      falling: { at: 'falling', tempC: Math.max(USUAL_OUT_C, lowestC || 0) },
      transfer: { at: 'transfer' },
    };
    onChange(next[at]);
  };
  return (
    <div className={out.at === 'transfer' ? 'grid' : twoFields}>
      <SelectField
        label={<SmallLabel>Comes out</SmallLabel>}
        name={`${path}.out.at`}
        value={out.at}
        onChange={({ target }) => changeOut(target.value as AdditionOut['at'])}
      >
        <option value="timer">by the clock</option>
        <option value="falling">on the fall</option>
        <option value="transfer">at the transfer</option>
      </SelectField>
      {out.at === 'timer' ? (
        <NumberField
          label={<Way way="out">after</Way>}
          path={`${path}.out.durationS`}
          scale={minutesScale}
          value={out.durationS}
          error={errorAt('out.durationS')}
          onChange={(durationS = Number.NaN) => onChange({ at: 'timer', durationS })}
        />
      ) : out.at === 'falling' ? (
        <NumberField
          label={<Way way="out">at</Way>}
          path={`${path}.out.tempC`}
          scale={quantityOf('temperature', units)}
          value={out.tempC}
          error={errorAt('out.tempC')}
          onChange={(tempC = Number.NaN) => onChange({ at: 'falling', tempC })}
        />
      ) : null}
    </div>
  );
}

/** "in at", "out after": what stands beside it on the screen is not heard with it. */
function Way({ way, children }: { way: 'in' | 'out'; children: string }) {
  return (
    <>
      <span className="sr-only">{way} </span>
      {children}
    </>
  );
}
