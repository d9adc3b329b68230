import { describe, expect, it } from 'vitest';
import { composeRing } from './compose-ring.ts';

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

describe(composeRing, () => {
  it('says the words once the tone has ended, less than half a second later, in order', () => {
    const { buffer, isLooped } = composeRing(context, 'now', tone, [word(0.2), word(0.3)]);
    const samples = buffer.getChannelData(0);
    expect([samples[500], samples[1200], samples[1500], samples[2500]].map((x) => Number(x?.toFixed(1)))).toEqual([
      0.5, 0, 0.2, 0.3,
    ]);
    expect(isLooped).toBe(true);
  });

  it('says what is coming up twice, with a rest, and then is quiet', () => {
    const { buffer, isLooped } = composeRing(context, 'coming-up', tone, [word(0.2)]);
    expect(isLooped).toBe(false);
    expect(buffer.length / RATE).toBeCloseTo(1 + 0.4 + 1 + 5 + 1);
  });

  it('comes back after ten seconds at stand-by', () => {
    expect(composeRing(context, 'stand-by', tone, [word(0.2)]).buffer.length / RATE).toBe(10);
  });
});
