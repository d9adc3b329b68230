import { beforeEach, describe, expect, it, vi } from 'vitest';
import type { AlarmLevel } from './alarm-sounds.ts';

const world: { file: 'there' | 'missing' | 'slow' | 'only-as-element' } = { file: 'there' };

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

class StubContext {
  state = 'suspended';
  sampleRate = 48_000;
  currentTime = 0;
  destination = {};
  onstatechange: (() => void) | null = null;
  createBuffer = () => ({ getChannelData: () => new Float32Array(1) });
  createBufferSource = () => ({ buffer: null, loop: false, connect: () => undefined, start: () => undefined });
  async resume() {
    this.state = 'running';
  }
  async suspend() {
    this.state = 'suspended';
  }
}

vi.mock('howler', () => ({ Howl: StubHowl, Howler: { ctx: new StubContext(), unload: () => undefined } }));
vi.mock('../clock/ticker.ts', () => ({ subscribeTick: () => () => undefined }));

async function freshSounds() {
  vi.resetModules();
  StubHowl.all = [];
  const { alarmSounds } = await import('./alarm-sounds.ts');
  return alarmSounds;
}

function soundsOf(level: AlarmLevel): number {
  return StubHowl.all
    .filter(({ options }) => options.src[0]?.includes(`/${level}.`))
    .reduce((count, { sounding }) => count + sounding.size, 0);
}

beforeEach(() => {
  world.file = 'there';
});

describe('the sound check', () => {
  it('leaves an alert that came meanwhile ringing', async () => {
    const sounds = await freshSounds();
    expect(await sounds.unlock()).toBe(true);
    sounds.playTest('now');
    sounds.ring({ level: 'now', id: 'steep/1/now' });
    sounds.stopTest();
    expect(soundsOf('now')).toBe(1);
    expect(sounds.state.get().ringing).toBe('steep/1/now');
  });

  it('ends its own sound and no other', async () => {
    const sounds = await freshSounds();
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
      const sounds = await freshSounds();
      world.file = file;
      expect(await sounds.unlock()).toBe(false);
      sounds.ring({ level: 'now', id: 'steep/1/now' });
      expect(sounds.state.get().ringing).toBeNull();

      world.file = 'there';
      expect(await sounds.unlock()).toBe(true);
      expect(soundsOf('now')).toBe(1);
    },
  );

  it('is called on once all three have arrived', async () => {
    vi.useFakeTimers();
    const sounds = await freshSounds();
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
