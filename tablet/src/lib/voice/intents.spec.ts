import { describe, expect, it } from 'vitest';
import { foldRun } from '@steepfall/shared/runs';
import { buildAlert, buildTimerAlert, LogBuilder, START_MS } from '@steepfall/shared/testing';
import phrases from '../speech/phrases.json' with { type: 'json' };
import { answerTo, intentOf, type Known } from './intents.ts';

describe(intentOf, () => {
  it.each([
    ['Done.', 'done'],
    ["that's done", 'done'],
    ['  back one ', 'back'],
    ['I heard it!', 'heard'],
    ['How hot is it?', 'how-hot'],
    ['how much longer', 'how-long'],
  ])('%j', (words, kind) => {
    expect(intentOf(words)).toEqual({ kind });
  });

  it('keeps the words of a note as they were said', () => {
    expect(intentOf('Note: smells of hay, a little')).toEqual({ kind: 'note', text: 'smells of hay, a little' });
    expect(intentOf('note')).toBeNull();
  });

  it.each(['', 'are you done with the car', 'I am done for today', 'take one back to the shop', 'notebook'])(
    'leaves talk alone: %j',
    (words) => {
      expect(intentOf(words)).toBeNull();
    },
  );

  it('never answers to what the tablet itself says', () => {
    const said = Object.values(phrases);
    expect(said.filter((phrase) => intentOf(phrase) !== null)).toEqual([]);
    expect(said.filter((phrase) => intentOf(`${phrase} sixty two degrees.`) !== null)).toEqual([]);
  });
});

const steeping = () => new LogBuilder().done('light-heat', 'heat', 'tea-in');
function known(log: LogBuilder, over: Partial<Known> = {}): Known {
  return { state: foldRun(log.entries), nowMs: START_MS, tempC: 75.94, meetingAtMs: null, unit: 'C', ...over };
}

describe(answerTo, () => {
  it('is done with the step that is on, at the temperature of this instant', () => {
    expect(answerTo({ kind: 'done' }, known(steeping())).commands).toEqual([
      { type: 'completeStep', stepId: 'steep', tempC: 75.94 },
    ]);
  });

  it('only hears an alert whose step is not on yet: what was not ticked is for eyes', () => {
    const called = known(
      steeping().add('alert.raised', buildAlert({ stage: 'now', key: 'hops-in', stepId: 'hops-in' })),
    );
    const [command] = answerTo({ kind: 'done' }, called).commands;
    expect(command).toMatchObject({ type: 'acknowledgeAlert', key: 'hops-in' });
  });

  it('silences an alert when somebody says that it was heard, and does nothing without one', () => {
    const called = known(steeping().add('alert.raised', buildTimerAlert()));
    expect(answerTo({ kind: 'heard' }, called).commands).toEqual([
      { type: 'acknowledgeAlert', key: 'steep', crossing: 1 },
    ]);
    expect(answerTo({ kind: 'heard' }, known(steeping()))).toEqual({ commands: [], say: [] });
  });

  it('answers how hot and how long in words, in the unit of the person', () => {
    expect(answerTo({ kind: 'how-hot' }, known(steeping(), { unit: 'F' })).say).toEqual(['n169', 'degrees']);
    expect(answerTo({ kind: 'how-hot' }, known(steeping(), { tempC: null })).say).toEqual(['no-reading']);
    const before = known(new LogBuilder().done('light-heat'), { meetingAtMs: START_MS + 75_400 });
    expect(answerTo({ kind: 'how-long' }, before).say).toEqual(['n76', 'in-seconds']);
    expect(answerTo({ kind: 'how-long' }, { ...before, meetingAtMs: START_MS + 400_000 }).say).toEqual([
      'n6',
      'in-minutes',
    ]);
    expect(answerTo({ kind: 'how-long' }, { ...before, meetingAtMs: null }).say).toEqual([]);
  });
});
