import { clockAtRate, wallClock } from '@steepfall/shared/timers';
import type { RunEventOf } from '@steepfall/shared/runs';
import { idOf, LogBuilder, MEMBER_ID, RUN_ID, START_MS } from '@steepfall/shared/testing';
import { describe, expect, it } from 'vitest';
import { judgeEvent, type Courtroom } from './judge-event.js';

const room: Courtroom = {
  runId: RUN_ID,
  isRehearsal: false,
  clock: wallClock(START_MS),
  nowMs: START_MS + 60_000,
  memberIds: new Set([MEMBER_ID]),
  isHub: false,
};
const note = new LogBuilder().wait(5).add('note.added', { stepId: null, text: 'hello' }).last;
const done = (cause: 'hand' | 'timer') =>
  new LogBuilder().add('step.done', { stepId: 'heat', cause, tempC: null }, { by: null }).last;
const typeOf = (sent: Parameters<typeof judgeEvent>[0], over: Partial<Courtroom> = {}) => {
  const verdict = judgeEvent(sent, { ...room, ...over });
  return 'problem' in verdict ? verdict.problem : verdict.event;
};

describe(judgeEvent, () => {
  it('takes a fact as it was read by the schema', () => {
    expect(typeOf({ ...note, payload: { stepId: null, text: '  hello ' } })).toEqual(note);
  });

  it('names every field that does not fit', () => {
    expect(typeOf({ ...note, atMs: 'soon', payload: { stepId: null, text: '' }, mood: 'good' })).toMatchObject({
      type: '/problems/not-valid',
      errors: expect.arrayContaining([
        expect.objectContaining({ pointer: '/atMs' }),
        expect.objectContaining({ pointer: '/payload/text' }),
      ]),
    });
    expect(typeOf({ ...note, type: 'kettle.exploded' })).toMatchObject({ type: '/problems/not-valid' });
  });

  it('takes nothing that belongs to another run, or was done by somebody of elsewhere or by nobody', () => {
    expect(typeOf({ ...note, runId: idOf('other') })).toMatchObject({ errors: [{ pointer: '/runId' }] });
    expect(typeOf({ ...note, by: idOf('stranger') })).toMatchObject({ errors: [{ pointer: '/by' }] });
    expect(typeOf({ ...note, by: null })).toMatchObject({ errors: [{ pointer: '/by' }] });
    expect(typeOf(done('hand'))).toMatchObject({ errors: [{ pointer: '/by' }] });
  });

  it('takes what a watch found out without a person', () => {
    expect(typeOf(done('timer'))).toMatchObject({ type: 'step.done', by: null });
  });

  it('leaves the start of a run to the hub', () => {
    const started = new LogBuilder().last;
    expect(typeOf(started)).toMatchObject({ type: '/problems/not-allowed' });
    expect(typeOf(started, { isHub: true })).toEqual(started);
  });

  describe('a change of the clock', () => {
    const clock = { anchorWallMs: START_MS, anchorRunMs: START_MS, rate: 30 };
    const rehearsal = { isRehearsal: true, clock };
    const changed = (to: RunEventOf<'clock.changed'>['payload']['clock']) =>
      new LogBuilder().add('clock.changed', { clock: to }).last;

    it('is for a rehearsal only', () => {
      expect(typeOf(changed(clockAtRate(room.clock, 10, room.nowMs)))).toMatchObject({ type: '/problems/not-allowed' });
    });

    it('goes on from where the clock is, also when it was on its way for a moment', () => {
      const to = changed(clockAtRate(clock, 60, room.nowMs - 1_500));
      expect(typeOf(to, rehearsal)).toEqual(to);
    });

    it('is refused when it comes so late that the run would jump', () => {
      const waited = clockAtRate(clock, 60, room.nowMs - 30_000);
      expect(typeOf(changed(waited), rehearsal)).toMatchObject({ type: '/problems/changed-meanwhile' });
    });

    it('does not jump, nor begin in the future', () => {
      const jump = { ...clockAtRate(clock, 60, room.nowMs), anchorRunMs: START_MS };
      expect(typeOf(changed(jump), rehearsal)).toMatchObject({ type: '/problems/changed-meanwhile' });
      const later = clockAtRate(clock, 1, room.nowMs + 61_000);
      expect(typeOf(changed(later), rehearsal)).toMatchObject({ type: '/problems/changed-meanwhile' });
    });
  });
});
