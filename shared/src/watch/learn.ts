import { learnedChilling, learnedCooling, learnedHeating, type HeatingFacts, type Stretch } from './learn-kettle.js';
import { isTelling, lagWindow, learnedLag, weighLags, type LagWeights, type LagWindow } from './learn-lag.js';
import { tooLittle, type Lesson } from './learn-lesson.js';
import { startWatch, type KettleState } from './state.js';
import type { WatchActDone, WatchConfig, WatchReading } from './types.js';
import { surroundings, watchAct, watchReading } from './watch.js';

/** A run that is over, as it is kept. */
export interface FinishedRun {
  /** What the watch was told when it began. */
  watch: WatchConfig;
  readings: readonly WatchReading[];
  /** What was done to the kettle, in any order. */
  acts: readonly WatchActDone[];
  /** null where the kettle or its water is not known. */
  heating: HeatingFacts | null;
}

/** What a finished run teaches of the kit it was brewed on. */
export interface RunLessons {
  /** Lag of the probe, s. */
  lagS: Lesson;
  /** Losses of the kettle with its lid on, toward the room, 1/s. */
  coolingPerS: Lesson;
  /** The kettle with its chiller running, toward the coolant, 1/s. */
  chillingPerS: Lesson;
  /** Share of the bought power that reaches the kettle. */
  heaterEfficiency: Lesson;
}

/** Readings after which whoever drives the learning gets a turn. */
const READINGS_A_TURN = 500;
/** Seconds after an act before the line is a curve again, and before one in which its tap may have come late. */
const SETTLES_S = 40;
const CHILL_SETTLES_S = 30;
const CLEAR_S = 5;

/** What a run teaches, worked out in one go; see `learnInTurns`. */
export function learnRun(run: FinishedRun): RunLessons {
  const turns = learnInTurns(run);
  for (;;) {
    const { done, value } = turns.next();
    if (done) return value;
  }
}

/**
 * What a run teaches of its kit. The watch is run over all of it, and what it calls good is looked at again: the readings around each act for
 * the probe's lag, the stretches in which nothing was done for the kettle's constants. Yields every few milliseconds of work, so that a
 * hub can look after its other runs in between.
 */
export function* learnInTurns(run: FinishedRun): Generator<undefined, RunLessons> {
  const acts = [...run.acts].sort((a, b) => a.atMs - b.atMs);
  const seen = yield* seenBy(run, acts);
  if (seen.good.length === 0) {
    const none = tooLittle('no-readings');
    return { lagS: none, coolingPerS: none, chillingPerS: none, heaterEfficiency: none };
  }
  const weights: LagWeights[] = [];
  for (const window of windowsOf(acts, seen)) {
    weights.push(weighLags(window, run.watch.lagS));
    yield;
  }
  const stretches = stretchesOf(acts, seen);
  const { roomC } = seen;
  return {
    lagS: learnedLag(weights, run.watch),
    coolingPerS: learnedCooling(stretches, roomC),
    chillingPerS: learnedChilling(stretches, run.watch.coolantC),
    heaterEfficiency: learnedHeating(stretches, roomC, run.heating),
  };
}

interface Seen {
  good: { atMs: number; tempC: number }[];
  roomC: number;
  /** What the kettle was taken to be doing after each act. */
  after: Map<WatchActDone, KettleState>;
}

function* seenBy({ watch: told, readings }: FinishedRun, acts: readonly WatchActDone[]): Generator<undefined, Seen> {
  let watch = startWatch(told);
  const seen: Seen = { good: [], roomC: surroundings(watch).roomC, after: new Map() };
  const waiting = [...acts];
  const tellUntil = (atMs: number) => {
    while (waiting[0] && waiting[0].atMs <= atMs) {
      const act = waiting.shift()!;
      watch = watchAct(watch, act);
      seen.after.set(act, watch.kettle);
    }
  };
  for (const [i, { atMs, tempC }] of readings.entries()) {
    tellUntil(atMs);
    watch = watchReading(watch, { atMs, tempC });
    if (watch.lastVerdict === 'good' && tempC !== null) seen.good.push({ atMs, tempC });
    if (i % READINGS_A_TURN === READINGS_A_TURN - 1) yield;
  }
  tellUntil(Infinity);
  return seen;
}

function windowsOf(acts: readonly WatchActDone[], { good }: Seen): LagWindow[] {
  const telling = acts.filter(({ act }) => isTelling(act));
  return telling.flatMap((done, i) => {
    const neighbours = { beforeMs: telling[i - 1]?.atMs ?? -Infinity, afterMs: telling[i + 1]?.atMs ?? Infinity };
    const window = lagWindow(done, neighbours, good);
    return window ? [window] : [];
  });
}

function stretchesOf(acts: readonly WatchActDone[], { good, after }: Seen): Stretch[] {
  return acts.flatMap((done, i) => {
    const kettle = after.get(done);
    if (!kettle) return [];
    const fromMs = done.atMs + (kettle.chilling ? CHILL_SETTLES_S : SETTLES_S) * 1000;
    const toMs = (acts[i + 1]?.atMs ?? Infinity) - CLEAR_S * 1000;
    return [{ kettle, readings: good.filter(({ atMs }) => atMs >= fromMs && atMs <= toMs) }];
  });
}
