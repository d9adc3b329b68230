import type { Cost } from '@steepfall/shared/desk';
import { costParts } from '#lib/cost-parts.ts';
import { useMoney } from '#lib/money.ts';
import { useUnits } from '#lib/units.ts';
import { listWords } from '#lib/words.ts';

/** What a batch costs in ingredients; what has no price is named, never counted as free. */
export function CostLine({ cost }: { cost: Cost }) {
  const money = useMoney();
  const { volume } = useUnits();
  const { unknown } = cost;
  return (
    <div className="grid gap-2">
      <dl className="flex flex-wrap gap-x-10 gap-y-3">
        {costParts(cost, volume).map(({ label, amount }) =>
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
