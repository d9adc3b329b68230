import { describe, expect, it } from 'vitest';
import * as room from './room-co2.js';

const leak = { leakKgPerH: 0.5, roomM3: 25, airChangesPerH: 0.5, outdoorPpm: 420 };

describe('CO2 in a room (ideal gas law, computed)', () => {
  it.each([
    ['m³ in a kilogram at 20 °C', room.co2M3PerKg(20, 101_325), 0.54659],
    ['ppm, simple', room.co2PpmSimple(2.268, 25), 49_587],
    ['ppm, mixed', room.co2PpmMixed(2.268, 25), 48_377],
    ['% oxygen', room.oxygenPercentMixed(2.268, 25), 19.889],
    ['ppm of a steady leak', room.co2SteadyPpm({ ...leak, leakKgPerH: 0.1 }), 4793],
    ['minutes to 5000 ppm', room.co2MinutesTo(5000, leak) ?? 0, 28.21],
    ['kg to 5000 ppm', room.co2MaxKg(5000, 25), 0.23],
    ['kg to 30 000 ppm', room.co2MaxKg(30_000, 25), 1.37],
    ['share of a 2.27 kg cylinder in 30 m³', room.co2PpmSimple(2.27, 30), 42_000],
  ])('%s', (_name, value, expected) => {
    expect(Math.abs(value / expected - 1)).toBeLessThan(expected < 2 || expected === 42_000 ? 0.02 : 0.005);
  });

  it('never reaches what the air changes carry off, and is there when it is there', () => {
    expect(room.co2MinutesTo(5000, { ...leak, leakKgPerH: 0.1 })).toBeNull();
    expect(room.co2MinutesTo(400, leak)).toBe(0);
    expect(room.co2MinutesTo(5000, { ...leak, leakKgPerH: 0 })).toBeNull();
  });

  it('refuses a room of nothing', () => {
    expect(() => room.co2PpmMixed(1, 0)).toThrow(RangeError);
    expect(() => room.co2SteadyPpm({ ...leak, airChangesPerH: 0 })).toThrow(RangeError);
  });
});
