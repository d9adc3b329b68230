import { describe, expect, it } from 'vitest';
import { PressFilter } from './press-filter.ts';

function tap(filter: PressFilter, atMs: number, lengthMs: number, { touchCount = 1, isInside = true } = {}) {
  filter.down(1, atMs, touchCount);
  return filter.up(1, atMs + lengthMs, isInside);
}

describe(PressFilter, () => {
  it.each([
    [30, 'too-short'],
    [69, 'too-short'],
    [70, 'accepted'],
    [120, 'accepted'],
    [400, 'accepted'],
    [500, 'too-long'],
    [3_000, 'too-long'],
  ])('a touch of %d ms is %s', (lengthMs, verdict) => {
    expect(tap(new PressFilter(), 1_000, lengthMs)).toBe(verdict);
  });

  it('does not take a finger beside another one', () => {
    expect(tap(new PressFilter(), 0, 120, { touchCount: 2 })).toBe('several-touches');
  });

  it('does not take a press during which another finger came down', () => {
    const filter = new PressFilter();
    filter.down(1, 0, 1);
    filter.spoil();
    expect(filter.up(1, 120, true)).toBe('several-touches');
  });

  it('does not take a finger that slid off', () => {
    expect(tap(new PressFilter(), 0, 120, { isInside: false })).toBe('left');
  });

  it('takes no second one within 400 ms, and one after that', () => {
    const filter = new PressFilter();
    expect(tap(filter, 0, 100)).toBe('accepted');
    expect(tap(filter, 250, 100)).toBe('repeated');
    expect(tap(filter, 450, 100)).toBe('accepted');
  });

  it('takes a mouse or a key at once, under the same rule against repeats', () => {
    const filter = new PressFilter();
    expect(filter.activate(0)).toBe('accepted');
    expect(filter.activate(399)).toBe('repeated');
    expect(filter.activate(400)).toBe('accepted');
  });

  it('is ready again after a touch that the system took away', () => {
    const filter = new PressFilter();
    filter.down(1, 0, 1);
    filter.cancel();
    expect(tap(filter, 500, 100)).toBe('accepted');
  });
});
