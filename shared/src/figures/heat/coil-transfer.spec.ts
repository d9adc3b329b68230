import { describe, expect, it } from 'vitest';
import { coilTransferWPerK } from './coil-transfer.js';

const coil = { outerMm: 9.5, lengthM: 7.6, stirred: false, tempC: 60 };

describe('coilTransferWPerK', () => {
  it.each([
    [82, 296],
    [60, 241],
    [40, 180],
    [25, 110],
  ])('Churchill and Chu, Gnielinski, computed: still at %s °C it is %s W/K', (tempC, perK) => {
    expect(Math.abs(coilTransferWPerK({ ...coil, tempC }).value / perK - 1)).toBeLessThan(0.015);
  });

  it('computed: stirred it is 400 to 540 W/K; Engineering ToolBox: still at least 77', () => {
    const stirred = coilTransferWPerK({ ...coil, stirred: true });
    expect(Math.abs(stirred.low / 400 - 1)).toBeLessThan(0.03);
    expect(Math.abs(stirred.high / 540 - 1)).toBeLessThan(0.03);
    expect(coilTransferWPerK(coil).low).toBeCloseTo(77, 0);
  });

  it('lies between its rows, is held outside, and refuses a coil without length', () => {
    const at = (tempC: number) => coilTransferWPerK({ ...coil, tempC }).value;
    expect(at(50)).toBeCloseTo((at(40) + at(60)) / 2, 9);
    expect(at(10)).toBe(at(25));
    expect(at(95)).toBe(at(82));
    expect(() => coilTransferWPerK({ ...coil, lengthM: 0 })).toThrow(RangeError);
  });
});
