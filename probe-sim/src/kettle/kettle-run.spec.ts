import { describe, expect, it } from 'vitest';
import { kettleRun } from './kettle-run.js';
import { defaultKettle } from './setup.js';

const startAtMs = 1_760_000_000_000;
const at = (seconds: number) => startAtMs + seconds * 1000;

describe('kettleRun', () => {
  it('hands every reading out once, from the first instant on', () => {
    const run = kettleRun(defaultKettle(), startAtMs);
    expect(run.readingsUntil(at(-1))).toEqual([]);
    expect(run.readingsUntil(startAtMs).map((reading) => reading.atMs)).toEqual([startAtMs]);
    expect(run.readingsUntil(at(3.5)).map((reading) => reading.atMs)).toEqual([at(1), at(2), at(3)]);
    expect(run.readingsUntil(at(3.9))).toEqual([]);
    expect(run.nextReadingAtMs).toBe(at(4));
  });

  it('gives the same readings however often it is asked, and others for another seed', () => {
    const day = (seed: number, askEveryS: number) => {
      const run = kettleRun(defaultKettle({ waterTempC: 70, seed }), startAtMs);
      const readings = [];
      for (let s = 0; s <= 600; s += askEveryS) {
        readings.push(...run.readingsUntil(at(s)));
        if (s === 60) run.act('coil-in', at(60.4));
        if (s === 300) run.act('chiller-on', at(300.7));
      }
      return readings;
    };
    expect(day(5, 1)).toHaveLength(601);
    expect(day(5, 60)).toEqual(day(5, 1));
    expect(day(5, 0.25)).toEqual(day(5, 1));
    expect(day(6, 60)).not.toEqual(day(5, 60));
  });

  it('keeps readings that came due before an act, and takes a late act from now on', () => {
    const run = kettleRun(defaultKettle({ waterTempC: 80 }), startAtMs);
    run.act('chiller-on', at(10));
    expect(run.readingsUntil(at(20))).toHaveLength(21);
    const before = run.state.atS;
    run.act('chiller-off', at(5));
    expect(run.state.atS).toBe(before);
    expect(run.state.isChillerOn).toBe(false);
  });

  it('keeps to its sample period without creeping', () => {
    const run = kettleRun(defaultKettle({ probe: { samplePeriodS: 0.75 } }), startAtMs);
    expect(run.readingsUntil(at(7500))).toHaveLength(10_001);
    expect(run.nextReadingAtMs).toBe(at(7500.75));
  });
});
