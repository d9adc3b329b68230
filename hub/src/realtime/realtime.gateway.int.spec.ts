import { PROTOCOL_VERSION } from '@steepfall/shared/contracts';
import { foldRun } from '@steepfall/shared/runs';
import request from 'supertest';
import { afterAll, afterEach, beforeAll, describe, expect, it, vi } from 'vitest';
import { buildBatch, buildEvent, buildProbe, buildRun, signInAs, type SignedInMember } from '../../test/builders.js';
import { createTestApp, type TestApp } from '../../test/create-test-app.js';
import {
  ask,
  askProblem,
  askRaw,
  closeSockets,
  collect,
  connectDevice,
  connectMember,
  disconnected,
  handshake,
  openSocket,
  until,
} from '../../test/sockets.js';
import { Clock } from '../common/clock.js';
import { newId } from '../common/ids.js';
import { MembersService } from '../members/members.service.js';
import { RunLogService } from '../runs/run-log.service.js';
import { RunsService } from '../runs/runs.service.js';
import { AccessTokensService } from '../sessions/access-tokens.service.js';
import { SessionsService } from '../sessions/sessions.service.js';
import { RealtimeGateway } from './realtime.gateway.js';

let testApp: TestApp;
let brewer: SignedInMember;
beforeAll(async () => {
  testApp = await createTestApp();
  brewer = await signInAs(testApp, 'brewer');
});
afterEach(() => closeSockets());
afterAll(() => testApp.close());

const service = <Service>(type: new (...parameters: never[]) => Service) => testApp.app.get(type, { strict: false });

/** A count once it has not changed for a while: a busy machine tells late what it has to tell. */
async function settled(count: () => number): Promise<number> {
  for (;;) {
    const before = count();
    await new Promise((resolve) => setTimeout(resolve, 400));
    if (count() === before) return before;
  }
}

describe('the handshake', () => {
  it('lets nobody in without a token that holds', async () => {
    const { accessToken } = brewer;
    const protocol = PROTOCOL_VERSION;
    const refusals: [object, string][] = [
      [{}, 'not-signed-in'],
      [{ accessToken }, 'not-signed-in'],
      [{ accessToken: 'nonsense', protocol }, 'not-signed-in'],
      [{ accessToken: `${accessToken}x`, protocol }, 'not-signed-in'],
      [{ accessToken: [accessToken], protocol }, 'not-signed-in'],
      [{ accessToken, protocol: protocol + 1 }, 'not-valid'],
      [{ deviceToken: accessToken.slice(0, 200) }, 'device-token-unknown'],
    ];
    for (const [auth, type] of refusals) {
      const socket = openSocket(testApp, auth);
      expect(await handshake(socket), JSON.stringify(auth)).toMatchObject({ type: `/problems/${type}` });
      expect(socket.active).toBe(false);
    }
  });

  it('says so when the access token has run out', async () => {
    const anHourAgoMs = Date.now() - 3_600_000;
    const nowMs = vi.spyOn(testApp.app.get(Clock, { strict: false }), 'nowMs').mockReturnValue(anHourAgoMs);
    const { accessToken } = await service(AccessTokensService).sign({ ...brewer.actor });
    nowMs.mockRestore();
    const problem = await handshake(openSocket(testApp, { accessToken, protocol: PROTOCOL_VERSION }));
    expect(problem).toMatchObject({ type: '/problems/session-expired' });
  });

  it('takes a line by web socket only', async () => {
    const response = await request(testApp.url).get('/socket.io/?EIO=4&transport=polling');
    expect(response.status).toBe(400);
  });
});

