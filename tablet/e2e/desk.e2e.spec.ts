import { readFile, writeFile } from 'node:fs/promises';
import { join } from 'node:path';
import type { Batch, BatchPlan, Ingredient, Recipe, RunEvents } from '@steepfall/shared/contracts';
import { buildWorkedExample } from '@steepfall/shared/testing';
import type { Browser, Locator, Page } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { openBrowser, picture, signedIn } from './browser.ts';
import { HubApi } from './hub-api.ts';
import { Product } from './product.ts';

let product: Product;
let browser: Browser;
let api: HubApi;
let page: Page;

beforeAll(async () => {
  product = await Product.start();
  browser = await openBrowser();
  api = await HubApi.signIn(product.url, 'brewer');
  page = (await signedIn(browser, product.url, 'brewer')).page;
});

afterAll(async () => {
  await browser?.close();
  await product?.stop();
});

const RECIPE = 'Sencha, mint and Saaz';

/** A field of the document, by its path: the same as warnings and the hub name it. */
const field = (path: string, on = page): Locator => on.locator(`[name="${path}"]`);
const figures = (on = page): Locator => on.getByRole('region', { name: 'Figures' });
/** Without the marks of what has just changed. */
const figureWords = async (): Promise<string> => (await figures().innerText()).replaceAll('just changed\n', '');

/** What is typed last reaches the figures a moment later: until two looks show the same. */
async function settledFigures(): Promise<string> {
  let last = '';
  for (;;) {
    const words = await figureWords();
    if (words === last) return words;
    last = words;
    await page.waitForTimeout(400);
  }
}
const figure = (label: string, on = page): Locator =>
  figures(on).getByRole('listitem').filter({ hasText: label }).first();

/** What stands at a field in ember: the part of its description that is an alert. */
const wordsAt = (path: string): Promise<string> =>
  field(path).evaluate((input) =>
    (input.getAttribute('aria-describedby') ?? '')
      .split(' ')
      .map((id) => document.getElementById(id))
      .filter((part) => part?.getAttribute('role') === 'alert')
      .map((part) => part?.textContent)
      .join(' '),
  );

async function add(button: string, section: string, name: string, massG: string): Promise<void> {
  const part = page.getByRole('region', { name: section, exact: true });
  await part.getByRole('button', { name: button }).click();
  const row = part.getByRole('listitem').last();
  await row.getByLabel('Name').fill(name);
  await row.getByLabel('Name').press('Escape');
  await row.locator('[name$=".massG"]').fill(massG);
}

async function save(note: string, on = page): Promise<void> {
  await on.getByRole('button', { name: 'Save', exact: true }).click();
  const dialog = on.getByRole('dialog');
  await dialog.getByRole('textbox').fill(note);
  await dialog.getByRole('button', { name: 'Save', exact: true }).click();
}

async function newest(): Promise<Recipe> {
  const recipes = await api.get<Recipe[]>('recipes');
  return api.get<Recipe>(`recipes/${recipes.find(({ name }) => name === RECIPE)?.id}`);
}

async function stocked(name: string): Promise<Ingredient> {
  const found = (await api.get<Ingredient[]>('stores')).find(({ facts }) => facts.name === name);
  if (!found) throw new Error(`The stores have no ${name}.`);
  return found;
}

