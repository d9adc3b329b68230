import { once } from 'node:events';
import { readFile } from 'node:fs/promises';
import { createServer } from 'node:http';
import type { AddressInfo } from 'node:net';
import { fileURLToPath } from 'node:url';
import type { Reading } from '@steepfall/shared/readings';
import { afterEach, describe, expect, it } from 'vitest';
import { systemClock } from '../clock/index.js';
import { FakeHub } from '../testing/fake-hub.js';
import type { Host } from './host.js';
import { runProgram } from './program.js';

const trace = (name: string) => fileURLToPath(new URL(`../../traces/${name}`, import.meta.url));

class FakeHost implements Host {
  out = '';
  readonly notices: string[] = [];
  readonly stopping = new AbortController();
  readonly signal = this.stopping.signal;
  readonly files = new Map<string, string>();
  terminal: Host['terminal'] = null;
  /** Long waits, such as the last one for a hub that is away, are cut short. */
  readonly clock = {
    nowMs: systemClock.nowMs,
    sleep: (durationMs: number, signal?: AbortSignal) => systemClock.sleep(Math.min(durationMs, 150), signal),
  };
  write = (text: string) => void (this.out += text);
  notice = (text: string) => void this.notices.push(text);
  random = () => 0;
  readFile = (path: string) => {
    const text = this.files.get(path);
    return text === undefined ? readFile(path, 'utf8') : Promise.resolve(text);
  };

  get readings(): Reading[] {
    return this.out
      .trim()
      .split('\n')
      .map((line) => JSON.parse(line) as Reading);
  }

  run(...args: string[]) {
    return runProgram(args, this);
  }
}

const hubs: FakeHub[] = [];
async function startHub(): Promise<FakeHub> {
  const hub = new FakeHub();
  await hub.start();
  hubs.push(hub);
  return hub;
}
afterEach(async () => {
  for (const hub of hubs.splice(0)) await hub.stop();
});

describe('what is printed', () => {
  it('kettle --dry-run: a reading a second, the same for the same seed', async () => {
    const day = async (seed: string) => {
      const host = new FakeHost();
      expect(await host.run('kettle', '--dry-run', '--for', '40m', '--script', 'heat@0', '--seed', seed)).toBe(0);
      const [first] = host.readings;
      return host.readings.map(({ atMs, tempC }) => ({ atMs: atMs - first!.atMs, tempC }));
    };
    const readings = await day('7');
    expect(readings).toHaveLength(2401);
    expect(readings.at(-1)!.atMs).toBe(2_400_000);
    expect(readings.at(-1)!.tempC).toBeGreaterThan(70);
    expect(await day('7')).toEqual(readings);
    expect(await day('8')).not.toEqual(readings);
  });

  it('kettle: options reach the kettle', async () => {
    const host = new FakeHost();
    await host.run('kettle', '--dry-run', '--for', '60', '--start-c', '55', '--period-s', '10', '--script', 'lid@0');
    expect(host.readings).toHaveLength(7);
    expect(host.readings[0]!.tempC).toBeCloseTo(55, 0);
  });

  it('replay --dry-run: the trace, squeezed, from the instant told, with its faults', async () => {
    const host = new FakeHost();
    const from = '2026-05-01T10:00:00Z';
    const args = [
      '--dry-run',
      '--rate',
      '20',
      '--start-at',
      from,
      '--fault',
      'open-wire@10+5',
      '--fault',
      'dropout@30+60',
    ];
    expect(await host.run('replay', trace('chill-0.csv'), ...args)).toBe(0);
    const startMs = Date.parse(from);
    expect(host.readings[0]).toEqual({ atMs: startMs, tempC: 83.5 });
    expect(host.readings[2]!.atMs).toBe(startMs + 105);
    expect(host.readings.filter(({ tempC }) => tempC === -127).length).toBeGreaterThanOrEqual(4);
    const inGap = ({ atMs }: Reading) => atMs >= startMs + 1500 && atMs < startMs + 4500;
    expect(host.readings.filter(inGap)).toEqual([]);
  });

  it.each(['chill-0.csv', 'spikes-1.csv'])(
    'replay tells %s as it was recorded, faults of the probe included',
    async (name) => {
      const host = new FakeHost();
      await host.run('replay', trace(name), '--dry-run');
      const recorded = (await readFile(trace(name), 'utf8')).trim().split('\n').slice(1);
      expect(host.readings.map(({ tempC }) => tempC)).toEqual(recorded.map((row) => Number(row.split(',')[1])));
    },
  );

  it('--help lists commands, faults, keys and exit codes', async () => {
    const host = new FakeHost();
    expect(await host.run('--help')).toBe(0);
    expect(host.out).toContain('replay');
    const kettle = new FakeHost();
    expect(await kettle.run('kettle', '--help')).toBe(0);
    for (const text of ['--run-clock', 'open-wire', 'h heat', 'Exit codes', 'DEVICE_TOKEN']) {
      expect(kettle.out).toContain(text);
    }
  });
});

