/**
 * One Kalman filter of the bank, kept flat in a number array so that a state is plain JSON and a step allocates nothing.
 *
 * What it tracks: the liquid (T), what the probe's tip has come to (F, which trails the liquid by the lag), the eddy that
 * happens to wash around the tip (E, a first-order wander), and the slope of the liquid (S, K/s). The tip follows T + E;
 * a reading is F and white noise.
 */

/** Offsets of one hypothesis in the flat array. */
export const LOG_WEIGHT = 0;
export const T = 1;
export const F = 2;
export const E = 3;
export const S = 4;
export const TT = 5;
export const TF = 6;
export const TE = 7;
export const TS = 8;
export const FF = 9;
export const FE = 10;
export const FS = 11;
export const EE = 12;
export const ES = 13;
export const SS = 14;
export const STRIDE = 15;

/** How the slope itself changes: it decays at `decayPerS`, and wanders. */
export interface SlopeLaw {
  decayPerS: number;
  /** How the decay itself grows with the slope: 0 when it is fixed, 1 when it is proportional to the slope. */
  decayGrows: number;
  /** Variance the slope gains each second, (K/s)^2 per s. */
  wander: number;
}

/** Seconds an eddy lasts. */
export const EDDY_MEMORY_S = 7;
/** Variance in K^2 that the liquid gains each second for all that the model leaves out. */
const LIQUID_WANDER = 4e-6;

/** One step in time for all hypotheses of the same lag. */
export interface Transition {
  dtS: number;
  /** What F keeps of itself, and takes of T, E and S. */
  keep: number;
  fromT: number;
  fromE: number;
  fromS: number;
  /** What E keeps of itself. */
  memory: number;
  /** What T gains of S, what S keeps of itself, and what it keeps of its error. */
  run: number;
  slopeKeep: number;
  slopeGain: number;
  slopeVariance: number;
  /** Variance that F, and F with E, gain for each K^2 that E gains. */
  stirF: number;
  stirFE: number;
}

/** `dtS` is at most a few seconds: eddies within a step are only roughly accounted for. */
export function transition(dtS: number, lagS: number, law: SlopeLaw): Transition {
  const keep = Math.exp(-dtS / lagS);
  const memory = Math.exp(-dtS / EDDY_MEMORY_S);
  // The closed form divides by the difference of the two time constants.
  const apart = EDDY_MEMORY_S - lagS;
  const decay = law.decayPerS * dtS;
  const share = dtS / lagS;
  return {
    dtS,
    keep,
    fromT: 1 - keep,
    fromE: Math.abs(apart) < 1e-3 ? share * keep : (EDDY_MEMORY_S / apart) * (memory - keep),
    fromS: dtS - lagS * (1 - keep),
    memory,
    run: dtS * (1 - 0.5 * decay),
    slopeKeep: 1 - decay + 0.5 * decay * decay,
    slopeGain: 1 - (1 + law.decayGrows) * decay,
    slopeVariance: law.wander * dtS,
    stirF: (share * share) / (3 * (1 + share * share)),
    stirFE: share / (2 * (1 + share)),
  };
}

/** Moves one hypothesis, whose eddies have the standard deviation `eddyC`, ahead by `step`. */
export function predict(x: number[], o: number, step: Transition, eddyC: number): void {
  const { dtS, keep, fromT, fromE, fromS, memory, slopeGain } = step;
  const t = x[o + T]!;
  const f = x[o + F]!;
  const e = x[o + E]!;
  const s = x[o + S]!;
  x[o + T] = t + step.run * s;
  x[o + F] = keep * f + fromT * t + fromE * e + fromS * s;
  x[o + E] = memory * e;
  x[o + S] = step.slopeKeep * s;

  const tt = x[o + TT]!;
  const tf = x[o + TF]!;
  const te = x[o + TE]!;
  const ts = x[o + TS]!;
  const ff = x[o + FF]!;
  const fe = x[o + FE]!;
  const fs = x[o + FS]!;
  const ee = x[o + EE]!;
  const es = x[o + ES]!;
  const ss = x[o + SS]!;
  // Rows of A P.
  const a1 = tt + dtS * ts;
  const a2 = tf + dtS * fs;
  const a3 = te + dtS * es;
  const a4 = ts + dtS * ss;
  const b1 = fromT * tt + keep * tf + fromE * te + fromS * ts;
  const b2 = fromT * tf + keep * ff + fromE * fe + fromS * fs;
  const b3 = fromT * te + keep * fe + fromE * ee + fromS * es;
  const b4 = fromT * ts + keep * fs + fromE * es + fromS * ss;
  const stir = eddyC * eddyC * (1 - memory * memory);
  x[o + TT] = a1 + dtS * a4 + LIQUID_WANDER * dtS;
  x[o + TF] = fromT * a1 + keep * a2 + fromE * a3 + fromS * a4;
  x[o + TE] = memory * a3;
  x[o + TS] = slopeGain * a4;
  x[o + FF] = fromT * b1 + keep * b2 + fromE * b3 + fromS * b4 + stir * step.stirF;
  x[o + FE] = memory * b3 + stir * step.stirFE;
  x[o + FS] = slopeGain * b4;
  x[o + EE] = memory * memory * ee + stir;
  x[o + ES] = slopeGain * memory * es;
  x[o + SS] = slopeGain * slopeGain * ss + step.slopeVariance;
}

/** A reading more than this many standard deviations out counts as this many; the tails of real noise are heavy. */
const WEIGHT_CAP = 16;

/** Takes in one reading. Returns the logarithm of how likely the hypothesis thought it. */
export function update(x: number[], o: number, readingC: number, whiteVariance: number): number {
  const tf = x[o + TF]!;
  const ff = x[o + FF]!;
  const fe = x[o + FE]!;
  const fs = x[o + FS]!;
  const variance = ff + whiteVariance;
  const off = readingC - x[o + F]!;
  const kT = tf / variance;
  const kF = ff / variance;
  const kE = fe / variance;
  const kS = fs / variance;
  x[o + T]! += kT * off;
  x[o + F]! += kF * off;
  x[o + E]! += kE * off;
  x[o + S]! += kS * off;
  x[o + TT]! -= kT * tf;
  x[o + TF]! -= kT * ff;
  x[o + TE]! -= kT * fe;
  x[o + TS]! -= kT * fs;
  x[o + FF]! -= kF * ff;
  x[o + FE]! -= kF * fe;
  x[o + FS]! -= kF * fs;
  x[o + EE]! -= kE * fe;
  x[o + ES]! -= kE * fs;
  x[o + SS]! -= kS * fs;
  return -0.5 * (Math.min(WEIGHT_CAP, (off * off) / variance) + Math.log(variance));
}
