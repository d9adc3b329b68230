import type { Recipe, RecipeSummary } from '@steepfall/shared/contracts';
import type { Problem } from '@steepfall/shared/problems';
import type { Addition, RecipeDocument } from '@steepfall/shared/sheets';
import { buildDocument, buildHops, buildTea } from '@steepfall/shared/testing';
import request from 'supertest';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { buildRecipe, modelOf, signInAs, usualDocument, type SignedInMember } from '../../test/builders.js';
import { createTestApp, type TestApp } from '../../test/create-test-app.js';
import { expectProblem } from '../../test/problem-matcher.js';
import { AuditEntry } from '../audit/models/audit-entry.model.js';
import { newId } from '../common/ids.js';
import { RecipesService } from './recipes.service.js';

let testApp: TestApp;
beforeAll(async () => {
  testApp = await createTestApp();
});
afterAll(() => testApp.close());

const call = (method: 'get' | 'post' | 'patch', who: SignedInMember, path = '') =>
  request(testApp.url)[method](`/api/recipes${path}`).set('authorization', who.bearer);
const list = async (who: SignedInMember, query = '') => (await call('get', who, query)).body as RecipeSummary[];
const brewer = () => signInAs(testApp, 'brewer', { displayName: 'The brewer' });
const stronger: RecipeDocument = buildDocument({ volumeL: 18, additions: [buildTea({ massG: 120 }), buildHops()] });
const first = { name: 'Sencha, plain', summary: '', note: 'First try.', document: usualDocument };
const water = usualDocument.waters[0]!;
const create = async (who: SignedInMember, body: object = first) =>
  (await call('post', who).send(body).expect(201)).body as Recipe;
/** What a person can type, in every field that takes words. */
const strange = `<img src=x onerror=alert(1)> '; DROP TABLE recipes; -- "茶" \\ %`;

describe('GET /api/recipes', () => {
  it('needs a sign-in, and is not for a taster', async () => {
    expectProblem(await request(testApp.url).get('/api/recipes'), 'not-signed-in');
    expectProblem(await call('get', await signInAs(testApp, 'taster')), 'not-allowed');
  });

  it('lists each recipe with its newest revision, and shows all of them, the newest first', async () => {
    const author = await brewer();
    const { recipe, revisions } = await buildRecipe(testApp, { author, documents: [usualDocument, stronger] });
    const summary = {
      id: recipe.id,
      name: recipe.name,
      summary: recipe.summary,
      latestRevisionId: revisions[1]!.id,
      latestRevisionNumber: 2,
      isArchived: false,
      volumeL: 18,
      changedAtMs: revisions[1]!.createdAtMs,
    };
    expect(await list(author)).toEqual([summary]);
    const hand = await signInAs(testApp, 'hand', { house: author.house });
    expect((await call('get', hand, `/${recipe.id}`)).body).toMatchObject({
      ...summary,
      revisions: [
        { number: 2, createdBy: 'The brewer', document: stronger },
        { number: 1, document: usualDocument },
      ],
    });
  });

  it('hides recipes of another house', async () => {
    const { recipe, revisions } = await buildRecipe(testApp);
    const stranger = await brewer();
    expect(await list(stranger)).toEqual([]);
    expectProblem(await call('get', stranger, `/${recipe.id}`), 'not-found');
    const service = testApp.app.get(RecipesService, { strict: false });
    expect(await service.findRevision(stranger.house.id, revisions[0]!.id)).toBeNull();
    await expect(service.getFirstRecipeRevision(stranger.house.id)).rejects.toThrow('no recipe yet');
  });

  it('practises the newest revision of the first recipe, and one that was put away only without any other', async () => {
    const author = await brewer();
    const { recipe, revisions } = await buildRecipe(testApp, { author, documents: [usualDocument, stronger] });
    const service = testApp.app.get(RecipesService, { strict: false });
    const practised = () => service.getFirstRecipeRevision(author.house.id);
    await call('patch', author, `/${recipe.id}`).send({ isArchived: true }).expect(200);
    expect(await practised()).toMatchObject({ id: revisions[1]!.id, number: 2 });
    const later = await buildRecipe(testApp, { author });
    expect(await practised()).toMatchObject({ id: later.revisions[0]!.id });
    await call('patch', author, `/${recipe.id}`).send({ isArchived: false }).expect(200);
    expect(await practised()).toMatchObject({ id: revisions[1]!.id });
  });
});

