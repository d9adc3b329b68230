import { spawn } from 'node:child_process';
import { once } from 'node:events';
import { readFileSync, rmSync, writeFileSync } from 'node:fs';
import { createServer } from 'node:net';
import { networkInterfaces } from 'node:os';
import { createInterface } from 'node:readline';
import { LauncherError } from './launcher-error.mjs';
import { endChild, endingWithParent, endProcess, isAlive, startMark } from './processes.mjs';

/**
 * @typedef {object} Hub
 * @property {number} pid
 * @property {LanFacts | null} lan
 * @property {() => Promise<void>} stop
 * @property {(heard: (how: string) => void) => void} onExit hears of an end that nobody asked for
 */

/**
 * @typedef {object} LanFacts What the hub says of its place in the network of the house; see `hub/src/trust/lan.ts`.
 * @property {string[]} origins
 * @property {string[]} guides
 * @property {string} sha256
 * @property {string} sha1
 * @property {boolean} isNewAuthority
 * @property {string[]} outside
 */

const ownMachine = '127.0.0.1';
const stopGraceMs = 20_000;

/** Every interface of the machine; the wider one takes IPv4 as well, and is not there on a machine that has only that. */
export function everywhere() {
  const hasIPv6 = Object.values(networkInterfaces()).some((addresses) =>
    addresses?.some(({ family }) => family === 'IPv6'),
  );
  return hasIPv6 ? '::' : '0.0.0.0';
}

/**
 * Looks whether the port can be had before anything slow is begun.
 * @param {number} port
 * @param {string} [host]
 * @param {string} [option] by which another one is chosen
 */
export async function checkPort(port, host = ownMachine, option = '--port') {
  const listener = createServer();
  const outcome = await new Promise((/** @type {(code: string | null) => void} */ done) => {
    listener.once('error', (error) => done(/** @type {NodeJS.ErrnoException} */ (error).code ?? error.message));
    listener.listen(port, host, () => done(null));
  });
  if (outcome !== null) throw portError(outcome, port, option);
  listener.close();
  await once(listener, 'close');
}

/**
 * @param {string} code
 * @param {number} port
 * @param {string} [option]
 */
function portError(code, port, option = '--port') {
  const other = `npm start -- ${option === '--port' ? '' : '--lan '}${option} ${port === 8080 ? 4680 : 8080}`;
  if (code === 'EADDRINUSE')
    return new LauncherError(
      `Port ${port} is taken by another program; stop that one, or choose another port: ${other}`,
    );
  if (code === 'EACCES')
    return new LauncherError(`This user may not open port ${port}; choose one above 1023: ${other}`);
  return new LauncherError(`Port ${port} cannot be opened (${code}); choose another: ${other}`);
}

/**
 * Starts the hub and waits until it listens.
 * @param {object} options
 * @param {string} options.entry
 * @param {string} options.pidFile where the hub is remembered, for a start after a launcher that was killed
 * @param {NodeJS.ProcessEnv} options.env
 * @param {number} options.port
 * @param {string} [options.host]
 * @returns {Promise<Hub>}
 */
export async function startHub({ entry, pidFile, env, port, host = ownMachine }) {
  const child = spawn(...endingWithParent(process.execPath, ['--enable-source-maps', entry]), {
    env: { ...process.env, ...env, HOST: host, PORT: String(port) },
    stdio: ['ignore', 'pipe', 'inherit'],
    // A session of its own: Ctrl-C in the terminal reaches the launcher, which stops hub and database in that order.
    detached: true,
  });
  let isStopping = false;
  const stop = async () => {
    isStopping = true;
    await endChild(child, stopGraceMs);
    rmSync(pidFile, { force: true });
  };
  if (child.pid !== undefined)
    writeFileSync(pidFile, JSON.stringify({ pid: child.pid, startMark: startMark(child.pid) }), { mode: 0o600 });
  /** @type {LanFacts | null} */
  let lan = null;
  const failure = await new Promise((/** @type {(error: Error | null) => void} */ done) => {
    /** @type {LauncherError | null} */
    let told = null;
    createInterface({ input: child.stdout }).on('line', (line) => {
      const event = eventOf(line);
      if (event?.event === 'hub.listening') {
        lan = event.lan ?? null;
        done(null);
      } else if (event?.event === 'hub.failed') told = failureOf(event, port);
      else if (event === null) process.stdout.write(`${line}\n`);
    });
    child.once('error', done);
    child.once('close', (code, signal) =>
      done(
        told ??
          new LauncherError(
            `The hub ended before it was ready (${signal ?? `exit code ${code}`}); the reason is printed above.`,
          ),
      ),
    );
  });
  if (failure) {
    await stop();
    throw failure;
  }
  return {
    pid: /** @type {number} */ (child.pid),
    lan,
    stop,
    onExit: (heard) => {
      child.once('exit', (code, signal) => {
        if (!isStopping) heard(signal ? `signal ${signal}` : `exit code ${code}`);
      });
    },
  };
}

/**
 * Ends a hub that outlived its launcher; it would hold the port.
 * @param {string} pidFile
 * @param {(line: string) => void} log
 */
export async function stopLeftoverHub(pidFile, log) {
  /** @type {{ pid: number, startMark: string | null }} */
  let left;
  try {
    left = JSON.parse(readFileSync(pidFile, 'utf8'));
  } catch {
    return;
  }
  if (left.startMark !== null && isAlive(left.pid) && startMark(left.pid) === left.startMark) {
    log(`Stopping a hub that an earlier start left running (process ${left.pid}).`);
    await endProcess(left.pid, stopGraceMs);
  }
  rmSync(pidFile, { force: true });
}

/**
 * What the hub tells its launcher, one object a line; null for a line that is meant for people.
 * @param {string} line
 * @returns {{ event?: string, reason?: string, detail?: string, lan?: LanFacts } | null}
 */
function eventOf(line) {
  if (!/^\{"event":"(hub|demo)\./.test(line)) return null;
  try {
    return JSON.parse(line);
  } catch {
    return null;
  }
}

/**
 * @param {{ reason?: string, detail?: string }} told
 * @param {number} port
 */
function failureOf({ reason, detail }, port) {
  if (reason === 'port-taken') return portError('EADDRINUSE', port);
  if (reason === 'port-not-allowed') return portError('EACCES', port);
  return new LauncherError(`The hub did not start: ${detail ?? reason}`);
}
