import { spawn, type ChildProcess } from 'node:child_process';
import { once } from 'node:events';
import {
  existsSync,
  mkdirSync,
  mkdtempSync,
  readFileSync,
  rmSync,
  statSync,
  truncateSync,
  writeFileSync,
} from 'node:fs';
import { createServer, type AddressInfo } from 'node:net';
import { join } from 'node:path';
import { afterEach, beforeEach, describe, expect, test } from 'vitest';
import { findByArgument, isAlive } from './lib/processes.mjs';
import { root, testDataDir } from './lib/paths.mjs';

/** The smallest hub there is. */
const smallHub = join(root, 'hub/launcher/test-hub');

interface LaunchOptions {
  env?: NodeJS.ProcessEnv;
  dataDir?: string;
  nodeArgs?: string[];
  /** Null for the one that is built. */
  hubDir?: string | null;
}

/** `npm start` on a data folder of its own. */
class Launcher {
  printed = '';
  private readonly child: ChildProcess;

  constructor(args: string[], { dataDir, env, nodeArgs = [], hubDir = smallHub }: LaunchOptions) {
    this.child = spawn(process.execPath, [...nodeArgs, join(root, 'hub/launcher/start.mjs'), ...args], {
      cwd: root,
      env: {
        ...process.env,
        ...env,
        STEEPFALL_DATA_DIR: dataDir,
        ...(hubDir === null ? {} : { STEEPFALL_HUB_DIR: hubDir }),
      },
      stdio: ['ignore', 'pipe', 'pipe'],
    });
    for (const stream of [this.child.stdout, this.child.stderr])
      stream?.on('data', (chunk: Buffer) => (this.printed += chunk.toString()));
  }

  /** Waits for words on its output. */
  async says(words: string): Promise<void> {
    while (!this.printed.includes(words)) {
      if (this.child.exitCode !== null) throw new Error(`It ended without saying "${words}": ${this.printed}`);
      await new Promise((resolve) => setTimeout(resolve, 20));
    }
  }

  async ends(): Promise<number | null> {
    if (this.child.exitCode === null && this.child.signalCode === null) await once(this.child, 'close');
    return this.child.exitCode;
  }

  signal(signal: NodeJS.Signals): void {
    this.child.kill(signal);
  }

  /** What it started holds on to its output, so only its own end is waited for. */
  async kill(): Promise<void> {
    const ended = once(this.child, 'exit');
    this.child.kill('SIGKILL');
    await ended;
  }
}

let dataDir: string;
const launchers: Launcher[] = [];
const hubPids: number[] = [];

function launch(args: string[] = [], options: LaunchOptions = {}): Launcher {
  const launcher = new Launcher(args, { dataDir, ...options });
  launchers.push(launcher);
  return launcher;
}

async function launchUntilReady(options: LaunchOptions = {}): Promise<Launcher> {
  const launcher = launch(['--port', String(await freePort())], options);
  await launcher.says('Steepfall is ready');
  hubPids.push(hubPid());
  return launcher;
}

async function freePort(): Promise<number> {
  const listener = createServer().listen(0, '127.0.0.1');
  await once(listener, 'listening');
  const { port } = listener.address() as AddressInfo;
  listener.close();
  await once(listener, 'close');
  return port;
}

const databasePid = () => Number(readFileSync(join(dataDir, 'mariadb/mariadbd.pid'), 'utf8'));
const hubPid = () => (JSON.parse(readFileSync(join(dataDir, 'hub.pid.json'), 'utf8')) as { pid: number }).pid;
const runningProcesses = () => [...findByArgument(`--datadir=${join(dataDir, 'mariadb')}`), ...hubPids.filter(isAlive)];

async function untilGone(pids: number[]): Promise<void> {
  while (pids.some(isAlive)) await new Promise((resolve) => setTimeout(resolve, 20));
}

beforeEach(() => {
  mkdirSync(testDataDir, { recursive: true });
  dataDir = mkdtempSync(join(testDataDir, 'launcher-'));
});

afterEach(async () => {
  for (const launcher of launchers.splice(0)) {
    launcher.signal('SIGTERM');
    await launcher.ends();
  }
  // What a failed test has left.
  for (const pid of runningProcesses()) process.kill(pid, 'SIGKILL');
  hubPids.length = 0;
  rmSync(dataDir, { recursive: true, force: true });
});

