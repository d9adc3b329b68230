import { positive } from '../numeric/guard.js';

/**
 * How much faster leaf of one size gives than leaf of another. Whole teas differ four times among themselves, half of it size.
 *
 * @param sizeUm above 0, µm.
 * @param referenceUm above 0, µm.
 * @throws RangeError outside these ranges.
 * @see W. E. Price, M. Spiro, J. Sci. Food Agric. 36, 1309, 1985: 2.2 times from 925 to 550 µm, a power of 1.5.
 * @example leafSizeRateFactor(550, 925) // 2.2
 */
export function leafSizeRateFactor(sizeUm: number, referenceUm: number): number {
  return (positive(referenceUm, 'A leaf size', 'µm') / positive(sizeUm, 'A leaf size', 'µm')) ** 1.5;
}

/** Rate of a larger molecule over that of a smaller one of the same kind (Price and Spitzer 1994). @throws RangeError when not above 0. */
export function molarMassRateRatio(molarMass: number, referenceMolarMass: number): number {
  return Math.sqrt(
    positive(referenceMolarMass, 'A molar mass', 'g/mol') / positive(molarMass, 'A molar mass', 'g/mol'),
  );
}
