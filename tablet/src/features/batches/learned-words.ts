import type { LessonAnswer, ReachLesson } from '@steepfall/shared/contracts';
import { usualReachS } from '@steepfall/shared/sheets';
import { spanWords } from '#lib/words.ts';

/** The four things that a run teaches of its kit. */
export type KitLesson = 'lagS' | 'coolingPerS' | 'chillingPerS' | 'heaterEfficiency';

export interface LessonWords {
  name: string;
  told: string;
  /** null: too little to say; `note` then says why. */
  learned: string | null;
  note: string;
}

const names: Record<KitLesson, string> = {
  lagS: 'Lag of the probe',
  coolingPerS: 'Kettle with its lid on, halfway to the room',
  chillingPerS: 'Kettle being chilled, halfway to the coolant',
  heaterEfficiency: 'Heat that reaches the water',
};

const seconds = (value: number) => `${value.toFixed(1)}\u00a0s`;
const percent = (share: number) => `${Math.round(share * 100)}\u00a0%`;
const halfway = (perS: number) => spanWords(Math.LN2 / perS);

const valueWords: Record<KitLesson, (value: number) => string> = {
  lagS: seconds,
  coolingPerS: halfway,
  chillingPerS: halfway,
  heaterEfficiency: percent,
};

/** Half the width of where it lies nine times of ten, in the same unit as the value. */
const errorWords: Record<KitLesson, (learned: { value: number; error: number }) => string> = {
  lagS: ({ error }) => seconds(error),
  coolingPerS: ({ value, error }) => `${Math.round((error / value) * 100)}\u00a0%`,
  chillingPerS: ({ value, error }) => `${Math.round((error / value) * 100)}\u00a0%`,
  heaterEfficiency: ({ error }) => percent(error),
};

const gapWords: Record<NonNullable<LessonAnswer['because']>, string> = {
  'no-readings': 'there are no good readings.',
  'few-changes': 'nothing was tapped that moves the probe quickly.',
  'too-short': 'it did not last long enough undisturbed.',
  unclear: 'the readings do not settle it.',
  'far-from-told':
    'it comes out so far from what was told that something else must be wrong. Look at what the house has written down.',
  'not-told': 'what has to be known for it was not written down.',
};

export function lessonWords(kind: KitLesson, { told, learned, because }: LessonAnswer): LessonWords {
  return {
    name: names[kind],
    told: told === null ? 'not written down yet' : `told ${valueWords[kind](told)}`,
    learned: learned ? valueWords[kind](learned.value) : null,
    note: learned
      ? `give or take ${errorWords[kind](learned)}`
      : `Too little to say: ${because ? gapWords[because] : 'the readings do not settle it.'}`,
  };
}

const calls = (count: number) => (count === 1 ? '1 call' : `${count} calls`);

export function reachWords(lesson: ReachLesson): LessonWords {
  const { displayName, toldS, reachS, spreadS, answeredCount, missedCount } = lesson;
  const missed = missedCount > 0 ? `, ${missedCount} missed and left out` : '';
  return {
    name: `From call to act, ${displayName}`,
    told: `told ${toldS ?? usualReachS}\u00a0s${toldS === null ? ', the usual' : ''}`,
    learned: reachS === null ? null : `${reachS}\u00a0s`,
    note:
      reachS === null
        ? `Too little to say: ${calls(answeredCount)} answered so far${missed}. It takes four.`
        : `the middle of ${calls(answeredCount)}, give or take ${Math.max(1, Math.round(spreadS ?? 0))}\u00a0s${missed}`,
  };
}
