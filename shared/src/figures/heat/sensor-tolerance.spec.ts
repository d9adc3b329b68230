import { describe, expect, it } from 'vitest';
import { flatToleranceK, oneWireToleranceK, platinumToleranceK } from './sensor-tolerance.js';

describe('sensor tolerance', () => {
  it.each([
    ['A', 82, 0.314],
    ['B', 82, 0.71],
    ['A', 100, 0.35],
    ['AA', 100, 0.27],
  ] as const)('IEC 60751: class %s at %s °C is %s K', (sensorClass, tempC, limitK) => {
    expect(platinumToleranceK(sensorClass, tempC)).toBeCloseTo(limitK, 9);
  });

  it('DS18B20 data sheet: 0.5 K up to 85 °C, then 2 K', () => {
    expect(oneWireToleranceK(85)).toBe(0.5);
    expect(oneWireToleranceK(98)).toBe(2);
    expect(oneWireToleranceK(130)).toBeNull();
  });

  it.each([
    ['thermistor', 70, 0.2],
    ['thermistor', 82, null],
    ['typeTClass1', 125, 0.5],
    ['typeTClass2', 133, 1],
    ['typeKClass1', 82, 1.5],
    ['typeKClass2', 333, 2.5],
    ['typeKClass2', 334, null],
  ] as const)('IEC 60584 and makers: %s at %s °C is %s K', (sensor, tempC, limitK) => {
    expect(flatToleranceK(sensor, tempC)).toBe(limitK);
  });

  it.each([
    ['AA', 0.1, 0.0017],
    ['A', 0.15, 0.002],
    ['B', 0.3, 0.005],
    ['C', 0.6, 0.01],
  ] as const)('IEC 60751: class %s is %s + %s T', (sensorClass, atZeroK, perC) => {
    expect(platinumToleranceK(sensorClass, 50)).toBeCloseTo(atZeroK + 50 * perC, 9);
  });

  it('refuses an unknown class', () => {
    expect(() => platinumToleranceK('D' as 'A', 82)).toThrow(/one of AA, A, B, C/);
  });
});
