import { advanceBank, believe, disturbBank, updateBank, type ToldLag } from './bank.js';
import { CHILLING_C_PER_S, type Surroundings } from './slope-law.js';

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
/**
 * The lead that makes a change likelier than none. Flow through a chiller changes untold once in a while; a pot left alone
 * does not, and when it does it is no hurry.
 */
const LEAD_TO_TAKE_OVER = 5;
const LEAD_WHEN_SLOW = 8;
/** Spread of what a change does: to the slope, in part of itself and at least, and to the liquid. */
const CHANGE_SHARE = 0.4;
const LEAST_CHANGE_C_PER_S = 0.01;
const STEP_C = 0.2;

/** The rivals `elapsedS` later; those that have had their time are gone. */
export function advanceRivals(
  rivals: readonly Rival[],
  elapsedS: number,
  atMs: number,
  told: ToldLag,
  around: Surroundings,
): { bornAtMs: number; lead: number; bank: number[] }[] {
  return rivals
    .filter(({ bornAtMs }) => atMs - bornAtMs <= LIFE_S * 1000)
    .map(({ bornAtMs, lead, bank }) => {
      const own = [...bank];
      if (elapsedS > 0) advanceBank(own, elapsedS, told, around);
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
  const { rateCPerS } = believe(bank);
  const needed = rateCPerS < -CHILLING_C_PER_S ? LEAD_TO_TAKE_OVER : LEAD_WHEN_SLOW;
  const next: Rival[] = [];
  let best: { lead: number; bank: number[] } | null = null;
  for (const rival of rivals) {
    const lead = rival.lead + updateBank(rival.bank, reading.tempC, whiteVariance) - evidence;
    next.push({ ...rival, lead });
    if (lead > needed && lead > (best?.lead ?? -Infinity)) best = { lead, bank: rival.bank };
  }
  if (best) return { winner: best.bank, rivals: [] };
  const youngest = next.at(-1);
  if (youngest && reading.atMs - youngest.bornAtMs < BORN_EVERY_S * 1000) return { winner: null, rivals: next };
  const own = [...bank];
  disturbBank(own, { stepC: STEP_C, slopeCPerS: LEAST_CHANGE_C_PER_S + CHANGE_SHARE * Math.abs(rateCPerS) });
  return { winner: null, rivals: [...next, { bornAtMs: reading.atMs, lead: 0, bank: own }] };
}
