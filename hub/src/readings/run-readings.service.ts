import { Injectable } from '@nestjs/common';
import type { RunReadings, RunReadingsQuery } from '@steepfall/shared/contracts';
import type { Reading } from '@steepfall/shared/readings';
import { runTimeAt } from '@steepfall/shared/timers';
import { Clock } from '../common/clock.js';
import { RunLogService } from '../runs/run-log.service.js';
import type { RunLog } from '../runs/run-log.js';
import { IngestionService } from './ingestion.service.js';
import { ReadingsStore } from './readings.store.js';

/** Readings go on for a moment after somebody taps that the keg is full. */
const AFTER_PROBE_OUT_MS = 120_000;
/** What a tablet needs to bring its watch up to date. */
const RECENT_MS = 15 * 60_000;
const CLOCK_SLACK_MS = 60_000;
/** Longer in the kettle, a probe was forgotten there. */
const BREW_DAY_MS = 8 * 3_600_000;

/** The readings that belong to a run: those of its probe from the start until it came out of the kettle. */
@Injectable()
export class RunReadingsService {
  constructor(
    private readonly logs: RunLogService,
    private readonly store: ReadingsStore,
    private readonly ingestion: IngestionService,
    private readonly clock: Clock,
  ) {}

  async get(houseId: string, runId: string, { fromMs, toMs, buckets }: RunReadingsQuery): Promise<RunReadings> {
    const log = await this.logs.get(houseId, runId);
    const { probeId } = log.facts;
    if (probeId === null) return { runId, probeId, readings: [], totalCount: 0 };
    const span = this.spanOf(log);
    const range = { probeId, fromMs: Math.max(fromMs ?? 0, span.fromMs), toMs: Math.min(toMs ?? Infinity, span.toMs) };
    return { runId, probeId, ...(await this.store.thinned(range, buckets)) };
  }

  /** The last quarter of an hour of run time up to this instant of hub wall time. */
  async recent(log: RunLog, wallMs: number): Promise<Reading[]> {
    const { probeId } = log.facts;
    if (probeId === null) return [];
    await this.ingestion.settle();
    const span = this.spanOf(log);
    const nowMs = runTimeAt(log.clock, wallMs);
    return this.store.range({ probeId, fromMs: Math.max(span.fromMs, nowMs - RECENT_MS), toMs: span.toMs });
  }

  /** Every reading of the brew day itself, for learning from it. */
  async brewed(log: RunLog): Promise<Reading[]> {
    const { probeId } = log.facts;
    if (probeId === null) return [];
    const { fromMs, toMs } = this.spanOf(log);
    return this.store.range({ probeId, fromMs, toMs: Math.min(toMs, fromMs + BREW_DAY_MS) });
  }

  private spanOf({ state, projection, clock }: RunLog): { fromMs: number; toMs: number } {
    const { probeOutAtMs, endedAtMs } = projection;
    const ends = [probeOutAtMs, endedAtMs].filter((atMs) => atMs !== null);
    const toMs =
      ends.length > 0 ? Math.min(...ends) + AFTER_PROBE_OUT_MS : runTimeAt(clock, this.clock.nowMs()) + CLOCK_SLACK_MS;
    return { fromMs: state.startedAtMs ?? 0, toMs };
  }
}
