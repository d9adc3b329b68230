import { describe, expect, it } from 'vitest';
import { oneWireToleranceK, platinumToleranceK } from './sensor-tolerance.js';

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

  it('refuses an unknown class', () => {
    expect(() => platinumToleranceK('D' as 'A', 82)).toThrow(/one of AA, A, B, C/);
  });
});
