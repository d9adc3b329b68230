import { formatDuration, formatTemp } from '../units/index.js';
import type { Step, StepAmount } from '../sheets/index.js';
import { alertPriority, isFault, isShelved } from './alert-priority.js';
import type { LogEntry, RunEvent, RunEventOf } from './events.js';
import { isUndoable, stageRank } from './fold.js';
import { HOLD_TIMER } from './missed-choices.js';
import type { Alert, MissedChoiceMade, RunState, StepProgress } from './state.js';

/** The one thing to do now; `null` before the start and after the last step. */
export function currentStep(state: RunState): StepProgress | null {
  return state.steps.find(({ status }) => status === 'current') ?? null;
}

/** Steps after the current one that are not done, in order. */
export function upcomingSteps(state: RunState, count: number): StepProgress[] {
  return state.steps.filter(({ status }) => status === 'ahead').slice(0, count);
}

/** Place of the current step, counted from 1, for "8 of 14". */
export function stepPosition(state: RunState): { number: number; count: number } {
  const index = state.steps.findIndex(({ status }) => status === 'current');
  return { number: index < 0 ? state.steps.length : index + 1, count: state.steps.length };
}

/** Alerts that still ask for a person, the most urgent first. */
export function standingAlerts(state: RunState): Alert[] {
  return state.alerts
    .filter(({ isStanding }) => isStanding)
    .sort((a, b) => stageRank(b.stage) - stageRank(a.stage) || a.raisedAtMs - b.raisedAtMs);
}

/** What rings for each stage of a prompt, and for each rank of a fault: the higher one first. */
const FAULT_URGENCY = { prompt: 0, medium: 0.8, low: -1 } as const;

function urgency(alert: Alert): number {
  return isFault(alert) ? FAULT_URGENCY[alertPriority(alert)] : stageRank(alert.stage);
}

/** Who is meant: a lost hub and a low battery are for the tablet that has them, a silent tablet is for all others. */
export function concerns({ rule, key }: Pick<Alert, 'rule' | 'key'>, station: string): boolean {
  const isOwn = key.slice(key.indexOf(':') + 1) === station;
  if (rule === 'hub' || rule === 'battery') return isOwn;
  return rule === 'station' ? !isOwn : true;
}

/**
 * What should ring at this moment of the run, the most urgent first: what the sheet calls for within the next moment, then faults, then what
 * is on its way. What was put aside is silent until its end.
 *
 * @param station leaves out what is another tablet's affair; without it, all.
 */
export function callingAlerts(state: RunState, nowMs: number, station?: string): Alert[] {
  return standingAlerts(state)
    .filter((alert) => !isShelved(alert, nowMs) && (station === undefined || concerns(alert, station)))
    .sort((a, b) => urgency(b) - urgency(a) || a.raisedAtMs - b.raisedAtMs);
}

/** Faults that are still true, in the order in which they came: those that call, those that were heard, those that were put aside. */
export function openFaults(state: RunState, station?: string): Alert[] {
  if (state.status !== 'running') return [];
  const isSecondCall = ({ key, crossing }: Alert) =>
    state.alerts.some((other) => other.key === key && other.crossing > crossing);
  return state.alerts
    .filter((alert) => isFault(alert) && alert.clearedAtMs === null && !isSecondCall(alert))
    .filter((alert) => station === undefined || concerns(alert, station))
    .sort((a, b) => a.raisedAtMs - b.raisedAtMs);
}

/** What comes within this of the first one is likely to have one cause with it. */
const BURST_MS = 30_000;

export interface Burst {
  /** The first out: it stays on top, and the rest folds under it. */
  first: Alert;
  rest: Alert[];
}

/** Alerts by burst, the oldest burst first. */
export function burstsOf(alerts: readonly Alert[]): Burst[] {
  const bursts: Burst[] = [];
  for (const alert of [...alerts].sort((a, b) => a.raisedAtMs - b.raisedAtMs)) {
    const burst = bursts.at(-1);
    if (burst && alert.raisedAtMs - burst.first.raisedAtMs <= BURST_MS) burst.rest.push(alert);
    else bursts.push({ first: alert, rest: [] });
  }
  return bursts;
}

