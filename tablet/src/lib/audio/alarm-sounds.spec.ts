import { beforeEach, describe, expect, it, vi } from 'vitest';
import type { AlarmLevel, Ring } from './alarm-sounds.ts';

const world: { file: 'there' | 'missing' | 'slow' | 'only-as-element'; canDecode: boolean } = {
  file: 'there',
  canDecode: false,
};
const heartbeat: { tick: () => void } = { tick: () => undefined };

/** What howler would do, without an output: which sounds are on, by their id. */
class StubHowl {
  static all: StubHowl[] = [];
  static nextId = 1000;
  readonly sounding = new Set<number>();
  readonly _webAudio = world.file !== 'only-as-element';
  private status = 'loading';
  private readonly listeners = new Map<string, () => void>();

  constructor(readonly options: { src: string[] }) {
    StubHowl.all.push(this);
    if (world.file === 'slow') return;
    setTimeout(() => this.emit(world.file === 'missing' ? 'loaderror' : 'load'), 0);
  }

  once(name: string, listener: () => void): void {
    this.listeners.set(name, listener);
  }

  emit(name: 'load' | 'loaderror'): void {
    if (name === 'load') this.status = 'loaded';
    this.listeners.get(name)?.();
  }

  state(): string {
    return this.status;
  }

  play(): number {
    StubHowl.nextId += 1;
    this.sounding.add(StubHowl.nextId);
    return StubHowl.nextId;
  }

  stop(id?: number): void {
    if (id === undefined) this.sounding.clear();
    else this.sounding.delete(id);
  }

  unload(): void {
    this.sounding.clear();
    StubHowl.all = StubHowl.all.filter((one) => one !== this);
  }
}

const RATE = 100;

function bufferOf(samples: Float32Array) {
  return { length: samples.length, getChannelData: () => samples };
}

/** One sound on the audio clock. */
class StubSource {
  static all: StubSource[] = [];
  buffer: ReturnType<typeof bufferOf> | null = null;
  loop = false;
  startsAtS = 0;
  isStopped = false;
  constructor(private readonly context: StubContext) {}
  connect = () => undefined;
  start = (atS = 0) => {
    this.startsAtS = atS;
    // What unlocks an output is a single sample, which nobody hears.
    if ((this.buffer?.length ?? 0) > 1) StubSource.all.push(this);
  };
  stop = () => {
    this.isStopped = true;
  };
  get isHeard(): boolean {
    return !this.isStopped && this.startsAtS <= this.context.currentTime;
  }
}

class StubContext {
  state = 'suspended';
  sampleRate = RATE;
  currentTime = 0;
  destination = {};
  onstatechange: (() => void) | null = null;
  createBuffer = (_channels: number, length: number) => bufferOf(new Float32Array(length));
  createBufferSource = () => new StubSource(this);
  decodeAudioData = async () => bufferOf(new Float32Array(RATE).fill(0.5));
  async resume() {
    this.state = 'running';
  }
  async suspend() {
    this.state = 'suspended';
  }
}

vi.mock('howler', () => ({ Howl: StubHowl, Howler: { ctx: new StubContext(), unload: () => undefined } }));
vi.mock('../clock/ticker.ts', () => ({
  subscribeTick: (tick: () => void) => {
    heartbeat.tick = tick;
    return () => undefined;
  },
}));

async function freshSounds() {
  vi.resetModules();
  StubHowl.all = [];
  StubSource.all = [];
  vi.stubGlobal('fetch', async () => ({ ok: world.canDecode, arrayBuffer: async () => new ArrayBuffer(0) }));
  const { Howler } = await import('howler');
  const context = Howler.ctx as unknown as StubContext;
  Object.assign(context, { state: 'suspended', currentTime: 0 });
  const { alarmSounds } = await import('./alarm-sounds.ts');
  return { sounds: alarmSounds, context };
}

async function unlockedSounds() {
  world.canDecode = true;
  const fresh = await freshSounds();
  expect(await fresh.sounds.unlock()).toBe(true);
  return fresh;
}

const heard = () => StubSource.all.filter(({ isHeard }) => isHeard);
const waiting = () => StubSource.all.filter(({ isHeard, isStopped }) => !isHeard && !isStopped);
const call: Ring = { level: 'now', id: 'steep/1/now', say: ['tea-out', 'now'] };

