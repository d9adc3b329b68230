import { QueryTypes } from 'sequelize';
import type { Migration } from './list.js';

const id = (name: string, rest = 'NOT NULL') => `${name} CHAR(36) CHARACTER SET ascii COLLATE ascii_bin ${rest}`;
const atMs = (name: string, rest = 'NOT NULL') => `${name} BIGINT UNSIGNED ${rest}`;
const word = (name: string, length: number, rest = 'NOT NULL') =>
  `${name} VARCHAR(${length}) CHARACTER SET ascii COLLATE ascii_bin ${rest}`;
/** Each statement commits by itself, so a first start that was cut short must find its way on. */
const table = (name: string, lines: string[]) =>
  `CREATE TABLE IF NOT EXISTS ${name} (\n${lines.join(',\n')}\n) ENGINE=InnoDB DEFAULT CHARSET=utf8mb4 COLLATE=utf8mb4_unicode_ci`;
/** A row and what it points at always belong to the same house: the database refuses anything else. */
const sameHouse = (column: string, parent: string) =>
  `FOREIGN KEY (house_id, ${column}) REFERENCES ${parent} (house_id, id)`;
const houseOwned = [id('id', 'NOT NULL PRIMARY KEY'), id('house_id'), 'UNIQUE KEY in_house (house_id, id)'];
const inHouse = 'FOREIGN KEY (house_id) REFERENCES houses (id)';

