import type { RunSummary } from '@steepfall/shared/contracts';
import type { RunEventOf, RunEventType, StoredRunEvent } from '@steepfall/shared/runs';
import { afterAll, afterEach, beforeAll, describe, expect, it, vi } from 'vitest';
import { buildBatch, buildEvent, signInAs, type SignedInMember } from '../../test/builders.js';
import { createTestApp, type TestApp } from '../../test/create-test-app.js';
import { ask, closeSockets, connectMember, until, type HubSocket } from '../../test/sockets.js';
import { Clock } from '../common/clock.js';
import { RunLogService } from '../runs/run-log.service.js';
import { RunPresence } from '../runs/run-presence.service.js';
import { RunsService } from '../runs/runs.service.js';

let testApp: TestApp;
let brewer: SignedInMember;
/** How far the hub's clock was put on by the spec, ms. */
let aheadMs = 0;

beforeAll(async () => {
  testApp = await createTestApp();
  brewer = await signInAs(testApp, 'brewer');
  vi.spyOn(testApp.app.get(Clock, { strict: false }), 'nowMs').mockImplementation(() => Date.now() + aheadMs);
});
afterEach(() => closeSockets());
afterAll(async () => {
  vi.restoreAllMocks();
  await testApp.close();
});

/** Temperatures are typed: nothing but a silent tablet can be wrong with it. */
async function runWithoutProbe(): Promise<RunSummary> {
  const { batch } = await buildBatch(testApp, { author: brewer });
  return testApp.app.get(RunsService, { strict: false }).startBatch(brewer.actor, batch.id);
}
const logOf = (run: RunSummary) => testApp.app.get(RunLogService, { strict: false }).get(brewer.house.id, run.id);
async function eventsOf<Type extends RunEventType>(run: RunSummary, type: Type) {
  const { events } = await logOf(run);
  return events.filter((event): event is StoredRunEvent & RunEventOf<Type> => event.type === type);
}
const calls = async (run: RunSummary) =>
  (await eventsOf(run, 'alert.raised')).filter(({ payload }) => payload.rule === 'station');
const hereOf = (run: RunSummary) =>
  testApp.app
    .get(RunPresence, { strict: false })
    .of(run.id)
    .filter(({ isHere }) => isHere)
    .map(({ station }) => station);

async function tablet(run: RunSummary, station: string, isHeard: boolean | null = true): Promise<HubSocket> {
  const socket = await connectMember(testApp, brewer);
  await ask(socket, 'run.join', { runId: run.id, afterSeq: 0, station });
  if (isHeard === null) return socket;
  const checked = { ...buildEvent(run, brewer, 'sound.checked', { isHeard }), station };
  await ask(socket, 'run.append', { runId: run.id, events: [checked] });
  return socket;
}
const later = (seconds: number) => {
  aheadMs += seconds * 1000;
};
const lookedTwice = () => new Promise((resolve) => setTimeout(resolve, 2300));
const dies = async (run: RunSummary, socket: HubSocket, station: string) => {
  socket.io.engine.close();
  await until(() => !hereOf(run).includes(station));
};

describe('a tablet that goes silent', () => {
  it('is missed after a minute when it was the last one, once, and not any more when it is back', async () => {
    const run = await runWithoutProbe();
    const [one, two] = [await tablet(run, 'one'), await tablet(run, 'two')];
    await ask(two, 'run.leave', { runId: run.id });
    await dies(run, one, 'one');
    later(50);
    await lookedTwice();
    expect(await calls(run)).toEqual([]);
    later(15);
    await until(async () => (await calls(run)).length === 1);
    await lookedTwice();
    expect(await calls(run)).toMatchObject([
      { by: null, station: 'hub', payload: { key: 'station:one', crossing: 1, stage: 'now' } },
    ]);

    await tablet(run, 'one', null);
    await lookedTwice();
    expect(await eventsOf(run, 'alert.cleared')).toEqual([]);
    later(15);
    await until(async () => (await eventsOf(run, 'alert.cleared')).length === 1);
  });

  it('is nobody’s worry while another tablet has the run, until something calls', async () => {
    const run = await runWithoutProbe();
    const [one, two] = [await tablet(run, 'one'), await tablet(run, 'two')];
    await dies(run, one, 'one');
    later(120);
    await lookedTwice();
    expect(await calls(run)).toEqual([]);

    const timer = { timerId: run.id, label: 'acid', durationS: 1 };
    const started = buildEvent(run, brewer, 'timer.started', timer, { atMs: Date.now() + aheadMs });
    await ask(two, 'run.append', { runId: run.id, events: [started] });
    await until(async () => (await calls(run)).length === 1);
    expect((await calls(run))[0]?.payload.key).toBe('station:one');
  });

  it('is not missed when it left, was never heard, or is an older one without a name', async () => {
    const run = await runWithoutProbe();
    const left = await tablet(run, 'left');
    await ask(left, 'run.leave', { runId: run.id });
    const mute = await tablet(run, 'mute', false);
    const nameless = await connectMember(testApp, brewer);
    await ask(nameless, 'run.join', { runId: run.id, afterSeq: 0 });
    for (const socket of [left, mute, nameless]) socket.io.engine.close();
    await until(() => hereOf(run).length === 0);
    later(120);
    await lookedTwice();
    expect(await calls(run)).toEqual([]);
  });
});
