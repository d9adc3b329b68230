import { describe, expect, it } from 'vitest';
import { evaporationBand } from '../yield/evaporated.js';
import { evaporationKgPerM2H } from './evaporation.js';
import { latentHeatJPerKg } from './latent-heat.js';

describe('evaporationKgPerM2H', () => {
  it.each([
    [85, 11.1],
    [82, 9.6],
    [77, 7.5],
    [70, 5.2],
    [60, 3.0],
    [50, 1.6],
    [40, 0.76],
  ])('Shah 2002 (constants from memory): %s °C in a room of 22 °C at half humidity gives %s', (waterC, rate) => {
    expect(Math.abs(evaporationKgPerM2H({ waterC, roomC: 22, humidityRatio: 0.5 }) / rate - 1)).toBeLessThan(0.03);
  });

  // Upper end: an independent analogy of heat and mass transfer (computed).
  it.each([
    [85, 16.9, 7.1, 10.8],
    [82, 13.7, 6.1, 8.8],
    [77, 9.8, 4.8, 6.3],
    [70, 6.2, 3.4, 4.0],
    [60, 3.2, 1.9, 2.1],
    [50, 1.6, 1.05, 1.05],
    [40, 0.76, 0.5, 0.5],
  ])('Shah 2002, computed: %s °C; %s by the other way lies in the band; %s to %s kW/m²', (waterC, other, low, high) => {
    const rate = evaporationKgPerM2H({ waterC, roomC: 22, humidityRatio: 0.5 });
    expect(other / rate).toBeLessThan(evaporationBand.high);
    const kW = (kgPerM2H: number) => (kgPerM2H / 3600) * (latentHeatJPerKg(waterC) / 1000);
    expect(Math.abs(kW(rate) - low)).toBeLessThan(0.1);
    expect(Math.abs(kW(other) - high)).toBeLessThan(0.1);
  });

  it('is none into air as moist as the surface', () => {
    expect(evaporationKgPerM2H({ waterC: 22, roomC: 22, humidityRatio: 1 })).toBe(0);
  });

  it('refuses boiling water and humidity in percent', () => {
    expect(() => evaporationKgPerM2H({ waterC: 100, roomC: 22, humidityRatio: 0.5 })).toThrow(RangeError);
    expect(() => evaporationKgPerM2H({ waterC: 60, roomC: 22, humidityRatio: 50 })).toThrow(RangeError);
  });
});
