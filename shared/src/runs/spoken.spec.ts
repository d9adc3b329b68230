import { describe, expect, it } from 'vitest';
import { compileSheet } from '../sheets/index.js';
import { buildAlert, buildDocument, buildHops, buildTimerAlert, LogBuilder } from '../testing/index.js';
import { foldRun } from './fold.js';
import { standingAlerts } from './selectors.js';
import { actClip, spokenClips, temperatureClips } from './spoken.js';

const secondHops = buildHops({ id: 'late', in: { at: 'falling', tempC: 50 } });
const sheet = compileSheet(buildDocument({ additions: [...buildDocument().additions, secondHops] }), {
  altitudeM: 0,
  reachS: 10,
});

function saidFor(alert: ReturnType<typeof buildAlert>, unit: 'C' | 'F' = 'C'): string[] {
  const log = new LogBuilder();
  log.add('alert.raised', alert);
  const state = foldRun(log.entries);
  return spokenClips(state, standingAlerts(state)[0]!, unit);
}

describe(actClip, () => {
  it('says tea and hops by what they do, and everything else by its step', () => {
    const clipOf = (id: string) => actClip(sheet.steps.find((step) => step.id === id)!);
    expect(clipOf('tea-in')).toBe('tea-in');
    expect(clipOf('hops-in-2')).toBe('hops-in');
    expect(clipOf('chill')).toBe('chiller-on');
    expect(clipOf('steep')).toBe('steep-over');
  });

  it('sends the eyes to the sheet for a step it has no words for', () => {
    expect(actClip({ id: 'own-7', acts: [] })).toBe('next-step');
  });
});

describe(temperatureClips, () => {
  it.each([
    [62, 'C', ['n62', 'degrees']],
    [62.5, 'C', ['n62', 'point5', 'degrees']],
    [60, 'F', ['n140', 'degrees']],
    [62, 'F', ['n144', 'degrees']],
    [150, 'C', ['n150', 'degrees']],
    [-3, 'C', []],
  ] as const)('%d in %s', (tempC, unit, clips) => {
    expect(temperatureClips(tempC, unit)).toEqual(clips);
  });
});

describe(spokenClips, () => {
  it.each([
    ['coming-up', ['coming-up', 'hops-in', 'n62', 'degrees']],
    ['stand-by', ['stand-by', 'hops-in', 'n62', 'degrees']],
    ['now', ['hops-in', 'n62', 'degrees']],
    ['missed', ['late', 'hops-in']],
  ] as const)('verb, thing, number at %s', (stage, clips) => {
    expect(saidFor(buildAlert({ stage }))).toEqual(clips);
  });

  it.each([
    ['now', 4.9, ['hops-in', 'n62', 'degrees']],
    ['now', 40.7, ['hops-in', 'n40', 'seconds-late']],
    ['missed', 200, ['hops-in', 'n3', 'minutes-late']],
    ['missed', null, ['late', 'hops-in']],
    ['now', 1e6, ['hops-in', 'n220', 'minutes-late']],
  ] as const)('tells the truth about being late: %s, %d s past', (stage, lateS, clips) => {
    const state = foldRun(new LogBuilder().add('alert.raised', buildAlert({ stage })).entries);
    expect(spokenClips(state, standingAlerts(state)[0]!, 'C', lateS)).toEqual(clips);
  });

  it('speaks the unit of the person', () => {
    expect(saidFor(buildAlert({ stage: 'now' }), 'F')).toEqual(['hops-in', 'n144', 'degrees']);
  });

  it('says what is due by the clock, and what to do without readings', () => {
    expect(saidFor(buildTimerAlert())).toEqual(['tea-out', 'now']);
    expect(saidFor(buildAlert({ rule: 'signal', stepId: null, actStepId: null, targetC: null }))).toEqual([
      'no-reading',
    ]);
  });
});
