import { describe, expect, it } from 'vitest';
import { lagTest } from './lag-test.js';
import { steadiness } from './steady.js';

const plungedAtMs = 1_000_000;
const facts = { resolutionC: 0.0625, samplePeriodS: 1 };

interface Step {
  fromC?: number;
  toC?: number;
  tauS?: number;
  deadTimeS?: number;
  untilS?: number;
  periodS?: number;
  /** What is added to the clean answer. */
  off?: (s: number) => number;
}

function step({ fromC = 0.5, toC = 45, tauS = 8, deadTimeS = 1, untilS = 90, periodS = 1, off = () => 0 }: Step = {}) {
  const readings: { atMs: number; tempC: number | null }[] = [];
  for (let s = -20 * periodS; s <= untilS; s += periodS) {
    const share = s < deadTimeS ? 0 : 1 - Math.exp(-(s - deadTimeS) / tauS);
    const tempC = Math.round((fromC + (toC - fromC) * share + off(s)) / 0.0625) * 0.0625;
    readings.push({ atMs: plungedAtMs + s * 1000, tempC });
  }
  return readings;
}

describe('lagTest', () => {
  it.each([
    { tauS: 3, deadTimeS: 3 },
    { tauS: 8, deadTimeS: 1 },
    { tauS: 20, deadTimeS: 0, untilS: 200 },
    { tauS: 8, deadTimeS: 1, fromC: 52, toC: 0.3 },
  ])('finds tau $tauS s and dead time $deadTimeS s, with a band that holds them', (what) => {
    const found = lagTest(step(what), plungedAtMs, facts);
    if (found.kind !== 'found') throw new Error(JSON.stringify(found));
    expect(Math.abs(found.lagS - what.tauS - what.deadTimeS)).toBeLessThan(2 * found.uncertaintyS);
    expect(found.uncertaintyS).toBeLessThan(1.5);
  });

  it('is on its way until the second water is reached', () => {
    expect(lagTest(step({ untilS: 12 }), plungedAtMs, facts)).toEqual({ kind: 'moving', hasMoved: true });
    expect(lagTest(step({ untilS: 0 }), plungedAtMs, facts)).toEqual({ kind: 'moving', hasMoved: false });
  });

  it.each([
    ['small-step', step({ toC: 10 })],
    ['not-steady', step({ off: (s) => (s < 0 ? s : 0) })],
    ['gap', step().filter(({ atMs }) => atMs < plungedAtMs + 5000 || atMs > plungedAtMs + 15_000)],
    ['too-few', step({ tauS: 0.6, deadTimeS: 0 })],
    ['not-one-move', step({ tauS: 8, off: (s) => (s > 5 && s < 16 ? -14 : 0) })],
    ['never-steady', step({ untilS: 700, off: (s) => 5 * Math.sin(s / 3) * (s > 0 ? 1 : 0) })],
  ])('refuses a poor test: %s', (reason, readings) => {
    expect(lagTest(readings, plungedAtMs, facts)).toEqual({ kind: 'refused', reason });
  });

  it('tells a press that came late', () => {
    expect(lagTest(step({ untilS: 90 }), plungedAtMs + 12_000, facts)).toMatchObject({ kind: 'refused' });
  });
});

describe('steadiness', () => {
  const readings = Array.from({ length: 30 }, (_, i) => ({ atMs: i * 1000, tempC: i < 15 ? i : 15 + (i % 2) / 10 }));

  it('needs the whole span', () => {
    expect(steadiness(readings, 29_000, { spanS: 10, withinK: 0.1 })).toMatchObject({ isSteady: true });
    expect(steadiness(readings, 20_000, { spanS: 10, withinK: 0.1 }).isSteady).toBe(false);
    expect(steadiness(readings.slice(-4), 29_000, { spanS: 10, withinK: 0.1 }).isSteady).toBe(false);
    expect(steadiness([], 29_000, { spanS: 10, withinK: 0.1 })).toEqual({ isSteady: false, meanC: null, rangeK: 0 });
  });
});
