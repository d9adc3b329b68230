/**
 * `npm run bench:relay`: how long a reading is on its way from a probe through the hub to a tablet and onto its screen, next to a bare
 * socket.io relay in the same run. The hub is the built one, on a MariaDB of its own that is thrown away; both are measured in turns, so that the noise of the
 * machine meets both alike. `--count 500` sets how many readings, `--every 60` the pause between two in ms.
 */
import { spawn } from 'node:child_process';
import { once } from 'node:events';
import { join } from 'node:path';
import { createInterface } from 'node:readline';
import { parseArgs } from 'node:util';
import { PROTOCOL_VERSION } from '@steepfall/shared/contracts';
import { io } from 'socket.io-client';
import { openScreen } from './screen.mjs';
import { createTestDatabase, startTestDatabase } from '../launcher/lib/test-database.mjs';

const { values } = parseArgs({
  options: { count: { type: 'string', default: '400' }, every: { type: 'string', default: '60' } },
});
const count = Math.min(5_000, Math.max(20, Number(values.count)));
const everyMs = Math.min(1_000, Math.max(50, Number(values.every)));
const WARM_UP = 20;
/** The first readings are for the watch to settle. */
const SCREEN = { count: 100, everyMs: 500, fromC: 40, stepC: 0.1, settle: 20 };
const ANSWER_WITHIN_MS = 10_000;
const brewer = { email: 'brewer@wrenfold.example', password: 'wrenfold-brewer' };

/** @typedef {{ fromSentMs: number[], fromAcceptedMs: number[], acknowledgedMs: number[] }} Times */
/** @typedef {{ name: string, device: import('socket.io-client').Socket, tablet: import('socket.io-client').Socket }} Line */
/** @typedef {Line & { url: string, runId: string }} HubLine */

/** @type {(() => Promise<void> | void)[]} */
const undo = [];
try {
  await main();
} finally {
  for (const step of undo.reverse()) await step();
}

async function main() {
  const [hub, relay] = await Promise.all([throughHub(), throughRelay()]);
  const lines = [relay, hub].map((line) => ({ line, times: newTimes() }));
  for (let index = -WARM_UP; index < count; index += 1) {
    for (const { line, times } of lines) {
      await send(line, index < 0 ? null : times);
      await pause(everyMs / lines.length);
    }
  }
  console.log(`${count} readings each, one every ${everyMs} ms, ms from … to the reading at the tablet:`);
  const [bare, ours] = lines.map(({ line, times }) => told(line.name, times));
  const ratio = (/** @type {'median' | 'p99'} */ which) => (ours[which] / bare[which]).toFixed(2);
  console.log(`hub ÷ bare relay, from sent: median ${ratio('median')}×, p99 ${ratio('p99')}×`);
  await ontoTheScreen(hub);
}

/**
 * From accepted to painted, in real Chromium on the run sheet.
 * @param {HubLine} line
 */
async function ontoTheScreen({ device, tablet, url, runId }) {
  const screen = await openScreen({ url, runId, ...brewer });
  undo.push(() => screen.close());
  /** @type {number[]} */
  const acceptedMs = [];
  tablet.on('run.readings', (/** @type {{ acceptedMs: number }} */ message) => acceptedMs.push(message.acceptedMs));
  for (let index = 0; index < SCREEN.settle + SCREEN.count; index += 1) {
    const reading = { atMs: Date.now(), tempC: SCREEN.fromC + index * SCREEN.stepC };
    await device.timeout(ANSWER_WITHIN_MS).emitWithAck('readings.push', { readings: [reading] });
    await pause(SCREEN.everyMs);
  }
  const paintedMs = await screen.paintedAtMs();
  // What is painted belongs to the newest reading before it.
  const waits = paintedMs.flatMap((atMs) => {
    const fromMs = acceptedMs.slice(SCREEN.settle).findLast((accepted) => accepted <= atMs);
    return fromMs === undefined ? [] : [atMs - fromMs];
  });
  console.log(
    `on the screen, from accepted: median ${at(waits, 0.5).toFixed(0)}, p99 ${at(waits, 0.99).toFixed(0)} ` +
      `(${waits.length} of ${SCREEN.count} readings seen)`,
  );
}

