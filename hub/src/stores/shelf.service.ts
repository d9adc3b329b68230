import { Injectable } from '@nestjs/common';
import { InjectConnection, InjectModel } from '@nestjs/sequelize';
import type {
  CreateIngredient,
  Ingredient as IngredientAnswer,
  Lot as LotAnswer,
  ReceiveLot,
  UpdateIngredient,
  UpdateLot,
} from '@steepfall/shared/contracts';
import { ProblemError } from '@steepfall/shared/problems';
import type { LotFacts } from '@steepfall/shared/stores';
import { Op, UniqueConstraintError, type Transaction, type WhereOptions } from 'sequelize';
import { Sequelize } from 'sequelize-typescript';
import { AuditService } from '../audit/audit.service.js';
import type { Actor } from '../common/access/actor.js';
import { Clock } from '../common/clock.js';
import { inHouse } from '../common/house-scope/in-house.js';
import { newId } from '../common/ids.js';
import { inTransaction } from '../database/retry-transaction.js';
import { Ingredient } from './models/ingredient.model.js';
import { Lot } from './models/lot.model.js';
import { columnsOf, presentIngredient, presentLot } from './present-stores.js';
import { EMPTY, inMilligrams, StockBook } from './stock-book.service.js';

/** The ingredients of a house and their lots. */
@Injectable()
export class ShelfService {
  constructor(
    @InjectModel(Ingredient) private readonly ingredients: typeof Ingredient,
    @InjectModel(Lot) private readonly lots: typeof Lot,
    @InjectConnection() private readonly sequelize: Sequelize,
    private readonly book: StockBook,
    private readonly audit: AuditService,
    private readonly clock: Clock,
  ) {}

  list(houseId: string, { removed }: { removed: boolean }): Promise<IngredientAnswer[]> {
    return this.find(houseId, { removedAtMs: removed ? { [Op.ne]: null } : null });
  }

  async get(houseId: string, id: string): Promise<IngredientAnswer> {
    const [found] = await this.find(houseId, { id });
    if (!found) throw noIngredient();
    return found;
  }

  async create(actor: Actor, { facts }: CreateIngredient): Promise<IngredientAnswer> {
    const id = newId();
    await this.change(nameTaken(facts.name), async (transaction) => {
      await inHouse(this.ingredients, actor.houseId).create(
        { id, ...columnsOf(facts), createdAtMs: this.clock.nowMs() },
        { transaction },
      );
      await this.audit.recordAct(actor, 'ingredient.added', id, facts, transaction);
    });
    return this.get(actor.houseId, id);
  }

  async update(actor: Actor, id: string, { facts, version }: UpdateIngredient): Promise<IngredientAnswer> {
    await this.change(nameTaken(facts.name), async (transaction) => {
      const row = await this.getKept(actor.houseId, id, transaction);
      if (row.kind !== facts.kind) throw notValid('/facts/kind', `${row.name} is of the kind "${row.kind}".`);
      if (row.version !== version) throw changedMeanwhile();
      await row.update({ ...columnsOf(facts), version: version + 1 }, { transaction });
      await this.audit.recordAct(actor, 'ingredient.changed', id, facts, transaction);
    });
    return this.get(actor.houseId, id);
  }

  async remove(actor: Actor, id: string): Promise<void> {
    await inTransaction(this.sequelize, async (transaction) => {
      const row = await this.getKept(actor.houseId, id, transaction);
      await row.update({ removedAtMs: this.clock.nowMs() }, { transaction });
      await this.audit.recordAct(actor, 'ingredient.removed', id, {}, transaction);
    });
  }

  async restore(actor: Actor, id: string): Promise<IngredientAnswer> {
    const rows = inHouse(this.ingredients, actor.houseId);
    const { name } = await rows.get(id, 'ingredient');
    await this.change(nameTaken(name), async (transaction) => {
      const row = await rows.get(id, 'ingredient', { transaction, lock: true });
      if (row.removedAtMs === null) return;
      await row.update({ removedAtMs: null }, { transaction });
      await this.audit.recordAct(actor, 'ingredient.restored', id, {}, transaction);
    });
    return this.get(actor.houseId, id);
  }

  async receive(actor: Actor, ingredientId: string, { facts, massG }: ReceiveLot): Promise<IngredientAnswer> {
    const id = newId();
    await this.change(codeTaken(facts.code), async (transaction) => {
      checkHops(await this.getKept(actor.houseId, ingredientId, transaction), facts);
      if (inMilligrams(massG) === 0) throw notValid('/massG', 'A mass of 0.001 g or more.');
      await inHouse(this.lots, actor.houseId).create(
        { id, ingredientId, ...facts, createdAtMs: this.clock.nowMs() },
        { transaction },
      );
      const line = { lotId: id, kind: 'received', massG: inMilligrams(massG), reason: '' } as const;
      await this.book.write(actor, [line], transaction);
      await this.audit.recordAct(actor, 'lot.received', id, { ...facts, massG }, transaction);
    });
    return this.get(actor.houseId, ingredientId);
  }

