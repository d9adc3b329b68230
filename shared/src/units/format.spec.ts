import { describe, expect, it } from 'vitest';
import {
  formatDuration,
  formatMass,
  formatPressure,
  formatRate,
  formatTemp,
  formatVolume,
  formatSignificant,
  metricPreferences,
  toSignificant,
} from './index.js';

/** No-break spaces are right on a screen and hard to read in a test. */
const plain = (text: string) => text.replaceAll('\u00a0', ' ');

describe('formatTemp', () => {
  it.each([
    [82, 'C', '82.0 °C'],
    [85, 'F', '185.0 °F'],
    [-1.25, 'C', '−1.3 °C'],
    [-0.04, 'C', '0.0 °C'],
    [null, 'C', '– °C'],
    [Number.NaN, 'F', '– °F'],
  ] as const)('%s °C in %s is %s', (tempC, unit, text) => {
    expect(plain(formatTemp(tempC, { unit }))).toBe(text);
  });

  it('takes digits, and leaves the unit out when asked', () => {
    expect(formatTemp(60, { unit: 'C', digits: 0, showUnit: false })).toBe('60');
  });
});

describe('formatRate', () => {
  it('drops the sign and knows that a Fahrenheit degree is smaller', () => {
    expect(formatRate(-6.2, { unit: 'C' })).toBe('6.2 a minute');
    expect(formatRate(-6.2, { unit: 'F' })).toBe('11.2 a minute');
    expect(formatRate(null, { unit: 'C' })).toBe('–');
  });
});

describe('formatDuration', () => {
  it.each([
    [108, '1:48'],
    [40, '0:40'],
    [3730, '1:02:10'],
    [0, '0:00'],
    [-12, '−0:12'],
    [-0.2, '0:00'],
    [59.6, '1:00'],
    [3599.7, '1:00:00'],
    [90_061, '25:01:01'],
    [undefined, '–'],
  ])('%s s is %s', (durationS, text) => {
    expect(formatDuration(durationS)).toBe(text);
  });
});

describe('formatMass', () => {
  it.each([
    [0.354, 'g', '0.35 g'],
    [2.5, 'g', '2.5 g'],
    [48, 'g', '48 g'],
    [999.7, 'g', '1 kg'],
    [1250, 'g', '1.25 kg'],
    [2, 'oz', '0.071 oz'],
    [40, 'oz', '1.41 oz'],
    [500, 'oz', '17.6 oz'],
  ] as const)('%s g in %s is %s', (massG, unit, text) => {
    expect(plain(formatMass(massG, { unit }))).toBe(text);
  });
});

describe('formatVolume', () => {
  it.each([
    [0.355, 'L', '355 mL'],
    [19.13, 'L', '19.1 L'],
    [120, 'L', '120 L'],
    [0.355, 'gal', '12 fl oz'],
    [9.4635, 'gal', '2.50 gal'],
    [75.7, 'gal', '20.0 gal'],
  ] as const)('%s L in %s is %s', (volumeL, unit, text) => {
    expect(plain(formatVolume(volumeL, { unit }))).toBe(text);
  });
});

describe('formatPressure', () => {
  it.each([
    [72.7, 'kPa', '73 kPa'],
    [72.7, 'bar', '0.73 bar'],
    [72.7, 'psi', '10.5 psi'],
    [-3.2, 'kPa', '−3 kPa'],
  ] as const)('%s kPa in %s is %s', (pressureKPa, unit, text) => {
    expect(plain(formatPressure(pressureKPa, { unit }))).toBe(text);
  });

  it('has metric preferences to start from', () => {
    expect(metricPreferences).toEqual({ temperature: 'C', mass: 'g', volume: 'L', pressure: 'kPa' });
  });
});

describe('toSignificant', () => {
  it.each([
    [139, 140, '140'],
    [6.04, 6, '6.0'],
    [0.00394, 0.0039, '0.0039'],
    [-0.0996, -0.1, '−0.10'],
    [0, 0, '0'],
    [99.6, 100, '100'],
    [1e-9, 1e-9, '0.0000000010'],
  ])('%s to two figures is %s, "%s"', (value, number, text) => {
    expect(toSignificant(value, 2)).toBe(number);
    expect(formatSignificant(value, 2)).toBe(text);
  });

  it('refuses what is not a number', () => {
    expect(() => toSignificant(Number.NaN)).toThrow(RangeError);
    expect(() => toSignificant(1, 0)).toThrow(/whole number from 1 to 15/);
  });
});
