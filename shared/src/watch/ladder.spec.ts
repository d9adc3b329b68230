import { describe, expect, it } from 'vitest';
import { startLadder, stepLadder } from './ladder.js';
import { startWatch } from './state.js';
import type { CatchTarget, LadderAlert, WatchReading } from './types.js';
import { watchReading } from './watch.js';

const CONFIG = { lagS: 5, roomC: 22, coolantC: 12, samplePeriodS: 1, resolutionC: 0.0625 };
const HOPS: CatchTarget = { key: 'hops', tempC: 77, direction: 'falling', reachS: 10 };
const LAG_S = 5;

/** Temperature of the liquid by second, from corners joined by straight lines. */
function liquid(corners: readonly [number, number][]): (second: number) => number {
  return (second) => {
    const i = Math.max(
      1,
      corners.findIndex(([s]) => s >= second),
    );
    const [s0, c0] = corners[i - 1]!;
    const [s1, c1] = corners[i] ?? corners.at(-1)!;
    return s1 === s0 ? c1 : c0 + (c1 - c0) * Math.min(1, Math.max(0, (second - s0) / (s1 - s0)));
  };
}

/** What a probe of 5 s lag reads of it each second, with a little dither. */
function probe(of: (second: number) => number, seconds: number): WatchReading[] {
  let tip = of(0);
  const readings: WatchReading[] = [];
  for (let tenth = 0; tenth <= seconds * 10; tenth += 1) {
    tip += (1 - Math.exp(-0.1 / LAG_S)) * (of(tenth / 10) - tip);
    if (tenth % 10 === 0) readings.push({ atMs: tenth * 100, tempC: tip + ((tenth * 3.7) % 7) * 0.02 - 0.06 });
  }
  return readings;
}

function catchOf(target: CatchTarget, readings: readonly WatchReading[], everyReadings = 1): LadderAlert[] {
  let watch = startWatch(CONFIG);
  let ladder = startLadder(target);
  const raised: LadderAlert[] = [];
  for (const [i, reading] of readings.entries()) {
    watch = watchReading(watch, reading);
    if (i % everyReadings !== 0) continue;
    const step = stepLadder(ladder, watch, reading.atMs);
    ladder = step.ladder;
    raised.push(...step.raised);
  }
  return raised;
}

const stages = (alerts: readonly LadderAlert[]) => alerts.map(({ stage }) => stage);
const secondOf = (alerts: readonly LadderAlert[], stage: string) => alerts.find((a) => a.stage === stage)!.atMs / 1000;

