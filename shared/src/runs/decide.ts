import { problem, type Problem } from '../problems/index.js';
import type { DoneCondition, MeasuredQuantity } from '../sheets/index.js';
import { clockAtRate } from '../timers/index.js';
import { canShelve, LONGEST_SHELF_S } from './alert-priority.js';
import type { MissedChoiceKind, RunEvent, RunEventOf, RunEventType } from './events.js';
import { isUndoable } from './fold.js';
import { HOLD_TIMER } from './missed-choices.js';
import type { RunState } from './state.js';

/** What a person asks for. `decide` turns it into facts, or says why not. */
export type RunCommand =
  | { type: 'completeStep'; stepId: string; tempC: number | null }
  | { type: 'goBack' }
  | { type: 'undoEvent'; eventId: string; eventType: RunEventType }
  | { type: 'addNote'; text: string; stepId: string | null }
  | {
      type: 'recordMeasurement';
      quantity: MeasuredQuantity;
      value: number;
      stepId: string | null;
      tempC: number | null;
    }
  | { type: 'tickTask'; stepId: string; taskId: string }
  | { type: 'startTimer'; label: string; durationS: number }
  | { type: 'stopTimer'; timerId: string }
  | { type: 'acknowledgeAlert'; key: string; crossing: number }
  | { type: 'shelveAlert'; key: string; crossing: number; forS: number; reason: string }
  | {
      type: 'chooseForMissed';
      key: string;
      crossing: number;
      stepId: string;
      choice: MissedChoiceKind;
      holdS: number | null;
      extraG: number | null;
      reheatS: number | null;
    }
  | { type: 'checkSound'; isHeard: boolean }
  | { type: 'changeRate'; rate: number; wallMs: number }
  | { type: 'endRun'; outcome: 'finished' | 'abandoned'; reason?: string };

export interface DecideContext {
  /** Run clock, epoch ms. */
  nowMs: number;
  by: string | null;
  station: string;
  newId: () => string;
}

export type Decision = { ok: true; events: RunEvent[] } | { ok: false; problem: Problem };

/** Plausible range of what is typed on a sheet. Outside it is a slip of the finger. */
export const measurableRange: Record<MeasuredQuantity, { min: number; max: number }> = {
  pH: { min: 0, max: 14 },
  tempC: { min: -20, max: 115 },
  volumeL: { min: 0, max: 1000 },
  massG: { min: 0, max: 1_000_000 },
  pressureKPa: { min: 0, max: 2000 },
  tasteScore: { min: 1, max: 9 },
};

/** Whether a measured value is what the step waits for. */
export function isInRange(done: DoneCondition, quantity: MeasuredQuantity, value: number): boolean {
  if (done.by !== 'measurement' || done.quantity !== quantity) return false;
  return value >= (done.min ?? -Infinity) && value <= (done.max ?? Infinity);
}

