import { spawn, type ChildProcess } from 'node:child_process';
import { once } from 'node:events';
import { readFileSync } from 'node:fs';
import { join, resolve } from 'node:path';
import { foldRun, type RunEvent, type StoredRunEvent } from '@steepfall/shared/runs';
import type { RecipeDocument } from '@steepfall/shared/sheets';
import { clockAtRate, wallTimeAt, type RunClock } from '@steepfall/shared/timers';
import type { Recipe, RecipeSummary, RunEvents, RunSummary } from '@steepfall/shared/contracts';
import type { Browser, BrowserContext } from 'playwright-core';
import { v7 } from 'uuid';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { openBrowser, signedIn } from './browser.ts';
import { Hand } from './hand.ts';
import { HubApi } from './hub-api.ts';
import { Product } from './product.ts';

interface Trace {
  name: string;
  family: string;
  targetC: number;
  direction: 'rising' | 'falling';
  lagS: number;
  actions: { act: string; t: number }[];
}

const root = resolve(import.meta.dirname, '../..');
const folder = join(root, 'shared/src/testing/traces');
const traces = JSON.parse(readFileSync(join(folder, 'index.json'), 'utf8')) as Trace[];
const ladder = ['coming-up', 'stand-by', 'now', 'missed'];
/** Run time goes so much faster than the trace was recorded. */
const RATE = 20;
/** A probe is silent until its trace begins; on a fast clock that is soon an alert of its own. */
const PROBE_ALERT = 'Check the probe';

let product: Product;
let browser: Browser;
let context: BrowserContext;
let api: HubApi;
const players = new Set<ChildProcess>();

beforeAll(async () => {
  product = await Product.start();
  browser = await openBrowser();
  ({ context } = await signedIn(browser, product.url, 'brewer'));
  api = await HubApi.signIn(product.url, 'brewer');
});

afterAll(async () => {
  for (const player of players) player.kill();
  await browser?.close();
  await product?.stop();
});

/** A revision of the demo recipe that has its catch where the trace has it. */
async function revisionFor({ targetC, direction }: Trace): Promise<string> {
  const [summary] = await api.get<RecipeSummary[]>('recipes');
  const { revisions } = await api.get<Recipe>(`recipes/${summary?.id}`);
  const latest = revisions.reduce((a, b) => (a.number > b.number ? a : b));
  const { document } = latest;
  const caught: RecipeDocument =
    direction === 'falling'
      ? {
          ...document,
          additions: document.additions.map((addition) =>
            addition.kind === 'hops' ? { ...addition, in: { at: 'falling', tempC: targetC } } : addition,
          ),
        }
      : { ...document, steepC: targetC };
  const id = v7();
  await product.execute(
    `INSERT INTO recipe_revisions (id, house_id, recipe_id, number, note, created_at_ms, created_by, volume_l, document)
     SELECT ?, house_id, recipe_id, ?, 'for a trace', created_at_ms, created_by, volume_l, ? FROM recipe_revisions WHERE id = ?`,
    [id, latest.number + 1, JSON.stringify(caught), latest.id],
  );
  return id;
}

async function eventsOf(runId: string): Promise<StoredRunEvent[]> {
  return (await api.get<RunEvents>(`runs/${runId}/events?afterSeq=0`)).events;
}

interface Scene {
  runId: string;
  token: string;
  write: (type: RunEvent['type'], atMs: number, payload: unknown) => Promise<unknown>;
}

/** A rehearsal that has come to the step before the catch. */
async function runUpTo(trace: Trace): Promise<Scene> {
  const { probe, deviceToken } = await api.addProbe(trace.name, trace.lagS);
  const run = await api.startRehearsal({ rate: 1, revisionId: await revisionFor(trace), probeId: probe.id });
  const write: Scene['write'] = (type, atMs, payload) => {
    const by = api.session.member.id;
    return api.append(run.id, [
      { id: v7(), runId: run.id, type, v: 1, atMs, by, station: 'scene', payload } as RunEvent,
    ]);
  };
  const { steps } = foldRun(await eventsOf(run.id));
  const stop = trace.direction === 'rising' ? 'heat' : 'chill';
  for (const { step } of steps.slice(
    0,
    steps.findIndex(({ step: { id } }) => id === stop),
  ))
    await write('step.done', run.startedAtMs, done(step.id));
  return { runId: run.id, token: deviceToken, write };
}

