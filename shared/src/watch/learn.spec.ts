import { describe, expect, it } from 'vitest';
import { makeTrace } from '../testing/kettle-traces.js';
import { learnedFrom } from './learn.js';
import { startWatch } from './state.js';
import { watchAct, watchReading } from './watch.js';

function learnOf(family: 'chill' | 'passive', seed: number) {
  const trace = makeTrace(family, seed);
  const { lagS, roomC, coolantC } = trace;
  let watch = startWatch({ lagS, roomC, coolantC, samplePeriodS: trace.periodS, resolutionC: trace.resolutionC });
  const acts = [...trace.actions];
  for (const [t, tempC] of trace.readings) {
    while (acts[0] && acts[0].t <= t) watch = watchAct(watch, { act: acts[0].act, atMs: acts.shift()!.t * 1000 });
    watch = watchReading(watch, { atMs: t * 1000, tempC });
  }
  return { trace, learned: learnedFrom(watch) };
}

describe('learnedFrom', () => {
  it('teaches nothing before the first reading', () => {
    const watch = startWatch({ lagS: 6, roomC: 22, coolantC: 12, samplePeriodS: 1, resolutionC: 0.0625 });
    expect(learnedFrom(watch)).toEqual({ lagS: null, lagErrorRatio: null, lossesPerS: null, chillerPerS: null });
  });

  it('finds the chiller, and a lag no further off than it says', () => {
    for (const seed of [1, 2, 3, 4, 5, 6]) {
      const { trace, learned } = learnOf('chill', seed);
      const [atS, at] = trace.truth.at(-40)!;
      const [laterS, later] = trace.truth.at(-1)!;
      const perS = -Math.log((later - trace.coolantC!) / (at - trace.coolantC!)) / (laterS - atS);
      expect(Math.abs(learned.chillerPerS! / perS - 1)).toBeLessThan(0.1);
      expect(Math.abs(learned.lagS! / trace.trueLagS - 1)).toBeLessThan(1.5 * learned.lagErrorRatio! + 0.02);
    }
  });

  it('finds the losses of a pot left alone', () => {
    const { trace, learned } = learnOf('passive', 3);
    const [s0, c0] = trace.truth[0]!;
    const [s1, c1] = trace.truth.at(-1)!;
    const perS = Math.log((c0 - trace.roomC!) / (c1 - trace.roomC!)) / (s1 - s0);
    expect(Math.abs(learned.lossesPerS! / perS - 1)).toBeLessThan(0.1);
    expect(learned.chillerPerS).toBeNull();
  });
});
