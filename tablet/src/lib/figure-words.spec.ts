import { metricPreferences, type UnitPreferences } from '@steepfall/shared/units';
import { describe, expect, it } from 'vitest';
import { figureText } from './figure-words.ts';

const usual: UnitPreferences = { temperature: 'F', mass: 'oz', volume: 'gal', pressure: 'psi' };
const of = (low: number, value: number, high: number) => ({ low, value, high, grade: 'measured' }) as const;
const plain = (text: string) => text.replaceAll('\u00a0', ' ');

describe(figureText, () => {
  it.each([
    ['mgPerL', of(86, 139, 190), metricPreferences, '140 (86–190) mg/L'],
    ['pH', of(3.822, 4.071, 4.34), metricPreferences, '4.07 (3.82–4.34)'],
    ['volumeL', of(19.13, 19.13, 19.13), metricPreferences, '19.1 L'],
    ['volumeL', of(18.927, 18.927, 18.927), usual, '5.0 gal'],
    ['tempC', of(76, 76, 76), usual, '168.8 °F'],
    ['pressureKPa', of(90, 95, 100), usual, '13.8 (13.1–14.5) psi'],
    ['durationS', of(2580, 3360, 4380), metricPreferences, '56 min (43 min–1 h 13 min)'],
    ['mgPerL', of(10, 30, 100), metricPreferences, '10–100 mg/L'],
  ] as const)('shows a %s', (quantity, band, units, words) => {
    expect(plain(figureText({ quantity, band }, units).whole)).toBe(words);
  });
});
