import { describe, expect, it } from 'vitest';
import { alertAccount, foldRun } from '@steepfall/shared/runs';
import { buildAlert, LogBuilder, MEMBER_ID, START_MS } from '@steepfall/shared/testing';
import { metricPreferences } from '@steepfall/shared/units';
import { accountLines, alertRowsOf, countText } from './alert-rows.ts';

const signal = (crossing: number) =>
  buildAlert({ key: 'signal', crossing, rule: 'signal', stage: 'now', stepId: null, actStepId: null, targetC: null });

function record(log: LogBuilder) {
  const state = foldRun(log.entries);
  const account = alertAccount(log.entries, state);
  return {
    rows: alertRowsOf(log.entries, state, account, metricPreferences),
    count: countText(account),
    lines: accountLines(account, (id) => (id === MEMBER_ID ? 'Wren' : 'the watch')),
  };
}

describe('the alerts of a run in the book', () => {
  const chilling = () => new LogBuilder().done('light-heat', 'heat', 'tea-in', 'steep', 'tea-out', 'chill');

  it('counts a quiet day', () => {
    const log = chilling()
      .add('alert.raised', buildAlert())
      .add('alert.raised', buildAlert({ stage: 'now' }));
    const { rows, count, lines } = record(log.wait(7).done('hops-in'));
    expect(count).toBe('1 call (1 level), 0 faults');
    expect(lines).toEqual(['From call to answer: 0:07 at the median, 0:07 at the longest.']);
    expect(rows).toMatchObject([{ isFault: false, verb: 'Hops in', outcome: 'answered after 0:07' }]);
    expect(rows[0]?.stages.map(({ word }) => word)).toEqual(['coming up', 'now']);
  });

  it('tells what became of a missed one, and keeps a fault that called again as one', () => {
    const choice = { key: 'hops-in', crossing: 1, stepId: 'hops-in', choice: 'more', extraG: 14 } as const;
    const log = chilling()
      .add('alert.raised', buildAlert({ stage: 'missed' }))
      .wait(70)
      .add('choice.made', { ...choice, holdS: null, reheatS: null })
      .done('hops-in')
      .add('alert.raised', signal(1))
      .wait(10)
      .add('alert.acknowledged', { key: 'signal', crossing: 1, stage: 'now' })
      .wait(300)
      .add('alert.raised', signal(2))
      .add('alert.shelved', { key: 'signal', crossing: 2, untilMs: START_MS + 980_000, reason: 'Watched by hand' })
      .wait(60)
      .add('alert.cleared', { key: 'signal', crossing: 1 })
      .add('alert.cleared', { key: 'signal', crossing: 2 });
    const { rows, count, lines } = record(log);
    expect(count).toBe('1 call (1 level), 1 fault (1 time the probe)');
    expect(rows.map(({ outcome }) => outcome)).toEqual([
      'answered after 1:10, added with more',
      expect.stringMatching(/^over after 6/),
    ]);
    expect(rows[1]?.stages.map(({ word }) => word)).toEqual(['called', 'again']);
    expect(lines.slice(1)).toEqual([
      'Heard by Wren (1).',
      expect.stringMatching(/^Put aside for 10 min.* by Wren: the probe, “Watched by hand”\.$/),
    ]);
  });
});
