import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import * as units from './index.js';

const pairs: [string, (value: number) => number, (value: number) => number][] = [
  ['°C and °F', units.celsiusToFahrenheit, units.fahrenheitToCelsius],
  ['K and Fahrenheit degrees', units.kelvinToFahrenheitDegrees, units.fahrenheitDegreesToKelvin],
  ['°C and K', units.celsiusToKelvin, units.kelvinToCelsius],
  ['g and oz', units.gramsToOunces, units.ouncesToGrams],
  ['L and US gal', units.litersToUsGallons, units.usGallonsToLiters],
  ['L and US fl oz', units.litersToUsFluidOunces, units.usFluidOuncesToLiters],
  ['kPa and bar', units.kpaToBar, units.barToKpa],
  ['kPa and psi', units.kpaToPsi, units.psiToKpa],
  ['s and min', units.secondsToMinutes, units.minutesToSeconds],
  ['s and h', units.secondsToHours, units.hoursToSeconds],
];

describe('conversions', () => {
  it.each(pairs)('%s come back as they were', (_name, there, back) => {
    fc.assert(
      fc.property(fc.double({ min: -1e6, max: 1e6, noNaN: true }), (value) => {
        const tolerance = 1e-9 * Math.max(1, Math.abs(value));
        expect(Math.abs(back(there(value)) - value)).toBeLessThan(tolerance);
        expect(Math.abs(there(back(value)) - value)).toBeLessThan(tolerance);
      }),
    );
  });

  it('hits the exact points', () => {
    expect(units.celsiusToFahrenheit(85)).toBeCloseTo(185, 12);
    expect(units.celsiusToFahrenheit(-40)).toBeCloseTo(-40, 12);
    expect(units.fahrenheitToCelsius(170)).toBeCloseTo(76.6667, 4);
    expect(units.ouncesToGrams(16)).toBe(453.59237);
    expect(units.usGallonsToLiters(2.5)).toBeCloseTo(9.4635, 4);
    expect(units.usFluidOuncesToLiters(1)).toBeCloseTo(0.0295735295625, 13);
    // NIST SP 811: 1 psi = 6.894757 kPa
    expect(units.psiToKpa(1)).toBeCloseTo(6.894757293, 9);
    expect(units.barToKpa(1)).toBe(100);
    expect(units.hoursToSeconds(24)).toBe(units.SECONDS_PER_DAY);
  });
});
