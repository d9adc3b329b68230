import type { WatchVerdict } from './types.js';

/** Nothing in or around a kettle is colder or hotter. */
const LOWEST_C = -20;
const HIGHEST_C = 115;
/** The register value of a one-wire chip that has not converted yet; also exactly 185 °F, in the middle of the steep. */
const POWER_ON_C = 85;
/** What a driver says instead of a temperature: disconnected, open, short to ground, short to supply. */
const OPEN_WIRE_C = [-127, -254, -253, -252];
/** A driver's code for "the chip has just started". */
const POWER_ON_RESET_C = -251;
/** A stirred batch moves no faster. */
export const FASTEST_C_PER_S = 0.5;
/** Over a longer absence the rate says nothing any more. */
const LONGEST_RATE_SPAN_S = 10;

export interface PowerOnContext {
  lastGood: { atMs: number; tempC: number } | null;
  lastReadingAtMs: number | null;
  /** Longest time between readings that is not a gap. */
  gapS: number;
  /** Standard deviation of one reading. */
  noiseC: number;
}

/** What can be said from the number alone; `good` means "not refused yet". */
export function judgeRange(tempC: number | null): WatchVerdict {
  if (tempC === null || !Number.isFinite(tempC)) return 'no-signal';
  if (OPEN_WIRE_C.some((code) => Math.abs(tempC - code) < 0.01)) return 'open-wire';
  if (Math.abs(tempC - POWER_ON_RESET_C) < 0.01) return 'power-on';
  if (tempC < LOWEST_C || tempC > HIGHEST_C) return 'implausible';
  return 'good';
}

/**
 * True when an exact 85.0 is the chip's power-on value and not the liquid: when it is the first reading, the first after a
 * gap, or further from the last good one than any kettle moves. The next reading settles it.
 */
export function isPowerOn(reading: { atMs: number; tempC: number }, context: PowerOnContext): boolean {
  if (reading.tempC !== POWER_ON_C) return false;
  const { lastGood, lastReadingAtMs, gapS, noiseC } = context;
  if (lastReadingAtMs === null || (reading.atMs - lastReadingAtMs) / 1000 > gapS) return true;
  if (lastGood === null) return false;
  const spanS = Math.min(LONGEST_RATE_SPAN_S, (reading.atMs - lastGood.atMs) / 1000);
  return Math.abs(POWER_ON_C - lastGood.tempC) > FASTEST_C_PER_S * spanS + 2 * noiseC;
}

/** Off the local line by more than this many standard deviations is no noise: fewer than 1 in 500 of good readings. */
const SPIKE_SDS = 4.5;
/** Never call less than this a spike: eddies do as much. */
const LEAST_SPIKE_C = 0.6;

/** True when a reading is too far from where the local line expects it. */
export function isOffTheLine(tempC: number, expectedC: number, sdC: number): boolean {
  return Math.abs(tempC - expectedC) > Math.max(LEAST_SPIKE_C, SPIKE_SDS * sdC);
}

/** A flat line is one from here on: so long, so many readings, and so far from where the liquid must be by then. */
const LEAST_FLAT_S = 30;
const LEAST_FLAT_COUNT = 8;
const LEAST_FLAT_C = 1.5;
const FLAT_STEPS = 5;

export interface FlatSpan {
  spanS: number;
  /** Readings that said the same. */
  count: number;
  /** How fast the liquid fell, or was to fall, when it began, K/s. */
  fallCPerS: number;
  resolutionC: number;
}

/** True when one number has come for so long that the liquid must have left it by many of the probe's steps. */
export function isStuck({ spanS, count, fallCPerS, resolutionC }: FlatSpan): boolean {
  if (spanS < LEAST_FLAT_S || count < LEAST_FLAT_COUNT) return false;
  return fallCPerS * spanS > Math.max(LEAST_FLAT_C, FLAT_STEPS * resolutionC);
}
