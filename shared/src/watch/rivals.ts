import { advanceBank, believe, disturbBank, updateBank, type Belief } from './bank.js';
import type { Surroundings } from './slope-law.js';

/**
 * A second opinion: the bank as it was some seconds ago, told that the slope had just changed. When it foresees the readings
 * since so much better that a change is likelier than none, it takes over.
 */
export interface Rival {
  readonly bornAtMs: number;
  /** Logarithm of how much likelier it made the readings since than the bank did. */
  readonly lead: number;
  readonly bank: readonly number[];
}

/** A new one this often, each for this long. */
const BORN_EVERY_S = 6;
const LIFE_S = 30;
/** Changes that nobody tapped come about once in ten minutes: the lead that makes one likelier than none. */
const LEAD_TO_TAKE_OVER = 5.5;
/** Spread of what a change does: to the slope, in part of itself and at least, and to the liquid. */
const CHANGE_SHARE = 0.4;
const LEAST_CHANGE_C_PER_S = 0.01;
const STEP_C = 0.2;

/** Logarithm of the odds that a change came in the seconds that one rival stands for. */
const LOG_PRIOR_ODDS = -40;

/** What the bank and its rivals believe together, each with the weight it has earned. */
export function blend(bank: readonly number[], rivals: readonly Rival[]): Belief {
  const own = believe(bank);
  if (rivals.length === 0) return own;
  let sum = 1;
  let t = 0;
  let s = 0;
  let tt = own.tempVariance;
  let ss = own.rateVariance;
  let ts = own.crossVariance;
  for (const { lead, bank: other } of rivals) {
    const w = Math.exp(lead + LOG_PRIOR_ODDS);
    if (w < 1e-3) continue;
    const belief = believe(other);
    const dt = belief.tempC - own.tempC;
    const ds = belief.rateCPerS - own.rateCPerS;
    sum += w;
    t += w * dt;
    s += w * ds;
    tt += w * (belief.tempVariance + dt * dt);
    ss += w * (belief.rateVariance + ds * ds);
    ts += w * (belief.crossVariance + dt * ds);
  }
  t /= sum;
  s /= sum;
  return {
    ...own,
    tempC: own.tempC + t,
    rateCPerS: own.rateCPerS + s,
    tempVariance: tt / sum - t * t,
    rateVariance: ss / sum - s * s,
    crossVariance: ts / sum - t * s,
  };
}

/** The rivals `elapsedS` later; those that have had their time are gone. */
export function advanceRivals(
  rivals: readonly Rival[],
  elapsedS: number,
  atMs: number,
  lagS: number,
  around: Surroundings,
): { bornAtMs: number; lead: number; bank: number[] }[] {
  return rivals
    .filter(({ bornAtMs }) => atMs - bornAtMs <= LIFE_S * 1000)
    .map(({ bornAtMs, lead, bank }) => {
      const own = [...bank];
      if (elapsedS > 0) advanceBank(own, elapsedS, lagS, around);
      return { bornAtMs, lead, bank: own };
    });
}

/**
 * Lets the rivals take in the reading that the bank took in with `evidence`.
 *
 * @returns the rival bank that takes over, or null, and the rivals that go on.
 */
export function updateRivals(
  rivals: readonly { bornAtMs: number; lead: number; bank: number[] }[],
  bank: readonly number[],
  evidence: number,
  reading: { atMs: number; tempC: number },
  whiteVariance: number,
): { winner: number[] | null; rivals: Rival[] } {
  const next: Rival[] = [];
  let best: { lead: number; bank: number[] } | null = null;
  for (const rival of rivals) {
    const lead = rival.lead + updateBank(rival.bank, reading.tempC, whiteVariance) - evidence;
    next.push({ ...rival, lead });
    if (lead > LEAD_TO_TAKE_OVER && lead > (best?.lead ?? -Infinity)) best = { lead, bank: rival.bank };
  }
  if (best) return { winner: best.bank, rivals: [] };
  const youngest = next.at(-1);
  if (youngest && reading.atMs - youngest.bornAtMs < BORN_EVERY_S * 1000) return { winner: null, rivals: next };
  const own = [...bank];
  const { rateCPerS } = believe(own);
  disturbBank(own, { stepC: STEP_C, slopeCPerS: LEAST_CHANGE_C_PER_S + CHANGE_SHARE * Math.abs(rateCPerS) });
  return { winner: null, rivals: [...next, { bornAtMs: reading.atMs, lead: 0, bank: own }] };
}
