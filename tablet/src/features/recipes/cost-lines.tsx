import { useMemo } from 'react';
import { useQuery } from '@tanstack/react-query';
import { recipeCost } from '@steepfall/shared/desk';
import type { RecipeDocument } from '@steepfall/shared/sheets';
import { LevelRule } from '#components/level-rule.tsx';
import { storesQuery } from '#lib/hub-queries.ts';
import { useKnown } from '#lib/session.ts';

/** What the ingredients cost, from the prices in the stores. */
export function CostLines({ document }: { document: RecipeDocument }) {
  const { house } = useKnown();
  const { data: stores } = useQuery(storesQuery);
  const cost = useMemo(() => (stores ? recipeCost(document, stores) : null), [document, stores]);
  const money = useMemo(
    () => new Intl.NumberFormat(undefined, { style: 'currency', currency: house.currency }),
    [house.currency],
  );
  if (!cost) return null;
  const lines: [string, number | null][] = [
    ['a batch', cost.total],
    ['a litre', cost.perL],
    ['a serving', cost.perServing],
  ];
  const isUnknown = cost.total === 0 && cost.unknown.length > 0;
  return (
    <section aria-label="Cost" className="grid">
      <LevelRule level={3}>Cost</LevelRule>
      {isUnknown ? (
        <p className="text-body text-soft">No lot in the stores has a price yet for what goes in.</p>
      ) : (
        <>
          <dl>
            {lines.map(([word, amount]) =>
              amount === null ? null : (
                <div
                  key={word}
                  className="flex items-baseline justify-between gap-4 border-b border-hair py-2.5 pl-4 last:border-b-0"
                >
                  <dt className="text-body">{word}</dt>
                  <dd className="text-body font-medium tabular-nums">{money.format(amount)}</dd>
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
