import { ProblemError } from '@steepfall/shared/problems';
import type { CorrectedReading } from './corrected.js';

export interface ReadingRow extends CorrectedReading {
  probeId: string;
}

export interface Counts {
  accepted: number;
  duplicates: number;
}

export interface BufferOptions {
  /** Commits rows, no two of which have the same key, and says which were there before: by their index. */
  write: (rows: readonly ReadingRow[]) => Promise<ReadonlySet<number>>;
  /** How long the first row waits for others to share its commit. */
  gatherMs?: number;
  /** Rows that may wait; beyond it readings are turned away, and their senders keep them. */
  capacity?: number;
}

interface Call {
  rows: readonly ReadingRow[];
  resolve: (counts: Counts) => void;
  reject: (error: unknown) => void;
}

/**
 * Gathers the readings of all probes for a moment, so that one commit serves many: a disk syncs a few hundred times a second, not once a
 * reading. A call is answered after its rows are committed. One commit is in flight at a time, which keeps the count of duplicates exact.
 */
export class ReadingBuffer {
  private readonly write: BufferOptions['write'];
  private readonly gatherMs: number;
  private readonly capacity: number;
  private calls: Call[] = [];
  private waitingCount = 0;
  private timer: NodeJS.Timeout | null = null;
  private writing: Promise<void> | null = null;
  private isClosed = false;

  constructor({ write, gatherMs = 25, capacity = 50_000 }: BufferOptions) {
    this.write = write;
    this.gatherMs = gatherMs;
    this.capacity = capacity;
  }

  /** Throws `unavailable` when too much waits already, or while the hub goes down. */
  assertRoom(): void {
    if (this.isClosed || this.waitingCount >= this.capacity)
      throw new ProblemError('unavailable', 'The hub cannot keep readings just now. Keep them and send them again.');
  }

  add(rows: readonly ReadingRow[]): Promise<Counts> {
    if (rows.length === 0) return Promise.resolve({ accepted: 0, duplicates: 0 });
    this.assertRoom();
    return new Promise((resolve, reject) => {
      this.calls.push({ rows, resolve, reject });
      this.waitingCount += rows.length;
      if (this.writing === null) this.timer ??= setTimeout(() => void this.flush(), this.gatherMs);
    });
  }

  /** Resolves when everything that was added before is committed, or has failed. */
  async settle(): Promise<void> {
    await this.writing;
    await this.flush();
  }

  /** Takes no more, and commits what is waiting. */
  async close(): Promise<void> {
    this.isClosed = true;
    while (this.calls.length > 0 || this.writing !== null) await this.settle();
  }

  private flush(): Promise<void> {
    if (this.timer) clearTimeout(this.timer);
    this.timer = null;
    this.writing ??= this.drain().finally(() => {
      this.writing = null;
      if (this.calls.length > 0) this.timer ??= setTimeout(() => void this.flush(), this.gatherMs);
    });
    return this.writing;
  }

  private async drain(): Promise<void> {
    const calls = this.calls;
    this.calls = [];
    if (calls.length === 0) return;
    const unique = new Map<string, ReadingRow>();
    const firstOf = calls.map(({ rows }) =>
      rows.filter((row) => {
        const key = `${row.probeId}/${row.atMs}`;
        if (unique.has(key)) return false;
        unique.set(key, row);
        return true;
      }),
    );
    const rows = [...unique.values()];
    try {
      const known = await this.write(rows);
      const old = new Set([...known].map((index) => rows[index]));
      calls.forEach((call, index) => {
        const accepted = (firstOf[index] ?? []).filter((row) => !old.has(row)).length;
        call.resolve({ accepted, duplicates: call.rows.length - accepted });
      });
    } catch (error) {
      for (const call of calls) call.reject(error);
    } finally {
      for (const call of calls) this.waitingCount -= call.rows.length;
    }
  }
}
