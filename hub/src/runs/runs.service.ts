import { Injectable } from '@nestjs/common';
import { InjectConnection } from '@nestjs/sequelize';
import type { RunSummary } from '@steepfall/shared/contracts';
import { ProblemError } from '@steepfall/shared/problems';
import type { RunEventOf, RunKit } from '@steepfall/shared/runs';
import type { RecipeDocument, RunSheet } from '@steepfall/shared/sheets';
import { wallClock, type RunClock } from '@steepfall/shared/timers';
import { UniqueConstraintError, type Transaction } from 'sequelize';
import { Sequelize } from 'sequelize-typescript';
import { BatchesService } from '../batches/batches.service.js';
import type { Actor } from '../common/access/actor.js';
import { Clock } from '../common/clock.js';
import { newId } from '../common/ids.js';
import { inTransaction } from '../database/retry-transaction.js';
import { MembersService } from '../members/members.service.js';
import { ProbesService } from '../probes/probes.service.js';
import { RunLogService, type NewRun } from './run-log.service.js';
import type { RunLog } from './run-log.js';
import { RunSummariesService } from './run-summaries.service.js';
import { withReach } from './with-reach.js';

/** Written for a run without a probe; nothing is ever read through it. */
const NO_PROBE = { lagS: 5, resolutionC: 0.1, samplePeriodS: 1 };

/** What starts a run, apart from ids and clock. */
export interface RunStart {
  title: string;
  batch: { id: string; batchNumber: string } | null;
  revisionId: string;
  sheet: RunSheet;
  /** For the figures while it runs: they need no hub. */
  document: RecipeDocument;
  kit: RunKit;
  clock: RunClock;
  probe: { id: string; lagS: number; resolutionC: number; samplePeriodS: number; lagErrorRatio?: number | null } | null;
  roomC: number | null;
  coolantC: number | null;
  /** Of the chiller in its kettle, where earlier runs taught it. */
  chillerPerS: number | null;
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
    private readonly members: MembersService,
    private readonly clock: Clock,
  ) {}

  /** Begins the run of a planned batch. Its sheet is copied into the first event, and what it had set aside of the stores is used. */
  async startBatch(actor: Actor, batchId: string): Promise<RunSummary> {
    const { houseId } = actor;
    const batch = await this.batches.getForRun(houseId, batchId);
    const probe = batch.probeId === null ? null : await this.probes.find(houseId, batch.probeId);
    const { revision, altitudeM, kettle, chiller } = batch;
    const prepare = async (transaction: Transaction): Promise<RunStart> => {
      const sheet = await this.batches.takeForRun(actor, batch, transaction);
      this.refuseHeldProbe(batch.probeId);
      return {
        title: `${revision.recipeName} ${revision.volumeL} L`,
        batch: { id: batch.id, batchNumber: batch.batchNumber },
        revisionId: revision.id,
        sheet,
        document: revision.document,
        kit: { altitudeM, kettle: kettle.facts, chiller: chiller?.facts ?? null },
        clock: wallClock(this.clock.nowMs()),
        probe,
        roomC: null,
        coolantC: chiller?.facts.coolantC ?? null,
        chillerPerS: chiller?.facts.coolingConstantPerS ?? null,
        rehearsal: null,
      };
    };
    try {
      return await this.start(actor, prepare);
    } catch (error) {
      // Two people started it at once: the database lets one through.
      if (error instanceof UniqueConstraintError) throw batchAlreadyRunning();
      throw error;
    }
  }

  /** `prepare` runs in the transaction that writes the run: what it writes comes and goes with it. */
  async start(actor: Actor, prepare: (transaction: Transaction) => Promise<RunStart>): Promise<RunSummary> {
    const { reachS } = await this.members.get(actor.houseId, actor.memberId);
    const log = await inTransaction(this.sequelize, async (transaction) => {
      const start = await prepare(transaction);
      return this.write(actor, { ...start, sheet: withReach(start.sheet, reachS ?? null) }, transaction);
    });
    this.logs.announce(log);
    return this.summaries.get(actor.houseId, log.id);
  }

  private refuseHeldProbe(probeId: string | null): void {
    const holder = probeId === null ? null : this.logs.attachedTo(probeId);
    if (holder)
      throw new ProblemError(
        'probe-in-use',
        `Its probe is in the kettle of "${holder.state.title}". End that run or take its probe out first.`,
      );
  }

  private write({ houseId, memberId }: Actor, start: RunStart, transaction: Transaction): Promise<RunLog> {
    const { title, batch, revisionId, sheet, document, kit, clock, probe, roomC, coolantC, chillerPerS, rehearsal } =
      start;
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
        document,
        kit,
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
      probeLagErrorRatio: probe?.lagErrorRatio ?? null,
      probeResolutionC: resolutionC,
      probeSamplePeriodS: samplePeriodS,
      roomC,
      coolantC,
      chillerPerS,
      startedAtMs: clock.anchorRunMs,
      startedBy: memberId,
      createdAtMs: this.clock.nowMs(),
      ...(rehearsal ?? { seed: null, kettleSetup: null, sourceProbeId: null }),
    };
    return this.logs.create(houseId, run, started, transaction);
  }
}

function batchAlreadyRunning(): ProblemError {
  return new ProblemError('batch-already-running', 'Open the run that is there.');
}
