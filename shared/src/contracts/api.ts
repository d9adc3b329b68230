import { z } from 'zod';
import { alertStageSchema, runEventSchema, storedRunEventSchema } from '../runs/index.js';
import { recipeDocumentSchema } from '../sheets/index.js';
import { runClockSchema } from '../timers/index.js';
import { readingSchema } from '../readings/index.js';
import { problemSchema } from '../problems/index.js';
import { roleSchema } from './roles.js';

const id = z.uuid();
const atMs = z.int().nonnegative();
const name = z.string().trim().min(1, 'Give it a name.').max(80, 'Use 80 characters or fewer.');
const email = z.email('This is not an e-mail address.').max(190);
const calendarDate = z.iso.date('Write the date as YYYY-MM-DD.');

/* Sign-in */
export const signInSchema = z
  .strictObject({ email, password: z.string().min(1, 'Type your password.').max(200) })
  .meta({ id: 'SignIn' });
export type SignIn = z.infer<typeof signInSchema>;

export const memberSchema = z
  .object({ id, displayName: name, email, role: roleSchema, isActive: z.boolean() })
  .meta({ id: 'Member' });
export type Member = z.infer<typeof memberSchema>;

export const houseSchema = z
  .object({ id, name, altitudeM: z.number().min(-430).max(6000), version: z.int() })
  .meta({ id: 'House' });
export type House = z.infer<typeof houseSchema>;

/** A signed-in member. The refresh token travels in an httpOnly cookie only. */
export const sessionSchema = z
  .object({ accessToken: z.string(), expiresAtMs: atMs, member: memberSchema, house: houseSchema })
  .meta({ id: 'Session' });
export type Session = z.infer<typeof sessionSchema>;

/* House and members */
export const updateHouseSchema = z
  .strictObject({ name, altitudeM: z.number().min(-430).max(6000), version: z.int() })
  .meta({ id: 'UpdateHouse' });
export type UpdateHouse = z.infer<typeof updateHouseSchema>;

export const createMemberSchema = z
  .strictObject({
    displayName: name,
    email,
    role: roleSchema,
    password: z.string().min(12, 'Use at least 12 characters.').max(200),
  })
  .meta({ id: 'CreateMember' });
export type CreateMember = z.infer<typeof createMemberSchema>;

export const updateMemberSchema = z
  .strictObject({ displayName: name.optional(), role: roleSchema.optional(), isActive: z.boolean().optional() })
  .meta({ id: 'UpdateMember' });
export type UpdateMember = z.infer<typeof updateMemberSchema>;

/* Equipment */
const equipmentShapes = {
  kettle: z.strictObject({
    volumeL: z.number().positive().max(1000),
    diameterM: z.number().positive().max(3),
    massKg: z.number().positive().max(500),
    heaterPowerW: z.number().positive().max(100_000),
    heaterEfficiency: z.number().min(0.1).max(1),
  }),
  chiller: z.strictObject({
    metal: z.enum(['copper', 'stainless']),
    lengthM: z.number().positive().max(100),
    coolantC: z.number().min(-5).max(40),
  }),
  keg: z.strictObject({
    volumeL: z.number().positive().max(200),
    tareG: z.number().positive().max(100_000),
    /** The pressure stamped on the vessel, gauge. */
    ratedKPa: z.number().positive().max(2000),
  }),
};
export const createEquipmentSchema = z
  .discriminatedUnion('kind', [
    z.strictObject({ kind: z.literal('kettle'), name, facts: equipmentShapes.kettle }),
    z.strictObject({ kind: z.literal('chiller'), name, facts: equipmentShapes.chiller }),
    z.strictObject({ kind: z.literal('keg'), name, facts: equipmentShapes.keg }),
  ])
  .meta({ id: 'CreateEquipment' });
export type CreateEquipment = z.infer<typeof createEquipmentSchema>;

