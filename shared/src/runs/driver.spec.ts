import { describe, expect, it } from 'vitest';
import { buildSheet, LogBuilder, RUN_ID, START_MS } from '../testing/run-builders.js';
import { armedIn, driveRun, liveView, startDriver, type RunDriver } from './driver.js';
import { runEventSchema, type RunEvent, type RunEventOf } from './events.js';
import { foldRun } from './fold.js';
import { standingAlerts } from './selectors.js';

const config = {
  watch: { lagS: 4, roomC: 21, coolantC: 12, samplePeriodS: 1, resolutionC: 0.0625 },
  hasProbe: true,
};

/** A run that is driven second by second; facts found by the watch are written to the log, as the hub does. */
class Drive {
  driver: RunDriver = startDriver(config);
  readonly found: RunEvent[] = [];
  nowMs = START_MS;

  constructor(readonly log: LogBuilder) {}

  get state() {
    return foldRun(this.log.entries);
  }

  /** One reading a second along the curve; null is silence. */
  along(durationS: number, curve: (seconds: number) => number | null): this {
    for (let second = 1; second <= durationS; second += 1) this.step(curve(second));
    return this;
  }

  step(tempC: number | null): void {
    this.nowMs += 1000;
    this.log.wait(1);
    const readings = tempC === null ? [] : [{ atMs: this.nowMs, tempC: Math.round(tempC * 16) / 16 }];
    const driven = driveRun(this.driver, this.state, { runId: RUN_ID, station: 'hub', readings, nowMs: this.nowMs });
    this.driver = driven.driver;
    for (const event of driven.events) {
      if (this.found.some(({ id }) => id === event.id)) continue;
      this.found.push(event);
      this.log.add(event.type, event.payload, event);
    }
  }

  stages(key: string): string[] {
    return this.found
      .filter(
        (event): event is RunEventOf<'alert.raised'> => event.type === 'alert.raised' && event.payload.key === key,
      )
      .map(({ payload }) => payload.stage);
  }
}

const toCatch = () => new LogBuilder().done('light-heat', 'heat', 'tea-in', 'steep', 'tea-out', 'chill');
const falling = (fromC: number) => (seconds: number) => 12 + (fromC - 12) * Math.exp(-seconds / 400);

