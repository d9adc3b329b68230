import type { LogEntry, RunState } from '@steepfall/shared/runs';
import type { LinePoint } from '#lib/liquid-line.ts';
import type { Level } from './curve.tsx';
import type { Flag } from './flag-layout.ts';

/** The parts of a run that are worth a closer look. */
export type Window = 'whole' | 'steep' | 'fall';

export interface Span {
  fromMs: number;
  toMs: number;
}

const vitalKinds: readonly string[] = ['add', 'remove', 'catch', 'transfer'];

/** A flag for each step that was done, numbered as they were done. */
export function flagsOf(state: RunState): Flag[] {
  return state.doneOrder.flatMap((stepId, index) => {
    const progress = state.steps.find(({ step }) => step.id === stepId);
    if (!progress || progress.doneAtMs === null || progress.doneEventId === null) return [];
    const { step, doneAtMs, doneEventId } = progress;
    return {
      id: doneEventId,
      number: index + 1,
      title: step.title,
      atMs: doneAtMs,
      isVital: vitalKinds.includes(step.kind),
    };
  });
}

/** The levels that the sheet waited for. */
export function levelsOf(state: RunState): Level[] {
  return state.steps.flatMap(({ step: { title, start, done } }) => {
    const condition = start.by === 'temperature' ? start : done.by === 'temperature' ? done : null;
    return condition ? [{ tempC: condition.tempC, title }] : [];
  });
}

function spanAround(times: readonly (number | null | undefined)[], marginMs: number): Span | null {
  const known = times.filter((atMs) => typeof atMs === 'number');
  if (known.length < 2) return null;
  return { fromMs: Math.min(...known) - marginMs, toMs: Math.max(...known) + marginMs };
}

/** What can be looked at: the steep, and the fall with its catch. `null` when this run had none. */
export function windowsOf(state: RunState): Record<Exclude<Window, 'whole'>, Span | null> {
  const steep = state.steps.find(({ step }) => step.kind === 'steep');
  const caught = state.steps.findIndex(({ step }) => step.kind === 'catch');
  const chill = state.steps.slice(0, Math.max(0, caught)).findLast(({ step }) => step.kind === 'chill');
  const out =
    caught < 0 ? undefined : state.steps.slice(caught + 1).find(({ step }) => step.start.by === 'temperature');
  return {
    steep: spanAround([steep?.startedAtMs, steep?.doneAtMs], 150_000),
    fall: spanAround([chill?.doneAtMs, state.steps[caught]?.doneAtMs, out?.doneAtMs], 90_000),
  };
}

export interface LineRow {
  atMs: number;
  tempC: number | null;
  happened: string;
}

const ROWS_AT_MOST = 240;

/** The line as a table: evenly thinned readings, and a row for each thing that happened, in order of time. */
export function lineRows(line: readonly LinePoint[], flags: readonly Flag[]): LineRow[] {
  const every = Math.max(1, Math.ceil(line.length / ROWS_AT_MOST));
  const readings = line
    .filter((_, index) => index % every === 0 || index === line.length - 1)
    .map(({ atMs, tempC }) => ({ atMs, tempC, happened: '' }));
  const nearest = (atMs: number) =>
    line.reduce<LinePoint | null>(
      (best, point) => (best === null || Math.abs(point.atMs - atMs) < Math.abs(best.atMs - atMs) ? point : best),
      null,
    );
  const happenings = flags.map(({ atMs, number, title }) => {
    const point = nearest(atMs);
    const isNear = point !== null && Math.abs(point.atMs - atMs) < 120_000;
    return { atMs, tempC: isNear ? point.tempC : null, happened: `${number}. ${title}` };
  });
  return [...readings, ...happenings].sort((a, b) => a.atMs - b.atMs);
}

/** Entries of the log in the hub's order, which is the one that counts. */
export function inOrder<Entry extends LogEntry>(log: readonly Entry[]): Entry[] {
  return log.toSorted((a, b) => (a.seq ?? Infinity) - (b.seq ?? Infinity));
}
