import { describe, expect, it } from 'vitest';
import { compareWithBeerChart } from './beer-chart.js';

describe('compareWithBeerChart', () => {
  it.each([
    [2, 170, 2.49, 2.64, 10],
    [4, 190, 2.6, 2.73, 9],
    [10, 230, 2.58, 2.66, 6],
    [15, 280, 2.69, 2.73, 4],
  ])('deLange 2011 (coefficients from memory) and Weiss 1974: %s °C, %s kPa', (tempC, kPa, chart, water, extra) => {
    const line = compareWithBeerChart(tempC, kPa);
    expect(Math.abs(line.chartVolumes - chart)).toBeLessThan(0.01);
    expect(Math.abs(line.waterVolumes - water)).toBeLessThan(0.01);
    expect(Math.abs(line.extraKPa - extra)).toBeLessThan(1);
  });

  it('refuses a warm keg, where the fit ends', () => {
    expect(() => compareWithBeerChart(20, 250)).toThrow(RangeError);
  });
});