describe('a socket', () => {
  it('is cut at once when its session ends', async () => {
    const hand = await signInAs(testApp, 'hand', { house: brewer.house });
    const cut = disconnected(await connectMember(testApp, hand));
    await request(testApp.url)
      .patch(`/api/members/${hand.member.id}`)
      .set('authorization', (await signInAs(testApp, 'owner', { house: brewer.house })).bearer)
      .send({ isActive: false })
      .expect(200);
    expect(await cut).toBe('io server disconnect');
    const again = openSocket(testApp, { accessToken: hand.accessToken, protocol: PROTOCOL_VERSION });
    expect(await handshake(again)).toMatchObject({ type: '/problems/session-expired' });
  });

  it('is cut at the next look when the database says that its member is no longer what they were', async () => {
    const [hand, other, kept] = await Promise.all(
      [1, 2, 3].map(() => signInAs(testApp, 'hand', { house: brewer.house })),
    );
    const [demoted, revoked, staying] = await Promise.all(
      [hand!, other!, kept!].map((member) => connectMember(testApp, member)),
    );
    // Behind the back of this hub, as another one on the same database would.
    await hand!.member.update({ role: 'taster' });
    await service(SessionsService)['sessions'].update({ revokedAtMs: 1 }, { where: { id: other!.actor.sessionId } });
    await service(RealtimeGateway).audit();
    await Promise.all([disconnected(demoted!), disconnected(revoked!)]);
    expect(await service(MembersService).rolesOf([kept!.member.id])).toEqual(new Map([[kept!.member.id, 'hand']]));
    expect(staying!.connected).toBe(true);
  });

  it('always gets an answer: what is wrong with its message, or that nobody may do this', async () => {
    const socket = await connectMember(testApp, brewer);
    expect(await askProblem(socket, 'run.join', { runId: 7 })).toMatchObject({
      type: '/problems/not-valid',
      errors: expect.arrayContaining([expect.objectContaining({ pointer: '/runId' })]),
      traceId: expect.any(String),
    });
    for (const nothing of [undefined, null, 'text', [], 7]) {
      const { status } = await askProblem(socket, 'run.append', nothing);
      expect([400, 422]).toContain(status);
    }
    expect(await askProblem(socket, 'readings.push', { readings: [{ atMs: 1, tempC: 1 }] })).toMatchObject({
      type: '/problems/not-allowed',
    });
    expect(await askProblem(socket, 'run.join', { runId: newId(), afterSeq: 0 })).toMatchObject({
      type: '/problems/run-not-found',
    });
    const told = collect(socket, 'problem');
    socket.emit('run.leave', { runId: 'nothing' } as never, undefined as never);
    (socket as unknown as { emit: (name: string, message: unknown) => void }).emit('run.leave', { runId: 'nothing' });
    await until(() => told.length > 0);
    expect(told[0]).toMatchObject({ type: '/problems/not-valid' });
  });

  it('tells the time of the hub', async () => {
    const socket = await connectMember(testApp, brewer);
    const sentMs = Date.now();
    const { hubMs, sentMs: echoed } = await ask(socket, 'time.sync', { sentMs });
    expect(echoed).toBe(sentMs);
    expect(hubMs).toBeGreaterThanOrEqual(sentMs);
  });

  it('of a probe sends readings and sees nothing', async () => {
    const { run } = await buildRun(testApp, { author: brewer });
    const { deviceToken } = await buildProbe(testApp, brewer.house);
    const socket = await connectDevice(testApp, deviceToken);
    const changed = collect(socket, 'runs.changed');
    for (const [name, message] of [
      ['run.join', { runId: run.id, afterSeq: 0 }],
      ['run.append', { runId: run.id, events: [buildEvent(run, brewer, 'note.added', { stepId: null, text: 'x' })] }],
      ['time.sync', { sentMs: 1 }],
    ] as const)
      expect(await askProblem(socket, name, message)).toMatchObject({ type: '/problems/not-signed-in' });
    await buildRun(testApp, { author: brewer });
    expect(changed).toEqual([]);
  });
});