/** A missed catch on the fall whose step is still open, newest call last: what went in too late can be made up for. */
export function missedCatch(state: RunState): { alert: Alert; progress: StepProgress } | null {
  if (state.status !== 'running') return null;
  const missed = state.alerts.flatMap((alert) => {
    const isOnTheFall = alert.rule === 'temperature' && alert.direction === 'falling' && alert.stage === 'missed';
    const progress = isOnTheFall ? state.steps.find(({ step }) => step.id === alert.actStepId) : undefined;
    const isOpen = progress && progress.status !== 'done' && alert.clearedAtMs === null;
    return isOpen && progress.step.amounts.length > 0 ? [{ alert, progress }] : [];
  });
  return missed.at(-1) ?? null;
}

/** What was chosen about a missed catch, as long as "take it back" is the next thing to take back. */
export function freshChoice(state: RunState): MissedChoiceMade | null {
  const choice = state.choices.at(-1);
  if (!choice || state.status !== 'running') return null;
  if (choice.choice !== 'reheat') return state.doneOrder.at(-1) === choice.stepId ? choice : null;
  const isOpen = state.steps.some(({ step, status }) => step.id === choice.stepId && status !== 'done');
  const callsAgain = state.alerts.some(
    ({ key, crossing, stage }) => key === choice.key && crossing > choice.crossing && stage !== 'coming-up',
  );
  return isOpen && !callsAgain ? choice : null;
}

/** The newest act of a person that can be taken back and still counts; `null` when there is none. */
export function lastUndoable(entries: readonly LogEntry[], state: RunState): LogEntry | null {
  const undone = new Set(state.undoneEventIds);
  return (
    entries.findLast(
      ({ id, type, by }) => by !== null && type !== 'event.undone' && isUndoable(type) && !undone.has(id),
    ) ?? null
  );
}

export interface AlertWords {
  /** What to do: "Hops in". */
  verb: string;
  amounts: StepAmount[];
  /** "62.0 °C", in the reader's unit; `null` when the alert is not about a level. */
  number: string | null;
  /** What is wrong, and what it means; `null` for what the sheet calls for, whose number says it. */
  why: string | null;
  /** What a screen reader says, in one breath. */
  sentence: string;
}

const stageWords = { 'coming-up': 'Coming up', 'stand-by': 'Stand by', now: 'Now', missed: 'Late' } as const;

/** Of what helps to watch, not of the brew. */
const faultWords: Partial<Record<Alert['rule'], { verb: string; why: string }>> = {
  signal: { verb: 'Check the probe', why: 'No reading comes in. Watch a thermometer by hand.' },
  hub: { verb: 'Watch by hand', why: 'The hub is away, so no reading comes in. Steps and timers go on here.' },
  battery: { verb: 'Plug the tablet in', why: 'Its battery is low, and a dark tablet calls nobody.' },
  station: {
    verb: 'Look at the other tablet',
    why: 'It has been silent for a minute. What it rang for, nobody may hear.',
  },
};

/** The words of an alert: verb, thing, number. */
export function alertWords(state: RunState, alert: Alert, unit: 'C' | 'F' = 'C'): AlertWords {
  const fault = faultWords[alert.rule];
  if (fault)
    return { verb: fault.verb, amounts: [], number: null, why: fault.why, sentence: `${fault.verb}. ${fault.why}` };
  const act = state.steps.find(({ step }) => step.id === alert.actStepId)?.step;
  const timer = state.timers.find(({ id }) => alert.key === `timer:${id}`);
  const verb = act?.title ?? (timer ? timerVerb(timer.label) : 'Look at the sheet');
  const number = alert.targetC === null ? null : formatTemp(alert.targetC, { unit });
  const parts = [stageWords[alert.stage], verb, number].filter((part) => part !== null);
  return { verb, amounts: act?.amounts ?? [], number, why: null, sentence: `${parts.join('. ')}.` };
}

function timerVerb(label: string): string {
  return label === HOLD_TIMER ? 'Chiller on again' : `See to: ${label}`;
}

