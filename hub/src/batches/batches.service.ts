import { Injectable } from '@nestjs/common';
import { InjectConnection, InjectModel } from '@nestjs/sequelize';
import type {
  Batch as BatchAnswer,
  BatchPlan,
  createBatchSchema,
  Equipment,
  RunSummary,
  UpdateBatchSheet,
} from '@steepfall/shared/contracts';
import { ProblemError } from '@steepfall/shared/problems';
import { checkSheet, type RunSheet } from '@steepfall/shared/sheets';
import { Op, type Transaction } from 'sequelize';
import { Sequelize } from 'sequelize-typescript';
import type { z } from 'zod';
import { AuditService } from '../audit/audit.service.js';
import type { Actor } from '../common/access/actor.js';
import { Clock } from '../common/clock.js';
import { inHouse } from '../common/house-scope/in-house.js';
import { newId } from '../common/ids.js';
import { inTransaction } from '../database/retry-transaction.js';
import { EquipmentService } from '../equipment/equipment.service.js';
import { HousesService } from '../houses/houses.service.js';
import { ProbesService } from '../probes/probes.service.js';
import { RecipesService, type NamedRevision } from '../recipes/recipes.service.js';
import { RunSummariesService } from '../runs/run-summaries.service.js';
import { StoresService } from '../stores/stores.service.js';
import { formatBatchNumber } from './batch-number.js';
import { Batch } from './models/batch.model.js';
import { weighOutOf } from './weigh-out.js';

type Kettle = Extract<Equipment, { kind: 'kettle' }>;
type Chiller = Extract<Equipment, { kind: 'chiller' }>;
type Keg = Extract<Equipment, { kind: 'keg' }>;

/** What a batch is planned with, as it comes out of its schema. */
export type BatchValues = z.output<typeof createBatchSchema>;

/** Everything a run of this batch starts from; its sheet comes when the run is written. */
export interface BatchForRun {
  id: string;
  batchNumber: string;
  revision: NamedRevision;
  altitudeM: number;
  kettle: Kettle;
  chiller: Chiller | null;
  keg: Keg;
  probeId: string | null;
}

@Injectable()
export class BatchesService {
  constructor(
    @InjectModel(Batch) private readonly batches: typeof Batch,
    @InjectConnection() private readonly sequelize: Sequelize,
    private readonly houses: HousesService,
    private readonly recipes: RecipesService,
    private readonly equipment: EquipmentService,
    private readonly probes: ProbesService,
    private readonly runSummaries: RunSummariesService,
    private readonly stores: StoresService,
    private readonly audit: AuditService,
    private readonly clock: Clock,
  ) {}

  /** The newest day first, and on one day the highest number. */
  async list(houseId: string, { cancelled }: { cancelled: boolean }): Promise<BatchAnswer[]> {
    const rows = await inHouse(this.batches, houseId).findAll(
      { cancelledAtMs: cancelled ? { [Op.ne]: null } : null },
      {
        // Much to carry for every batch there ever was, and no list shows it.
        attributes: { exclude: ['sheet'] },
        order: [
          ['plannedOn', 'DESC'],
          ['year', 'DESC'],
          ['numberInYear', 'DESC'],
        ],
      },
    );
    return this.present(houseId, rows);
  }

  async get(houseId: string, id: string): Promise<BatchAnswer> {
    const row = await inHouse(this.batches, houseId).get(id, 'batch');
    const [answer] = await this.present(houseId, [row]);
    return answer as BatchAnswer;
  }

  /** Plans a batch of a revision, also of a recipe that was put away: putting away only hides. What is set aside comes with it or not at all. */
  async create(actor: Actor, { reserve, mayGoBelowZero, ...values }: BatchValues): Promise<BatchAnswer> {
    const { houseId, memberId } = actor;
    const [revision, { altitudeM }] = await Promise.all([
      this.checkParts(houseId, { ...values, reserve }),
      this.houses.get(houseId),
    ]);
    // Asked here, so that a plan that makes no sheet is told today and not on the day.
    this.recipes.sheetOf(revision, altitudeM);
    const row = await inTransaction(this.sequelize, async (transaction) => {
      // Two people planning at once get two numbers: the second waits here for the first.
      await this.houses.lock(houseId, transaction);
      const year = Number(values.plannedOn.slice(0, 4));
      const numberInYear = (await this.lastNumber(houseId, year, transaction)) + 1;
      const batch = await inHouse(this.batches, houseId).create(
        {
          id: newId(),
          ...values,
          year,
          numberInYear,
          batchNumber: formatBatchNumber({ year, numberInYear }),
          volumeL: revision.volumeL,
          createdAtMs: this.clock.nowMs(),
          createdBy: memberId,
        },
        { transaction },
      );
      await this.stores.reserve(houseId, batch.id, reserve, { mayGoBelowZero }, transaction);
      await this.audit.recordAct(actor, 'batch.planned', batch.id, { ...values, reserve, mayGoBelowZero }, transaction);
      return batch;
    });
    return this.get(houseId, row.id);
  }

