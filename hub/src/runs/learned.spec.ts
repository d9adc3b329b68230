import { defaultKettle, kettleRun } from '@steepfall/probe-sim/kettle';
import { foldRun, type RunEvent, type StoredRunEvent } from '@steepfall/shared/runs';
import { compileSheet } from '@steepfall/shared/sheets';
import { buildDocument } from '@steepfall/shared/testing';
import { wallClock } from '@steepfall/shared/timers';
import { learnRun, type FinishedRun, type WatchAct } from '@steepfall/shared/watch';
import { describe, expect, it } from 'vitest';
import { callsOf } from './learned-calls.js';

const DAY: [WatchAct, number][] = [
  ['heat-on', 60],
  ['lid-on', 60],
  ['coil-in', 2300],
  ['heat-off', 2600],
  ['tea-in', 2640],
  ['tea-out', 2900],
  ['lid-off', 3000],
  ['chiller-on', 3000],
  ['hops-in', 3120],
  ['chiller-off', 3500],
];

/** A brew day of the simulated kettle, told a lag of this share of the true one. */
function simulatedDay(seed: number, toldShare: number, acts: readonly [WatchAct, number][] = DAY) {
  const setup = defaultKettle({ seed });
  const kettle = kettleRun(setup, 0);
  for (const [act, atS] of acts) kettle.act(act, atS * 1000);
  const { tauS, deadTimeS, samplePeriodS, resolutionC } = setup.probe;
  const run: FinishedRun = {
    watch: { lagS: toldShare * (tauS + deadTimeS), roomC: 21, coolantC: 12, samplePeriodS, resolutionC },
    readings: kettle.readingsUntil(3_700_000),
    acts: acts.map(([act, atS]) => ({ act, atMs: atS * 1000 })),
    heating: { heatCapacityJPerK: 94_300, powerW: setup.heaterPowerW, lossWPerK: 3 },
  };
  return { run, trueLagS: tauS + deadTimeS, efficiency: setup.heaterEfficiency };
}

describe('what a simulated brew day teaches', () => {
  it('is a lag told a quarter off and the heater, each within what it is sure of', () => {
    const days = [1, 2, 3, 4].map((seed) => simulatedDay(seed, seed % 2 ? 0.75 : 1.25));
    let held = 0;
    for (const { run, trueLagS, efficiency } of days) {
      const { lagS, heaterEfficiency, chillingPerS } = learnRun(run);
      if (Math.abs(lagS.learned!.value - trueLagS) <= lagS.learned!.error) held += 1;
      expect(lagS.learned!.error / lagS.learned!.value).toBeLessThan(0.3);
      const heat = heaterEfficiency.learned!;
      expect(Math.abs(heat.value - efficiency)).toBeLessThanOrEqual(heat.error);
      expect(chillingPerS.learned!.value).toBeGreaterThan(1e-3);
    }
    expect(held).toBeGreaterThanOrEqual(3);
  });

  it('is too little to say when nothing was done that moves the probe', () => {
    const { run } = simulatedDay(1, 1, [['lid-on', 60]]);
    expect(learnRun(run)).toMatchObject({
      lagS: { learned: null, because: 'few-changes' },
      chillingPerS: { learned: null, because: 'too-short' },
      heaterEfficiency: { learned: null, because: 'too-short' },
    });
  });
});

describe('callsOf', () => {
  const runId = '01890000-0000-7000-8000-000000000001';
  const anna = '01890000-0000-7000-8000-0000000000a1';
  const sheet = compileSheet(buildDocument(), { altitudeM: 0, reachS: 10 });
  let serial = 0;
  const event = (type: string, atS: number, payload: object, by: string | null = anna): StoredRunEvent => {
    serial += 1;
    const id = `01890000-0000-7000-8000-${String(serial).padStart(12, '0')}`;
    const envelope = { id, runId, v: 1, atMs: atS * 1000, by, station: 's', seq: serial, receivedAtMs: 0, sentBy: by };
    return { ...envelope, type, payload } as unknown as StoredRunEvent;
  };
  const started = event('run.started', 0, {
    title: 'A day',
    batchId: null,
    batchNumber: null,
    revisionId: null,
    isRehearsal: false,
    sheet,
    clock: wallClock(0),
  } satisfies Extract<RunEvent, { type: 'run.started' }>['payload']);
  const raised = (atS: number, actStepId: string, stage: string, rule = 'temperature', key = actStepId) =>
    event(
      'alert.raised',
      atS,
      {
        key,
        crossing: 1,
        rule,
        stage,
        stepId: 'heat',
        actStepId,
        tempC: 80,
        targetC: 82,
        direction: 'rising',
        dueAtMs: null,
      },
      null,
    );
  const done = (atS: number, stepId: string, cause = 'hand') => event('step.done', atS, { stepId, cause, tempC: null });
  const of = (log: StoredRunEvent[]) => callsOf(log, foldRun(log)).map(({ waitedS, isMissed }) => [waitedS, isMissed]);

  it('counts from now to the act, an act that was taken back when it was done at last, and a miss as one', () => {
    const tooSoon = done(104, 'tea-in');
    const log = [
      started,
      raised(100, 'tea-in', 'now'),
      tooSoon,
      event('event.undone', 106, { eventId: tooSoon.id }),
      done(109, 'tea-in'),
      raised(300, 'hops-in', 'now'),
      raised(330, 'hops-in', 'missed'),
      done(400, 'hops-in'),
    ];
    expect(of(log)).toEqual([
      [9, false],
      [100, true],
    ]);
  });

  it('counts no deadline, nothing done by itself, and nothing done before its call', () => {
    expect(
      of([
        started,
        raised(100, 'tea-out', 'now', 'timer'),
        done(108, 'tea-out'),
        raised(120, 'tea-in', 'now'),
        done(118, 'tea-in'),
        raised(150, 'hops-in', 'now'),
        done(155, 'hops-in', 'temperature'),
      ]),
    ).toEqual([]);
  });
});
