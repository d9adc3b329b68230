import { QueryTypes } from 'sequelize';
import type { Migration } from './list.js';

const id = (name: string, rest = 'NOT NULL') => `${name} CHAR(36) CHARACTER SET ascii COLLATE ascii_bin ${rest}`;
const atMs = (name: string, rest = 'NOT NULL') => `${name} BIGINT UNSIGNED ${rest}`;
const word = (name: string, length: number, rest = 'NOT NULL') =>
  `${name} VARCHAR(${length}) CHARACTER SET ascii COLLATE ascii_bin ${rest}`;
// Exact to the milligram: sums of grams leave no crumb, whoever adds them up.
const massG = 'mass_g DECIMAL(13,3) NOT NULL';
const table = (name: string, lines: string[]) =>
  `CREATE TABLE IF NOT EXISTS ${name} (\n${lines.join(',\n')}\n) ENGINE=InnoDB DEFAULT CHARSET=utf8mb4 COLLATE=utf8mb4_unicode_ci`;
const sameHouse = (column: string, parent: string) =>
  `FOREIGN KEY (house_id, ${column}) REFERENCES ${parent} (house_id, id)`;
const houseOwned = [
  id('id', 'NOT NULL PRIMARY KEY'),
  id('house_id'),
  'UNIQUE KEY in_house (house_id, id)',
  'FOREIGN KEY (house_id) REFERENCES houses (id)',
];
/** Names count among what is not removed: NULLs do not collide. Letters in both cases are one name, accents are not. */
const isKept = 'is_kept TINYINT AS (IF(removed_at_ms IS NULL, 1, NULL)) PERSISTENT';
const keyOf = (column: string, length: number) =>
  `${column}_key VARCHAR(${length}) CHARACTER SET utf8mb4 COLLATE utf8mb4_bin AS (LOWER(${column})) PERSISTENT`;

const statements = [
  table('attachments', [
    ...houseOwned,
    word('media_type', 40),
    'width_px INT UNSIGNED NOT NULL',
    'height_px INT UNSIGNED NOT NULL',
    'bytes MEDIUMBLOB NOT NULL',
    atMs('created_at_ms'),
    id('created_by'),
    sameHouse('created_by', 'memberships'),
  ]),
  table('ingredients', [
    ...houseOwned,
    word('kind', 20),
    'name VARCHAR(80) NOT NULL',
    'facts JSON NOT NULL',
    atMs('created_at_ms'),
    atMs('removed_at_ms', 'NULL'),
    'version INT UNSIGNED NOT NULL DEFAULT 1',
    isKept,
    keyOf('name', 80),
    'UNIQUE KEY one_name_a_kind (house_id, kind, name_key, is_kept)',
  ]),
  table('lots', [
    ...houseOwned,
    id('ingredient_id'),
    'code VARCHAR(60) NOT NULL',
    'received_on DATE NOT NULL',
    'best_before DATE NULL',
    'price_per_kg DOUBLE NULL',
    'note VARCHAR(400) NOT NULL',
    'hops JSON NULL',
    id('photo_id', 'NULL'),
    atMs('created_at_ms'),
    atMs('removed_at_ms', 'NULL'),
    'version INT UNSIGNED NOT NULL DEFAULT 1',
    isKept,
    keyOf('code', 60),
    'UNIQUE KEY one_code_an_ingredient (ingredient_id, code_key, is_kept)',
    sameHouse('ingredient_id', 'ingredients'),
    sameHouse('photo_id', 'attachments'),
  ]),
  // The ledger: lines are written once and never changed. The stock of a lot is their sum and is kept nowhere else.
  table('lot_moves', [
    ...houseOwned,
    id('lot_id'),
    word('kind', 10),
    massG,
    'reason VARCHAR(400) NOT NULL',
    id('batch_id', 'NULL'),
    word('batch_number', 20, 'NULL'),
    'addition_id VARCHAR(60) NULL',
    // The line that this one takes back: once.
    id('undoes_id', 'NULL'),
    atMs('at_ms'),
    id('made_by'),
    'UNIQUE KEY taken_back_once (undoes_id)',
    'KEY by_lot (lot_id, at_ms)',
    'KEY by_batch (house_id, batch_id)',
    sameHouse('lot_id', 'lots'),
    sameHouse('batch_id', 'batches'),
    sameHouse('undoes_id', 'lot_moves'),
    sameHouse('made_by', 'memberships'),
  ]),
  // What a planned batch has set aside. Released rows stay, so that the batch can be restored; used ones became lines of the ledger.
  table('lot_reservations', [
    ...houseOwned,
    id('batch_id'),
    id('lot_id'),
    'addition_id VARCHAR(60) NOT NULL',
    massG,
    atMs('created_at_ms'),
    atMs('released_at_ms', 'NULL'),
    'UNIQUE KEY once_an_addition (batch_id, addition_id, lot_id)',
    'KEY by_lot (lot_id, released_at_ms)',
    sameHouse('batch_id', 'batches'),
    sameHouse('lot_id', 'lots'),
  ]),
];

/** Ingredients, their lots, the ledger of each lot, what is set aside for batches, and photos of labels. */
export const stores: Migration = {
  name: '0004-stores',
  async up(sequelize) {
    for (const statement of statements) await sequelize.query(statement, { type: QueryTypes.RAW });
  },
};
