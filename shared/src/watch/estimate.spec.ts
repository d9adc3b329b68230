import { describe, expect, it } from 'vitest';
import { newtonDurationS, newtonTempC } from '../figures/index.js';
import { estimateAt } from './estimate.js';
import { forecastCrossing, forecastCurve } from './forecast.js';
import { startWatch } from './state.js';
import { watchAct, watchReading } from './watch.js';

const CONFIG = { lagS: 8, roomC: 22, coolantC: 12, samplePeriodS: 1, resolutionC: 0.0625 };

/** A liquid that follows `of` (seconds to °C), read through a probe of `lagS`, rounded to the probe's step. */
function watched(of: (second: number) => number, seconds: number, lagS = CONFIG.lagS) {
  let tip = of(0);
  let watch = startWatch(CONFIG);
  for (let tenth = 0; tenth <= seconds * 10; tenth += 1) {
    tip += (1 - Math.exp(-0.1 / lagS)) * (of(tenth / 10) - tip);
    if (tenth % 10 !== 0) continue;
    const noise = ((tenth * 3.7) % 7) * 0.02 - 0.06;
    watch = watchReading(watch, { atMs: tenth * 100, tempC: Math.round((tip + noise) * 16) / 16 });
  }
  return watch;
}

describe('estimateAt', () => {
  it('has nothing to say before there are readings', () => {
    expect(estimateAt(startWatch(CONFIG), 0)).toEqual({
      status: 'starting',
      tempC: null,
      sdC: null,
      rateCPerMin: null,
      mode: 'holding',
      lastGoodAtMs: null,
    });
  });

  it('sees through the lag on a ramp, where the probe reads a kelvin and more too high', () => {
    const watch = watched((s) => 84 - 0.15 * s, 150);
    const { tempC, sdC, rateCPerMin, mode, status } = estimateAt(watch, 150_000);
    expect(status).toBe('live');
    expect(mode).toBe('falling');
    expect(Math.abs(tempC! - 61.5)).toBeLessThan(2 * sdC!);
    expect(Math.abs(tempC! - 61.5)).toBeLessThan(0.4);
    expect(Math.abs(rateCPerMin! - -9)).toBeLessThan(0.6);
  });

  it('says when it knows little: a wrong lag lies within what it allows for', () => {
    for (const lagS of [6.4, 8, 10]) {
      const { tempC, sdC } = estimateAt(
        watched((s) => 84 - 0.15 * s, 120, lagS),
        120_000,
      );
      expect(Math.abs(tempC! - 66)).toBeLessThan(2.5 * sdC!);
    }
  });

  it('tells holding and climbing', () => {
    expect(
      estimateAt(
        watched(() => 82, 200),
        200_000,
      ).mode,
    ).toBe('holding');
    expect(
      estimateAt(
        watched((s) => 60 + 0.03 * s, 200),
        200_000,
      ).mode,
    ).toBe('climbing');
  });

  it('goes stale after 30 s without a good reading, and is lost after ten times that', () => {
    const watch = watched(() => 82, 60);
    expect(estimateAt(watch, 90_000).status).toBe('live');
    expect(estimateAt(watch, 90_001).status).toBe('stale');
    expect(estimateAt(watch, 90_001).tempC).not.toBeNull();
    expect(estimateAt(watch, 361_000)).toMatchObject({ status: 'lost', tempC: null, lastGoodAtMs: 60_000 });
  });

  it('counts age from the last good reading, not from the last one', () => {
    let watch = watched(() => 82, 60);
    for (let s = 61; s <= 95; s += 1) watch = watchReading(watch, { atMs: s * 1000, tempC: -127 });
    expect(estimateAt(watch, 95_000).status).toBe('stale');
  });

  it('allows a slow probe three periods', () => {
    let watch = startWatch({ ...CONFIG, samplePeriodS: 20 });
    for (let i = 0; i < 12; i += 1) watch = watchReading(watch, { atMs: i * 20_000, tempC: 80 - 0.2 * i });
    expect(estimateAt(watch, 220_000 + 60_000).status).toBe('live');
    expect(estimateAt(watch, 220_000 + 60_001).status).toBe('stale');
  });

  it('is back within a minute of a cold coil', () => {
    for (const stepC of [1, 2, 4]) {
      const of = (s: number) => (s < 100 ? 84 : 84 - stepC) - 0.012 * s;
      const { tempC } = estimateAt(watched(of, 160), 160_000);
      expect(Math.abs(tempC! - of(160))).toBeLessThan(0.25);
    }
  });

  it('is told of the coil and is back sooner', () => {
    const of = (s: number) => (s < 100 ? 84 : 81) - 0.012 * s;
    let tip = of(0);
    let watch = startWatch(CONFIG);
    for (let s = 0; s <= 130; s += 1) {
      if (s === 101) watch = watchAct(watch, { act: 'coil-in', atMs: 101_000 });
      for (let i = 0; i < 10; i += 1) tip += (1 - Math.exp(-0.1 / CONFIG.lagS)) * (of(s + i / 10) - tip);
      watch = watchReading(watch, { atMs: s * 1000, tempC: tip + ((s * 37) % 7) * 0.02 - 0.06 });
    }
    expect(Math.abs(estimateAt(watch, 130_000).tempC! - of(131))).toBeLessThan(0.35);
  });
});

