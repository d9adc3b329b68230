import { describe, expect, it } from 'vitest';
import { acidPkAt, waterPk, type Dissociating } from './acid/dissociation.js';
import { solvePh } from './acid/solve-ph.js';
import { co2DiffusionM2PerS } from './gas/co2-diffusion.js';
import { co2SaturationKPa, co2VapourDensityKgPerM3 } from './gas/co2-saturation.js';
import { co2MoleFractionHot } from './gas/co2-solubility-hot.js';
import { co2MolPerKg } from './gas/co2-solubility.js';
import { atmosphericPressureKPa } from './heat/atmospheric-pressure.js';
import { boilingPointAtAltitudeC } from './heat/boiling-point.js';
import { latentHeatJPerKg } from './heat/latent-heat.js';
import { waterVapourPressureKPa } from './heat/vapour-pressure.js';
import { waterDensityKgPerM3 } from './heat/water-density.js';
import { waterViscosityPaS } from './heat/water-viscosity.js';
import { daviesActivity, debyeHuckelA } from './water/activity.js';

type Rows = readonly (readonly [number, number])[];

function within(share: number, figure: (x: number) => number, rows: Rows): void {
  const off = rows.filter(([x, value]) => !(Math.abs(figure(x) / value - 1) <= share));
  expect(off).toEqual([]);
}

function pkWithin(limit: number, acid: Dissociating, step: number, rows: Rows): void {
  const off = rows.filter(([tempC, pk]) => !(Math.abs((acidPkAt(acid, tempC)[step - 1] ?? 0) - pk) <= limit));
  expect(off).toEqual([]);
}