  async getForRun(houseId: string, id: string): Promise<BatchForRun> {
    const row = await inHouse(this.batches, houseId).get(id, 'batch');
    const ids = [row.kettleId, row.kegId, ...(row.chillerId === null ? [] : [row.chillerId])];
    const [revision, house, equipment] = await Promise.all([
      this.recipes.getRevision(houseId, row.revisionId),
      this.houses.get(houseId),
      this.equipment.findMany(houseId, ids),
    ]);
    return {
      id: row.id,
      batchNumber: row.batchNumber,
      revision,
      altitudeM: house.altitudeM,
      // Kinds were checked when the batch was planned, and a piece of equipment keeps its kind.
      kettle: equipment.get(row.kettleId) as Kettle,
      chiller: row.chillerId === null ? null : (equipment.get(row.chillerId) as Chiller),
      keg: equipment.get(row.kegId) as Keg,
      probeId: row.probeId,
    };
  }

  /**
   * In the transaction that writes the run: gives the sheet as it stands at this instant, and turns what was set aside of the stores into
   * use. Whoever changes or cancels the batch waits until the run is there, and is refused then.
   */
  async takeForRun(actor: Actor, batch: BatchForRun, transaction: Transaction): Promise<RunSheet> {
    const { row, run } = await this.lock(actor.houseId, batch.id, transaction);
    if (row.cancelledAtMs !== null)
      throw new ProblemError('batch-not-planned', 'It was cancelled. Bring it back, then start its run.');
    if (run && run.outcome !== 'abandoned')
      throw new ProblemError('batch-already-running', 'Open the run that is there.');
    const sheet = row.sheet ?? this.recipes.sheetOf(batch.revision, batch.altitudeM);
    // From here on its plan shows what was brewed by, wherever the house moves to.
    await row.update({ sheet }, { transaction });
    await this.stores.useReserved(actor, batch, transaction);
    return sheet;
  }

  /** What it is brewed by and what is weighed for it: before the start as planned, afterwards as it was. */
  async plan(houseId: string, id: string): Promise<BatchPlan> {
    const row = await inHouse(this.batches, houseId).get(id, 'batch');
    const [revision, { altitudeM }, lots] = await Promise.all([
      this.recipes.getRevision(houseId, row.revisionId),
      this.houses.get(houseId),
      this.stores.linesOf(houseId, id),
    ]);
    return {
      batchId: id,
      sheet: row.sheet ?? this.recipes.sheetOf(revision, altitudeM),
      sheetVersion: row.sheetVersion,
      weighOut: weighOutOf(revision.document, lots),
    };
  }

  /** A sheet of its own, in place of the one that follows from the revision. */
  async updateSheet(actor: Actor, id: string, { sheet, sheetVersion }: UpdateBatchSheet): Promise<BatchPlan> {
    await inTransaction(this.sequelize, async (transaction) => {
      const row = await this.lockPlanned(actor.houseId, id, transaction);
      if (row.sheetVersion !== sheetVersion)
        throw new ProblemError('changed-meanwhile', 'Somebody else changed this sheet. Load it again, then change it.');
      refuseBrokenSheet(sheet, row.volumeL);
      await row.update({ sheet, sheetVersion: sheetVersion + 1 }, { transaction });
      await this.audit.recordAct(actor, 'batch.sheet-changed', id, { sheetVersion: sheetVersion + 1 }, transaction);
    });
    return this.plan(actor.houseId, id);
  }

  /** Calls a planned batch off. It keeps its number, and gives back what it had set aside. */
  async cancel(actor: Actor, id: string): Promise<void> {
    await inTransaction(this.sequelize, async (transaction) => {
      const row = await this.lockPlanned(actor.houseId, id, transaction);
      await row.update({ cancelledAtMs: this.clock.nowMs() }, { transaction });
      await this.stores.release(actor.houseId, id, transaction);
      await this.audit.recordAct(actor, 'batch.cancelled', id, {}, transaction);
    });
  }

  /** Brings a cancelled batch back, with what of its lots is still there. One that was not cancelled stays as it is. */
  async restore(actor: Actor, id: string): Promise<BatchAnswer> {
    await inTransaction(this.sequelize, async (transaction) => {
      const { row } = await this.lock(actor.houseId, id, transaction);
      if (row.cancelledAtMs === null) return;
      await row.update({ cancelledAtMs: null }, { transaction });
      await this.stores.reserveAgain(actor.houseId, id, transaction);
      await this.audit.recordAct(actor, 'batch.restored', id, {}, transaction);
    });
    return this.get(actor.houseId, id);
  }

  /** The batch with its run, held until the transaction ends. */
  private async lock(houseId: string, id: string, transaction: Transaction) {
    const row = await inHouse(this.batches, houseId).get(id, 'batch', { transaction, lock: transaction.LOCK.UPDATE });
    const run = (await this.runSummaries.ofBatches(houseId, [id], transaction)).get(id) ?? null;
    return { row, run };
  }

