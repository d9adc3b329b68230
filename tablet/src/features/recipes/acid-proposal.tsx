import { useMemo } from 'react';
import { acidAdvice, type AcidAdvice, type DeskKit } from '@steepfall/shared/desk';
import { showBand } from '@steepfall/shared/figures';
import { formatMass, inUnit, type UnitPreferences } from '@steepfall/shared/units';
import { Button } from '#components/button.tsx';
import { useUnits } from '#lib/units.ts';
import type { Desk } from './use-desk.ts';
import { usePart } from './use-part.ts';

/** Nearer than this to what is asked, nobody weighs it again. */
const NEAR_SHARE = 0.03;

/** How much acid brings the drink to its target, to be taken with one tap. */
export function AcidProposal({ desk: { document, isOld }, kit }: { desk: Desk; kit: DeskKit | null }) {
  const units = useUnits();
  const { value: additions, change } = usePart('additions');
  const advice = useMemo(() => (document && kit ? acidAdvice(document, kit) : null), [document, kit]);
  if (!advice || isOld) return null;
  const index = additions.findIndex(({ id }) => id === advice.additionId);
  const addition = additions[index];
  if (!addition) return null;
  const massG = advice.kind === 'dose' ? Math.round(advice.massG.value * 10) / 10 : 0;
  if (advice.kind === 'dose' && Math.abs(massG - addition.massG) <= NEAR_SHARE * addition.massG) return null;
  return (
    <section aria-label="Acid" className="flex flex-wrap items-center gap-x-5 gap-y-3 bg-raised px-5 py-4">
      <p className="min-w-52 flex-1 text-body">{adviceWords(advice, units)}</p>
      {advice.kind === 'dose' && massG > 0 ? (
        <Button onClick={() => change(additions.with(index, { ...addition, massG }))}>
          Take {formatMass(massG, { unit: units.mass })}
        </Button>
      ) : null}
    </section>
  );
}

function adviceWords(advice: AcidAdvice, units: UnitPreferences): string {
  const { name, wantedPh } = advice;
  const ph = Number(wantedPh.toFixed(2));
  switch (advice.kind) {
    case 'dose': {
      const to = (massG: number) => inUnit('mass', massG, units.mass);
      const { low, value, high } = advice.massG;
      const band = showBand({ ...advice.massG, low: to(low), value: to(value), high: to(high) });
      return `For pH ${ph} in the still drink it takes ${band} ${units.mass} of ${name}.`;
    }
    case 'none-needed':
      return `Without any ${name} the drink is already at pH ${advice.ph.toFixed(2)}, no higher than the ${ph} you want.`;
    case 'never':
      return `With ${name} alone the drink cannot come to pH ${ph}: choose a stronger acid, or another target.`;
  }
}
