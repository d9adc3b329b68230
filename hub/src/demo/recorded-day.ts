import { kettleRun, type KettleSetup } from '@steepfall/probe-sim/kettle';
import type { Reading } from '@steepfall/shared/readings';
import {
  currentStep,
  decide,
  driveRun,
  foldRun,
  liveView,
  startDriver,
  type DriverConfig,
  type RunCommand,
  type RunEvent,
  type RunEventOf,
  type RunState,
  type StepProgress,
  type StoredRunEvent,
} from '@steepfall/shared/runs';

/** One thing a person does at a step, so many seconds after the step asked for it, or after it became the current one. */
interface Doing {
  afterS: number;
  isWhileWaiting?: boolean;
  command: RunCommand;
}
type Script = Readonly<Record<string, readonly Doing[]>>;

const done = (stepId: string, afterS: number): Doing => ({
  afterS,
  command: { type: 'completeStep', stepId, tempC: null },
});
const note = (stepId: string, afterS: number, text: string): Doing => ({
  afterS,
  command: { type: 'addNote', stepId, text },
});
const tick = (stepId: string, afterS: number, taskId: string): Doing => ({
  afterS,
  isWhileWaiting: true,
  command: { type: 'tickTask', stepId, taskId },
});
const measured = (
  stepId: string,
  afterS: number,
  quantity: 'pH' | 'pressureKPa' | 'tasteScore',
  value: number,
): Doing => ({
  afterS,
  command: { type: 'recordMeasurement', stepId, quantity, value, tempC: null },
});

const HOUR_S = 3600;

/** A good first day: the acid needed a second look, one tap came too soon, the hops went in on the fall, and the drink was a little dry. */
const script: Script = {
  'check-kit': [done('check-kit', 260)],
  fill: [done('fill', 340)],
  'light-heat': [done('light-heat', 25)],
  salts: [done('salts', 150)],
  acid: [done('acid', 95)],
  ph: [
    measured('ph', 410, 'pH', 3.46),
    note('ph', 450, 'A little high. Half a gram more citric acid.'),
    measured('ph', 700, 'pH', 3.24),
  ],
  'coil-in': [done('coil-in', 35), done('coil-in', 240)],
  heat: [
    // Tapped before the coil was in: taken back at once.
    { afterS: 5, command: { type: 'goBack' } },
    tick('heat', 45, 'weigh-tea'),
    tick('heat', 160, 'lay-out'),
  ],
  'tea-in': [done('tea-in', 12)],
  steep: [tick('steep', 50, 'weigh-hops'), tick('steep', 105, 'hoses')],
  'tea-out': [done('tea-out', 9)],
  chill: [done('chill', 40)],
  'hops-in': [tick('hops-in', 25, 'tea-bag'), tick('hops-in', 60, 'sanitiser'), done('hops-in', 9)],
  'hops-out': [done('hops-out', 8)],
  transfer: [done('transfer', 25)],
  purge: [done('purge', 780)],
  clean: [done('clean', 1500)],
  gas: [done('gas', 5 * HOUR_S)],
  'look-again': [
    measured('look-again', 17 * HOUR_S, 'pressureKPa', 94),
    note('look-again', 17 * HOUR_S + 40, 'No hiss, no drip.'),
    done('look-again', 17 * HOUR_S + 60),
  ],
  taste: [
    measured('taste', 25 * HOUR_S, 'tasteScore', 7),
    note('taste', 25 * HOUR_S + 50, 'Bright, grassy, good hop smell. Lively and fine. A little dry at the end.'),
    done('taste', 25 * HOUR_S + 70),
  ],
  'next-time': [note('next-time', 240, 'Less leaf: 90 g in place of 110 g. Nothing else.'), done('next-time', 260)],
};

/** The probe comes out of the kettle a minute after the transfer. */
const PROBE_OUT_AFTER_MS = 60_000;
const ACKNOWLEDGED_AFTER_MS = 4_000;
/** Longer than any day of this script; a script that does not come to its end is a mistake. */
const LONGEST_MS = 10 * 24 * HOUR_S * 1000;

export interface DayPlan {
  started: RunEventOf<'run.started'>;
  kettle: KettleSetup;
  driver: DriverConfig;
  memberId: string;
  station: string;
  newId: () => string;
}

export interface RecordedDay {
  events: StoredRunEvent[];
  readings: Reading[];
}

/**
 * Plays a whole brew day: the simulated kettle gives the readings, the watch and its ladders find what there is to find, and a person
 * follows the sheet by the same rules as on a tablet. The same plan gives the same day.
 */
