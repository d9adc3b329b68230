import {
  E,
  EE,
  ES,
  F,
  FE,
  FF,
  FS,
  LOG_WEIGHT,
  S,
  SS,
  STRIDE,
  T,
  TE,
  TF,
  TS,
  TT,
  EDDY_MEMORY_S,
  predict,
  transition,
  update,
} from './kalman.js';
import type { WatchConfig } from './types.js';
import { slopeLaw, type Surroundings } from './slope-law.js';

/** True lag over told lag when told is off by up to a quarter of the true one. */
const LAG_RATIOS = [0.8, 0.89, 0.98, 1.08, 1.19, 1.31];
const USUAL_LAG_ERROR = 0.25;
/** However well a lag was learned, stirring and depth change it. */
const LEAST_LAG_ERROR = 0.05;
const EDDIES_C = [0.08, 0.16, 0.27];
/** No hypothesis is ever given up for good: kettles and probes change. */
const LEAST_LOG_WEIGHT = -9;
/** Longest single step of the filters; a gap is crossed in several. */
const LONGEST_STEP_S = 2;

/** Least lag that is told apart from none. */
const LEAST_LAG_S = 0.05;

/** What was told of the probe's lag. */
export type ToldLag = Pick<WatchConfig, 'lagS' | 'lagErrorRatio'>;

/** Lag of the `i`th group of hypotheses, which lie side by side in the bank, one for each of `EDDIES_C`. */
function lagOf(i: number, told: ToldLag): number {
  const error = Math.min(USUAL_LAG_ERROR, Math.max(LEAST_LAG_ERROR, told.lagErrorRatio ?? USUAL_LAG_ERROR));
  return Math.max(told.lagS, LEAST_LAG_S) * LAG_RATIOS[i]! ** (error / USUAL_LAG_ERROR);
}

/** What the bank as a whole believes. */
export interface Belief {
  tempC: number;
  rateCPerS: number;
  tempVariance: number;
  rateVariance: number;
  /** Covariance of the two. */
  crossVariance: number;
  /** What the probe should read, and the variance of that without the reading's own noise. */
  probeC: number;
  probeVariance: number;
}

export function startBank(tempC: number, told: ToldLag): number[] {
  const bank: number[] = [];
  for (let i = 0; i < LAG_RATIOS.length * EDDIES_C.length; i += 1) {
    const eddyC = EDDIES_C[i % EDDIES_C.length]!;
    const filtered = (eddyC ** 2 * EDDY_MEMORY_S) / (EDDY_MEMORY_S + lagOf(Math.floor(i / EDDIES_C.length), told));
    const one = new Array<number>(STRIDE).fill(0);
    one[T] = tempC;
    one[F] = tempC;
    one[TT] = 0.5 ** 2;
    one[TF] = 0.5 ** 2;
    one[FF] = 0.5 ** 2 + filtered + 0.1 ** 2;
    one[FE] = filtered;
    one[EE] = eddyC ** 2;
    one[SS] = 0.04 ** 2;
    bank.push(...one);
  }
  return bank;
}

export function believe(bank: readonly number[]): Belief {
  const count = bank.length / STRIDE;
  let sum = 0;
  let t = 0;
  let s = 0;
  let f = 0;
  let tt = 0;
  let ss = 0;
  let ts = 0;
  let ff = 0;
  // Spread is summed around the first hypothesis: squares of 80 °C would eat the digits.
  const t0 = bank[T]!;
  const s0 = bank[S]!;
  const f0 = bank[F]!;
  for (let i = 0; i < count; i += 1) {
    const o = i * STRIDE;
    const w = Math.exp(bank[o + LOG_WEIGHT]!);
    const dt = bank[o + T]! - t0;
    const ds = bank[o + S]! - s0;
    const df = bank[o + F]! - f0;
    sum += w;
    t += w * dt;
    s += w * ds;
    f += w * df;
    tt += w * (bank[o + TT]! + dt * dt);
    ss += w * (bank[o + SS]! + ds * ds);
    ts += w * (bank[o + TS]! + dt * ds);
    ff += w * (bank[o + FF]! + df * df);
  }
  t /= sum;
  s /= sum;
  f /= sum;
  return {
    tempC: t0 + t,
    rateCPerS: s0 + s,
    tempVariance: tt / sum - t * t,
    rateVariance: ss / sum - s * s,
    crossVariance: ts / sum - t * s,
    probeC: f0 + f,
    probeVariance: ff / sum - f * f,
  };
}

