import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { buildAlert, buildSheet, buildStep, idOf, LogBuilder, RUN_ID, START_MS } from '../testing/run-builders.js';
import { foldRun, inLogOrder } from './fold.js';
import { currentStep, standingAlerts } from './selectors.js';
import type { LogEntry } from './events.js';

/** A log with something of everything. */
function fullLog(): LogBuilder {
  const log = new LogBuilder();
  log.add('sound.checked', { isHeard: true }).wait(60).done('light-heat').wait(900);
  log.add('step.done', { stepId: 'heat', cause: 'temperature', tempC: 76 }, { by: null }).wait(5).done('tea-in');
  log.add('task.ticked', { stepId: 'steep', taskId: 'weigh-hops' }).wait(20);
  log.add('note.added', { stepId: 'steep', text: 'smells green' });
  const note = log.lastId;
  log.add('measurement.recorded', { stepId: null, quantity: 'pH', value: 4.1 });
  log.undo(note).undo(log.lastId).wait(160);
  log.add('step.done', { stepId: 'steep', cause: 'timer', tempC: 74 }, { by: null }).done('tea-out', 'chill').wait(60);
  log.add('alert.raised', buildAlert(), { by: null }).wait(30);
  log
    .add('alert.raised', buildAlert({ stage: 'now' }), { by: null })
    .wait(4)
    .done('hops-in');
  log.add('alert.raised', buildAlert({ key: 'battery:tablet', rule: 'battery', stage: 'now' }), { by: null });
  log.add('alert.shelved', {
    key: 'battery:tablet',
    crossing: 1,
    untilMs: START_MS + 9_000_000,
    reason: 'cable is coming',
  });
  log.add('choice.made', {
    key: 'hops-in',
    crossing: 1,
    stepId: 'hops-in',
    choice: 'more',
    holdS: null,
    extraG: 30,
    reheatS: null,
  });
  log.add('timer.started', { timerId: idOf('timer'), label: 'rest', durationS: 60 });
  return log;
}

