import { describe, expect, it } from 'vitest';
import { TRACE_FAMILIES, makeTraces, type KettleTrace } from '../testing/kettle-traces.js';
import { forecastCrossing } from './forecast.js';
import { startLadder, stepLadder } from './ladder.js';
import { startWatch } from './state.js';
import type { LadderAlert } from './types.js';
import { watchAct, watchReading } from './watch.js';

/** Reading by reading, as the replay does it. */
function catchOf(trace: KettleTrace) {
  const target = { tempC: trace.targetC, direction: trace.direction };
  let watch = startWatch({
    lagS: trace.lagS,
    roomC: trace.roomC,
    coolantC: trace.coolantC,
    samplePeriodS: 1,
    resolutionC: 0.0625,
  });
  let ladder = startLadder({ ...target, key: trace.name, reachS: trace.reachS });
  const acts = [...trace.actions];
  const raised: LadderAlert[] = [];
  const held: boolean[] = [];
  for (const [t, tempC] of trace.readings) {
    const atMs = Math.round(t * 1000);
    while (acts[0] && acts[0].t <= t) watch = watchAct(watch, { act: acts[0].act, atMs: acts.shift()!.t * 1000 });
    watch = watchReading(watch, { atMs, tempC });
    const step = stepLadder(ladder, watch, atMs);
    ladder = step.ladder;
    raised.push(...step.raised);
    const forecast = forecastCrossing(watch, target, atMs);
    const leftS = trace.crossingS - t;
    if (forecast.kind === 'forecast' && acts.length === 0 && leftS > 0 && leftS < 60) {
      held.push(forecast.earlyMs <= trace.crossingS * 1000 && forecast.lateMs >= trace.crossingS * 1000);
    }
  }
  const now = raised.find(({ stage }) => stage === 'now');
  const landsAtS = now ? now.atMs / 1000 + trace.reachS : Infinity;
  const landed = trace.truth.find(([t]) => t >= landsAtS)?.[1] ?? Infinity;
  return { trace, raised, now, held, errorC: Math.abs(landed - trace.targetC), spikes: watch.verdictCounts };
}

const quantile = (values: readonly number[], share: number) =>
  [...values].sort((a, b) => a - b)[Math.min(values.length - 1, Math.floor(share * values.length))]!;

describe('the catch on kettles it has not seen', () => {
  const catches = makeTraces(TRACE_FAMILIES, 210, 2024).map(catchOf);
  const errors = catches.map(({ errorC }) => errorC);

  it('puts the addition on the target', () => {
    expect(quantile(errors, 0.5)).toBeLessThanOrEqual(0.2);
    expect(quantile(errors, 0.95)).toBeLessThanOrEqual(0.7);
    expect(Math.max(...errors)).toBeLessThanOrEqual(1.5);
  });

  it('misses none, repeats none, and warns before each', () => {
    for (const { raised, now } of catches) {
      expect(raised.filter(({ stage }) => stage === 'now')).toHaveLength(1);
      expect(raised.some(({ stage, atMs }) => stage !== 'now' && stage !== 'missed' && atMs < now!.atMs)).toBe(true);
    }
  });

  it('claims no more than it knows: the 90 % interval holds the crossing 85 to 95 times of 100', () => {
    const held = catches.flatMap((one) => one.held);
    const share = held.filter(Boolean).length / held.length;
    expect(share).toBeGreaterThanOrEqual(0.85);
    expect(share).toBeLessThanOrEqual(0.95);
  });

  it('flags fewer than one good reading in five hundred', () => {
    const clean = catches.filter(({ trace }) => trace.family !== 'spikes');
    const flagged = clean.reduce((sum, { spikes }) => sum + spikes.spike + spikes.implausible, 0);
    const seen = clean.reduce((sum, { trace }) => sum + trace.readings.length, 0);
    expect(flagged / seen).toBeLessThan(1 / 500);
  });
});
