import { SECONDS_PER_HOUR, SECONDS_PER_MINUTE } from './duration.js';
import { gramsToOunces } from './mass.js';
import { fixed, MINUS, NO_BREAK_SPACE, NO_VALUE, upTo } from './number-text.js';
import type { UnitPreferences } from './preferences.js';
import { kpaToBar, kpaToPsi } from './pressure.js';
import { celsiusToFahrenheit, kelvinToFahrenheitDegrees } from './temperature.js';
import { litersToUsFluidOunces, litersToUsGallons } from './volume.js';

/** Every formatter takes a missing number (null, NaN, infinite) and shows an en dash: a screen must not fall over it. */
type Shown = number | null | undefined;

function isShown(value: Shown): value is number {
  return typeof value === 'number' && Number.isFinite(value);
}

function withUnit(text: string, unit: string, shown: boolean): string {
  return shown ? `${text}${NO_BREAK_SPACE}${unit}` : text;
}

/**
 * A temperature for reading: one decimal, a true minus, the unit after a no-break space.
 * `formatTemp(82, { unit: 'C' })` is "82.0 °C"; with `showUnit: false` it is "82.0".
 *
 * @param tempC °C.
 */
export function formatTemp(
  tempC: Shown,
  { unit, digits = 1, showUnit = true }: { unit: UnitPreferences['temperature']; digits?: number; showUnit?: boolean },
): string {
  const text = isShown(tempC) ? fixed(unit === 'F' ? celsiusToFahrenheit(tempC) : tempC, digits) : NO_VALUE;
  return withUnit(text, `°${unit}`, showUnit);
}

/**
 * A rate of change, in degrees a minute and without its sign: "6.2 a minute". Say "falling" or "rising" beside it.
 *
 * @param rateCPerMin K a minute.
 */
export function formatRate(rateCPerMin: Shown, { unit }: { unit: UnitPreferences['temperature'] }): string {
  if (!isShown(rateCPerMin)) return NO_VALUE;
  const rate = Math.abs(unit === 'F' ? kelvinToFahrenheitDegrees(rateCPerMin) : rateCPerMin);
  return `${fixed(rate, 1)} a minute`;
}

/**
 * A time span in whole seconds: "0:40", "1:48", "1:02:10"; negative with a true minus, "−0:12".
 *
 * @param durationS seconds; rounded to the nearest.
 */
export function formatDuration(durationS: Shown): string {
  if (!isShown(durationS)) return NO_VALUE;
  const total = Math.round(Math.abs(durationS));
  const hours = Math.floor(total / SECONDS_PER_HOUR);
  const minutes = Math.floor((total % SECONDS_PER_HOUR) / SECONDS_PER_MINUTE);
  const twoDigits = (part: number) => String(part).padStart(2, '0');
  const clock = hours > 0 ? `${hours}:${twoDigits(minutes)}` : String(minutes);
  const sign = durationS < 0 && total > 0 ? MINUS : '';
  return `${sign}${clock}:${twoDigits(total % SECONDS_PER_MINUTE)}`;
}

/**
 * A mass: "0.35 g", "2.5 g", "48 g", "1.25 kg", or "0.071 oz", "1.41 oz".
 *
 * @param massG grams.
 */
export function formatMass(massG: Shown, { unit }: { unit: UnitPreferences['mass'] }): string {
  if (!isShown(massG)) return NO_VALUE;
  if (unit === 'oz') {
    const massOz = gramsToOunces(massG);
    return withUnit(upTo(massOz, massOzDigits(Math.abs(massOz))), 'oz', true);
  }
  const size = Math.abs(massG);
  if (size >= 999.5) return withUnit(upTo(massG / 1000, 2), 'kg', true);
  return withUnit(upTo(massG, size < 1 ? 2 : size < 99.95 ? 1 : 0), 'g', true);
}

/** A gram of salt is a thirtieth of an ounce: two digits would be an eighth off. */
function massOzDigits(sizeOz: number): number {
  if (sizeOz < 1) return 3;
  return sizeOz < 10 ? 2 : 1;
}

/**
 * A volume: "355 mL", "19.1 L", or "12 fl oz" (below a quarter gallon), "2.50 gal".
 *
 * @param volumeL litres.
 */
export function formatVolume(volumeL: Shown, { unit }: { unit: UnitPreferences['volume'] }): string {
  if (!isShown(volumeL)) return NO_VALUE;
  const size = Math.abs(volumeL);
  if (unit === 'gal') {
    const volumeGal = litersToUsGallons(volumeL);
    if (Math.abs(volumeGal) < 0.25) return withUnit(upTo(litersToUsFluidOunces(volumeL), 1), 'fl oz', true);
    return withUnit(fixed(volumeGal, Math.abs(volumeGal) < 9.995 ? 2 : 1), 'gal', true);
  }
  if (size < 0.9995) return withUnit(fixed(volumeL * 1000, 0), 'mL', true);
  return withUnit(fixed(volumeL, size < 99.95 ? 1 : 0), 'L', true);
}

/**
 * A pressure: "73 kPa", "0.73 bar" or "10.5 psi". It does not say gauge or absolute: the words beside it must.
 *
 * @param pressureKPa kPa.
 */
export function formatPressure(pressureKPa: Shown, { unit }: { unit: UnitPreferences['pressure'] }): string {
  if (!isShown(pressureKPa)) return NO_VALUE;
  if (unit === 'bar') return withUnit(fixed(kpaToBar(pressureKPa), 2), 'bar', true);
  if (unit === 'psi') return withUnit(fixed(kpaToPsi(pressureKPa), 1), 'psi', true);
  return withUnit(fixed(pressureKPa, 0), 'kPa', true);
}