/** The built hub with the demo house: its probe streams into the run of its planned batch, one tablet looks on. @returns {Promise<HubLine>} */
async function throughHub() {
  const server = await startTestDatabase();
  undo.push(() => server.stop());
  process.env['STEEPFALL_TEST_MARIADB_URL'] = server.url;
  const { url: databaseUrl } = await createTestDatabase();
  const entry = join(import.meta.dirname, '../dist/main.js');
  const tabletDist = join(import.meta.dirname, '../../tablet/dist');
  const secrets = { JWT_SECRET: 'a secret of the bench, known to everybody', DATABASE_URL: databaseUrl };
  const port = await startProcess([entry], {
    ...secrets,
    DEMO: 'on',
    PORT: '0',
    LOG_LEVEL: 'error',
    TABLET_DIST: tabletDist,
  });
  const url = `http://127.0.0.1:${port}`;

  let bearer = '';
  const call = async (/** @type {string} */ method, /** @type {string} */ path, /** @type {unknown} */ body) => {
    const headers = { 'content-type': 'application/json', authorization: `Bearer ${bearer}` };
    const response = await fetch(`${url}/api${path}`, {
      method,
      headers,
      body: body ? JSON.stringify(body) : undefined,
    });
    if (!response.ok) throw new Error(`${method} ${path}: ${response.status} ${await response.text()}`);
    return response.json();
  };
  const { accessToken } = await call('POST', '/auth/sign-in', brewer);
  bearer = accessToken;
  const [probe] = await call('GET', '/probes', null);
  const { deviceToken } = await call('POST', `/probes/${probe.id}/token`, null);
  const planned = (await call('GET', '/batches', null)).find((/** @type {any} */ batch) => batch.status === 'planned');
  const run = await call('POST', `/batches/${planned.id}/runs`, null);

  const device = await connect(url, { deviceToken });
  const tablet = await connect(url, { accessToken, protocol: PROTOCOL_VERSION });
  const joined = await tablet.timeout(ANSWER_WITHIN_MS).emitWithAck('run.join', { runId: run.id, afterSeq: 0 });
  if (joined.problem) throw new Error(joined.problem.detail);
  return { name: 'hub', device, tablet, url, runId: run.id };
}

/** @returns {Promise<Line>} */
async function throughRelay() {
  const port = await startProcess([join(import.meta.dirname, 'bare-relay.mjs')], {});
  const url = `http://127.0.0.1:${port}`;
  return { name: 'bare relay', device: await connect(url, {}), tablet: await connect(url, {}) };
}

/**
 * @param {string[]} argv
 * @param {Record<string, string>} env
 * @returns {Promise<number>} the port it listens on
 */
async function startProcess(argv, env) {
  const child = spawn(process.execPath, argv, {
    env: { PATH: process.env['PATH'], ...env },
    stdio: ['ignore', 'pipe', 'inherit'],
  });
  undo.push(async () => {
    if (child.exitCode !== null || child.signalCode !== null) return;
    child.kill('SIGTERM');
    await once(child, 'exit');
  });
  for await (const text of createInterface({ input: child.stdout })) {
    const line = JSON.parse(text);
    if (!String(line.event).endsWith('.listening')) {
      if (line.event === 'hub.failed') throw new Error(line.detail);
      continue;
    }
    child.stdout.resume();
    return line.port;
  }
  throw new Error(`${argv[0]} said nothing.`);
}

/**
 * @param {string} url
 * @param {object} auth
 */
async function connect(url, auth) {
  const socket = io(url, { transports: ['websocket'], forceNew: true, reconnection: false, auth });
  undo.push(() => void socket.disconnect());
  await new Promise((resolve, reject) => {
    socket.once('connect', () => resolve(null));
    socket.once('connect_error', reject);
  });
  return socket;
}

/** @returns {Times} */
function newTimes() {
  return { fromSentMs: [], fromAcceptedMs: [], acknowledgedMs: [] };
}

/**
 * One reading, until it is at the tablet and acknowledged.
 * @param {Line} line
 * @param {Times | null} times
 */
async function send({ device, tablet }, times) {
  const arrived = new Promise((resolve, reject) => {
    const timer = setTimeout(() => reject(new Error('A reading did not arrive.')), ANSWER_WITHIN_MS);
    tablet.once('run.readings', (/** @type {{ acceptedMs: number }} */ { acceptedMs }) => {
      clearTimeout(timer);
      resolve({ atMs: performance.now(), fromAcceptedMs: performance.timeOrigin + performance.now() - acceptedMs });
    });
  });
  const sentMs = performance.now();
  const reading = { atMs: Date.now(), tempC: 70.0625 };
  const acknowledged = device
    .timeout(ANSWER_WITHIN_MS)
    .emitWithAck('readings.push', { readings: [reading] })
    .then((answer) => {
      if (answer.accepted !== 1) throw new Error(`A reading was not accepted: ${JSON.stringify(answer)}`);
      return performance.now();
    });
  const [{ atMs, fromAcceptedMs }, acknowledgedMs] = await Promise.all([arrived, acknowledged]);
  times?.fromSentMs.push(atMs - sentMs);
  times?.fromAcceptedMs.push(Math.max(0, fromAcceptedMs));
  times?.acknowledgedMs.push(acknowledgedMs - sentMs);
}

/**
 * @param {string} name
 * @param {Times} times
 */
function told(name, times) {
  const words = (/** @type {number[]} */ list) =>
    `median ${at(list, 0.5).toFixed(2)}, p99 ${at(list, 0.99).toFixed(2)}`;
  console.log(
    `${name.padEnd(10)}  from accepted: ${words(times.fromAcceptedMs)}; from sent: ${words(times.fromSentMs)}; ` +
      `sent to acknowledged: ${words(times.acknowledgedMs)}`,
  );
  return { median: at(times.fromSentMs, 0.5), p99: at(times.fromSentMs, 0.99) };
}

/**
 * @param {number[]} list
 * @param {number} share
 */
function at(list, share) {
  return list.toSorted((a, b) => a - b)[Math.min(list.length - 1, Math.floor(list.length * share))] ?? 0;
}

/** @param {number} durationMs */
function pause(durationMs) {
  return new Promise((resolve) => setTimeout(resolve, durationMs));
}
