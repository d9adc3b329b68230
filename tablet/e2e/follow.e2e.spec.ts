import { randomUUID } from 'node:crypto';
import type { RunEvents, RunSummary } from '@steepfall/shared/contracts';
import { currentStep, decide, foldRun, type RunCommand } from '@steepfall/shared/runs';
import { runTimeAt } from '@steepfall/shared/timers';
import type { Browser, Page } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { openBrowser, picture, signedIn, sizes } from './browser.ts';
import { HubApi } from './hub-api.ts';
import { Product } from './product.ts';

let product: Product;
let browser: Browser;
let api: HubApi;
let desk: Page;
let phone: Page;
let run: RunSummary;

beforeAll(async () => {
  product = await Product.start();
  browser = await openBrowser();
  api = await HubApi.signIn(product.url, 'brewer');
  run = await api.startRehearsal({ rate: 60 });
  desk = (await signedIn(browser, product.url, 'brewer')).page;
  phone = await (await browser.newContext({ viewport: sizes.phone })).newPage();
});

afterAll(async () => {
  await browser?.close();
  await product?.stop();
});

async function act(command: (stepId: string) => RunCommand): Promise<string> {
  const { events } = await api.get<RunEvents>(`runs/${run.id}/events`);
  const state = foldRun(events);
  const step = currentStep(state)?.step;
  if (!step) throw new Error('Every step is done.');
  const context = {
    nowMs: runTimeAt(run.clock, Date.now()),
    by: api.session.member.id,
    station: 'e2e',
    newId: randomUUID,
  };
  const decision = decide(state, command(step.id), context);
  if (!decision.ok) throw new Error(decision.problem.detail);
  await api.append(run.id, decision.events);
  return step.id;
}

const temperature = () => phone.locator('.follow-temp').textContent();

describe('a run that is followed on a phone', () => {
  it('opens by a link that the run sheet shows, without a sign-in', async () => {
    await desk.goto(`${product.url}/runs/${run.id}`);
    await desk.getByRole('button', { name: /probe/ }).click();
    await desk.getByRole('button', { name: 'Follow on a phone' }).click();
    const dialog = desk.getByRole('dialog', { name: 'Follow on a phone' });
    await dialog.getByRole('button', { name: 'Make a link' }).click();
    await dialog.getByRole('img', { name: /Code of the link/ }).waitFor();
    expect(await picture(desk, 'follow-link')).toEqual([]);
    const link = await dialog.getByText('/follow#').textContent();
    await phone.goto(link ?? '');
    await phone.getByRole('heading', { name: 'Check the kit' }).waitFor();
    expect(await phone.evaluate(() => document.cookie)).toBe('');
  });

  it('shows the steps as they are done, and the temperature as it moves', async () => {
    while ((await act((stepId) => ({ type: 'completeStep', stepId, tempC: null }))) !== 'light-heat');
    await phone.getByRole('heading', { name: 'Check the kit' }).waitFor({ state: 'detached' });
    const before = await temperature();
    await expect.poll(temperature, { timeout: 15_000 }).not.toBe(before);
    expect(await picture(phone, 'follow-step')).toEqual([]);
  });

  it('rings after a tap, and says an alert', async () => {
    await phone.setViewportSize(sizes.phone);
    // What the test has asked of the page before may have counted as a tap already.
    const ring = phone.getByRole('button', { name: 'Make this phone ring' });
    if (await ring.isVisible()) await ring.click();
    await phone.getByText('rings', { exact: true }).waitFor();
    // Nobody is at the kettle: the tea is called for, and then it is late.
    const alert = phone.getByRole('region', { name: 'Alert' });
    await alert.getByRole('heading', { name: 'Tea in' }).waitFor({ timeout: 90_000 });
    await alert.getByText('Late', { exact: true }).waitFor({ timeout: 30_000 });
    expect(await alert.getByRole('alert').textContent()).toContain('Late. Tea in.');
    expect(await picture(phone, 'follow-alert')).toEqual([]);
  });

  it('ends when the link is taken back', async () => {
    await desk.goto(product.url);
    await desk.getByRole('button', { name: 'Follow on a phone' }).first().click();
    await desk.getByRole('dialog').getByRole('button', { name: 'Take it back' }).click();
    await phone.getByRole('heading', { name: 'This link is over' }).waitFor();
    expect(await phone.getByRole('alert').textContent()).toContain('The house took it back.');
    await phone.reload();
    await phone.getByRole('heading', { name: 'This link is over' }).waitFor();
    expect(await picture(phone, 'follow-over')).toEqual([]);
  });
});
