import { describe, expect, it } from 'vitest';
import { evaporationKgPerM2H } from './evaporation.js';
import { latentHeatJPerKg } from './latent-heat.js';
import { potLossW } from './pot-loss.js';

const pot = { roomC: 22, humidityRatio: 0.5, diameterM: 0.29, depthM: 0.15 };

const CAPACITY_J_PER_K = 40_700;

function after(fromC: number, seconds: number, { lid, wide = pot }: { lid: boolean; wide?: typeof pot }): number {
  let tempC = fromC;
  for (let second = 0; second < seconds; second += 1) tempC -= potLossW({ ...wide, tempC, lid }) / CAPACITY_J_PER_K;
  return tempC;
}

describe('potLossW', () => {
  // Reference pot of 9.46 L, 29 cm wide. A lid is a little cooler than the liquid, which is left out here.
  it.each([
    [82, 525],
    [70, 313],
    [60, 196],
    [40, 61],
  ])('open at %s °C loses about %s W (Shah 2002 and natural convection, computed)', (tempC, lossW) => {
    expect(Math.abs(potLossW({ ...pot, tempC, lid: false }) / lossW - 1)).toBeLessThan(0.02);
  });

  it.each([
    [82, 93],
    [70, 70],
    [60, 53],
    [40, 21],
  ])('with a lid at %s °C loses about %s W (natural convection and radiation, computed)', (tempC, lossW) => {
    expect(Math.abs(potLossW({ ...pot, tempC, lid: true }) / lossW - 1)).toBeLessThan(0.1);
  });

  it.each([
    [false, 82, 0.78, 8.8, 2.2],
    [false, 70, 0.46, 6.5, 1.6],
    [false, 60, 0.29, 5.2, 1.3],
    [false, 40, 0.09, 3.4, 0.84],
    [true, 82, 0.14, 1.6, 0.38],
    [true, 70, 0.1, 1.5, 0.36],
    [true, 60, 0.08, 1.4, 0.34],
    [true, 40, 0.03, 1.2, 0.29],
  ])(
    'Shah 2002 and natural convection, computed: lid %s at %s °C: %s K/min, %s W/K, k %s e-4',
    (lid, tempC, ...row) => {
      const lossW = potLossW({ ...pot, tempC, lid });
      const perK = lossW / (tempC - 22);
      const found = [(60 * lossW) / CAPACITY_J_PER_K, perK, (1e4 * perK) / CAPACITY_J_PER_K];
      // A lid is taken as warm as the liquid, which it is not quite; and the rows are rounded.
      for (const [index, value] of row.entries())
        expect(Math.abs((found[index] ?? 0) - value)).toBeLessThan(0.02 + value * (lid ? 0.11 : 0.02));
    },
  );

  it('Shah 2002, computed: at 80 °C 368 of 483 W leave as steam', () => {
    const topM2 = (Math.PI * 0.29 ** 2) / 4;
    const steam = evaporationKgPerM2H({ waterC: 80, roomC: 22, humidityRatio: 0.5 });
    expect(Math.abs(potLossW({ ...pot, tempC: 80, lid: false }) / 483 - 1)).toBeLessThan(0.02);
    expect(Math.abs((topM2 * steam * latentHeatJPerKg(80)) / 3600 / 368 - 1)).toBeLessThan(0.02);
  });

  it('Shah 2002 and natural convection, computed: half an hour costs 4 K with a lid, 16 K without', () => {
    expect(Math.abs(82 - after(82, 1800, { lid: true }) - 4)).toBeLessThan(0.5);
    expect(Math.abs(82 - after(82, 1800, { lid: false }) - 16)).toBeLessThan(1);
  });

  it('Shah 2002 and natural convection, computed: near 80 °C it cools as if toward 56 °C with k = 5.0e-4', () => {
    const fall = (tempC: number) => potLossW({ ...pot, tempC, lid: false }) / CAPACITY_J_PER_K;
    const perS = (fall(81) - fall(79)) / 2;
    expect(perS * 1e4).toBeCloseTo(5, 0);
    expect(Math.abs(80 - fall(80) / perS - 56)).toBeLessThan(1);
  });

  it.each([
    [0.29, 2.1, 5.7, 4.4, 7.6],
    [0.32, 2.1, 6.5, 4.4, 8.2],
  ])('heat balance, computed: a pot %s m wide with a coil in it falls in 6 min', (diameterM, ...falls) => {
    const wide = { ...pot, diameterM, depthM: 0.009_46 / ((Math.PI * diameterM ** 2) / 4) };
    const found = [1.3, 3.6].flatMap((stepK) => [true, false].map((lid) => 85 - after(85 - stepK, 360, { lid, wide })));
    for (const [index, fallK] of falls.entries()) expect(Math.abs((found[index] ?? 0) - fallK)).toBeLessThan(0.25);
  });

  it('loses nothing to a room as warm, and refuses a flat pot', () => {
    expect(potLossW({ ...pot, tempC: 22, humidityRatio: 1, lid: false })).toBe(0);
    expect(() => potLossW({ ...pot, tempC: 60, depthM: 0, lid: true })).toThrow(RangeError);
  });

  it.each([
    [0.29, true, 0.9],
    [0.29, false, 4.8],
    [0.32, true, 0.9],
    [0.32, false, 5.5],
  ])(
    'Shah 2002 and natural convection, computed: a pot %s m wide, lid %s, from 85 °C in 6 min: %s K',
    (diameterM, lid, fallK) => {
      const wide = { ...pot, diameterM, depthM: 0.009_46 / ((Math.PI * diameterM ** 2) / 4) };
      expect(Math.abs(85 - after(85, 360, { lid, wide }) - fallK)).toBeLessThan(0.1);
    },
  );

  // The other published way of sums, by heat and mass transfer, loses more: inside twice the evaporation, which is the band.
  it.each([
    [0.29, 6.1],
    [0.32, 7.1],
  ])('an open pot %s m wide loses at most twice as much by the band: %s K by the analogy', (diameterM, fallK) => {
    const wide = { ...pot, diameterM, depthM: 0.009_46 / ((Math.PI * diameterM ** 2) / 4) };
    const formulaK = 85 - after(85, 360, { lid: false, wide });
    expect(fallK).toBeGreaterThan(formulaK);
    expect(fallK).toBeLessThan(2 * formulaK);
  });
});
