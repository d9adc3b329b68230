import { Injectable } from '@nestjs/common';
import { InjectConnection } from '@nestjs/sequelize';
import { downsampleMinMax, type Reading } from '@steepfall/shared/readings';
import { QueryTypes, type Transaction } from 'sequelize';
import { Sequelize } from 'sequelize-typescript';
import { Clock } from '../common/clock.js';
import { inTransaction } from '../database/retry-transaction.js';
import type { ReadingRow } from './reading-buffer.js';

const ROWS_A_STATEMENT = 1000;
/** Rows read at once; a longer range is thinned page by page. */
const PAGE = 20_000;
/** A range of this many readings is given back whole when nobody asks for fewer. */
const WHOLE_UP_TO = 20_000;
const USUAL_BUCKETS = 5000;

export interface ReadingRange {
  probeId: string;
  fromMs: number;
  toMs: number;
}

/** The table of readings: rows lie in the order of probe and time, which is also what makes two of them the same. */
@Injectable()
export class ReadingsStore {
  private lastReceivedAtMs = 0;

  constructor(
    @InjectConnection() private readonly sequelize: Sequelize,
    private readonly clock: Clock,
  ) {}

  /** Commits rows of which no two are the same, and says which were there before: by their index. */
  async write(rows: readonly ReadingRow[]): Promise<ReadonlySet<number>> {
    // Each write has a stamp of its own: a row with an older one was there before.
    const receivedAtMs = Math.max(this.clock.nowMs(), this.lastReceivedAtMs + 1);
    this.lastReceivedAtMs = receivedAtMs;
    return inTransaction(this.sequelize, async (transaction) => {
      const known = new Set<number>();
      for (let first = 0; first < rows.length; first += ROWS_A_STATEMENT) {
        const part = rows.slice(first, first + ROWS_A_STATEMENT);
        const isAllNew = (await this.insert(part, receivedAtMs, transaction)) === part.length;
        if (isAllNew) continue;
        const stamps = await this.stamps(part, transaction);
        part.forEach(({ probeId, atMs }, index) => {
          if (stamps.get(`${probeId}/${atMs}`) !== receivedAtMs) known.add(first + index);
        });
      }
      return known;
    });
  }

  async count({ probeId, fromMs, toMs }: ReadingRange): Promise<number> {
    const [row] = await this.sequelize.query<{ count: number }>(
      'SELECT COUNT(*) AS count FROM readings WHERE probe_id = ? AND at_ms BETWEEN ? AND ?',
      { type: QueryTypes.SELECT, replacements: [probeId, fromMs, toMs] },
    );
    return Number(row?.count ?? 0);
  }

  /** Oldest first. */
  async range(range: ReadingRange): Promise<Reading[]> {
    const readings: Reading[] = [];
    for await (const page of this.pages(range)) readings.push(...page);
    return readings;
  }

  /** The newest of a probe since then, oldest first: as kept, and as the probe showed them. */
  async newest(probeId: string, fromMs: number, limit: number): Promise<(Reading & { shownC: number | null })[]> {
    const rows = await this.sequelize.query<Reading & { shownC: number | null }>(
      `SELECT at_ms AS atMs, temp_c AS tempC, COALESCE(raw_c, temp_c) AS shownC FROM readings
       WHERE probe_id = ? AND at_ms >= ? ORDER BY at_ms DESC LIMIT ?`,
      { type: QueryTypes.SELECT, replacements: [probeId, fromMs, limit] },
    );
    return rows.reverse();
  }

  /** The range with no more points than are of use: the lowest and the highest of every bucket of time, so that no spike is lost. */
  async thinned(
    range: ReadingRange,
    buckets: number | undefined,
  ): Promise<{ readings: Reading[]; totalCount: number }> {
    const totalCount = await this.count(range);
    if (buckets === undefined && totalCount <= WHOLE_UP_TO) return { readings: await this.range(range), totalCount };
    const wanted = buckets ?? USUAL_BUCKETS;
    let kept: Reading[] = [];
    for await (const page of this.pages(range)) kept = kept.concat(downsampleMinMax(page, wanted));
    return { readings: downsampleMinMax(kept, wanted), totalCount };
  }

  private async insert(
    rows: readonly ReadingRow[],
    receivedAtMs: number,
    transaction: Transaction,
  ): Promise<number | undefined> {
    const values = rows.map(({ probeId, atMs, tempC, rawC }) => [probeId, atMs, tempC, rawC, receivedAtMs]);
    // Not INSERT IGNORE, which would also swallow what does not fit; assigning the key to itself changes nothing.
    const [, newCount] = await this.sequelize.query(
      `INSERT INTO readings (probe_id, at_ms, temp_c, raw_c, received_at_ms) VALUES :values
       ON DUPLICATE KEY UPDATE probe_id = readings.probe_id`,
      { type: QueryTypes.INSERT, replacements: { values }, transaction },
    );
    return newCount;
  }

  private async stamps(rows: readonly ReadingRow[], transaction: Transaction): Promise<Map<string, number>> {
    const timesOf = new Map<string, number[]>();
    for (const { probeId, atMs } of rows) {
      const times = timesOf.get(probeId) ?? [];
      times.push(atMs);
      timesOf.set(probeId, times);
    }
    const stamps = new Map<string, number>();
    for (const [probeId, times] of timesOf) {
      const found = await this.sequelize.query<{ atMs: number; receivedAtMs: number }>(
        `SELECT at_ms AS atMs, received_at_ms AS receivedAtMs FROM readings
         WHERE probe_id = :probeId AND at_ms IN (:times)`,
        { type: QueryTypes.SELECT, replacements: { probeId, times }, transaction },
      );
      for (const { atMs, receivedAtMs } of found) stamps.set(`${probeId}/${atMs}`, receivedAtMs);
    }
    return stamps;
  }

  private async *pages({ probeId, fromMs, toMs }: ReadingRange): AsyncGenerator<Reading[]> {
    for (let afterMs = fromMs - 1; ;) {
      const page = await this.sequelize.query<Reading>(
        `SELECT at_ms AS atMs, temp_c AS tempC FROM readings
         WHERE probe_id = ? AND at_ms > ? AND at_ms <= ? ORDER BY at_ms LIMIT ?`,
        { type: QueryTypes.SELECT, replacements: [probeId, afterMs, toMs, PAGE] },
      );
      yield page;
      const last = page.at(-1);
      if (!last || page.length < PAGE) return;
      afterMs = last.atMs;
    }
  }
}
