import type { Reading } from '../readings/index.js';
import type { Step, VesselAct } from '../sheets/index.js';
import {
  estimateAt,
  forecastCrossing,
  startLadder,
  startTimerLadder,
  startWatch,
  stepLadder,
  stepTimerLadder,
  watchAct,
  watchReading,
  type CrossingForecast,
  type LadderAlert,
  type LadderState,
  type TimerLadderState,
  type WatchConfig,
  type WatchEstimate,
  type WatchState,
} from '../watch/index.js';
import { derivedEvent } from './derived-event.js';
import type { RunEvent } from './events.js';
import { faultEvents } from './faults.js';
import type { RunState, StepProgress } from './state.js';

/** Silence at the start counts from the first tick; the same 30 s that make a later silence an alert. */
const FIRST_READING_DUE_MS = 30_000;
/** On a fast clock a hiccup of the network is half a minute of run time: silence also has to last this long on the wall. */
const SILENT_WALL_MS = 2_000;
/** Readings have to come for this long before a silent probe counts as back. */
const BACK_FOR_MS = 10_000;
/** Older than this, nobody can say any more what the liquid was then. */
const SAME_INSTANT_MS = 5_000;

export interface DriverConfig {
  watch: WatchConfig;
  /** False when temperatures are typed by hand: silence is then no fault. */
  hasProbe: boolean;
}

/**
 * What the hub and every tablet keep while a run is open: the watch over its readings and the ladders of what is armed.
 * Plain data; give it back to `driveRun` with the next readings or tick.
 */
export interface RunDriver {
  config: DriverConfig;
  watch: WatchState;
  ladders: Record<string, LadderState>;
  timerLadders: Record<string, TimerLadderState>;
  /** Acts told to the watch so far, as `event id/act`. */
  toldActs: Record<string, { act: VesselAct; atMs: number }>;
  firstTickMs: number | null;
  /** Since when readings come without a break; null while they do not. */
  liveSinceMs: number | null;
}

/** A level or a deadline that an alert will come for. */
export type Armed =
  | {
      by: 'temperature';
      key: string;
      stepId: string;
      actStep: Step;
      tempC: number;
      direction: 'rising' | 'falling';
      /** Which time through the level the log has come to: a driver that starts late counts on from there. */
      crossing: number;
    }
  | { by: 'timer'; key: string; stepId: string | null; actStep: Step | null; endsAtMs: number };

export interface DriveInput {
  runId: string;
  station: string;
  /** New readings on the run clock, in the order in which they came. */
  readings: readonly Reading[];
  /** Run clock. */
  nowMs: number;
}

export interface LiveView {
  estimate: WatchEstimate;
  /** The level that is waited for; `null` when none is. */
  target: { stepId: string; actStepId: string; tempC: number; direction: 'rising' | 'falling' } | null;
  forecast: CrossingForecast | null;
}

export function startDriver(config: DriverConfig): RunDriver {
  const watch = startWatch(config.watch);
  return { config, watch, ladders: {}, timerLadders: {}, toldActs: {}, firstTickMs: null, liveSinceMs: null };
}

/**
 * One step of a run: readings and time in, facts out. Alerts and automatic "done" carry ids derived from what they say,
 * so that the hub and any number of tablets that find the same thing store it once.
 */
export function driveRun(
  driver: RunDriver,
  state: RunState,
  input: DriveInput,
): { driver: RunDriver; events: RunEvent[] } {
  if (state.status !== 'running') return { driver, events: [] };
  let next = tellActs({ ...driver, firstTickMs: driver.firstTickMs ?? input.nowMs }, state, input.nowMs);
  const armed = armedIn(state);
  const events: RunEvent[] = [];

  const climb = (atMs: number) => {
    for (const item of armed) {
      const climbed = climbLadder(next, item, atMs);
      events.push(...calledOff(state, input, item, next, climbed.driver));
      next = climbed.driver;
      events.push(...climbed.raised.map((alert) => raisedEvent(input, item, alert)));
    }
  };
  for (const reading of inTimeOrder(input)) {
    next = { ...next, watch: watchReading(next.watch, reading) };
    climb(reading.atMs);
  }
  climb(input.nowMs);
  const isLive = estimateAt(next.watch, input.nowMs).status === 'live';
  next = { ...next, liveSinceMs: isLive ? (next.liveSinceMs ?? input.nowMs) : null };

  events.push(...automaticDone(next, state, input), ...signalEvents(next, state, armed, input));
  return { driver: next, events };
}

/** A probe whose clock is ahead still tells of now: stamped later, it would make every reading after it look late. */
function inTimeOrder({ readings, nowMs }: DriveInput): Reading[] {
  return readings.map(({ atMs, tempC }) => ({ atMs: Math.min(atMs, nowMs), tempC })).sort((a, b) => a.atMs - b.atMs);
}

/** What a screen shows of the watch at this run time. */
export function liveView(driver: RunDriver, state: RunState, nowMs: number): LiveView {
  const estimate = estimateAt(driver.watch, nowMs);
  const level = armedIn(state).find((item) => item.by === 'temperature');
  if (!level) return { estimate, target: null, forecast: null };
  const { stepId, actStep, tempC, direction } = level;
  return {
    estimate,
    target: { stepId, actStepId: actStep.id, tempC, direction },
    forecast: forecastCrossing(driver.watch, { tempC, direction }, nowMs),
  };
}