function soundsOf(level: AlarmLevel): number {
  return StubHowl.all
    .filter(({ options }) => options.src[0]?.includes(`/${level}.`))
    .reduce((count, { sounding }) => count + sounding.size, 0);
}

beforeEach(() => {
  world.file = 'there';
  world.canDecode = false;
});

describe('the sound check', () => {
  it('leaves an alert that came meanwhile ringing', async () => {
    const { sounds } = await freshSounds();
    expect(await sounds.unlock()).toBe(true);
    sounds.playTest('now');
    sounds.ring({ level: 'now', id: 'steep/1/now' });
    sounds.stopTest();
    expect(soundsOf('now')).toBe(1);
    expect(sounds.state.get().ringing).toBe('steep/1/now');
  });

  it('ends its own sound and no other', async () => {
    const { sounds } = await freshSounds();
    await sounds.unlock();
    sounds.ring({ level: 'now', id: 'steep/1/now' });
    sounds.playTest('now');
    expect(soundsOf('now')).toBe(2);
    sounds.stopTest();
    expect(soundsOf('now')).toBe(1);
    sounds.ring(null);
    expect(soundsOf('now')).toBe(0);
  });
});

describe('the files', () => {
  it.each(['missing', 'only-as-element'] as const)(
    'is not called on when they are %s; the next tap fetches them',
    async (file) => {
      const { sounds } = await freshSounds();
      world.file = file;
      expect(await sounds.unlock()).toBe(false);
      sounds.ring({ level: 'now', id: 'steep/1/now' });
      expect(sounds.state.get().ringing).toBeNull();

      world.file = 'there';
      expect(await sounds.unlock()).toBe(true);
      expect(soundsOf('now')).toBe(1);
    },
  );

  it('is called on once all have arrived', async () => {
    vi.useFakeTimers();
    const { sounds } = await freshSounds();
    world.file = 'slow';
    const unlocking = sounds.unlock();
    await vi.advanceTimersByTimeAsync(1_000);
    expect(await unlocking).toBe(false);
    const [first, ...others] = StubHowl.all;
    for (const howl of others) howl.emit('load');
    expect(sounds.state.get().health).not.toBe('fine');
    first?.emit('load');
    expect(sounds.state.get().health).toBe('fine');
    vi.useRealTimers();
  });
});

describe('a ring that is known to come', () => {
  it('waits on the audio clock, and is taken over when the alert is raised: never two at once', async () => {
    const { sounds, context } = await unlockedSounds();
    sounds.plan({ ring: call, inS: 20 });
    expect(waiting().map(({ startsAtS }) => startsAtS)).toEqual([20]);
    context.currentTime = 20.1;
    expect(heard()).toHaveLength(1);
    sounds.ring(call);
    sounds.plan(null);
    expect([heard().length, waiting().length]).toEqual([1, 0]);
    expect(sounds.state.get().ringing).toBe(call.id);
    sounds.ring(null);
    expect(heard()).toEqual([]);
  });

  it('is taken over although the alert came with other words', async () => {
    const { sounds, context } = await unlockedSounds();
    sounds.plan({ ring: call, inS: 5 });
    context.currentTime = 6;
    sounds.ring({ ...call, say: ['tea-out', 'n6', 'seconds-late'] });
    expect(heard()).toHaveLength(1);
  });

  it('is cancelled when the alert comes early', async () => {
    const { sounds } = await unlockedSounds();
    sounds.plan({ ring: call, inS: 20 });
    sounds.ring(call);
    expect([heard().length, waiting().length]).toEqual([1, 0]);
  });

  it('is taken over a blink before its moment: it is neither begun twice nor planned again', async () => {
    const { sounds, context } = await unlockedSounds();
    sounds.plan({ ring: call, inS: 5 });
    context.currentTime = 4.9;
    sounds.ring(call);
    sounds.plan({ ring: call, inS: 0.1 });
    expect(StubSource.all).toHaveLength(1);
    context.currentTime = 5.1;
    expect(heard()).toHaveLength(1);
    sounds.ring(null);
    expect(heard()).toEqual([]);
  });

  it('moves with the plan, goes with it, and lets small changes be', async () => {
    const { sounds } = await unlockedSounds();
    sounds.plan({ ring: call, inS: 20 });
    sounds.plan({ ring: call, inS: 20.1 });
    expect(waiting().map(({ startsAtS }) => startsAtS)).toEqual([20]);
    sounds.plan({ ring: call, inS: 26 });
    expect(waiting().map(({ startsAtS }) => startsAtS)).toEqual([26]);
    sounds.plan(null);
    expect(waiting()).toEqual([]);
  });

  it('is not put on the clock more than a minute ahead, nor in the past', async () => {
    const { sounds } = await unlockedSounds();
    sounds.plan({ ring: call, inS: 61 });
    sounds.plan({ ring: call, inS: -180 });
    expect(StubSource.all).toEqual([]);
  });

  it('stops when the alert was answered elsewhere while this page slept', async () => {
    const { sounds, context } = await unlockedSounds();
    sounds.plan({ ring: call, inS: 5 });
    context.currentTime = 9;
    sounds.plan(null);
    expect(heard()).toEqual([]);
  });
});

