import { describe, expect, it } from 'vitest';
import { makeTrace, seeded } from '../testing/kettle-traces.js';
import { learnRun, type FinishedRun, type RunLessons } from './learn.js';
import type { Learned, Lesson } from './learn-lesson.js';

function runOf(family: 'chill' | 'passive' | 'heat', seed: number) {
  const trace = makeTrace(family, seed);
  const { lagS, roomC, coolantC } = trace;
  const run: FinishedRun = {
    watch: { lagS, roomC, coolantC, samplePeriodS: trace.periodS, resolutionC: trace.resolutionC },
    readings: trace.readings.map(([t, tempC]) => ({ atMs: t * 1000, tempC })),
    acts: trace.actions.map(({ act, t }) => ({ act, atMs: t * 1000 })),
    heating: null,
  };
  return { trace, run };
}

const isWithin = ({ value, error }: Learned, truth: number) => Math.abs(value - truth) <= error;

/** A pot at 84 °C, a cold coil put in after two minutes, its water turned on after four, read through a lag. */
function coilDay(trueLagS: number, lagS: number, seed: number): FinishedRun {
  const random = seeded(seed);
  const liquidC = (s: number) => (s < 120 ? 84 : 81.6) - 0.004 * s - Math.max(0, s - 240) * 0.11;
  const readings: FinishedRun['readings'][number][] = [];
  let tip = liquidC(0);
  let eddy = 0;
  for (let s = 0; s <= 360; s += 1) {
    for (let i = 0; i < 10; i += 1) tip += (1 - Math.exp(-0.1 / trueLagS)) * (liquidC(s + i / 10) - tip);
    eddy = 0.7 * eddy + 0.15 * (random() - 0.5);
    readings.push({ atMs: s * 1000, tempC: Math.round((tip + eddy) * 16) / 16 });
  }
  return {
    watch: { lagS, roomC: 21, coolantC: 12, samplePeriodS: 1, resolutionC: 0.0625 },
    readings,
    acts: [
      { act: 'coil-in', atMs: 121_000 },
      { act: 'chiller-on', atMs: 239_000 },
    ],
    heating: null,
  };
}

describe('learnRun', () => {
  it('finds a lag told a quarter off, and is as sure as it says', () => {
    const learned = [1, 2, 3, 4, 5, 6, 7, 8].flatMap((seed) => {
      const trueLagS = 3 + 0.6 * seed;
      const { lagS } = learnRun(coilDay(trueLagS, trueLagS * (seed % 2 ? 0.75 : 1.25), seed));
      return lagS.learned ? [{ trueLagS, lag: lagS.learned }] : [];
    });
    expect(learned.length).toBeGreaterThanOrEqual(6);
    expect(learned.filter(({ lag, trueLagS }) => !isWithin(lag, trueLagS)).length).toBeLessThanOrEqual(1);
  });

  it('finds the chiller, and the losses of a pot left alone with its lid on', () => {
    for (const seed of [1, 2, 3, 4, 5]) {
      const { trace, run } = runOf('chill', seed);
      const [atS, at] = trace.truth.at(-200)!;
      const [laterS, later] = trace.truth.at(-1)!;
      const perS = -Math.log((later - run.watch.coolantC!) / (at - run.watch.coolantC!)) / (laterS - atS);
      expect(isWithin(learnRun(run).chillingPerS.learned!, perS)).toBe(true);
    }
    const { trace, run } = runOf('passive', 3);
    const [s0, c0] = trace.truth[0]!;
    const [s1, c1] = trace.truth.at(-1)!;
    const perS = Math.log((c0 - run.watch.roomC!) / (c1 - run.watch.roomC!)) / (s1 - s0);
    const lidded = learnRun({ ...run, acts: [{ act: 'lid-on', atMs: 0 }] });
    expect(isWithin(lidded.coolingPerS.learned!, perS)).toBe(true);
    expect(learnRun(run).coolingPerS.because).toBe('too-short');
  });

  it('finds how much of the heat arrives, and says when that cannot be', () => {
    const { trace, run } = runOf('heat', 2);
    const [s0, c0] = trace.truth[0]!;
    const [s1, c1] = trace.truth.find(([, c]) => c >= 69)!;
    const heating = { heatCapacityJPerK: 90_000, powerW: 3500, lossWPerK: 0 };
    const share = (90_000 * (c1 - c0)) / (s1 - s0) / 3500;
    expect(isWithin(learnRun({ ...run, heating }).heaterEfficiency.learned!, share)).toBe(true);
    expect(learnRun({ ...run, heating: { ...heating, powerW: 500 } }).heaterEfficiency.because).toBe('far-from-told');
    expect(learnRun(run).heaterEfficiency.because).toBe('not-told');
  });

  it('says why it cannot say', () => {
    const { run } = runOf('chill', 1);
    const because = (lessons: RunLessons) => Object.values(lessons).map((lesson: Lesson) => lesson.because);
    expect(because(learnRun({ ...run, readings: [] }))).toEqual(Array<string>(4).fill('no-readings'));
    expect(because(learnRun({ ...run, acts: [] }))).toEqual(['few-changes', 'too-short', 'too-short', 'not-told']);
    expect(learnRun({ ...run, watch: { ...run.watch, lagS: 100 } }).lagS.learned).toBeNull();
    expect(learnRun({ ...run, watch: { ...run.watch, coolantC: null } }).chillingPerS.because).toBe('not-told');
  });

  it('adds what was learned before to what this run says', () => {
    const run = coilDay(6, 7.5, 3);
    const alone = learnRun(run).lagS.learned!;
    const together = learnRun({ ...run, watch: { ...run.watch, lagErrorRatio: 0.1 } }).lagS.learned!;
    expect(together.error).toBeLessThan(alone.error);
    expect(Math.abs(together.value - 7.5)).toBeLessThan(Math.abs(alone.value - 7.5));
  });
});
