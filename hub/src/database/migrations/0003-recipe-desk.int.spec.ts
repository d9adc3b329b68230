import { recipeDocumentSchema } from '@steepfall/shared/sheets';
import { QueryTypes } from 'sequelize';
import { Sequelize } from 'sequelize-typescript';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { createThrowAwayDatabase, type ThrowAwayDatabase } from '../../../test/database.js';
import { connectionOptions } from '../connection-options.js';
import { foundation } from './0001-foundation.js';
import { runsAndProbes } from './0002-runs-and-probes.js';
import { recipeDesk } from './0003-recipe-desk.js';

const HOUSE = '00000000-0000-4000-8000-000000000001';
const MEMBER = '00000000-0000-4000-8000-000000000002';
const RECIPE = '00000000-0000-4000-8000-000000000003';

const firstDocument = {
  volumeL: 20,
  waterName: 'Reverse-osmosis water',
  waterL: 22.5,
  additions: [
    { id: 'calcium-chloride', kind: 'salt', name: 'calcium chloride', massG: 2, bag: 'cup 1' },
    { id: 'gypsum', kind: 'salt', name: 'gypsum', massG: 1, bag: 'cup 1' },
    { id: 'citric-acid', kind: 'acid', name: 'citric acid', massG: 4.5, bag: 'cup 2' },
    { id: 'sencha', kind: 'tea', name: 'sencha', massG: 110, bag: 'bag 1' },
    { id: 'cascade', kind: 'hops', name: 'Cascade', massG: 60, bag: 'bag 2' },
  ],
  targetPh: { min: 3.1, max: 3.4 },
  steep: { tempC: 76, durationS: 180 },
  hops: { inC: 62, outC: 30 },
  transferC: 20,
  gas: { volumes: 2.8, tempC: 4 },
};
const strangeDocument = {
  ...firstDocument,
  waterName: `"Spring"; DROP TABLE recipes; -- 'ü'`,
  additions: ['salt', 'acid', 'tea', 'hops'].map((kind) => ({ id: kind, kind, name: `<b>no ${kind}</b>`, massG: 5 })),
  targetPh: { min: 4, max: 3 },
};

describe('0003-recipe-desk', () => {
  let database: ThrowAwayDatabase;
  let sequelize: Sequelize;
  beforeAll(async () => {
    database = await createThrowAwayDatabase();
    sequelize = new Sequelize(connectionOptions(database.url));
    await foundation.up(sequelize);
    await runsAndProbes.up(sequelize);
    const rows = sequelize.getQueryInterface();
    await rows.bulkInsert('houses', [{ id: HOUSE, name: 'House', altitude_m: 0, created_at_ms: 1 }]);
    await rows.bulkInsert('users', [{ id: MEMBER, email: 'a@b.example', password_hash: 'x', created_at_ms: 1 }]);
    await rows.bulkInsert('memberships', [
      { id: MEMBER, house_id: HOUSE, user_id: MEMBER, display_name: 'B', role: 'brewer', created_at_ms: 1 },
    ]);
    await rows.bulkInsert('recipes', [{ id: RECIPE, house_id: HOUSE, name: 'R', summary: '', created_at_ms: 1 }]);
    await rows.bulkInsert(
      'recipe_revisions',
      [firstDocument, strangeDocument].map((document, index) => ({
        id: `00000000-0000-4000-8000-00000000001${index}`,
        house_id: HOUSE,
        recipe_id: RECIPE,
        number: index + 1,
        note: '',
        created_at_ms: 1,
        created_by: MEMBER,
        volume_l: 20,
        document: JSON.stringify(document),
      })),
    );
  });
  afterAll(async () => {
    await sequelize.close();
    await database.drop();
  });

  const documents = async () => {
    const rows = await sequelize.query<{ document: string }>(
      'SELECT CAST(document AS CHAR) AS document FROM recipe_revisions ORDER BY number',
      { type: QueryTypes.SELECT },
    );
    return rows.map(({ document }) => recipeDocumentSchema.parse(JSON.parse(document)));
  };

  it('makes of the first documents what the desk reads, and changes nothing when it is run again', async () => {
    await recipeDesk.up(sequelize);
    const once = await documents();
    const cold = { keeps: 'g-per-l', in: { at: 'fill' } };
    expect(once[0]?.additions).toMatchObject([
      { kind: 'salt', salt: 'calciumChlorideDihydrate', massG: 2, bag: 'cup 1', ...cold },
      { kind: 'salt', salt: 'gypsum', massG: 1, ...cold },
      { kind: 'acid', acid: 'citricAnhydrous', massG: 4.5, ...cold },
      { kind: 'tea', tea: 'green', massG: 110, in: { at: 'steep' }, out: { at: 'timer', durationS: 180 } },
      { kind: 'hops', alphaPercent: 6.5, in: { at: 'falling', tempC: 62 }, out: { at: 'falling', tempC: 30 } },
    ]);
    expect(once[0]?.waters[0]?.report.alkalinity).toEqual({ as: 'caco3', mgPerL: 4.5 });
    expect(once[0]).toMatchObject({ steepC: 76, targets: { waterPh: { min: 3.1, max: 3.4 } } });

    await recipeDesk.up(sequelize);
    expect(await documents()).toEqual(once);
  });

  it('keeps what it does not know, in no sum', async () => {
    const [, strange] = await documents();
    expect(strange?.waters[0]?.name).toBe(strangeDocument.waterName);
    expect(strange?.additions.map(({ kind, name, in: at }) => [kind, name, at.at])).toEqual([
      ['other', '<b>no salt</b>', 'fill'],
      ['other', '<b>no acid</b>', 'fill'],
      ['other', '<b>no tea</b>', 'steep'],
      ['other', '<b>no hops</b>', 'falling'],
    ]);
    expect(strange?.targets.waterPh).toEqual({ min: 3, max: 4 });
  });
});
