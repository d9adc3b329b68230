import { foldRun, type RunEventOf } from '@steepfall/shared/runs';
import { buildSheet, buildStep, LogBuilder, START_MS } from '@steepfall/shared/testing';
import { describe, expect, it } from 'vitest';
import { isNews, probeOutAtMs, projectionOf } from './projection.js';

const of = (log: LogBuilder) => projectionOf(foldRun(log.stored));

describe(projectionOf, () => {
  it('shows the step, the end and the clock of a log', () => {
    expect(of(new LogBuilder())).toEqual({
      status: 'running',
      outcome: null,
      endedAtMs: null,
      currentStepTitle: 'Light the heat',
      alertStage: null,
      probeOutAtMs: null,
      clockAnchorWallMs: START_MS,
      clockAnchorRunMs: START_MS,
      clockRate: 1,
      lastSeq: 1,
    });
    const ended = new LogBuilder().done('light-heat').wait(9).add('run.ended', { outcome: 'abandoned' });
    expect(of(ended)).toMatchObject({ status: 'ended', outcome: 'abandoned', endedAtMs: START_MS + 9000, lastSeq: 3 });
    expect(of(ended.undo(ended.lastId))).toMatchObject({ status: 'running', outcome: null, endedAtMs: null });
  });

  it('shows the highest stage that stands', () => {
    const alert = (stage: 'coming-up' | 'now'): RunEventOf<'alert.raised'>['payload'] => ({
      key: 'heat',
      crossing: 1,
      rule: 'temperature',
      stage,
      stepId: 'heat',
      actStepId: 'tea-in',
      tempC: 75,
      targetC: 76,
      direction: 'rising',
      dueAtMs: null,
    });
    const log = new LogBuilder().done('light-heat').add('alert.raised', alert('coming-up'), { by: null });
    expect(of(log).alertStage).toBe('coming-up');
    expect(of(log.add('alert.raised', alert('now'), { by: null })).alertStage).toBe('now');
    expect(of(log.done('heat', 'tea-in')).alertStage).toBeNull();
  });
});

describe(isNews, () => {
  it('is what lists show, and not that a note was written', () => {
    const before = of(new LogBuilder());
    const noted = of(new LogBuilder().add('note.added', { stepId: null, text: 'x' }));
    expect(noted.lastSeq).toBe(2);
    expect(isNews(before, noted)).toBe(false);
    expect(isNews(before, of(new LogBuilder().done('light-heat')))).toBe(true);
  });
});

describe(probeOutAtMs, () => {
  it('is when the transfer was done, and not while it was taken back', () => {
    const log = new LogBuilder().done('light-heat', 'heat', 'tea-in', 'steep', 'tea-out', 'chill', 'hops-in').wait(60);
    expect(probeOutAtMs(foldRun(log.entries))).toBeNull();
    log.done('transfer');
    expect(probeOutAtMs(foldRun(log.entries))).toBe(START_MS + 60_000);
    expect(probeOutAtMs(foldRun(log.undo(log.lastId).entries))).toBeNull();
  });

  it('without a transfer is when the last step that has to do with heat was done', () => {
    const steps = [buildStep({ id: 'cool', acts: ['chiller-off'] }), buildStep({ id: 'clean' })];
    const log = new LogBuilder(buildSheet(steps)).wait(5).done('cool');
    expect(probeOutAtMs(foldRun(log.entries))).toBe(START_MS + 5000);
  });

  it('never comes for a sheet without any heat', () => {
    const log = new LogBuilder(buildSheet([buildStep({ id: 'clean' })])).done('clean');
    expect(probeOutAtMs(foldRun(log.entries))).toBeNull();
  });
});
