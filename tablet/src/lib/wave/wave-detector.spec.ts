import { describe, expect, it } from 'vitest';
import { seeFrame, stillWave, type Frame } from './wave-detector.ts';

const WIDTH = 32;
const HEIGHT = 24;
const FRAME_MS = 80;

/** A bright arm, a quarter of the picture wide, with its middle at `x`; none at null. */
function frameAt(atMs: number, x: number | null, ground = 60): Frame {
  const light = new Uint8ClampedArray(WIDTH * HEIGHT).fill(ground);
  if (x !== null)
    for (let index = 0; index < light.length; index += 1)
      if (Math.abs((index % WIDTH) / (WIDTH - 1) - x) < 0.125) light[index] = 220;
  return { atMs, width: WIDTH, height: HEIGHT, light };
}

function wavesIn(frames: Frame[]): number {
  let state = stillWave;
  let count = 0;
  for (const frame of frames) {
    const step = seeFrame(state, frame);
    state = step.state;
    if (step.isWave) count += 1;
  }
  return count;
}

/** The arm goes along these places, one after the other, in `durationMs`. */
function sweep(places: number[], durationMs: number, fromMs = 0): Frame[] {
  const steps = Math.round(durationMs / FRAME_MS);
  return Array.from({ length: steps + 1 }, (_, step) => {
    const along = (step / steps) * (places.length - 1);
    const from = places[Math.floor(along)] ?? 0;
    const to = places[Math.ceil(along)] ?? from;
    return frameAt(fromMs + step * FRAME_MS, from + (to - from) * (along % 1));
  });
}

describe(seeFrame, () => {
  it('sees an arm that goes across and back', () => {
    expect(wavesIn(sweep([0, 1, 0], 1200))).toBe(1);
    expect(wavesIn(sweep([1, 0, 1], 1000))).toBe(1);
  });

  it('does not take somebody who walks past for one, nor a slow reach and return', () => {
    expect(wavesIn(sweep([0, 1], 900))).toBe(0);
    expect(wavesIn(sweep([0, 1, 0], 5000))).toBe(0);
  });

  it('does not take light, steam or a small motion for one', () => {
    const flicker = Array.from({ length: 30 }, (_, i) => frameAt(i * FRAME_MS, null, i % 2 === 0 ? 60 : 200));
    expect(wavesIn(flicker)).toBe(0);
    expect(wavesIn(sweep([0.4, 0.6, 0.4, 0.6, 0.4], 1500))).toBe(0);
    expect(wavesIn(Array.from({ length: 30 }, (_, i) => frameAt(i * FRAME_MS, 0.5)))).toBe(0);
  });

  it('takes one long wave for one', () => {
    expect(wavesIn(sweep([0, 1, 0, 1, 0], 2400))).toBe(1);
    expect(wavesIn([...sweep([0, 1, 0], 1000), ...sweep([0, 1, 0], 1000, 4000)])).toBe(2);
  });
});
