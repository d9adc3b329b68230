import type { ImportPreview, Ingredient } from '@steepfall/shared/contracts';
import request from 'supertest';
import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest';
import { signInAs, type SignedInMember } from '../../../test/builders.js';
import { createTestApp, type TestApp } from '../../../test/create-test-app.js';
import { expectProblem } from '../../../test/problem-matcher.js';

let testApp: TestApp;
let brewer: SignedInMember;
beforeAll(async () => {
  testApp = await createTestApp();
});
afterAll(() => testApp.close());
beforeEach(async () => {
  brewer = await signInAs(testApp, 'brewer');
});

const post = (path: string, body: object, who = brewer) =>
  request(testApp.url).post(`/api/stores${path}`).set('authorization', who.bearer).send(body);
const preview = async (csv: string, skipRows: number[] = []) => {
  const { status, body } = await post('/import/preview', { csv, skipRows });
  expect(status).toBe(200);
  return body as ImportPreview;
};
const bring = (csv: string, skipRows: number[] = [], who = brewer) => post('/import', { csv, skipRows }, who);
const stores = async (who = brewer) =>
  (await request(testApp.url).get('/api/stores').set('authorization', who.bearer)).body as Ingredient[];
const exported = async (who = brewer) => {
  const response = await request(testApp.url).get('/api/stores/export').set('authorization', who.bearer);
  expect(response.status).toBe(200);
  return response;
};

const HEAD = 'kind,name,what,form,strength %,lot,mass,received on,price per kg,note,alpha %,storage index,low stock';
const csvOf = (...rows: string[]) => [HEAD, ...rows].join('\r\n');
const CASCADE = 'hops,Cascade,,pellets,,C-24,1.5 kg,2026-03-01,38.50,,6.4,0.31,100';
const SENCHA = 'tea,Sencha,green,whole,,S-1,250,2026-02-11,,"<b>first</b> flush, \'; DROP TABLE lots",,,';

describe('stores from a file', () => {
  it('are shown before anything is stored, and stored when that is wanted', async () => {
    const csv = csvOf(CASCADE, 'hops,cascade,,pellets,,C-25,500 g,2026-03-02,,,7,,', SENCHA, 'other,Orange peel');
    expect(await preview(csv)).toEqual({
      rows: [
        { row: 2, ingredient: 'Cascade', kind: 'hops', lot: 'C-24', massG: 1500, does: 'new-ingredient', problems: [] },
        { row: 3, ingredient: 'cascade', kind: 'hops', lot: 'C-25', massG: 500, does: 'new-lot', problems: [] },
        { row: 4, ingredient: 'Sencha', kind: 'tea', lot: 'S-1', massG: 250, does: 'new-ingredient', problems: [] },
        {
          row: 5,
          ingredient: 'Orange peel',
          kind: 'other',
          lot: '',
          massG: null,
          does: 'new-ingredient',
          problems: [],
        },
      ],
      badCount: 0,
      goodCount: 4,
    });
    expect(await stores()).toEqual([]);
    expect((await bring(csv)).body).toEqual({ ingredientCount: 3, lotCount: 3, skippedCount: 0 });
    const [hops, , tea] = await stores();
    expect(hops).toMatchObject({ stockG: 2000, facts: { lowStockG: 100 }, lots: [{ code: 'C-24' }, { code: 'C-25' }] });
    expect(hops?.lots[0]).toMatchObject({ pricePerKg: 38.5, hops: { alphaPercent: 6.4, storageIndex: 0.31 } });
    expect(tea?.lots[0]?.note).toBe("<b>first</b> flush, '; DROP TABLE lots");
  });

  it('come in whole or not at all; a bad row is named, and can be skipped on purpose', async () => {
    const csv = csvOf(CASCADE, 'hops,Saaz,,dust,,Z-1,much,2026-13-01,,,3,,', SENCHA);
    const { rows, badCount, goodCount } = await preview(csv);
    expect([badCount, goodCount]).toEqual([1, 2]);
    expect(rows[1]).toMatchObject({ row: 3, ingredient: 'Saaz', lot: 'Z-1', massG: null, does: 'nothing' });
    expect(rows[1]?.problems.map(({ column }) => column).sort()).toEqual(['form', 'mass', 'received on']);
    const refused = await bring(csv);
    expectProblem(refused, 'not-valid', ['/csv', '/csv', '/csv']);
    expect(JSON.stringify(refused.body)).toContain('Row 3, mass:');
    expect(await stores()).toEqual([]);
    expect(await preview(csv, [3])).toMatchObject({ badCount: 0, goodCount: 2, rows: [{}, { does: 'nothing' }, {}] });
    expect((await bring(csv, [3])).body).toEqual({ ingredientCount: 2, lotCount: 2, skippedCount: 1 });
  });

  it('join what is on the shelf, whatever the case, and never a lot twice', async () => {
    await bring(csvOf(CASCADE)).expect(200);
    const csv = csvOf(
      'hops,CASCADE,,pellets,,c-24,10,2026-03-01,,,,,',
      'hops,Cascade,,cones,,C-26,10,2026-03-01,,,,,',
      'hops,Cascade,,pellets,,C-27,10,2026-03-01,,,,,',
      'hops,Cascade,,pellets,,C-27,10,2026-03-01,,,,,',
      'hops,Cascade,,pellets',
      'hops,Cascade,,pellets,,C-28,10,2026-03-01,,a,,,,b',
      'salt,Cascade,gypsum,,,,,,,,,,',
    );
    const { rows } = await preview(csv);
    expect(rows.map(({ does, problems }) => [does, ...problems.map(({ column }) => column)])).toEqual([
      ['nothing', 'lot'],
      ['nothing', 'form'],
      ['new-lot'],
      ['nothing', 'lot'],
      ['nothing'],
      ['nothing', 'row'],
      ['new-ingredient'],
    ]);
    expect(rows[3]?.problems[0]?.detail).toContain('Row 4 has this lot');
    expect((await bring(csv, [2, 3, 5, 7])).body).toEqual({ ingredientCount: 1, lotCount: 1, skippedCount: 4 });
    expect(await stores()).toMatchObject([{ stockG: 1510 }, { facts: { kind: 'salt' } }]);
  });

  it('come in once when two people send the same file', async () => {
    const together = await Promise.all([1, 2].map(() => bring(csvOf(CASCADE, SENCHA))));
    expect(together.map(({ status }) => status).sort()).toEqual([200, 422]);
    expect(await stores()).toMatchObject([{ stockG: 1500 }, { stockG: 250 }]);
  });

  it('may be many', async () => {
    const many = Array.from({ length: 2500 }, (_, row) => `other,Peel ${row % 5},,,,P-${row},1,2026-01-01`);
    expect((await bring(csvOf(...many))).body).toEqual({ ingredientCount: 5, lotCount: 2500, skippedCount: 0 });
    expect((await stores()).map(({ stockG }) => stockG)).toEqual([500, 500, 500, 500, 500]);
  });

  it('are refused with clear words when the file is none, and when it is too large', async () => {
    expectProblem(await bring('colour\nred'), 'not-valid', ['/csv', '/csv', '/csv']);
    expectProblem(await bring(''), 'not-valid', ['/csv']);
    expectProblem(await bring(csvOf('x'.repeat(2_000_000))), 'not-valid', ['/csv']);
    expectProblem(await post('/import/preview', { csv: 'x'.repeat(40_000_000), skipRows: [] }), 'too-large');
  });
});