/** Pure: the facts that follow from a command in this state, or the problem to show. */
export function decide(state: RunState, command: RunCommand, context: DecideContext): Decision {
  if (state.status === 'not-started' || state.runId === null) {
    return refuse('run-not-started', 'Start the run first.');
  }
  const runId = state.runId;

  function fact<Type extends RunEventType>(type: Type, payload: RunEventOf<Type>['payload']): RunEvent {
    const { nowMs, by, station, newId } = context;
    return { id: newId(), runId, type, v: 1, atMs: nowMs, by, station, payload } as RunEvent;
  }
  const facts = (...events: RunEvent[]): Decision => ({ ok: true, events });

  // Notes, an acknowledgement and taking back are right at any time; the rest is for an open run.
  const isForAnyTime = ['addNote', 'acknowledgeAlert', 'undoEvent'].includes(command.type);
  if (state.status === 'ended' && !isForAnyTime) {
    return refuse('run-already-ended', 'This run has ended. Take back "end run" in the log to go on.');
  }

  switch (command.type) {
    case 'completeStep': {
      const progress = state.steps.find(({ step }) => step.id === command.stepId);
      if (!progress) return refuse('not-found', 'This run sheet has no such step.');
      if (progress.status === 'done') return refuse('step-already-done', `"${progress.step.title}" is done already.`);
      if (progress.status !== 'current') {
        const current = state.steps.find(({ status }) => status === 'current');
        return refuse('step-not-current', `"${current?.step.title ?? 'Another step'}" comes first.`);
      }
      return facts(fact('step.done', { stepId: command.stepId, cause: 'hand', tempC: command.tempC }));
    }
    case 'goBack': {
      const last = state.steps.find(({ step }) => step.id === state.doneOrder.at(-1));
      if (!last?.doneEventId) return refuse('nothing-to-undo', 'This is the first step.');
      const undone = [last.doneEventId, ...last.repeatEventIds].map((eventId) => fact('event.undone', { eventId }));
      return facts(...undone, ...takenBackWith(state, last.step.id).map(({ type, payload }) => fact(type, payload)));
    }
    case 'undoEvent': {
      if (!isUndoable(command.eventType)) return refuse('nothing-to-undo', 'This cannot be taken back.');
      if (state.undoneEventIds.includes(command.eventId))
        return refuse('nothing-to-undo', 'It was taken back already.');
      return facts(fact('event.undone', { eventId: command.eventId }));
    }
    case 'addNote': {
      const text = command.text.trim();
      if (!text) return invalid('/text', 'Write something first.');
      if (text.length > 2000) return invalid('/text', 'Use 2000 characters or fewer.');
      return facts(fact('note.added', { stepId: command.stepId, text }));
    }
    case 'recordMeasurement': {
      const { quantity, value, stepId, tempC } = command;
      const { min, max } = measurableRange[quantity];
      if (!(value >= min && value <= max)) return invalid('/value', `Type a number from ${min} to ${max}.`);
      const recorded = fact('measurement.recorded', { stepId, quantity, value });
      const current = state.steps.find(({ status }) => status === 'current');
      if (!current || !isInRange(current.step.done, quantity, value)) return facts(recorded);
      return facts(recorded, fact('step.done', { stepId: current.step.id, cause: 'measurement', tempC }));
    }
    case 'tickTask':
      return facts(fact('task.ticked', { stepId: command.stepId, taskId: command.taskId }));
    case 'startTimer': {
      const { label, durationS } = command;
      if (!(durationS > 0 && durationS <= 86_400)) return invalid('/durationS', 'Set from 1 second to 24 hours.');
      return facts(fact('timer.started', { timerId: context.newId(), label: label.trim() || 'timer', durationS }));
    }
    case 'stopTimer':
      return facts(fact('timer.stopped', { timerId: command.timerId }));
    case 'acknowledgeAlert': {
      const { key, crossing } = command;
      const alert = state.alerts.find((candidate) => candidate.key === key && candidate.crossing === crossing);
      if (!alert) return refuse('not-found', 'This alert is not known here.');
      return facts(fact('alert.acknowledged', { key, crossing, stage: alert.stage }));
    }
    case 'shelveAlert': {
      const { key, crossing, forS } = command;
      const alert = state.alerts.find((candidate) => candidate.key === key && candidate.crossing === crossing);
      if (!alert) return refuse('not-found', 'This alert is not known here.');
      if (!canShelve(alert))
        return refuse('not-allowed', 'What the sheet calls for cannot be put aside. Do it, or say "heard".');
      const reason = command.reason.trim();
      if (!reason) return invalid('/reason', 'Say why, in a few words.');
      if (!(forS > 0 && forS <= LONGEST_SHELF_S)) return invalid('/forS', 'From a second to an hour.');
      return facts(fact('alert.shelved', { key, crossing, untilMs: Math.round(context.nowMs + forS * 1000), reason }));
    }
    case 'chooseForMissed': {
      const { type: _type, ...choice } = command;
      const made = fact('choice.made', choice);
      // Held by a timer of its own, which goes through the same ladder as every timer.
      if (choice.holdS === null) return facts(made);
      return facts(
        made,
        fact('timer.started', { timerId: context.newId(), label: HOLD_TIMER, durationS: choice.holdS }),
      );
    }
    case 'checkSound':
      return facts(fact('sound.checked', { isHeard: command.isHeard }));
    case 'changeRate': {
      if (!state.isRehearsal || !state.clock) return refuse('not-allowed', 'Only a rehearsal has a fast clock.');
      if (!(command.rate >= 1 && command.rate <= 60)) return invalid('/rate', 'Choose a rate from 1 to 60.');
      return facts(fact('clock.changed', { clock: clockAtRate(state.clock, command.rate, command.wallMs) }));
    }
    case 'endRun': {
      const reason = command.reason?.trim();
      return facts(fact('run.ended', { outcome: command.outcome, ...(reason ? { reason } : {}) }));
    }
  }
}

/** What was chosen about a missed step goes back with it: more in the bag, a hold that runs. */
function takenBackWith(
  state: RunState,
  stepId: string,
): (Pick<RunEventOf<'event.undone'>, 'type' | 'payload'> | Pick<RunEventOf<'timer.stopped'>, 'type' | 'payload'>)[] {
  return state.choices
    .filter((choice) => choice.stepId === stepId)
    .flatMap(({ eventId, atMs, holdS }) => [
      { type: 'event.undone' as const, payload: { eventId } },
      ...state.timers
        .filter(({ label, startedAtMs }) => holdS !== null && label === HOLD_TIMER && startedAtMs === atMs)
        .map(({ id }) => ({ type: 'timer.stopped' as const, payload: { timerId: id } })),
    ]);
}

function refuse(type: Parameters<typeof problem>[0], detail: string): Decision {
  return { ok: false, problem: problem(type, detail) };
}

function invalid(pointer: string, detail: string): Decision {
  return { ok: false, problem: problem('not-valid', detail, { errors: [{ pointer, detail }] }) };
}
