import { describe, expect, it } from 'vitest';
import { compileSheet, type RecipeDocument } from '../sheets/index.js';
import { buildDocument, buildHops, buildTea } from '../testing/index.js';
import { LogBuilder, RUN_ID, START_MS } from '../testing/run-builders.js';
import { driveRun, startDriver, type RunDriver } from './driver.js';
import { foldRun } from './fold.js';

const config = {
  watch: { lagS: 4, roomC: 21, coolantC: 12, samplePeriodS: 1, resolutionC: 0.0625 },
  hasProbe: true,
};
/** Chiller on at 78 °C: 62 °C after 111 s, 50 °C after 221 s, 30 °C after 520 s. */
const fallC = (seconds: number) => 12 + 66 * Math.exp(-seconds / 400);

/** A day from the chiller on, second by second; a person does what the sheet calls for as soon as it calls. */
function drivenFall(document: RecipeDocument, durationS: number) {
  const sheet = compileSheet(document, { altitudeM: 0, reachS: 12 });
  const log = new LogBuilder(sheet);
  const ids = sheet.steps.map(({ id }) => id);
  log.done(...ids.slice(0, ids.indexOf('chill') + 1));
  const heard: { key: string; stage: string; second: number }[] = [];
  const found = new Set<string>();
  let driver: RunDriver = startDriver(config);
  for (let second = 1; second <= durationS; second += 1) {
    log.wait(1);
    const nowMs = START_MS + second * 1000;
    const readings = [{ atMs: nowMs, tempC: Math.round(fallC(second) * 16) / 16 }];
    const driven = driveRun(driver, foldRun(log.entries), { runId: RUN_ID, station: 'hub', readings, nowMs });
    driver = driven.driver;
    for (const event of driven.events.filter(({ id }) => !found.has(id))) {
      found.add(event.id);
      log.add(event.type, event.payload, event);
      if (event.type !== 'alert.raised') continue;
      const { key, stage, actStepId } = event.payload;
      heard.push({ key, stage, second });
      if (stage === 'now' && actStepId) log.done(actStepId);
    }
  }
  return { heard, steps: foldRun(log.entries).steps };
}

const stagesOf = (heard: { key: string; stage: string }[], key: string) =>
  heard.filter((one) => one.key === key).map(({ stage }) => stage);
const secondOf = (heard: { key: string; stage: string; second: number }[], key: string) =>
  heard.find((one) => one.key === key && one.stage === 'now')?.second ?? Number.NaN;
const LADDER = ['coming-up', 'stand-by', 'now'];

describe('a blended recipe on its run', () => {
  it('calls for both charges of hops, each in time, and for what comes out', () => {
    const document = buildDocument({
      additions: [
        buildTea(),
        buildTea({ id: 'oolong', name: 'oolong', tea: 'oolong', out: { at: 'timer', durationS: 300 } }),
        buildHops(),
        buildHops({ id: 'saaz', name: 'Saaz', in: { at: 'falling', tempC: 50 } }),
      ],
    });
    const { heard, steps } = drivenFall(document, 600);
    for (const key of ['hops-in', 'hops-in-2', 'hops-out']) expect(stagesOf(heard, key)).toEqual(LADDER);
    for (const [key, crossingS] of [
      ['hops-in', 111],
      ['hops-in-2', 221],
      ['hops-out', 520],
    ] as const) {
      expect(crossingS - secondOf(heard, key)).toBeGreaterThan(4);
      expect(crossingS - secondOf(heard, key)).toBeLessThan(25);
    }
    expect(steps.find(({ status }) => status === 'current')?.step.id).toBe('transfer');
  });

  it('calls for the second charge while the first stands for its time', () => {
    const document = buildDocument({
      additions: [
        buildHops({ out: { at: 'timer', durationS: 240 } }),
        buildHops({ id: 'saaz', name: 'Saaz', in: { at: 'falling', tempC: 50 } }),
      ],
    });
    const { heard } = drivenFall(document, 420);
    expect(stagesOf(heard, 'hops-in-2')).toEqual(LADDER);
    expect(secondOf(heard, 'hops-in-2')).toBeLessThan(221);
    expect(stagesOf(heard, 'contact')).toEqual(LADDER);
  });
});
