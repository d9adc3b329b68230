import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest';
import { Pacer } from './pacer.js';

describe(Pacer, () => {
  beforeEach(() => void vi.useFakeTimers());
  afterEach(() => void vi.useRealTimers());

  function paced() {
    const told: string[] = [];
    const pacer = new Pacer<string>({
      everyMs: 50,
      merge: (waiting, newer) => waiting + newer,
      emit: (key, message) => told.push(`${key}:${message}`),
    });
    return { told, pacer };
  }

  it('hands the first on at once and the rest together, no more than one in 50 ms', () => {
    const { told, pacer } = paced();
    for (const message of 'abc') pacer.offer('run', message);
    expect(told).toEqual(['run:a']);
    vi.advanceTimersByTime(49);
    pacer.offer('run', 'd');
    expect(told).toHaveLength(1);
    vi.advanceTimersByTime(1);
    expect(told).toEqual(['run:a', 'run:bcd']);
    pacer.offer('run', 'e');
    vi.advanceTimersByTime(50);
    expect(told).toEqual(['run:a', 'run:bcd', 'run:e']);
    vi.advanceTimersByTime(50);
    pacer.offer('run', 'f');
    expect(told.at(-1)).toBe('run:f');
  });

  it('keeps keys apart, and holds nothing back once closed', () => {
    const { told, pacer } = paced();
    pacer.offer('a', '1');
    pacer.offer('b', '1');
    expect(told).toEqual(['a:1', 'b:1']);
    pacer.offer('a', '2');
    pacer.close();
    vi.advanceTimersByTime(1000);
    expect(told).toHaveLength(2);
    expect(vi.getTimerCount()).toBe(0);
  });
});
