import { describe, expect, it } from 'vitest';
import { agitatedDurationS, agitatedGPerL, uptakePerH } from './carbonation-agitated.js';

const keg = { startGPerL: 0, restGPerL: 5, uptakePerH: 0.025 };

describe('agitated carbonation', () => {
  it('first-order uptake, computed: 4.174 g/L after 72 h, 90 % after 92.1 h', () => {
    expect(agitatedGPerL(keg, 72 * 3600)).toBeCloseTo(4.174, 3);
    expect((agitatedDurationS(keg, 4.5) ?? 0) / 3600).toBeCloseTo(92.1, 1);
  });

  it.each([
    [0.5, 35],
    [0.8, 80],
    [0.9, 115],
    [0.95, 150],
  ])('first-order uptake, computed: at 0.020 1/h a share of %s takes %s h', (share, hours) => {
    const answer = agitatedDurationS({ ...keg, uptakePerH: 0.02 }, 5 * share) ?? 0;
    expect(Math.abs(answer / 3600 / hours - 1)).toBeLessThan(0.01);
  });

  it('goes down as well, and never past the rest', () => {
    const flat = { ...keg, startGPerL: 8 };
    expect(agitatedGPerL(flat, 3600)).toBeLessThan(8);
    expect(agitatedDurationS(flat, 6)).toBeGreaterThan(0);
    expect(agitatedDurationS(keg, 5)).toBeNull();
    expect(agitatedDurationS(keg, 6)).toBeNull();
    expect(agitatedDurationS(keg, 0)).toBe(0);
    expect(uptakePerH.still.low).toBeLessThan(uptakePerH.still.high);
  });

  it('refuses an uptake of 0', () => {
    expect(() => agitatedGPerL({ ...keg, uptakePerH: 0 }, 60)).toThrow(RangeError);
  });
});
