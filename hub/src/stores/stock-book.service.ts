import { Injectable } from '@nestjs/common';
import { InjectModel } from '@nestjs/sequelize';
import { ProblemError } from '@steepfall/shared/problems';
import { col, fn, type FindOptions, type Transaction } from 'sequelize';
import { Clock } from '../common/clock.js';
import { inHouse } from '../common/house-scope/in-house.js';
import { newId } from '../common/ids.js';
import { LotMove } from './models/lot-move.model.js';
import { LotReservation } from './models/lot-reservation.model.js';
import { Lot } from './models/lot.model.js';

export interface Balance {
  /** Sum of the ledger; below zero when more was used than the book knows of. */
  stockG: number;
  /** Set aside for batches that are planned. */
  reservedG: number;
}

export interface HeldLot extends Balance {
  lot: Lot;
}

/** A line that is to be written. */
export interface NewMove {
  lotId: string;
  kind: LotMove['kind'];
  massG: number;
  reason: string;
  batchId?: string;
  batchNumber?: string;
  additionId?: string;
  undoesId?: string;
}

/** What a scale in a kitchen shows at best: the book goes no finer. */
export const inMilligrams = (massG: number): number => Math.round(massG * 1000) / 1000;
export const gramsInWords = (massG: number): string => `${inMilligrams(massG)} g`;

export const EMPTY: Balance = { stockG: 0, reservedG: 0 };

/** The ledger of the lots, and what of it is set aside. Sums are made by the database. */
@Injectable()
export class StockBook {
  constructor(
    @InjectModel(Lot) private readonly lots: typeof Lot,
    @InjectModel(LotMove) private readonly moves: typeof LotMove,
    @InjectModel(LotReservation) private readonly reservations: typeof LotReservation,
    private readonly clock: Clock,
  ) {}

  /** What lots hold, for showing; of the whole house when none are named. */
  async balances(houseId: string, lotIds?: string[]): Promise<Map<string, Balance>> {
    return this.sums(houseId, lotIds, {});
  }

  /**
   * Holds lots until the transaction ends and says what is in them: whoever decides by the stock waits here in line. Lots that are not there
   * are left out. In the order of their ids, so that two who want the same lots wait for each other one way only.
   */
  async hold(houseId: string, lotIds: readonly string[], transaction: Transaction): Promise<Map<string, HeldLot>> {
    const ids = [...new Set(lotIds)].sort();
    const rows = await inHouse(this.lots, houseId).findAll(
      { id: ids },
      { order: [['id', 'ASC']], transaction, lock: transaction.LOCK.UPDATE },
    );
    // Reads that lock see what is committed now; a plain one would see the stock as of the start of the caller's transaction.
    const sums = await this.sums(houseId, ids, { transaction, lock: transaction.LOCK.SHARE });
    return new Map(rows.map((lot) => [lot.id, { lot, ...(sums.get(lot.id) ?? EMPTY) }]));
  }

  async holdOne(houseId: string, lotId: string, transaction: Transaction): Promise<HeldLot> {
    const held = (await this.hold(houseId, [lotId], transaction)).get(lotId);
    if (!held || held.lot.removedAtMs !== null) throw new ProblemError('not-found', 'There is no such lot.');
    return held;
  }

  async write(
    { houseId, memberId }: { houseId: string; memberId: string },
    lines: readonly NewMove[],
    transaction: Transaction,
  ): Promise<void> {
    const atMs = this.clock.nowMs();
    await inHouse(this.moves, houseId).bulkCreate(
      lines.map((line) => ({ id: newId(), ...line, atMs, madeBy: memberId })),
      { transaction },
    );
  }

  private async sums(
    houseId: string,
    lotIds: string[] | undefined,
    options: Pick<FindOptions, 'transaction' | 'lock'>,
  ): Promise<Map<string, Balance>> {
    const ofLots = lotIds === undefined ? {} : { lotId: lotIds };
    const moved = await inHouse(this.moves, houseId).findAll(ofLots, { ...sumByLot, ...options });
    const reserved = await inHouse(this.reservations, houseId).findAll(
      { ...ofLots, releasedAtMs: null },
      { ...sumByLot, ...options },
    );
    const balances = new Map<string, Balance>();
    for (const { lotId, massG } of moved) balances.set(lotId, { stockG: Number(massG), reservedG: 0 });
    for (const { lotId, massG } of reserved)
      balances.set(lotId, { ...(balances.get(lotId) ?? EMPTY), reservedG: Number(massG) });
    return balances;
  }
}

const sumByLot: { attributes: FindOptions['attributes'] & object; group: string[]; raw: true } = {
  attributes: ['lotId', [fn('SUM', col('mass_g')), 'massG']],
  group: ['lot_id'],
  raw: true,
};
