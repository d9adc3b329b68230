import { runEventTypes, type AlertStage, type LogEntry, type RunEvent, type RunEventOf } from './events.js';
import type { Alert, MissedChoiceMade, RunState, StepProgress } from './state.js';

const stages: readonly AlertStage[] = ['coming-up', 'stand-by', 'now', 'missed'];

/** How urgent a stage is: higher is more. */
export function stageRank(stage: AlertStage): number {
  return stages.indexOf(stage);
}

/** What "undo" can take back. The start of a run and what the watch found out are not a person's act. */
const undoable: readonly string[] = [
  'step.done',
  'event.undone',
  'task.ticked',
  'note.added',
  'measurement.recorded',
  'timer.started',
  'timer.stopped',
  'run.ended',
  'choice.made',
  'alert.shelved',
] satisfies RunEvent['type'][];

export function isUndoable(type: string): boolean {
  return undoable.includes(type);
}

function isKnown(entry: LogEntry): entry is RunEvent & { seq?: number } {
  return (runEventTypes as string[]).includes(entry.type) && entry.v === 1;
}

/** Confirmed events in the hub's order, then pending ones by their own time: the one order that every device agrees on. */
export function inLogOrder(entries: readonly LogEntry[]): LogEntry[] {
  const byId = new Map<string, LogEntry>();
  for (const entry of entries) {
    const known = byId.get(entry.id);
    if (!known || (known.seq === undefined && entry.seq !== undefined)) byId.set(entry.id, entry);
  }
  return [...byId.values()].sort((a, b) => {
    if (a.seq !== undefined && b.seq !== undefined) return a.seq - b.seq;
    if (a.seq !== undefined) return -1;
    if (b.seq !== undefined) return 1;
    return a.atMs - b.atMs || (a.id < b.id ? -1 : 1);
  });
}

/** Later undos decide first, so that undoing an undo brings the fact back. */
function undoneIds(ordered: readonly LogEntry[]): Set<string> {
  const typeOf = new Map(ordered.map((entry) => [entry.id, entry.type]));
  const undone = new Set<string>();
  for (const entry of ordered.toReversed()) {
    if (!isKnown(entry) || entry.type !== 'event.undone' || undone.has(entry.id)) continue;
    const target = entry.payload.eventId;
    if (isUndoable(typeOf.get(target) ?? '')) undone.add(target);
  }
  return undone;
}

function emptyState(): RunState {
  return {
    runId: null,
    startEventId: null,
    endEventId: null,
    status: 'not-started',
    title: '',
    batchId: null,
    batchNumber: null,
    revisionId: null,
    isRehearsal: false,
    sheet: null,
    document: null,
    kit: null,
    clock: null,
    startedAtMs: null,
    endedAtMs: null,
    outcome: null,
    steps: [],
    doneOrder: [],
    timers: [],
    measurements: [],
    notes: [],
    alerts: [],
    choices: [],
    conflicts: [],
    soundCheck: null,
    undoneEventIds: [],
    unknownCount: 0,
    lastSeq: 0,
  };
}

/**
 * The state of a run from its log. Total and pure: any order of arrival and any duplication give the same state, unknown
 * events are counted, and no recorded fact is ever rejected. Facts that contradict each other are listed in `conflicts`.
 */
export function foldRun(entries: readonly LogEntry[]): RunState {
  const ordered = inLogOrder(entries);
  const undone = undoneIds(ordered);
  const state = emptyState();
  state.undoneEventIds = [...undone];
  // The sheet is needed before any other fact, whatever came first.
  const start = ordered.find((entry) => isKnown(entry) && entry.type === 'run.started');
  if (start) applyStart(state, start as RunEventOf<'run.started'>);

  for (const entry of ordered) {
    state.lastSeq = Math.max(state.lastSeq, entry.seq ?? 0);
    if (!isKnown(entry)) state.unknownCount += 1;
    else if (undone.has(entry.id)) noteUndone(state, entry);
    else if (entry !== start) apply(state, entry);
  }
  markStanding(state);
  return state;
}

