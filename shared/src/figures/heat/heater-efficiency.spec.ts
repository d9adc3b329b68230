import { describe, expect, it } from 'vitest';
import { heaterEfficiency, learnedHeaterEfficiency } from './heater-efficiency.js';
import { heatingTime } from './heating-time.js';

describe('heater efficiency', () => {
  it('is a share of the power, low before high (Sweeney et al. 2014)', () => {
    for (const { low, high } of Object.values(heaterEfficiency)) {
      expect(low).toBeGreaterThan(0);
      expect(high).toBeGreaterThan(low);
      expect(high).toBeLessThanOrEqual(1);
    }
  });

  it('is learned back from the heating it causes', () => {
    const heating = { heatCapacityJPerK: 43_110, fromC: 20, toC: 82, powerW: 2000, efficiency: 0.87 };
    const answer = heatingTime(heating);
    if (answer.kind !== 'reaches') throw new Error('must reach');
    expect(learnedHeaterEfficiency({ ...heating, rateCPerS: 62 / answer.durationS, lossW: 0 })).toBeCloseTo(0.87, 9);
  });

  it('refuses a falling temperature', () => {
    expect(() => learnedHeaterEfficiency({ heatCapacityJPerK: 1, rateCPerS: -1, powerW: 1, lossW: 0 })).toThrow(
      RangeError,
    );
  });
});
