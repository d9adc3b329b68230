import { mkdir } from 'node:fs/promises';
import { join } from 'node:path';
import type { StoredRunEvent } from '@steepfall/shared/runs';
import type { Browser, Page } from 'playwright-core';
import { afterAll, afterEach, beforeAll, describe, expect, it } from 'vitest';
import { openBrowser, picture, signedIn, sizes } from './browser.ts';
import { Chromium, signIn, type Tab } from './devtools.ts';
import { earsScript, heardOf, loudest, soundsOf, wordsOf } from './ears.ts';
import { Hand } from './hand.ts';
import { HubApi } from './hub-api.ts';
import { Product } from './product.ts';
import { Rehearsal } from './rehearsal.ts';
import { writeBarFilm } from './wave-film.ts';

/** From the call to the hops in the liquid: what this hand needs, and has told the product. */
const REACH_S = 8;
/** A long coil in cold water: about ten kelvin a minute at the level of the hops. */
const LONG_COIL_M = 19;
const HEARD = 0.01;

let product: Product;
let api: HubApi;

beforeAll(async () => {
  product = await Product.start();
  api = await HubApi.signIn(product.url, 'brewer');
  await api.patch('me/reach', { reachS: REACH_S });
  await product.execute("UPDATE equipment SET facts = JSON_SET(facts, '$.lengthM', ?) WHERE kind = 'chiller'", [
    LONG_COIL_M,
  ]);
});

afterAll(async () => {
  await product?.stop();
});

const sleep = (ms: number) => new Promise((passed) => setTimeout(passed, Math.max(0, ms)));

describe('a person at a kettle that falls by ten kelvin a minute', () => {
  let browser: Chromium;
  let sheet: Tab;

  afterAll(async () => {
    await browser?.close();
  });

  it('gets the hops in within half a kelvin, called by tone and words', async () => {
    browser = await Chromium.launch();
    await signIn(browser, product.url, 'brewer');
    const rehearsal = await Rehearsal.start(api, 60);
    await rehearsal.goTo('chill');
    await rehearsal.setRate(1);

    sheet = await browser.newTab(earsScript);
    await sheet.bringToFront();
    await sheet.goto(`${product.url}${rehearsal.path}`);
    await sheet.heading('Sound check');
    // Nothing but eyes so far: the browser has seen no gesture, and the page has made no sound.
    expect(await sheet.look('navigator.userActivation.hasBeenActive')).toBe(false);
    expect(await soundsOf(sheet)).toEqual([]);
    await sheet.tap('Play the alarm');
    expect(await loudest(sheet, 1_500)).toBeGreaterThan(HEARD);
    expect(wordsOf((await soundsOf(sheet))[0]!)).toEqual(['tone now', 'sound-check']);
    await sheet.tap('Yes, I heard it');

    await sheet.heading('Chiller on');
    await sheet.tap('Done');
    await sheet.until(`document.querySelector('main')?.dataset.alert === 'now'`, 180_000);
    const calledAtMs = Date.now();
    expect(await sheet.look(`document.querySelector('#step-heading').textContent`)).toBe('Hops in');
    const tone = await loudest(sheet, 2_500);
    await sleep(calledAtMs + 3_400 - Date.now());
    const words = await loudest(sheet, 1_200);
    await sleep(calledAtMs + REACH_S * 1000 - 450 - 110 - Date.now());
    await sheet.tap('Done');
    await sheet.heading('Hops out');

    const call = (await heardOf(sheet)).find(
      (sound) => wordsOf(sound)[0] === 'tone now' && wordsOf(sound).includes('hops-in'),
    );
    expect(wordsOf(call!)).toEqual(['tone now', 'hops-in', expect.stringMatching(/^n\d+$/), 'degrees']);
    expect(Math.abs(call!.atMs - calledAtMs)).toBeLessThan(1_000);
    expect(tone).toBeGreaterThan(HEARD);
    expect(words).toBeGreaterThan(HEARD);
    expect(call!.stoppedAtMs).not.toBeNull();

    const isHopsDone = (event: StoredRunEvent) => event.type === 'step.done' && event.payload.stepId === 'hops-in';
    await expect.poll(async () => (await rehearsal.events()).some(isHopsDone), { timeout: 5_000 }).toBe(true);
    const [raised] = await rehearsal.raised('hops-in', 'now');
    const done = (await rehearsal.events()).find(isHopsDone);
    if (done?.type !== 'step.done') throw new Error('The hops are not in the log.');
    const liquid = await rehearsal.liquidAt(product, done.atMs);
    const targetC = raised?.payload.targetC ?? 0;
    console.log(
      `hops in at ${liquid.tempC.toFixed(2)} °C for ${targetC} °C, falling ${(-liquid.perMin).toFixed(1)} K/min; ` +
        `the sheet wrote ${done.payload.tempC}; ${((done.atMs - (raised?.atMs ?? 0)) / 1000).toFixed(1)} s after the call`,
    );
    expect(-liquid.perMin).toBeGreaterThan(9);
    expect(Math.abs(liquid.tempC - targetC)).toBeLessThan(0.5);
    // Written down as it was: by a hand, at its moment, at the temperature of the liquid and not of the probe.
    expect(done.payload.cause).toBe('hand');
    expect(Math.abs((done.payload.tempC ?? 0) - liquid.tempC)).toBeLessThan(0.5);
    expect(await rehearsal.raised('hops-in', 'now')).toHaveLength(1);
  });
});