describe(driveRun, () => {
  it('climbs the ladder for the hops once, in order, early enough to be in time', () => {
    const drive = new Drive(toCatch()).along(110, falling(80));
    // Coming up at the latest two minutes before; 80 °C falls to 62 °C in 123 s.
    expect(drive.stages('hops-in')).toEqual(['coming-up', 'stand-by', 'now']);
    const now = drive.found.at(-1) as RunEventOf<'alert.raised'>;
    const crossingMs = START_MS + 400 * Math.log((80 - 12) / (62 - 12)) * 1000;
    expect(now.payload).toMatchObject({ actStepId: 'hops-in', targetC: 62, direction: 'falling', rule: 'temperature' });
    expect(crossingMs - now.atMs).toBeGreaterThan(5_000);
    expect(crossingMs - now.atMs).toBeLessThan(20_000);
    for (const event of drive.found) expect(runEventSchema.safeParse(event).error).toBeUndefined();
  });

  it('says "missed" when nobody acts, and rests once somebody does', () => {
    const drive = new Drive(toCatch()).along(200, falling(80));
    expect(drive.stages('hops-in')).toEqual(['coming-up', 'stand-by', 'now', 'missed']);
    drive.log.done('hops-in');
    expect(standingAlerts(drive.state)).toEqual([]);
    drive.along(60, falling(55));
    expect(drive.stages('hops-in')).toHaveLength(4);
  });

  it('is done with the heating by itself, and calls for the tea', () => {
    const drive = new Drive(new LogBuilder().done('light-heat')).along(160, (seconds) => 70 + seconds * 0.04);
    const done = drive.found.find((event) => event.type === 'step.done');
    expect(done).toMatchObject({ by: null, payload: { stepId: 'heat', cause: 'temperature' } });
    // The probe shows 76 °C at 150 s, and is 4 s late.
    expect(done?.atMs).toBeGreaterThan(START_MS + 143_000);
    expect(done?.atMs).toBeLessThan(START_MS + 149_000);
    expect(drive.stages('heat').at(-1)).toBe('now');
    expect(standingAlerts(drive.state)[0]).toMatchObject({ key: 'heat', actStepId: 'tea-in' });
  });

  it('ends the steep on its deadline and calls for the tea to come out', () => {
    const drive = new Drive(new LogBuilder().done('light-heat', 'heat', 'tea-in')).along(182, () => 74);
    expect(drive.stages('steep')).toEqual(['coming-up', 'stand-by', 'now']);
    expect(drive.found.find((event) => event.type === 'step.done')).toMatchObject({
      atMs: START_MS + 180_000,
      payload: { stepId: 'steep', cause: 'timer' },
    });
    drive.along(20, () => 74);
    expect(drive.stages('steep')).toEqual(['coming-up', 'stand-by', 'now', 'missed']);
  });

  it('still hears of the hops when "chiller on" was never tapped', () => {
    const log = new LogBuilder().done('light-heat', 'heat', 'tea-in', 'steep', 'tea-out');
    expect(new Drive(log).along(110, falling(80)).stages('hops-in')).toEqual(['coming-up', 'stand-by', 'now']);
  });

  it('leaves a step alone once its automatic "done" was taken back', () => {
    const drive = new Drive(new LogBuilder().done('light-heat', 'heat', 'tea-in')).along(182, () => 74);
    const done = drive.found.find((event) => event.type === 'step.done');
    drive.log.undo(done?.id);
    drive.along(60, () => 74);
    expect(drive.found.filter((event) => event.type === 'step.done')).toHaveLength(1);
  });

  it('alerts anew under a new name when an addition is taken back after its level', () => {
    const drive = new Drive(toCatch()).along(115, falling(80));
    drive.log.done('hops-in');
    const done = drive.log.lastId;
    drive.along(10, (seconds) => falling(80)(115 + seconds));
    drive.log.undo(done);
    drive.along(5, (seconds) => falling(80)(125 + seconds));
    expect(drive.stages('hops-in~1')).toContain('now');
  });

  it('counts on from the log when it starts late: a second climb is not taken for the first', () => {
    const drive = new Drive(toCatch());
    const raised = (crossing: number) => ({
      ...{ key: 'hops-in', crossing, rule: 'temperature', stage: 'now', stepId: 'hops-in', actStepId: 'hops-in' },
      ...{ tempC: 63, targetC: 62, direction: 'falling', dueAtMs: null },
    });
    drive.log.add('alert.raised', raised(1) as RunEventOf<'alert.raised'>['payload'], { by: null });
    drive.log.add('alert.raised', raised(2) as RunEventOf<'alert.raised'>['payload'], { by: null });
    drive.along(110, falling(80));
    const found = drive.found.filter((event) => event.type === 'alert.raised');
    expect(found.map(({ payload }) => payload.crossing)).toEqual([2, 2, 2]);
  });

  it('makes a silent probe an alert while a level is waited for, and clears it when it is back', () => {
    const drive = new Drive(toCatch()).along(20, falling(80)).along(40, () => null);
    expect(standingAlerts(drive.state)[0]).toMatchObject({ key: 'signal', rule: 'signal', stage: 'now', crossing: 1 });
    drive.along(20, (seconds) => falling(80)(60 + seconds));
    expect(standingAlerts(drive.state).filter(({ key }) => key === 'signal')).toEqual([]);
    expect(drive.found.map(({ type }) => type)).toContain('alert.cleared');
  });

  it('waits for silence on the wall as well when the clock is fast', () => {
    const fast = { anchorWallMs: START_MS, anchorRunMs: START_MS, rate: 60 };
    const log = new LogBuilder(buildSheet(), { isRehearsal: true, clock: fast });
    log.done('light-heat', 'heat', 'tea-in', 'steep', 'tea-out', 'chill');
    const drive = new Drive(log).along(20, falling(80)).along(90, () => null);
    expect(drive.stages('signal')).toEqual([]);
    expect(drive.along(60, () => null).stages('signal')).toEqual(['now']);
  });

  it('is not misled by a probe or a tablet whose clock is ahead', () => {
    const drive = new Drive(toCatch()).along(20, falling(80));
    const ahead = { runId: RUN_ID, station: 'hub', nowMs: drive.nowMs };
    const reading = { atMs: drive.nowMs + 50_000, tempC: falling(80)(20) };
    drive.driver = driveRun(drive.driver, drive.state, { ...ahead, readings: [reading] }).driver;
    drive.log.add('event.undone', { eventId: drive.log.entries[6]?.id ?? '' });
    drive.log.add('step.done', { stepId: 'chill', cause: 'hand', tempC: null }, { atMs: drive.nowMs + 3_600_000 });
    drive.along(60, (seconds) => falling(80)(20 + seconds));
    const { estimate } = liveView(drive.driver, drive.state, drive.nowMs);
    expect(estimate.status).toBe('live');
    expect(Math.abs((estimate.tempC ?? 0) - falling(80)(80))).toBeLessThan(1);
  });

  it('takes a batch in any order', () => {
    const readings = Array.from({ length: 60 }, (_, index) => ({
      atMs: START_MS + (index + 1) * 1000,
      tempC: falling(80)(index + 1),
    }));
    const input = { runId: RUN_ID, station: 'hub', nowMs: START_MS + 60_000, readings: readings.toReversed() };
    const { driver } = driveRun(startDriver(config), foldRun(toCatch().entries), input);
    expect(liveView(driver, foldRun(toCatch().entries), input.nowMs).estimate.status).toBe('live');
  });

  it('takes a call back when the level is armed anew', () => {
    const drive = new Drive(toCatch()).along(60, falling(80));
    expect(drive.stages('hops-in')).toContain('coming-up');
    const turned = falling(80)(60);
    drive.along(240, (seconds) => Math.min(84, turned + seconds * 0.1));
    expect(drive.found.some((event) => event.type === 'alert.cleared' && event.payload.key === 'hops-in')).toBe(true);
    expect(standingAlerts(drive.state)).toEqual([]);
  });

  it('does not wait for a probe once the keg is filled', () => {
    const log = toCatch().done('hops-in', 'transfer');
    expect(new Drive(log).along(120, () => null).found).toEqual([]);
  });

  it('finds the same facts with the same ids on two devices', () => {
    const hub = new Drive(toCatch()).along(110, falling(80));
    const tablet = new Drive(toCatch()).along(110, falling(80));
    expect(tablet.found.map(({ id }) => id)).toEqual(hub.found.map(({ id }) => id));
    expect(new Set(hub.found.map(({ id }) => id)).size).toBe(hub.found.length);
  });

  it('is plain data: a driver that was stored and read again goes on alike', () => {
    const drive = new Drive(toCatch()).along(60, falling(80));
    drive.driver = JSON.parse(JSON.stringify(drive.driver)) as RunDriver;
    drive.along(50, (seconds) => falling(80)(60 + seconds));
    expect(drive.stages('hops-in')).toEqual(['coming-up', 'stand-by', 'now']);
  });
});

describe(armedIn, () => {
  it('arms a timer set by hand beside the level', () => {
    const log = toCatch().add('timer.started', { timerId: RUN_ID, label: 'rest', durationS: 60 });
    expect(armedIn(foldRun(log.entries)).map(({ key }) => key)).toEqual([`timer:${RUN_ID}`, 'hops-in']);
  });

  it('arms nothing after the last step', () => {
    expect(armedIn(foldRun(toCatch().done('hops-in', 'transfer').entries))).toEqual([]);
  });
});

describe(liveView, () => {
  it('shows the estimate, the level that is waited for and when it comes', () => {
    const drive = new Drive(toCatch()).along(60, falling(80));
    const view = liveView(drive.driver, drive.state, drive.nowMs);
    expect(view.target).toEqual({ stepId: 'hops-in', actStepId: 'hops-in', tempC: 62, direction: 'falling' });
    expect(view.estimate).toMatchObject({ status: 'live', mode: 'falling' });
    expect(view.forecast?.kind).toBe('forecast');
  });
});
