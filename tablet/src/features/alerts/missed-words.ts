import { AS_PLANNED, reheatToC, type MissedChoice, type MissedChoiceMade } from '@steepfall/shared/runs';
import type { Step } from '@steepfall/shared/sheets';
import { formatDuration, formatMass, NO_BREAK_SPACE, type UnitPreferences } from '@steepfall/shared/units';
import { formatLevel } from '#lib/units.ts';

/** Hotter than this, hands need a word of caution: seconds are enough for a burn, °C. */
const SCALD_ABOVE_C = 49;

export interface ChoiceWords {
  /** What to do, verb first. */
  title: string;
  /** What to do first, when anything. */
  first: string | null;
  /** What it does to contact and bitterness. */
  effect: string;
}

/** "4 min", "1 min 30 s", "40 s": spans of a kitchen, which nobody reads as minutes and seconds of a clock. */
export function spanText(seconds: number): string {
  const minutes = Math.floor(seconds / 60);
  const rest = Math.round(seconds - minutes * 60);
  const [s, min] = [`${rest}${NO_BREAK_SPACE}s`, `${minutes}${NO_BREAK_SPACE}min`];
  if (minutes === 0) return s;
  if (minutes >= 10) return `${Math.round(seconds / 60)}${NO_BREAK_SPACE}min`;
  return rest === 0 ? min : `${min}${NO_BREAK_SPACE}${s}`;
}

function share(ratio: number): string {
  if (Math.abs(ratio - 1) < AS_PLANNED) return 'as planned';
  return ratio < AS_PLANNED ? 'next to none' : ratio.toFixed(1);
}

/** "contact as planned, bitterness 0.6 of it" */
function effectText({ aromaRatio, isoRatio }: MissedChoice, hasHops: boolean): string {
  const [contact, bitterness] = [share(aromaRatio), share(isoRatio)];
  const isNumber = (text: string) => /\d/.test(text);
  if (!hasHops) return `contact ${contact}${isNumber(contact) ? ' of the plan' : ''}`;
  if (contact === 'as planned' && bitterness === 'as planned') return 'all as planned';
  const ofWhat = contact === 'as planned' ? ' of it' : ' of the plan';
  return `contact ${contact}, bitterness ${bitterness}${[contact, bitterness].some(isNumber) ? ofWhat : ''}`;
}

function totalG({ amounts }: Pick<Step, 'amounts'>): number {
  return amounts.reduce((sum, { massG }) => sum + massG, 0);
}

/** A way out in words, in the person's units. */
export function choiceWords(
  choice: MissedChoice,
  { step, targetC, nowC }: { step: Step; targetC: number; nowC: number | null },
  units: UnitPreferences,
): ChoiceWords {
  const hasHops = step.acts.includes('hops-in');
  const effect = nowC === null ? 'no reading comes in, so no figures' : effectText(choice, hasHops);
  switch (choice.choice) {
    case 'hold': {
      const level = formatLevel(Math.round(nowC ?? targetC), units);
      return {
        title: `Add now, hold ${spanText(choice.holdS ?? 0)} at ${level}`,
        first: 'stop the chiller',
        effect,
      };
    }
    case 'more': {
      const extraG = choice.extraG ?? 0;
      const unit = units.mass;
      return {
        title: `Add ${formatMass(extraG, { unit })} more`,
        first: `${formatMass(totalG(step) + extraG, { unit })} in all, now`,
        effect,
      };
    }
    case 'reheat':
      return {
        title: `Reheat, about ${spanText(choice.reheatS ?? 0)}`,
        first: reheatFirst(targetC, units),
        effect,
      };
    case 'accept':
      return { title: 'Add now and accept', first: null, effect };
  }
}

function reheatFirst(targetC: number, units: UnitPreferences): string {
  const toC = reheatToC(targetC);
  const caution = toC > SCALD_ABOVE_C ? ' · gloves, lid away from you' : '';
  return `chiller off, heat to ${formatLevel(toC, units)}${caution}`;
}

/** What was chosen, for the line above the step. */
export function chosenWords(
  { choice, extraG, reheatS }: MissedChoiceMade,
  { step, targetC, leftS }: { step: Step; targetC: number; leftS: number | null },
  units: UnitPreferences,
): string {
  const unit = units.mass;
  switch (choice) {
    case 'hold':
      return leftS === null
        ? 'Held as long as it was short. Chiller on again'
        : `Holding, chiller off: ${formatDuration(leftS)} left`;
    case 'more':
      return `${formatMass(totalG(step), { unit })} went in, ${formatMass(extraG ?? 0, { unit })} of it on top`;
    case 'reheat':
      return `Reheating, about ${spanText(reheatS ?? 0)}: ${reheatFirst(targetC, units)} · calls again at ${formatLevel(targetC, units)}`;
    case 'accept':
      return 'Added late, and taken as it is';
  }
}