describe('a sheet that is worked from afar', () => {
  let browser: Browser;

  afterEach(async () => {
    await browser?.close();
  });

  async function openSheet(flags: string[] = []): Promise<{ page: Page; hand: Hand; rehearsal: Rehearsal }> {
    browser = await openBrowser(flags);
    const { page } = await signedIn(browser, product.url, 'brewer');
    const rehearsal = await Rehearsal.start(api, 1);
    await page.goto(`${product.url}${rehearsal.path}`);
    const hand = new Hand(page);
    await hand.checkSound();
    await hand.until('Check the kit');
    return { page, hand, rehearsal };
  }

  it('does what a pedal says that was taught here, once a press, whatever has the focus', async () => {
    browser = await openBrowser();
    const { page } = await signedIn(browser, product.url, 'brewer');
    await page.goto(`${product.url}/about`);
    await page.getByRole('button', { name: 'Teach “next”' }).click();
    await page.keyboard.press('Escape');
    await page.getByText('Nothing changed.').waitFor();
    await page.getByRole('button', { name: 'Teach “next”' }).click();
    await page.keyboard.press('b');
    await page.getByText('B is “next” at this station.').waitFor();
    expect(await picture(page, 'hands-station')).toEqual([]);

    const rehearsal = await Rehearsal.start(api, 1);
    await page.goto(`${product.url}${rehearsal.path}`);
    const hand = new Hand(page);
    await hand.checkSound();
    await hand.until('Check the kit');
    const isOnHeading = () => page.evaluate(() => document.activeElement?.id === 'step-heading');
    for (const [key, title] of [
      ['b', 'Fill the kettle'],
      ['PageDown', 'Light the heat'],
      ['PageUp', 'Fill the kettle'],
    ] as const) {
      await page.keyboard.press(key);
      await page.keyboard.press(key);
      await hand.until(title);
      expect(await isOnHeading()).toBe(true);
      await page.waitForTimeout(400);
    }
    // With a panel open, a pedal does nothing behind it.
    await hand.press('Note');
    await page.getByRole('dialog').getByRole('button', { name: 'Close', exact: true }).focus();
    await page.keyboard.press('PageDown');
    await page.keyboard.press('b');
    await page.keyboard.press('Escape');
    await page.getByRole('dialog').waitFor({ state: 'detached' });
    await hand.until('Fill the kettle');
  });

  it('lets the glass be wiped, and an alert through', async () => {
    const { page, hand, rehearsal } = await openSheet();
    const wipe = page.getByRole('button', { name: /^Wipe/ });
    await wipe.click({ delay: 300 });
    expect(await page.locator('.wipe-lock').count()).toBe(0);
    await wipe.click({ delay: 900 });
    await page.locator('.wipe-lock').waitFor();
    const done = await page.getByRole('button', { name: /^Done/ }).boundingBox();
    const middle = { x: done!.x + done!.width / 2, y: done!.y + done!.height / 2 };
    await page.mouse.click(middle.x, middle.y, { delay: 120 });
    expect(await hand.title()).toBe('Check the kit');
    await rehearsal.startTimer('Rinse the bag', 3);
    await page.locator('main[data-alert="now"]').waitFor({ timeout: 8_000 });
    await page.screenshot({ path: await shotPath('hands-wipe') });
    await page.mouse.click(middle.x, middle.y, { delay: 120 });
    await page.locator('main[data-alert="now"]').waitFor();
    await page.keyboard.press('PageDown');
    await page.locator('main[data-alert]').waitFor({ state: 'detached', timeout: 5_000 });
    await page.locator('.wipe-lock').waitFor({ state: 'detached', timeout: 20_000 });
    await hand.done('Check the kit');
    await hand.until('Fill the kettle');
  });

  it.each([
    { film: 'sweep', doneCount: 1 },
    { film: 'still', doneCount: 0 },
    { film: 'flicker', doneCount: 0 },
  ] as const)('sees $doneCount waves in a picture with a $film', async ({ film, doneCount }) => {
    const path = await writeBarFilm(film);
    const { page, hand, rehearsal } = await openSheet([
      '--use-fake-ui-for-media-stream',
      '--use-fake-device-for-media-stream',
      `--use-file-for-fake-video-capture=${path}`,
    ]);
    expect(await page.locator('.chip[data-name="wave"]').count()).toBe(0);
    await page.goto(`${product.url}/about`);
    await page.getByRole('radio', { name: 'On', exact: true }).first().click();
    await page.goto(`${product.url}${rehearsal.path}`);
    await page.locator('.chip[data-name="wave"]', { hasText: 'looking' }).waitFor();
    await page.waitForTimeout(9_000);
    const done = (await rehearsal.events()).filter(({ type }) => type === 'step.done');
    expect(done).toHaveLength(doneCount);
    expect(await hand.title()).toBe(doneCount === 1 ? 'Fill the kettle' : 'Check the kit');
    await page.getByRole('button', { name: /probe/ }).click();
    await page.getByRole('dialog').getByText('wave: looking').waitFor();
    await page.getByRole('dialog').getByRole('button', { name: 'Close', exact: true }).click();
    // The camera goes off with the run.
    await rehearsal.write('run.ended', { outcome: 'finished', reason: '' });
    await page.locator('.chip[data-name="wave"]').waitFor({ state: 'detached' });
  });
});