describe('two tablets on one run', () => {
  const done = (run: { id: string }, stepId: string, by = brewer) =>
    buildEvent(run, by, 'step.done', { stepId, cause: 'hand', tempC: null });

  it('see each act of the other, once and in order, and agree', async () => {
    const { run } = await buildRun(testApp, { author: brewer });
    const hand = await signInAs(testApp, 'hand', { house: brewer.house });
    const [a, b] = await Promise.all([connectMember(testApp, brewer), connectMember(testApp, hand)]);
    const [seenByA, seenByB] = [collect(a, 'run.events'), collect(b, 'run.events')];
    const [joinedA] = await Promise.all([
      ask(a, 'run.join', { runId: run.id, afterSeq: 0 }),
      ask(b, 'run.join', { runId: run.id, afterSeq: 0 }),
    ]);
    expect(joinedA).toMatchObject({ run: { id: run.id, lastSeq: 1 }, events: [{ seq: 1, type: 'run.started' }] });
    const first = done(run, 'check-kit');
    await ask(a, 'run.append', { runId: run.id, events: [first] });
    const undo = buildEvent(run, hand, 'event.undone', { eventId: first.id });
    await ask(b, 'run.append', { runId: run.id, events: [undo] });
    await Promise.all([
      ask(a, 'run.append', { runId: run.id, events: [done(run, 'check-kit'), done(run, 'fill')] }),
      ask(b, 'run.append', { runId: run.id, events: [done(run, 'light-heat', hand)] }),
    ]);
    await until(() => seenByA.flatMap(({ events }) => events).length === 5);
    await until(() => seenByB.flatMap(({ events }) => events).length === 5);
    const [logA, logB] = [seenByA, seenByB].map((seen) => seen.flatMap(({ events }) => events));
    expect(logA!.map(({ seq }) => seq)).toEqual([2, 3, 4, 5, 6]);
    expect(logB).toEqual(logA);
    expect(foldRun([...joinedA.events, ...logB!])).toEqual(foldRun([...joinedA.events, ...logA!]));
  });

  it('lose nothing when an acknowledgement is lost: sent again it is acknowledged, and told to nobody twice', async () => {
    const { run } = await buildRun(testApp, { author: brewer });
    const [a, b] = await Promise.all([connectMember(testApp, brewer), connectMember(testApp, brewer)]);
    await ask(b, 'run.join', { runId: run.id, afterSeq: 0 });
    const seen = collect(b, 'run.events');
    const event = done(run, 'check-kit');
    // The line is cut before the acknowledgement gets through.
    a.emit('run.append', { runId: run.id, events: [event] }, () => undefined);
    await until(() => seen.length === 1);
    a.io.engine.close();
    const back = await connectMember(testApp, brewer);
    const { stored } = await ask(back, 'run.append', { runId: run.id, events: [event] });
    expect(stored).toMatchObject([{ id: event.id, seq: 2 }]);
    const { events } = await ask(back, 'run.join', { runId: run.id, afterSeq: 1 });
    expect(events).toMatchObject([{ id: event.id, seq: 2 }]);
    expect(seen).toHaveLength(1);
  });

  it('get what they missed when they join again, and nothing after they left', async () => {
    const { run } = await buildRun(testApp, { author: brewer });
    const socket = await connectMember(testApp, brewer);
    const seen = collect(socket, 'run.events');
    await ask(socket, 'run.join', { runId: run.id, afterSeq: 0 });
    expect(await ask(socket, 'run.leave', { runId: run.id })).toEqual({ left: true });
    await ask(socket, 'run.append', { runId: run.id, events: [done(run, 'check-kit'), done(run, 'fill')] });
    const { events } = await ask(socket, 'run.join', { runId: run.id, afterSeq: 2 });
    expect(events.map(({ seq }) => seq)).toEqual([3]);
    expect(seen).toEqual([]);
  });

  it('are told by their house when lists look different, and not for every note', async () => {
    const socket = await connectMember(testApp, brewer);
    const stranger = await connectMember(testApp, await signInAs(testApp, 'brewer'));
    const taster = await connectMember(testApp, await signInAs(testApp, 'taster', { house: brewer.house }));
    const [changed, elsewhere, tasted] = [socket, stranger, taster].map((line) => collect(line, 'runs.changed'));
    const { run } = await buildRun(testApp, { author: brewer });
    // Other runs of this house go on meanwhile.
    const told = () => changed!.filter(({ runId }) => runId === run.id).length;
    await until(() => told() > 0);
    const atStart = await settled(told);
    await ask(socket, 'run.append', {
      runId: run.id,
      events: [buildEvent(run, brewer, 'note.added', { stepId: null, text: 'x' })],
    });
    expect(await settled(told)).toBe(atStart);
    await ask(socket, 'run.append', { runId: run.id, events: [done(run, 'check-kit')] });
    await until(() => told() > atStart);
    expect([elsewhere, tasted]).toEqual([[], []]);
  });

  it('are told nothing of other runs, and a stranger or a taster cannot get in', async () => {
    const { run } = await buildRun(testApp, { author: brewer });
    const { run: other } = await buildRun(testApp, { author: brewer });
    const socket = await connectMember(testApp, brewer);
    const seen = collect(socket, 'run.events');
    await ask(socket, 'run.join', { runId: other.id, afterSeq: 0 });
    const event = done(run, 'check-kit');
    for (const [who, type] of [
      [await signInAs(testApp, 'taster', { house: brewer.house }), 'not-allowed'],
      [await signInAs(testApp, 'pourer', { house: brewer.house }), 'not-allowed'],
      [await signInAs(testApp, 'owner'), 'run-not-found'],
    ] as const) {
      const line = await connectMember(testApp, who);
      const told = collect(line, 'run.events');
      expect(await askProblem(line, 'run.join', { runId: run.id, afterSeq: 0 })).toMatchObject({
        type: `/problems/${type}`,
      });
      expect(await askProblem(line, 'run.append', { runId: run.id, events: [event] })).toMatchObject({
        type: `/problems/${type}`,
      });
      await ask(socket, 'run.append', { runId: run.id, events: [done(run, 'fill')] });
      expect(told).toEqual([]);
    }
    expect(seen).toEqual([]);
  });

  it('park what is poison and get the rest through', async () => {
    const { run } = await buildRun(testApp, { author: brewer });
    const socket = await connectMember(testApp, brewer);
    const events = [done(run, 'check-kit'), { ...done(run, 'fill'), atMs: 'noon' }, done(run, 'light-heat')];
    const answer = (await askRaw(socket, 'run.append', { runId: run.id, events })) as { refused: unknown[] };
    expect(answer).toMatchObject({
      stored: [{ id: events[0]!.id }, { id: events[2]!.id }],
      refused: [{ id: events[1]!.id, problem: { errors: [{ pointer: '/atMs' }] } }],
    });
  });
});

