import { describe, expect, it } from 'vitest';
import { potLossW } from './pot-loss.js';

const pot = { roomC: 22, humidityRatio: 0.5, diameterM: 0.29, depthM: 0.15 };

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

  it('loses nothing to a room as warm, and refuses a flat pot', () => {
    expect(potLossW({ ...pot, tempC: 22, humidityRatio: 1, lid: false })).toBe(0);
    expect(() => potLossW({ ...pot, tempC: 60, depthM: 0, lid: true })).toThrow(RangeError);
  });

  it.each([
    [true, 0.9],
    [false, 4.8],
  ])('Shah 2002 and natural convection, computed: from 85 °C in 6 min, lid %s, it falls %s K', (lid, fallK) => {
    let tempC = 85;
    for (let second = 0; second < 360; second += 1) tempC -= potLossW({ ...pot, tempC, lid }) / 40_700;
    expect(Math.abs(85 - tempC - fallK)).toBeLessThan(0.1);
  });
});
