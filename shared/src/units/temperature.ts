/**
 * Celsius, Fahrenheit and kelvin. The factors are exact by definition: 0 °C is 273.15 K (SI Brochure, 9th ed., 2.3.1) and
 * a Fahrenheit degree is 5/9 K with 32 °F at 0 °C (NIST SP 811, B.8).
 */
const KELVIN_AT_ZERO_C = 273.15;
const FAHRENHEIT_PER_KELVIN = 1.8;
const FAHRENHEIT_AT_ZERO_C = 32;

/** Absolute temperature, °C to °F. Any number; NaN stays NaN. `celsiusToFahrenheit(85)` is 185. */
export function celsiusToFahrenheit(tempC: number): number {
  return tempC * FAHRENHEIT_PER_KELVIN + FAHRENHEIT_AT_ZERO_C;
}

/** Absolute temperature, °F to °C. Any number; NaN stays NaN. `fahrenheitToCelsius(170)` is 76.67. */
export function fahrenheitToCelsius(tempF: number): number {
  return (tempF - FAHRENHEIT_AT_ZERO_C) / FAHRENHEIT_PER_KELVIN;
}

/** A difference or a rate in K (or K a minute) in Fahrenheit degrees: no offset. */
export function kelvinToFahrenheitDegrees(deltaC: number): number {
  return deltaC * FAHRENHEIT_PER_KELVIN;
}

/** A difference or a rate in Fahrenheit degrees in K: no offset. */
export function fahrenheitDegreesToKelvin(deltaF: number): number {
  return deltaF / FAHRENHEIT_PER_KELVIN;
}

/** Absolute temperature, °C to K. */
export function celsiusToKelvin(tempC: number): number {
  return tempC + KELVIN_AT_ZERO_C;
}

/** Absolute temperature, K to °C. */
export function kelvinToCelsius(tempK: number): number {
  return tempK - KELVIN_AT_ZERO_C;
}
