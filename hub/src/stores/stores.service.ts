import { Injectable } from '@nestjs/common';
import { InjectModel } from '@nestjs/sequelize';
import type { WeighOutLine } from '@steepfall/shared/contracts';
import { ProblemError, type ProblemExtras } from '@steepfall/shared/problems';
import type { Transaction } from 'sequelize';
import { Clock } from '../common/clock.js';
import { inHouse } from '../common/house-scope/in-house.js';
import { newId } from '../common/ids.js';
import { Ingredient } from './models/ingredient.model.js';
import { LotMove } from './models/lot-move.model.js';
import { LotReservation } from './models/lot-reservation.model.js';
import { Lot } from './models/lot.model.js';
import { gramsInWords, inMilligrams, StockBook, type HeldLot } from './stock-book.service.js';

export interface ReserveLine {
  additionId: string;
  lotId: string;
  massG: number;
}

/** What a batch takes from a lot for one addition. */
export type BatchLotLine = WeighOutLine['lots'][number] & { additionId: string };

/** What batches ask of the stores: set aside, give back, use. */
@Injectable()
export class StoresService {
  constructor(
    @InjectModel(Lot) private readonly lots: typeof Lot,
    @InjectModel(LotMove) private readonly moves: typeof LotMove,
    @InjectModel(LotReservation) private readonly reservations: typeof LotReservation,
    private readonly book: StockBook,
    private readonly clock: Clock,
  ) {}

  /** Sets lots aside for a batch that is being planned: all lines or none. */
  async reserve(
    houseId: string,
    batchId: string,
    lines: readonly ReserveLine[],
    { mayGoBelowZero }: { mayGoBelowZero: boolean },
    transaction: Transaction,
  ): Promise<void> {
    if (lines.length === 0) return;
    const held = await this.book.hold(houseId, idsOf(lines), transaction);
    refuse('not-valid', 'The batch asks for lots that are not there.', unknownLots(lines, held));
    if (!mayGoBelowZero)
      refuse('not-enough-stock', 'Take less, take another lot, or say that it may go below zero.', short(lines, held));
    const createdAtMs = this.clock.nowMs();
    await inHouse(this.reservations, houseId).bulkCreate(
      merged(lines).map((line) => ({ id: newId(), batchId, ...line, createdAtMs })),
      { transaction },
    );
  }

  /** The batch was cancelled: what it had set aside is free again. */
  async release(houseId: string, batchId: string, transaction: Transaction): Promise<void> {
    await inHouse(this.reservations, houseId).update(
      { batchId, releasedAtMs: null },
      { releasedAtMs: this.clock.nowMs() },
      { transaction },
    );
  }

  /** The batch was restored: sets aside again what is still there, less where it has to be. */
  async reserveAgain(houseId: string, batchId: string, transaction: Transaction): Promise<void> {
    const rows = await this.standing(houseId, batchId, transaction, { released: true });
    const held = await this.book.hold(houseId, idsOf(rows), transaction);
    const free = freeOf(held);
    for (const row of rows) {
      const massG = Math.min(Number(row.massG), Math.max(0, free.get(row.lotId) ?? 0));
      if (massG <= 0) continue;
      free.set(row.lotId, inMilligrams((free.get(row.lotId) ?? 0) - massG));
      await row.update({ massG, releasedAtMs: null }, { transaction });
    }
  }

  /** The run started: what was set aside becomes lines of the ledger. Never refuses: it is in the bags already. */
  async useReserved(
    actor: { houseId: string; memberId: string },
    batch: { id: string; batchNumber: string },
    transaction: Transaction,
  ): Promise<void> {
    const rows = await this.standing(actor.houseId, batch.id, transaction, { released: false });
    if (rows.length === 0) return;
    await this.book.hold(actor.houseId, idsOf(rows), transaction);
    const use = { kind: 'used', reason: '', batchId: batch.id, batchNumber: batch.batchNumber } as const;
    await this.book.write(
      actor,
      rows.map(({ lotId, additionId, massG }) => ({ ...use, lotId, additionId, massG: -massG })),
      transaction,
    );
    await inHouse(this.reservations, actor.houseId).destroy({ id: rows.map(({ id }) => id) }, { transaction });
  }

