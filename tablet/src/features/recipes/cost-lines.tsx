import { useMemo } from 'react';
import { useQuery } from '@tanstack/react-query';
import { recipeCost } from '@steepfall/shared/desk';
import type { RecipeDocument } from '@steepfall/shared/sheets';
import { LevelRule } from '#components/level-rule.tsx';
import { costParts } from '#lib/cost-parts.ts';
import { storesQuery } from '#lib/hub-queries.ts';
import { useMoney } from '#lib/money.ts';
import { useUnits } from '#lib/units.ts';

/** What the ingredients cost, from the prices in the stores. */
export function CostLines({ document }: { document: RecipeDocument }) {
  const { data: stores } = useQuery(storesQuery);
  const cost = useMemo(() => (stores ? recipeCost(document, stores) : null), [document, stores]);
  const money = useMoney();
  const { volume } = useUnits();
  if (!cost) return null;
  const isUnknown = cost.total === 0 && cost.unknown.length > 0;
  return (
    <section aria-label="Cost" className="grid">
      <LevelRule level={3}>Cost</LevelRule>
      {isUnknown ? (
        <p className="text-body text-soft">No lot in the stores has a price yet for what goes in.</p>
      ) : (
        <>
          <dl>
            {costParts(cost, volume).map(({ label, amount }) =>
              amount === null ? null : (
                <div
                  key={label}
                  className="flex items-baseline justify-between gap-4 border-b border-hair py-2.5 pl-4 last:border-b-0"
                >
                  <dt className="text-body">{label}</dt>
                  <dd className="text-body font-medium tabular-nums">{money(amount)}</dd>
                </div>
              ),
            )}
          </dl>
          {cost.unknown.length > 0 ? (
            <p className="pl-4 text-note text-soft">Without {cost.unknown.join(', ')}: no price is known.</p>
          ) : null}
        </>
      )}
    </section>
  );
}