describe(foldRun, () => {
  it('starts on the first step', () => {
    const state = foldRun(new LogBuilder().entries);
    expect(state).toMatchObject({
      status: 'running',
      runId: RUN_ID,
      title: 'Sencha and Cascade',
      startedAtMs: START_MS,
    });
    expect(currentStep(state)?.step.id).toBe('light-heat');
  });

  it('weighs in more after a missed catch, until that is taken back', () => {
    const log = new LogBuilder();
    log.add('choice.made', {
      key: 'hops-in',
      crossing: 1,
      stepId: 'hops-in',
      choice: 'more',
      holdS: null,
      extraG: 30,
      reheatS: null,
    });
    const massG = () => foldRun(log.entries).steps.find(({ step }) => step.id === 'hops-in')?.step.amounts[0]?.massG;
    expect(massG()).toBe(90);
    log.undo(log.lastId);
    expect(massG()).toBe(60);
  });

  it('takes an empty log', () => {
    expect(foldRun([])).toMatchObject({ status: 'not-started', steps: [], lastSeq: 0 });
  });

  it('moves on, and gives the steep a deadline', () => {
    const log = new LogBuilder().wait(60).done('light-heat', 'heat').wait(10).done('tea-in');
    const state = foldRun(log.entries);
    expect(currentStep(state)?.step.id).toBe('steep');
    expect(state.timers).toEqual([
      expect.objectContaining({
        id: 'steep',
        stepId: 'steep',
        startedAtMs: START_MS + 70_000,
        endsAtMs: START_MS + 250_000,
      }),
    ]);
  });

  it('goes back when a step is undone, and starts the deadline anew afterwards', () => {
    const log = new LogBuilder().done('light-heat', 'heat', 'tea-in');
    const teaIn = log.lastId;
    log.wait(30).undo(teaIn);
    expect(foldRun(log.entries)).toMatchObject({ timers: [], doneOrder: ['light-heat', 'heat'] });
    log.wait(30).done('tea-in');
    expect(foldRun(log.entries).timers[0]?.startedAtMs).toBe(START_MS + 60_000);
  });

  it('undoes an undo', () => {
    const log = new LogBuilder().add('note.added', { stepId: null, text: 'a note' });
    log.undo(log.lastId);
    expect(foldRun(log.entries).notes).toEqual([]);
    log.undo(log.lastId);
    expect(foldRun(log.entries).notes).toHaveLength(1);
  });

  it('leaves a step to the hand once its automatic "done" was taken back', () => {
    const log = new LogBuilder().done('light-heat');
    log.add('step.done', { stepId: 'heat', cause: 'temperature', tempC: 76 }, { by: null });
    log.undo(log.lastId);
    expect(currentStep(foldRun(log.entries))).toMatchObject({ step: { id: 'heat' }, isHandOnly: true, undoneCount: 1 });
  });

  it('never undoes the start or what the watch found out', () => {
    const log = new LogBuilder();
    const start = log.lastId;
    log.add('alert.raised', buildAlert(), { by: null });
    log.undo(log.lastId).undo(start);
    expect(foldRun(log.entries)).toMatchObject({ status: 'running', alerts: [{ key: 'hops-in' }] });
  });

  it('keeps and shows a step that two people did', () => {
    const log = new LogBuilder().done('light-heat');
    const first = log.lastId;
    log.wait(2).add('step.done', { stepId: 'light-heat', cause: 'hand', tempC: null }, { station: 'phone' });
    const state = foldRun(log.entries);
    expect(state.conflicts).toEqual([{ kind: 'step-done-twice', stepId: 'light-heat', eventIds: [first, log.lastId] }]);
    expect(state.steps[0]?.doneEventId).toBe(first);
    expect(currentStep(state)?.step.id).toBe('heat');
  });

  it('sees no conflict where a person and the watch agree', () => {
    const log = new LogBuilder().done('light-heat', 'heat');
    log.add('step.done', { stepId: 'heat', cause: 'temperature', tempC: 76 }, { by: null });
    expect(foldRun(log.entries).conflicts).toEqual([]);
  });

  it('takes a late fact after the end, and lists it', () => {
    const log = new LogBuilder().done('light-heat').add('run.ended', { outcome: 'finished' });
    log.done('heat');
    expect(foldRun(log.entries)).toMatchObject({ status: 'ended', conflicts: [{ kind: 'after-end', stepId: 'heat' }] });
  });

  it('reopens a run whose end was undone', () => {
    const log = new LogBuilder().add('run.ended', { outcome: 'finished' });
    log.undo(log.lastId);
    expect(foldRun(log.entries)).toMatchObject({ status: 'running', outcome: null });
  });

  it('counts events of a newer version and drops none', () => {
    const log = new LogBuilder().done('light-heat');
    const newer = [
      { ...log.last, id: idOf('newer'), type: 'keg.sang', payload: {} },
      { ...log.last, id: idOf('newer v'), v: 2 },
    ] as LogEntry[];
    expect(foldRun([...log.entries, ...newer])).toMatchObject({ unknownCount: 2, doneOrder: ['light-heat'] });
  });

  it('escalates an alert, and an acknowledgement of a lower stage does not silence it', () => {
    const log = new LogBuilder().add('alert.raised', buildAlert());
    log.add('alert.raised', buildAlert({ stage: 'now' }));
    log.add('alert.acknowledged', { key: 'hops-in', crossing: 1, stage: 'coming-up' });
    expect(standingAlerts(foldRun(log.entries))).toMatchObject([{ stage: 'now', acknowledgedAtMs: null }]);
    log.add('alert.acknowledged', { key: 'hops-in', crossing: 1, stage: 'now' });
    expect(standingAlerts(foldRun(log.entries))).toEqual([]);
    log.add('alert.raised', buildAlert({ stage: 'missed' }));
    expect(standingAlerts(foldRun(log.entries))).toMatchObject([{ stage: 'missed' }]);
  });

  it('lets an alert rest once its step is done', () => {
    const log = new LogBuilder().done('light-heat', 'heat', 'tea-in', 'steep', 'tea-out', 'chill');
    log.add('alert.raised', buildAlert({ stage: 'now' }));
    expect(standingAlerts(foldRun(log.entries))).toHaveLength(1);
    log.done('hops-in');
    expect(standingAlerts(foldRun(log.entries))).toEqual([]);
  });

  it('comes to the same state in any order of arrival and with any duplication', () => {
    const entries = fullLog().stored;
    const expected = foldRun(entries);
    fc.assert(
      fc.property(
        fc.shuffledSubarray([...entries.keys()], { minLength: entries.length }),
        fc.array(fc.nat(entries.length - 1)),
        (order, repeats) => {
          const arrived = [...order, ...repeats].map((index) => entries[index]!);
          expect(foldRun(arrived)).toEqual(expected);
        },
      ),
    );
  });

  it('never throws, whatever subset of a log has arrived', () => {
    const entries = fullLog().stored;
    fc.assert(fc.property(fc.shuffledSubarray(entries), (some) => void foldRun(some)));
  });

  it('folds pending events on top of confirmed ones', () => {
    const log = new LogBuilder().done('light-heat');
    const confirmed = log.stored;
    const pending = new LogBuilder()
      .wait(-3600)
      .done('heat')
      .entries.slice(1)
      .map((event) => ({ ...event, id: idOf('p') }));
    expect(inLogOrder([...pending, ...confirmed]).at(-1)?.id).toBe(idOf('p'));
    expect(currentStep(foldRun([...pending, ...confirmed]))?.step.id).toBe('tea-in');
  });

  it('comes back to the first open step when one in the middle is undone', () => {
    const log = new LogBuilder(buildSheet([buildStep({ id: 'a' }), buildStep({ id: 'b' }), buildStep({ id: 'c' })]));
    log.done('a');
    const a = log.lastId;
    log.done('b').undo(a);
    expect(currentStep(foldRun(log.entries))?.step.id).toBe('a');
    log.done('a');
    expect(currentStep(foldRun(log.entries))?.step.id).toBe('c');
  });
});