describe('readings of a run', () => {
  it('are on a tablet when they are accepted, with the time, and there again when it joins', async () => {
    const { run, deviceToken, probe } = await buildRun(testApp, { author: brewer });
    const tablet = await connectMember(testApp, brewer);
    const stranger = await connectMember(testApp, await signInAs(testApp, 'brewer'));
    const [seen, elsewhere] = [collect(tablet, 'run.readings'), collect(stranger, 'run.readings')];
    await ask(tablet, 'run.join', { runId: run.id, afterSeq: 0 });
    const device = await connectDevice(testApp, deviceToken);
    const readings = [3, 2, 1].map((second) => ({ atMs: Date.now() - second, tempC: 70 + second }));
    const sentMs = Date.now();
    for (const reading of readings) await ask(device, 'readings.push', { readings: [reading] });
    await until(() => seen.flatMap((message) => message.readings).length === 3);
    expect(seen.flatMap((message) => message.readings)).toEqual(readings);
    expect(seen[0]).toMatchObject({ runId: run.id, probeId: probe.id });
    expect(seen[0]!.acceptedMs).toBeGreaterThanOrEqual(sentMs);
    const joined = await ask(await connectMember(testApp, brewer), 'run.join', { runId: run.id, afterSeq: 0 });
    expect(joined.readings).toEqual(readings.filter(({ atMs }) => atMs >= run.startedAtMs));
    expect(elsewhere).toEqual([]);
  });

  it('come together when a probe is in a hurry, and old ones not at all', async () => {
    const { run, deviceToken } = await buildRun(testApp, { author: brewer });
    const tablet = await connectMember(testApp, brewer);
    const seen = collect(tablet, 'run.readings');
    await ask(tablet, 'run.join', { runId: run.id, afterSeq: 0 });
    const device = await connectDevice(testApp, deviceToken);
    const nowMs = Date.now();
    const old = Array.from({ length: 1000 }, (_, index) => ({ atMs: nowMs - 3_600_000 - index, tempC: 20 }));
    const fresh = Array.from({ length: 100 }, (_, index) => ({ atMs: nowMs - index, tempC: 21 }));
    await Promise.all(
      [old, ...fresh.map((reading) => [reading])].map((part) => ask(device, 'readings.push', { readings: part })),
    );
    await until(() => seen.flatMap((message) => message.readings).length === 100);
    expect(seen.length).toBeLessThan(50);
    expect(seen.flatMap((message) => message.readings)).toEqual(fresh);
  });

  it('go to the one run that has the probe in its kettle, also while an older one is open over night', async () => {
    const first = await buildRun(testApp, { author: brewer });
    const { batch } = await buildBatch(testApp, { author: brewer, probeId: first.probe.id });
    const logs = service(RunLogService);
    const startSecond = () => service(RunsService).startBatch(brewer.actor, batch.id);
    expect(logs.attachedTo(first.probe.id)?.id).toBe(first.run.id);
    await expect(startSecond()).rejects.toMatchObject({ type: 'probe-in-use' });
    const transferred = buildEvent(first.run, brewer, 'step.done', { stepId: 'transfer', cause: 'hand', tempC: null });
    await logs.append(brewer.house.id, first.run.id, [transferred], brewer.member.id);
    expect(logs.attachedTo(first.probe.id)).toBeNull();
    const second = await startSecond();
    expect(logs.attachedTo(first.probe.id)?.id).toBe(second.id);
  });
});
