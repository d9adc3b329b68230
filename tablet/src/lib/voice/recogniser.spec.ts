import { afterEach, describe, expect, it, vi } from 'vitest';
import { listenOnDevice, type VoiceEar } from './recogniser.ts';

function stub(available: string | null) {
  const made: FakeRecogniser[] = [];
  class FakeRecogniser {
    static available = available === null ? undefined : vi.fn(async () => available);
    processLocally = false;
    onstart: (() => void) | null = null;
    onresult: ((event: object) => void) | null = null;
    onerror: ((event: { error: string }) => void) | null = null;
    onend: (() => void) | null = null;
    start = vi.fn(() => this.onstart?.());
    abort = vi.fn();
    constructor() {
      made.push(this);
    }
  }
  vi.stubGlobal('SpeechRecognition', FakeRecogniser);
  return { made, FakeRecogniser };
}

async function listen() {
  const ears: VoiceEar[] = [];
  const words: string[] = [];
  const stop = await listenOnDevice(
    (said) => words.push(said),
    (ear) => ears.push(ear),
  );
  return { ears, words, stop };
}

const heard = (transcript: string, isFinal = true) => ({
  resultIndex: 0,
  results: [Object.assign([{ transcript }], { isFinal })],
});

afterEach(() => {
  vi.useRealTimers();
  vi.unstubAllGlobals();
});

describe(listenOnDevice, () => {
  it.each(['unavailable', 'downloadable', 'downloading', null])(
    'refuses, and makes no recogniser, where speech would leave the device: %s',
    async (available) => {
      const { made } = stub(available);
      expect((await listen()).ears.at(-1)).toBe('not-on-device');
      expect(made).toEqual([]);
    },
  );

  it('says so where there is none', async () => {
    vi.stubGlobal('SpeechRecognition', undefined);
    expect((await listen()).ears.at(-1)).toBe('unsupported');
  });

  it('asks for the device alone, and passes on whole sentences', async () => {
    const { made, FakeRecogniser } = stub('available');
    const { ears, words } = await listen();
    expect(FakeRecogniser.available).toHaveBeenCalledWith({ langs: ['en-US'], processLocally: true });
    expect(made[0]?.processLocally).toBe(true);
    expect(ears.at(-1)).toBe('listening');
    made[0]?.onresult?.(heard('back o', false));
    made[0]?.onresult?.(heard('back one'));
    expect(words).toEqual(['back one']);
  });

  it('goes on after a silence, and not after a refusal', async () => {
    vi.useFakeTimers();
    const { made } = stub('available');
    const { ears } = await listen();
    vi.advanceTimersByTime(20_000);
    made[0]?.onend?.();
    vi.advanceTimersByTime(1_000);
    expect(made[0]?.start).toHaveBeenCalledTimes(2);
    made[0]?.onerror?.({ error: 'not-allowed' });
    made[0]?.onend?.();
    vi.advanceTimersByTime(5_000);
    expect(made[0]?.start).toHaveBeenCalledTimes(2);
    expect(ears.at(-1)).toBe('not-allowed');
  });

  it('hears nothing after it was stopped', async () => {
    const { made } = stub('available');
    const { words, stop } = await listen();
    stop();
    made[0]?.onresult?.(heard('done'));
    expect(words).toEqual([]);
    expect(made[0]?.abort).toHaveBeenCalled();
  });
});
