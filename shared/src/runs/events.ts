import { z } from 'zod';
import {
  chillerFactsSchema,
  directionSchema,
  kettleFactsSchema,
  measuredQuantitySchema,
  recipeDocumentSchema,
  runSheetSchema,
} from '../sheets/index.js';
import { runClockSchema } from '../timers/index.js';

/** The stages of an alert, in the order in which they are climbed. */
export const alertStageSchema = z.enum(['coming-up', 'stand-by', 'now', 'missed']);
export type AlertStage = z.infer<typeof alertStageSchema>;

/**
 * What an alert is about: a level to catch, a deadline, a probe that went silent, a hub that a tablet lost, a battery that runs out, or a
 * tablet that went silent.
 */
export const alertRuleSchema = z.enum(['temperature', 'timer', 'signal', 'hub', 'battery', 'station']);
export type AlertRule = z.infer<typeof alertRuleSchema>;

const id = z.uuid();
const atMs = z.int().nonnegative();
const stepId = z.string().min(1).max(60);

/** Names one climb of one ladder: the same key and crossing is the same alert on every device. */
const alertKey = z.strictObject({ key: z.string().min(1).max(80), crossing: z.int().positive() });

/** What can be done about a catch that was missed. */
export const missedChoiceSchema = z.enum(['hold', 'more', 'reheat', 'accept']);
export type MissedChoiceKind = z.infer<typeof missedChoiceSchema>;

/** What the run is brewed on, as far as its figures need it. */
const runKitSchema = z.strictObject({
  altitudeM: z.number(),
  kettle: kettleFactsSchema.nullable(),
  chiller: chillerFactsSchema.nullable(),
});

/**
 * What may be written in the log of a run. Events are facts in the past tense; shapes only grow, and a breaking change
 * is a new `v` with an upcast.
 */
const payloads = {
  'run.started': z.strictObject({
    title: z.string().min(1).max(120),
    batchId: id.nullable(),
    batchNumber: z.string().max(20).nullable(),
    revisionId: id.nullable(),
    isRehearsal: z.boolean(),
    sheet: runSheetSchema,
    clock: runClockSchema,
    /** The revision it is brewed from and the kit: the figures while it runs need no hub. Runs of older builds have none. */
    document: recipeDocumentSchema.optional(),
    kit: runKitSchema.optional(),
  }),
  'sound.checked': z.strictObject({ isHeard: z.boolean() }),
  'step.done': z.strictObject({
    stepId,
    cause: z.enum(['hand', 'temperature', 'timer', 'measurement']),
    /** The liquid at that instant as the watch saw it; `null` when nobody knows. */
    tempC: z.number().nullable(),
  }),
  'event.undone': z.strictObject({ eventId: id }),
  'task.ticked': z.strictObject({ stepId, taskId: z.string().min(1).max(60) }),
  'note.added': z.strictObject({
    stepId: stepId.nullable(),
    text: z.string().trim().min(1, 'Write something first.').max(2000),
  }),
  'measurement.recorded': z.strictObject({
    stepId: stepId.nullable(),
    quantity: measuredQuantitySchema,
    value: z.number(),
  }),
  'timer.started': z.strictObject({
    timerId: id,
    label: z.string().min(1).max(60),
    durationS: z.number().positive().max(86_400),
  }),
  'timer.stopped': z.strictObject({ timerId: id }),
  'clock.changed': z.strictObject({ clock: runClockSchema }),
  'alert.raised': z.strictObject({
    ...alertKey.shape,
    rule: alertRuleSchema,
    stage: alertStageSchema,
    /** The step whose condition is watched, and the step a person then does. Both `null` for a timer set by hand. */
    stepId: stepId.nullable(),
    actStepId: stepId.nullable(),
    tempC: z.number().nullable(),
    targetC: z.number().nullable(),
    direction: directionSchema.nullable(),
    /** When the level is crossed or the deadline falls, run clock; `null` when it cannot be said. */
    dueAtMs: atMs.nullable(),
  }),
  'alert.acknowledged': z.strictObject({ ...alertKey.shape, stage: alertStageSchema }),
  'alert.cleared': z.strictObject({ ...alertKey.shape }),
  /** Put aside by a person for a while, with a reason; it comes back by itself. */
  'alert.shelved': z.strictObject({ ...alertKey.shape, untilMs: atMs, reason: z.string().trim().min(1).max(200) }),
  'choice.made': z.strictObject({
    ...alertKey.shape,
    stepId,
    choice: missedChoiceSchema,
    /** How long it is held, how much more goes in, how long the reheat takes; what the choice does not need is null. */
    holdS: z.number().positive().max(86_400).nullable(),
    extraG: z.number().positive().max(100_000).nullable(),
    reheatS: z.number().positive().max(86_400).nullable(),
  }),
  'run.ended': z.strictObject({ outcome: z.enum(['finished', 'abandoned']), reason: z.string().max(400).optional() }),
} as const;

export type RunEventType = keyof typeof payloads;
export const runEventTypes = Object.keys(payloads) as RunEventType[];

const envelope = {
  /** UUIDv7 made where it happened; a UUIDv5 where several devices must come to the same id. */
  id,
  runId: id,
  /** Version of the payload's shape. */
  v: z.literal(1),
  /** Run clock, epoch ms. */
  atMs,
  /** The member who acted; `null` for what the watch found out. */
  by: id.nullable(),
  /** The tablet, phone or hub on which it happened. */
  station: z.string().min(1).max(60),
};

function eventOf<Type extends RunEventType>(type: Type) {
  return z.strictObject({ ...envelope, type: z.literal(type), payload: payloads[type] });
}

export const runEventSchema = z
  .discriminatedUnion('type', [
    eventOf('run.started'),
    eventOf('sound.checked'),
    eventOf('step.done'),
    eventOf('event.undone'),
    eventOf('task.ticked'),
    eventOf('note.added'),
    eventOf('measurement.recorded'),
    eventOf('timer.started'),
    eventOf('timer.stopped'),
    eventOf('clock.changed'),
    eventOf('alert.raised'),
    eventOf('alert.acknowledged'),
    eventOf('alert.cleared'),
    eventOf('alert.shelved'),
    eventOf('choice.made'),
    eventOf('run.ended'),
  ])
  .meta({ id: 'RunEvent' });
export type RunEvent = z.infer<typeof runEventSchema>;
export type RunEventOf<Type extends RunEventType> = Extract<RunEvent, { type: Type }>;

const stored = {
  /** The hub's place for it in this run: total order. */
  seq: z.int().positive(),
  /** Hub wall time, epoch ms. */
  receivedAtMs: atMs,
  /** The member whose sign-in delivered it; differs from `by` when a shared tablet sends later. `null`: the hub. */
  sentBy: id.nullable(),
};

/** An event as the hub keeps it. */
export const storedRunEventSchema = z.intersection(runEventSchema, z.object(stored)).meta({ id: 'StoredRunEvent' });
export type StoredRunEvent = RunEvent & { seq: number; receivedAtMs: number; sentBy: string | null };

/** An event of a newer build, kept and counted, never dropped. */
export type UnknownRunEvent = Omit<RunEvent, 'type' | 'payload' | 'v'> & { type: string; v: number; payload: unknown };

/** What a fold takes: events with the hub's `seq`, and pending ones without. */
export type LogEntry = (RunEvent | StoredRunEvent | UnknownRunEvent) & { seq?: number };
