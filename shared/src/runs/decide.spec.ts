import { describe, expect, it } from 'vitest';
import {
  buildAlert,
  buildSheet,
  buildStep,
  idOf,
  LogBuilder,
  MEMBER_ID,
  RUN_ID,
  START_MS,
} from '../testing/run-builders.js';
import { decide, type RunCommand } from './decide.js';
import { runEventSchema, type RunEvent } from './events.js';
import { foldRun } from './fold.js';

/** given a log, when this is asked for, then these facts, or this problem. */
function when(log: LogBuilder, command: RunCommand) {
  let count = 0;
  const decision = decide(foldRun(log.entries), command, {
    nowMs: START_MS + 5000,
    by: MEMBER_ID,
    station: 'tablet',
    newId: () => idOf(`new/${(count += 1)}`),
  });
  if (!decision.ok) return decision.problem.type.replace('/problems/', '');
  for (const event of decision.events) expect(runEventSchema.safeParse(event).error).toBeUndefined();
  return decision.events.map(({ type, payload }) => ({ type, payload })) as Pick<RunEvent, 'type' | 'payload'>[];
}

const phSheet = buildSheet([
  buildStep({ id: 'ph', done: { by: 'measurement', quantity: 'pH', min: 4, max: 4.3 } }),
  buildStep({ id: 'next' }),
]);

describe(decide, () => {
  it('completes the current step', () => {
    const command: RunCommand = { type: 'completeStep', stepId: 'light-heat', tempC: 14.2 };
    expect(when(new LogBuilder(), command)).toEqual([
      { type: 'step.done', payload: { stepId: 'light-heat', cause: 'hand', tempC: 14.2 } },
    ]);
    const [event] = (
      decide(foldRun(new LogBuilder().entries), command, {
        nowMs: 7,
        by: null,
        station: 's',
        newId: () => idOf('x'),
      }) as { events: RunEvent[] }
    ).events;
    expect(event).toMatchObject({ id: idOf('x'), runId: RUN_ID, atMs: 7, by: null, station: 's', v: 1 });
  });

  it('refuses a step that is done, not next, or not there', () => {
    const log = new LogBuilder().done('light-heat');
    expect(when(log, { type: 'completeStep', stepId: 'light-heat', tempC: null })).toBe('step-already-done');
    expect(when(log, { type: 'completeStep', stepId: 'transfer', tempC: null })).toBe('step-not-current');
    expect(when(log, { type: 'completeStep', stepId: 'nowhere', tempC: null })).toBe('not-found');
  });

  it('goes back one step, however often that was said to be done', () => {
    const log = new LogBuilder().done('light-heat');
    const first = log.lastId;
    log.done('light-heat');
    expect(when(log, { type: 'goBack' })).toEqual([
      { type: 'event.undone', payload: { eventId: first } },
      { type: 'event.undone', payload: { eventId: log.lastId } },
    ]);
    expect(when(new LogBuilder(), { type: 'goBack' })).toBe('nothing-to-undo');
  });

  it('advances on a measurement in range, and only then', () => {
    const measure = (value: number): RunCommand => ({
      type: 'recordMeasurement',
      quantity: 'pH',
      value,
      stepId: 'ph',
      tempC: null,
    });
    expect(when(new LogBuilder(phSheet), measure(4.2))).toMatchObject([
      { type: 'measurement.recorded' },
      { type: 'step.done', payload: { stepId: 'ph', cause: 'measurement' } },
    ]);
    expect(when(new LogBuilder(phSheet), measure(5.1))).toMatchObject([{ type: 'measurement.recorded' }]);
    expect(when(new LogBuilder(phSheet), measure(41))).toBe('not-valid');
    expect(when(new LogBuilder(phSheet), measure(Number.NaN))).toBe('not-valid');
  });

  it('refuses an empty note and keeps what was typed otherwise', () => {
    expect(when(new LogBuilder(), { type: 'addNote', text: '  ', stepId: null })).toBe('not-valid');
    expect(when(new LogBuilder(), { type: 'addNote', text: ' steam ', stepId: null })).toEqual([
      { type: 'note.added', payload: { stepId: null, text: 'steam' } },
    ]);
  });

  it('keeps the clock of a real run at one', () => {
    expect(when(new LogBuilder(), { type: 'changeRate', rate: 30, wallMs: START_MS })).toBe('not-allowed');
    const rehearsal = new LogBuilder(buildSheet(), { isRehearsal: true });
    expect(when(rehearsal, { type: 'changeRate', rate: 30, wallMs: START_MS + 1000 })).toEqual([
      {
        type: 'clock.changed',
        payload: { clock: { anchorWallMs: START_MS + 1000, anchorRunMs: START_MS + 1000, rate: 30 } },
      },
    ]);
    expect(when(rehearsal, { type: 'changeRate', rate: 61, wallMs: START_MS })).toBe('not-valid');
  });

  it('takes notes after the end, and nothing else', () => {
    const log = new LogBuilder().add('run.ended', { outcome: 'finished' });
    expect(when(log, { type: 'completeStep', stepId: 'light-heat', tempC: null })).toBe('run-already-ended');
    expect(when(log, { type: 'addNote', text: 'late', stepId: null })).toHaveLength(1);
    expect(when(log, { type: 'undoEvent', eventId: log.lastId, eventType: 'run.ended' })).toHaveLength(1);
  });

  it('acknowledges the stage that stands', () => {
    const log = new LogBuilder().add('alert.raised', buildAlert({ key: 'steep', stage: 'now' }));
    expect(when(log, { type: 'acknowledgeAlert', key: 'steep', crossing: 1 })).toEqual([
      { type: 'alert.acknowledged', payload: { key: 'steep', crossing: 1, stage: 'now' } },
    ]);
    expect(when(log, { type: 'acknowledgeAlert', key: 'steep', crossing: 2 })).toBe('not-found');
  });

  it('says that the run has not started', () => {
    const decision = decide(foldRun([]), { type: 'goBack' }, { nowMs: 0, by: null, station: 's', newId: () => '' });
    expect(decision).toMatchObject({ ok: false, problem: { type: '/problems/run-not-started' } });
  });

  it('holds late hops by a timer of their own', () => {
    const log = new LogBuilder().add('alert.raised', buildAlert({ stage: 'missed' }));
    const name = { key: 'hops-in', crossing: 1, stepId: 'hops-in', extraG: null, reheatS: null } as const;
    expect(when(log, { type: 'chooseForMissed', ...name, choice: 'hold', holdS: 240 })).toEqual([
      { type: 'choice.made', payload: { ...name, choice: 'hold', holdS: 240 } },
      { type: 'timer.started', payload: { timerId: idOf('new/2'), label: 'Hold', durationS: 240 } },
    ]);
  });

  it('puts a fault aside with a reason and an end, and never what the sheet calls for', () => {
    const fault = buildAlert({ key: 'signal', rule: 'signal', stage: 'now', actStepId: null });
    const log = new LogBuilder().add('alert.raised', fault).add('alert.raised', buildAlert());
    const shelve = (key: string, reason = 'a new battery is coming', forS = 600) =>
      when(log, { type: 'shelveAlert', key, crossing: 1, forS, reason });
    expect(shelve('signal')).toMatchObject([{ payload: { untilMs: START_MS + 605_000 } }]);
    expect(shelve('hops-in')).toBe('not-allowed');
    expect(shelve('signal', ' ')).toBe('not-valid');
    expect(shelve('signal', 'lunch', 7200)).toBe('not-valid');
  });
});
