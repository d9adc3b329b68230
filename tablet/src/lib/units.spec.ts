import { metricPreferences, type UnitPreferences } from '@steepfall/shared/units';
import { describe, expect, it } from 'vitest';
import { formatLevel, inPersonsWords, quantityInside, quantityOf, quantityText, typedNumber } from './units.ts';

const american: UnitPreferences = { temperature: 'F', mass: 'oz', volume: 'gal', pressure: 'psi' };
const plain = (text: string) => text.replaceAll('\u00a0', ' ');

describe('a quantity in a field', () => {
  it.each(['140', '141', '170.25', '-4', '99.9999'])('%s °F is kept in °C and comes back as it was typed', (typed) => {
    const quantity = quantityOf('temperature', american);
    const inside = quantityInside(typed, quantity);
    expect(inside).toBeCloseTo((Number(typed) - 32) / 1.8, 9);
    expect(quantityText(inside, quantity)).toBe(typed);
  });

  it.each(['mass', 'volume', 'pressure', 'kelvin', 'kilograms'] as const)('the same with %s', (kind) => {
    const quantity = quantityOf(kind, american);
    for (const typed of ['0.01', '1.5', '5', '12.345', '412'])
      expect(quantityText(quantityInside(typed, quantity), quantity)).toBe(typed);
  });

  it('shows what was not typed in this unit without a tail of digits', () => {
    expect(quantityText(19, quantityOf('volume', american))).toBe('5.02');
    expect(quantityText(0.0625, quantityOf('temperature', metricPreferences))).toBe('0.0625');
    expect(quantityText(null, quantityOf('volume', american))).toBe('');
  });

  it('takes a decimal comma and a true minus, and tells letters from nothing', () => {
    expect(typedNumber(' 82,5 ')).toBe(82.5);
    expect(typedNumber('\u22125')).toBe(-5);
    expect(typedNumber('')).toBeUndefined();
    for (const text of ['12 g', '0x10', 'many', '1.2.3', '-']) expect(typedNumber(text)).toBeNaN();
  });
});

describe('words in the person’s units', () => {
  it('turns the numbers of a contract', () => {
    expect(plain(inPersonsWords('At most 40 °C.', american))).toBe('At most 104 °F.');
    expect(plain(inPersonsWords('From -5 °C up.', american))).toBe('From 23 °F up.');
    expect(inPersonsWords('At most 1000 L, 0.05 a second, 30 g/L.', metricPreferences)).toContain('1000 L');
    expect(plain(inPersonsWords('A volume above 0 L, 30 g/L.', american))).toBe('A volume above 0 fl oz, 30 g/L.');
  });

  it('writes a level without false digits', () => {
    expect(plain(formatLevel(60, american))).toBe('140 °F');
    expect(plain(formatLevel(62, american))).toBe('143.6 °F');
    expect(plain(formatLevel(62.5, metricPreferences))).toBe('62.5 °C');
  });
});
