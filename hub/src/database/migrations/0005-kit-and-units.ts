import { QueryTypes } from 'sequelize';
import type { Migration } from './list.js';

const statements = [
  // NULL: the usual units, metric.
  `ALTER TABLE memberships ADD COLUMN IF NOT EXISTS units JSON NULL AFTER is_active`,
  `ALTER TABLE houses
    ADD COLUMN IF NOT EXISTS currency CHAR(3) CHARACTER SET ascii COLLATE ascii_bin NOT NULL DEFAULT 'EUR' AFTER altitude_m`,
  `ALTER TABLE probes
    ADD COLUMN IF NOT EXISTS calibration JSON NULL AFTER sample_period_s,
    ADD COLUMN IF NOT EXISTS calibrated_at_ms BIGINT UNSIGNED NULL AFTER calibration,
    ADD COLUMN IF NOT EXISTS version INT UNSIGNED NOT NULL DEFAULT 1`,
  // What the probe sent, where a correction made something else of it.
  `ALTER TABLE readings ADD COLUMN IF NOT EXISTS raw_c DOUBLE NULL AFTER temp_c`,
];

/** The units of each person, the money of a house, and what a probe read at two points that are known. */
export const kitAndUnits: Migration = {
  name: '0005-kit-and-units',
  async up(sequelize) {
    for (const statement of statements) await sequelize.query(statement, { type: QueryTypes.RAW });
  },
};