describe('forecastCrossing', () => {
  const falling = { tempC: 70, direction: 'falling' as const };

  it('is too early at first', () => {
    expect(forecastCrossing(startWatch(CONFIG), falling, 0)).toEqual({ kind: 'too-early' });
    expect(
      forecastCrossing(
        watched((s) => 84 - 0.1 * s, 4),
        falling,
        4000,
      ),
    ).toEqual({ kind: 'too-early' });
  });

  const chilled = (s: number) => newtonTempC(84, 12, 1.5e-3, s);
  const crossingMs = newtonDurationS(84, 70, 12, 1.5e-3)! * 1000;

  it('forecasts with an interval that holds the truth', () => {
    const forecast = forecastCrossing(watched(chilled, 100), falling, 100_000);
    if (forecast.kind !== 'forecast') throw new Error(`expected a forecast, got ${forecast.kind}`);
    expect(forecast.earlyMs).toBeLessThan(crossingMs);
    expect(forecast.lateMs).toBeGreaterThan(crossingMs);
    expect(Math.abs(forecast.atMs - crossingMs)).toBeLessThan(4000);
  });

  it('says when it was crossed', () => {
    const forecast = forecastCrossing(watched(chilled, 200), falling, 200_000);
    if (forecast.kind !== 'crossed') throw new Error(`expected a crossing, got ${forecast.kind}`);
    expect(Math.abs(forecast.atMs - crossingMs)).toBeLessThan(4000);
  });

  it('knows what is never reached', () => {
    const climbing = watched((s) => 75 + 0.03 * s, 200);
    expect(forecastCrossing(climbing, falling, 200_000)).toEqual({ kind: 'never' });
    const cooling = watched((s) => 84 - 0.02 * s, 200);
    expect(forecastCrossing(cooling, { tempC: 15, direction: 'falling' }, 200_000)).toEqual({ kind: 'never' });
    expect(forecastCrossing(cooling, { tempC: 90, direction: 'rising' }, 200_000)).toEqual({ kind: 'never' });
  });

  it('does not call a target crossed that is to be caught after the way up', () => {
    const heating = watched((s) => 30 + 0.04 * s, 200);
    expect(forecastCrossing(heating, falling, 200_000)).toEqual({ kind: 'never' });
  });
});

describe('forecastCurve', () => {
  it('widens, and starts where the estimate is', () => {
    const watch = watched((s) => 84 - 0.1 * s, 100);
    const curve = forecastCurve(watch, 100_000, 300, 10);
    expect(curve).toHaveLength(31);
    expect(curve[0]!.tempC).toBe(estimateAt(watch, 100_000).tempC);
    const widths = curve.map(({ lowC, highC }) => highC - lowC);
    expect(widths.at(-1)!).toBeGreaterThan(widths[0]!);
    expect(curve.at(-1)!.atMs).toBe(400_000);
  });

  it('is empty before there is an estimate', () => {
    expect(forecastCurve(startWatch(CONFIG), 0, 300, 10)).toEqual([]);
  });
});