describe('POST /api/recipes', () => {
  it('needs a sign-in and a role that writes recipes', async () => {
    expectProblem(await request(testApp.url).post('/api/recipes').send(first), 'not-signed-in');
    for (const role of ['hand', 'taster', 'pourer'] as const)
      expectProblem(await call('post', await signInAs(testApp, role)).send(first), 'not-allowed');
  });

  it('starts a recipe with its first revision, and a copy with the revision of another', async () => {
    const author = await brewer();
    const recipe = await create(author);
    expect(recipe).toMatchObject({
      name: first.name,
      latestRevisionNumber: 1,
      isArchived: false,
      volumeL: 20,
      revisions: [{ number: 1, note: 'First try.', createdBy: 'The brewer', document: usualDocument }],
    });
    const copy = await create(author, { ...first, name: 'Copy', document: recipe.revisions[0]!.document });
    expect(copy.id).not.toBe(recipe.id);
    expect((await list(author)).map(({ name }) => name)).toEqual(['Copy', first.name]);
    const audited = await modelOf(testApp, AuditEntry).findAll({ where: { subject: recipe.id }, order: ['seq'] });
    expect(audited.map(({ action, memberId }) => [action, memberId])).toEqual([
      ['recipe.created', author.member.id],
      ['recipe.revised', author.member.id],
    ]);
  });

  it('keeps every word as it was typed', async () => {
    const document = buildDocument({
      additions: [buildTea({ name: strange, bag: '<b>1</b>' })],
      waters: [{ ...usualDocument.waters[0]!, name: strange }],
      steps: { own: [{ id: 'own', title: strange, detail: strange, done: { by: 'hand' } }] },
    });
    const author = await brewer();
    const recipe = await create(author, { name: strange, summary: strange, note: strange, document });
    expect(recipe).toMatchObject({ name: strange, summary: strange, revisions: [{ note: strange, document }] });
    expect(await list(author)).toHaveLength(1);
  });

  it('takes as much at one moment as the schema does, and a step of the brewer that is named like another', async () => {
    const own = [{ id: 'fill', title: 'Fill again', done: { by: 'hand' } }];
    await create(await brewer(), { ...doc({ additions: manySalts(), steps: { own } }) } as typeof first);
  });

  it.each<[string, Record<string, unknown>, string[]]>([
    ['nothing', {}, ['/name', '/summary', '/note', '/document']],
    ['an empty name', { ...first, name: '  ' }, ['/name']],
    ['too many words', { ...first, name: 'x'.repeat(81), note: 'x'.repeat(401) }, ['/name', '/note']],
    ['an unknown member', { ...first, id: newId() }, ['']],
    ['numbers out of range', doc({ volumeL: -20, waterL: 1e9 }), ['/document/volumeL', '/document/waterL']],
    ['NaN, which JSON makes null', doc({ steepC: Number.NaN }), ['/document/steepC']],
    ['letters for a number', doc({ transferC: 'warm' }), ['/document/transferC']],
    ['waters that are not the whole', doc({ waters: [{ ...water, percent: 60 }] }), ['/document/waters']],
    ['a mass of nothing', doc({ additions: [buildTea({ massG: 0 })] }), ['/document/additions/0/massG']],
    ['a target upside down', doc({ targets: { waterPh: { min: 5, max: 4 } } }), ['/document/targets/waterPh/max']],
    ['a document of an old build', doc({ v: 1 }), ['/document/v']],
  ])('refuses %s, at the field', async (_, body, pointers) => {
    const author = await brewer();
    expectProblem(await call('post', author).send(body), 'not-valid', pointers);
    expect(await list(author)).toEqual([]);
  });
});

describe('PATCH /api/recipes/:id', () => {
  it('puts a recipe away and back, as often as one likes, and gives it another name', async () => {
    const author = await brewer();
    const { id } = await create(author);
    const patch = (body: object, who = author) => call('patch', who, `/${id}`).send(body);
    for (const _ of [1, 2]) {
      expect((await patch({ isArchived: true }).expect(200)).body).toMatchObject({ id, isArchived: true });
      expect(await list(author)).toEqual([]);
      expect(await list(author, '?archived=true')).toMatchObject([{ id, isArchived: true }]);
    }
    expect((await call('get', author, `/${id}`)).body).toMatchObject({ isArchived: true });
    expect((await patch({ name: ' Green ' })).body).toMatchObject({ name: 'Green', summary: '', isArchived: true });
    await patch({ isArchived: false }).expect(200);
    expect(await list(author, '?archived=true')).toEqual([]);
    expect(await list(author)).toMatchObject([{ id, name: 'Green' }]);

    expectProblem(await patch({ name: '' }), 'not-valid', ['/name']);
    expectProblem(await call('get', author, '?archived=perhaps'), 'not-valid', ['/archived']);
    expectProblem(await patch({ name: 'x' }, await signInAs(testApp, 'hand', { house: author.house })), 'not-allowed');
    expectProblem(await patch({ name: 'x' }, await brewer()), 'not-found');
  });
});