const quantityWords = {
  pH: (value: number) => `pH ${value}`,
  tempC: (value: number, unit: 'C' | 'F') => formatTemp(value, { unit }),
  volumeL: (value: number) => `${value} L`,
  massG: (value: number) => `${value} g`,
  pressureKPa: (value: number) => `${value} kPa`,
  tasteScore: (value: number) => `taste ${value} of 9`,
} as const;

function titleOf(state: RunState, stepId: string | null): string {
  return state.steps.find(({ step }) => step.id === stepId)?.step.title ?? 'a step';
}

function at(tempC: number | null, unit: 'C' | 'F'): string {
  return tempC === null ? '' : ` at ${formatTemp(tempC, { unit })}`;
}

/** What was chosen, with its number. */
function choiceWords({ choice, holdS, extraG, reheatS }: RunEventOf<'choice.made'>['payload']): string {
  switch (choice) {
    case 'hold':
      return `add now and hold for ${formatDuration(holdS ?? 0)}`;
    case 'more':
      return `add ${Math.round(extraG ?? 0)} g more`;
    case 'reheat':
      return `reheat, about ${formatDuration(reheatS ?? 0)}`;
    case 'accept':
      return 'add now and accept';
  }
}

const overWords: Partial<Record<Alert['rule'], string>> = {
  signal: 'Probe alert over',
  hub: 'The hub is back',
  battery: 'The battery is fed again',
  station: 'The other tablet is back',
};

function clearedWords({ key, crossing }: RunEventOf<'alert.cleared'>['payload'], state: RunState): string {
  const alert = state.alerts.find((one) => one.key === key && one.crossing === crossing);
  return (alert && overWords[alert.rule]) ?? 'Call taken back';
}

/** One line of words for the log. Who and when stand beside it. */
export function describeEvent(entry: LogEntry, state: RunState, unit: 'C' | 'F' = 'C'): string {
  const event = entry as RunEvent;
  switch (event.type) {
    case 'run.started':
      return event.payload.isRehearsal ? 'Rehearsal started' : 'Run started';
    case 'sound.checked':
      return event.payload.isHeard ? 'Sound checked: heard' : 'Sound checked: not heard';
    case 'step.done': {
      const why = {
        hand: 'done',
        temperature: 'temperature reached',
        timer: 'time is up',
        measurement: 'measured in range',
      }[event.payload.cause];
      return `${titleOf(state, event.payload.stepId)}: ${why}${at(event.payload.tempC, unit)}`;
    }
    case 'event.undone':
      return 'Taken back';
    case 'task.ticked': {
      const step: Step | undefined = state.steps.find((progress) => progress.step.id === event.payload.stepId)?.step;
      const task = step?.meanwhile.find(({ id }) => id === event.payload.taskId);
      return `Meanwhile: ${task?.text ?? 'a task'}`;
    }
    case 'note.added':
      return `Note: ${event.payload.text}`;
    case 'measurement.recorded':
      return `Measured ${quantityWords[event.payload.quantity](event.payload.value, unit)}`;
    case 'timer.started':
      return `Timer set: ${event.payload.label}`;
    case 'timer.stopped':
      return 'Timer stopped';
    case 'clock.changed':
      return `Rehearsal clock at ${event.payload.clock.rate}×`;
    case 'alert.raised': {
      const alert = state.alerts.find(
        ({ key, crossing }) => key === event.payload.key && crossing === event.payload.crossing,
      );
      const words = alert ? alertWords(state, alert, unit).verb : titleOf(state, event.payload.actStepId);
      if (isFault(event.payload)) return `Fault: ${words}`;
      return `${stageWords[event.payload.stage]}: ${words}${at(event.payload.tempC, unit)}`;
    }
    case 'alert.acknowledged':
      return 'Alert acknowledged';
    case 'alert.cleared':
      return clearedWords(event.payload, state);
    case 'alert.shelved':
      return `Alert put aside: ${event.payload.reason}`;
    case 'choice.made':
      return `Missed ${titleOf(state, event.payload.stepId)}: ${choiceWords(event.payload)}`;
    case 'run.ended':
      return event.payload.outcome === 'finished'
        ? 'Run finished'
        : `Run given up${event.payload.reason ? `: ${event.payload.reason}` : ''}`;
    default:
      return 'Something a newer version wrote';
  }
}
