import { probeLag } from '../figures/index.js';
import type { Reading } from './reading.js';
import { steadiness } from './steady.js';

export type LagRefusal =
  /** It had not come to rest before it was moved. */
  | 'not-steady'
  /** It left the first water before the moment that was given. */
  | 'moved-early'
  /** The two waters are too much alike. */
  | 'small-step'
  /** It is read too seldom for how fast it moves. */
  | 'too-few'
  /** Readings are missing in the middle. */
  | 'gap'
  /** Not one clean move: unstirred, or against the wall. */
  | 'not-one-move'
  | 'never-steady';

export type LagTest =
  | { kind: 'moving'; hasMoved: boolean }
  | {
      kind: 'found';
      /** Time constant plus dead time: what the watch calls lag, s. */
      lagS: number;
      /** Standard uncertainty of it, s. */
      uncertaintyS: number;
      tauS: number;
      deadTimeS: number;
      fromC: number;
      toC: number;
    }
  | { kind: 'refused'; reason: LagRefusal };

/** Below this the steps of the probe and the draught in the water count for too much. Our choice. */
export const LEAST_STEP_K = 15;
const STEADY_BEFORE_S = 8;
/** What a probe at rest in a stirred bath may move, K, and as a share of the whole step afterwards. */
const REST_K = 0.4;
const REST_SHARE = 0.008;
const LONGEST_S = 600;
/** A hand presses and plunges within about this much of each other. Our choice. */
const HAND_S = 0.4;
/** Of the step, root mean square. A first-order probe with dead time in stirred water stays well below it. */
const WORST_MISFIT = 0.06;

interface Point {
  /** Since it was plunged. */
  s: number;
  tempC: number;
}

/**
 * The lag of a probe from a step test: it rested in one water and was plunged into another at `plungedAtMs`.
 *
 * @param readings in order of time, from before the plunge up to now; as the probe sent them.
 * @param plungedAtMs by the clock of the readings.
 * @param facts smallest step of the probe and time between its readings.
 * @see a first-order sensor with dead time, t50 and t90 (probeLag in figures). The uncertainty joins the hand that
 * presses, the spacing of the readings and the steps of the probe.
 */
export function lagTest(
  readings: readonly Reading[],
  plungedAtMs: number,
  { resolutionC, samplePeriodS }: { resolutionC: number; samplePeriodS: number },
): LagTest {
  const newestMs = readings.at(-1)?.atMs ?? plungedAtMs;
  const before = steadiness(readings, plungedAtMs, {
    spanS: Math.max(STEADY_BEFORE_S, 5 * samplePeriodS),
    withinK: REST_K + 2 * resolutionC,
  });
  if (before.meanC === null || !before.isSteady) return { kind: 'refused', reason: 'not-steady' };
  const fromC = before.meanC;
  const after: Point[] = readings.flatMap(({ atMs, tempC }) =>
    atMs >= plungedAtMs && tempC !== null ? [{ s: (atMs - plungedAtMs) / 1000, tempC }] : [],
  );
  const elapsedS = (newestMs - plungedAtMs) / 1000;
  const hasGap = readings.some(
    ({ atMs, tempC }, i) =>
      i > 0 &&
      atMs > plungedAtMs &&
      (tempC === null || atMs - readings[i - 1]!.atMs > Math.max(3, 3 * samplePeriodS) * 1000),
  );
  if (hasGap) return { kind: 'refused', reason: 'gap' };

  const farC = after.reduce((far, { tempC }) => (Math.abs(tempC - fromC) > Math.abs(far - fromC) ? tempC : far), fromC);
  const end = steadiness(readings, newestMs, {
    // The slower it is, the longer it must be watched to see that it has come to rest.
    spanS: Math.max(10, 6 * samplePeriodS, elapsedS / 4),
    withinK: Math.max(REST_SHARE * Math.abs(farC - fromC), 2 * resolutionC),
  });
  const hasMoved = Math.abs(farC - fromC) > REST_K + 4 * resolutionC;
  if (!hasMoved || !end.isSteady || end.meanC === null || elapsedS < 10) {
    if (elapsedS > LONGEST_S) return { kind: 'refused', reason: hasMoved ? 'never-steady' : 'small-step' };
    return { kind: 'moving', hasMoved };
  }
  return judged(after, fromC, end.meanC, { resolutionC, samplePeriodS });
}

function judged(
  after: readonly Point[],
  fromC: number,
  toC: number,
  { resolutionC, samplePeriodS }: { resolutionC: number; samplePeriodS: number },
): LagTest {
  const stepK = toC - fromC;
  if (Math.abs(stepK) < LEAST_STEP_K) return { kind: 'refused', reason: 'small-step' };
  const shareOf = ({ tempC }: Point) => (tempC - fromC) / stepK;
  const first = after[0];
  if (first && first.s <= 1.5 * samplePeriodS && shareOf(first) > 0.35)
    return { kind: 'refused', reason: 'moved-early' };
  const between = after.filter((point) => shareOf(point) > 0.1 && shareOf(point) < 0.95);
  if (between.length < 4) return { kind: 'refused', reason: 'too-few' };
  const t50S = crossedAtS(after, shareOf, 0.5);
  const t90S = crossedAtS(after, shareOf, 0.9);
  if (t50S === null || t90S === null || t50S <= 0 || t90S <= t50S) return { kind: 'refused', reason: 'not-one-move' };
  const { tauS, deadTimeS, rampLagS } = probeLag(t50S, t90S);
  const misfits = after.map((point) => shareOf(point) - (1 - Math.exp(-Math.max(0, point.s - deadTimeS) / tauS)));
  const moving = misfits.filter((_, i) => after[i]!.s < deadTimeS + 4 * tauS);
  const misfit = Math.sqrt(moving.reduce((sum, miss) => sum + miss * miss, 0) / Math.max(1, moving.length));
  if (misfit > WORST_MISFIT) return { kind: 'refused', reason: 'not-one-move' };

  // The lag is t50 + (1 - ln 2) tau: so much of each of the two times is in it.
  const shareOf90 = (1 - Math.LN2) / Math.log(5);
  const stepsS = (share: number) => (resolutionC / Math.sqrt(12) / (Math.abs(stepK) * (1 - share))) * tauS;
  const timingS = (share: number) => Math.hypot(stepsS(share), samplePeriodS / Math.sqrt(12) / 2, misfit * tauS);
  const uncertaintyS = Math.hypot(HAND_S, (1 - shareOf90) * timingS(0.5), shareOf90 * timingS(0.9));
  return { kind: 'found', lagS: rampLagS, uncertaintyS, tauS, deadTimeS, fromC, toC };
}

/** When the share was first passed for good, between two readings; null when it never was. */
function crossedAtS(points: readonly Point[], shareOf: (point: Point) => number, share: number): number | null {
  for (let i = points.length - 1; i > 0; i -= 1) {
    const [early, late] = [points[i - 1]!, points[i]!];
    if (shareOf(early) < share && shareOf(late) >= share)
      return early.s + ((share - shareOf(early)) / (shareOf(late) - shareOf(early))) * (late.s - early.s);
  }
  return null;
}
