import { describe, expect, it } from 'vitest';
import { activationEnergyKjPerMol, arrheniusFactor } from '../numeric/arrhenius.js';
import { isoLossPerMin, isomerisationPerMin, isomerisationTurns, isomerise } from './isomerisation.js';

const hold = (tempC: number, minutes: number) => [
  { atMs: 0, tempC },
  { atMs: minutes * 60_000, tempC },
];
/** 60 to 30 °C at 0.08 a minute toward 15 °C, a point every five seconds. */
const minutes = Math.log(45 / 15) / 0.08;
const fall = Array.from({ length: 166 }, (_, i) => {
  const min = Math.min(minutes, (i * 5) / 60);
  return { atMs: min * 60_000, tempC: 15 + 45 * Math.exp(-0.08 * min) };
});

describe('isomerisation', () => {
  it.each([
    [60, 2.751e-4],
    [80, 2.065e-3],
    [100, 1.249e-2],
  ])('Malowicki and Shellhammer 2005: at %s °C %s a minute', (tempC, perMin) => {
    expect(Math.abs(isomerisationPerMin(tempC) / perMin - 1)).toBeLessThan(0.005);
  });

  it('Malowicki and Shellhammer 2005: loss at 100 °C 3.087e-3 a minute', () => {
    expect(Math.abs(isoLossPerMin(100) / 3.087e-3 - 1)).toBeLessThan(0.005);
  });

  it('Malowicki and Shellhammer 2005: 0.476 after 60 min at 100 °C, most after 148.6 min, 0.632', () => {
    const boil = (min: number) =>
      isomerise(hold(100, min), { alphaMgPerL: 1, ph: 5.2, solubilityAt60MgPerL: null }).isoMgPerL;
    expect(Math.abs(boil(60) - 0.476)).toBeLessThan(0.002);
    expect(Math.abs(boil(148.6) / 0.632 - 1)).toBeLessThan(0.005);
    expect(boil(148.6)).toBeGreaterThan(boil(140));
    expect(boil(148.6)).toBeGreaterThan(boil(157));
  });

  it('Malowicki and Shellhammer 2005: 60 to 30 °C in 13.73 min sum to 8.344e-4, as 3.03 min at 60 °C', () => {
    expect(minutes).toBeCloseTo(13.73, 2);
    const turns = isomerisationTurns(fall);
    expect(Math.abs(turns / 8.344e-4 - 1)).toBeLessThan(0.005);
    expect(Math.abs(turns / isomerisationPerMin(60) - 3.03)).toBeLessThan(0.02);
  });

  it('Malowicki and Shellhammer 2005 and judgement: 270 mg/L of alpha on the fall make 0.014 mg/L, at most 0.23', () => {
    const contact = { alphaMgPerL: 270, ph: 3.78 };
    expect(isomerise(fall, contact).isoMgPerL).toBeCloseTo(0.014, 3);
    expect(isomerise(fall, { ...contact, solubilityAt60MgPerL: null }).isoMgPerL).toBeCloseTo(0.23, 2);
  });

  it('Malowicki and Shellhammer 2005: 98.6 and 108.0 kJ/mol; a tenth more of it moves 60 °C against 90 °C by a third', () => {
    const energy = (rate: (tempC: number) => number) =>
      activationEnergyKjPerMol({ tempC: 60, rate: rate(60) }, { tempC: 90, rate: rate(90) });
    expect(energy(isomerisationPerMin)).toBeCloseTo(98.6, 1);
    expect(energy(isoLossPerMin)).toBeCloseTo(108.0, 1);
    expect(Math.abs(arrheniusFactor(60, -0.1 * 98.6, 90) - 1.35)).toBeLessThan(0.02);
  });

  it('keeps alpha and iso together without loss, and makes nothing of nothing', () => {
    const { isoMgPerL, alphaLeftMgPerL } = isomerise(hold(60, 30), { alphaMgPerL: 100, ph: 4 });
    expect(isoMgPerL + alphaLeftMgPerL).toBeCloseTo(100, 3);
    expect(isomerise([], { alphaMgPerL: 100, ph: 4 })).toEqual({ isoMgPerL: 0, alphaLeftMgPerL: 100 });
  });

  it('refuses steam and a negative alpha', () => {
    expect(() => isomerisationPerMin(131)).toThrow(RangeError);
    expect(() => isomerise(fall, { alphaMgPerL: -1, ph: 4 })).toThrow(RangeError);
  });
});
