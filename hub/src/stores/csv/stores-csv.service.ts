import { Injectable } from '@nestjs/common';
import { InjectConnection, InjectModel } from '@nestjs/sequelize';
import type { ImportedStores, ImportPreview, ImportStores } from '@steepfall/shared/contracts';
import { ProblemError } from '@steepfall/shared/problems';
import { storesColumns, storesRowOf } from '@steepfall/shared/stores';
import { stringify } from 'csv-stringify/sync';
import type { Transaction } from 'sequelize';
import { Sequelize } from 'sequelize-typescript';
import { AuditService } from '../../audit/audit.service.js';
import type { Actor } from '../../common/access/actor.js';
import { Clock } from '../../common/clock.js';
import { inHouse } from '../../common/house-scope/in-house.js';
import { newId } from '../../common/ids.js';
import { inTransaction } from '../../database/retry-transaction.js';
import { HousesService } from '../../houses/houses.service.js';
import { Ingredient } from '../models/ingredient.model.js';
import { Lot } from '../models/lot.model.js';
import { columnsOf, factsOf } from '../present-stores.js';
import { ShelfService } from '../shelf.service.js';
import { StockBook } from '../stock-book.service.js';
import { ingredientKey, planImport, type KnownIngredient, type PlannedRow } from './plan-import.js';
import { readTable } from './read-table.js';

/** Rows in one statement: below the packet size of any server. */
const ROWS_A_STATEMENT = 1000;
const MOST_ERRORS = 50;

type Brought = NonNullable<PlannedRow['brings']>;

/** The stores as a file: in, with a look before, and out. */
@Injectable()
export class StoresCsvService {
  constructor(
    @InjectModel(Ingredient) private readonly ingredients: typeof Ingredient,
    @InjectModel(Lot) private readonly lots: typeof Lot,
    @InjectConnection() private readonly sequelize: Sequelize,
    private readonly shelf: ShelfService,
    private readonly book: StockBook,
    private readonly houses: HousesService,
    private readonly audit: AuditService,
    private readonly clock: Clock,
  ) {}

  /** What each row would do. Rows that are skipped on purpose count neither as good nor as bad. */
  async preview(houseId: string, { csv, skipRows }: ImportStores): Promise<ImportPreview> {
    const table = readTable(csv);
    const rows = planImport(table, await this.known(houseId), new Set(skipRows));
    const bad = badOf(rows);
    const goodCount = rows.filter(({ isSkipped }) => !isSkipped).length - bad.length;
    return { rows: rows.map(({ shown }) => shown), badCount: bad.length, goodCount };
  }

  /** All rows or none. */
  async import(actor: Actor, { csv, skipRows }: ImportStores): Promise<ImportedStores> {
    const table = readTable(csv);
    return inTransaction(this.sequelize, async (transaction) => {
      // Two files at once: the second sees what the first brought.
      await this.houses.lock(actor.houseId, transaction);
      const known = await this.known(actor.houseId, transaction);
      const rows = planImport(table, known, new Set(skipRows));
      refuseBad(badOf(rows));
      const brought = rows.flatMap(({ brings }) => (brings ? [brings] : []));
      const counts = await this.store(actor, known, brought, transaction);
      const imported = { ...counts, skippedCount: rows.filter(({ isSkipped }) => isSkipped).length };
      const { houseId, memberId } = actor;
      await this.audit.record(
        { houseId, memberId, action: 'stores.imported', subject: houseId, facts: imported },
        transaction,
      );
      return imported;
    });
  }

  /** Every lot with something in it, and ingredients without one. */
  async export(houseId: string): Promise<string> {
    const ingredients = await this.shelf.list(houseId, { removed: false });
    const records = ingredients.flatMap(({ facts, lots }) => {
      const filled = lots.filter(({ isRemoved, stockG }) => !isRemoved && stockG > 0);
      return filled.length === 0 ? [storesRowOf(facts, null)] : filled.map((lot) => storesRowOf(facts, lot));
    });
    return stringify(records, {
      // With it spreadsheets read letters with accents as what they are.
      bom: true,
      header: true,
      columns: storesColumns.map(({ name }) => ({ key: name })),
      record_delimiter: 'windows',
    });
  }

  private async known(houseId: string, transaction?: Transaction): Promise<KnownIngredient[]> {
    const ingredients = await inHouse(this.ingredients, houseId).findAll({ removedAtMs: null }, { transaction });
    const lots = await inHouse(this.lots, houseId).findAll(
      { removedAtMs: null },
      { attributes: ['ingredientId', 'code'], transaction },
    );
    const codes = new Map(ingredients.map(({ id }) => [id, [] as string[]]));
    for (const { ingredientId, code } of lots) codes.get(ingredientId)?.push(code);
    return ingredients.map((row) => ({ id: row.id, facts: factsOf(row), lotCodes: codes.get(row.id) ?? [] }));
  }

  private async store(
    actor: Actor,
    known: readonly KnownIngredient[],
    brought: readonly Brought[],
    transaction: Transaction,
  ): Promise<{ ingredientCount: number; lotCount: number }> {
    const createdAtMs = this.clock.nowMs();
    const ids = new Map(known.map(({ id, facts }) => [ingredientKey(facts), id]));
    const ingredients = brought.flatMap(({ key, facts }) => {
      if (ids.has(key)) return [];
      const id = newId();
      ids.set(key, id);
      return [{ id, ...columnsOf(facts), createdAtMs }];
    });
    const received = brought.flatMap(({ key, lot }) => (lot ? [{ id: newId(), key, ...lot }] : []));
    const { houseId } = actor;
    for (const part of parts(ingredients)) await inHouse(this.ingredients, houseId).bulkCreate(part, { transaction });
    for (const part of parts(received)) {
      await inHouse(this.lots, houseId).bulkCreate(
        part.map(({ id, key, facts }) => ({ id, ingredientId: ids.get(key) ?? '', ...facts, createdAtMs })),
        { transaction },
      );
      const line = { kind: 'received', reason: 'Imported from a file' } as const;
      await this.book.write(
        actor,
        part.map(({ id, massG }) => ({ ...line, lotId: id, massG })),
        transaction,
      );
    }
    return { ingredientCount: ingredients.length, lotCount: received.length };
  }
}

const badOf = (rows: readonly PlannedRow[]) =>
  rows.filter(({ shown, isSkipped }) => !isSkipped && shown.problems.length > 0);

function refuseBad(bad: readonly PlannedRow[]): void {
  if (bad.length === 0) return;
  const errors = bad
    .flatMap(({ shown: { row, problems } }) =>
      problems.map(({ column, detail }) => ({ pointer: '/csv', detail: `Row ${row}, ${column}: ${detail}` })),
    )
    .slice(0, MOST_ERRORS);
  const rows = bad.length === 1 ? 'One row does' : `${bad.length} rows do`;
  throw new ProblemError('not-valid', `${rows} not fit, so nothing was imported. Mend them, or skip them on purpose.`, {
    errors,
  });
}

function parts<Row>(rows: readonly Row[]): Row[][] {
  const count = Math.ceil(rows.length / ROWS_A_STATEMENT);
  return Array.from({ length: count }, (_, index) =>
    rows.slice(index * ROWS_A_STATEMENT, (index + 1) * ROWS_A_STATEMENT),
  );
}
