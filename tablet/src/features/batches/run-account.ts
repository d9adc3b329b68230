import type { RunState, StepProgress } from '@steepfall/shared/runs';
import type { DoneCondition, MeasuredQuantity } from '@steepfall/shared/sheets';
import {
  formatDuration,
  formatMass,
  formatPressure,
  formatTemp,
  formatVolume,
  kelvinToFahrenheitDegrees,
  type UnitPreferences,
} from '@steepfall/shared/units';
import { spanWords } from '#lib/words.ts';
import type { LinePoint } from '#lib/liquid-line.ts';

export interface AccountRow {
  stepId: string;
  title: string;
  planned: string;
  happened: string;
  /** How far off, with its sign; empty when that says nothing. */
  difference: string;
}

/** "+0.4", "−1.2": a difference always carries its sign. */
function signed(value: number, digits: number): string {
  const text = Math.abs(value).toFixed(digits);
  if (Number(text) === 0) return text;
  return value < 0 ? `−${text}` : `+${text}`;
}

/** A difference has no zero to start from. */
function degrees(deltaC: number, unit: UnitPreferences['temperature']): number {
  return unit === 'F' ? kelvinToFahrenheitDegrees(deltaC) : deltaC;
}

function rowOf(
  { step, status, tempC, startedAtMs, doneAtMs }: StepProgress,
  state: RunState,
  units: UnitPreferences,
): AccountRow | null {
  const unit = units.temperature;
  const base = { stepId: step.id, title: step.title };
  const isDone = status === 'done';
  const level = step.done.by === 'temperature' ? step.done : step.start.by === 'temperature' ? step.start : null;
  if (level) {
    const isKnown = isDone && tempC !== null;
    return {
      ...base,
      planned: `${formatTemp(level.tempC, { unit })}, ${level.direction}`,
      happened: isKnown ? formatTemp(tempC, { unit }) : isDone ? 'not measured' : 'not done',
      difference: isKnown ? `${signed(degrees(tempC - level.tempC, unit), 1)} °${unit}` : '',
    };
  }
  if (step.done.by === 'timer') {
    const isKnown = isDone && startedAtMs !== null && doneAtMs !== null;
    const tookS = isKnown ? (doneAtMs - startedAtMs) / 1000 : null;
    return {
      ...base,
      planned: formatDuration(step.done.durationS),
      happened: tookS === null ? 'not done' : formatDuration(tookS),
      difference: tookS === null ? '' : `${signed(tookS - step.done.durationS, 0)} s`,
    };
  }
  const asked = step.done.by === 'measurement' ? step.done.quantity : step.asks;
  if (!asked) return null;
  const measured = state.measurements.findLast(({ stepId, quantity }) => stepId === step.id && quantity === asked);
  const range = step.done.by === 'measurement' ? rangeWords(step.done, units) : '';
  return {
    ...base,
    planned: range,
    happened: measured ? measurementWords(measured.quantity, measured.value, units) : 'not measured',
    difference: '',
  };
}

function rangeWords(
  { quantity, min, max }: Extract<DoneCondition, { by: 'measurement' }>,
  units: UnitPreferences,
): string {
  const words = (value: number) => (quantity === 'pH' ? String(value) : measurementWords(quantity, value, units));
  if (min !== undefined && max !== undefined) return `${words(min)} to ${words(max)}`;
  if (min !== undefined) return `${words(min)} or more`;
  return max === undefined ? '' : `${words(max)} or less`;
}

export function measurementWords(quantity: MeasuredQuantity, value: number, units: UnitPreferences): string {
  const words: Record<MeasuredQuantity, string> = {
    pH: `pH ${value}`,
    tempC: formatTemp(value, { unit: units.temperature }),
    volumeL: formatVolume(value, { unit: units.volume }),
    massG: formatMass(value, { unit: units.mass }),
    pressureKPa: formatPressure(value, { unit: units.pressure }),
    tasteScore: `${value} of 9`,
  };
  return words[quantity];
}

/** Every step that was planned with a number, and the number that came of it. */
export function accountOf(state: RunState, units: UnitPreferences): AccountRow[] {
  return state.steps.flatMap((progress) => rowOf(progress, state, units) ?? []);
}

/** What the drawing shows, in a breath: for those who do not see it, and for those in a hurry. */
export function summaryOf(state: RunState, line: readonly LinePoint[], { temperature: unit }: UnitPreferences): string {
  const sentences: string[] = [];
  if (state.startedAtMs !== null && state.endedAtMs !== null) {
    sentences.push(`The run took ${spanWords((state.endedAtMs - state.startedAtMs) / 1000)}.`);
  }
  const first = line[0];
  if (first) {
    const hottest = line.reduce((best, point) => (point.tempC > best.tempC ? point : best), first);
    const last = line.at(-1) ?? first;
    sentences.push(
      `The liquid went from ${formatTemp(first.tempC, { unit })} up to ${formatTemp(hottest.tempC, { unit })}, and was at ${formatTemp(last.tempC, { unit })} when it was last measured.`,
    );
  } else {
    sentences.push('No temperature was recorded.');
  }
  for (const { step, status, tempC } of state.steps) {
    if (step.kind !== 'catch' || step.start.by !== 'temperature' || status !== 'done' || tempC === null) continue;
    sentences.push(
      `${step.title} at ${formatTemp(tempC, { unit })}; ${formatTemp(step.start.tempC, { unit })} was wanted.`,
    );
  }
  return sentences.join(' ');
}