// One after the other, as a brewer's evening goes: each part goes on where the one before ended.
describe('a recipe, from nothing to its run', () => {
  it('is written while every figure moves', async () => {
    await page.goto(`${product.url}/recipes`);
    await page.getByRole('link', { name: 'New recipe' }).click();
    await page.getByLabel('Name', { exact: true }).fill(RECIPE);
    await add('Add an acid', 'Salts and acid', 'citric acid', '4.5');
    const withAcid = await figure('pH of water, salts and acid').innerText();
    await add('Add a tea', 'Tea', 'sencha', '90');
    await expect.poll(() => figure('Caffeine').innerText()).toMatch(/\d/);
    await add('Add hops', 'Hops', 'Saaz', '50');
    await expect.poll(() => figure('Bitterness index').innerText()).toMatch(/\d/);
    await add('Add something else', 'Anything else', 'mint', '20');

    const before = await figures().innerText();
    await page.getByRole('region', { name: 'Salts and acid' }).locator('[name$=".massG"]').fill('6');
    await expect.poll(() => figure('pH of water, salts and acid').innerText()).not.toBe(withAcid);
    await field('steepC').fill('80');
    await expect.poll(() => figures().innerText()).not.toBe(before);
  });

  it('says what is wrong at the field, keeps the last good figures, and loses nothing', async () => {
    const good = await settledFigures();
    const bad: [path: string, typed: string, says: RegExp][] = [
      ['volumeL', '-3', /above 0/],
      ['volumeL', '', /number/i],
      ['volumeL', '1e9', /at most/i],
      ['waterL', 'twenty', /number/i],
      ['steepC', '180', /at most/i],
      ['gas.volumes', 'NaN', /number/i],
    ];
    for (const [path, typed, says] of bad) {
      const kept = await field(path).inputValue();
      await field(path).fill(typed);
      await expect.poll(() => wordsAt(path)).toMatch(says);
      expect(await field(path).inputValue()).toBe(typed);
      await expect.poll(() => page.getByText('As of before').first().isVisible()).toBe(true);
      await field(path).fill(kept);
    }
    await expect.poll(figureWords).toBe(good);
  });

  it('comes back after a reload, and is saved', async () => {
    await page.reload();
    await page.getByRole('button', { name: /Go on/ }).click();
    await expect.poll(() => page.getByLabel('Name', { exact: true }).inputValue()).toBe(RECIPE);
    await save('First version.');
    await page.getByRole('heading', { level: 1, name: RECIPE }).waitFor();
    expect((await newest()).latestRevisionNumber).toBe(1);
  });

  it('is revised, and the history says the difference in words', async () => {
    await page.getByRole('link', { name: 'Change', exact: true }).click();
    await page.getByRole('region', { name: 'Tea', exact: true }).locator('[name$=".massG"]').fill('100');
    await page.getByRole('region', { name: 'Hops', exact: true }).getByRole('button', { name: /Saaz/ }).first().click();
    await page.getByRole('region', { name: 'Hops', exact: true }).locator('[name$=".in.tempC"]').fill('60');
    await save('Rounder.');
    await page.getByText('revision 2', { exact: false }).first().waitFor();
    const history = page.getByRole('region', { name: /history/i });
    const said = async () => (await history.innerText()).replace(/[\s\u00a0]+/g, ' ');
    await expect.poll(said).toMatch(/sencha 90 g .*→ 100 g/);
    await expect.poll(said).toMatch(/hops in 62 °C .*→ 60 °C/);
  });

  it('is scaled to what the stores have', async () => {
    const { stockG, reservedG } = await stocked('sencha');
    await page.getByRole('link', { name: 'Change', exact: true }).click();
    await page
      .getByRole('region', { name: 'Tea', exact: true })
      .locator('[name$=".massG"]')
      .fill(String(stockG - reservedG + 40));
    await page.getByRole('button', { name: 'Scale' }).click();
    const dialog = page.getByRole('dialog');
    await dialog.getByRole('radio', { name: /stores/i }).click();
    await dialog.getByText(/of sencha left/).waitFor();
    await dialog.getByRole('button', { name: 'Take it to the desk' }).click();
    await save('As much as the stores have.');
    await page.getByText('revision 3', { exact: false }).first().waitFor();
    const { document } = (await newest()).revisions[0]!;
    expect(document.volumeL).toBeLessThan(20);
    expect(document.additions.find(({ name }) => name === 'sencha')?.massG).toBeLessThanOrEqual(stockG - reservedG);
  });

  it('two people: the second is asked, and nothing is lost', async () => {
    const other = (await signedIn(browser, product.url, 'owner')).page;
    const { id } = await newest();
    await page.goto(`${product.url}/recipes/${id}/edit`);
    await other.goto(`${product.url}/recipes/${id}/edit`);
    await field('transferC', other).fill('18');
    await save('Colder into the keg.', other);
    await other.getByText('revision 4', { exact: false }).first().waitFor();
    await field('steepC').fill('78');
    await save('Gentler.');
    const asked = page.getByRole('alertdialog');
    await asked.getByText(/saved revision 4 while you were at it/).waitFor();
    await asked.getByRole('button', { name: 'Join both' }).click();
    await page.getByText('revision 5', { exact: false }).first().waitFor();
    const { revisions } = await newest();
    expect(revisions[0]?.document).toMatchObject({ transferC: 18, steepC: 78 });
    expect(revisions).toHaveLength(5);
    await other.context().close();
  });

  it('is planned with its lots set aside, and the run pins that revision', async () => {
    const before = await stocked('sencha');
    await page.getByRole('button', { name: 'Plan a batch' }).click();
    const dialog = page.getByRole('dialog');
    await dialog.getByRole('button', { name: 'Plan it' }).click();
    await page.waitForURL(/\/batches\//);
    const batch = await api.get<Batch>(`batches/${page.url().split('/').at(-1)}`);
    const { revisions } = await newest();
    expect(batch.revisionId).toBe(revisions[0]?.id);
    const plan = await api.get<BatchPlan>(`batches/${batch.id}/plan`);
    const setAside =
      plan.weighOut.find(({ name }) => name === 'sencha')?.lots.reduce((sum, lot) => sum + lot.massG, 0) ?? 0;
    expect(setAside).toBeGreaterThan(0);
    expect((await stocked('sencha')).reservedG).toBeCloseTo(before.reservedG + setAside, 3);

    await page.getByRole('button', { name: 'Start the run' }).click();
    await page.getByRole('button', { name: 'It is ready, start' }).click();
    await page.waitForURL(/\/runs\//);
    const runId = page.url().split('/').at(-1)!;
    const { events } = await api.get<RunEvents>(`runs/${runId}/events?afterSeq=0`);
    expect(events[0]).toMatchObject({ type: 'run.started', payload: { revisionId: revisions[0]?.id } });
    await expect.poll(async () => (await stocked('sencha')).stockG).toBeCloseTo(before.stockG - setAside, 3);
  });
});

describe('the worked example', () => {
  it('stands on its page as it was worked out by hand, each figure in its band', async () => {
    const body = {
      name: 'Worked example',
      summary: '',
      note: 'From the page to the figures.',
      document: buildWorkedExample(),
    };
    const { id } = await api.post<Recipe>('recipes', body);
    await page.goto(`${product.url}/recipes/${id}`);
    const valueOf = async (label: string): Promise<number> => {
      const words = await figure(label).innerText();
      return Number(/-?\d+(\.\d+)?/.exec(words.replace(label, ''))?.[0]);
    };
    await figure('Calcium').waitFor();
    // Stoichiometry; Goldberg 2002 with Davies; J. Tea Sci. Res. 2024; Maye 2015, with the bands of their judgements.
    const printed: [label: string, low: number, high: number][] = [
      ['Calcium', 109, 111],
      ['pH of water, salts and acid', 3.07, 3.09],
      ['pH of the drink, still', 3.53, 4.09],
      ['Caffeine', 86, 192],
      ['Bitterness index', 3.7, 9.4],
      ['Into the keg', 18.4, 19.2],
    ];
    for (const [label, low, high] of printed) {
      const value = await valueOf(label);
      expect(value, label).toBeGreaterThanOrEqual(low);
      expect(value, label).toBeLessThanOrEqual(high);
    }
  });
});

describe('bad files', () => {
  const scratch = (name: string) => join(import.meta.dirname, '../../.test-data', name);

  it('refuses a text that is named like a picture, and one of forty megabytes', async () => {
    const sencha = await stocked('sencha');
    await page.goto(`${product.url}/stores/${sencha.id}`);
    await page.getByRole('button', { name: /label/i }).first().click();
    const dialog = page.getByRole('dialog');
    await writeFile(scratch('notes.jpg'), 'This is a text.');
    await dialog.locator('input[type=file]').setInputFiles(scratch('notes.jpg'));
    await dialog
      .getByRole('button', { name: /^Send|Keep|Use/ })
      .first()
      .click();
    await expect.poll(() => dialog.getByRole('alert').first().innerText()).toMatch(/picture|JPEG|image/i);
    await writeFile(scratch('large.jpg'), Buffer.alloc(40 * 1024 * 1024, 1));
    await dialog.locator('input[type=file]').setInputFiles(scratch('large.jpg'));
    const send = dialog.getByRole('button', { name: /^Send|Keep|Use/ }).first();
    if (await send.isEnabled()) await send.click();
    await expect.poll(() => dialog.getByRole('alert').first().innerText()).toMatch(/12 MB|large/i);
  });

  it('names the broken row of a list, and brings in none until it is left out', async () => {
    const lotCount = async () => (await stocked('sencha')).lots.length;
    const before = await lotCount();
    await page.goto(`${product.url}/stores/import`);
    const [download] = await Promise.all([
      page.waitForEvent('download'),
      page.getByRole('button', { name: 'Save a template' }).click(),
    ]);
    const [head = '', row = ''] = (await readFile(await download.path(), 'utf8')).split('\r\n');
    const broken = row.replace('1.5 kg', 'a lot').replace('L-2203', 'L-2204');
    await writeFile(scratch('list.csv'), [head, row, broken].join('\n'));
    await page.locator('input[type=file]').setInputFiles(scratch('list.csv'));
    const bad = page.getByRole('row').filter({ has: page.getByRole('checkbox', { name: 'Leave out row 3' }) });
    expect(await bad.innerText()).toMatch(/mass/i);
    const bringIn = page.getByRole('button', { name: /^Bring in/ });
    expect(await bringIn.isDisabled()).toBe(true);
    expect(await lotCount()).toBe(before);
    await bad.getByRole('checkbox').click();
    await bringIn.click();
    await page.getByRole('heading', { name: 'It is on the shelf' }).waitFor();
    expect(await lotCount()).toBe(before + 1);
  });
});

describe('the screens of the desk, at every size and on both grounds', () => {
  it.each([
    { name: 'recipe-editor', path: async () => `/recipes/${(await newest()).id}/edit`, seen: 'form' },
    { name: 'recipe-new', path: async () => '/recipes/new', seen: 'form' },
    { name: 'recipe-view', path: async () => `/recipes/${(await newest()).id}`, seen: 'h2' },
    { name: 'stores', path: async () => '/stores', seen: 'table' },
    { name: 'ingredient', path: async () => `/stores/${(await stocked('Cascade')).id}`, seen: 'h2' },
    { name: 'stores-import', path: async () => '/stores/import', seen: 'button' },
  ])('shows $name', async ({ name, path, seen }) => {
    await page.goto(`${product.url}${await path()}`);
    await page.locator('main').locator(seen).first().waitFor();
    await page.waitForLoadState('networkidle');
    expect(await picture(page, `desk-${name}`)).toEqual([]);
  });

  it('shows the plan of a batch', async () => {
    const planned = (await api.get<Batch[]>('batches')).find(({ status }) => status === 'planned');
    await page.goto(`${product.url}/batches/${planned?.id}`);
    await page.locator('main').locator('h2').first().waitFor();
    await page.waitForLoadState('networkidle');
    expect(await picture(page, 'desk-batch-planned')).toEqual([]);
  });
});
