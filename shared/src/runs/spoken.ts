import type { Step } from '../sheets/index.js';
import { inUnit } from '../units/index.js';
import { HOLD_TIMER } from './missed-choices.js';
import type { Alert, RunState } from './state.js';

/** Names of clips that are recorded once; a sentence is a list of them. Numbers are `n0` to `n220`, tenths `point1` to `point9`. */
const actClips: Readonly<Record<string, string>> = {
  'check-kit': 'check-kit',
  fill: 'fill',
  'light-heat': 'light-heat',
  salts: 'salts-in',
  acid: 'acid-in',
  'acid-in': 'acid-in',
  'salt-in': 'salts-in',
  'other-in': 'aromatics-in',
  'other-out': 'aromatics-out',
  ph: 'measure-ph',
  'coil-in': 'coil-in',
  heat: 'heat',
  steep: 'steep-over',
  chill: 'chiller-on',
  transfer: 'transfer',
  purge: 'purge',
  clean: 'clean',
  gas: 'gas',
};

/** The clip that says what this step asks for; a step of the brewer's own has none, and is read from the sheet. */
export function actClip({ id, acts }: Pick<Step, 'id' | 'acts'>): string {
  for (const way of ['in', 'out'] as const) {
    const hasTea = acts.includes(`tea-${way}`);
    const hasHops = acts.includes(`hops-${way}`);
    if (hasTea && hasHops) return `tea-and-hops-${way}`;
    if (hasTea) return `tea-${way}`;
    if (hasHops) return `hops-${way}`;
  }
  return actClips[id.replace(/-\d+$/, '')] ?? 'next-step';
}

/**
 * A temperature in words, as clips: whole degrees Fahrenheit, and Celsius to a tenth where the target has one.
 *
 * @param tempC 0 to 104 °C; beyond that nothing is said, since no clip knows the number.
 */
export function temperatureClips(tempC: number, unit: 'C' | 'F'): string[] {
  const shown = inUnit('temperature', tempC, unit);
  const tenths = unit === 'F' ? Math.round(shown) * 10 : Math.round(shown * 10);
  const whole = Math.floor(tenths / 10);
  if (whole < 0 || whole > 220) return [];
  const tenth = tenths % 10;
  return [`n${whole}`, ...(tenth > 0 ? [`point${tenth}`] : []), 'degrees'];
}

const alertPhrases = [
  'coming-up',
  'stand-by',
  'now',
  'late',
  'seconds-late',
  'minutes-late',
  'timer-over',
  'no-reading',
  'hub-away',
  'battery-low',
  'tablet-silent',
  'next-step',
  'chiller-on',
] as const;

const faultClips: Partial<Record<Alert['rule'], string>> = {
  signal: 'no-reading',
  hub: 'hub-away',
  battery: 'battery-low',
  station: 'tablet-silent',
};

/** Less than this past its moment nobody calls late, s. */
const LATE_FROM_S = 5;
const MINUTES_FROM_S = 90;
const LONGEST_LATE_MIN = 220;

/** "Forty seconds late", as clips; nothing while it is in time. @param lateS s past the moment that was meant. */
function latenessClips(lateS: number): string[] {
  if (lateS < LATE_FROM_S) return [];
  if (lateS < MINUTES_FROM_S) return [`n${Math.floor(lateS)}`, 'seconds-late'];
  return [`n${Math.min(LONGEST_LATE_MIN, Math.floor(lateS / 60))}`, 'minutes-late'];
}

/**
 * What is said aloud for an alert: verb, thing, number.
 *
 * @param lateS s past the moment that was meant, as when a tablet wakes from sleep; null when nobody knows.
 */
export function spokenClips(state: RunState, alert: Alert, unit: 'C' | 'F', lateS: number | null = null): string[] {
  const fault = faultClips[alert.rule];
  if (fault) return [fault];
  const act = state.steps.find(({ step }) => step.id === alert.actStepId)?.step;
  const isHold = state.timers.some(({ id, label }) => alert.key === `timer:${id}` && label === HOLD_TIMER);
  const late = lateS === null ? [] : latenessClips(lateS);
  if (!act)
    return alert.stage === 'now' || alert.stage === 'missed' ? [isHold ? 'chiller-on' : 'timer-over', ...late] : [];
  const clip = actClip(act);
  const number = alert.targetC === null ? [] : temperatureClips(alert.targetC, unit);
  switch (alert.stage) {
    case 'coming-up':
      return ['coming-up', clip, ...number];
    case 'stand-by':
      return ['stand-by', clip, ...number];
    case 'now':
      if (late.length > 0) return [clip, ...late];
      return number.length > 0 ? [clip, ...number] : [clip, 'now'];
    case 'missed':
      return late.length > 0 ? [clip, ...late] : ['late', clip];
  }
}

/** Every clip that the alerts of this run can need, so that they are at hand before the first one. */
export function speechOf(state: RunState, unit: 'C' | 'F'): string[] {
  const levels = state.steps.flatMap(({ step: { start, done } }) =>
    [start, done].flatMap((condition) => (condition.by === 'temperature' ? [condition.tempC] : [])),
  );
  return [
    ...new Set([
      ...alertPhrases,
      ...state.steps.map(({ step }) => actClip(step)),
      ...levels.flatMap((tempC) => temperatureClips(tempC, unit)),
    ]),
  ];
}
