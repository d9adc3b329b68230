import { Injectable, type BeforeApplicationShutdown } from '@nestjs/common';
import type { PushedReadings } from '@steepfall/shared/contracts';
import type { Reading } from '@steepfall/shared/readings';
import { runTimeAt, wallClock, type RunClock } from '@steepfall/shared/timers';
import { Subject, type Observable } from 'rxjs';
import { Clock } from '../common/clock.js';
import { ProbesService } from '../probes/probes.service.js';
import { RunLogService } from '../runs/run-log.service.js';
import type { RunLog } from '../runs/run-log.js';
import { corrected, type CorrectedReading } from './corrected.js';
import { judgeReadings } from './judge-readings.js';
import { ReadingBuffer } from './reading-buffer.js';
import { ReadingsStore } from './readings.store.js';

export interface AcceptedReadings {
  log: RunLog;
  /** In order of time, however they came. */
  readings: Reading[];
  /** Run clock. */
  nowMs: number;
  /** Hub wall time. */
  acceptedMs: number;
}

/** The one way in for readings, whichever door they come through and whether their probe is real. */
@Injectable()
export class IngestionService implements BeforeApplicationShutdown {
  private readonly buffer: ReadingBuffer;
  /** What each calibrated probe showed last. */
  private readonly lastShownC = new Map<string, number>();
  private readonly accepts = new Subject<AcceptedReadings>();
  /** Readings of open runs as they are accepted, before they are on disk: for eyes and for alerts, not for records. */
  readonly accepted$: Observable<AcceptedReadings> = this.accepts.asObservable();

  constructor(
    store: ReadingsStore,
    private readonly probes: ProbesService,
    private readonly logs: RunLogService,
    private readonly clock: Clock,
  ) {
    this.buffer = new ReadingBuffer({ write: (rows) => store.write(rows) });
  }

  async beforeApplicationShutdown(): Promise<void> {
    await this.buffer.close();
  }

  /** Resolves after commit. A refused reading will never be taken. */
  async ingest(probeId: string, readings: readonly Reading[]): Promise<PushedReadings> {
    this.buffer.assertRoom();
    const log = this.logs.attachedTo(probeId);
    const acceptedMs = this.clock.nowMs();
    const nowMs = log ? runTimeAt(log.clock, acceptedMs) : acceptedMs;
    const { accepted, refused } = judgeReadings(readings, nowMs);
    const rows = this.correct(probeId, accepted);
    if (log && rows.length > 0) this.accepts.next({ log, readings: inTimeOrder(rows), nowMs, acceptedMs });
    const keptUnder = log?.facts.probeId ?? probeId;
    const counts = await this.buffer.add(rows.map((row) => ({ probeId: keptUnder, ...row })));
    return { ...counts, refused };
  }

  /** By the calibration of the probe that sent them, whichever run they are kept under. */
  private correct(probeId: string, readings: readonly Reading[]): CorrectedReading[] {
    const rows = corrected(readings, this.probes.correctionOf(probeId), this.lastShownC.get(probeId) ?? null);
    const last = rows.findLast(({ rawC }) => rawC !== null);
    if (last?.rawC != null) this.lastShownC.set(probeId, last.rawC);
    return rows;
  }

  /** The clock that the readings of this probe are stamped with: that of its run, or wall time. */
  clockOf(probeId: string): RunClock {
    return this.logs.attachedTo(probeId)?.clock ?? wallClock(this.clock.nowMs());
  }

  /** Resolves when everything that was accepted before is on disk. */
  async settle(): Promise<void> {
    await this.buffer.settle();
  }
}

function inTimeOrder(readings: readonly Reading[]): Reading[] {
  return readings.map(({ atMs, tempC }) => ({ atMs, tempC })).sort((a, b) => a.atMs - b.atMs);
}
