import { QueryTypes } from 'sequelize';
import type { Migration } from './list.js';

const statements = [
  // NULL: never learned, the usual.
  `ALTER TABLE memberships ADD COLUMN IF NOT EXISTS reach_s SMALLINT UNSIGNED NULL AFTER units`,
  `ALTER TABLE probes ADD COLUMN IF NOT EXISTS lag_error_ratio DOUBLE NULL AFTER lag_s`,
  `ALTER TABLE runs
    ADD COLUMN IF NOT EXISTS probe_lag_error_ratio DOUBLE NULL AFTER probe_lag_s,
    ADD COLUMN IF NOT EXISTS chiller_per_s DOUBLE NULL AFTER coolant_c`,
];

/** What runs teach: how long a person takes, how sure a lag is, and what a run was started with. */
export const reach: Migration = {
  name: '0007-reach',
  async up(sequelize) {
    for (const statement of statements) await sequelize.query(statement, { type: QueryTypes.RAW });
  },
};
