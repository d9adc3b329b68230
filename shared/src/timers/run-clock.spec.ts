import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { clockAtRate, runTimeAt, wallClock, wallTimeAt } from './run-clock.js';

const WALL_MS = 1_790_000_000_000;
const rate = fc.integer({ min: 1, max: 60 });
const span = fc.integer({ min: -86_400_000, max: 86_400_000 });

describe(runTimeAt, () => {
  it('is wall time in a real run', () => {
    fc.assert(fc.property(span, (ms) => runTimeAt(wallClock(WALL_MS), WALL_MS + ms) === WALL_MS + ms));
  });

  it('moves thirty times as fast in a rehearsal at thirty', () => {
    const clock = { anchorWallMs: WALL_MS, anchorRunMs: WALL_MS, rate: 30 };
    expect(runTimeAt(clock, WALL_MS + 2000)).toBe(WALL_MS + 60_000);
  });
});

describe(wallTimeAt, () => {
  it('is the way back', () => {
    fc.assert(
      fc.property(rate, span, (faster, ms) => {
        const clock = { anchorWallMs: WALL_MS, anchorRunMs: WALL_MS + 5000, rate: faster };
        expect(wallTimeAt(clock, runTimeAt(clock, WALL_MS + ms))).toBe(WALL_MS + ms);
      }),
    );
  });
});

describe(clockAtRate, () => {
  it('does not let run time jump', () => {
    fc.assert(
      fc.property(rate, rate, span, (before, after, ms) => {
        const clock = { anchorWallMs: WALL_MS, anchorRunMs: WALL_MS, rate: before };
        const changed = clockAtRate(clock, after, WALL_MS + ms);
        expect(runTimeAt(changed, WALL_MS + ms)).toBe(runTimeAt(clock, WALL_MS + ms));
        expect(changed.rate).toBe(after);
      }),
    );
  });
});