const statements = [
  table('houses', [
    id('id', 'NOT NULL PRIMARY KEY'),
    'name VARCHAR(80) NOT NULL',
    'altitude_m DOUBLE NOT NULL',
    'is_demo BOOLEAN NOT NULL DEFAULT FALSE',
    atMs('created_at_ms'),
    'version INT UNSIGNED NOT NULL DEFAULT 1',
  ]),
  table('users', [
    id('id', 'NOT NULL PRIMARY KEY'),
    // Stored in lower case; the binary collation keeps look-alikes of other scripts apart.
    'email VARCHAR(190) CHARACTER SET utf8mb4 COLLATE utf8mb4_bin NOT NULL',
    word('password_hash', 200),
    atMs('created_at_ms'),
    'UNIQUE KEY one_account_an_address (email)',
  ]),
  table('memberships', [
    ...houseOwned,
    id('user_id'),
    'display_name VARCHAR(80) NOT NULL',
    word('role', 20),
    'is_active BOOLEAN NOT NULL DEFAULT TRUE',
    atMs('created_at_ms'),
    'UNIQUE KEY once_a_house (house_id, user_id)',
    inHouse,
    'FOREIGN KEY (user_id) REFERENCES users (id)',
  ]),
  table('sessions', [
    ...houseOwned,
    id('member_id'),
    'user_agent VARCHAR(200) NOT NULL',
    atMs('created_at_ms'),
    atMs('revoked_at_ms', 'NULL'),
    word('revoked_because', 40, 'NULL'),
    inHouse,
    sameHouse('member_id', 'memberships'),
  ]),
  // Every refresh token a session was ever given; a token that comes back after it was rotated gives the session away.
  table('session_tokens', [
    word('token_hash', 64, 'NOT NULL PRIMARY KEY'),
    id('session_id'),
    word('parent_hash', 64, 'NULL'),
    atMs('issued_at_ms'),
    atMs('expires_at_ms'),
    atMs('rotated_at_ms', 'NULL'),
    atMs('voided_at_ms', 'NULL'),
    'KEY by_parent (parent_hash)',
    'FOREIGN KEY (session_id) REFERENCES sessions (id) ON DELETE CASCADE',
  ]),
  table('equipment', [
    ...houseOwned,
    word('kind', 20),
    'name VARCHAR(80) NOT NULL',
    'facts JSON NOT NULL',
    atMs('created_at_ms'),
    atMs('removed_at_ms', 'NULL'),
    'version INT UNSIGNED NOT NULL DEFAULT 1',
    inHouse,
  ]),
  table('probes', [
    ...houseOwned,
    'name VARCHAR(80) NOT NULL',
    // NULL: no token opens the door for it (simulated, or revoked).
    word('token_hash', 64, 'NULL'),
    'lag_s DOUBLE NOT NULL',
    'resolution_c DOUBLE NOT NULL',
    'sample_period_s DOUBLE NOT NULL',
    'is_simulated BOOLEAN NOT NULL DEFAULT FALSE',
    atMs('created_at_ms'),
    atMs('revoked_at_ms', 'NULL'),
    'UNIQUE KEY by_token (token_hash)',
    inHouse,
  ]),
  table('recipes', [
    ...houseOwned,
    'name VARCHAR(80) NOT NULL',
    'summary VARCHAR(400) NOT NULL',
    atMs('created_at_ms'),
    inHouse,
  ]),
  table('recipe_revisions', [
    ...houseOwned,
    id('recipe_id'),
    'number INT UNSIGNED NOT NULL',
    'note VARCHAR(400) NOT NULL',
    atMs('created_at_ms'),
    id('created_by'),
    'volume_l DOUBLE NOT NULL',
    'document JSON NOT NULL',
    'UNIQUE KEY one_number_a_recipe (recipe_id, number)',
    inHouse,
    sameHouse('recipe_id', 'recipes'),
    sameHouse('created_by', 'memberships'),
  ]),
  table('batches', [
    ...houseOwned,
    'year SMALLINT UNSIGNED NOT NULL',
    'number_in_year INT UNSIGNED NOT NULL',
    word('batch_number', 20),
    id('revision_id'),
    'planned_on DATE NOT NULL',
    id('kettle_id'),
    id('chiller_id', 'NULL'),
    id('keg_id'),
    id('probe_id', 'NULL'),
    'volume_l DOUBLE NOT NULL',
    atMs('created_at_ms'),
    id('created_by'),
    'UNIQUE KEY one_number_a_year (house_id, year, number_in_year)',
    'KEY by_day (house_id, planned_on)',
    inHouse,
    sameHouse('revision_id', 'recipe_revisions'),
    sameHouse('kettle_id', 'equipment'),
    sameHouse('chiller_id', 'equipment'),
    sameHouse('keg_id', 'equipment'),
    sameHouse('probe_id', 'probes'),
    sameHouse('created_by', 'memberships'),
  ]),
  // Apart from ids and settings, this is a projection of run_events for lists; it can be rebuilt from them.
  table('runs', [
    ...houseOwned,
    id('batch_id', 'NULL'),
    word('batch_number', 20, 'NULL'),
    id('revision_id', 'NULL'),
    'title VARCHAR(120) NOT NULL',
    'is_rehearsal BOOLEAN NOT NULL',
    'seed INT UNSIGNED NULL',
    id('probe_id', 'NULL'),
    'probe_lag_s DOUBLE NOT NULL',
    'probe_resolution_c DOUBLE NOT NULL',
    'probe_sample_period_s DOUBLE NOT NULL',
    'room_c DOUBLE NULL',
    'coolant_c DOUBLE NULL',
    word('status', 20),
    word('outcome', 20, 'NULL'),
    atMs('started_at_ms'),
    atMs('ended_at_ms', 'NULL'),
    id('started_by', 'NULL'),
    atMs('clock_anchor_wall_ms'),
    atMs('clock_anchor_run_ms'),
    'clock_rate DOUBLE NOT NULL',
    'last_seq INT UNSIGNED NOT NULL',
    'current_step_title VARCHAR(80) NULL',
    word('alert_stage', 20, 'NULL'),
    atMs('created_at_ms'),
    // A batch has at most one run that is not over: NULLs do not collide.
    'is_open TINYINT AS (IF(ended_at_ms IS NULL, 1, NULL)) PERSISTENT',
    'UNIQUE KEY one_open_a_batch (batch_id, is_open)',
    'KEY by_status (house_id, status, started_at_ms)',
    'KEY by_probe (probe_id, status)',
    'KEY by_batch (house_id, batch_id)',
    inHouse,
    sameHouse('batch_id', 'batches'),
    sameHouse('probe_id', 'probes'),
    sameHouse('revision_id', 'recipe_revisions'),
  ]),
  table('run_events', [
    id('run_id'),
    'seq INT UNSIGNED NOT NULL',
    id('id'),
    word('type', 40),
    'v SMALLINT UNSIGNED NOT NULL',
    atMs('at_ms'),
    id('by', 'NULL').replace('by', '`by`'),
    'station VARCHAR(60) NOT NULL',
    id('sent_by', 'NULL'),
    atMs('received_at_ms'),
    'payload JSON NOT NULL',
    'PRIMARY KEY (run_id, seq)',
    'UNIQUE KEY once (id)',
    'FOREIGN KEY (run_id) REFERENCES runs (id)',
  ]),
  // Clustered by probe and time: a curve is one range of neighbouring rows, and a duplicate has the same key.
  table('readings', [
    id('probe_id'),
    atMs('at_ms'),
    'temp_c DOUBLE NULL',
    atMs('received_at_ms'),
    'PRIMARY KEY (probe_id, at_ms)',
    'FOREIGN KEY (probe_id) REFERENCES probes (id)',
  ]),
  table('audit_log', [
    'seq BIGINT UNSIGNED NOT NULL AUTO_INCREMENT PRIMARY KEY',
    id('house_id'),
    atMs('at_ms'),
    id('member_id', 'NULL'),
    word('action', 60),
    'subject VARCHAR(190) NOT NULL',
    'facts JSON NOT NULL',
    'KEY by_house (house_id, at_ms)',
    inHouse,
  ]),
];

export const foundation: Migration = {
  name: '0001-foundation',
  async up(sequelize) {
    for (const statement of statements) await sequelize.query(statement, { type: QueryTypes.RAW });
  },
};
