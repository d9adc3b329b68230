import type { Cost } from '@steepfall/shared/desk';
import { LITERS_PER_US_GALLON } from '@steepfall/shared/units';
import { useMoney } from '#lib/money.ts';
import { useUnits } from '#lib/units.ts';
import { listWords } from '#lib/words.ts';

const volumes = {
  L: { word: 'litre', volumeL: 1 },
  gal: { word: 'gallon', volumeL: LITERS_PER_US_GALLON },
} as const;

/** What a batch costs in ingredients; what has no price is named, never counted as free. */
export function CostLine({ cost: { total, perL, perServing, unknown } }: { cost: Cost }) {
  const money = useMoney();
  const { volume } = useUnits();
  const { word, volumeL } = volumes[volume];
  const parts = [
    { label: 'the batch', amount: total },
    { label: `a ${word}`, amount: perL === null ? null : perL * volumeL },
    { label: 'a serving', amount: perServing },
  ];
  return (
    <div className="grid gap-2">
      <dl className="flex flex-wrap gap-x-10 gap-y-3">
        {parts.map(({ label, amount }) =>
          amount === null ? null : (
            <div key={label} className="flex flex-col-reverse">
              <dt className="text-note text-soft">{label}</dt>
              <dd className="text-lead font-semibold tabular-nums">{money(amount)}</dd>
            </div>
          ),
        )}
      </dl>
      {unknown.length > 0 ? (
        <p className="text-note text-soft">
          Without {listWords(unknown)}: not all of it comes from a lot with a price.
        </p>
      ) : null}
    </div>
  );
}
