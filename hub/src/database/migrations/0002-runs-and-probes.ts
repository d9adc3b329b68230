import { QueryTypes } from 'sequelize';
import type { Migration } from './list.js';

const statements = [
  `ALTER TABLE runs
    ADD COLUMN IF NOT EXISTS source_probe_id CHAR(36) CHARACTER SET ascii COLLATE ascii_bin NULL AFTER probe_id,
    ADD COLUMN IF NOT EXISTS probe_out_at_ms BIGINT UNSIGNED NULL AFTER alert_stage,
    ADD COLUMN IF NOT EXISTS kettle_setup JSON NULL AFTER seed,
    ADD FOREIGN KEY IF NOT EXISTS runs_source_probe (house_id, source_probe_id) REFERENCES probes (house_id, id)`,
];

/**
 * What a run needs to know of its probe: which real one a rehearsal listens to, when it came out of the kettle, and the numbers of a
 * simulated kettle, so that the same kettle goes on after a restart.
 */
export const runsAndProbes: Migration = {
  name: '0002-runs-and-probes',
  async up(sequelize) {
    for (const statement of statements) await sequelize.query(statement, { type: QueryTypes.RAW });
  },
};