describe('POST /api/recipes/:id/revisions', () => {
  const revise = (who: SignedInMember, { id }: Recipe, body: object) =>
    call('post', who, `/${id}/revisions`).send(body);

  it('adds a revision on top of the newest, and leaves the earlier ones as they were', async () => {
    const author = await brewer();
    const recipe = await create(author);
    const next = { baseRevisionId: recipe.latestRevisionId, note: 'More leaf.', document: stronger };
    const revised = (await revise(author, recipe, next).expect(201)).body as Recipe;
    expect(revised).toMatchObject({ latestRevisionNumber: 2, volumeL: 18 });
    expect(revised.revisions.map(({ number, note, document }) => [number, note, document])).toEqual([
      [2, 'More leaf.', stronger],
      [1, 'First try.', usualDocument],
    ]);
  });

  it('tells the second of two who save on one revision who was first, and with what', async () => {
    const author = await brewer();
    const recipe = await create(author);
    const other = await signInAs(testApp, 'owner', { house: author.house, displayName: 'The owner' });
    const base = { baseRevisionId: recipe.latestRevisionId };
    await revise(other, recipe, { ...base, note: 'More leaf.', document: stronger }).expect(201);
    const mine = { ...base, note: '', document: buildDocument({ steepC: 70 }) };
    const refused = await revise(author, recipe, mine);
    expectProblem(refused, 'changed-meanwhile');
    expect((refused.body as Problem).detail).toMatch(/^The owner saved revision 2 \("More leaf\."\) on .*\d\d:\d\d\./);
    const { latestRevisionId } = (await call('get', author, `/${recipe.id}`)).body as Recipe;
    await revise(author, recipe, { ...mine, baseRevisionId: latestRevisionId }).expect(201);
  });

  it('takes exactly one of many that are saved at the same instant', async () => {
    const author = await brewer();
    const recipe = await create(author);
    const tries = [70, 71, 72, 73, 74].map((steepC) => ({
      baseRevisionId: recipe.latestRevisionId,
      note: `${steepC}`,
      document: buildDocument({ steepC }),
    }));
    const answers = await Promise.all(tries.map((body) => revise(author, recipe, body)));
    expect(answers.map(({ status }) => status).sort()).toEqual([201, 409, 409, 409, 409]);
    const { revisions } = (await call('get', author, `/${recipe.id}`)).body as Recipe;
    expect(revisions.map(({ number }) => number)).toEqual([2, 1]);
  });

  it('refuses what changes nothing, and a revision of another recipe', async () => {
    const author = await brewer();
    const recipe = await create(author);
    const body = { baseRevisionId: recipe.latestRevisionId, note: 'Again.', document: stronger };
    const same = await revise(author, recipe, { ...body, document: usualDocument });
    expectProblem(same, 'not-valid', ['/document']);
    expect((same.body as Problem).detail).toContain('Nothing is different from revision 1');
    const another = await create(author, { ...first, name: 'Another' });
    expectProblem(await revise(author, another, body), 'not-valid', ['/baseRevisionId']);
    expectProblem(await revise(author, recipe, { ...body, document: null, extra: 1 }), 'not-valid', ['/document', '']);
    expectProblem(await revise(await brewer(), recipe, body), 'not-found');
    const hand = await signInAs(testApp, 'hand', { house: author.house });
    expectProblem(await revise(hand, recipe, body), 'not-allowed');
    expect(((await call('get', author, `/${recipe.id}`)).body as Recipe).revisions).toHaveLength(1);
  });
});

function doc(changes: object): Record<string, unknown> {
  return { ...first, document: { ...usualDocument, ...changes } };
}

function manySalts(): Addition[] {
  return Array.from({ length: 40 }, (_, index) => ({
    id: `salt-${index}`,
    kind: 'salt',
    name: 'gypsum',
    massG: 1,
    keeps: 'mass',
    salt: 'gypsum',
    in: { at: 'fill' },
  }));
}
