import { describe, expect, it } from 'vitest';
import { mixedTempC, type MixedPart } from './mixed-temp.js';

const pot: MixedPart[] = [
  { massG: 9160, specificHeatJPerKgK: 4186, tempC: 85 },
  { massG: 2000, specificHeatJPerKgK: 500, tempC: 85 },
];
const coil: MixedPart = { massG: 2200, specificHeatJPerKgK: 385, tempC: 22 };

describe('mixedTempC', () => {
  it('energy balance, computed: a dry copper coil takes the pot to 83.67 °C, with water in it to 81.36 °C', () => {
    expect(mixedTempC([...pot, coil])).toBeCloseTo(83.67, 2);
    expect(mixedTempC([...pot, coil, { massG: 350, specificHeatJPerKgK: 4186, tempC: 18 }])).toBeCloseTo(81.36, 2);
  });

  it.each([
    [0, 81.295],
    [800, 78.964],
  ])(
    'energy balance, computed: 20 kg at 82 °C and a 2.5 kg copper coil with %s g of water inside give %s °C',
    (massG, tempC) => {
      const parts = [
        { massG: 20_000, specificHeatJPerKgK: 4186, tempC: 82 },
        { massG: 2500, specificHeatJPerKgK: 385, tempC: 20 },
        { massG, specificHeatJPerKgK: 4186, tempC: 20 },
      ];
      expect(Math.abs(mixedTempC(parts) - tempC)).toBeLessThan(0.02);
    },
  );

  it('energy balance (leaf from memory): 100 g of dry tea in 9 kg of water costs about 0.3 K', () => {
    const leaf = { massG: 100, specificHeatJPerKgK: 1600, tempC: 20 };
    const tempC = mixedTempC([{ massG: 9000, specificHeatJPerKgK: 4186, tempC: 82 }, leaf]);
    expect(Math.abs(82 - tempC - 0.3)).toBeLessThan(0.05);
  });

  it('refuses nothing at all, and a negative mass', () => {
    expect(() => mixedTempC([])).toThrow(RangeError);
    expect(() => mixedTempC([{ ...coil, massG: -5 }])).toThrow(RangeError);
  });
});
