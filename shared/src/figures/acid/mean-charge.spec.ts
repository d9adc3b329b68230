import { describe, expect, it } from 'vitest';
import type { Dissociating } from './dissociation.js';
import { meanAcidCharge } from './mean-charge.js';

describe('meanAcidCharge', () => {
  it.each<[Dissociating, number[]]>([
    ['citric', [0.438, 0.75, 1.031, 1.325]],
    ['lactic', [0.122, 0.305, 0.581, 0.815]],
    ['phosphoric', [0.877, 0.958, 0.987, 0.998]],
    ['malic', [0.262, 0.543, 0.848, 1.121]],
    ['tartaric', [0.51, 0.86, 1.209, 1.554]],
  ])('mass action on the constants of dissociation.ts: %s at pH 3.0, 3.5, 4.0, 4.5', (acid, charges) => {
    for (const [index, charge] of charges.entries()) {
      expect(Math.abs(meanAcidCharge(acid, 3 + index / 2) - charge)).toBeLessThan(0.002);
    }
  });

  it('refuses a pH of 15', () => {
    expect(() => meanAcidCharge('citric', 15)).toThrow(RangeError);
  });
});
