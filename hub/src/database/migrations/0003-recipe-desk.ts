import { QueryTypes } from 'sequelize';
import type { Sequelize } from 'sequelize-typescript';
import type { Migration } from './list.js';

const statements = [
  `ALTER TABLE recipes ADD COLUMN IF NOT EXISTS archived_at_ms BIGINT UNSIGNED NULL`,
  // A sheet is kept only where it was changed by hand; without one it follows from the revision.
  `ALTER TABLE batches
    ADD COLUMN IF NOT EXISTS sheet JSON NULL,
    ADD COLUMN IF NOT EXISTS sheet_version INT UNSIGNED NOT NULL DEFAULT 1,
    ADD COLUMN IF NOT EXISTS cancelled_at_ms BIGINT UNSIGNED NULL`,
];

/** The document of a revision as it was before it had a version. */
interface FirstDocument {
  volumeL: number;
  waterName: string;
  waterL: number;
  additions: { id: string; kind: 'salt' | 'acid' | 'tea' | 'hops'; name: string; massG: number; bag?: string }[];
  targetPh: { min: number; max: number };
  steep: { tempC: number; durationS: number };
  hops: { inC: number; outC: number };
  transferC: number;
  gas: { volumes: number; tempC: number };
}
type FirstAddition = FirstDocument['additions'][number];

/** What the first documents did not say of an ingredient; only the demo could have written them. */
const known: Record<string, Record<string, unknown>> = {
  'salt/calcium chloride': { kind: 'salt', salt: 'calciumChlorideDihydrate' },
  'salt/gypsum': { kind: 'salt', salt: 'gypsum' },
  'acid/citric acid': { kind: 'acid', acid: 'citricAnhydrous' },
  'tea/sencha': { kind: 'tea', tea: 'green', form: 'whole' },
  'hops/cascade': { kind: 'hops', form: 'pellets', alphaPercent: 6.5 },
};

const pure = { caMgPerL: 0, mgMgPerL: 0, naMgPerL: 0, kMgPerL: 0, clMgPerL: 0, so4MgPerL: 0 };
/** A water that nobody wrote a report of counts as pure. */
const reportOf = (waterName: string) =>
  waterName === 'Reverse-osmosis water'
    ? {
        caMgPerL: 1,
        mgMgPerL: 0.3,
        naMgPerL: 2.5,
        kMgPerL: 0.3,
        clMgPerL: 3,
        so4MgPerL: 0.5,
        alkalinity: { as: 'caco3', mgPerL: 4.5 },
      }
    : { ...pure, alkalinity: { as: 'caco3', mgPerL: 0 } };

/** When it goes in and comes out, which the first documents said once for all. */
function conditionsOf({ kind }: FirstAddition, { steep, hops }: FirstDocument) {
  if (kind === 'tea')
    return { in: { at: 'steep', afterS: 0 }, out: { at: 'timer', durationS: steep.durationS } } as const;
  if (kind === 'hops')
    return { in: { at: 'falling', tempC: hops.inC }, out: { at: 'falling', tempC: hops.outC } } as const;
  return { in: { at: 'fill' } } as const;
}

function additionOf(addition: FirstAddition, document: FirstDocument) {
  const { id, kind, name, massG, bag } = addition;
  const facts = known[`${kind}/${name.toLowerCase()}`];
  return {
    id,
    name,
    massG,
    keeps: 'g-per-l',
    ...(bag === undefined ? {} : { bag }),
    // A name that is not known can be in no sum: it is weighed and timed only.
    ...(facts ?? { kind: 'other', out: { at: 'transfer' } }),
    ...conditionsOf(addition, document),
  };
}

function secondDocumentOf(document: FirstDocument) {
  const { volumeL, waterL, waterName, additions, steep, transferC, gas, targetPh } = document;
  return {
    v: 2,
    volumeL,
    waterL,
    waters: [{ id: 'water', name: waterName, percent: 100, report: reportOf(waterName) }],
    additions: additions.map((addition) => additionOf(addition, document)),
    steepC: steep.tempC,
    transferC,
    gas,
    targets: { waterPh: { min: Math.min(targetPh.min, targetPh.max), max: Math.max(targetPh.min, targetPh.max) } },
    steps: { own: [] },
    assume: {},
  };
}

/** Those that were written anew carry their version, so that a second try passes them by. */
async function rewriteDocuments(sequelize: Sequelize): Promise<void> {
  const rows = await sequelize.query<{ id: string; document: string }>(
    `SELECT id, CAST(document AS CHAR) AS document FROM recipe_revisions WHERE JSON_VALUE(document, '$.v') IS NULL`,
    { type: QueryTypes.SELECT },
  );
  for (const { id, document } of rows)
    await sequelize.query('UPDATE recipe_revisions SET document = ? WHERE id = ?', {
      type: QueryTypes.UPDATE,
      replacements: [JSON.stringify(secondDocumentOf(JSON.parse(document) as FirstDocument)), id],
    });
}

/** Recipes that are put away, batches with a sheet of their own that can be called off, and documents that say what each addition is. */
export const recipeDesk: Migration = {
  name: '0003-recipe-desk',
  async up(sequelize) {
    for (const statement of statements) await sequelize.query(statement, { type: QueryTypes.RAW });
    await rewriteDocuments(sequelize);
  },
};