describe('npm start: what it is asked', () => {
  test('--help lists the options and starts nothing', async () => {
    const launcher = launch(['--help']);
    expect(await launcher.ends()).toBe(0);
    for (const option of ['--port', '--lan', '--guide-port', '--no-demo', '--reset-demo', '--help'])
      expect(launcher.printed).toContain(option);
    expect(existsSync(join(dataDir, 'mariadb'))).toBe(false);
  });

  test.each([
    [['--prot', '8080'], 'There is no option \'--prot\'; "npm start -- --help" lists what there is.\n'],
    [['8080'], 'There is nothing to do with \'8080\'; "npm start -- --help" lists what there is.\n'],
    [['--port'], '--port needs a value after it; "npm start -- --help" lists what there is.\n'],
    [['--port', 'x'], '"x" is not a port; give a number from 1 to 65535, such as: npm start -- --port 8080\n'],
    [['--port', '0'], '"0" is not a port; give a number from 1 to 65535, such as: npm start -- --port 8080\n'],
    [
      ['--lan', '--guide-port', 'x'],
      '"x" is not a port; give a number from 1 to 65535, such as: npm start -- --lan --guide-port 8081\n',
    ],
    [['--guide-port', '8081'], '--guide-port belongs to --lan; give both: npm start -- --lan --guide-port 8081\n'],
    [
      ['--lan', '--port', '8081', '--guide-port', '8081'],
      '--port and --guide-port are both 8081; the two need a port each.\n',
    ],
    [['--no-demo', '--reset-demo'], '--no-demo and --reset-demo ask for opposite things; give one of them.\n'],
  ])('%j is answered in one sentence', async (args, sentence) => {
    const launcher = launch(args);
    expect(await launcher.ends()).toBe(1);
    expect(launcher.printed).toBe(sentence);
  });

  test('an older Node is told which one is needed', async () => {
    const pretend = `Object.defineProperty(process, 'versions', { value: { ...process.versions, node: '18.20.4' } })`;
    const nodeArgs = ['--import', `data:text/javascript,${encodeURIComponent(pretend)}`];
    const launcher = launch([], { nodeArgs });
    expect(await launcher.ends()).toBe(1);
    expect(launcher.printed).toMatch(
      /^Steepfall needs Node 20 from 20\.19 on, and this is Node 18\.20\.4; install .+\.\n$/,
    );
  });
});

describe('npm start: a stay', () => {
  test('prints the address and the sign-ins, and Ctrl-C leaves nothing running', async () => {
    const launcher = await launchUntilReady();
    expect(launcher.printed).toMatch(/http:\/\/localhost:\d+/);
    expect(launcher.printed).toContain('For tablets in the kitchen: npm start -- --lan');
    expect(launcher.printed).toContain('brewer@wrenfold.example');
    expect(runningProcesses()).toHaveLength(2);
    launcher.signal('SIGINT');
    launcher.signal('SIGINT');
    expect(await launcher.ends()).toBe(0);
    expect(runningProcesses()).toEqual([]);
    expect(existsSync(join(dataDir, 'launcher.lock'))).toBe(false);
  });

  test('keeps what it stores from other users of the machine', async () => {
    await launchUntilReady();
    const modeOf = (name: string) => (statSync(join(dataDir, name)).mode & 0o777).toString(8);
    expect(['mariadb', 'mariadb.credentials.json', 'jwt-secret'].map(modeOf)).toEqual(['700', '600', '600']);
    expect(existsSync(join(dataDir, 'mariadb.accounts.sql'))).toBe(false);
  });

  test('a second start in the same checkout says so', async () => {
    const first = await launchUntilReady();
    const second = launch(['--port', String(await freePort())]);
    expect(await second.ends()).toBe(1);
    expect(second.printed).toMatch(/^Steepfall runs from this checkout already \(process \d+\); .+\.\n$/);
    first.signal('SIGTERM');
    expect(await first.ends()).toBe(0);
  });

  test('Ctrl-C during the start leaves nothing running', async () => {
    const launcher = launch(['--port', String(await freePort())]);
    await launcher.says('Making a database.');
    launcher.signal('SIGINT');
    expect(await launcher.ends()).toBe(0);
    expect(launcher.printed).not.toContain('ready');
    expect(runningProcesses()).toEqual([]);
  });
});

