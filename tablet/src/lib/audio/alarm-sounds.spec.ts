import { beforeEach, describe, expect, it, vi } from 'vitest';
import type { AlarmLevel } from './alarm-sounds.ts';

/** What howler would do, without an output: which sounds are on, by their id. */
class StubHowl {
  static all: StubHowl[] = [];
  static nextId = 1000;
  readonly sounding = new Set<number>();
  constructor(readonly options: { src: string[]; onload?: () => void; onloaderror?: () => void }) {
    StubHowl.all.push(this);
    if (world.areFilesThere) this.arrive();
    else options.onloaderror?.();
  }

  _webAudio = true;
  private status = 'loading';

  arrive(): void {
    this.status = 'loaded';
    this.options.onload?.();
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

const world = { areFilesThere: true };

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
  world.areFilesThere = true;
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
