import { scaledMassG } from '../figures/index.js';

/** Digits that a kitchen measures of a volume: 12.4 L, 1.24 L, 124 L. */
const VOLUME_DIGITS = 3;
/** More than any scale shows; it only keeps crumbs such as 24.799999999999997 out of the form. */
const MASS_DIGITS = 6;

/** A volume as a kitchen measures it, L: three significant figures. @param volumeL above 0, L. */
export function measurableL(volumeL: number): number {
  return Number(volumeL.toPrecision(VOLUME_DIGITS));
}

/** The same, never above what is given: for a limit that must hold. @param volumeL above 0, L. */
export function measurableAtMostL(volumeL: number): number {
  const rounded = measurableL(volumeL);
  if (rounded <= volumeL) return rounded;
  const step = 10 ** (Math.floor(Math.log10(volumeL)) - VOLUME_DIGITS + 1);
  return Number((rounded - step).toPrecision(VOLUME_DIGITS));
}

/**
 * A mass for another volume, rounded to what the scale shows and never to nothing, g.
 *
 * @throws RangeError as `scaledMassG`.
 */
export function weighableG(massG: number, fromL: number, toL: number, resolutionG?: number): number {
  const scaled = scaledMassG(massG, fromL, toL, resolutionG);
  return resolutionG === undefined ? Number(scaled.toPrecision(MASS_DIGITS)) : scaled;
}
