import request from 'supertest';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { buildRecipe, signInAs, usualDocument } from '../../test/builders.js';
import { createTestApp, type TestApp } from '../../test/create-test-app.js';
import { expectProblem } from '../../test/problem-matcher.js';
import { RecipesService } from './recipes.service.js';

let testApp: TestApp;
beforeAll(async () => {
  testApp = await createTestApp();
});
afterAll(() => testApp.close());

const get = (bearer: string, path = '') => request(testApp.url).get(`/api/recipes${path}`).set('authorization', bearer);
const stronger = { ...usualDocument, hops: { inC: 62.5, outC: 30 } };

describe('/api/recipes', () => {
  it('needs a sign-in', async () => {
    expectProblem(await request(testApp.url).get('/api/recipes'), 'not-signed-in');
  });

  it('lists each recipe with its newest revision, and shows all of them, the newest first', async () => {
    const brewer = await signInAs(testApp, 'brewer', { displayName: 'The brewer' });
    const { recipe, revisions } = await buildRecipe(testApp, { author: brewer, documents: [usualDocument, stronger] });
    const newest = { latestRevisionId: revisions[1]!.id, latestRevisionNumber: 2 };
    const summary = { id: recipe.id, name: recipe.name, summary: recipe.summary, ...newest };
    expect((await get(brewer.bearer)).body).toEqual([summary]);
    const one = await get(brewer.bearer, `/${recipe.id}`);
    expect(one.body).toMatchObject({
      ...summary,
      revisions: [
        { number: 2, createdBy: 'The brewer', document: stronger },
        { number: 1, document: usualDocument },
      ],
    });
  });

  it('hides recipes of another house', async () => {
    const { recipe, revisions } = await buildRecipe(testApp);
    const stranger = await signInAs(testApp, 'brewer');
    expect((await get(stranger.bearer)).body).toEqual([]);
    expectProblem(await get(stranger.bearer, `/${recipe.id}`), 'not-found');
    const service = testApp.app.get(RecipesService, { strict: false });
    expect(await service.findRevision(stranger.house.id, revisions[0]!.id)).toBeNull();
    await expect(service.getFirstRecipeRevision(stranger.house.id)).rejects.toThrow('no recipe yet');
  });

  it('practises the newest revision of the first recipe', async () => {
    const { author, revisions } = await buildRecipe(testApp, { documents: [usualDocument, stronger] });
    await buildRecipe(testApp, { author });
    const service = testApp.app.get(RecipesService, { strict: false });
    expect(await service.getFirstRecipeRevision(author.house.id)).toMatchObject({ id: revisions[1]!.id, number: 2 });
  });
});
