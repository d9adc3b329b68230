import { describe, expect, it } from 'vitest';
import { foldRun } from '@steepfall/shared/runs';
import { LogBuilder } from '@steepfall/shared/testing';
import { levelsInSight, levelsOf } from './levels.ts';
import { pedalNext, primaryAct } from './primary-act.ts';
import { aboutText, conflictText, forecastText } from './sheet-words.ts';
import { typed } from './number-pad.tsx';

describe(aboutText, () => {
  it.each([
    [0, '0:00'],
    [8.4, '0:08'],
    [108, '1:48'],
    [154, '2:30'],
    [599, '10:00'],
    [700, '12 min'],
    [5_400, '1.5 h'],
  ])('%d s is %s', (leftS, text) => {
    expect(aboutText(leftS)).toBe(text);
  });
});

describe(forecastText, () => {
  it('promises nothing it does not know', () => {
    expect(forecastText({ kind: 'forecast', atMs: 108_000, earlyMs: 0, lateMs: 0 }, 0)).toBe('about 1:48');
    expect(forecastText({ kind: 'too-early' }, 0)).toBeNull();
    expect(forecastText({ kind: 'never' }, 0)).toBeNull();
    expect(forecastText({ kind: 'crossed', atMs: 0 }, 0)).toBe('reached');
  });
});

describe(levelsOf, () => {
  it('names what each level asks for', () => {
    const state = foldRun(new LogBuilder().done('light-heat').entries);
    expect(levelsOf(state).map(({ tempC, text, isDone }) => [tempC, text, isDone])).toEqual([
      [76, 'tea in', false],
      [62, 'hops in', false],
    ]);
  });

  it('keeps what is done and the next two in sight', () => {
    const one = { tempC: 1, direction: 'falling', text: '', doneAtMs: null } as const;
    const levels = ['a', 'b', 'c', 'd'].map((key) => ({ ...one, key, isDone: key === 'a' }));
    expect(levelsInSight(levels, null).map(({ key }) => key)).toEqual(['a', 'b', 'c']);
    expect(levelsInSight(levels, 'd').map(({ key }) => key)).toEqual(['a', 'b', 'c', 'd']);
  });
});

describe(pedalNext, () => {
  const alert = {
    key: 'steep',
    crossing: 1,
    rule: 'timer',
    stepId: 'steep',
    actStepId: 'tea-out',
    tempC: null,
    targetC: null,
    direction: null,
    dueAtMs: null,
  } as const;
  const steeping = () => new LogBuilder().done('light-heat', 'heat', 'tea-in');

  it('does the step, as the big button does', () => {
    const state = foldRun(steeping().entries);
    expect(pedalNext(state)).toMatchObject({ kind: 'complete', progress: { step: { id: 'steep' } } });
    expect(primaryAct(state)).toEqual(pedalNext(state));
  });

  it('stops the noise first, and does nothing else with that press', () => {
    const state = foldRun(steeping().add('alert.raised', { ...alert, stage: 'now' }).entries);
    expect(pedalNext(state)).toEqual({ kind: 'acknowledge', key: 'steep', crossing: 1 });
  });

  it('leaves a warning alone', () => {
    const state = foldRun(steeping().add('alert.raised', { ...alert, stage: 'stand-by' }).entries);
    expect(pedalNext(state)).toMatchObject({ kind: 'complete' });
  });

  it('ends nothing by itself', () => {
    const ended = foldRun(steeping().add('run.ended', { outcome: 'finished' }).entries);
    expect(pedalNext(ended)).toEqual({ kind: 'none' });
  });
});

describe(conflictText, () => {
  it('says who said it twice, and that the first counts', () => {
    const log = new LogBuilder().done('light-heat').done('light-heat');
    const state = foldRun(log.entries);
    expect(conflictText(state.conflicts[0]!, state, log.entries)).toMatch(
      /“Light the heat” was marked done twice.*The first counts/,
    );
  });
});

describe(typed, () => {
  it.each([
    ['', '4', '4'],
    ['4', '.', '4.'],
    ['4.', '.', '4.'],
    ['', '.', '0.'],
    ['0', '7', '7'],
    ['4.2', '⌫', '4.'],
    ['', '⌫', ''],
    ['1234567', '8', '1234567'],
  ])('%j and %j is %j', (text, key, after) => {
    expect(typed(text, key)).toBe(after);
  });
});
