import { describe, expect, it } from 'vitest';
import { estimateAt } from './estimate.js';
import { startWatch } from './state.js';
import type { WatchReading, WatchVerdict } from './types.js';
import { isPowerOn, judgeRange } from './validate.js';
import { watchAct, watchReading } from './watch.js';

const CONFIG = { lagS: 6, roomC: 22, coolantC: 12, samplePeriodS: 1, resolutionC: 0.0625 };

/** Small dither that repeats: no real probe is silent, and no spec should roll dice. */
const dither = (i: number) => ((i * 37) % 7) * 0.02 - 0.06;

/** A pot at `fromC` that moves by `perS`, read once a second. */
function pot(count: number, fromC: number, perS = 0, firstS = 0): WatchReading[] {
  return Array.from({ length: count }, (_, i) => ({ atMs: (firstS + i) * 1000, tempC: fromC + perS * i + dither(i) }));
}

function verdicts(readings: readonly WatchReading[]): WatchVerdict[] {
  let watch = startWatch(CONFIG);
  return readings.map((reading) => {
    watch = watchReading(watch, reading);
    return watch.lastVerdict!;
  });
}

describe('judgeRange', () => {
  it.each<[number | null, WatchVerdict]>([
    [null, 'no-signal'],
    [NaN, 'no-signal'],
    [-127, 'open-wire'],
    [-252, 'open-wire'],
    [-253, 'open-wire'],
    [-254, 'open-wire'],
    [-251, 'power-on'],
    [-21, 'implausible'],
    [116, 'implausible'],
    [Infinity, 'no-signal'],
    [0, 'good'],
    [85, 'good'],
    [115, 'good'],
  ])('%s is %s', (tempC, verdict) => expect(judgeRange(tempC)).toBe(verdict));
});

describe('85.0', () => {
  const context = { lastGood: { atMs: 9000, tempC: 84.9 }, lastReadingAtMs: 9000, gapS: 3, noiseC: 0.1 };

  it('is real in the steep range', () => {
    expect(isPowerOn({ atMs: 10_000, tempC: 85 }, context)).toBe(false);
  });

  it('is the chip waking up when the liquid cannot have got there', () => {
    expect(isPowerOn({ atMs: 10_000, tempC: 85 }, { ...context, lastGood: { atMs: 9000, tempC: 83.5 } })).toBe(true);
    expect(isPowerOn({ atMs: 10_000, tempC: 85.0625 }, { ...context, lastGood: { atMs: 9000, tempC: 83.5 } })).toBe(
      false,
    );
  });

  it('is not believed as the first reading or the first after a gap, until the next one says the same', () => {
    expect(isPowerOn({ atMs: 10_000, tempC: 85 }, { ...context, lastGood: null, lastReadingAtMs: null })).toBe(true);
    expect(isPowerOn({ atMs: 60_000, tempC: 85 }, context)).toBe(true);
    expect(isPowerOn({ atMs: 61_000, tempC: 85 }, { ...context, lastReadingAtMs: 60_000 })).toBe(false);
  });

  it('does not become true by being said for long', () => {
    const stuck = Array.from({ length: 120 }, (_, i) => ({ atMs: (30 + i) * 1000, tempC: 85 }));
    expect(verdicts([...pot(30, 60), ...stuck]).slice(30)).toEqual(stuck.map(() => 'power-on'));
  });

  it('survives when a pot climbs through it and is held at it', () => {
    const climb = pot(80, 83, 0.03).map(({ atMs, tempC }) => ({ atMs, tempC: Math.round(tempC! * 16) / 16 }));
    const hold = Array.from({ length: 60 }, (_, i) => ({ atMs: (80 + i) * 1000, tempC: i % 3 ? 85 : 85.0625 }));
    expect(verdicts([...climb, ...hold]).filter((verdict) => verdict !== 'good')).toEqual([]);
  });
});

