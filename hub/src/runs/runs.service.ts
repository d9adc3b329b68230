import { Injectable } from '@nestjs/common';
import { InjectConnection } from '@nestjs/sequelize';
import type { RunSummary } from '@steepfall/shared/contracts';
import { ProblemError } from '@steepfall/shared/problems';
import type { RunEventOf } from '@steepfall/shared/runs';
import { compileSheet, type RecipeDocument, type RunSheet } from '@steepfall/shared/sheets';
import { wallClock, type RunClock } from '@steepfall/shared/timers';
import { UniqueConstraintError, type Transaction } from 'sequelize';
import { Sequelize } from 'sequelize-typescript';
import { ZodError } from 'zod';
import { BatchesService } from '../batches/batches.service.js';
import type { Actor } from '../common/access/actor.js';
import { Clock } from '../common/clock.js';
import { newId } from '../common/ids.js';
import { inTransaction } from '../database/retry-transaction.js';
import { ProbesService } from '../probes/probes.service.js';
import { RunLogService, type NewRun } from './run-log.service.js';
import type { RunLog } from './run-log.js';
import { RunSummariesService } from './run-summaries.service.js';

/** A hand with its gloves on, from alert to act. */
const REACH_S = 10;
/** Written for a run without a probe; nothing is ever read through it. */
const NO_PROBE = { lagS: 5, resolutionC: 0.1, samplePeriodS: 1 };

/** What starts a run, apart from ids and clock. */
export interface RunStart {
  title: string;
  batch: { id: string; batchNumber: string } | null;
  revisionId: string;
  sheet: RunSheet;
  clock: RunClock;
  probe: { id: string; lagS: number; resolutionC: number; samplePeriodS: number } | null;
  roomC: number | null;
  coolantC: number | null;
  /** `null`: a real run. */
  rehearsal: Pick<NewRun, 'seed' | 'kettleSetup' | 'sourceProbeId'> | null;
}

/** Begins runs; what happens in them goes through their log. */
@Injectable()
export class RunsService {
  constructor(
    @InjectConnection() private readonly sequelize: Sequelize,
    private readonly logs: RunLogService,
    private readonly summaries: RunSummariesService,
    private readonly batches: BatchesService,
    private readonly probes: ProbesService,
    private readonly clock: Clock,
  ) {}

  /** Begins the run of a planned batch. Its sheet is compiled now and copied into the first event. */
  async startBatch(actor: Actor, batchId: string): Promise<RunSummary> {
    const { houseId } = actor;
    const batch = await this.batches.getForRun(houseId, batchId);
    const earlier = (await this.summaries.ofBatches(houseId, [batchId])).get(batchId);
    if (earlier && earlier.outcome !== 'abandoned') throw batchAlreadyRunning();
    const { revision, altitudeM, chiller } = batch;
    const holder = batch.probeId === null ? null : this.logs.attachedTo(batch.probeId);
    if (holder)
      throw new ProblemError(
        'probe-in-use',
        `Its probe is in the kettle of "${holder.state.title}". End that run or take its probe out first.`,
      );
    const start: RunStart = {
      title: `${revision.recipeName} ${revision.volumeL} L`,
      batch: { id: batch.id, batchNumber: batch.batchNumber },
      revisionId: revision.id,
      sheet: sheetOf(revision.document, altitudeM),
      clock: wallClock(this.clock.nowMs()),
      probe: batch.probeId === null ? null : await this.probes.find(houseId, batch.probeId),
      roomC: null,
      coolantC: chiller?.facts.coolantC ?? null,
      rehearsal: null,
    };
    try {
      return await this.start(actor, () => Promise.resolve(start));
    } catch (error) {
      // Two people started it at once: the database lets one through.
      if (error instanceof UniqueConstraintError) throw batchAlreadyRunning();
      throw error;
    }
  }

  /** `prepare` runs in the transaction that writes the run: what it writes comes and goes with it. */
  async start(actor: Actor, prepare: (transaction: Transaction) => Promise<RunStart>): Promise<RunSummary> {
    const log = await inTransaction(this.sequelize, async (transaction) =>
      this.write(actor, await prepare(transaction), transaction),
    );
    this.logs.announce(log);
    return this.summaries.get(actor.houseId, log.id);
  }

  private write({ houseId, memberId }: Actor, start: RunStart, transaction: Transaction): Promise<RunLog> {
    const { title, batch, revisionId, sheet, clock, probe, roomC, coolantC, rehearsal } = start;
    const isRehearsal = rehearsal !== null;
    const runId = newId();
    const { lagS, resolutionC, samplePeriodS } = probe ?? NO_PROBE;
    const started: RunEventOf<'run.started'> = {
      id: newId(),
      runId,
      type: 'run.started',
      v: 1,
      atMs: clock.anchorRunMs,
      by: memberId,
      station: 'hub',
      payload: {
        title,
        batchId: batch?.id ?? null,
        batchNumber: batch?.batchNumber ?? null,
        revisionId,
        isRehearsal,
        sheet,
        clock,
      },
    };
    const run: NewRun = {
      id: runId,
      batchId: batch?.id ?? null,
      batchNumber: batch?.batchNumber ?? null,
      revisionId,
      title,
      isRehearsal,
      probeId: probe?.id ?? null,
      probeLagS: lagS,
      probeResolutionC: resolutionC,
      probeSamplePeriodS: samplePeriodS,
      roomC,
      coolantC,
      startedAtMs: clock.anchorRunMs,
      startedBy: memberId,
      createdAtMs: this.clock.nowMs(),
      ...(rehearsal ?? { seed: null, kettleSetup: null, sourceProbeId: null }),
    };
    return this.logs.create(houseId, run, started, transaction);
  }
}

/** The sheet of a document at this place; a plan that physics does not allow is said so, not a fault of the hub. */
export function sheetOf(document: RecipeDocument, altitudeM: number): RunSheet {
  try {
    return compileSheet(document, { altitudeM, reachS: REACH_S });
  } catch (error) {
    if (error instanceof RangeError || error instanceof ZodError) throw new ProblemError('not-valid', error.message);
    throw error;
  }
}

function batchAlreadyRunning(): ProblemError {
  return new ProblemError('batch-already-running', 'Open the run that is there.');
}