  private async lockPlanned(houseId: string, id: string, transaction: Transaction): Promise<Batch> {
    const { row, run } = await this.lock(houseId, id, transaction);
    const status = statusOf(row, run);
    if (status !== 'planned') throw new ProblemError('batch-not-planned', notPlanned[status]);
    return row;
  }

  /** Looks at every id before anything is refused, so that all that is wrong is said at once. */
  private async checkParts(houseId: string, values: Omit<BatchValues, 'mayGoBelowZero'>): Promise<NamedRevision> {
    const { revisionId, kettleId, chillerId, kegId, probeId, reserve } = values;
    const [revision, equipment, probe] = await Promise.all([
      this.recipes.findRevision(houseId, revisionId),
      this.equipment.findMany(houseId, [kettleId, kegId, ...(chillerId === null ? [] : [chillerId])]),
      probeId === null ? null : this.probes.find(houseId, probeId),
    ]);
    const errors: { pointer: string; detail: string }[] = [];
    const miss = (pointer: string, detail: string) => errors.push({ pointer, detail });
    const isUsable = (id: string, kind: Equipment['kind']) => {
      const found = equipment.get(id);
      return found !== undefined && found.kind === kind && !found.isRemoved;
    };
    if (!revision) miss('/revisionId', 'There is no such revision.');
    if (!isUsable(kettleId, 'kettle')) miss('/kettleId', 'There is no such kettle.');
    if (chillerId !== null && !isUsable(chillerId, 'chiller')) miss('/chillerId', 'There is no such chiller.');
    if (!isUsable(kegId, 'keg')) miss('/kegId', 'There is no such keg.');
    if (probeId !== null && (!probe || probe.isSimulated || probe.revokedAtMs !== null))
      miss('/probeId', 'There is no such probe.');
    const additions = new Set(revision?.document.additions.map(({ id }) => id));
    for (const [index, { additionId }] of reserve.entries())
      if (revision && !additions.has(additionId))
        miss(`/reserve/${index}/additionId`, 'The recipe has no such addition.');
    if (!revision || errors.length > 0)
      throw new ProblemError('not-valid', 'The batch names something that is not there.', { errors });
    return revision;
  }

  private async lastNumber(houseId: string, year: number, transaction: Transaction): Promise<number> {
    const last = await inHouse(this.batches, houseId).findOne(
      { year },
      { order: [['numberInYear', 'DESC']], transaction },
    );
    return last?.numberInYear ?? 0;
  }

  private async present(houseId: string, rows: Batch[]): Promise<BatchAnswer[]> {
    const [revisions, runs] = await Promise.all([
      this.recipes.findRevisions(houseId, [...new Set(rows.map(({ revisionId }) => revisionId))]),
      this.runSummaries.ofBatches(
        houseId,
        rows.map(({ id }) => id),
      ),
    ]);
    return rows.map((row) => presentBatch(row, revisions.get(row.revisionId), runs.get(row.id) ?? null));
  }
}

const notPlanned = {
  running: 'Its run has begun. What has to change now is changed on the run sheet.',
  finished: 'Its run is finished. Plan another batch of this recipe.',
  abandoned: 'Its run was given up. Start it again as it is, or plan another batch of this recipe.',
  cancelled: 'It was cancelled. Bring it back first.',
} as const satisfies Record<Exclude<BatchAnswer['status'], 'planned'>, string>;

function refuseBrokenSheet(sheet: RunSheet, volumeL: number): void {
  const errors = checkSheet(sheet).map(({ stepId, detail }) => {
    const index = sheet.steps.findIndex(({ id }) => id === stepId);
    // What is lost has no step to say it at.
    return { pointer: index === -1 ? '/sheet/steps' : `/sheet/steps/${index}`, detail };
  });
  if (sheet.volumeL !== volumeL)
    errors.push({ pointer: '/sheet/volumeL', detail: `The batch was planned for ${volumeL} L and stays so.` });
  if (errors.length > 0) throw new ProblemError('not-valid', 'This sheet would not work on the day.', { errors });
}

function statusOf({ cancelledAtMs }: Batch, run: RunSummary | null): BatchAnswer['status'] {
  if (cancelledAtMs !== null) return 'cancelled';
  if (!run) return 'planned';
  return run.status === 'running' ? 'running' : (run.outcome ?? 'abandoned');
}

function presentBatch(row: Batch, revision: NamedRevision | undefined, run: RunSummary | null): BatchAnswer {
  const { id, batchNumber, revisionId, plannedOn, volumeL, kettleId, chillerId, kegId, probeId } = row;
  return {
    id,
    batchNumber,
    recipeId: revision?.recipeId ?? '',
    recipeName: revision?.recipeName ?? '',
    revisionId,
    revisionNumber: revision?.number ?? 0,
    plannedOn,
    status: statusOf(row, run),
    volumeL,
    run,
    kettleId,
    chillerId,
    kegId,
    probeId,
  };
}
