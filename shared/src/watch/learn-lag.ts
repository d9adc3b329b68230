import { tooLittle, type Lesson } from './learn-lesson.js';
import { solve } from './solve.js';
import type { WatchAct, WatchConfig } from './types.js';

/** Something was done, and the readings around it: the probe's answer to a change is what tells its lag. */
export interface LagWindow {
  act: WatchAct;
  actAtMs: number;
  /** Good ones, from a minute before to a good minute after, and never past the next act. */
  readings: readonly { atMs: number; tempC: number }[];
}

/** Logarithm of how well each lag explains one window, and when each has it that the change truly came, s after the tap. */
export interface LagWeights {
  logs: readonly number[];
  offsetsS: readonly number[];
  /** Variance of those, s². */
  offsetVariances: readonly number[];
}

const BEFORE_S = 60;
const AFTER_S = 75;
const LEAST_BEFORE_S = 15;
const LEAST_AFTER_S = 25;
/** What the act before did to the line is over, and the next act, whose tap may come late, has not begun. */
const SETTLES_S = 25;
const CLEAR_S = 5;

/** What moves the probe enough to tell its lag: a step of the liquid, a new slope alone, or both. */
const CHANGES: Partial<Record<WatchAct, 'step' | 'slope'>> = {
  'coil-in': 'step',
  'tea-in': 'step',
  'hops-in': 'step',
  'chiller-on': 'slope',
  'chiller-off': 'slope',
  'heat-on': 'slope',
  'heat-off': 'slope',
};

/** True when an act can teach the lag. */
export function isTelling(act: WatchAct): boolean {
  return act in CHANGES;
}

/** The readings around one act, or null when it stands too close to others or too few were taken. */
export function lagWindow(
  { act, atMs }: { act: WatchAct; atMs: number },
  neighbours: { beforeMs: number; afterMs: number },
  readings: readonly { atMs: number; tempC: number }[],
): LagWindow | null {
  const fromMs = Math.max(atMs - BEFORE_S * 1000, neighbours.beforeMs + SETTLES_S * 1000);
  const toMs = Math.min(atMs + AFTER_S * 1000, neighbours.afterMs - CLEAR_S * 1000);
  const own = readings.filter((reading) => reading.atMs >= fromMs && reading.atMs <= toMs);
  const first = own[0];
  const last = own.at(-1);
  if (!first || !last || own.length < LEAST_READINGS) return null;
  const isLongEnough = atMs - first.atMs >= LEAST_BEFORE_S * 1000 && last.atMs - atMs >= LEAST_AFTER_S * 1000;
  return isLongEnough ? { act, actAtMs: atMs, readings: own } : null;
}

const LEAST_READINGS = 16;
/** Lags that are weighed against each other, as shares of the told one; in steps of eight hundredths. */
const LAG_SHARES = Array.from({ length: 25 }, (_, i) => 0.4 * 1.08 ** i);
/** When the change may truly have come, s after its tap, and the spread of that among people. */
const OFFSETS_S = Array.from({ length: 13 }, (_, i) => i - 6);
const TAP_SPREAD_S = 2;
const LEAST_LAG_S = 0.3;
/** Real errors are a little less simple than a first-order memory. */
const TRUST = 0.6;

const lagsOf = (toldLagS: number) => LAG_SHARES.map((share) => share * Math.max(toldLagS, LEAST_LAG_S));

type Point = readonly [atS: number, tempC: number];

/**
 * How well each lag explains a window. The liquid is a line before the change and a parabola after it, with a step between where
 * something went in; a first-order probe answers that in closed form, so that for each lag and instant of the change all else is least
 * squares. How the errors of neighbours hang together is taken from the best fit and is the same for every lag: whether they come of
 * eddies or of the chip then makes no lag look better. A few milliseconds a window.
 */
export function weighLags({ act, actAtMs, readings }: LagWindow, toldLagS: number): LagWeights {
  const points = readings.map(({ atMs, tempC }): Point => [(atMs - actAtMs) / 1000, tempC]);
  const lags = lagsOf(toldLagS);
  const tries = lags.map((lagS) => OFFSETS_S.map((offsetS) => answerOf(points, act, lagS, offsetS)));
  const rough = tries.filter((_, i) => i % 3 === 0).flatMap((row) => row.filter((_, i) => i % 3 === 0));
  const plain = rough.map((rows) => ({ rows, fit: leftOver(rows, points, 0) }));
  const best = plain.reduce((a, b) => (b.fit.squares < a.fit.squares ? b : a));
  const memory = Math.min(0.95, Math.max(0, likeness(best.rows, points, best.fit)));
  const counted = TRUST * (points.length - 1 - 5);
  const weighed = tries.map((row) => {
    const logs = row.map((rows, i) => {
      const { squares } = leftOver(rows, points, memory);
      return -0.5 * counted * Math.log(squares + 1e-9) - 0.5 * (OFFSETS_S[i]! / TAP_SPREAD_S) ** 2;
    });
    return weighted(logs, OFFSETS_S);
  });
  return {
    logs: weighed.map(({ sum }) => sum),
    offsetsS: weighed.map(({ mean }) => mean),
    offsetVariances: weighed.map(({ variance }) => variance),
  };
}