/** The whole of it, with the version it was read at. The kind stays what it was. */
export const updateEquipmentSchema = z
  .discriminatedUnion('kind', [
    z.strictObject({ kind: z.literal('kettle'), name, facts: equipmentShapes.kettle, version: z.int() }),
    z.strictObject({ kind: z.literal('chiller'), name, facts: equipmentShapes.chiller, version: z.int() }),
    z.strictObject({ kind: z.literal('keg'), name, facts: equipmentShapes.keg, version: z.int() }),
  ])
  .meta({ id: 'UpdateEquipment' });
export type UpdateEquipment = z.infer<typeof updateEquipmentSchema>;

const equipmentRow = { id, version: z.int() };
export const equipmentSchema = z
  .discriminatedUnion('kind', [
    z.object({ ...equipmentRow, kind: z.literal('kettle'), name, facts: equipmentShapes.kettle }),
    z.object({ ...equipmentRow, kind: z.literal('chiller'), name, facts: equipmentShapes.chiller }),
    z.object({ ...equipmentRow, kind: z.literal('keg'), name, facts: equipmentShapes.keg }),
  ])
  .meta({ id: 'Equipment' });
export type Equipment = z.infer<typeof equipmentSchema>;

/* Probes */
export const createProbeSchema = z
  .strictObject({
    name,
    /** Time constant plus dead time in stirred liquid, as told by its maker or measured. */
    lagS: z.number().min(0).max(120),
    resolutionC: z.number().min(0.001).max(1),
    samplePeriodS: z.number().min(0.1).max(60),
  })
  .meta({ id: 'CreateProbe' });
export type CreateProbe = z.infer<typeof createProbeSchema>;

export const probeSchema = z
  .object({
    id,
    name,
    lagS: z.number(),
    resolutionC: z.number(),
    samplePeriodS: z.number(),
    isSimulated: z.boolean(),
    isRevoked: z.boolean(),
    lastReadingAtMs: atMs.nullable(),
  })
  .meta({ id: 'Probe' });
export type Probe = z.infer<typeof probeSchema>;

/** Told once, when made or rotated; the hub keeps a hash. */
export const probeWithTokenSchema = z
  .object({ probe: probeSchema, deviceToken: z.string() })
  .meta({ id: 'ProbeWithToken' });
export type ProbeWithToken = z.infer<typeof probeWithTokenSchema>;

/* Device door */
export const MAX_READINGS_A_CALL = 10_000;
export const pushReadingsSchema = z
  .strictObject({
    readings: z
      .array(readingSchema)
      .min(1, 'Send at least one reading.')
      .max(MAX_READINGS_A_CALL, `Send at most ${MAX_READINGS_A_CALL} readings a call.`),
  })
  .meta({ id: 'PushReadings' });
export type PushReadings = z.infer<typeof pushReadingsSchema>;

/** Sent only after the rows are committed. A refused reading will never be taken: do not send it again. */
export const pushedReadingsSchema = z
  .object({
    accepted: z.int(),
    duplicates: z.int(),
    refused: z.array(z.object({ index: z.int(), reason: z.enum(['in-the-future', 'too-old', 'out-of-range']) })),
  })
  .meta({ id: 'PushedReadings' });
export type PushedReadings = z.infer<typeof pushedReadingsSchema>;

/* Recipes */
export const revisionSchema = z
  .object({
    id,
    recipeId: id,
    number: z.int().positive(),
    note: z.string(),
    createdAtMs: atMs,
    createdBy: z.string(),
    document: recipeDocumentSchema,
  })
  .meta({ id: 'Revision' });
export type Revision = z.infer<typeof revisionSchema>;

export const recipeSummarySchema = z
  .object({ id, name, summary: z.string(), latestRevisionId: id, latestRevisionNumber: z.int().positive() })
  .meta({ id: 'RecipeSummary' });
export type RecipeSummary = z.infer<typeof recipeSummarySchema>;

export const recipeSchema = recipeSummarySchema.extend({ revisions: z.array(revisionSchema) }).meta({ id: 'Recipe' });
export type Recipe = z.infer<typeof recipeSchema>;

/* Batches and runs */
export const createBatchSchema = z
  .strictObject({
    revisionId: id,
    plannedOn: calendarDate,
    kettleId: id,
    chillerId: id.nullable(),
    kegId: id,
    probeId: id.nullable(),
  })
  .meta({ id: 'CreateBatch' });
