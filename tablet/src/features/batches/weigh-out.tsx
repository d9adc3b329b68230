import { useQuery } from '@tanstack/react-query';
import type { Batch, WeighOutLine } from '@steepfall/shared/contracts';
import { costOf } from '@steepfall/shared/desk';
import { formatMass, GRAMS_PER_OUNCE } from '@steepfall/shared/units';
import { Button } from '#components/button.tsx';
import { classNames } from '#components/class-names.ts';
import { CostLine } from '#components/cost-line.tsx';
import { LevelRule } from '#components/level-rule.tsx';
import { StatusChip } from '#components/status-chip.tsx';
import { TickBox } from '#components/tick-box.tsx';
import { equipmentQuery, recipeQuery } from '#lib/hub-queries.ts';
import { useKnown, useMay } from '#lib/session.ts';
import { useUnits } from '#lib/units.ts';
import { calendarDay } from '#lib/words.ts';
import { bagsOf, roundedG } from './weigh-out-bags.ts';
import { useTicks } from './weigh-out-ticks.ts';
import './weigh-out.css';

interface WeighOutProps {
  batch: Batch;
  lines: readonly WeighOutLine[];
}

/** What is weighed into which bag, and from which lot: a list to stand at the scale with, on the screen or on paper. */
export function WeighOut({ batch, lines }: WeighOutProps) {
  const { house } = useKnown();
  const resolutionG = useScaleStep();
  const [ticks, tick] = useTicks(batch.id);
  // Hops are weighed while the tea steeps: the list is open until the run has ended.
  const isOpen = batch.status === 'planned' || batch.status === 'running';
  const done = lines.filter(({ additionId }) => ticks.has(additionId)).length;
  return (
    <section aria-labelledby="weigh-out" className="weigh-out grid min-w-0 content-start gap-4">
      <p className="hidden text-body print:block">
        {house.name} · batch {batch.batchNumber} · {calendarDay(batch.plannedOn)}
      </p>
      <LevelRule
        id="weigh-out"
        aside={
          <span className="flex items-center gap-5 print:hidden">
            {isOpen ? (
              <span role="status" className="tabular-nums">
                {done} of {lines.length}
              </span>
            ) : null}
            <Button onClick={() => print()}>Print</Button>
          </span>
        }
      >
        {isOpen ? 'Weigh out' : 'What went in'}
      </LevelRule>
      {bagsOf(lines).map(({ bag, lines: held }) => (
        <div key={bag ?? ''} className="break-inside-avoid">
          <h3 className="text-body font-semibold text-soft">{bag ?? 'In no bag'}</h3>
          <ul>
            {held.map((line) => (
              <WeighLine
                key={line.additionId}
                line={line}
                resolutionG={resolutionG}
                isTicked={ticks.has(line.additionId)}
                onTick={isOpen ? (isTicked) => tick(line.additionId, isTicked) : null}
              />
            ))}
          </ul>
        </div>
      ))}
      {resolutionG === undefined ? null : (
        <p className="text-note text-soft">Rounded to what the scale of the house shows.</p>
      )}
    </section>
  );
}

/** The finest scale of the house; without one nothing is rounded. */
function useScaleStep(): number | undefined {
  const may = useMay();
  const equipment = useQuery({ ...equipmentQuery, enabled: may('equipment:read') });
  const steps = (equipment.data ?? []).flatMap((item) => (item.kind === 'scale' ? [item.facts.resolutionG] : []));
  return steps.length > 0 ? Math.min(...steps) : undefined;
}

interface WeighLineProps {
  line: WeighOutLine;
  resolutionG: number | undefined;
  isTicked: boolean;
  onTick: ((isTicked: boolean) => void) | null;
}

/** Below an ounce the grams stand there too: hundredths of an ounce are too coarse for a salt. */
function WeighLine({ line, resolutionG, isTicked, onTick }: WeighLineProps) {
  const { mass: unit } = useUnits();
  const { name, massG, lots } = line;
  const grams = (value: number) => formatMass(roundedG(value, resolutionG), { unit });
  const missingG = massG - lots.reduce((sum, lot) => sum + lot.massG, 0);
  const from = lots.map((lot) => ({
    key: lot.lotId,
    words: [
      lots.length > 1 ? `${grams(lot.massG)} from` : 'from',
      lot.code,
      ...(lot.ingredientName === name ? [] : [`(${lot.ingredientName})`]),
    ].join(' '),
  }));
  return (
    <li className="flex items-start gap-2 border-b border-hair py-2">
      {onTick ? (
        <TickBox label={`${grams(massG)} ${name} weighed`} isLabelHidden isTicked={isTicked} onTick={onTick} />
      ) : null}
      <div className="grid min-w-0 flex-1 grid-cols-[4.75rem_1fr] items-baseline gap-x-4 sm:grid-cols-[6.5rem_1fr] sm:gap-x-5 py-2">
        <span className={classNames('text-right text-lead font-semibold tabular-nums', isTicked && 'text-soft')}>
          {grams(massG)}
          {unit === 'oz' && massG < GRAMS_PER_OUNCE ? (
            <span className="block text-note font-normal text-soft">
              {formatMass(roundedG(massG, resolutionG), { unit: 'g' })}
            </span>
          ) : null}
        </span>
        <span className="min-w-0">
          <span className={classNames('block text-lead break-words', isTicked && 'text-soft line-through')}>
            {name}
          </span>
          {from.map(({ key, words }) => (
            <span key={key} className="block text-body break-words text-soft tabular-nums">
              {words}
            </span>
          ))}
          {missingG > 0.0005 ? (
            <StatusChip shape="ring" className="text-body">
              {lots.length === 0 ? 'no lot set aside' : `${grams(missingG)} from no lot`}
            </StatusChip>
          ) : null}
        </span>
      </div>
    </li>
  );
}

/** What the batch costs, from the lots that were set aside or used. */
export function BatchCost({ batch, lines }: WeighOutProps) {
  const may = useMay();
  const recipe = useQuery({ ...recipeQuery(batch.recipeId), enabled: may('recipes:read') });
  const servingMl = recipe.data?.revisions.find(({ id }) => id === batch.revisionId)?.document.assume.servingMl;
  const cost = costOf(lines, { volumeL: batch.volumeL, ...(servingMl === undefined ? {} : { servingMl }) });
  return (
    <section aria-labelledby="cost" className="grid content-start gap-4 print:hidden">
      <LevelRule id="cost">{batch.status === 'planned' ? 'What it will cost' : 'What it cost'}</LevelRule>
      <CostLine cost={cost} />
    </section>
  );
}
