import { describe, expect, it } from 'vitest';
import { waterVapourPressureKPa } from '../heat/vapour-pressure.js';
import { waterDensityKgPerM3 } from '../heat/water-density.js';
import { compareWithBeerChart } from './beer-chart.js';
import { co2MoleFractionHot } from './co2-solubility-hot.js';

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

  it('Carroll 1991: by the wider correlation it holds 3 to 4.5 % more at all temperatures', () => {
    for (const [tempC, kPa] of [
      [2, 170],
      [4, 190],
      [10, 230],
      [15, 280],
    ] as const) {
      const share = co2MoleFractionHot(tempC, kPa - waterVapourPressureKPa(tempC));
      const molPerL = (share / (1 - share)) * 55.508 * (waterDensityKgPerM3(tempC) / 1000);
      const ratio = (molPerL * 22.263) / compareWithBeerChart(tempC, kPa).chartVolumes;
      expect(ratio).toBeGreaterThan(1.025);
      expect(ratio).toBeLessThan(1.0455);
    }
  });

  it('refuses a warm keg, where the fit ends', () => {
    expect(() => compareWithBeerChart(20, 250)).toThrow(RangeError);
  });
});
