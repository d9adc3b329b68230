import { describe, expect, it } from 'vitest';
import { activationEnergyKjPerMol, arrheniusFactor } from './arrhenius.js';

describe('Arrhenius', () => {
  it('Farakte 2015: 2.23e-10 at 60 °C and 4.34e-10 at 80 °C are 32.57 kJ/mol', () => {
    const energy = activationEnergyKjPerMol({ tempC: 60, rate: 2.23e-10 }, { tempC: 80, rate: 4.34e-10 });
    expect(Math.abs(energy - 32.57)).toBeLessThan(0.05);
    expect(arrheniusFactor(60, energy, 80)).toBeCloseTo(2.23 / 4.34, 9);
  });

  it('refuses one temperature, and a rate of 0', () => {
    expect(() => activationEnergyKjPerMol({ tempC: 60, rate: 1 }, { tempC: 60, rate: 2 })).toThrow(/another pair/);
    expect(() => activationEnergyKjPerMol({ tempC: 60, rate: 0 }, { tempC: 80, rate: 2 })).toThrow(RangeError);
    expect(() => arrheniusFactor(Number.NaN, 40, 80)).toThrow(RangeError);
  });
});