function applyStart(state: RunState, event: RunEventOf<'run.started'>): void {
  const { sheet, ...facts } = event.payload;
  Object.assign(state, facts, {
    sheet,
    runId: event.runId,
    startEventId: event.id,
    status: 'running',
    startedAtMs: event.atMs,
  });
  state.steps = sheet.steps.map((step) => ({
    step,
    status: 'ahead',
    startedAtMs: null,
    doneAtMs: null,
    doneBy: null,
    cause: null,
    tempC: null,
    doneEventId: null,
    repeatEventIds: [],
    isHandOnly: false,
    undoneCount: 0,
    tickedTaskIds: [],
  }));
  moveOn(state, event.atMs);
}

function stepOf(state: RunState, stepId: string): StepProgress | undefined {
  return state.steps.find((progress) => progress.step.id === stepId);
}

/** The first step that is not done becomes the current one; its timer starts then. */
function moveOn(state: RunState, atMs: number): void {
  state.timers = state.timers.filter((timer) => timer.stepId === null);
  const current = state.steps.find((progress) => progress.status !== 'done');
  for (const progress of state.steps) if (progress.status === 'current') progress.status = 'ahead';
  if (!current) return;
  current.status = 'current';
  current.startedAtMs ??= atMs;
  const { done, id, title } = current.step;
  if (done.by === 'timer') {
    const startedAtMs = current.startedAtMs;
    state.timers.unshift({ id, label: title, stepId: id, startedAtMs, endsAtMs: startedAtMs + done.durationS * 1000 });
  }
}

function noteUndone(state: RunState, event: RunEvent): void {
  if (event.type !== 'step.done') return;
  const progress = stepOf(state, event.payload.stepId);
  if (!progress) return;
  progress.undoneCount += 1;
  if (event.payload.cause !== 'hand') progress.isHandOnly = true;
}

function apply(state: RunState, event: RunEvent): void {
  switch (event.type) {
    case 'run.started':
      state.conflicts.push({
        kind: 'started-twice',
        stepId: null,
        eventIds: [state.startEventId ?? event.id, event.id],
      });
      return;
    case 'step.done':
      applyStepDone(state, event);
      return;
    case 'task.ticked': {
      const progress = stepOf(state, event.payload.stepId);
      if (progress && !progress.tickedTaskIds.includes(event.payload.taskId)) {
        progress.tickedTaskIds.push(event.payload.taskId);
      }
      return;
    }
    case 'note.added':
      state.notes.push({ eventId: event.id, atMs: event.atMs, by: event.by, ...event.payload });
      return;
    case 'measurement.recorded':
      state.measurements.push({ eventId: event.id, atMs: event.atMs, by: event.by, ...event.payload });
      return;
    case 'timer.started': {
      const { timerId, label, durationS } = event.payload;
      if (state.timers.some((timer) => timer.id === timerId)) return;
      const endsAtMs = event.atMs + durationS * 1000;
      state.timers.push({ id: timerId, label, stepId: null, startedAtMs: event.atMs, endsAtMs });
      return;
    }
    case 'timer.stopped':
      state.timers = state.timers.filter((timer) => timer.id !== event.payload.timerId);
      return;
    case 'sound.checked':
      state.soundCheck = { atMs: event.atMs, isHeard: event.payload.isHeard, station: event.station };
      return;
    case 'clock.changed':
      state.clock = event.payload.clock;
      return;
    case 'alert.raised':
      applyAlert(state, event);
      return;
    case 'alert.acknowledged': {
      const alert = alertOf(state, event.payload);
      // An acknowledgement of a lower stage does not silence what came after it.
      if (!alert || stageRank(event.payload.stage) < stageRank(alert.stage) || alert.acknowledgedAtMs !== null) return;
      alert.acknowledgedAtMs = event.atMs;
      alert.acknowledgedBy = event.by;
      return;
    }
    case 'alert.cleared': {
      const alert = alertOf(state, event.payload);
      if (alert) alert.clearedAtMs ??= event.atMs;
      return;
    }
    case 'alert.shelved': {
      const alert = alertOf(state, event.payload);
      if (alert) Object.assign(alert, { shelvedUntilMs: event.payload.untilMs, shelvedReason: event.payload.reason });
      return;
    }
    case 'choice.made':
      applyChoice(state, event);
      return;
    case 'run.ended':
      applyEnd(state, event);
      return;
    case 'event.undone':
      return;
    default:
      event satisfies never;
      state.unknownCount += 1;
  }
}

