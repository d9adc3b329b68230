import type { RunEvents } from '@steepfall/shared/contracts';
import { foldRun, type RunState } from '@steepfall/shared/runs';
import type { Browser, Page } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { openBrowser, picture, signedIn, type Finding } from './browser.ts';
import { Hand } from './hand.ts';
import { HubApi } from './hub-api.ts';
import { Product } from './product.ts';

let product: Product;
let browser: Browser;
let page: Page;
let hand: Hand;
let api: HubApi;
let runId: string;
const findings: Finding[] = [];

beforeAll(async () => {
  product = await Product.start();
  browser = await openBrowser();
  page = (await signedIn(browser, product.url, 'brewer')).page;
  hand = new Hand(page);
  api = await HubApi.signIn(product.url, 'brewer');
});

afterAll(async () => {
  await browser?.close();
  await product?.stop();
});

async function state(): Promise<RunState> {
  return foldRun((await api.get<RunEvents>(`runs/${runId}/events?afterSeq=0`)).events);
}

const hopsIn = ({ steps }: RunState) => steps.find(({ step }) => step.id === 'hops-in');
const choices = () => page.getByRole('group', { name: 'What to do about it' });

// One catch, told in order: each part goes on where the one before ended.
describe('a catch that nobody was there for', () => {
  it('comes to "late", with the ways out and their figures', async () => {
    await page.getByRole('button', { name: 'Rehearse' }).click();
    await hand.checkSound();
    runId = new URL(page.url()).pathname.split('/')[2] ?? '';
    for (const title of ['Check the kit', 'Fill the kettle', 'Light the heat', 'Salts in', 'Acid in', 'Measure pH'])
      await hand.done(title);
    await hand.done('Coil in');
    await hand.doneWhenCalled('Tea in', async () => (await state()).doneOrder.includes('heat'));
    await hand.doneWhenCalled('Tea out', async () => (await state()).doneOrder.includes('steep'));
    await hand.done('Chiller on');
    await hand.until('Hops in');
    await hand.setRate(10);
    await choices().waitFor({ timeout: 120_000 });
    // Late enough for each of the ways to be worth it.
    await choices()
      .getByRole('button', { name: /^Add now, hold \d+.min/ })
      .waitFor({ timeout: 60_000 });
    await hand.setRate(1);
    const words = await choices().getByRole('button').allTextContents();
    expect(words[0]).toMatch(/^Add now, hold .* at \d+.°C.*contact as planned, bitterness/);
    expect(words.at(-1)).toMatch(/^Add now and accept.*contact 0\.\d/);
    expect(words.some((text) => /^Reheat, about \d+.min/.test(text))).toBe(true);
    findings.push(...(await picture(page, 'missed', { isClearOfActBar: true })));
  });

  it('is heated up again, which is silent and leaves the hops to their next call, and taken back', async () => {
    await hand.press(/^Reheat/);
    await page.getByText(/Reheating, about/).waitFor();
    findings.push(...(await picture(page, 'missed-reheat', { isClearOfActBar: true })));
    await expect.poll(async () => (await state()).choices.map(({ choice }) => choice)).toEqual(['reheat']);
    expect(hopsIn(await state())?.status).toBe('current');
    await hand.press('Take back');
    await choices().waitFor();
  });

  it('is added and held with one press, with the temperature of that moment', async () => {
    await hand.press(/^Add now, hold/);
    await hand.until('Hops out');
    await expect.poll(async () => hopsIn(await state())?.status).toBe('done');
    const { choices: made, timers, steps } = await state();
    expect(made).toMatchObject([{ choice: 'hold', stepId: 'hops-in' }]);
    expect(timers.map(({ label }) => label)).toContain('Hold');
    const done = steps.find(({ step }) => step.id === 'hops-in');
    const targetC = done?.step.start.by === 'temperature' ? done.step.start.tempC : 0;
    expect(done?.tempC).toBeLessThan(targetC);
    findings.push(...(await picture(page, 'missed-hold', { isClearOfActBar: true })));
  });

  it('has nothing for axe to find, and nothing covered', () => {
    expect(findings).toEqual([]);
  });
});