describe('what cannot be used', () => {
  it.each([
    [['kettle', '--dry-run', '--fault', 'sparks@10s'], 'There is no fault "sparks". Known: dropout'],
    [['kettle', '--dry-run', '--script', 'boil@0'], 'There is no act "boil"'],
    [['kettle', '--dry-run', '--rate', '90'], 'A rate is between 1 and 60.'],
    [['kettle', '--dry-run', '--seed', '1.5'], 'A seed is a whole number'],
    [['kettle', '--dry-run', '--room-c', '80'], 'roomC must be between 0 and 45'],
    [['kettle', '--dry-run', '--water-kg', 'much'], '"much" is no number'],
    [['kettle', '--hub', 'ftp://hub', '--token', 't'], 'is no address of a hub'],
    [['kettle', '--token', 't', '--run-clock', '--rate', '2'], 'leave --rate out'],
    [['replay', '/no/such.csv', '--dry-run'], 'Cannot read /no/such.csv: there is no such file.'],
    [['replay', '/', '--dry-run'], 'Cannot read /: it is a folder.'],
    [['replay'], "missing required argument 'file'"],
    [['replay', 'bad.csv', '--dry-run'], 'Cannot use bad.csv: line 2 is not "seconds,celsius"'],
    [['replay', 'good.csv', '--dry-run', '--start-at', 'noonish'], '"noonish" is no time'],
    [['replay', 'good.csv'], 'Give the device token'],
    [['ferment'], 'unknown command'],
  ])('%j ends with 2 and says why', async (args, message) => {
    const host = new FakeHost();
    host.files.set('bad.csv', 'seconds,celsius\nnow,hot\n');
    host.files.set('good.csv', 'seconds,celsius\n0,70\n');
    expect(await host.run(...args)).toBe(2);
    expect(host.notices.join('\n')).toContain(message);
    expect(host.out).toBe('');
  });
});

describe('what is sent', () => {
  const short = 'seconds,celsius\n0,70\n1,69.5\n2,69\n3,68.5\n';

  it.each(['socket', 'http'])('a trace over %s, on the clock of the hub', async (door) => {
    const hub = await startHub();
    hub.aheadMs = 3_600_000;
    const host = new FakeHost();
    host.files.set('short.csv', short);
    const askedMs = Date.now();
    expect(
      await host.run('replay', 'short.csv', '--hub', hub.url, '--token', hub.token, '--rate', '60', '--door', door),
    ).toBe(0);
    expect([...hub.stored.values()].map(({ tempC }) => tempC)).toEqual([70, 69.5, 69, 68.5]);
    expect(hub.times[0]! - askedMs).toBeGreaterThan(3_590_000);
    expect(hub.times[3]! - hub.times[0]!).toBe(50);
    expect(host.notices).toEqual(['4 readings delivered.']);
  });

  it('on a run clock: whole seconds apart at the rate of the run', async () => {
    const hub = await startHub();
    const host = new FakeHost();
    host.files.set('short.csv', short);
    expect(await host.run('replay', 'short.csv', '--hub', hub.url, '--token', hub.token, '--run-clock')).toBe(0);
    expect(hub.times.map((atMs) => atMs - hub.times[0]!)).toEqual([0, 1000, 2000, 3000]);
  });

  it.each([['--door=http'], ['--door=socket'], ['--run-clock']])('a wrong token ends with 3 (%s)', async (option) => {
    const hub = await startHub();
    const host = new FakeHost();
    expect(await host.run('kettle', '--hub', hub.url, '--token', 'wrong', option)).toBe(3);
    expect(host.notices.at(-1)).toBe('The hub does not know this device token: It may have been rotated.');
  });

  it('a hub that stays away ends with 4, and says how many readings are lost', async () => {
    const hub = await startHub();
    await hub.stop();
    const host = new FakeHost();
    host.files.set('short.csv', short);
    expect(await host.run('replay', 'short.csv', '--hub', hub.url, '--token', hub.token, '--rate', '60')).toBe(4);
    expect(host.notices[0]).toContain('Going on with the clock here.');
    expect(host.notices.at(-1)).toBe('The hub is away: 4 readings were not delivered.');
  });

  it('something that is no hub is called so', async () => {
    const other = createServer((_, response) => response.end('hello')).listen(0, '127.0.0.1');
    await once(other, 'listening');
    const { port } = other.address() as AddressInfo;
    const host = new FakeHost();
    host.files.set('short.csv', short);
    expect(await host.run('replay', 'short.csv', '--hub', `127.0.0.1:${port}`, '--token', 'any')).toBe(3);
    expect(host.notices).toEqual([`What answers at http://127.0.0.1:${port} is no Steepfall hub of this version.`]);
    other.close();
  });

  it('keys act on the kettle and on the line, and q ends it with everything delivered', async () => {
    const hub = await startHub();
    const host = new FakeHost();
    let press: (key: string) => void = () => {};
    const statuses: string[] = [];
    host.terminal = {
      onKey: (listen) => {
        press = listen;
        return () => void (press = () => {});
      },
      status: (text) => void statuses.push(text),
    };
    const ended = host.run('kettle', '--hub', hub.url, '--token', hub.token, '--rate', '60', '--start-c', '60');
    const until = async (isTrue: () => boolean) => {
      while (!isTrue()) await systemClock.sleep(5);
    };
    await until(() => hub.stored.size > 3);
    for (const key of ['h', 'l', 'c', '2', 'x']) press(key);
    await until(() => statuses.some((text) => text.includes('heat, lid, coil')));
    await until(() => [...hub.stored.values()].some(({ tempC }) => tempC === -127));
    press('q');
    expect(await ended).toBe(0);
    expect(host.notices[0]).toContain('h heat');
    expect(host.notices.at(-1)).toMatch(/^\d+ readings delivered\.$/);
  });
});