function applyStepDone(state: RunState, event: RunEventOf<'step.done'>): void {
  const { stepId, cause, tempC } = event.payload;
  const progress = stepOf(state, stepId);
  if (!progress) return;
  if (state.status === 'ended') {
    state.conflicts.push({ kind: 'after-end', stepId, eventIds: [state.endEventId ?? event.id, event.id] });
  }
  if (progress.status === 'done') {
    progress.repeatEventIds.push(event.id);
    // The watch and a person finding the same thing is agreement; two people each saying "I did it" is a question.
    if (cause === 'hand' && progress.cause === 'hand') {
      state.conflicts.push({ kind: 'step-done-twice', stepId, eventIds: [progress.doneEventId ?? event.id, event.id] });
    }
    return;
  }
  Object.assign(progress, {
    status: 'done',
    doneAtMs: event.atMs,
    doneBy: event.by,
    cause,
    tempC,
    doneEventId: event.id,
  } satisfies Partial<StepProgress>);
  state.doneOrder.push(stepId);
  moveOn(state, event.atMs);
}

/** More is weighed in from then on; what was in the bag stays as it was written. */
function applyChoice(state: RunState, event: RunEventOf<'choice.made'>): void {
  const { id: eventId, atMs, by, payload } = event;
  state.choices.push({ eventId, atMs, by, ...payload });
  const progress = stepOf(state, payload.stepId);
  if (!progress || payload.extraG === null) return;
  const { amounts } = progress.step;
  const plannedG = amounts.reduce((sum, { massG }) => sum + massG, 0);
  if (plannedG === 0) return;
  const ratio = (plannedG + payload.extraG) / plannedG;
  const enlarged = amounts.map((amount) => ({ ...amount, massG: amount.massG * ratio }));
  progress.step = { ...progress.step, amounts: enlarged };
}

function applyEnd(state: RunState, event: RunEventOf<'run.ended'>): void {
  if (state.status === 'ended') {
    state.conflicts.push({ kind: 'ended-twice', stepId: null, eventIds: [state.endEventId ?? event.id, event.id] });
    return;
  }
  state.endEventId = event.id;
  state.status = 'ended';
  state.endedAtMs = event.atMs;
  state.outcome = event.payload.outcome;
}

function alertOf(state: RunState, name: { key: string; crossing: number }): Alert | undefined {
  return state.alerts.find((alert) => alert.key === name.key && alert.crossing === name.crossing);
}

function applyAlert(state: RunState, event: RunEventOf<'alert.raised'>): void {
  const { dueAtMs, stage, tempC, ...facts } = event.payload;
  const known = alertOf(state, facts);
  if (!known) {
    state.alerts.push({
      ...facts,
      stage,
      dueAtMs,
      tempC,
      raisedAtMs: event.atMs,
      acknowledgedAtMs: null,
      acknowledgedBy: null,
      clearedAtMs: null,
      shelvedUntilMs: null,
      shelvedReason: null,
      isStanding: false,
    });
  } else if (stageRank(stage) > stageRank(known.stage)) {
    Object.assign(known, {
      stage,
      dueAtMs,
      tempC,
      raisedAtMs: event.atMs,
      acknowledgedAtMs: null,
      acknowledgedBy: null,
    });
  }
}

/** A step that was taken back calls under a new name, beside the old one: what was chosen about the step answers both. */
function isAnsweredBy(alert: Alert, { key, crossing, stepId, atMs }: MissedChoiceMade): boolean {
  if (key === alert.key && crossing === alert.crossing) return true;
  return alert.stage === 'missed' && stepId === alert.actStepId && alert.raisedAtMs <= atMs;
}

function markStanding(state: RunState): void {
  for (const alert of state.alerts) {
    const actStep = alert.actStepId === null ? undefined : stepOf(state, alert.actStepId);
    const isOutdated = state.alerts.some((other) => other.key === alert.key && other.crossing > alert.crossing);
    const isTimerGone =
      alert.rule === 'timer' &&
      alert.stepId === null &&
      !state.timers.some((timer) => `timer:${timer.id}` === alert.key);
    // To choose is to answer: a reheat leaves its step open, and calls again at the next crossing.
    const isChosen = state.choices.some((choice) => isAnsweredBy(alert, choice));
    alert.isStanding =
      state.status === 'running' &&
      alert.acknowledgedAtMs === null &&
      alert.clearedAtMs === null &&
      actStep?.status !== 'done' &&
      !isChosen &&
      !isOutdated &&
      !isTimerGone;
  }
}