async function shotPath(name: string): Promise<string> {
  const folder = join(import.meta.dirname, 'screenshots');
  await mkdir(folder, { recursive: true });
  return join(folder, `${name}.png`);
}

describe('the four stages of an alert', () => {
  let browser: Browser;
  let page: Page;
  let rehearsal: Rehearsal;

  beforeAll(async () => {
    browser = await openBrowser();
    ({ page } = await signedIn(browser, product.url, 'brewer'));
    rehearsal = await Rehearsal.start(api, 1);
    await rehearsal.goTo('heat');
    await page.goto(`${product.url}${rehearsal.path}`);
    await new Hand(page).checkSound();
  });

  afterAll(async () => {
    await browser?.close();
  });

  it.each(['coming-up', 'stand-by', 'now', 'missed'] as const)(
    '"%s" reads from three metres for every eye',
    async (stage) => {
      const nowMs = Date.now();
      await rehearsal.write('alert.raised', {
        key: 'heat',
        crossing: 1,
        rule: 'temperature',
        stage,
        stepId: 'heat',
        actStepId: 'tea-in',
        tempC: 74.2,
        targetC: 76,
        direction: 'rising',
        dueAtMs: nowMs + { 'coming-up': 100_000, 'stand-by': 25_000, now: 8_000, missed: -20_000 }[stage],
      });
      const isTaken = stage === 'now' || stage === 'missed';
      await page.locator(isTaken ? `main[data-alert="${stage}"]` : `.strip[data-stage="${stage}"]`).waitFor();
      await page.emulateMedia({ reducedMotion: 'no-preference' });
      expect(await picture(page, `stage-${stage}`, { isClearOfActBar: true })).toEqual([]);

      // Capitals of 0.7 of the size, 0.17 mm to a pixel of a ten-inch tablet: 14 mm are the least for three metres. A rehearsal gives up a
      // seventh of its size to the line that says so: a run has 18 mm there, and 10 mm for the step, which two metres ask for.
      await page.setViewportSize(sizes.tablet);
      const heightMm = (selector: string) =>
        page
          .locator(selector)
          .first()
          .evaluate((one) => Number.parseFloat(getComputedStyle(one).fontSize) * 0.7 * 0.17);
      expect(await heightMm('.live-figure')).toBeGreaterThan(14);
      expect(await heightMm(isTaken ? '.take-over-verb' : '.step-title')).toBeGreaterThan(isTaken ? 11 : 8);

      const devtools = await page.context().newCDPSession(page);
      for (const colorScheme of ['light', 'dark'] as const) {
        await page.emulateMedia({ colorScheme, reducedMotion: 'reduce' });
        const moving = () =>
          page.evaluate(() => document.getAnimations().filter(({ playState }) => playState === 'running').length);
        await expect.poll(moving, { timeout: 2_000 }).toBe(0);
        for (const type of ['protanopia', 'deuteranopia', 'tritanopia', 'achromatopsia'] as const) {
          await devtools.send('Emulation.setEmulatedVisionDeficiency', { type });
          await page.screenshot({
            path: await shotPath(`stage-${stage}-${type}-${colorScheme === 'light' ? 'day' : 'night'}`),
          });
        }
        await devtools.send('Emulation.setEmulatedVisionDeficiency', { type: 'none' });
      }
      await devtools.detach();
    },
  );
});