export function recordDay(plan: DayPlan): RecordedDay {
  const { started, memberId, station } = plan;
  const runId = started.runId;
  const startMs = started.atMs;
  const kettle = kettleRun(plan.kettle, startMs);
  const events: StoredRunEvent[] = [];
  const readings: Reading[] = [];
  const doneCount = new Map<string, number>();
  let driver = startDriver(plan.driver);
  let state: RunState = foldRun([]);
  let toldActs = new Set<string>();

  const append = (fresh: readonly RunEvent[]) => {
    if (fresh.length === 0) return;
    for (const event of fresh) {
      const seq = events.length + 1;
      events.push({ ...event, seq, receivedAtMs: event.atMs, sentBy: event.by });
    }
    state = foldRun(events);
    toldActs = tellKettle(state, toldActs, (act, atMs) => kettle.act(act, atMs));
  };
  const act = (command: RunCommand, nowMs: number) => {
    const { tempC } = liveView(driver, state, nowMs).estimate;
    const withTemp = 'tempC' in command ? { ...command, tempC: isProbeIn(state, nowMs) ? tempC : null } : command;
    const decision = decide(state, withTemp, { nowMs, by: memberId, station, newId: plan.newId });
    if (!decision.ok) throw new Error(`The script of the demo does not fit its sheet: ${decision.problem.detail}`);
    append(decision.events);
  };

  append([started]);
  act({ type: 'checkSound', isHeard: true }, startMs + 8_000);
  for (let nowMs = startMs; state.steps.some(({ status }) => status !== 'done');) {
    if (nowMs - startMs > LONGEST_MS) throw new Error('The script of the demo does not come to its end.');
    const due = isProbeIn(state, nowMs) ? kettle.readingsUntil(nowMs) : [];
    readings.push(...due);
    const driven = driveRun(driver, state, { runId, station: 'hub', readings: due, nowMs });
    driver = driven.driver;
    append(driven.events);

    const loud = state.alerts.find(
      ({ isStanding, stage, raisedAtMs }) =>
        isStanding && stage === 'now' && nowMs - raisedAtMs >= ACKNOWLEDGED_AFTER_MS,
    );
    if (loud) act({ type: 'acknowledgeAlert', key: loud.key, crossing: loud.crossing }, nowMs);

    const step = currentStep(state);
    const next = step && nextDoing(step, state, doneCount);
    if (step && next && next.atMs <= nowMs) {
      doneCount.set(step.step.id, (doneCount.get(step.step.id) ?? 0) + 1);
      act(next.command, nowMs);
      continue;
    }
    // Without the probe nothing happens between two acts.
    nowMs = isProbeIn(state, nowMs) || !next ? nowMs + 1_000 : next.atMs;
  }
  act({ type: 'endRun', outcome: 'finished' }, (events.at(-1)?.atMs ?? startMs) + 30_000);
  return { events, readings };
}

/** Steps that wait for a level are asked for by their alert, all others by being the current one. */
function nextDoing({ step, startedAtMs }: StepProgress, state: RunState, doneCount: ReadonlyMap<string, number>) {
  const doing = script[step.id]?.[doneCount.get(step.id) ?? 0];
  if (!doing) return null;
  const alert = state.alerts.find(
    ({ actStepId, stage }) => actStepId === step.id && (stage === 'now' || stage === 'missed'),
  );
  const isByLevel = step.start.by === 'temperature' && !doing.isWhileWaiting;
  const askedAtMs = isByLevel ? (alert?.raisedAtMs ?? null) : startedAtMs;
  return askedAtMs === null ? null : { command: doing.command, atMs: askedAtMs + doing.afterS * 1000 };
}

function isProbeIn({ steps }: RunState, nowMs: number): boolean {
  const transfer = steps.find(({ step }) => step.id === 'transfer');
  return !transfer?.doneAtMs || nowMs <= transfer.doneAtMs + PROBE_OUT_AFTER_MS;
}

/** Acts of steps that were done since; a step taken back and done again acts again, which changes nothing in a kettle. */
function tellKettle(
  state: RunState,
  told: ReadonlySet<string>,
  tell: (act: StepProgress['step']['acts'][number], atMs: number) => void,
): Set<string> {
  const known = new Set(told);
  for (const { step, doneEventId, doneAtMs } of state.steps) {
    if (doneEventId === null || doneAtMs === null || known.has(doneEventId)) continue;
    known.add(doneEventId);
    for (const act of step.acts) tell(act, doneAtMs);
  }
  return known;
}