const reverseOf: Partial<Record<VesselAct, VesselAct>> = {
  'heat-on': 'heat-off',
  'heat-off': 'heat-on',
  'lid-on': 'lid-off',
  'lid-off': 'lid-on',
  'chiller-on': 'chiller-off',
  'chiller-off': 'chiller-on',
};

/** What was done to the vessel, as the done steps say; a step taken back takes its act back where that is possible. */
function tellActs(driver: RunDriver, state: RunState, nowMs: number): RunDriver {
  const acts = new Map<string, { act: VesselAct; atMs: number }>();
  for (const { step, doneEventId, doneAtMs } of state.steps) {
    if (doneEventId === null || doneAtMs === null) continue;
    // A tablet whose clock is ahead must not move the watch into the future.
    for (const act of step.acts) acts.set(`${doneEventId}/${act}`, { act, atMs: Math.min(doneAtMs, nowMs) });
  }
  const fresh = [...acts].filter(([key]) => !(key in driver.toldActs)).sort(([, a], [, b]) => a.atMs - b.atMs);
  const gone = Object.entries(driver.toldActs).filter(([key]) => !acts.has(key));
  if (fresh.length === 0 && gone.length === 0) return driver;

  let { watch } = driver;
  for (const [, { act, atMs }] of gone) {
    const reverse = reverseOf[act];
    if (reverse) watch = watchAct(watch, { act: reverse, atMs });
  }
  for (const [, act] of fresh) watch = watchAct(watch, act);
  return { ...driver, watch, toldActs: Object.fromEntries(acts) };
}

/**
 * What alerts are due for. Steps that only wait for a hand are looked through: somebody who forgot to tap "chiller on"
 * still hears of the hops. So is a timer that runs while the chiller does.
 */
export function armedIn(state: RunState): Armed[] {
  const armed: Armed[] = state.timers
    .filter(({ stepId }) => stepId === null)
    .map(({ id, endsAtMs }) => ({ by: 'timer', key: `timer:${id}`, stepId: null, actStep: null, endsAtMs }));
  const currentIndex = state.steps.findIndex(({ status }) => status === 'current');
  if (currentIndex < 0) return armed;

  // The step before waited for a level or a deadline and got it: what it called for is still to be done.
  const before = state.steps[currentIndex - 1];
  if (before && before.status === 'done' && before.cause !== 'hand')
    armed.push(...armedBy(state, before, state.steps[currentIndex]));

  for (let index = currentIndex; index < state.steps.length; index += 1) {
    const progress = state.steps[index];
    if (!progress || progress.status === 'done') continue;
    const found = armedBy(state, progress, state.steps[index + 1]);
    armed.push(...found);
    // The liquid does not wait for hops that stand for their time: the next level is armed beside their timer.
    const isTimer = found.some(({ by }) => by === 'timer');
    if (isTimer && isChilling(state)) continue;
    if (found.length > 0) return armed;
    if (progress.step.done.by !== 'hand' && progress.step.done.by !== 'measurement') break;
  }
  return armed;
}

function isChilling({ steps }: RunState): boolean {
  const acts = steps.filter(({ status }) => status === 'done').flatMap(({ step }) => step.acts);
  return acts.findLast((act) => act === 'chiller-on' || act === 'chiller-off') === 'chiller-on';
}

function armedBy(state: RunState, progress: StepProgress, following: StepProgress | undefined): Armed[] {
  const { step } = progress;
  const crossingOf = (key: string) =>
    Math.max(1, ...state.alerts.filter((alert) => alert.key === key).map(({ crossing }) => crossing));
  if (step.start.by === 'temperature' && progress.status !== 'done') {
    const { tempC, direction } = step.start;
    const key = keyOf(progress, progress);
    const crossing = crossingOf(key);
    return [{ by: 'temperature', key, stepId: step.id, actStep: step, tempC, direction, crossing }];
  }
  const act = following ?? progress;
  const shared = { key: keyOf(progress, act), stepId: step.id, actStep: act.step };
  if (step.done.by === 'temperature') {
    const { tempC, direction } = step.done;
    return [{ by: 'temperature', ...shared, tempC, direction, crossing: crossingOf(shared.key) }];
  }
  if (step.done.by === 'timer' && progress.startedAtMs !== null) {
    return [{ by: 'timer', ...shared, endsAtMs: progress.startedAtMs + step.done.durationS * 1000 }];
  }
  return [];
}

/** A step that was taken back is armed anew, under a name of its own. */
function keyOf(watched: StepProgress, act: StepProgress): string {
  const undoneCount = watched.undoneCount + (act === watched ? 0 : act.undoneCount);
  return undoneCount === 0 ? watched.step.id : `${watched.step.id}~${undoneCount}`;
}

