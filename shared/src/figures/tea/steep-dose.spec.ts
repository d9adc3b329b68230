import { describe, expect, it } from 'vitest';
import { steepDoseMin, steepLinesHold, steepVerdict, type TeaKind } from './steep-dose.js';

const hold = (tempC: number, minutes: number) => [
  { atMs: 0, tempC },
  { atMs: minutes * 60_000, tempC },
];

describe('steep dose', () => {
  it.each([
    [82, 4, 4.28],
    [98, 7, 12.48],
    [85, 3, 3.54],
  ])('Arrhenius with 35 kJ/mol, computed: at %s °C %s min are %s', (tempC, minutes, dose) => {
    expect(Math.abs(steepDoseMin(hold(tempC, minutes)) / dose - 1)).toBeLessThan(0.005);
  });

  it.each<[TeaKind, number, string]>([
    ['green', 2, 'short'],
    ['green', 3.54, 'good'],
    ['green', 8.1, 'amber'],
    ['green', 21, 'red'],
    ['white', 4.28, 'good'],
    ['white', 12.48, 'good'],
    ['white', 14, 'long'],
    ['white', 31, 'red'],
    ['black', 9, 'long'],
    ['oolong', 11, 'amber'],
    ['herbal', 300, 'good'],
  ])('Saklar 2015, Perez-Burillo 2018 and judgement: %s at %s is %s', (tea, dose, verdict) => {
    expect(steepVerdict(tea, dose)).toBe(verdict);
  });

  it('Perez-Burillo 2018: the lines are of hot steeps, not of a night in the fridge', () => {
    expect(steepLinesHold(hold(82, 4))).toBe(true);
    expect(steepLinesHold([...hold(82, 4), { atMs: 3_600_000, tempC: 20 }])).toBe(true);
    expect(steepLinesHold(hold(5, 720))).toBe(false);
    expect(steepLinesHold([])).toBe(false);
  });

  it('refuses a negative dose and an unknown tea', () => {
    expect(() => steepVerdict('green', -1)).toThrow(RangeError);
    expect(() => steepVerdict('mint' as TeaKind, 1)).toThrow(/one of green/);
  });
});