export type CreateBatch = z.infer<typeof createBatchSchema>;

export const runSummarySchema = z
  .object({
    id,
    title: z.string(),
    batchId: id.nullable(),
    batchNumber: z.string().nullable(),
    isRehearsal: z.boolean(),
    status: z.enum(['running', 'ended']),
    outcome: z.enum(['finished', 'abandoned']).nullable(),
    probeId: id.nullable(),
    probeLagS: z.number(),
    probeResolutionC: z.number(),
    probeSamplePeriodS: z.number(),
    roomC: z.number().nullable(),
    coolantC: z.number().nullable(),
    /** Run clock. */
    startedAtMs: atMs,
    endedAtMs: atMs.nullable(),
    clock: runClockSchema,
    lastSeq: z.int(),
    currentStepTitle: z.string().nullable(),
    /** The highest stage among the alerts that stand. */
    alertStage: alertStageSchema.nullable(),
  })
  .meta({ id: 'RunSummary' });
export type RunSummary = z.infer<typeof runSummarySchema>;

export const batchSchema = z
  .object({
    id,
    batchNumber: z.string(),
    recipeId: id,
    recipeName: z.string(),
    revisionId: id,
    revisionNumber: z.int().positive(),
    plannedOn: calendarDate,
    status: z.enum(['planned', 'running', 'finished', 'abandoned']),
    volumeL: z.number(),
    run: runSummarySchema.nullable(),
  })
  .meta({ id: 'Batch' });
export type Batch = z.infer<typeof batchSchema>;

export const startRehearsalSchema = z
  .strictObject({
    rate: z.number().min(1).max(60),
    /** Which recipe to practise; the newest revision of the house's first recipe when left out. */
    revisionId: id.optional(),
    /** Readings come from this probe, such as a trace that is played back, in place of the simulated kettle. */
    probeId: id.optional(),
    /** Makes the simulated kettle repeatable. */
    seed: z.int().min(1).max(2_147_483_647).optional(),
  })
  .meta({ id: 'StartRehearsal' });
export type StartRehearsal = z.infer<typeof startRehearsalSchema>;

export const MAX_EVENTS_A_CALL = 500;
export const appendEventsSchema = z
  .strictObject({ events: z.array(runEventSchema).min(1).max(MAX_EVENTS_A_CALL) })
  .meta({ id: 'AppendEvents' });
export type AppendEvents = z.infer<typeof appendEventsSchema>;

/** Sent only after commit. An event that was known already is acknowledged with the `seq` it has. */
export const appendedEventsSchema = z
  .object({
    stored: z.array(z.object({ id, seq: z.int().positive(), receivedAtMs: atMs, sentBy: id.nullable() })),
    refused: z.array(z.object({ id, problem: problemSchema })),
  })
  .meta({ id: 'AppendedEvents' });
export type AppendedEvents = z.infer<typeof appendedEventsSchema>;

export const runEventsSchema = z.object({ runId: id, events: z.array(storedRunEventSchema) }).meta({ id: 'RunEvents' });
export interface RunEvents {
  runId: string;
  events: import('../runs/index.js').StoredRunEvent[];
}

export const runReadingsSchema = z
  .object({ runId: id, probeId: id.nullable(), readings: z.array(readingSchema), totalCount: z.int() })
  .meta({ id: 'RunReadings' });
export type RunReadings = z.infer<typeof runReadingsSchema>;

/** `GET …/readings`: `buckets` asks for min/max per bucket, so that no spike is lost. */
export const runReadingsQuerySchema = z.strictObject({
  fromMs: z.coerce.number().int().nonnegative().optional(),
  toMs: z.coerce.number().int().nonnegative().optional(),
  buckets: z.coerce.number().int().min(10).max(5000).optional(),
});
export type RunReadingsQuery = z.infer<typeof runReadingsQuerySchema>;

export const healthSchema = z
  .object({ status: z.enum(['ok', 'degraded']), database: z.enum(['up', 'down']), version: z.string(), nowMs: atMs })
  .meta({ id: 'Health' });
export type Health = z.infer<typeof healthSchema>;