  async updateLot(actor: Actor, id: string, { facts, version }: UpdateLot): Promise<IngredientAnswer> {
    const ingredientId = await this.change(codeTaken(facts.code), async (transaction) => {
      const row = await this.getKeptLot(actor.houseId, id, transaction);
      checkHops(await this.ingredientOf(row, transaction), facts);
      if (row.version !== version) throw changedMeanwhile();
      await row.update({ ...facts, version: version + 1 }, { transaction });
      await this.audit.recordAct(actor, 'lot.changed', id, facts, transaction);
      return row.ingredientId;
    });
    return this.get(actor.houseId, ingredientId);
  }

  async removeLot(actor: Actor, id: string): Promise<void> {
    await inTransaction(this.sequelize, async (transaction) => {
      const row = await this.getKeptLot(actor.houseId, id, transaction);
      await row.update({ removedAtMs: this.clock.nowMs() }, { transaction });
      await this.audit.recordAct(actor, 'lot.removed', id, {}, transaction);
    });
  }

  async restoreLot(actor: Actor, id: string): Promise<IngredientAnswer> {
    const rows = inHouse(this.lots, actor.houseId);
    const { code, ingredientId } = await rows.get(id, 'lot');
    await this.change(codeTaken(code), async (transaction) => {
      const row = await rows.get(id, 'lot', { transaction, lock: true });
      if (row.removedAtMs === null) return;
      await row.update({ removedAtMs: null }, { transaction });
      await this.audit.recordAct(actor, 'lot.restored', id, {}, transaction);
    });
    return this.get(actor.houseId, ingredientId);
  }

  private async find(houseId: string, where: WhereOptions<Ingredient>): Promise<IngredientAnswer[]> {
    const byName = [
      ['kind', 'ASC'],
      ['name', 'ASC'],
      ['id', 'ASC'],
    ] as [string, string][];
    const ingredients = await inHouse(this.ingredients, houseId).findAll(where, { order: byName });
    const lots = await inHouse(this.lots, houseId).findAll(
      { ingredientId: ingredients.map(({ id }) => id) },
      { order: firstToUse },
    );
    const balances = await this.book.balances(
      houseId,
      lots.map(({ id }) => id),
    );
    const lotsOf = new Map(ingredients.map(({ id }) => [id, [] as LotAnswer[]]));
    for (const lot of lots) lotsOf.get(lot.ingredientId)?.push(presentLot(lot, balances.get(lot.id) ?? EMPTY));
    return ingredients.map((row) => presentIngredient(row, lotsOf.get(row.id) ?? []));
  }

  /** A change that can meet a name that is taken. */
  private async change<Result>(taken: ProblemError, work: (transaction: Transaction) => Promise<Result>) {
    try {
      return await inTransaction(this.sequelize, work);
    } catch (error) {
      throw error instanceof UniqueConstraintError ? taken : error;
    }
  }

  private async getKept(houseId: string, id: string, transaction: Transaction): Promise<Ingredient> {
    const row = await inHouse(this.ingredients, houseId).findOne(
      { id, removedAtMs: null },
      { transaction, lock: true },
    );
    if (!row) throw noIngredient();
    return row;
  }

  private ingredientOf({ houseId, ingredientId }: Lot, transaction: Transaction): Promise<Ingredient> {
    return inHouse(this.ingredients, houseId).get(ingredientId, 'ingredient', { transaction });
  }

  private async getKeptLot(houseId: string, id: string, transaction: Transaction): Promise<Lot> {
    const row = await inHouse(this.lots, houseId).findOne({ id, removedAtMs: null }, { transaction, lock: true });
    if (!row) throw new ProblemError('not-found', 'There is no such lot.');
    return row;
  }
}

/** What goes off first at the head, what bears no date after that; then in the order in which it came. What was removed comes last. */
const firstToUse = [
  [Sequelize.literal('removed_at_ms IS NOT NULL'), 'ASC'],
  [Sequelize.literal('best_before IS NULL'), 'ASC'],
  ['bestBefore', 'ASC'],
  ['receivedOn', 'ASC'],
  ['code', 'ASC'],
] as [string, string][];

const noIngredient = () => new ProblemError('not-found', 'There is no such ingredient.');
const changedMeanwhile = () => new ProblemError('changed-meanwhile', 'Load it again, then change it.');
const notValid = (pointer: string, detail: string) =>
  new ProblemError('not-valid', 'One field does not fit.', { errors: [{ pointer, detail }] });

function nameTaken(name: string): ProblemError {
  const detail = `There is another of this kind called "${name}". Give it another name.`;
  return new ProblemError('already-exists', detail, { errors: [{ pointer: '/facts/name', detail }] });
}

function codeTaken(code: string): ProblemError {
  const detail = `Lot ${code} of this ingredient is on the shelf already. Count that one, or type another lot number.`;
  return new ProblemError('already-exists', detail, { errors: [{ pointer: '/facts/code', detail }] });
}

function checkHops({ kind }: Ingredient, { hops }: LotFacts): void {
  if (hops !== null && kind !== 'hops') throw notValid('/facts/hops', 'Only hops have alpha acids and oil.');
}
