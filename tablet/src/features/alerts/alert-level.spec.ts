import { describe, expect, it } from 'vitest';
import { foldRun, type Alert } from '@steepfall/shared/runs';
import { LogBuilder } from '@steepfall/shared/testing';
import { dueAtMs, dueText, ringFor } from './alert-level.ts';

const raised = {
  key: 'steep',
  crossing: 1,
  rule: 'timer',
  stepId: 'steep',
  actStepId: 'tea-out',
  tempC: null,
  targetC: null,
  direction: null,
  dueAtMs: 60_000,
} as const;
const steeping = () => new LogBuilder().done('light-heat', 'heat', 'tea-in');

describe(ringFor, () => {
  it('is silent when nothing stands', () => {
    expect(ringFor(foldRun(steeping().entries))).toBeNull();
  });

  it.each([
    ['coming-up', 'coming-up'],
    ['stand-by', 'stand-by'],
    ['now', 'now'],
    ['missed', 'now'],
  ] as const)('%s sounds as %s', (stage, level) => {
    const state = foldRun(steeping().add('alert.raised', { ...raised, stage }).entries);
    expect(ringFor(state)).toEqual({ level, id: `steep/1/${stage}` });
  });

  it('rings one at a time, the most urgent: a fault comes after what the sheet is about to call for', () => {
    const fault = { ...raised, key: 'signal', rule: 'signal', actStepId: null, stage: 'now' } as const;
    const log = steeping().add('alert.raised', fault);
    expect(ringFor(foldRun(log.entries))).toEqual({ level: 'stand-by', id: 'signal/1/now' });
    log.add('alert.raised', { ...raised, stage: 'stand-by' });
    expect(ringFor(foldRun(log.entries))?.id).toBe('steep/1/stand-by');
  });

  it('does not ring for what was put aside, nor for another tablet’s battery', () => {
    const battery = { ...raised, key: 'battery:another', rule: 'battery', actStepId: null, stage: 'now' } as const;
    const signal = { ...battery, key: 'signal', rule: 'signal' } as const;
    const log = steeping().add('alert.raised', battery).add('alert.raised', signal);
    log.add('alert.shelved', { key: 'signal', crossing: 1, untilMs: 600_000, reason: 'known' });
    expect(ringFor(foldRun(log.entries))).toBeNull();
  });

  it('stops with the acknowledgement, wherever it came from', () => {
    const log = steeping()
      .add('alert.raised', { ...raised, stage: 'now' })
      .add('alert.acknowledged', { key: 'steep', crossing: 1, stage: 'now' }, { station: 'another' });
    expect(ringFor(foldRun(log.entries))).toBeNull();
  });
});

describe(dueText, () => {
  it.each([
    [8_000, 'in 0:08'],
    [0, 'due now'],
    [-12_000, 'due 0:12 ago'],
    [-185_000, 'due 3 min ago'],
  ])('%d ms ahead is %s', (aheadMs, text) => {
    expect(dueText(500_000 + aheadMs, 500_000)).toBe(text);
  });

  it('says nothing when nobody knows', () => {
    expect(dueText(null, 0)).toBeNull();
  });
});

describe(dueAtMs, () => {
  const alert = { rule: 'temperature', stepId: 'hops-in', dueAtMs: 100 } as Alert;
  const view = (stepId: string) =>
    ({ target: { stepId }, forecast: { kind: 'forecast', atMs: 140 } }) as unknown as Parameters<
      typeof dueAtMs
    >[1]['view'];

  it('follows the forecast of its own level', () => {
    expect(dueAtMs(alert, { view: view('hops-in') })).toBe(140);
    expect(dueAtMs(alert, { view: view('hops-out') })).toBe(100);
    expect(dueAtMs(alert, { view: null })).toBe(100);
  });
});
