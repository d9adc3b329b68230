import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { estimateAt } from './estimate.js';
import { forecastCrossing, forecastCurve } from './forecast.js';
import { startLadder, stepLadder } from './ladder.js';
import { startWatch } from './state.js';
import type { LadderAlert, WatchAct } from './types.js';
import { watchAct, watchReading } from './watch.js';

const ACTS: readonly WatchAct[] = [
  'heat-on',
  'heat-off',
  'coil-in',
  'tea-in',
  'tea-out',
  'chiller-on',
  'chiller-off',
  'lid-on',
  'lid-off',
  'hops-in',
  'hops-out',
  'stirred',
];

const anyTemp = fc.oneof(
  { weight: 6, arbitrary: fc.double({ min: 55, max: 90, noNaN: true }) },
  { weight: 1, arbitrary: fc.constantFrom(null, -127, 85, 0, 115, -20, NaN, Infinity, -251) },
  { weight: 1, arbitrary: fc.double().map((tempC) => tempC + 0) },
);

const anyInput = fc.oneof(
  { weight: 9, arbitrary: fc.record({ afterMs: fc.integer({ min: -2000, max: 6000 }), tempC: anyTemp }) },
  {
    weight: 1,
    arbitrary: fc.record({ afterMs: fc.integer({ min: -5000, max: 5000 }), act: fc.constantFrom(...ACTS) }),
  },
  { weight: 1, arbitrary: fc.record({ afterMs: fc.integer({ min: 0, max: 4_000_000 }), tempC: anyTemp }) },
);

const anyConfig = fc.record({
  lagS: fc.double({ min: 0, max: 60, noNaN: true }),
  roomC: fc.option(fc.double({ min: 5, max: 40, noNaN: true })),
  coolantC: fc.option(fc.double({ min: 0, max: 30, noNaN: true })),
  samplePeriodS: fc.double({ min: 0.2, max: 60, noNaN: true }),
  resolutionC: fc.constantFrom(0, 0.01, 0.0625, 0.5),
});

describe('the watch, whatever it is fed', () => {
  it('never throws, stays plain data, and gives each stage of a crossing at most once', () => {
    fc.assert(
      fc.property(
        anyConfig,
        fc.array(anyInput, { maxLength: 150, size: 'max' }),
        fc.constantFrom('rising' as const, 'falling' as const),
        (config, inputs, direction) => {
          let watch = startWatch(config);
          let ladder = startLadder({ key: 'k', tempC: 77, direction, reachS: 10 });
          let atMs = 0;
          const raised: LadderAlert[] = [];
          for (const input of inputs) {
            atMs += input.afterMs;
            watch =
              'act' in input
                ? watchAct(watch, { act: input.act, atMs })
                : watchReading(watch, { atMs, tempC: input.tempC });
            const step = stepLadder(ladder, watch, atMs);
            ladder = step.ladder;
            raised.push(...step.raised);
            const { tempC, sdC } = estimateAt(watch, atMs);
            expect(tempC === null || Number.isFinite(tempC)).toBe(true);
            expect(sdC === null || sdC > 0).toBe(true);
            const forecast = forecastCrossing(watch, { tempC: 77, direction }, atMs);
            if (forecast.kind === 'forecast') {
              expect(forecast.earlyMs).toBeLessThanOrEqual(forecast.atMs);
              expect(forecast.lateMs).toBeGreaterThanOrEqual(forecast.atMs);
            }
          }
          for (const point of forecastCurve(watch, atMs, 600, 60)) {
            expect(point.lowC).toBeLessThanOrEqual(point.tempC);
            expect(point.highC).toBeGreaterThanOrEqual(point.tempC);
          }
          expect(JSON.parse(JSON.stringify(watch))).toEqual(watch);
          expect(JSON.parse(JSON.stringify(ladder))).toEqual(ladder);
          const names = raised.map(({ crossing, stage }) => `${crossing} ${stage}`);
          expect(new Set(names).size).toBe(names.length);
        },
      ),
      { numRuns: 200 },
    );
  });

  it('does not change the state it was given', () => {
    let watch = startWatch({ lagS: 6, roomC: 22, coolantC: 12, samplePeriodS: 1, resolutionC: 0.0625 });
    for (let i = 0; i < 40; i += 1) watch = watchReading(watch, { atMs: i * 1000, tempC: 80 - i * 0.1 });
    const before = JSON.stringify(watch);
    watchReading(watch, { atMs: 41_000, tempC: 75.9 });
    watchReading(watch, { atMs: 41_000, tempC: 20 });
    watchAct(watch, { act: 'chiller-on', atMs: 41_000 });
    stepLadder(startLadder({ key: 'k', tempC: 70, direction: 'falling', reachS: 5 }), watch, 45_000);
    expect(JSON.stringify(watch)).toBe(before);
  });
});
