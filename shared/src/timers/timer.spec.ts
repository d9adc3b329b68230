import { describe, expect, it } from 'vitest';
import { isOver, secondsLeft } from './timer.js';

const timer = { endsAtMs: 100_000 };

describe(secondsLeft, () => {
  it('shows a second until it is really gone', () => {
    expect(secondsLeft(timer, 10_000)).toBe(90);
    expect(secondsLeft(timer, 99_001)).toBe(1);
    expect(secondsLeft(timer, 100_000)).toBe(0);
  });

  it('counts on below zero', () => {
    expect(secondsLeft(timer, 163_500)).toBe(-63);
  });

  it('never shows a minus zero', () => {
    expect(Object.is(secondsLeft(timer, 100_400), 0)).toBe(true);
  });
});

describe(isOver, () => {
  it('is over from the deadline on', () => {
    expect([99_999, 100_000].map((nowMs) => isOver(timer, nowMs))).toEqual([false, true]);
  });
});