describe('an alarm', () => {
  it('is said once when it only comes up, also after the sound was away', async () => {
    const { sounds, context } = await unlockedSounds();
    const ring: Ring = { level: 'coming-up', id: 'steep/1/coming-up', say: ['coming-up', 'tea-out'] };
    sounds.ring(ring);
    expect(StubSource.all.map(({ loop }) => loop)).toEqual([false]);
    context.state = 'interrupted';
    heartbeat.tick();
    context.state = 'running';
    await sounds.unlock();
    expect(StubSource.all).toHaveLength(1);
  });

  it('goes on where it was when the sound comes back, and loops', async () => {
    const { sounds, context } = await unlockedSounds();
    sounds.ring(call);
    context.state = 'interrupted';
    heartbeat.tick();
    expect(heard()).toEqual([]);
    await sounds.unlock();
    expect(heard().map(({ loop }) => loop)).toEqual([true]);
  });

  it('gets its words as soon as they have come', async () => {
    const { sounds } = await unlockedSounds();
    sounds.ring(call);
    expect(heard()[0]?.buffer?.length).toBe(8 * RATE);
    const atFirst = heard()[0]
      ?.buffer?.getChannelData()
      .filter((sample) => sample > 0).length;
    await vi.waitFor(() => expect(StubSource.all).toHaveLength(2));
    expect(heard()).toHaveLength(1);
    expect(
      heard()[0]
        ?.buffer?.getChannelData()
        .filter((sample) => sample > 0).length,
    ).toBe(Number(atFirst) + 2 * RATE);
  });

  it('asks for ears again after the sound was away for longer than a glitch', async () => {
    const { sounds, context } = await unlockedSounds();
    vi.useFakeTimers({ toFake: ['performance'] });
    context.state = 'interrupted';
    heartbeat.tick();
    vi.advanceTimersByTime(1_000);
    heartbeat.tick();
    expect(sounds.state.get().wasInterrupted).toBe(false);
    vi.advanceTimersByTime(1_500);
    heartbeat.tick();
    vi.useRealTimers();
    await sounds.unlock();
    expect(sounds.state.get()).toMatchObject({ health: 'fine', wasInterrupted: true });
    sounds.playTest('stand-by');
    expect(sounds.state.get().wasInterrupted).toBe(false);
  });
});

describe('the silent switch', () => {
  it('is passed inside the tap, unless the kitchen wants its music', async () => {
    const audioSession = { type: 'auto' };
    vi.stubGlobal('navigator', { audioSession });
    const { sounds } = await freshSounds();
    const { choosePastSilentSwitch } = await import('./silent-switch.ts');
    expect(audioSession.type).toBe('auto');
    await sounds.unlock();
    expect(audioSession.type).toBe('playback');
    choosePastSilentSwitch(false);
    expect(audioSession.type).toBe('auto');
    await sounds.unlock();
    expect(audioSession.type).toBe('auto');
    choosePastSilentSwitch(true);
    vi.unstubAllGlobals();
  });
});
