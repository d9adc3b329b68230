import { describe, expect, it } from 'vitest';
import { STORED_VOLUME_C, volumeAtTemperatureL } from './volume-at-temperature.js';

describe('volumeAtTemperatureL', () => {
  it.each([
    [20, 82, 1.0285],
    [20, 100, 1.04157],
    [4, 100, 1.04342],
  ])('Kell 1975: one litre at %s °C is %s litres at %s °C', (fromC, toC, ratio) => {
    expect(Math.abs(volumeAtTemperatureL(1, fromC, toC) - ratio)).toBeLessThan(0.0002);
  });

  it('Kell 1975: 20.0 L read at 82 °C is 19.45 L at 20 °C, and 20 L fills 20.57 L when hot', () => {
    expect(volumeAtTemperatureL(20, 82, STORED_VOLUME_C)).toBeCloseTo(19.45, 2);
    expect(volumeAtTemperatureL(20, STORED_VOLUME_C, 82)).toBeCloseTo(20.57, 2);
  });

  it('refuses a negative volume', () => {
    expect(() => volumeAtTemperatureL(-1, 20, 82)).toThrow(/0 L or more/);
  });
});
