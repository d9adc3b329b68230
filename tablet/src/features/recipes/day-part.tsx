import { LevelRule } from '#components/level-rule.tsx';
import { quantityOf, useUnits } from '#lib/units.ts';
import { NumberField, plainScale } from './number-field.tsx';
import { usePart } from './use-part.ts';

const ph = plainScale('pH');

/** From the steep to the keg: two temperatures, and the gas. */
export function DaySection() {
  const units = useUnits();
  const degrees = quantityOf('temperature', units);
  const steep = usePart('steepC');
  const transfer = usePart('transferC');
  const gas = usePart('gas');
  return (
    <section aria-label="The day and the gas" className="grid gap-4">
      <LevelRule>The day and the gas</LevelRule>
      <div className="grid grid-cols-2 gap-3">
        <NumberField
          label="Steep at"
          path="steepC"
          scale={degrees}
          value={steep.value}
          error={steep.errorAt()}
          onChange={(steepC = Number.NaN) => steep.change(steepC)}
        />
        <NumberField
          label="Into the keg at"
          path="transferC"
          scale={degrees}
          value={transfer.value}
          error={transfer.errorAt()}
          onChange={(transferC = Number.NaN) => transfer.change(transferC)}
        />
        <NumberField
          label="Gas"
          path="gas.volumes"
          scale={plainScale('vol')}
          value={gas.value.volumes}
          error={gas.errorAt('volumes')}
          onChange={(volumes = Number.NaN) => gas.change({ ...gas.value, volumes })}
        />
        <NumberField
          label="Keg kept at"
          path="gas.tempC"
          scale={degrees}
          value={gas.value.tempC}
          error={gas.errorAt('tempC')}
          onChange={(tempC = Number.NaN) => gas.change({ ...gas.value, tempC })}
        />
      </div>
    </section>
  );
}

/** What the brewer wants to hit; the figures say beside themselves whether they do. */
export function TargetsSection() {
  const { value: targets, change, errorAt } = usePart('targets');
  const { waterPh, drinkPh } = targets;
  /** The range of the drink is there with both ends or not at all. */
  const setDrinkPh = (end: 'min' | 'max', value: number | undefined) => {
    const other = drinkPh?.[end === 'min' ? 'max' : 'min'] ?? Number.NaN;
    const { drinkPh: _old, ...rest } = targets;
    if (value === undefined && Number.isNaN(other)) change(rest);
    else change({ ...rest, drinkPh: { min: other, max: other, [end]: value ?? Number.NaN } });
  };
  return (
    <section aria-label="Targets" className="grid gap-4">
      <LevelRule>Targets</LevelRule>
      <div className="grid grid-cols-2 gap-3">
        <NumberField
          label="Water, cold: from"
          path="targets.waterPh.min"
          scale={ph}
          value={waterPh.min}
          error={errorAt('waterPh.min')}
          onChange={(min = Number.NaN) => change({ ...targets, waterPh: { ...waterPh, min } })}
        />
        <NumberField
          label={<RangeEnd of="Water, cold" />}
          path="targets.waterPh.max"
          scale={ph}
          value={waterPh.max}
          error={errorAt('waterPh.max')}
          onChange={(max = Number.NaN) => change({ ...targets, waterPh: { ...waterPh, max } })}
        />
        <NumberField
          label="Drink, still: from"
          path="targets.drinkPh.min"
          scale={ph}
          isOptional
          placeholder="none"
          value={drinkPh?.min}
          error={errorAt('drinkPh.min')}
          onChange={(value) => setDrinkPh('min', value)}
        />
        <NumberField
          label={<RangeEnd of="Drink, still" />}
          path="targets.drinkPh.max"
          scale={ph}
          isOptional
          placeholder="none"
          value={drinkPh?.max}
          error={errorAt('drinkPh.max')}
          onChange={(value) => setDrinkPh('max', value)}
        />
      </div>
      <NumberField
        label="Caffeine at most"
        path="targets.caffeineMostMgPerL"
        scale={plainScale('mg/L')}
        isOptional
        placeholder="no limit of your own"
        value={targets.caffeineMostMgPerL}
        error={errorAt('caffeineMostMgPerL')}
        onChange={(caffeineMostMgPerL) => change({ ...targets, caffeineMostMgPerL })}
      />
    </section>
  );
}

function RangeEnd({ of }: { of: string }) {
  return (
    <>
      <span className="sr-only">{of}: </span>to
    </>
  );
}
