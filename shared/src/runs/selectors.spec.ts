import { describe, expect, it } from 'vitest';
import { buildAlert, buildTimerAlert, LogBuilder, MEMBER_ID, START_MS } from '../testing/index.js';
import { alertAccount } from './alert-account.js';
import { decide, type RunCommand } from './decide.js';
import type { RunEventOf } from './events.js';
import { foldRun } from './fold.js';
import { alertWords, burstsOf, callingAlerts, freshChoice, missedCatch, openFaults } from './selectors.js';

const fault = (rule: 'signal' | 'hub' | 'battery' | 'station', key: string = rule, crossing = 1) =>
  buildAlert({ key, crossing, rule, stage: 'now', stepId: null, actStepId: null, targetC: null, direction: null });
const chilling = () => new LogBuilder().done('light-heat', 'heat', 'tea-in', 'steep', 'tea-out', 'chill');
const keysOf = (alerts: { key: string }[]) => alerts.map(({ key }) => key);

/** Above those of the builder. */
let count = 4096;

function act(log: LogBuilder, command: RunCommand): LogBuilder {
  const newId = () => `00000000-0000-7000-8000-${(count++).toString(16).padStart(12, '0')}`;
  const decision = decide(foldRun(log.entries), command, {
    nowMs: log.last.atMs,
    by: MEMBER_ID,
    station: 'tablet',
    newId,
  });
  if (!decision.ok) throw new Error(decision.problem.detail);
  log.entries.push(...decision.events);
  return log;
}

describe(callingAlerts, () => {
  const log = () =>
    chilling()
      .add('alert.raised', fault('battery', 'battery:a'))
      .add('alert.raised', buildAlert({ stage: 'stand-by' }))
      .add('alert.raised', fault('hub', 'hub:a'))
      .add('alert.raised', fault('station', 'station:b'));

  it('rings what the sheet is about to call for, then faults, then the battery', () => {
    expect(keysOf(callingAlerts(foldRun(log().entries), START_MS, 'a'))).toEqual([
      'hops-in',
      'hub:a',
      'station:b',
      'battery:a',
    ]);
  });

  it('leaves out what is another tablet’s affair, and does not tell a tablet that it is silent', () => {
    expect(keysOf(callingAlerts(foldRun(log().entries), START_MS, 'b'))).toEqual(['hops-in']);
    expect(callingAlerts(foldRun(log().entries), START_MS)).toHaveLength(4);
  });

  it('is silent about what was put aside until its end, and it stays in the list', () => {
    const untilMs = START_MS + 600_000;
    const aside = log().add('alert.shelved', { key: 'hub:a', crossing: 1, untilMs, reason: 'known' });
    const state = foldRun(aside.entries);
    expect(keysOf(callingAlerts(state, untilMs - 1, 'a'))).not.toContain('hub:a');
    expect(keysOf(callingAlerts(state, untilMs, 'a'))).toContain('hub:a');
    expect(keysOf(openFaults(state, 'a'))).toContain('hub:a');
  });
});

describe(burstsOf, () => {
  it('pins the first of half a minute, and begins anew after it', () => {
    const at = (raisedAtMs: number) => ({ raisedAtMs }) as Parameters<typeof burstsOf>[0][number];
    const bursts = burstsOf([30_000, 0, 31_000, 95_000].map(at));
    expect(bursts.map(({ first, rest }) => [first.raisedAtMs, rest.length])).toEqual([
      [0, 1],
      [31_000, 0],
      [95_000, 0],
    ]);
  });
});

