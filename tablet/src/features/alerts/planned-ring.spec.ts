import { describe, expect, it } from 'vitest';
import { foldRun, type LiveView } from '@steepfall/shared/runs';
import { buildAlert, LogBuilder, MEMBER_ID } from '@steepfall/shared/testing';
import { plannedRing } from './planned-ring.ts';

const steeping = () => new LogBuilder().done('light-heat', 'heat', 'tea-in');
const chilling = () => steeping().done('steep', 'tea-out', 'chill');

/** What the watch knows of the hops: their level met at this instant, give or take. */
function liveOf(log: LogBuilder, meetingAtMs: number, spreadMs: number, nowMs: number) {
  const { steps } = foldRun(log.entries);
  const hops = steps.find(({ step }) => step.id === 'hops-in');
  const view = {
    target: { stepId: 'hops-in', actStepId: 'hops-in', tempC: 62, direction: 'falling' },
    forecast: {
      kind: 'forecast',
      atMs: meetingAtMs,
      earlyMs: meetingAtMs - spreadMs / 2,
      lateMs: meetingAtMs + spreadMs / 2,
    },
  } as unknown as LiveView;
  return { live: { nowMs, view }, reachS: hops?.step.reachS ?? 0 };
}

describe(plannedRing, () => {
  const log = chilling();
  const nowMs = foldRun(log.entries).startedAtMs ?? 0;

  it('knows the call of a level once the forecast is sure, a moment after the watch itself', () => {
    const { live, reachS } = liveOf(log, nowMs + 40_000, 8_000, nowMs);
    const planned = plannedRing(foldRun(log.entries), live, 'C');
    expect(planned?.ring).toEqual({ level: 'now', id: 'hops-in/1/now', say: ['hops-in', 'n62', 'degrees'] });
    expect(planned?.inS).toBeCloseTo(40 - reachS + 1);
  });

  it('says nothing of a level while the forecast is wide', () => {
    expect(plannedRing(foldRun(log.entries), liveOf(log, nowMs + 40_000, 30_000, nowMs).live, 'C')).toBeNull();
  });

  it('is silent about what was called already, and about all else while that stands', () => {
    const called = chilling()
      .add('timer.started', { timerId: MEMBER_ID, label: 'Rinse', durationS: 50 })
      .add('alert.raised', buildAlert({ stage: 'now', key: 'hops-in', stepId: 'hops-in' }));
    const { live } = liveOf(log, nowMs + 40_000, 8_000, nowMs);
    expect(plannedRing(foldRun(called.entries), live, 'C')).toBeNull();
    const heard = called.add('alert.acknowledged', { key: 'hops-in', crossing: 1, stage: 'now' });
    expect(plannedRing(foldRun(heard.entries), live, 'C')?.ring.id).toBe(`timer:${MEMBER_ID}/1/now`);
  });

  it('counts on the wall: a rehearsal at ten times comes ten times sooner', () => {
    const fast = steeping();
    const state = foldRun(fast.entries);
    const { clock } = state;
    const steep = plannedRing(state, { nowMs, view: null }, 'C');
    const atTen = plannedRing({ ...state, clock: { ...clock!, rate: 10 } }, { nowMs, view: null }, 'C');
    expect(atTen?.inS).toBeCloseTo((steep?.inS ?? 0) / 10);
  });
});
