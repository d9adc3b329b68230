import { tooLittle, type Learned, type Lesson } from './learn-lesson.js';
import type { KettleState } from './state.js';

/** A stretch in which nothing was done to the kettle. */
export interface Stretch {
  kettle: KettleState;
  readings: readonly { atMs: number; tempC: number }[];
}

const Z_90 = 1.6449;
/** Below this distance to the surroundings the quotient is noise. */
const LEAST_DRIVE_C = 10;
/** Near the coolant a coil in still liquid weakens, and nothing is caught there: the constant is that of the fall through the additions. */
const LEAST_CHILL_DRIVE_C = 30;
/** What people's word for the room and for the coolant is good to, K. */
const ROOM_ERROR_C = 3;
const COOLANT_ERROR_C = 1.5;
const LEAST_COOLING_S = 120;
const LEAST_CHILLING_S = 45;
/** Less sure than this share of itself, a constant is no better than the usual one. */
const SURE_SHARE = 0.35;

/** Rate constant of the kettle's losses to the room with its lid on, 1/s, at the temperatures of this run. */
export function learnedCooling(stretches: readonly Stretch[], roomC: number): Lesson {
  const own = stretches.filter(
    ({ kettle, readings }) => kettle.lidOn && !kettle.heating && !kettle.chilling && spanS(readings) >= LEAST_COOLING_S,
  );
  return fallOf(own, { referenceC: roomC, errorC: ROOM_ERROR_C, leastC: LEAST_DRIVE_C });
}

/** Rate constant of the kettle with its chiller running, toward the coolant, 1/s; its losses to the room are in it. */
export function learnedChilling(stretches: readonly Stretch[], coolantC: number | null): Lesson {
  if (coolantC === null) return tooLittle('not-told');
  const own = stretches.filter(({ kettle, readings }) => kettle.chilling && spanS(readings) >= LEAST_CHILLING_S);
  return fallOf(own, { referenceC: coolantC, errorC: COOLANT_ERROR_C, leastC: LEAST_CHILL_DRIVE_C });
}

function spanS(readings: Stretch['readings']): number {
  const [first, last] = [readings[0], readings.at(-1)];
  return first && last ? (last.atMs - first.atMs) / 1000 : 0;
}

/**
 * An exponential that a lagging probe follows is the same exponential, later: its constant needs no lag taken out. Several stretches count
 * by how sure each is, and widen the error where they disagree.
 */
function fallOf(
  stretches: readonly Stretch[],
  { referenceC, errorC, leastC }: { referenceC: number; errorC: number; leastC: number },
): Lesson {
  const fits = stretches.flatMap(({ readings }) => {
    const far = readings.filter(({ tempC }) => tempC - referenceC > leastC);
    if (far.length < 8) return [];
    const line = fitLine(far.map(({ atMs, tempC }) => [(atMs - far[0]!.atMs) / 1000, Math.log(tempC - referenceC)]));
    const meanC = far.reduce((sum, { tempC }) => sum + tempC, 0) / far.length;
    return [{ perS: -line.slope, sd: line.slopeSd, drive: meanC - referenceC }];
  });
  if (fits.length === 0) return tooLittle('too-short');
  const weights = fits.map(({ sd }) => 1 / Math.max(1e-12, sd ** 2));
  const total = weights.reduce((sum, weight) => sum + weight, 0);
  const mean = (of: (fit: (typeof fits)[number]) => number) =>
    fits.reduce((sum, fit, i) => sum + weights[i]! * of(fit), 0) / total;
  const value = mean(({ perS }) => perS);
  const between = Math.sqrt(mean(({ perS }) => (perS - value) ** 2));
  const known = (value * errorC) / mean(({ drive }) => drive) / Z_90;
  return surely({ value, error: Z_90 * Math.hypot(Math.sqrt(1 / total), between, known) });
}

function surely(learned: Learned): Lesson {
  const isSure = learned.value > 0 && learned.error <= SURE_SHARE * learned.value;
  return isSure ? { learned, because: null } : tooLittle('unclear');
}

/** What has to be told for learning how much of the bought heat arrives. */
export interface HeatingFacts {
  /** Water and kettle, J/K. */
  heatCapacityJPerK: number;
  /** As bought, W. */
  powerW: number;
  /** What the lidded kettle loses to the room, W for each kelvin above it. */
  lossWPerK: number;
}

const LEAST_HEATING_S = 180;
const LEAST_RISE_C = 4;
/** Above this the losses count for too much. */
const HEATING_TO_C = 70;
/** Relative errors of the water that was filled in, and of the losses. */
const WATER_ERROR = 0.03;
const LOSS_ERROR = 0.3;
const LEAST_EFFICIENCY = 0.1;

/** Share of the bought power that reaches the kettle, from the longest stretch of heating. */
export function learnedHeating(stretches: readonly Stretch[], roomC: number, facts: HeatingFacts | null): Lesson {
  if (facts === null) return tooLittle('not-told');
  const heated = stretches
    .filter(({ kettle }) => kettle.heating)
    .map(({ readings }) => readings.filter(({ tempC }) => tempC <= HEATING_TO_C))
    .sort((a, b) => spanS(b) - spanS(a))[0];
  const first = heated?.[0];
  const last = heated?.at(-1);
  if (!heated || !first || !last || spanS(heated) < LEAST_HEATING_S) return tooLittle('too-short');
  if (last.tempC - first.tempC < LEAST_RISE_C) return tooLittle('unclear');
  const line = fitLine(heated.map(({ atMs, tempC }) => [(atMs - first.atMs) / 1000, tempC]));
  const { heatCapacityJPerK, powerW, lossWPerK } = facts;
  const lossW = Math.max(0, lossWPerK * ((first.tempC + last.tempC) / 2 - roomC));
  const value = (heatCapacityJPerK * line.slope + lossW) / powerW;
  const error = Math.hypot(
    (Z_90 * heatCapacityJPerK * line.slopeSd) / powerW,
    (WATER_ERROR * heatCapacityJPerK * line.slope) / powerW,
    (LOSS_ERROR * lossW) / powerW,
  );
  // More than was bought cannot arrive: the power or the water is told wrong.
  if (value < LEAST_EFFICIENCY || value - error > 1) return tooLittle('far-from-told');
  return { learned: { value: Math.min(1, value), error }, because: null };
}

/** Slope of a least-squares line and its standard deviation. Neighbours err alike: fewer readings count than were taken. */
function fitLine(points: readonly (readonly [number, number])[]): { slope: number; slopeSd: number } {
  const n = points.length;
  const meanX = points.reduce((sum, [x]) => sum + x, 0) / n;
  const meanY = points.reduce((sum, [, y]) => sum + y, 0) / n;
  const spread = points.reduce((sum, [x]) => sum + (x - meanX) ** 2, 0);
  const slope = points.reduce((sum, [x, y]) => sum + (x - meanX) * (y - meanY), 0) / spread;
  const off = points.map(([x, y]) => y - meanY - slope * (x - meanX));
  const square = off.reduce((sum, one) => sum + one * one, 0);
  const beside = off.slice(1).reduce((sum, one, i) => sum + one * off[i]!, 0);
  const alike = Math.min(0.98, Math.max(0, beside / Math.max(1e-300, square)));
  const countedN = Math.max(3, (n * (1 - alike)) / (1 + alike));
  return { slope, slopeSd: Math.sqrt(square / spread / Math.max(1, countedN - 2)) };
}
