import { describe, expect, it } from 'vitest';
import { compileSheet } from '../sheets/index.js';
import { buildDocument, buildHops, LogBuilder, MEMBER_ID, START_MS } from '../testing/index.js';
import { decide } from './decide.js';
import { driveRun, startDriver } from './driver.js';
import { foldRun } from './fold.js';

/** Something that goes into the kettle or comes out of it. */
const isAddition = (acts: readonly string[]) => acts.some((act) => /^(tea|hops)-(in|out)$/.test(act));
const config = {
  hasProbe: true,
  watch: { lagS: 0, resolutionC: 0.0625, samplePeriodS: 1, roomC: null, coolantC: null },
};
const lateHops = buildHops({ id: 'late', in: { at: 'falling', tempC: 50 } });

describe('what needs a hand', () => {
  it.each([
    ['as it is', buildDocument()],
    ['with hops twice', buildDocument({ additions: [...buildDocument().additions, lateHops] })],
  ])('every addition and removal of a recipe %s waits for it', (_name, document) => {
    const { steps } = compileSheet(document, { altitudeM: 0, reachS: 10 });
    const additions = steps.filter(({ acts }) => isAddition(acts));
    expect(additions.length).toBeGreaterThan(2);
    expect(additions.map(({ done }) => done.by)).toEqual(additions.map(() => 'hand'));
  });

  it('goes on by itself where no hand is needed, and stops where one is', () => {
    const log = new LogBuilder().done('light-heat');
    let driver = startDriver(config);
    // The liquid stands at the level and beyond for ten minutes.
    for (let s = 0; s <= 600; s += 1) {
      const nowMs = START_MS + s * 1000;
      const readings = [{ atMs: nowMs, tempC: Math.min(90, 60 + s * 0.1) }];
      const driven = driveRun(driver, foldRun(log.entries), { runId: 'run', station: 'hub', readings, nowMs });
      driver = driven.driver;
      for (const event of driven.events) log.entries.push(event);
    }
    const { steps } = foldRun(log.entries);
    const current = steps.find(({ status }) => status === 'current');
    expect(steps.find(({ step }) => step.id === 'heat')?.cause).toBe('temperature');
    expect(current?.step.id).toBe('tea-in');
  });

  it('writes down the moment of the act and the liquid at it, not those of the call', () => {
    const log = new LogBuilder().done('light-heat', 'heat');
    const nowMs = START_MS + 123_456;
    const newId = () => '0199aaaa-0000-7000-8000-000000000001';
    const decision = decide(
      foldRun(log.entries),
      { type: 'completeStep', stepId: 'tea-in', tempC: 76.38 },
      { nowMs, by: MEMBER_ID, station: 'tablet', newId },
    );
    if (!decision.ok) throw new Error(decision.problem.detail);
    const done = decision.events.find(({ type }) => type === 'step.done');
    expect(done).toMatchObject({ atMs: nowMs, by: MEMBER_ID, payload: { cause: 'hand', tempC: 76.38 } });
  });
});
