import { describe, expect, it } from 'vitest';
import { evaporatedL } from './evaporated.js';

const hold = (tempC: number) => [
  { atMs: 0, tempC },
  { atMs: 600_000, tempC },
];
const pot = { openM2: (Math.PI * 0.3 ** 2) / 4 };

describe('evaporatedL', () => {
  it('Shah 2002, and a judgement of 5 to 8 kg/(m² h) at 80 °C: 10 min in a 30 cm pot are 0.07 to 0.1 L', () => {
    expect(evaporatedL(hold(80), pot)).toBeGreaterThan(0.06);
    expect(evaporatedL(hold(80), pot)).toBeLessThan(0.12);
    expect(evaporatedL(hold(60), pot) / evaporatedL(hold(80), pot)).toBeCloseTo(1 / 3, 1);
  });

  it('is none under a lid and none in the cold, and is held at the boil', () => {
    expect(evaporatedL(hold(80), { openM2: 0 })).toBe(0);
    expect(evaporatedL(hold(4), pot)).toBe(0);
    expect(evaporatedL(hold(99), pot)).toBe(evaporatedL(hold(95), pot));
    expect(() => evaporatedL(hold(80), { openM2: -1 })).toThrow(RangeError);
  });
});
