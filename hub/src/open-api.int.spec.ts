import request from 'supertest';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { createTestApp, type TestApp } from '../test/create-test-app.js';
import { everyHandler } from '../test/every-handler.js';

interface Operation {
  responses: Record<string, { content?: Record<string, { schema: unknown }> }>;
  requestBody?: { content: Record<string, { schema: unknown }> };
  security?: unknown;
}
interface Document {
  paths: Record<string, Record<string, Operation>>;
  components: { schemas: Record<string, object> };
}

/** Handlers that answer with a file, and those that take one in a form. */
const files: Record<string, string> = {
  'LotPhotosController.get': 'image/jpeg',
  'StoresCsvController.export': 'text/csv',
};
const forms = ['LotPhotosController.set'];

describe('the API document', () => {
  let testApp: TestApp;
  let document: Document;
  beforeAll(async () => {
    testApp = await createTestApp();
    document = (await request(testApp.url).get('/api/docs-json')).body as Document;
  });
  afterAll(() => testApp.close());

  it('names every route, with its answer and its problems', () => {
    for (const { route, rule, name } of everyHandler(testApp.app)) {
      if (!route) continue;
      const operation = document.paths[route.path.replaceAll(/:(\w+)/g, '{$1}')]?.[route.method];
      expect(operation, name).toBeDefined();
      const { responses, requestBody, security } = operation!;
      expect(responses['default']?.content, name).toHaveProperty(['application/problem+json']);
      const done = Object.keys(responses).filter((status) => status.startsWith('2'));
      expect(done, name).toHaveLength(1);
      const answerType = files[name] ?? 'application/json';
      if (done[0] !== '204') expect(responses[done[0]!]?.content, name).toHaveProperty([answerType, 'schema']);
      if (rule?.kind === 'permission') expect(security, name).toEqual([{ bearer: [] }]);
      if (!requestBody) continue;
      if (forms.includes(name)) expect(requestBody.content, name).toHaveProperty(['multipart/form-data', 'schema']);
      else expect(requestBody.content, name).toHaveProperty(['application/json', 'schema', '$ref']);
    }
  });

  it('is written from the shared schemas', () => {
    expect(Object.keys(document.components.schemas)).toEqual(
      expect.arrayContaining(['Problem', 'Session', 'CreateEquipment', 'Batch', 'RunSummary', 'RecipeDocument']),
    );
    const dangling = [...JSON.stringify(document).matchAll(/"#\/components\/schemas\/(\w+)"/g)].filter(
      ([, name]) => !(name! in document.components.schemas),
    );
    expect(dangling).toEqual([]);
  });

  it('has a page that needs no script of its own in the page', async () => {
    const page = await request(testApp.url).get('/api/docs');
    expect(page.status).toBe(200);
    expect(page.text.match(/<script(?![^>]*\bsrc=)/g)).toBeNull();
    expect((await request(testApp.url).get('/api/docs/swagger-ui-init.js')).status).toBe(200);
  });
});
