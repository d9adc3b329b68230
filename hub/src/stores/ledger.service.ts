import { Injectable } from '@nestjs/common';
import { InjectConnection, InjectModel } from '@nestjs/sequelize';
import type { Ingredient as IngredientAnswer, LotMove as LotMoveAnswer, MoveLot } from '@steepfall/shared/contracts';
import { ProblemError } from '@steepfall/shared/problems';
import { Sequelize } from 'sequelize-typescript';
import { AuditService } from '../audit/audit.service.js';
import type { Actor } from '../common/access/actor.js';
import { inHouse } from '../common/house-scope/in-house.js';
import { inTransaction } from '../database/retry-transaction.js';
import { MembersService } from '../members/members.service.js';
import { LotMove } from './models/lot-move.model.js';
import { Lot } from './models/lot.model.js';
import { ShelfService } from './shelf.service.js';
import { gramsInWords, inMilligrams, StockBook, type HeldLot, type NewMove } from './stock-book.service.js';

/** Lines that people write into the book of a lot, and take back. */
@Injectable()
export class LedgerService {
  constructor(
    @InjectModel(Lot) private readonly lots: typeof Lot,
    @InjectModel(LotMove) private readonly moves: typeof LotMove,
    @InjectConnection() private readonly sequelize: Sequelize,
    private readonly book: StockBook,
    private readonly shelf: ShelfService,
    private readonly members: MembersService,
    private readonly audit: AuditService,
  ) {}

  /** The newest first. */
  async list(houseId: string, lotId: string): Promise<LotMoveAnswer[]> {
    await inHouse(this.lots, houseId).get(lotId, 'lot');
    const newestFirst = [
      ['atMs', 'DESC'],
      ['id', 'DESC'],
    ] as [string, string][];
    const [rows, names] = await Promise.all([
      inHouse(this.moves, houseId).findAll({ lotId }, { order: newestFirst }),
      this.members.displayNames(houseId),
    ]);
    const undone = new Set(rows.map(({ undoesId }) => undoesId));
    return rows.map(({ id, kind, massG, reason, batchId, batchNumber, atMs, madeBy }) => {
      const line = { id, lotId, kind, massG, reason, batchId, batchNumber, atMs };
      return { ...line, by: names.get(madeBy) ?? 'somebody', isUndone: undone.has(id) };
    });
  }

  async move(actor: Actor, lotId: string, move: MoveLot): Promise<IngredientAnswer> {
    const ingredientId = await inTransaction(this.sequelize, async (transaction) => {
      const held = await this.book.holdOne(actor.houseId, lotId, transaction);
      const line = move.kind === 'counted' ? countedLine(held, move) : usedLine(held, move);
      await this.book.write(actor, [line], transaction);
      await this.audit.recordAct(
        actor,
        `lot.${move.kind}`,
        lotId,
        { massG: line.massG, reason: line.reason },
        transaction,
      );
      return held.lot.ingredientId;
    });
    return this.shelf.get(actor.houseId, ingredientId);
  }

  /** Takes a line back by one that says the opposite: both stay in the book. */
  async undo(actor: Actor, moveId: string): Promise<IngredientAnswer> {
    const { houseId } = actor;
    const { lotId } = await inHouse(this.moves, houseId).get(moveId, 'line');
    const ingredientId = await inTransaction(this.sequelize, async (transaction) => {
      const held = await this.book.holdOne(houseId, lotId, transaction);
      const [move, counter] = await Promise.all([
        inHouse(this.moves, houseId).get(moveId, 'line', { transaction }),
        inHouse(this.moves, houseId).findOne({ undoesId: moveId }, { transaction, lock: true }),
      ]);
      if (counter) throw new ProblemError('nothing-to-undo', 'This line was taken back already.');
      const line = counterLine(held, move);
      await this.book.write(actor, [line], transaction);
      await this.audit.recordAct(actor, 'lot.undone', lotId, { moveId, massG: line.massG }, transaction);
      return held.lot.ingredientId;
    });
    return this.shelf.get(houseId, ingredientId);
  }
}

function countedLine({ lot, stockG }: HeldLot, { toG, reason }: Extract<MoveLot, { kind: 'counted' }>): NewMove {
  return { lotId: lot.id, kind: 'adjusted', massG: inMilligrams(toG - stockG), reason };
}

function usedLine({ lot, stockG }: HeldLot, move: Extract<MoveLot, { kind: 'used' }>): NewMove {
  const massG = inMilligrams(move.massG);
  if (massG === 0) throw pointed('not-valid', 'One field does not fit.', 'A mass of 0.001 g or more.');
  if (massG > stockG && !move.mayGoBelowZero)
    throw pointed(
      'not-enough-stock',
      'Take less or count what is there. If it was used all the same, send "mayGoBelowZero": true.',
      `Lot ${lot.code} holds ${gramsInWords(stockG)}.`,
    );
  return { lotId: lot.id, kind: 'used', massG: -massG, reason: move.reason };
}

function counterLine({ lot, stockG }: HeldLot, move: LotMove): NewMove {
  if (move.batchId !== null) throw new ProblemError('nothing-to-undo', 'A batch used this. Count the lot instead.');
  if (move.kind === 'undone')
    throw new ProblemError('nothing-to-undo', 'This line took another one back. Write it anew instead.');
  const massG = 0 - move.massG;
  if (massG < 0 && stockG + massG < 0)
    throw new ProblemError(
      'not-enough-stock',
      `Lot ${lot.code} holds ${gramsInWords(stockG)}, less than this line brought. Take the later lines back first, or count the lot.`,
    );
  return { lotId: lot.id, kind: 'undone', massG, reason: '', undoesId: move.id };
}

function pointed(type: 'not-valid' | 'not-enough-stock', todo: string, detail: string): ProblemError {
  return new ProblemError(type, `${detail} ${todo}`, { errors: [{ pointer: '/massG', detail }] });
}
