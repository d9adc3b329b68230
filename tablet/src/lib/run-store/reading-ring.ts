import type { Reading } from '@steepfall/shared/readings';

export const RING_MS = 15 * 60_000;

/** The newest quarter of an hour of run time, in order of time, each instant once. */
export class ReadingRing {
  private kept: Reading[] = [];

  get all(): readonly Reading[] {
    return this.kept;
  }

  get newest(): Reading | null {
    return this.kept.at(-1) ?? null;
  }

  /** Adds what is new and gives it back, oldest first. What came before the newest one fills in silently: it is no news. */
  add(readings: readonly Reading[]): Reading[] {
    const newestMs = this.newest?.atMs ?? Number.NEGATIVE_INFINITY;
    const sorted = [...readings].sort((a, b) => a.atMs - b.atMs);
    const fresh = sorted.filter(({ atMs }, i) => atMs > newestMs && atMs !== sorted[i - 1]?.atMs);
    const older = sorted.filter(({ atMs }) => atMs < newestMs);
    if (older.length > 0) {
      const byTime = new Map([...older, ...this.kept].map((reading) => [reading.atMs, reading]));
      this.kept = [...byTime.values()].sort((a, b) => a.atMs - b.atMs);
    }
    if (fresh.length === 0 && older.length === 0) return [];
    this.kept.push(...fresh);
    const oldestMs = (this.newest?.atMs ?? 0) - RING_MS;
    const first = this.kept.findIndex(({ atMs }) => atMs >= oldestMs);
    if (first > 0) this.kept = this.kept.slice(first);
    return fresh;
  }
}
