import { showPhBand } from '@steepfall/shared/figures';
import {
  accountSoFar,
  nextAcid,
  NO_LINE,
  type AcidAnswer,
  type Decision,
  type RunCommand,
} from '@steepfall/shared/runs';
import { formatMass, type UnitPreferences } from '@steepfall/shared/units';
import { useEffect, useState } from 'react';
import { Button } from '#components/button.tsx';
import { ShapeGlyph } from '#components/shapes.tsx';
import { useRunState, useRunStore } from '#lib/run-store/run-context.tsx';
import { inPersonsWords, useUnits } from '#lib/units.ts';
import { useAccount } from './live-figures-follow.ts';

/** What a measured pH asks for; `null` while it is not one, or when this run cannot say. */
function useAcidAnswer(ph: number): AcidAnswer | null {
  const state = useRunState();
  const store = useRunStore();
  const account = useAccount() ?? accountSoFar(state, NO_LINE, store.nowMs());
  if (account.kind !== 'account' || !(ph >= 1 && ph <= 9)) return null;
  return nextAcid(state, account, ph);
}

interface AcidWords {
  /** In one breath: "Add 1.2 g citric acid". */
  what: string;
  why: string[];
}

/** What to do, and what it rests on. */
export function acidWords(answer: AcidAnswer, { mass: unit }: UnitPreferences): AcidWords {
  const { stage, targetPh, expectedPh, ratio, pendingG } = answer;
  const aim = `pH ${targetPh.toFixed(1)}`;
  const of = stage === 'water' ? 'the water' : 'the drink';
  const comesTo = expectedPh === null ? [] : [`With all that goes in it comes to about pH ${expectedPh.toFixed(1)}.`];
  const leaf = ratio === null ? [] : [`This leaf brings ${ratio.toFixed(1)} times the usual base, by this pH.`];
  const pending =
    pendingG > 0 ? [`Counted already: ${formatMass(pendingG, { unit })} of acid that still goes in.`] : [];
  switch (answer.kind) {
    case 'add': {
      const { low, high } = answer.massG;
      const grams = (massG: number) => formatMass(massG, { unit });
      const range =
        grams(low) === grams(high) ? [] : [`From ${grams(low)} to ${grams(high)}, as well as a meter knows.`];
      return {
        what: `Add ${grams(answer.massG.value)} ${answer.name}`,
        why: [
          `For ${of} at ${aim}.`,
          ...range,
          ...(stage === 'water' ? ['Rests on the measured pH and the amounts on the sheet.'] : [...leaf, ...comesTo]),
          ...pending,
          'Stir, cool a new sample, measure again.',
        ],
      };
    }
    case 'enough':
      return {
        what: 'No more acid',
        why: [
          `${stage === 'water' ? 'The water' : 'The drink'} is where it should be.`,
          ...leaf,
          ...comesTo,
          ...pending,
        ],
      };
    case 'too-low':
      return {
        what: 'Too low already: do not add acid',
        why: [
          'Stir and measure a fresh sample, cooled to 20 to 25 °C.',
          ...(expectedPh === null
            ? []
            : [
                stage === 'water'
                  ? `If it stays: leaf and hops lift it to about pH ${expectedPh.toFixed(1)}. When that is too sour, swap part of it for the same water without acid.`
                  : `If it stays: it ends at about pH ${expectedPh.toFixed(1)}. Thin it with water, and write a note.`,
              ]),
          ...leaf,
        ],
      };
    case 'measure-again':
      return {
        what: 'Measure again',
        why: [
          'Nothing on this sheet explains this pH. Rinse and calibrate the meter, cool the sample to 20 to 25 °C, drive the gas out.',
          'If it stays, add acid in small steps and measure after each.',
        ],
      };
    case 'no-acid':
      return {
        what: `Above ${aim}, and no acid in the recipe`,
        why: [...comesTo, 'Go on, and add an acid to the next revision.'],
      };
    case 'never':
      return {
        what: 'Not with this acid',
        why: [
          `${aim} would take more of it than a drink bears. Measure again; if it stays, go on and write a note.`,
          ...comesTo,
        ],
      };
  }
}

interface AcidHintProps {
  ph: number;
  /** Not while only the 3 of 3.6 is there. */
  isShown: boolean;
  onAsks: (asks: boolean) => void;
}

/** What the typed pH asks for, in a few words, while it is typed. */
export function AcidHint({ ph, isShown, onAsks }: AcidHintProps) {
  const units = useUnits();
  const answer = useAcidAnswer(ph);
  const asks = answer !== null && answer.kind !== 'enough';
  useEffect(() => onAsks(asks), [asks, onAsks]);
  return answer && isShown ? <span className="block font-semibold">{acidWords(answer, units).what}.</span> : null;
}

interface AcidDoseProps {
  ph: number;
  onRecord: (command: RunCommand) => Promise<Decision>;
  onOther: (stepId: string) => void;
  onClose: () => void;
}

/** The next dose, and the tap that writes it down once it is in. */
export function AcidDose({ ph, onRecord, onOther, onClose }: AcidDoseProps) {
  const units = useUnits();
  const answer = useAcidAnswer(ph);
  const [error, setError] = useState<string | null>(null);
  if (!answer) return null;
  const { what, why } = acidWords(answer, units);
  const added = async (stepId: string, massG: number) => {
    const value = Number(massG.toPrecision(3));
    const decision = await onRecord({ type: 'recordMeasurement', quantity: 'massG', value, stepId, tempC: null });
    if (decision.ok) onClose();
    else setError(inPersonsWords(decision.problem.detail, units));
  };
  return (
    <section className="acid-dose" aria-label="Acid">
      <p className="text-lead text-soft tabular-nums">
        pH {showPhBand({ low: ph, value: ph, high: ph })} is written down.
      </p>
      <p className="acid-dose-what" role="status">
        <ShapeGlyph shape={answer.kind === 'enough' ? 'dot' : 'diamond'} className="size-[0.6em] shrink-0" />
        {what}
      </p>
      <ul className="grid gap-1 text-lead">
        {why.map((words) => (
          <li key={words}>{inPersonsWords(words, units)}</li>
        ))}
      </ul>
      {error ? (
        <p role="alert" className="text-lead text-ember">
          {error}
        </p>
      ) : null}
      <div className="flex flex-wrap gap-4">
        {answer.kind === 'add' ? (
          <>
            <Button look="primary" size="sheet" onClick={() => void added(answer.stepId, answer.massG.value)}>
              {formatMass(answer.massG.value, { unit: units.mass })} is in
            </Button>
            <Button size="sheet" onClick={() => onOther(answer.stepId)}>
              Another amount is in
            </Button>
          </>
        ) : null}
        <Button size="sheet" look={answer.kind === 'add' ? 'plain' : 'primary'} onClick={onClose}>
          {answer.kind === 'add' ? 'Not now' : 'Back to the sheet'}
        </Button>
      </div>
    </section>
  );
}
