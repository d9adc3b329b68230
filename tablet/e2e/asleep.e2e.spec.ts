import { afterAll, afterEach, beforeAll, describe, expect, it } from 'vitest';
import { Chromium, signIn, type Tab } from './devtools.ts';
import { earsScript, heardOf, loudest, soundsOf, wordsOf } from './ears.ts';
import { HubApi } from './hub-api.ts';
import { Product } from './product.ts';
import { Rehearsal } from './rehearsal.ts';

/** Loud enough to be a sound, and a thousand times what keeps an output warm. */
const HEARD = 0.01;

let product: Product;
let browser: Chromium;
let api: HubApi;
/** What a person goes to meanwhile; it hides the other tabs. */
let elsewhere: Tab;
let sheet: Tab;

beforeAll(async () => {
  product = await Product.start();
  browser = await Chromium.launch();
  api = await HubApi.signIn(product.url, 'brewer');
  elsewhere = await signIn(browser, product.url, 'brewer');
});

afterEach(async () => {
  await sheet?.close();
});

afterAll(async () => {
  await browser?.close();
  await product?.stop();
});

const sleep = (ms: number) => new Promise((passed) => setTimeout(passed, Math.max(0, ms)));
const isAlarm = (words: string[]) => words[0] === 'tone now' && !words.includes('sound-check');
const alarms = async () => (await heardOf(sheet)).filter((sound) => isAlarm(wordsOf(sound)));

/** The sheet of a rehearsal, with its sound checked by a finger: the first thing that touches the page at all. */
async function openSheet({ path }: Rehearsal): Promise<void> {
  sheet = await browser.newTab(earsScript);
  await sheet.bringToFront();
  await sheet.goto(`${product.url}${path}`);
  await sheet.heading('Sound check');
  expect(await sheet.look('navigator.userActivation.hasBeenActive')).toBe(false);
  expect(await soundsOf(sheet)).toEqual([]);
  await sheet.tap('Play the alarm');
  await sheet.tap('Yes, I heard it');
}

describe('a tablet that is not looked at', () => {
  it('rings on time in a hidden tab, once, by the audio clock', async () => {
    const rehearsal = await Rehearsal.start(api, 1);
    await openSheet(rehearsal);
    await sheet.heading('Check the kit');
    const { key, endsAtMs } = await rehearsal.startTimer('Rinse the bag', 40);
    await sleep(1_000);
    await elsewhere.bringToFront();
    expect(await sheet.look('document.visibilityState')).toBe('hidden');
    await sleep(endsAtMs - Date.now() - 1_000);
    expect(await alarms()).toEqual([]);
    expect(await loudest(sheet, 3_000)).toBeGreaterThan(HEARD);
    await sleep(1_000);
    const [alarm, ...more] = await alarms();
    expect(more).toEqual([]);
    expect(wordsOf(alarm!)).toEqual(['tone now', 'timer-over']);
    expect(Math.abs(alarm!.atMs - endsAtMs)).toBeLessThan(500);
    expect(await rehearsal.raised(key, 'now')).toHaveLength(1);

    // The answer is given on another device: this one falls silent without being looked at.
    await rehearsal.write('alert.acknowledged', { key, crossing: 1, stage: 'now' });
    await sheet.until('globalThis.ears.sounds.every(({ loop, stoppedAtMs }) => !loop || stoppedAtMs !== null)', 3_000);
    await sleep(500);
    expect(await loudest(sheet, 500)).toBeLessThan(HEARD);
  });

  it('rings at once when a tab that slept wakes, and says how late it is', async () => {
    const rehearsal = await Rehearsal.start(api, 1);
    await openSheet(rehearsal);
    await sheet.heading('Check the kit');
    await elsewhere.bringToFront();
    const { key, endsAtMs } = await rehearsal.startTimer('Rinse the bag', 15);
    await sheet.freeze();
    await sleep(endsAtMs - Date.now() + 12_000);
    const wokenAtMs = Date.now();
    await sheet.wake();
    await sheet.bringToFront();
    await sheet.until(`document.querySelector('main')?.dataset.alert !== undefined`, 2_000);
    expect(await sheet.until<string>(`document.querySelector('.take-over-stage')?.innerText`)).toMatch(
      /due (0:1\d) ago/,
    );
    expect(await loudest(sheet, 2_500)).toBeGreaterThan(HEARD);
    const after = (await alarms()).filter(({ stoppedAtMs }) => stoppedAtMs === null);
    expect(after).toHaveLength(1);
    expect(after[0]!.atMs - wokenAtMs).toBeLessThan(2_500);
    const [tone, what, seconds, late] = wordsOf(after[0]!);
    expect([tone, what, late]).toEqual(['tone now', 'timer-over', 'seconds-late']);
    expect(Number(seconds?.slice(1))).toBeGreaterThanOrEqual(11);
    expect(await rehearsal.raised(key, 'now')).toHaveLength(1);
  });

  it('calls for the hops after a reload at "stand by": once, on time, and heard after the first tap', async () => {
    const rehearsal = await Rehearsal.start(api, 60);
    await rehearsal.goTo('chill');
    await rehearsal.setRate(1);
    await openSheet(rehearsal);
    await sheet.heading('Chiller on');
    await sheet.tap('Done');
    await sheet.until(`document.querySelector('.strip')?.dataset.stage === 'stand-by'`, 150_000);
    const loadedAtMs = await sheet.look<number>('performance.timeOrigin');
    await sheet.send('Page.reload');
    await sheet.until(
      `performance.timeOrigin !== ${loadedAtMs} && document.querySelector('.strip')?.dataset.stage === 'stand-by'`,
      15_000,
    );
    expect(await sheet.look<string>(`document.querySelector('.strip').innerText`)).toContain('Sound is off');
    expect(await soundsOf(sheet)).toEqual([]);
    // A wet finger anywhere on the glass lets the sound out.
    await sheet.touch({ x: 640, y: 300 });
    expect(await loudest(sheet, 3_000)).toBeGreaterThan(HEARD);
    await sheet.until(`document.querySelector('main')?.dataset.alert === 'now'`, 60_000);
    const shownAtMs = Date.now();
    await sheet.heading('Hops in');
    await sleep(3_500);
    const [call, ...more] = await alarms();
    expect(more).toEqual([]);
    expect(wordsOf(call!)).toEqual(['tone now', 'hops-in', expect.stringMatching(/^n\d+$/), 'degrees']);
    expect(Math.abs(call!.atMs - shownAtMs)).toBeLessThan(1_000);
    const raised = await rehearsal.raised('hops-in');
    expect(raised.map(({ payload }) => payload.stage).filter((stage) => stage === 'now')).toHaveLength(1);
    expect(raised.map(({ payload }) => payload.stage)).toContain('stand-by');
  });
});
