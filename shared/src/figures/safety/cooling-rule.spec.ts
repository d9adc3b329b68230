import { describe, expect, it } from 'vitest';
import { coolingRule } from './cooling-rule.js';

const minutes = (log: readonly (readonly [number, number])[]) =>
  log.map(([min, tempC]) => ({ atMs: min * 60_000, tempC }));

/** Newton's law, one sample a minute for eight hours, from 90 °C. */
const newton = (envC: number, kPerS: number) =>
  Array.from({ length: 481 }, (_, min) => ({
    atMs: min * 60_000,
    tempC: envC + (90 - envC) * Math.exp(-kPerS * min * 60),
  }));

describe('coolingRule', () => {
  it.each([
    [
      [
        [0, 95],
        [10, 57],
        [100, 21],
        [300, 5],
      ],
      90,
      290,
      'pass',
    ],
    [
      [
        [0, 57],
        [130, 21],
        [300, 5],
      ],
      130,
      300,
      'fail',
    ],
    [
      [
        [0, 57],
        [110, 21],
        [365, 5],
      ],
      110,
      365,
      'fail',
    ],
  ] as const)('FDA Food Code 3-501.14: %j', (log, toWarmMin, toColdMin, outcome) => {
    const result = coolingRule(minutes(log));
    expect(result.outcome).toBe(outcome);
    expect((result.toWarmS ?? 0) / 60).toBeCloseTo(toWarmMin, 1);
    expect((result.toColdS ?? 0) / 60).toBeCloseTo(toColdMin, 1);
  });

  it.each([
    [4, 2.0e-4, 5685, 19_851, 'pass'],
    [4, 1.6e-4, 7107, 24_814, 'fail'],
    [2, 1.6e-4, 6643, 18_180, 'pass'],
  ])("Food Code on Newton's law, computed: toward %s °C with k = %s", (envC, kPerS, toWarmS, toColdS, outcome) => {
    const result = coolingRule(newton(envC, kPerS));
    expect(result.outcome).toBe(outcome);
    expect(Math.abs((result.toWarmS ?? 0) - toWarmS)).toBeLessThan(3);
    expect(Math.abs((result.toColdS ?? 0) - toColdS)).toBeLessThan(10);
  });

  it('does not call it a pass before it is shown, and says fail as soon as it is one', () => {
    expect(
      coolingRule(
        minutes([
          [0, 60],
          [10, 40],
          [60, 15],
        ]),
      ).outcome,
    ).toBe('not-shown');
    expect(
      coolingRule(
        minutes([
          [0, 60],
          [10, 40],
          [131, 22],
        ]),
      ).outcome,
    ).toBe('fail');
    expect(
      coolingRule(
        minutes([
          [0, 60],
          [60, 58],
        ]),
      ),
    ).toMatchObject({ outcome: 'not-shown', startsAtMs: null });
    expect(coolingRule([])).toMatchObject({ outcome: 'not-shown', startsAtMs: null });
  });

  it('judges each limit on the worse side of the probe', () => {
    const log = minutes([
      [0, 60],
      [5, 55],
      [15, 45],
      [30, 33],
      [45, 20.5],
      [55, 10],
      [65, 5],
      [70, 4.8],
    ]);
    expect(coolingRule(log).outcome).toBe('pass');
    expect(coolingRule(log, { uncertaintyK: 0.5 }).outcome).toBe('not-shown');
  });

  it('counts from when it stays below, and starts again only for a real reheat', () => {
    const warmedAgain = minutes([
      [0, 60],
      [10, 20],
      [20, 25],
      [30, 20],
      [40, 4],
    ]);
    expect(coolingRule(warmedAgain).toWarmS).toBeGreaterThan(1600);
    const back = minutes([
      [0, 60],
      [10, 40],
      [100, 58],
      [110, 40],
      [120, 20],
      [200, 4],
    ]);
    expect(coolingRule(back).outcome).toBe('pass');
    expect(coolingRule(back).startsAtMs).toBeLessThan(10 * 60_000);
    expect(coolingRule(back, { reheatedAtMs: [60 * 60_000] }).startsAtMs).toBeGreaterThan(100 * 60_000);
    const wobble = minutes([
      [0, 60],
      [5, 56.5],
      [6, 57.2],
      [7, 56],
      [60, 20],
      [100, 4],
    ]);
    expect(coolingRule(wobble).startsAtMs).toBeGreaterThan(6 * 60_000);
  });

  it('puts a crossing in a long gap where it looks worse', () => {
    const result = coolingRule(
      minutes([
        [0, 60],
        [20, 50],
        [40, 19],
        [60, 3],
      ]),
    );
    expect(result).toMatchObject({ startsAtMs: 0, toWarmS: 2400, toColdS: 3600 });
  });

  it('gives a cold steep four hours', () => {
    expect(
      coolingRule(
        minutes([
          [0, 20],
          [230, 5],
        ]),
        { start: 'ambient' },
      ).outcome,
    ).toBe('pass');
    expect(
      coolingRule(
        minutes([
          [0, 20],
          [250, 5],
        ]),
        { start: 'ambient' },
      ).outcome,
    ).toBe('fail');
  });

  it('refuses a curve out of order', () => {
    expect(() =>
      coolingRule(
        minutes([
          [10, 60],
          [0, 50],
        ]),
      ),
    ).toThrow(RangeError);
  });
});
