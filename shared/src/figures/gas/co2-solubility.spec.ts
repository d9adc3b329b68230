import { describe, expect, it } from 'vitest';
import { waterDensityKgPerM3 } from '../heat/water-density.js';
import { waterVapourPressureKPa } from '../heat/vapour-pressure.js';
import { co2GPerL, co2HenryMolPerKgAtm, co2MolPerKg } from './co2-solubility.js';
import { co2Volumes } from './co2-volumes.js';

describe('CO2 in water', () => {
  it.each([
    [0, 0.07758],
    [5, 0.06407],
    [10, 0.05367],
    [15, 0.04556],
    [20, 0.03916],
    [25, 0.03406],
  ])('Weiss 1974: K0 at %s °C is %s mol/(kg atm)', (tempC, henry) => {
    expect(Math.abs(co2HenryMolPerKgAtm(tempC) / henry - 1)).toBeLessThan(0.001);
  });

  it.each([
    [0, 1.337],
    [10, 0.95],
    [20, 0.704],
    [30, 0.541],
    [40, 0.431],
  ])('CRC Handbook table 8-90: 1000 x mole fraction at %s °C and 100 kPa CO2 is %s', (tempC, thousandX) => {
    const molPerKg = co2MolPerKg(tempC, 100 + waterVapourPressureKPa(tempC));
    const moleFraction = molPerKg / (molPerKg + 1000 / 18.01528);
    expect(Math.abs((1000 * moleFraction) / thousandX - 1)).toBeLessThan(0.03);
  });

  it.each([
    [5, 1.4199],
    [15, 1.01],
    [25, 0.7519],
    [32, 0.6336],
  ])('Murray and Riley 1971, IUPAC-NIST vol. 62: Bunsen coefficient at %s °C is %s', (tempC, bunsen) => {
    const molPerKg = co2MolPerKg(tempC, 101.325 + waterVapourPressureKPa(tempC));
    const litersPerLiter = ((molPerKg * waterDensityKgPerM3(tempC)) / 1000) * 22.263;
    expect(Math.abs(litersPerLiter / bunsen - 1)).toBeLessThan(0.025);
  });

  it.each([
    [0, 200, 6.62, 3.349],
    [4, 200, 5.673, 2.87],
    [4, 300, 8.455, 4.277],
    [10, 250, 5.701, 2.884],
    [20, 300, 4.962, 2.51],
  ])('Weiss 1974, computed: at %s °C and %s kPa absolute %s g/L, %s volumes', (tempC, pressureKPa, gPerL, volumes) => {
    expect(Math.abs(co2GPerL(tempC, pressureKPa) / gPerL - 1)).toBeLessThan(0.012);
    expect(Math.abs(co2Volumes(co2GPerL(tempC, pressureKPa)) / volumes - 1)).toBeLessThan(0.012);
  });

  it('holds nothing under vapour alone', () => {
    expect(co2GPerL(20, 2)).toBe(0);
  });

  it.each([
    [41, 200],
    [-1, 200],
    [4, 1101],
    [4, -1],
    [Number.NaN, 200],
    [4, Number.NaN],
  ])('refuses %s °C at %s kPa', (tempC, pressureKPa) => {
    expect(() => co2GPerL(tempC, pressureKPa)).toThrow(RangeError);
  });
});