// Rows of published tables between those that the other specs use. All values from memory.
describe('points of the same tables', () => {
  it('IAPWS-95: density of water, kg/m³', () => {
    const rows: Rows = [
      [10, 999.7],
      [25, 997.05],
      [40, 992.22],
      [50, 988.04],
      [70, 977.77],
      [80, 971.8],
      [90, 965.31],
      [95, 961.89],
    ];
    within(2e-5, waterDensityKgPerM3, rows);
  });

  it('IAPWS steam tables: vapour pressure, kPa, and latent heat, J/kg', () => {
    const rows: Rows = [
      [5, 0.8726],
      [10, 1.2282],
      [25, 3.1699],
      [30, 4.247],
      [40, 7.3849],
      [50, 12.352],
      [70, 31.201],
      [80, 47.414],
      [90, 70.182],
      [120, 198.67],
    ];
    within(2e-4, waterVapourPressureKPa, rows);
    within(5e-3, latentHeatJPerKg, [
      [20, 2_453_500],
      [60, 2_357_700],
      [80, 2_308_000],
    ]);
  });

  it('IAPWS: viscosity of water, mPa s', () => {
    within(1e-3, (tempC) => 1000 * waterViscosityPaS(tempC), [
      [0, 1.792],
      [10, 1.306],
      [25, 0.89],
      [40, 0.6527],
      [60, 0.466],
      [80, 0.354],
    ]);
  });

  it('U.S. Standard Atmosphere 1976: kPa, and what water boils at there', () => {
    within(1e-4, atmosphericPressureKPa, [
      [1000, 89.875],
      [2000, 79.495],
      [4000, 61.64],
      [5000, 54.02],
    ]);
    within(1e-3, boilingPointAtAltitudeC, [
      [1000, 96.7],
      [2000, 93.3],
    ]);
  });

  it('Span and Wagner 1996: CO2 over its liquid, kPa and kg/m³', () => {
    within(1e-3, co2SaturationKPa, [
      [-20, 1970],
      [-10, 2649],
      [10, 4502],
      [25, 6434],
      [30, 7214],
    ]);
    within(1e-3, co2VapourDensityKgPerM3, [
      [-20, 51.7],
      [-10, 71.2],
      [10, 135.2],
      [30, 345.1],
    ]);
  });

  it('CRC Handbook: CO2 in water at 100 kPa, mole fraction per thousand, and its diffusion', () => {
    const rows: Rows = [
      [5, 1.128],
      [15, 0.815],
      [25, 0.614],
      [35, 0.48],
    ];
    const weiss = (tempC: number) => {
      const molPerKg = co2MolPerKg(tempC, 100 + waterVapourPressureKPa(tempC));
      return (1000 * molPerKg) / (molPerKg + 55.508);
    };
    within(0.025, weiss, rows);
    within(0.03, (tempC) => 1000 * co2MoleFractionHot(tempC, 100), [...rows, [50, 0.357], [70, 0.258]]);
    within(0.012, (tempC) => 1e9 * co2DiffusionM2PerS(tempC), [
      [15, 1.45],
      [25, 1.91],
    ]);
  });

  it('Bates and Pinching 1949: citric acid from 0 to 50 °C', () => {
    pkWithin(0.005, 'citric', 1, [
      [0, 3.22],
      [10, 3.176],
      [20, 3.142],
      [30, 3.116],
      [40, 3.099],
      [50, 3.095],
    ]);
    pkWithin(0.005, 'citric', 2, [
      [0, 4.837],
      [10, 4.797],
      [20, 4.769],
      [30, 4.755],
      [40, 4.75],
      [50, 4.757],
    ]);
    pkWithin(0.005, 'citric', 3, [
      [0, 6.393],
      [10, 6.383],
      [20, 6.388],
      [30, 6.406],
      [40, 6.439],
      [50, 6.484],
    ]);
  });

  it('Bates 1951, Bates and Acree 1945, Bates and Canham 1951, Eden and Bates 1959: other acids', () => {
    pkWithin(0.025, 'phosphoric', 1, [
      [0, 2.056],
      [37, 2.185],
      [50, 2.26],
    ]);
    pkWithin(0.011, 'phosphoric', 2, [
      [0, 7.313],
      [10, 7.254],
      [20, 7.213],
      [30, 7.189],
      [40, 7.181],
      [50, 7.183],
    ]);
    pkWithin(0.005, 'tartaric', 1, [
      [0, 3.118],
      [50, 3.018],
    ]);
    pkWithin(0.005, 'tartaric', 2, [
      [0, 4.426],
      [50, 4.391],
    ]);
    pkWithin(0.01, 'malic', 1, [
      [0, 3.537],
      [50, 3.445],
    ]);
  });

  it('Harned 1941 and 1943: carbonic acid; water from 10 to 60 °C', () => {
    pkWithin(0.005, 'carbonic', 1, [
      [0, 6.579],
      [10, 6.464],
      [20, 6.381],
      [40, 6.298],
      [50, 6.285],
    ]);
    pkWithin(0.005, 'carbonic', 2, [
      [0, 10.625],
      [10, 10.49],
      [20, 10.377],
      [40, 10.22],
      [50, 10.172],
    ]);
    within(5e-4, waterPk, [
      [10, 14.535],
      [20, 14.167],
      [30, 13.833],
      [40, 13.535],
      [50, 13.262],
    ]);
  });

  it('textbook activities, and the constant of Debye and Hückel', () => {
    const a = debyeHuckelA(25);
    within(0.006, (strength) => daviesActivity(1, strength, a), [
      [0.01, 0.9],
      [0.1, 0.78],
    ]);
    within(0.006, (strength) => daviesActivity(2, strength, a), [
      [0.01, 0.66],
      [0.1, 0.37],
    ]);
    within(0.01, debyeHuckelA, [
      [10, 0.4989],
      [40, 0.5242],
      [80, 0.5641],
    ]);
  });

  it.each<[Dissociating, number, number]>([
    ['citric', 0.01, 2.62],
    ['lactic', 0.1, 2.43],
    ['malic', 0.01, 2.76],
    ['phosphoric', 0.1, 1.63],
    ['phosphoric', 0.01, 2.25],
  ])('calculated table of common acids: %s at %s mol/L is pH %s', (acid, molPerL, ph) => {
    const solution = { acidsMolPerL: { [acid]: molPerL }, strongIonEqPerL: 0, tempC: 25 };
    expect(Math.abs(solvePh(solution).ph - ph)).toBeLessThan(0.02);
  });

  it('NIST and JIS Z 8802: equal phosphates from 0 to 60 °C', () => {
    const ph = (tempC: number) => solvePh({ acidsMolPerL: { phosphoric: 0.05 }, strongIonEqPerL: 0.075, tempC }).ph;
    const rows: Rows = [
      [0, 6.984],
      [10, 6.923],
      [20, 6.881],
      [37, 6.841],
      [60, 6.84],
    ];
    expect(rows.filter(([tempC, value]) => !(Math.abs(ph(tempC) - value) < 0.02))).toEqual([]);
  });
});
