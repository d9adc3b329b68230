import type { Direction, MeasuredQuantity, RecipeDocument, RunSheet, Step } from '../sheets/index.js';
import type { RunClock, Timer } from '../timers/index.js';
import type { AlertRule, AlertStage, MissedChoiceKind, RunEventOf } from './events.js';

export interface StepProgress {
  step: Step;
  status: 'ahead' | 'current' | 'done';
  /** Run clock; when the step became the current one. */
  startedAtMs: number | null;
  doneAtMs: number | null;
  doneBy: string | null;
  cause: 'hand' | 'temperature' | 'timer' | 'measurement' | null;
  /** The liquid when the step was done. */
  tempC: number | null;
  /** The event that made it done. */
  doneEventId: string | null;
  /** Later events that say the same again; "back one" takes all of them back. */
  repeatEventIds: string[];
  /** A person took back an automatic "done": from then on this step waits for a hand. */
  isHandOnly: boolean;
  /** How often this step was undone; part of the id of an automatic "done". */
  undoneCount: number;
  tickedTaskIds: string[];
}

export interface Measurement {
  eventId: string;
  stepId: string | null;
  quantity: MeasuredQuantity;
  value: number;
  atMs: number;
  by: string | null;
}

export interface Note {
  eventId: string;
  stepId: string | null;
  text: string;
  atMs: number;
  by: string | null;
}

export interface Alert {
  /** `key` and `crossing` name the alert on every device. */
  key: string;
  crossing: number;
  rule: AlertRule;
  /** The highest stage reached. */
  stage: AlertStage;
  stepId: string | null;
  /** The step a person does on this alert. */
  actStepId: string | null;
  targetC: number | null;
  direction: Direction | null;
  dueAtMs: number | null;
  /** Run clock; when the present stage was raised. */
  raisedAtMs: number;
  tempC: number | null;
  acknowledgedAtMs: number | null;
  acknowledgedBy: string | null;
  clearedAtMs: number | null;
  /** Put aside until then; null when it is not. */
  shelvedUntilMs: number | null;
  shelvedReason: string | null;
  /** True while a person still has to act: not acknowledged, not cleared, its step not done. */
  isStanding: boolean;
}

/** What a person chose about a catch that was missed. */
export interface MissedChoiceMade {
  eventId: string;
  key: string;
  crossing: number;
  stepId: string;
  choice: MissedChoiceKind;
  holdS: number | null;
  extraG: number | null;
  reheatS: number | null;
  atMs: number;
  by: string | null;
}

/** Two facts that cannot both be the whole truth. Nothing is dropped: the first counts, both are shown. */
export interface Conflict {
  kind: 'step-done-twice' | 'started-twice' | 'ended-twice' | 'after-end';
  stepId: string | null;
  /** The event that counts, then the other. */
  eventIds: [string, string];
}

export type RunKit = NonNullable<RunEventOf<'run.started'>['payload']['kit']>;

export interface RunState {
  runId: string | null;
  startEventId: string | null;
  endEventId: string | null;
  status: 'not-started' | 'running' | 'ended';
  title: string;
  batchId: string | null;
  batchNumber: string | null;
  revisionId: string | null;
  isRehearsal: boolean;
  sheet: RunSheet | null;
  /** What it is brewed from and on; null in runs of older builds. */
  document: RecipeDocument | null;
  kit: RunKit | null;
  clock: RunClock | null;
  startedAtMs: number | null;
  endedAtMs: number | null;
  outcome: 'finished' | 'abandoned' | null;
  steps: StepProgress[];
  /** Ids of the done steps, in the order in which they were done. */
  doneOrder: string[];
  /** Running timers: of the current step, and those set by hand. */
  timers: Timer[];
  measurements: Measurement[];
  notes: Note[];
  alerts: Alert[];
  choices: MissedChoiceMade[];
  conflicts: Conflict[];
  soundCheck: { atMs: number; isHeard: boolean; station: string } | null;
  undoneEventIds: string[];
  /** Events of a newer build that this one cannot read; they are kept in the log. */
  unknownCount: number;
  /** The hub's sequence up to which this state knows the log. */
  lastSeq: number;
}
