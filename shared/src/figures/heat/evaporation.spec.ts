import { describe, expect, it } from 'vitest';
import { evaporationKgPerM2H } from './evaporation.js';

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

  it('is none into air as moist as the surface', () => {
    expect(evaporationKgPerM2H({ waterC: 22, roomC: 22, humidityRatio: 1 })).toBe(0);
  });

  it('refuses boiling water and humidity in percent', () => {
    expect(() => evaporationKgPerM2H({ waterC: 100, roomC: 22, humidityRatio: 0.5 })).toThrow(RangeError);
    expect(() => evaporationKgPerM2H({ waterC: 60, roomC: 22, humidityRatio: 50 })).toThrow(RangeError);
  });
});
