import { describe, expect, it } from 'vitest';
import { runClockPace, wallPace } from './pace.js';

const startMs = 1_760_000_000_000;

describe('wallPace', () => {
  it('at rate 1 stamps and waits in step', () => {
    const pace = wallPace(startMs, 1);
    expect(pace.stampMs(2100)).toBe(startMs + 2100);
    expect(pace.dueWallMs(2100)).toBe(startMs + 2100);
    expect(pace.simulatedMs(startMs + 2100)).toBe(2100);
  });

  it('at rate 20 squeezes waits and stamps alike, so that no reading is from the future', () => {
    const pace = wallPace(startMs, 20);
    expect(pace.stampMs(60_000)).toBe(startMs + 3000);
    expect(pace.dueWallMs(60_000)).toBe(startMs + 3000);
    expect(pace.simulatedMs(startMs + 3000)).toBe(60_000);
  });

  it('can tell an older trace again', () => {
    const pace = wallPace(startMs, 10, startMs - 3_600_000);
    expect(pace.stampMs(10_000)).toBe(startMs - 3_600_000 + 1000);
    expect(pace.dueWallMs(10_000)).toBe(startMs + 1000);
  });

  it('refuses a rate that no clock runs at', () => {
    for (const rate of [0, 0.5, 61, Number.NaN]) expect(() => wallPace(startMs, rate)).toThrow(RangeError);
  });
});

describe('runClockPace', () => {
  const clock = { anchorWallMs: startMs, anchorRunMs: startMs + 500_000, rate: 30 };

  it('maps by runMs = anchorRunMs + (wallMs - anchorWallMs) * rate', () => {
    const startRunMs = startMs + 530_000;
    const pace = runClockPace(clock, startRunMs);
    expect(pace.simulatedMs(startMs + 1000)).toBe(0);
    expect(pace.simulatedMs(startMs + 3000)).toBe(60_000);
    expect(pace.dueWallMs(60_000)).toBe(startMs + 3000);
  });

  it('keeps the spacing of the readings', () => {
    const pace = runClockPace(clock, startMs + 500_000);
    expect(pace.stampMs(61_000) - pace.stampMs(60_000)).toBe(1000);
  });
});
