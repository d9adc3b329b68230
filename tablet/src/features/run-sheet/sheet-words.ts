import type { Step } from '@steepfall/shared/sheets';
import { formatDuration, type UnitPreferences } from '@steepfall/shared/units';
import type { Conflict, LogEntry, RunState } from '@steepfall/shared/runs';
import type { CrossingForecast } from '@steepfall/shared/watch';
import { formatLevel } from '#lib/units.ts';
import { clockTime } from '#lib/words.ts';

/** When a step is to be done, in words: "at 62 °C, falling". */
export function conditionText(step: Step, units: UnitPreferences): string | null {
  const condition = step.start.by === 'temperature' ? step.start : step.done.by === 'temperature' ? step.done : null;
  return condition ? `at ${formatLevel(condition.tempC, units)}, ${condition.direction}` : null;
}

/** What makes the step done when nobody taps. */
export function selfDoneText(step: Step, units: UnitPreferences): string | null {
  const { done } = step;
  if (done.by === 'temperature') return `goes on by itself at ${formatLevel(done.tempC, units)}`;
  if (done.by === 'timer') return 'goes on by itself when the time is up';
  return null;
}

export interface AboutParts {
  number: string;
  unit: string;
}

/** An estimate promises no more than it knows: seconds at the end, tens of seconds before, whole minutes far off. */
export function aboutParts(leftS: number): AboutParts {
  if (leftS >= 3600) return { number: String(Math.round(leftS / 360) / 10), unit: 'h' };
  if (leftS >= 600) return { number: String(Math.round(leftS / 60)), unit: 'min' };
  const shownS = leftS >= 120 ? Math.round(leftS / 10) * 10 : Math.max(0, Math.round(leftS));
  return { number: formatDuration(shownS), unit: '' };
}

export function aboutText(leftS: number): string {
  const { number, unit } = aboutParts(leftS);
  return unit ? `${number} ${unit}` : number;
}

/** When, in a few words: "about 1:50"; `null` when nothing can be said. */
export function forecastText(forecast: CrossingForecast | null, nowMs: number): string | null {
  if (forecast?.kind === 'crossed') return 'reached';
  return forecast?.kind === 'forecast' ? `about ${aboutText((forecast.atMs - nowMs) / 1000)}` : null;
}

/** What two devices say differently, in a sentence. Nothing was dropped: the first one counts. */
export function conflictText(conflict: Conflict, state: RunState, entries: readonly LogEntry[]): string {
  const title = state.steps.find(({ step }) => step.id === conflict.stepId)?.step.title ?? 'A step';
  const [first, second] = conflict.eventIds.map((id) => entries.find((entry) => entry.id === id));
  const times = first && second ? `: at ${clockTime(first.atMs)} and at ${clockTime(second.atMs)}` : '';
  switch (conflict.kind) {
    case 'step-done-twice':
      return `“${title}” was marked done twice${times}. The first counts. If it went in twice, write a note.`;
    case 'after-end':
      return `“${title}” was marked done after the run had ended${times}.`;
    case 'ended-twice':
      return `The run was ended twice${times}. The first counts.`;
    case 'started-twice':
      return `The run was started twice${times}. The first counts.`;
  }
}