describe('stepLadder', () => {
  it('climbs once a crossing, and puts the addition on the target', () => {
    // 6 K/min through 77 at 260 s.
    const of = liquid([
      [0, 83],
      [200, 83],
      [400, 63],
    ]);
    const alerts = catchOf(HOPS, probe(of, 300));
    expect(stages(alerts)).toEqual(['coming-up', 'stand-by', 'now', 'missed']);
    expect(Math.abs(of(secondOf(alerts, 'now') + HOPS.reachS) - HOPS.tempC)).toBeLessThan(0.3);
    expect(alerts.every(({ crossing, key }) => crossing === 1 && key === 'hops')).toBe(true);
    const now = alerts.find(({ stage }) => stage === 'now')!;
    expect(now.earlyMs!).toBeLessThanOrEqual(260_000);
    expect(now.lateMs!).toBeGreaterThanOrEqual(260_000);
  });

  it('warns at the times it was told', () => {
    const of = liquid([
      [0, 83],
      [600, 77],
      [700, 76],
    ]);
    const alerts = catchOf({ ...HOPS, comingUpS: 200, standByS: 60, reachS: 20 }, probe(of, 640));
    expect(Math.abs(secondOf(alerts, 'coming-up') - 380)).toBeLessThan(30);
    expect(Math.abs(secondOf(alerts, 'stand-by') - 520)).toBeLessThan(20);
    expect(Math.abs(secondOf(alerts, 'now') - 580)).toBeLessThan(12);
  });

  it('catches a rise', () => {
    const of = liquid([
      [0, 60],
      [800, 88],
    ]);
    const alerts = catchOf({ ...HOPS, tempC: 80, direction: 'rising' }, probe(of, 700));
    expect(stages(alerts)).toEqual(['coming-up', 'stand-by', 'now', 'missed']);
    expect(Math.abs(of(secondOf(alerts, 'now') + 10) - 80)).toBeLessThan(0.2);
  });

  it('says nothing while a pot that must fall through the target is still being heated up to it', () => {
    const of = liquid([
      [0, 60],
      [900, 90],
    ]);
    expect(catchOf(HOPS, probe(of, 900))).toEqual([]);
  });

  it('does not repeat when the liquid hovers at the target', () => {
    const hover = (second: number) => 77.5 - second * 0.01 + 0.35 * Math.sin(second / 15);
    const of = (second: number) =>
      second < 120 ? hover(second) : Math.max(76.6, hover(second)) + 0.3 * Math.sin(second / 20);
    const alerts = catchOf(HOPS, probe(of, 900));
    expect(alerts.filter(({ stage }) => stage === 'now')).toHaveLength(1);
    expect(alerts.filter(({ stage }) => stage === 'missed').length).toBeLessThanOrEqual(1);
  });

  it('is armed again by a true return, and counts the crossing', () => {
    const of = liquid([
      [0, 83],
      [60, 83],
      [200, 73],
      [400, 85],
      [460, 85],
      [620, 70],
    ]);
    const alerts = catchOf(HOPS, probe(of, 620));
    expect(stages(alerts.filter(({ crossing }) => crossing === 1))).toEqual(['coming-up', 'stand-by', 'now', 'missed']);
    expect(stages(alerts.filter(({ crossing }) => crossing === 2))).toEqual(['coming-up', 'stand-by', 'now', 'missed']);
    expect(alerts.some(({ crossing }) => crossing > 2)).toBe(false);
  });

  it('comes at once when the liquid is already past the target, and says missed when it is far past', () => {
    const armedLate = (corners: [number, number][]) => {
      let watch = startWatch(CONFIG);
      for (const reading of probe(liquid(corners), 60)) watch = watchReading(watch, reading);
      return stepLadder(startLadder(HOPS), watch, 60_000).raised;
    };
    expect(
      stages(
        armedLate([
          [0, 76.5],
          [100, 75],
        ]),
      ),
    ).toEqual(['now']);
    expect(
      stages(
        armedLate([
          [0, 71],
          [100, 69],
        ]),
      ),
    ).toEqual(['missed']);
  });

  it('warns in the same step when the crossing comes out of nowhere', () => {
    const readings = probe(() => 83, 60);
    const sudden = Array.from({ length: 30 }, (_, i) => ({ atMs: 61_000 + i * 1000, tempC: 75 }));
    const alerts = catchOf(HOPS, [...readings, ...sudden]);
    expect(stages(alerts).slice(0, 2)).toEqual(['stand-by', 'now']);
    expect(alerts[0]!.atMs).toBe(alerts[1]!.atMs);
  });

  it('finds the crossing through a gap of the readings', () => {
    const of = liquid([
      [0, 83],
      [60, 83],
      [300, 59],
    ]);
    const target = { ...HOPS, tempC: 71 };
    const readings = probe(of, 220).filter(({ atMs }) => atMs < 140_000 || atMs > 200_000);
    let watch = startWatch(CONFIG);
    let ladder = startLadder(target);
    const raised: LadderAlert[] = [];
    let next = 0;
    for (let second = 0; second <= 220; second += 1) {
      while (readings[next] && readings[next]!.atMs <= second * 1000) {
        watch = watchReading(watch, readings[next]!);
        next += 1;
      }
      const step = stepLadder(ladder, watch, second * 1000);
      ladder = step.ladder;
      raised.push(...step.raised);
    }
    expect(stages(raised)).toEqual(['coming-up', 'stand-by', 'now', 'missed']);
    expect(Math.abs(of(secondOf(raised, 'now') + 10) - 71)).toBeLessThan(0.6);
  });

  it('holds when a fast rehearsal hands over many readings a step', () => {
    const of = liquid([
      [0, 83],
      [200, 83],
      [400, 63],
    ]);
    const alerts = catchOf(HOPS, probe(of, 300), 15);
    expect(alerts.filter(({ stage }) => stage === 'now')).toHaveLength(1);
    expect(Math.abs(of(secondOf(alerts, 'now') + 10) - 77)).toBeLessThan(1.5);
  });

  it('survives JSON between any two steps', () => {
    const of = liquid([
      [0, 83],
      [200, 83],
      [400, 63],
    ]);
    let watch = startWatch(CONFIG);
    let ladder = startLadder(HOPS);
    const raised: LadderAlert[] = [];
    for (const reading of probe(of, 300)) {
      watch = JSON.parse(JSON.stringify(watchReading(watch, reading)));
      const step = stepLadder(ladder, watch, reading.atMs);
      ladder = JSON.parse(JSON.stringify(step.ladder));
      raised.push(...step.raised);
    }
    expect(raised).toEqual(catchOf(HOPS, probe(of, 300)));
  });
});