describe('stores to a file', () => {
  it('come back the same in an empty house, with all their signs', async () => {
    const formula = 'other,"\'=HYPERLINK(""http://x"")",,,,"-1",2,2026-01-01,,"+cmd, 茶 é",,,';
    await bring(csvOf(CASCADE, SENCHA, formula, 'acid,Citric acid,citric anhydrous,,99.5,A-1,0.5,2026-01-01')).expect(
      200,
    );
    const response = await exported();
    expect(response.headers).toMatchObject({
      'content-type': 'text/csv; charset=utf-8; header=present',
      'content-disposition': 'attachment; filename="stores.csv"',
    });
    expect(response.text).toContain(`"'=HYPERLINK(""http://x"")"`);
    expect(response.text).not.toMatch(/(^|[,"])[=+@]/m);

    const elsewhere = await signInAs(testApp, 'owner');
    expect((await bring(response.text, [], elsewhere)).body).toEqual({
      ingredientCount: 4,
      lotCount: 4,
      skippedCount: 0,
    });
    expect((await exported(elsewhere)).text).toBe(response.text);
    const plain = (list: Ingredient[]) =>
      list.map(({ facts, stockG, lots }) => ({
        facts,
        stockG,
        lots: lots.map(({ code, note, pricePerKg, hops }) => ({ code, note, pricePerKg, hops })),
      }));
    expect(plain(await stores(elsewhere))).toEqual(plain(await stores()));
  });

  it('of another house hold nothing of this one, and need a right', async () => {
    await bring(csvOf(CASCADE)).expect(200);
    const stranger = await signInAs(testApp, 'brewer');
    expect((await exported(stranger)).text).not.toContain('Cascade');
    expect((await preview(csvOf(CASCADE))).badCount).toBe(1);
    expect((await bring(csvOf(CASCADE), [], stranger)).status).toBe(200);
    const hand = await signInAs(testApp, 'hand', { house: brewer.house });
    expectProblem(await bring(csvOf(SENCHA), [], hand), 'not-allowed');
    expectProblem(await post('/import/preview', { csv: 'x', skipRows: [] }, hand), 'not-allowed');
    await exported(hand);
  });
});
