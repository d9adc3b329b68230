import { QueryTypes } from 'sequelize';
import type { Migration } from './list.js';

const id = (name: string, rest = 'NOT NULL') => `${name} CHAR(36) CHARACTER SET ascii COLLATE ascii_bin ${rest}`;
const atMs = (name: string, rest = 'NOT NULL') => `${name} BIGINT UNSIGNED ${rest}`;
const word = (name: string, length: number) =>
  `${name} VARCHAR(${length}) CHARACTER SET ascii COLLATE ascii_bin NOT NULL`;
const table = (name: string, lines: string[]) =>
  `CREATE TABLE IF NOT EXISTS ${name} (\n${lines.join(',\n')}\n) ENGINE=InnoDB DEFAULT CHARSET=utf8mb4 COLLATE=utf8mb4_unicode_ci`;
const houseOwned = [
  id('id', 'NOT NULL PRIMARY KEY'),
  id('house_id'),
  'UNIQUE KEY in_house (house_id, id)',
  'FOREIGN KEY (house_id) REFERENCES houses (id)',
];
const sameHouse = (column: string, parent: string, rest = '') =>
  `FOREIGN KEY (house_id, ${column}) REFERENCES ${parent} (house_id, id)${rest}`;

const statements = [
  table('follow_links', [
    ...houseOwned,
    id('run_id'),
    word('token_hash', 64),
    atMs('created_at_ms'),
    id('created_by'),
    atMs('expires_at_ms'),
    atMs('revoked_at_ms', 'NULL'),
    'UNIQUE KEY one_token (token_hash)',
    'KEY of_run (run_id)',
    sameHouse('run_id', 'runs'),
    sameHouse('created_by', 'memberships'),
  ]),
  // A phone may follow two runs: its address counts once for each link.
  table('push_subscriptions', [
    ...houseOwned,
    id('link_id'),
    word('endpoint', 1000),
    word('endpoint_hash', 64),
    word('p256dh', 100),
    word('auth', 40),
    word('contact', 300),
    atMs('created_at_ms'),
    'UNIQUE KEY one_phone_a_link (link_id, endpoint_hash)',
    sameHouse('link_id', 'follow_links', ' ON DELETE CASCADE'),
  ]),
];

/** A run followed on a phone: links that open it, and where its alerts are pushed to. */
export const follow: Migration = {
  name: '0006-follow',
  async up(sequelize) {
    for (const statement of statements) await sequelize.query(statement, { type: QueryTypes.RAW });
  },
};