/** The bank, `durationS` later, with no reading. Changes `bank` in place: callers own a copy. */
export function advanceBank(bank: number[], durationS: number, told: ToldLag, around: Surroundings): void {
  const steps = Math.max(1, Math.ceil(durationS / LONGEST_STEP_S));
  const dtS = durationS / steps;
  for (let step = 0; step < steps; step += 1) {
    const { tempC, rateCPerS } = believe(bank);
    const law = slopeLaw(tempC, rateCPerS, around);
    let o = 0;
    for (let i = 0; i < LAG_RATIOS.length; i += 1) {
      const move = transition(dtS, lagOf(i, told), law);
      for (let j = 0; j < EDDIES_C.length; j += 1) {
        predict(bank, o, move, EDDIES_C[j]!);
        o += STRIDE;
      }
    }
  }
}

/**
 * Share of a reading's likelihood that goes into the weights. Real eddies are not quite those of the model; taken at full
 * value their colour would be read as news of the lag.
 */
const TRUST = 0.5;
/** What a weight keeps from one reading to the next, so that hours of a quiet pot do not add up to a certainty. */
const WEIGHT_KEPT = 0.998;

/**
 * Takes in one reading. Changes `bank` in place.
 *
 * @returns the logarithm of how likely the bank thought that reading.
 */
export function updateBank(bank: number[], readingC: number, whiteVariance: number): number {
  let before = 0;
  let after = 0;
  let top = -Infinity;
  for (let o = 0; o < bank.length; o += STRIDE) {
    const weight = Math.exp(bank[o + LOG_WEIGHT]!);
    const likelihood = update(bank, o, readingC, whiteVariance);
    before += weight;
    after += weight * Math.exp(likelihood);
    bank[o + LOG_WEIGHT] = WEIGHT_KEPT * bank[o + LOG_WEIGHT]! + TRUST * likelihood;
    top = Math.max(top, bank[o + LOG_WEIGHT]!);
  }
  for (let o = LOG_WEIGHT; o < bank.length; o += STRIDE) bank[o] = Math.max(LEAST_LOG_WEIGHT, bank[o]! - top);
  return Math.log(after / before);
}

/** Something was done to the kettle: the liquid may have stepped and the slope may be another. */
export interface Disturbance {
  /** Standard deviation of the step in K. */
  stepC: number;
  /** Standard deviation of the change of slope in K/s. */
  slopeCPerS: number;
  /** The slope to expect from now on; leave out to keep it. */
  newSlope?: { meanCPerS: number; sdCPerS: number };
}

/** Widens what the bank believes. Changes `bank` in place. */
export function disturbBank(bank: number[], { stepC, slopeCPerS, newSlope }: Disturbance): void {
  for (let o = 0; o < bank.length; o += STRIDE) {
    bank[o + TT]! += stepC ** 2;
    if (newSlope) {
      bank[o + S] = newSlope.meanCPerS;
      bank[o + SS] = newSlope.sdCPerS ** 2;
      bank[o + TS] = 0;
      bank[o + FS] = 0;
      bank[o + ES] = 0;
    }
    bank[o + SS]! += slopeCPerS ** 2;
  }
}

/** The probe itself jumped: start the tip afresh at what it reads, with the liquid wide open around it. */
export function resettleBank(bank: number[], readingC: number, stepC: number): void {
  for (let o = 0; o < bank.length; o += STRIDE) {
    bank[o + T] = readingC;
    bank[o + F] = readingC;
    bank[o + E] = 0;
    bank[o + TT] = stepC ** 2;
    bank[o + TF] = 0;
    bank[o + TE] = 0;
    bank[o + TS] = 0;
    bank[o + FF] = 0.3 ** 2;
    bank[o + FE] = 0;
    bank[o + FS] = 0;
    bank[o + ES] = 0;
    bank[o + SS]! += 0.05 ** 2;
  }
}
