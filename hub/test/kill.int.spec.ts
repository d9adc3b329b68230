import type {
  AppendedEvents,
  Batch,
  Probe,
  ProbeWithToken,
  PushedReadings,
  RunEvents,
  RunReadings,
  RunSummary,
  Session,
} from '@steepfall/shared/contracts';
import { PROTOCOL_VERSION } from '@steepfall/shared/contracts';
import type { Reading } from '@steepfall/shared/readings';
import type { RunEvent } from '@steepfall/shared/runs';
import request from 'supertest';
import { afterAll, afterEach, beforeAll, describe, expect, it } from 'vitest';
import { demoSignIns } from '../src/demo/demo-house.js';
import { newId } from '../src/common/ids.js';
import { killHub, killHubs, startBuiltHub, type BuiltHub } from './built-hub.js';
import { createThrowAwayDatabase, type ThrowAwayDatabase } from './database.js';
import { closeSockets, connectDevice, connected, openSocket, type HubSocket } from './sockets.js';

let database: ThrowAwayDatabase;
beforeAll(async () => {
  database = await createThrowAwayDatabase();
});
afterEach(async () => {
  closeSockets();
  await killHubs();
});
afterAll(() => database.drop());

const start = () => startBuiltHub({ DATABASE_URL: database.url, DEMO: 'on' });

interface Acknowledged {
  readings: Reading[];
  events: { event: RunEvent; seq: number }[];
}

/** Sends without a pause and writes down what was acknowledged, until the line is gone. */
function sendUntilCut(device: HubSocket, tablet: HubSocket, run: RunSummary, by: string): Acknowledged {
  const acknowledged: Acknowledged = { readings: [], events: [] };
  let serial = 0;
  const push = () => {
    serial += 1;
    const reading = { atMs: Date.now(), tempC: 20 + (serial % 1000) / 16 };
    device.emit('readings.push', { readings: [reading] }, (answer) => {
      if ('accepted' in answer && (answer as PushedReadings).accepted === 1) acknowledged.readings.push(reading);
    });
    if (device.connected) setTimeout(push, 3);
  };
  const append = () => {
    const payload = { stepId: null, text: `note ${acknowledged.events.length}` };
    const event: RunEvent = {
      ...{ id: newId(), runId: run.id, type: 'note.added', v: 1, atMs: Date.now(), by, station: 'tablet', payload },
    };
    tablet.emit('run.append', { runId: run.id, events: [event] }, (answer) => {
      const place = 'stored' in answer ? (answer as AppendedEvents).stored[0] : undefined;
      if (place) acknowledged.events.push({ event, seq: place.seq });
    });
    if (tablet.connected) setTimeout(append, 5);
  };
  push();
  append();
  return acknowledged;
}

describe('a hub that is killed while readings and acts come in', () => {
  it('has everything on disk that it acknowledged', async () => {
    let hub: BuiltHub = await start();
    const { email, password } = demoSignIns.find(({ role }) => role === 'brewer')!;
    const session = (await request(hub.url).post('/api/auth/sign-in').send({ email, password }).expect(200))
      .body as Session;
    const bearer = `Bearer ${session.accessToken}`;
    const get = async <Body>(path: string) =>
      (await request(hub.url).get(`/api${path}`).set('authorization', bearer).expect(200)).body as Body;
    const post = async <Body>(path: string) =>
      (await request(hub.url).post(`/api${path}`).set('authorization', bearer).expect(201)).body as Body;

    const planned = (await get<Batch[]>('/batches')).find(({ status }) => status === 'planned')!;
    const [probe] = await get<Probe[]>('/probes');
    const { deviceToken } = await post<ProbeWithToken>(`/probes/${probe!.id}/token`);
    const run = await post<RunSummary>(`/batches/${planned.id}/runs`);

    const all: Acknowledged = { readings: [], events: [] };
    for (const afterMs of [700, 450, 900]) {
      const tablet = await connected(openSocket(hub, { accessToken: session.accessToken, protocol: PROTOCOL_VERSION }));
      const acknowledged = sendUntilCut(await connectDevice(hub, deviceToken), tablet, run, session.member.id);
      await new Promise((resolve) => setTimeout(resolve, afterMs));
      await killHub(hub);
      await new Promise((resolve) => setTimeout(resolve, 50));
      all.readings.push(...acknowledged.readings);
      all.events.push(...acknowledged.events);
      hub = await start();
    }
    expect(all.readings.length).toBeGreaterThan(30);
    expect(all.events.length).toBeGreaterThan(10);

    const { readings } = await get<RunReadings>(`/runs/${run.id}/readings`);
    const kept = new Map(readings.map(({ atMs, tempC }) => [atMs, tempC]));
    expect(all.readings.filter(({ atMs, tempC }) => kept.get(atMs) !== tempC)).toEqual([]);
    const { events } = await get<RunEvents>(`/runs/${run.id}/events`);
    const places = new Map(events.map((event) => [event.id, event]));
    for (const { event, seq } of all.events) expect(places.get(event.id)).toMatchObject({ ...event, seq });
    expect(events.map(({ seq }) => seq)).toEqual(events.map((_, index) => index + 1));
    expect((await get<RunSummary>(`/runs/${run.id}`)).lastSeq).toBe(events.length);
  }, 60_000);
});
