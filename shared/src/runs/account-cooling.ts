import { chillOfDay, dayKit, type DeskKit } from '../desk/index.js';
import { coolingRule, coolingRuleLimit, newtonDurationS, type TemperatureCurve } from '../figures/index.js';
import { isColdSteep, type RecipeDocument } from '../sheets/index.js';

/** The rule counts from here, and to here in its first part, °C. */
export const COOLING_FROM_C = 57;
export const COOLING_TO_C = 21;
/** The slope that the forecast rests on is taken over so long, ms. */
const SLOPE_MS = 180_000;
const LEAST_SLOPE_MS = 30_000;
const SLOWEST_PER_S = 1e-6;

/** Where the clock of the cooling rule stands: what was recorded, and where it goes. Local codes and licensed people come first. */
export type CoolingClock =
  /** Never hot, or still hot: it does not run. */
  | { kind: 'not-yet' }
  | {
      kind: 'running';
      /** Run clock; at or below 57 °C since then. */
      sinceMs: number;
      /** Of the two hours to 21 °C; negative when they are over. */
      leftS: number;
      /** When 21 °C will be there as it falls now, run clock; null when nobody can say. */
      warmAtMs: number | null;
      forecast: 'in-time' | 'late' | 'never' | 'unknown';
    }
  | { kind: 'there'; sinceMs: number; tookS: number; isInTime: boolean };

/**
 * The clock of the cooling rule on a recorded line, with the forecast of its first part by Newton's law from the slope of the last minutes.
 *
 * @param curve recorded so far, run clock.
 * @param reheatedAtMs when somebody really heated it again, run clock.
 * @see cooling-rule.ts; newton.ts.
 */
export function coolingClock(
  curve: TemperatureCurve,
  document: RecipeDocument,
  kit: DeskKit,
  reheatedAtMs: readonly number[] = [],
): CoolingClock {
  const last = curve.at(-1);
  const hotFrom = curve.findIndex(({ tempC }) => tempC >= COOLING_FROM_C);
  // Cold water on its way up has not begun to cool.
  if (!last || hotFrom < 0 || isColdSteep(document)) return { kind: 'not-yet' };
  const { startsAtMs, toWarmS } = coolingRule(curve.slice(hotFrom), { reheatedAtMs });
  if (startsAtMs === null) return { kind: 'not-yet' };
  if (toWarmS !== null) {
    return { kind: 'there', sinceMs: startsAtMs, tookS: toWarmS, isInTime: toWarmS <= coolingRuleLimit.hotToWarmS };
  }
  const leftS = coolingRuleLimit.hotToWarmS - (last.atMs - startsAtMs) / 1000;
  const surroundC = chillOfDay(document, kit)?.surroundC ?? dayKit(document, kit).roomC;
  const warmInS = warmInSeconds(curve, surroundC);
  const warmAtMs = typeof warmInS === 'number' ? last.atMs + warmInS * 1000 : null;
  const forecast = typeof warmInS === 'string' ? warmInS : warmInS <= leftS ? 'in-time' : 'late';
  return { kind: 'running', sinceMs: startsAtMs, leftS, warmAtMs, forecast };
}

function warmInSeconds(curve: TemperatureCurve, surroundC: number): number | 'never' | 'unknown' {
  const last = curve.at(-1);
  const before = last && curve.findLast(({ atMs }) => atMs <= last.atMs - LEAST_SLOPE_MS);
  if (!last || !before || last.atMs - before.atMs > 10 * SLOPE_MS) return 'unknown';
  const from = curve.findLast(({ atMs }) => atMs <= last.atMs - SLOPE_MS) ?? before;
  const rateCPerS = (1000 * (last.tempC - from.tempC)) / (last.atMs - from.atMs);
  if (surroundC >= COOLING_TO_C - 0.5) return rateCPerS < 0 ? 'unknown' : 'never';
  const meanC = (last.tempC + from.tempC) / 2;
  const kPerS = -rateCPerS / Math.max(1, meanC - surroundC);
  if (kPerS < SLOWEST_PER_S) return 'never';
  return newtonDurationS(last.tempC, COOLING_TO_C, surroundC, kPerS) ?? 'never';
}
