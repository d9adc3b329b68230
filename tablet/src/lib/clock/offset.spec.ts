import { describe, expect, it } from 'vitest';
import { estimateOffset, GlidingOffset, type OffsetSample } from './offset.ts';

describe(estimateOffset, () => {
  it('is never further from the truth than half the best round trip', () => {
    const skewMs = -4_321_000;
    for (let round = 1; round <= 40; round += 1) {
      // Trips of every length and lopsidedness.
      const trips = Array.from({ length: 8 }, (_, i) => ({
        outMs: (i * round * 37) % 401,
        backMs: (i * round * 91 + 13) % 397,
      }));
      const samples: OffsetSample[] = trips.map(({ outMs, backMs }, i) => {
        const sentMs = 1_790_000_000_000 + i * 1_000;
        return { sentMs, hubMs: sentMs + outMs + skewMs, roundTripMs: outMs + backMs };
      });
      const { offsetMs, errorMs } = estimateOffset(samples)!;
      expect(errorMs).toBe(Math.min(...samples.map(({ roundTripMs }) => roundTripMs)) / 2);
      expect(Math.abs(offsetMs - skewMs)).toBeLessThanOrEqual(errorMs);
    }
  });

  it('leaves out torn samples, and says nothing without any', () => {
    expect(estimateOffset([{ sentMs: 0, hubMs: 9_000, roundTripMs: -1 }])).toBeNull();
    expect(estimateOffset([])).toBeNull();
  });
});

describe(GlidingOffset, () => {
  it('glides over a small change, never backwards', () => {
    const offset = new GlidingOffset(0);
    offset.aim(-200, 1_000);
    const shown = [1_000, 1_500, 2_000, 3_000, 4_000].map((atMs) => atMs + offset.at(atMs));
    expect(shown).toEqual([1_000, 1_450, 1_900, 2_800, 3_800]);
  });

  it('takes a large change at once', () => {
    const offset = new GlidingOffset(0);
    offset.aim(3_600_000, 1_000);
    expect(offset.at(1_000)).toBe(3_600_000);
  });
});