  /** What a batch has set aside, or has used. */
  async linesOf(houseId: string, batchId: string): Promise<BatchLotLine[]> {
    const [reserved, used] = await Promise.all([
      inHouse(this.reservations, houseId).findAll({ batchId, releasedAtMs: null }, { order: [['id', 'ASC']] }),
      inHouse(this.moves, houseId).findAll({ batchId, kind: 'used' }, { order: [['id', 'ASC']] }),
    ]);
    const lots = await inHouse(this.lots, houseId).findAll(
      { id: idsOf([...reserved, ...used]) },
      { include: [Ingredient] },
    );
    const known = new Map(lots.map((lot) => [lot.id, lot]));
    const line = (row: LotReservation | LotMove, state: BatchLotLine['state']): BatchLotLine => {
      const lot = known.get(row.lotId);
      return {
        additionId: row.additionId ?? '',
        lotId: row.lotId,
        code: lot?.code ?? '',
        ingredientName: lot?.ingredient?.name ?? '',
        massG: Math.abs(row.massG),
        pricePerKg: lot?.pricePerKg ?? null,
        state,
      };
    };
    return [...reserved.map((row) => line(row, 'reserved')), ...used.map((row) => line(row, 'used'))];
  }

  private standing(
    houseId: string,
    batchId: string,
    transaction: Transaction,
    { released }: { released: boolean },
  ): Promise<LotReservation[]> {
    return inHouse(this.reservations, houseId)
      .findAll({ batchId }, { order: [['id', 'ASC']], transaction, lock: transaction.LOCK.UPDATE })
      .then((rows) => rows.filter(({ releasedAtMs }) => (releasedAtMs !== null) === released));
  }
}

const idsOf = (lines: readonly { lotId: string }[]) => lines.map(({ lotId }) => lotId);

type FieldErrors = NonNullable<ProblemExtras['errors']>;

function refuse(type: 'not-valid' | 'not-enough-stock', detail: string, errors: FieldErrors): void {
  if (errors.length > 0) throw new ProblemError(type, detail, { errors });
}

function unknownLots(lines: readonly ReserveLine[], held: Map<string, HeldLot>): FieldErrors {
  return lines.flatMap(({ lotId }, index) => {
    const lot = held.get(lotId)?.lot;
    const isThere = lot !== undefined && lot.removedAtMs === null;
    return isThere ? [] : [{ pointer: `/reserve/${index}/lotId`, detail: 'There is no such lot.' }];
  });
}

const freeOf = (held: Map<string, HeldLot>) =>
  new Map([...held].map(([id, { stockG, reservedG }]) => [id, inMilligrams(stockG - reservedG)]));

/** Lines that ask for more than their lot has left after the lines before. */
function short(lines: readonly ReserveLine[], held: Map<string, HeldLot>): FieldErrors {
  const free = freeOf(held);
  return lines.flatMap(({ lotId, massG }, index) => {
    const there = free.get(lotId) ?? 0;
    free.set(lotId, inMilligrams(there - inMilligrams(massG)));
    if (inMilligrams(massG) <= there) return [];
    const code = held.get(lotId)?.lot.code ?? '';
    const detail = `Lot ${code} has ${gramsInWords(Math.max(0, there))} free.`;
    return [{ pointer: `/reserve/${index}/massG`, detail }];
  });
}

/** One row for an addition and a lot, also when it was asked for in two lines. */
function merged(lines: readonly ReserveLine[]): ReserveLine[] {
  const rows = new Map<string, ReserveLine>();
  for (const { additionId, lotId, massG } of lines) {
    const key = JSON.stringify([additionId, lotId]);
    rows.set(key, { additionId, lotId, massG: inMilligrams((rows.get(key)?.massG ?? 0) + massG) });
  }
  return [...rows.values()];
}