describe('npm start: what goes wrong', () => {
  test('a port that is taken', async () => {
    const other = createServer().listen(0, '127.0.0.1');
    await once(other, 'listening');
    const { port } = other.address() as AddressInfo;
    const launcher = launch(['--port', String(port)]);
    expect(await launcher.ends()).toBe(1);
    expect(launcher.printed).toBe(
      `Port ${port} is taken by another program; stop that one, or choose another port: npm start -- --port 8080\n`,
    );
    expect(runningProcesses()).toEqual([]);
    other.close();
  });

  test('a port that is taken on one interface, for the page about trusting', async () => {
    const other = createServer().listen(0, '127.0.0.1');
    await once(other, 'listening');
    const { port } = other.address() as AddressInfo;
    const launcher = launch(['--lan', '--port', String(await freePort()), '--guide-port', String(port)]);
    const code = await launcher.ends();
    other.close();
    expect(launcher.printed).toMatch(
      /^Port \d+ is taken by another program; .+: npm start -- --lan --guide-port 8080\n$/,
    );
    expect(code).toBe(1);
  });

  test('a data folder that cannot be made', async () => {
    const file = join(dataDir, 'file');
    writeFileSync(file, '');
    const launcher = launch([], { dataDir: join(file, 'data') });
    expect(await launcher.ends()).toBe(1);
    expect(launcher.printed).toMatch(
      /^\S+file\/data cannot be made, for a file is in its place; move that file away\.\n$/,
    );
  });

  test('a damaged database', async () => {
    const first = await launchUntilReady();
    first.signal('SIGTERM');
    await first.ends();
    truncateSync(join(dataDir, 'mariadb/ibdata1'), 0);
    writeFileSync(join(dataDir, 'mariadb/ibdata1'), Buffer.alloc(12 * 1024 * 1024, 0x5a));
    const second = launch(['--port', String(await freePort())]);
    expect(await second.ends()).toBe(1);
    expect(second.printed).toMatch(
      /^The database in .+ does not start and looks damaged \(.+\); put a copy .+: mv \S+ \S+\n$/,
    );
    expect(runningProcesses()).toEqual([]);
  });

  test('the database dies', async () => {
    const launcher = await launchUntilReady();
    process.kill(databasePid(), 'SIGKILL');
    expect(await launcher.ends()).toBe(1);
    expect(launcher.printed).toContain('The database ended by itself (signal SIGKILL), so Steepfall stops;');
    expect(runningProcesses()).toEqual([]);
  });

  test('the hub dies', async () => {
    const launcher = await launchUntilReady();
    process.kill(hubPid(), 'SIGKILL');
    expect(await launcher.ends()).toBe(1);
    expect(launcher.printed).toContain('The hub ended by itself (signal SIGKILL), so Steepfall stops;');
    expect(runningProcesses()).toEqual([]);
  });

  test('the launcher is killed: what it started ends by itself', async () => {
    const launcher = await launchUntilReady();
    const pids = [databasePid(), hubPid()];
    await launcher.kill();
    await untilGone(pids);
  });

  test('the launcher is killed and leaves the rest running: the next start finds its way', async () => {
    // Without the tools of the path there is nothing that ends the rest.
    const first = await launchUntilReady({ env: { PATH: '' } });
    const pids = [databasePid(), hubPid()];
    await first.kill();
    expect(pids.filter(isAlive)).toEqual(pids);
    const second = await launchUntilReady();
    expect(second.printed).toContain('Stopping a hub that an earlier start left running');
    expect(second.printed).toContain('Stopping a database that an earlier start left running');
    expect(pids.filter(isAlive)).toEqual([]);
  });
});

describe('npm start: the product', () => {
  const start = async (...args: string[]) => {
    const port = await freePort();
    const launcher = launch(['--port', String(port), ...args], { hubDir: null });
    await launcher.says('Steepfall is ready');
    hubPids.push(hubPid());
    return { launcher, url: `http://localhost:${port}` };
  };

  test(
    'serves the tablet and signs in with what is printed; the demo can be had anew',
    { timeout: 300_000 },
    async () => {
      const first = await start();
      const page = await fetch(first.url);
      expect(page.headers.get('content-type')).toContain('text/html');
      expect(await page.text()).toContain('<title>Steepfall</title>');
      expect(await fetch(`${first.url}/api/health`).then((answer) => answer.json())).toMatchObject({ status: 'ok' });

      const [, email, password] = /brewer +(\S+@wrenfold\.example) +(\S+)/.exec(first.launcher.printed) ?? [];
      const signIn = (url: string) =>
        fetch(`${url}/api/auth/sign-in`, {
          method: 'POST',
          headers: { 'content-type': 'application/json' },
          body: JSON.stringify({ email, password }),
        });
      expect((await signIn(first.url)).status).toBe(200);
      first.launcher.signal('SIGINT');
      expect(await first.launcher.ends()).toBe(0);

      const second = await start('--reset-demo');
      expect((await signIn(second.url)).status).toBe(200);
      second.launcher.signal('SIGINT');
      expect(await second.launcher.ends()).toBe(0);
      expect(runningProcesses()).toEqual([]);
    },
  );
});
