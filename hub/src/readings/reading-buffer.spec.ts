import { describe, expect, it, vi } from 'vitest';
import { ReadingBuffer, type ReadingRow } from './reading-buffer.js';

const rows = (probeId: string, ...times: number[]): ReadingRow[] =>
  times.map((atMs) => ({ probeId, atMs, tempC: atMs / 10, rawC: null }));

/** A table in memory, and what was asked of it. */
function table() {
  const kept = new Set<string>();
  const writes: ReadingRow[][] = [];
  const write = (asked: readonly ReadingRow[]) => {
    writes.push([...asked]);
    const known = new Set<number>();
    asked.forEach(({ probeId, atMs }, index) => {
      const key = `${probeId}/${atMs}`;
      if (kept.has(key)) known.add(index);
      kept.add(key);
    });
    return Promise.resolve(known);
  };
  return { write, writes, kept };
}

describe(ReadingBuffer, () => {
  it('commits what several probes send at about the same time once, and counts for each by itself', async () => {
    const { write, writes } = table();
    const buffer = new ReadingBuffer({ write, gatherMs: 1 });
    const answers = await Promise.all([
      buffer.add(rows('a', 1, 2, 3)),
      buffer.add(rows('b', 1)),
      // Sent again before the first was acknowledged, and twice in itself.
      buffer.add(rows('a', 3, 4, 4)),
    ]);
    expect(answers).toEqual([
      { accepted: 3, duplicates: 0 },
      { accepted: 1, duplicates: 0 },
      { accepted: 1, duplicates: 2 },
    ]);
    expect(writes).toHaveLength(1);
    expect(writes[0]).toHaveLength(5);
    expect(await buffer.add(rows('a', 4, 5))).toEqual({ accepted: 1, duplicates: 1 });
    expect(await buffer.add([])).toEqual({ accepted: 0, duplicates: 0 });
  });

  it('has one commit in flight, and lets the next gather meanwhile', async () => {
    let running = 0;
    const finish: (() => void)[] = [];
    const write = vi.fn(() => {
      running += 1;
      expect(running).toBe(1);
      return new Promise<Set<number>>((resolve) =>
        finish.push(() => {
          running -= 1;
          resolve(new Set());
        }),
      );
    });
    const buffer = new ReadingBuffer({ write, gatherMs: 0 });
    const first = buffer.add(rows('a', 1));
    await vi.waitFor(() => expect(write).toHaveBeenCalledTimes(1));
    const second = buffer.add(rows('a', 2));
    const third = buffer.add(rows('b', 2));
    finish[0]?.();
    await first;
    await vi.waitFor(() => expect(write).toHaveBeenCalledTimes(2));
    finish[1]?.();
    expect(await Promise.all([second, third])).toEqual([
      { accepted: 1, duplicates: 0 },
      { accepted: 1, duplicates: 0 },
    ]);
  });

  it('acknowledges nothing when the commit fails, and goes on with the next', async () => {
    const write = vi.fn().mockRejectedValueOnce(new Error('gone')).mockResolvedValue(new Set());
    const buffer = new ReadingBuffer({ write, gatherMs: 0 });
    await expect(buffer.add(rows('a', 1))).rejects.toThrow('gone');
    expect(await buffer.add(rows('a', 1))).toEqual({ accepted: 1, duplicates: 0 });
  });

  it('turns readings away when too many wait, and takes them again later', async () => {
    const { write } = table();
    const buffer = new ReadingBuffer({ write, gatherMs: 1, capacity: 3 });
    const first = buffer.add(rows('a', 1, 2, 3));
    expect(() => buffer.assertRoom()).toThrow(expect.objectContaining({ type: 'unavailable' }));
    expect(() => buffer.add(rows('a', 4))).toThrow(expect.objectContaining({ type: 'unavailable' }));
    await first;
    expect(await buffer.add(rows('a', 4))).toEqual({ accepted: 1, duplicates: 0 });
  });

  it('commits at once what waits when it is told to settle or to close, and takes nothing after that', async () => {
    const { write, kept } = table();
    const buffer = new ReadingBuffer({ write, gatherMs: 60_000 });
    const first = buffer.add(rows('a', 1));
    await buffer.settle();
    expect(await first).toEqual({ accepted: 1, duplicates: 0 });
    const second = buffer.add(rows('a', 2));
    await buffer.close();
    expect(await second).toEqual({ accepted: 1, duplicates: 0 });
    expect(kept.size).toBe(2);
    expect(() => buffer.add(rows('a', 3))).toThrow(expect.objectContaining({ type: 'unavailable' }));
  });
});