function done(stepId: string): { stepId: string; cause: 'hand'; tempC: null } {
  return { stepId, cause: 'hand', tempC: null };
}

function replay(trace: Trace, token: string): ChildProcess {
  const player = spawn(
    process.execPath,
    [
      join(root, 'probe-sim/dist/main.js'),
      'replay',
      join(folder, `${trace.name}.csv`),
      '--run-clock',
      '--hub',
      product.url,
    ],
    { stdio: 'ignore', env: { ...process.env, DEVICE_TOKEN: token } },
  );
  players.add(player);
  return player;
}

/** Taps what the person at the kettle tapped, when they did. */
async function tapActions({ actions }: Trace, { runId, write }: Scene, clock: RunClock): Promise<void> {
  const chillerOn = actions.find(({ act }) => act === 'chiller-on');
  if (!chillerOn) return;
  let startMs = 0;
  await expect
    .poll(
      async () => {
        const { readings } = await api.get<{ readings: { atMs: number }[] }>(`runs/${runId}/readings`);
        return (startMs = readings[0]?.atMs ?? 0);
      },
      { timeout: 20_000 },
    )
    .toBeGreaterThan(0);
  const atMs = Math.round(startMs + chillerOn.t * 1000);
  await new Promise((passed) => setTimeout(passed, Math.max(0, wallTimeAt(clock, atMs) - Date.now())));
  await write('step.done', atMs, done('chill'));
}

describe('recorded traces, played back by a probe', () => {
  it.each(traces)('$name reaches the tablet live, with the ladder in order', async (trace) => {
    const scene = await runUpTo(trace);
    const { runId, token, write } = scene;
    const [key, verb] = trace.direction === 'rising' ? ['heat', 'Tea in'] : ['hops-in', 'Hops in'];
    const page = await context.newPage();
    // What the person saw, in the order in which it came up.
    await page.addInitScript((probeAlert) => {
      const seen: string[] = [];
      const temperatures = new Set<string>();
      Object.assign(globalThis, { seen, temperatures });
      const look = () => {
        const stage =
          document.querySelector('main')?.dataset['alert'] ??
          document.querySelector<HTMLElement>('.strip[data-stage]')?.dataset['stage'];
        const heading = document.querySelector('#step-heading')?.textContent;
        if (stage && heading !== probeAlert && seen.at(-1) !== stage) seen.push(stage);
        const shown = document.querySelector('.live-figure')?.textContent;
        if (shown) temperatures.add(shown);
      };
      new MutationObserver(look).observe(document, {
        subtree: true,
        childList: true,
        attributes: true,
        characterData: true,
      });
    }, PROBE_ALERT);
    await page.goto(`${product.url}/runs/${runId}`);
    await new Hand(page).checkSound();

    const run = await api.get<RunSummary>(`runs/${runId}`);
    const clock = clockAtRate(run.clock, RATE, Date.now());
    await write('clock.changed', clock.anchorRunMs, { clock });
    const player = replay(trace, token);
    const tapped = tapActions(trace, scene, clock);
    await page.locator('main[data-alert="now"] #step-heading', { hasText: verb }).waitFor({ timeout: 150_000 });
    await tapped;
    player.kill();
    await once(player, 'exit');
    players.delete(player);

    const raised = (await eventsOf(runId)).flatMap((event) =>
      event.type === 'alert.raised' && event.payload.key === key ? [event.payload.stage] : [],
    );
    expect(raised).toEqual([...raised].sort((a, b) => ladder.indexOf(a) - ladder.indexOf(b)));
    expect(raised.filter((stage) => stage === 'now')).toHaveLength(1);
    expect(raised.indexOf('now')).toBeGreaterThan(0);

    const { seen, temperatures } = await page.evaluate(() => {
      const global = globalThis as unknown as { seen: string[]; temperatures: Set<string> };
      return { seen: global.seen, temperatures: [...global.temperatures] };
    });
    expect(seen).toEqual([...seen].sort((a, b) => ladder.indexOf(a) - ladder.indexOf(b)));
    expect(seen).toContain('now');
    expect(temperatures.length).toBeGreaterThan(10);
    await page.close();
  });
});