function climbLadder(driver: RunDriver, item: Armed, atMs: number): { driver: RunDriver; raised: LadderAlert[] } {
  const { key } = item;
  const reachS = item.actStep?.reachS ?? 0;
  if (item.by === 'timer') {
    const ladder = driver.timerLadders[key] ?? startTimerLadder({ key, endsAtMs: item.endsAtMs, reachS });
    const climbed = stepTimerLadder(ladder, atMs);
    return {
      driver: { ...driver, timerLadders: { ...driver.timerLadders, [key]: climbed.ladder } },
      raised: climbed.raised,
    };
  }
  const { tempC, direction, crossing } = item;
  const ladder = driver.ladders[key] ?? { ...startLadder({ key, tempC, direction, reachS }), crossing };
  const climbed = stepLadder(ladder, driver.watch, atMs);
  return { driver: { ...driver, ladders: { ...driver.ladders, [key]: climbed.ladder } }, raised: climbed.raised };
}

/** A ladder that was armed anew takes its earlier call back: the heat was turned off, or the liquid came back. */
function calledOff(
  state: RunState,
  input: DriveInput,
  { key }: Armed,
  before: RunDriver,
  after: RunDriver,
): RunEvent[] {
  const crossing = before.ladders[key]?.crossing;
  if (crossing === undefined || after.ladders[key]?.crossing === crossing) return [];
  const alert = state.alerts.find((one) => one.key === key && one.crossing === crossing);
  if (!alert || alert.clearedAtMs !== null) return [];
  return [derivedEvent(input, 'alert.cleared', `${key}/${crossing}`, input.nowMs, { key, crossing })];
}

function raisedEvent(input: DriveInput, item: Armed, alert: LadderAlert): RunEvent {
  const { key, crossing, stage, tempC } = alert;
  const dueAtMs = item.by === 'timer' ? item.endsAtMs : alert.crossingAtMs;
  return derivedEvent(input, 'alert.raised', `${key}/${crossing}/${stage}`, alert.atMs, {
    key,
    crossing,
    rule: item.by,
    stage,
    stepId: item.stepId,
    actStepId: item.actStep?.id ?? null,
    tempC,
    targetC: item.by === 'temperature' ? item.tempC : null,
    direction: item.by === 'temperature' ? item.direction : null,
    dueAtMs: dueAtMs === null ? null : Math.round(dueAtMs),
  });
}

/** The current step where no hand is needed: level reached, or time over. */
function automaticDone(driver: RunDriver, state: RunState, input: DriveInput): RunEvent[] {
  const current = state.steps.find(({ status }) => status === 'current');
  if (!current || current.isHandOnly || current.startedAtMs === null) return [];
  const { id, done } = current.step;
  const name = `${id}/${current.undoneCount}`;
  const estimate = estimateAt(driver.watch, input.nowMs);
  const tempAt = (atMs: number) =>
    estimate.status === 'live' && input.nowMs - atMs <= SAME_INSTANT_MS ? estimate.tempC : null;
  if (done.by === 'timer') {
    const endsAtMs = current.startedAtMs + done.durationS * 1000;
    if (input.nowMs < endsAtMs) return [];
    return [derivedEvent(input, 'step.done', name, endsAtMs, { stepId: id, cause: 'timer', tempC: tempAt(endsAtMs) })];
  }
  if (done.by === 'temperature' && estimate.status === 'live') {
    const forecast = forecastCrossing(driver.watch, done, input.nowMs);
    if (forecast.kind !== 'crossed') return [];
    const atMs = Math.min(Math.max(forecast.atMs, current.startedAtMs), input.nowMs);
    return [derivedEvent(input, 'step.done', name, atMs, { stepId: id, cause: 'temperature', tempC: tempAt(atMs) })];
  }
  return [];
}

/** Silence is the fault that matters most while a level is waited for. */
function signalEvents(driver: RunDriver, state: RunState, armed: readonly Armed[], input: DriveInput): RunEvent[] {
  if (!driver.config.hasProbe) return [];
  const { status, lastGoodAtMs } = estimateAt(driver.watch, input.nowMs);
  const silentMs = input.nowMs - (lastGoodAtMs ?? driver.firstTickMs ?? input.nowMs);
  const level = armed.find((item) => item.by === 'temperature');
  const isSilent =
    status === 'stale' || status === 'lost' || (status === 'starting' && silentMs >= FIRST_READING_DUE_MS);
  const sight = { rule: 'signal', key: 'signal', stepId: level?.stepId ?? null } as const;
  // Nobody waits for a reading any more: it is over at once.
  if (!level) return faultEvents(state, { ...sight, isTrue: false, heldMs: Infinity, ...signalDelays(state) }, input);
  const isBack = driver.liveSinceMs !== null;
  if (!isSilent && !isBack) return [];
  const heldMs = isBack ? input.nowMs - (driver.liveSinceMs ?? input.nowMs) : silentMs;
  return faultEvents(state, { ...sight, isTrue: !isBack, heldMs, ...signalDelays(state) }, input);
}

function signalDelays({ clock }: RunState): { onDelayMs: number; offDelayMs: number } {
  return { onDelayMs: SILENT_WALL_MS * (clock?.rate ?? 1), offDelayMs: BACK_FOR_MS };
}
