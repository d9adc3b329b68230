import { describe, expect, it } from 'vitest';
import { ReadingRing, RING_MS } from './reading-ring.ts';

const at = (...seconds: number[]) => seconds.map((s) => ({ atMs: s * 1000, tempC: s }));
const secondsOf = (ring: ReadingRing) => ring.all.map(({ atMs }) => atMs / 1000);

describe(ReadingRing, () => {
  it('gives back what is new, in order, each instant once', () => {
    const ring = new ReadingRing();
    expect(ring.add(at(3, 1, 2, 2))).toEqual(at(1, 2, 3));
    expect(ring.add(at(2, 3, 4))).toEqual(at(4));
    expect(secondsOf(ring)).toEqual([1, 2, 3, 4]);
  });

  it('fills in what came late without calling it news', () => {
    const ring = new ReadingRing();
    ring.add(at(10, 20));
    expect(ring.add(at(15))).toEqual([]);
    expect(secondsOf(ring)).toEqual([10, 15, 20]);
  });

  it('keeps a quarter of an hour', () => {
    const ring = new ReadingRing();
    ring.add(at(0, 1, 2));
    ring.add([{ atMs: RING_MS + 1_000, tempC: 1 }]);
    expect(secondsOf(ring)).toEqual([1, 2, RING_MS / 1000 + 1]);
  });
});
