import { describe, expect, it } from 'vitest';
import { acidPkAt, carbonicLogHenry, waterPk, type Dissociating } from './dissociation.js';

const pk = (acid: Dissociating, step: number, tempC: number) => acidPkAt(acid, tempC)[step - 1] ?? Number.NaN;

describe('dissociation', () => {
  it.each([
    [0, 14.94],
    [25, 13.995],
    [60, 13.015],
  ])('USGS phreeqc.dat: pKw at %s °C is %s', (tempC, pKw) => {
    expect(Math.abs(waterPk(tempC) - pKw)).toBeLessThan(0.02);
  });

  it('Crea 2004, fit of Bates and Pinching: citric pK1 at 0 °C is 3.221', () => {
    expect(Math.abs(pk('citric', 1, 0) - 3.221)).toBeLessThan(0.005);
  });

  it.each([
    [0, 3.883],
    [50, 3.896],
  ])('Martin and Tartar 1937: lactic pK at %s °C is %s', (tempC, value) => {
    expect(Math.abs(pk('lactic', 1, tempC) - value)).toBeLessThan(0.002);
    expect(pk('lactic', 1, 60)).toBe(pk('lactic', 1, 50));
  });

  it('Plummer and Busenberg 1982: carbonic acid at 25 °C', () => {
    expect(Math.abs(pk('carbonic', 1, 25) - 6.352)).toBeLessThan(0.003);
    expect(Math.abs(pk('carbonic', 2, 25) - 10.329)).toBeLessThan(0.003);
    expect(Math.abs(carbonicLogHenry(25) + 1.468)).toBeLessThan(0.003);
  });

  it('Eden and Bates 1959 (refitted): malic acid at 25 °C', () => {
    expect(Math.abs(pk('malic', 1, 25) - 3.458)).toBeLessThan(0.01);
    expect(Math.abs(pk('malic', 2, 25) - 5.097)).toBeLessThan(0.01);
  });

  it('Goldberg 2002 (from memory): the values at 25 °C', () => {
    expect(acidPkAt('citric', 25)).toEqual([3.128, 4.761, 6.396]);
    expect(acidPkAt('phosphoric', 25)).toEqual([2.148, 7.198, 12.35]);
    expect(acidPkAt('tartaric', 25)).toEqual([3.036, 4.366]);
  });

  it('refuses steam', () => {
    expect(() => acidPkAt('citric', 95)).toThrow(RangeError);
    expect(() => waterPk(Number.NaN)).toThrow(RangeError);
  });
});
