import { Injectable } from '@nestjs/common';
import { InjectConnection, InjectModel } from '@nestjs/sequelize';
import type { Batch as BatchAnswer, CreateBatch, Equipment, RunSummary } from '@steepfall/shared/contracts';
import { ProblemError } from '@steepfall/shared/problems';
import type { Transaction } from 'sequelize';
import { Sequelize } from 'sequelize-typescript';
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
import { formatBatchNumber } from './batch-number.js';
import { Batch } from './models/batch.model.js';

type Kettle = Extract<Equipment, { kind: 'kettle' }>;
type Chiller = Extract<Equipment, { kind: 'chiller' }>;
type Keg = Extract<Equipment, { kind: 'keg' }>;

/** Everything a run of this batch starts from. */
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
    private readonly audit: AuditService,
    private readonly clock: Clock,
  ) {}

  /** The newest day first, and on one day the highest number. */
  async list(houseId: string): Promise<BatchAnswer[]> {
    const rows = await inHouse(this.batches, houseId).findAll(
      {},
      {
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

  async create(actor: Actor, values: CreateBatch): Promise<BatchAnswer> {
    const { houseId, memberId } = actor;
    const revision = await this.checkParts(houseId, values);
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
      await this.audit.record(
        { houseId, memberId, action: 'batch.planned', subject: batch.id, facts: values },
        transaction,
      );
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

  /** Looks at every id before anything is refused, so that all that is wrong is said at once. */
  private async checkParts(houseId: string, values: CreateBatch): Promise<NamedRevision> {
    const { revisionId, kettleId, chillerId, kegId, probeId } = values;
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
