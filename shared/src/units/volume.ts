/** One US gallon in litres, exact: 231 cubic inches of 2.54 cm (NIST SP 811, B.8). */
export const LITERS_PER_US_GALLON = 3.785411784;
const US_FLUID_OUNCES_PER_GALLON = 128;

/** Volume, L to US gal. Any number; NaN stays NaN. */
export function litersToUsGallons(volumeL: number): number {
  return volumeL / LITERS_PER_US_GALLON;
}

/** Volume, US gal to L. Any number; NaN stays NaN. `usGallonsToLiters(5)` is 18.93. */
export function usGallonsToLiters(volumeGal: number): number {
  return volumeGal * LITERS_PER_US_GALLON;
}

/** Volume, L to US fluid ounces (128 to the gallon). */
export function litersToUsFluidOunces(volumeL: number): number {
  return (volumeL / LITERS_PER_US_GALLON) * US_FLUID_OUNCES_PER_GALLON;
}

/** Volume, US fluid ounces to L. `usFluidOuncesToLiters(1)` is 0.02957. */
export function usFluidOuncesToLiters(volumeFlOz: number): number {
  return (volumeFlOz / US_FLUID_OUNCES_PER_GALLON) * LITERS_PER_US_GALLON;
}
