import { secondsLeft } from '@steepfall/shared/timers';
import { currentStep, temperatureClips, type RunCommand, type RunState } from '@steepfall/shared/runs';
import { takeOverAlert } from '../run-store/take-over.ts';

/** What a person at the kettle can say, whoever or whatever understood the words. */
export type Intent =
  | { kind: 'done' }
  | { kind: 'back' }
  | { kind: 'heard' }
  | { kind: 'note'; text: string }
  | { kind: 'how-hot' }
  | { kind: 'how-long' };

/** Whole phrases only: in a kitchen people talk, and a word that happens to fall in a sentence must do nothing. */
const phrases: Record<Exclude<Intent['kind'], 'note'>, readonly string[]> = {
  done: ['done', 'that is done', 'it is done', 'all done', 'step done'],
  back: ['back one', 'go back one', 'take it back', 'take that back'],
  heard: ['heard', 'heard it', 'i heard it', 'i hear you', 'got it'],
  'how-hot': ['how hot', 'how hot is it', 'how warm', 'how warm is it'],
  'how-long': ['how long', 'how long yet', 'how much longer', 'how long is left'],
};

const intentsByPhrase = new Map<string, Intent>(
  Object.entries(phrases).flatMap(([kind, said]) => said.map((phrase) => [phrase, { kind } as Intent] as const)),
);

function plain(words: string): string {
  return words
    .toLowerCase()
    .replace(/['’]s\b/g, ' is')
    .replace(/[^\p{L}\p{N}\s]/gu, ' ')
    .replace(/\s+/g, ' ')
    .trim();
}

/** What these words ask for; `null` when they are none of ours. */
export function intentOf(words: string): Intent | null {
  const [, text] = /^\s*note[\s:,.]+(.+)$/isu.exec(words) ?? [];
  if (text?.trim()) return { kind: 'note', text: text.trim() };
  return intentsByPhrase.get(plain(words)) ?? null;
}

export interface Known {
  state: RunState;
  /** Run clock, epoch ms. */
  nowMs: number;
  /** The liquid at this instant; null when nobody knows. */
  tempC: number | null;
  /** When the level is met as far as is known, run clock; null when nobody knows. */
  meetingAtMs: number | null;
  unit: 'C' | 'F';
}

/** An intent as acts on the run and words to say back. Both empty: there is nothing that it could mean now. */
export interface VoiceAnswer {
  commands: RunCommand[];
  /** Spoken clips. */
  say: string[];
}

const nothing: VoiceAnswer = { commands: [], say: [] };
const MINUTES_FROM_S = 90;

function leftClips(leftS: number): string[] {
  if (leftS < MINUTES_FROM_S) return [`n${Math.ceil(leftS)}`, 'in-seconds'];
  return [`n${Math.min(220, Math.floor(leftS / 60))}`, 'in-minutes'];
}

function leftS({ state, nowMs, meetingAtMs }: Known): number | null {
  const current = currentStep(state);
  const timer = state.timers.find(({ stepId }) => stepId === current?.step.id) ?? state.timers[0];
  if (timer) return secondsLeft(timer, nowMs);
  return meetingAtMs === null ? null : Math.max(0, (meetingAtMs - nowMs) / 1000);
}

/** What an intent means at this moment of the run. */
export function answerTo(intent: Intent, known: Known): VoiceAnswer {
  const { state, tempC, unit } = known;
  const alert = takeOverAlert(state);
  const heard: RunCommand[] = alert ? [{ type: 'acknowledgeAlert', key: alert.key, crossing: alert.crossing }] : [];
  const current = currentStep(state);
  switch (intent.kind) {
    case 'heard':
      return { commands: heard, say: [] };
    case 'done':
      // An alert for a step further on is heard, and no more: what was not ticked before it is for eyes to see.
      if (alert && alert.actStepId !== current?.step.id) return { commands: heard, say: [] };
      return current ? { commands: [{ type: 'completeStep', stepId: current.step.id, tempC }], say: [] } : nothing;
    case 'back':
      return { commands: [{ type: 'goBack' }], say: [] };
    case 'note':
      return { commands: [{ type: 'addNote', stepId: current?.step.id ?? null, text: intent.text }], say: [] };
    case 'how-hot':
      return { commands: [], say: tempC === null ? ['no-reading'] : temperatureClips(tempC, unit) };
    case 'how-long': {
      const left = leftS(known);
      return { commands: [], say: left === null ? [] : leftClips(left) };
    }
  }
}
