import { defaultKettle } from '@steepfall/probe-sim/kettle';
import { foldRun } from '@steepfall/shared/runs';
import { LogBuilder, START_MS } from '@steepfall/shared/testing';
import { describe, expect, it } from 'vitest';
import { actsOf, RehearsalKettle } from './rehearsal-kettle.js';

const setup = defaultKettle({ waterMassKg: 8, waterTempC: 60, seed: 4 });
const at = (seconds: number) => START_MS + seconds * 1000;

describe(RehearsalKettle, () => {
  it('does what the sheet says, at the time it was done', () => {
    const kettle = new RehearsalKettle(setup, START_MS);
    const log = new LogBuilder().wait(30).done('light-heat');
    kettle.follow(foldRun(log.entries), at(40));
    const readings = kettle.readingsUntil(at(200));
    expect(readings).toHaveLength(201);
    expect(kettle.state.isHeatOn).toBe(true);
    const late = new RehearsalKettle(setup, START_MS);
    late.readingsUntil(at(40));
    late.follow(foldRun(log.entries), at(40));
    late.readingsUntil(at(200));
    // Ten seconds more of heat, since nothing had been read yet.
    expect(kettle.state.tempC).toBeGreaterThan(late.state.tempC + 0.5);
  });

  it('takes back what was taken back, and does it again', () => {
    const kettle = new RehearsalKettle(setup, START_MS);
    const follow = (log: LogBuilder) => {
      kettle.follow(foldRun(log.entries), at(500));
      const { isHeatOn, isChillerOn, isTeaIn, isHopsIn } = kettle.state;
      return { isHeatOn, isChillerOn, isTeaIn, isHopsIn };
    };
    const off = { isHeatOn: false, isChillerOn: false, isTeaIn: false, isHopsIn: false };
    const log = new LogBuilder().done('light-heat', 'heat');
    expect(follow(log)).toEqual({ ...off, isHeatOn: true });
    log.done('tea-in');
    const teaIn = log.lastId;
    expect(follow(log)).toEqual({ ...off, isTeaIn: true });
    expect(follow(log.undo(teaIn))).toEqual({ ...off, isHeatOn: true });
    expect(follow(log.undo(log.lastId))).toEqual({ ...off, isTeaIn: true });
    log.done('steep', 'tea-out', 'chill');
    expect(follow(log)).toEqual({ ...off, isChillerOn: true });
    expect(follow(log.undo(log.lastId))).toEqual(off);
  });

  it('is the same kettle when it is made again from the log', () => {
    const log = new LogBuilder();
    const first = new RehearsalKettle(setup, START_MS);
    const readings = first.readingsUntil(START_MS);
    const live = (seconds: number) => {
      log.wait(seconds);
      readings.push(...first.readingsUntil(log.last.atMs + seconds * 1000));
    };
    live(20);
    log.done('light-heat');
    first.follow(foldRun(log.entries), log.last.atMs);
    live(300);
    log.done('heat', 'tea-in');
    first.follow(foldRun(log.entries), log.last.atMs);
    live(60);
    log.undo(log.lastId);
    first.follow(foldRun(log.entries), log.last.atMs);
    live(60);

    const again = new RehearsalKettle(setup, START_MS);
    const replayed = [];
    for (const { state, learnedAtMs } of actsOf(log.stored)) {
      replayed.push(...again.readingsUntil(learnedAtMs));
      again.follow(state, learnedAtMs);
    }
    replayed.push(...again.readingsUntil(first.nowMs));
    expect(replayed).toEqual(readings);
    expect(again.state).toEqual(first.state);
  });
});