describe('watchReading', () => {
  it('flags a spike against the line and goes on', () => {
    const readings = pot(60, 80, -0.15);
    readings[40] = { atMs: 40_000, tempC: 0 };
    const found = verdicts(readings);
    expect(found[40]).toBe('spike');
    expect(found.filter((verdict) => verdict !== 'good')).toHaveLength(1);
  });

  it('flags a spike of two kelvin on a fast fall, but not the fall', () => {
    const readings = pot(90, 82, -0.18);
    readings[50] = { atMs: 50_000, tempC: readings[50]!.tempC! + 2 };
    expect(verdicts(readings).flatMap((verdict, i) => (verdict === 'good' ? [] : [[i, verdict]]))).toEqual([
      [50, 'spike'],
    ]);
  });

  it('takes a cold coil for a step after three readings that agree', () => {
    const readings = [...pot(60, 84), ...pot(60, 80.5, 0, 60)];
    const found = verdicts(readings);
    expect(found.slice(60, 63)).toEqual(['spike', 'spike', 'good']);
    expect(found.slice(63).every((verdict) => verdict === 'good')).toBe(true);
  });

  it('calls a reading that is not newer than the last one late', () => {
    const found = verdicts([
      ...pot(10, 80),
      { atMs: 9000, tempC: 80 },
      { atMs: 4000, tempC: 60 },
      { atMs: 10_000, tempC: 80 },
    ]);
    expect(found.slice(10)).toEqual(['late', 'late', 'good']);
  });

  describe('a probe that stops while the chiller runs', () => {
    const fallAt = (s: number) => 82 - Math.max(0, s - 60) * 0.12;
    const chilled = (stopsAtS: number, endsAtS: number) => {
      let watch = startWatch(CONFIG);
      for (let s = 0; s <= endsAtS; s += 1) {
        if (s === 60) watch = watchAct(watch, { act: 'chiller-on', atMs: 60_000 });
        const at = Math.min(s, stopsAtS);
        watch = watchReading(watch, { atMs: s * 1000, tempC: fallAt(at) + dither(at) });
      }
      return watch;
    };

    it('is found out within a minute: its signal is as old as its last change, and the fall goes on', () => {
      const watch = chilled(120, 165);
      expect(watch.lastVerdict).toBe('stuck');
      const estimate = estimateAt(watch, 165_000);
      expect(estimate.status).toBe('stale');
      expect(Math.abs(estimate.tempC! - fallAt(170))).toBeLessThan(2);
    });

    it('is not said of a calm pot whose chiller was tapped and never ran', () => {
      const calm = Array.from({ length: 240 }, (_, i) => ({ atMs: (60 + i) * 1000, tempC: 82 }));
      let watch = startWatch({ ...CONFIG, chillerPerS: 2e-3 });
      for (const reading of pot(60, 82)) watch = watchReading(watch, reading);
      watch = watchAct(watch, { act: 'chiller-on', atMs: 59_500 });
      for (const reading of calm) watch = watchReading(watch, reading);
      expect(watch.verdictCounts.stuck).toBe(0);
    });
  });

  it('counts what it saw', () => {
    let watch = startWatch(CONFIG);
    for (const reading of [...pot(20, 80), { atMs: 20_000, tempC: -127 }, { atMs: 21_000, tempC: null }]) {
      watch = watchReading(watch, reading);
    }
    expect(watch.verdictCounts).toEqual({
      good: 20,
      'open-wire': 1,
      'power-on': 0,
      spike: 0,
      implausible: 0,
      stuck: 0,
      late: 0,
      'no-signal': 1,
    });
  });

  it('does not start on a spike', () => {
    const found = [{ atMs: 0, tempC: 0 }, ...pot(30, 83, 0, 1)];
    let watch = startWatch(CONFIG);
    for (const reading of found) watch = watchReading(watch, reading);
    expect(watch.bank).not.toBeNull();
    expect(watch.trail[0]!.tempC).toBeGreaterThan(82);
  });
});
