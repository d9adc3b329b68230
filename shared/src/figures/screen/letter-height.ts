import { positive } from '../numeric/guard.js';

/**
 * Height of a capital letter that fills an angle of view, mm. 20 to 22 arcmin are preferred, 16 is the least.
 *
 * @param distanceMm eye to screen, above 0, mm.
 * @param arcmin above 0.
 * @throws RangeError outside these ranges.
 * @see ISO 9241 series.
 * @example letterHeightMm(1000, 22) // 6.4
 */
export function letterHeightMm(distanceMm: number, arcmin: number): number {
  const angle = (positive(arcmin, 'An angle', 'arcmin') / 60) * (Math.PI / 180);
  return 2 * positive(distanceMm, 'A distance', 'mm') * Math.tan(angle / 2);
}

/** CSS pixels that are so many mm on a screen. @throws RangeError when not above 0. @example cssPxForMm(20, 264, 2) // 104 */
export function cssPxForMm(lengthMm: number, pixelsPerInch: number, pixelRatio: number): number {
  return (
    ((positive(lengthMm, 'A length', 'mm') / 25.4) * positive(pixelsPerInch, 'A pixel density')) /
    positive(pixelRatio, 'A pixel ratio')
  );
}

/** Millimetres of so many CSS pixels. @throws RangeError when not above 0. @example mmForCssPx(44, 264, 2) // 8.5 */
export function mmForCssPx(cssPx: number, pixelsPerInch: number, pixelRatio: number): number {
  return (
    (positive(cssPx, 'A length', 'CSS px') * 25.4 * positive(pixelRatio, 'A pixel ratio')) /
    positive(pixelsPerInch, 'A pixel density')
  );
}
