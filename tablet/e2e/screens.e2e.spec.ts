import type { Batch, RecipeSummary } from '@steepfall/shared/contracts';
import type { Browser, Page } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { openBrowser, picture, signedIn, sizes } from './browser.ts';
import { Hand } from './hand.ts';
import { HubApi } from './hub-api.ts';
import { Product } from './product.ts';

/** A pedal answers again after this. */
const PEDAL_REST_MS = 350;

let product: Product;
let browser: Browser;
let api: HubApi;
let desk: Page;
let sheet: Page;
let hand: Hand;

beforeAll(async () => {
  product = await Product.start();
  browser = await openBrowser();
  api = await HubApi.signIn(product.url, 'owner');
  desk = (await signedIn(browser, product.url, 'owner')).page;
  sheet = (await signedIn(browser, product.url, 'brewer')).page;
  hand = new Hand(sheet);
});

afterAll(async () => {
  await browser?.close();
  await product?.stop();
});

async function finishedBatch(): Promise<Batch> {
  const batch = (await api.get<Batch[]>('batches')).find(({ status }) => status === 'finished');
  if (!batch) throw new Error('The demo house has no finished batch.');
  return batch;
}

async function recipePath(): Promise<string> {
  const [recipe] = await api.get<RecipeSummary[]>('recipes');
  return `/recipes/${recipe?.id}`;
}

const places: { name: string; path: () => Promise<string>; seen: string }[] = [
  { name: 'desk-home', path: async () => '/', seen: '#planned' },
  { name: 'desk-recipes', path: async () => '/recipes', seen: 'a[href^="/recipes/"]' },
  { name: 'desk-recipe', path: recipePath, seen: 'h2' },
  { name: 'desk-batches', path: async () => '/batches', seen: 'a[href^="/batches/"]' },
  { name: 'desk-batch', path: async () => `/batches/${(await finishedBatch()).id}`, seen: '.uplot canvas' },
  { name: 'desk-house', path: async () => '/house', seen: 'h2' },
  { name: 'desk-about', path: async () => '/about', seen: 'h2' },
  { name: 'desk-not-found', path: async () => '/no-such-place', seen: 'h1' },
];

describe('the desk, at every size and on both grounds', () => {
  it('shows the way in', async () => {
    const context = await browser.newContext({ viewport: sizes.tablet });
    const page = await context.newPage();
    await page.goto(`${product.url}/sign-in`);
    await page.getByLabel('E-mail').waitFor();
    expect(await picture(page, 'desk-sign-in')).toEqual([]);
    await context.close();
  });

  it.each(places)('shows $name', async ({ name, path, seen }) => {
    await desk.goto(`${product.url}${await path()}`);
    await desk.locator('main').locator(seen).first().waitFor();
    await desk.waitForLoadState('networkidle');
    expect(await picture(desk, name)).toEqual([]);
  });
});

/** What can be acted on, as the keyboard should find it: of a group of choices only one. */
async function controlsOf(page: Page): Promise<string[]> {
  return page.evaluate(() =>
    [...document.querySelectorAll<HTMLElement>('a[href], button:not(:disabled), input:not(:disabled), select, summary')]
      .filter((control) => control.checkVisibility({ visibilityProperty: true }) && control.tabIndex >= 0)
      .map((control, index) => (control.dataset['control'] = String(index))),
  );
}

// One after the other on one sheet: each part goes on where the one before ended.
describe('the keyboard', () => {
  it('reaches every control of home', async () => {
    await desk.goto(product.url);
    await desk.getByRole('button', { name: 'Rehearse' }).waitFor();
    await desk.waitForLoadState('networkidle');
    const controls = await controlsOf(desk);
    expect(controls.length).toBeGreaterThan(5);
    const reached = new Set<string>();
    for (let press = 0; press < controls.length * 2 && reached.size < controls.length; press += 1) {
      await desk.keyboard.press('Tab');
      const control = await desk.evaluate(() => (document.activeElement as HTMLElement | null)?.dataset['control']);
      if (control !== undefined) reached.add(control);
    }
    expect([...reached].sort()).toEqual([...controls].sort());
  });

  it('goes through five steps of a rehearsal with a pedal, and stands on the heading after each', async () => {
    const run = await api.startRehearsal({ rate: 1 });
    await sheet.goto(`${product.url}/runs/${run.id}`);
    await hand.checkSound();
    const titles = ['Check the kit', 'Fill the kettle', 'Light the heat', 'Salts in', 'Acid in', 'Measure pH'];
    await hand.until(titles[0]!);
    for (const [index, title] of titles.slice(1).entries()) {
      await sheet.waitForTimeout(PEDAL_REST_MS);
      await sheet.keyboard.press(index % 2 === 0 ? 'PageDown' : 'Space');
      await hand.until(title);
      await expect.poll(() => sheet.evaluate(() => document.activeElement?.id)).toBe('step-heading');
    }
  });
});

describe('the panels of the run sheet, at every size and on both grounds', () => {
  it.each([
    { name: 'panel-steps', button: /All steps/, title: 'All steps' },
    { name: 'panel-status', button: /probe/, title: /./ },
    { name: 'panel-note', button: 'Note', title: 'Note' },
    { name: 'panel-timer', button: 'Timer', title: 'Timer' },
  ])('shows $name', async ({ name, button, title }) => {
    await hand.press(button);
    const dialog = sheet.getByRole('dialog');
    await dialog.getByRole('heading', { name: title }).first().waitFor();
    expect(await picture(sheet, name)).toEqual([]);
    await dialog.getByRole('button', { name: 'Close', exact: true }).click();
    await dialog.waitFor({ state: 'detached' });
  });

  it('keeps the words of the step clear of the buttons', async () => {
    expect(await picture(sheet, 'sheet-measure', { isClearOfActBar: true })).toEqual([]);
    await hand.press('Back one');
    await hand.until('Acid in');
    expect(await picture(sheet, 'sheet-acid', { isClearOfActBar: true })).toEqual([]);
  });
});
