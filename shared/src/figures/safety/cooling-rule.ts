import type { CurvePoint, TemperatureCurve } from '../curve/temperature-curve.js';
import { checkedCurve } from '../curve/temperature-curve.js';
import { within } from '../numeric/guard.js';

const HOT_C = 57;
const WARM_C = 21;
const COLD_C = 5;
/** s. */
export const coolingRuleLimit = { hotToWarmS: 2 * 3600, hotToColdS: 6 * 3600, ambientToColdS: 4 * 3600 } as const;
/** A crossing inside a longer gap is put at the end that looks worse (our choice). */
const GAP_MS = 15 * 60 * 1000;
/** Wobbles about 57 °C by less than this are one crossing (our choice). */
const WOBBLE_K = 2;

export interface CoolingRuleOptions {
  /** `cooked`: from 57 °C. `ambient`: made from things at room temperature, a cold steep. */
  start?: 'cooked' | 'ambient';
  /** Of the probe, K: every limit is judged on its worse side. */
  uncertaintyK?: number;
  /** When a person really reheated it: only then does a return to 57 °C start the clock again. */
  reheatedAtMs?: readonly number[];
}

export interface CoolingRuleOutcome {
  /** `not-shown`: the curve ends before it can tell. It is not a pass. */
  outcome: 'pass' | 'fail' | 'not-shown';
  /** Null while it is still hot, and on an empty curve. */
  startsAtMs: number | null;
  /** From the start until it stays at or below 21 °C. */
  toWarmS: number | null;
  /** From the start until it stays at or below 5 °C. */
  toColdS: number | null;
}

function crossingMs(above: CurvePoint, below: CurvePoint, levelC: number, atGap: 'early' | 'late'): number {
  if (below.atMs - above.atMs > GAP_MS) return atGap === 'early' ? above.atMs : below.atMs;
  return above.atMs + ((above.tempC - levelC) / (above.tempC - below.tempC)) * (below.atMs - above.atMs);
}

function staysBelowFromMs(curve: TemperatureCurve, levelC: number): number | null {
  const last = curve.findLastIndex(({ tempC }) => tempC > levelC);
  const above = curve[last];
  const below = curve[last + 1];
  if (!below) return null;
  return above ? crossingMs(above, below, levelC, 'late') : below.atMs;
}

function startMs(curve: TemperatureCurve, levelC: number, reheats: readonly number[]): number | null {
  let start: number | null = null;
  let lowestC = Infinity;
  for (const [index, point] of curve.entries()) {
    const before = curve[index - 1];
    if (point.tempC >= levelC) {
      const again =
        start !== null && (lowestC > levelC - WOBBLE_K || reheats.some((at) => at >= (start ?? 0) && at <= point.atMs));
      if (start === null || again) {
        start = null;
        lowestC = Infinity;
      }
      continue;
    }
    if (start === null) start = before ? crossingMs(before, point, levelC, 'early') : point.atMs;
    lowestC = Math.min(lowestC, point.tempC);
  }
  return start;
}

/**
 * Judges a recorded fall of the warmest point against the cooling rule for food that needs time and temperature control:
 * 57 to 21 °C within 2 h and 57 to 5 °C within 6 h in all; or, made from things at room temperature, 5 °C within 4 h. Local
 * codes and licensed people come first: it shows what was recorded.
 *
 * @param curve recorded points, straight lines between them.
 * @param options uncertainty 0 to 3 K.
 * @throws RangeError on a curve that is out of order or not finite.
 * @see FDA Food Code 3-501.14.
 */
export function coolingRule(curve: TemperatureCurve, options: CoolingRuleOptions = {}): CoolingRuleOutcome {
  const u = within(options.uncertaintyK ?? 0, 'A probe uncertainty', 0, 3, 'K');
  const points = checkedCurve(curve);
  const cooked = (options.start ?? 'cooked') === 'cooked';
  const startsAtMs = cooked ? startMs(points, HOT_C + u, options.reheatedAtMs ?? []) : (points[0]?.atMs ?? null);
  const lastMs = points.at(-1)?.atMs;
  if (startsAtMs === null || lastMs === undefined)
    return { outcome: 'not-shown', startsAtMs, toWarmS: null, toColdS: null };
  const since = (levelC: number) => {
    const atMs = staysBelowFromMs(points, levelC);
    return atMs === null ? null : Math.max(0, atMs - startsAtMs) / 1000;
  };
  const toWarmS = since(WARM_C - u);
  const toColdS = since(COLD_C - u);
  const soFarS = (lastMs - startsAtMs) / 1000;
  const { hotToWarmS, hotToColdS, ambientToColdS } = coolingRuleLimit;
  const late = (toWarmS ?? soFarS) > hotToWarmS && cooked;
  if (late || (toColdS ?? soFarS) > (cooked ? hotToColdS : ambientToColdS)) {
    return { outcome: 'fail', startsAtMs, toWarmS, toColdS };
  }
  return { outcome: toColdS === null ? 'not-shown' : 'pass', startsAtMs, toWarmS, toColdS };
}