describe('a missed catch', () => {
  const missed = () => chilling().add('alert.raised', buildAlert({ stage: 'missed' }));
  const choose = (choice: 'hold' | 'more' | 'reheat' | 'accept', figures = {}): RunCommand => ({
    type: 'chooseForMissed',
    ...{ key: 'hops-in', crossing: 1, stepId: 'hops-in', choice, holdS: null, extraG: null, reheatS: null },
    ...figures,
  });

  it('is one on the fall with something to put in, heard or not, until it is in', () => {
    expect(missedCatch(foldRun(missed().entries))?.progress.step.id).toBe('hops-in');
    const heard = missed().add('alert.acknowledged', { key: 'hops-in', crossing: 1, stage: 'missed' });
    expect(missedCatch(foldRun(heard.entries))).not.toBeNull();
    expect(missedCatch(foldRun(missed().done('hops-in').entries))).toBeNull();
    expect(
      missedCatch(foldRun(chilling().add('alert.raised', buildTimerAlert({ stage: 'missed' })).entries)),
    ).toBeNull();
  });

  it('is answered by a choice: a reheat is silent, leaves the step open, and is taken back', () => {
    const log = act(missed(), choose('reheat', { reheatS: 540 }));
    const state = foldRun(log.entries);
    expect(callingAlerts(state, START_MS)).toEqual([]);
    expect([missedCatch(state)?.alert.crossing, freshChoice(state)?.choice]).toEqual([1, 'reheat']);
    const back = act(log, { type: 'undoEvent', eventId: freshChoice(state)!.eventId, eventType: 'choice.made' });
    expect(callingAlerts(foldRun(back.entries), START_MS)).toHaveLength(1);
  });

  it('"back one" takes the choice, its hold and its bigger bag back with the step', () => {
    for (const command of [choose('hold', { holdS: 240 }), choose('more', { extraG: 14 })]) {
      const log = act(act(missed(), command), { type: 'completeStep', stepId: 'hops-in', tempC: 48 });
      expect(freshChoice(foldRun(log.entries))).not.toBeNull();
      const state = foldRun(act(log, { type: 'goBack' }).entries);
      expect([state.choices, state.timers]).toEqual([[], []]);
      expect(state.steps.find(({ step }) => step.id === 'hops-in')?.step.amounts[0]?.massG).toBe(60);
    }
  });

  it('calls under a new name after it was taken back, and one choice answers both calls, not the next one', () => {
    const log = act(missed(), choose('accept')).done('hops-in');
    act(log, { type: 'goBack' }).add('alert.raised', buildAlert({ key: 'hops-in~1', stage: 'missed' }));
    expect(callingAlerts(foldRun(log.entries), START_MS)).toHaveLength(2);
    expect(missedCatch(foldRun(log.entries))?.alert.key).toBe('hops-in~1');
    act(log.wait(1), choose('reheat', { key: 'hops-in~1', reheatS: 540 }));
    expect(callingAlerts(foldRun(log.entries), START_MS)).toEqual([]);
    log.wait(600).add('alert.raised', buildAlert({ key: 'hops-in~1', crossing: 2, stage: 'now' }));
    expect(callingAlerts(foldRun(log.entries), START_MS)).toMatchObject([{ crossing: 2 }]);
  });

  it('says what to do when the hold is over', () => {
    const log = act(missed(), choose('hold', { holdS: 240 }));
    const { timers } = foldRun(log.entries);
    const rung = buildTimerAlert({ key: `timer:${timers[0]!.id}`, stepId: null, actStepId: null });
    const state = foldRun(log.add('alert.raised', rung).entries);
    expect(alertWords(state, state.alerts.at(-1)!).verb).toBe('Chiller on again');
  });
});

describe(alertAccount, () => {
  it('counts calls and faults, how long each waited, who heard them, and what was put aside', () => {
    const log = chilling()
      .add('alert.raised', buildAlert())
      .add('alert.raised', buildAlert({ stage: 'now' }))
      .wait(8)
      .done('hops-in')
      .add('alert.raised', fault('signal'))
      .wait(20)
      .add('alert.acknowledged', { key: 'signal', crossing: 1, stage: 'now' })
      .wait(300)
      .add('alert.raised', fault('signal', 'signal', 2))
      .add('alert.shelved', { key: 'signal', crossing: 2, untilMs: START_MS + 928_000, reason: 'known' });
    expect(alertAccount(log.entries, foldRun(log.entries))).toMatchObject({
      callCount: 1,
      faultCount: 1,
      kinds: [
        { rule: 'temperature', count: 1 },
        { rule: 'signal', count: 1 },
      ],
      medianWaitS: 14,
      longestWaitS: 20,
      heardBy: [{ by: MEMBER_ID, count: 1 }],
      shelved: [{ rule: 'signal', reason: 'known', forS: 600 }],
      hadFlood: false,
      chattering: [],
    });
  });

  it('tells a flood and a chatter, and nothing of a quiet day', () => {
    const log = chilling();
    for (let crossing = 1; crossing <= 11; crossing += 1) {
      log.add('alert.raised', fault('hub', 'hub:a', crossing)).wait(15);
      log.add('alert.cleared', { key: 'hub:a', crossing } satisfies RunEventOf<'alert.cleared'>['payload']);
    }
    expect(alertAccount(log.entries, foldRun(log.entries))).toMatchObject({
      ...{ faultCount: 11, hadFlood: true, chattering: ['hub'], medianWaitS: null },
    });
    const quiet = chilling();
    expect(alertAccount(quiet.entries, foldRun(quiet.entries))).toMatchObject({
      callCount: 0,
      faultCount: 0,
      kinds: [],
    });
  });
});