/** What a probe of this lag reads at each point, for one each of: level, slope before, slope after, bend after, step. */
function answerOf(points: readonly Point[], act: WatchAct, lagS: number, offsetS: number): number[][] {
  const steps = CHANGES[act] === 'step';
  return points.map(([atS]) => {
    const s = atS - offsetS;
    if (s <= 0) return steps ? [1, s - lagS, 0, 0, 0] : [1, s - lagS, 0, 0];
    const left = Math.exp(-s / lagS);
    const come = 1 - left;
    const answer = [1, -lagS * left, s - lagS * come, s * s * 0.5 - lagS * s + lagS * lagS * come];
    return steps ? [...answer, come] : answer;
  });
}

/** Sum of squares that least squares leaves, with what each reading takes of its neighbour before it (`memory`) taken out. */
function leftOver(rows: readonly number[][], points: readonly Point[], memory: number): Fit {
  const size = rows[0]!.length;
  const normal = Array.from({ length: size }, () => new Array<number>(size).fill(0));
  const right = new Array<number>(size).fill(0);
  const x = new Array<number>(size).fill(0);
  const first = points[0]![1];
  let squares = 0;
  for (let i = 1; i < rows.length; i += 1) {
    const [row, before] = [rows[i]!, rows[i - 1]!];
    const y = points[i]![1] - first - memory * (points[i - 1]![1] - first);
    squares += y * y;
    for (let k = 0; k < size; k += 1) {
      x[k] = row[k]! - memory * before[k]!;
      right[k]! += x[k]! * y;
      for (let j = 0; j <= k; j += 1) normal[k]![j]! += x[k]! * x[j]!;
    }
  }
  for (let k = 0; k < size; k += 1) for (let j = 0; j < k; j += 1) normal[j]![k] = normal[k]![j]!;
  const factors = solve(normal, right);
  const explained = factors.reduce((sum, factor, k) => sum + factor * right[k]!, 0);
  return { squares: Math.max(0, squares - explained), factors };
}

interface Fit {
  squares: number;
  factors: readonly number[];
}

/** How much neighbours of what a plain fit leaves over are alike: the correlation of each with the one before. */
function likeness(rows: readonly number[][], points: readonly Point[], { factors }: Fit): number {
  const first = points[0]![1];
  const off = rows.map((row, i) => row.reduce((left, x, k) => left - x * factors[k]!, points[i]![1] - first));
  const beside = off.slice(1).reduce((sum, one, i) => sum + one * off[i]!, 0);
  return (
    beside /
    Math.max(
      1e-12,
      off.reduce((sum, one) => sum + one * one, 0),
    )
  );
}

/** Mean of `values` under log weights, its variance, and the logarithm of the sum of the weights. */
function weighted(logs: readonly number[], values: readonly number[]): { sum: number; mean: number; variance: number } {
  const top = Math.max(...logs);
  let total = 0;
  let mean = 0;
  let square = 0;
  for (const [i, log] of logs.entries()) {
    const weight = Math.exp(log - top);
    total += weight;
    mean += weight * values[i]!;
    square += weight * values[i]! ** 2;
  }
  mean /= total;
  return { sum: top + Math.log(total), mean, variance: Math.max(0, square / total - mean * mean) };
}

/** A lag less sure than this share of itself, at nine times of ten, says no more than what was told. */
const SURE_SHARE = 0.3;
/** A lead of e to the power of this is no accident. */
const CLEARLY = 4;
/** 90 % of a normal distribution lies within this many standard deviations. */
const Z_90 = 1.6449;
/** However clear the answer: depth and stirring change a probe's lag from day to day. Relative standard deviation. */
const LEAST_SPREAD = 0.04;

/**
 * The lag that explains all windows together. A lag that was learned before counts as what it was sure of; one that was only
 * told counts for nothing.
 */
export function learnedLag(
  windows: readonly LagWeights[],
  { lagS: toldLagS, lagErrorRatio }: Pick<WatchConfig, 'lagS' | 'lagErrorRatio'>,
): Lesson {
  if (windows.length === 0) return tooLittle('few-changes');
  const lags = lagsOf(toldLagS);
  const spread = lagErrorRatio ? lagErrorRatio / Z_90 : Infinity;
  const logs = lags.map((_, i) => {
    const before = -0.5 * (Math.log(LAG_SHARES[i]!) / spread) ** 2;
    return windows.reduce((sum, window) => sum + window.logs[i]!, before);
  });
  const best = logs.indexOf(Math.max(...logs));
  if (best === 0 || best === lags.length - 1) {
    const told = logs[LAG_SHARES.findIndex((share) => share >= 1)]!;
    return tooLittle(logs[best]! - told > CLEARLY ? 'far-from-told' : 'unclear');
  }
  const { mean, variance } = weighted(logs, lags);
  // What comes late at every tap is the probe's dead time or the hand's: half is put down to each.
  const lateS = Math.max(0, commonOffset(windows, best)) / 2;
  const lagS = mean + lateS;
  const error = Z_90 * Math.hypot(Math.sqrt(variance), lateS, LEAST_SPREAD * lagS);
  return error > SURE_SHARE * lagS ? tooLittle('unclear') : { learned: { value: lagS, error }, because: null };
}

function commonOffset(windows: readonly LagWeights[], lag: number): number {
  const weights = windows.map(({ offsetVariances }) => 1 / Math.max(0.2, offsetVariances[lag]!));
  const total = weights.reduce((sum, weight) => sum + weight, 0);
  return windows.reduce((sum, { offsetsS }, i) => sum + weights[i]! * offsetsS[lag]!, 0) / total;
}
