import { describe, expect, it } from 'vitest';
import { composeRing, isLooped, type AlarmLevel } from './compose-ring.ts';

const RATE = 1000;

function bufferOf(samples: Float32Array): AudioBuffer {
  return {
    length: samples.length,
    duration: samples.length / RATE,
    getChannelData: () => samples,
  } as unknown as AudioBuffer;
}

const context = {
  sampleRate: RATE,
  createBuffer: (_channels: number, length: number) => bufferOf(new Float32Array(length)),
} as unknown as BaseAudioContext;

/** A second of tone and a second of silence behind it. */
const tone = bufferOf(new Float32Array(2 * RATE).fill(0.5, 0, RATE));
const word = (loud: number) => bufferOf(new Float32Array(RATE).fill(loud));
const secondsOf = (level: AlarmLevel, words: AudioBuffer[]) => composeRing(context, level, tone, words).length / RATE;

describe(composeRing, () => {
  it('says the words once the tone has ended, less than half a second later, in order', () => {
    const samples = composeRing(context, 'now', tone, [word(0.2), word(0.3)]).getChannelData(0);
    expect([samples[500], samples[1200], samples[1500], samples[2500]].map((x) => Number(x?.toFixed(1)))).toEqual([
      0.5, 0, 0.2, 0.3,
    ]);
  });

  it('says what is coming up twice, with a rest, and then is quiet', () => {
    expect(isLooped('coming-up')).toBe(false);
    expect(secondsOf('coming-up', [word(0.2)])).toBeCloseTo(1 + 0.4 + 1 + 5 + 1);
  });

  it.each<[AlarmLevel, number]>([
    ['stand-by', 10],
    ['now', 8],
    ['urgent', 5],
  ])('goes on until it is answered: %s says its words every %d s', (level, everyS) => {
    expect(isLooped(level)).toBe(true);
    expect(secondsOf(level, [word(0.2)])).toBe(everyS);
    expect(secondsOf(level, [])).toBe(everyS);
  });

  it('never runs a long sentence into the next tone', () => {
    const words = [word(0.2), word(0.2), word(0.2), word(0.2)];
    expect(secondsOf('urgent', words)).toBeCloseTo(1 + 0.4 + 4 + 0.6);
  });
});
