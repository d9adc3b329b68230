import { z } from 'zod';
import { alertStageSchema, runEventSchema, storedRunEventSchema } from '../runs/index.js';
import {
  chillerFactsSchema,
  ingredientKindSchema,
  kegFactsSchema,
  kettleFactsSchema,
  recipeDocumentSchema,
  runSheetSchema,
  scaleFactsSchema,
} from '../sheets/index.js';
import { ingredientFactsSchema, lotFactsSchema, lotMoveKindSchema } from '../stores/index.js';
import { runClockSchema } from '../timers/index.js';
import { readingSchema } from '../readings/index.js';
import { problemSchema } from '../problems/index.js';
import { metricPreferences } from '../units/index.js';
import { roleSchema } from './roles.js';

const id = z.uuid();
const atMs = z.int().nonnegative();
const name = z
  .string()
  .trim()
  .min(1, 'Give it a name.')
  .max(80, 'Use 80 characters or fewer.')
  .refine((text) => text === '' || /[^\p{C}\p{Z}]/u.test(text), 'Give it a name that can be seen.');
const email = z.email('This is not an e-mail address.').max(190);
/** ISO 4217. */
const currency = z.string().regex(/^[A-Z]{3}$/, 'Three capital letters, such as EUR or USD.');
const calendarDate = z.iso.date('Write the date as YYYY-MM-DD.');

/* Sign-in */
export const signInSchema = z
  .strictObject({ email, password: z.string().min(1, 'Type your password.').max(200) })
  .meta({ id: 'SignIn' });
export type SignIn = z.infer<typeof signInSchema>;

/** What one person reads and types. */
export const unitPreferencesSchema = z
  .strictObject({
    temperature: z.enum(['C', 'F']),
    mass: z.enum(['g', 'oz']),
    volume: z.enum(['L', 'gal']),
    pressure: z.enum(['kPa', 'bar', 'psi']),
  })
  .meta({ id: 'UnitPreferences' });

export const memberSchema = z
  .object({
    id,
    displayName: name,
    email,
    role: roleSchema,
    isActive: z.boolean(),
    units: unitPreferencesSchema.default(metricPreferences),
    /** Seconds from `now` to the act; null: never learned, the usual. */
    reachS: z.int().nullable().default(null),
  })
  .meta({ id: 'Member' });
export type Member = z.infer<typeof memberSchema>;

export const houseSchema = z
  .object({
    id,
    name,
    altitudeM: z.number().min(-430).max(6000),
    currency: currency.default('EUR'),
    version: z.int(),
  })
  .meta({ id: 'House' });
export type House = z.infer<typeof houseSchema>;

/** A signed-in member. The refresh token travels in an httpOnly cookie only. */
export const sessionSchema = z
  .object({ accessToken: z.string(), expiresAtMs: atMs, member: memberSchema, house: houseSchema })
  .meta({ id: 'Session' });
export type Session = z.infer<typeof sessionSchema>;

/* House and members */
export const updateHouseSchema = z
  .strictObject({ name, altitudeM: z.number().min(-430).max(6000), currency, version: z.int() })
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
  kettle: kettleFactsSchema,
  chiller: chillerFactsSchema,
  keg: kegFactsSchema,
  scale: scaleFactsSchema,
};
export const createEquipmentSchema = z
  .discriminatedUnion('kind', [
    z.strictObject({ kind: z.literal('kettle'), name, facts: equipmentShapes.kettle }),
    z.strictObject({ kind: z.literal('chiller'), name, facts: equipmentShapes.chiller }),
    z.strictObject({ kind: z.literal('keg'), name, facts: equipmentShapes.keg }),
    z.strictObject({ kind: z.literal('scale'), name, facts: equipmentShapes.scale }),
  ])
  .meta({ id: 'CreateEquipment' });
export type CreateEquipment = z.infer<typeof createEquipmentSchema>;

/** The whole of it, with the version it was read at. The kind stays what it was. */
export const updateEquipmentSchema = z
  .discriminatedUnion('kind', [
    z.strictObject({ kind: z.literal('kettle'), name, facts: equipmentShapes.kettle, version: z.int() }),
    z.strictObject({ kind: z.literal('chiller'), name, facts: equipmentShapes.chiller, version: z.int() }),
    z.strictObject({ kind: z.literal('keg'), name, facts: equipmentShapes.keg, version: z.int() }),
    z.strictObject({ kind: z.literal('scale'), name, facts: equipmentShapes.scale, version: z.int() }),
  ])
  .meta({ id: 'UpdateEquipment' });
export type UpdateEquipment = z.infer<typeof updateEquipmentSchema>;

const equipmentRow = { id, version: z.int() };
export const equipmentSchema = z
  .discriminatedUnion('kind', [
    z.object({ ...equipmentRow, kind: z.literal('kettle'), name, facts: equipmentShapes.kettle }),
    z.object({ ...equipmentRow, kind: z.literal('chiller'), name, facts: equipmentShapes.chiller }),
    z.object({ ...equipmentRow, kind: z.literal('keg'), name, facts: equipmentShapes.keg }),
    z.object({ ...equipmentRow, kind: z.literal('scale'), name, facts: equipmentShapes.scale }),
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
    /** How far off `lagS` may be, as a share of it, where it was learned from a run; kept while `lagS` stays, when left out. */
    lagErrorRatio: z.number().positive().max(0.5).nullable().optional(),
  })
  .meta({ id: 'CreateProbe' });
export type CreateProbe = z.infer<typeof createProbeSchema>;

/** Of a probe read at two points that are known: ice water and boiling water, or a reference beside it. */
export const probeCalibrationSchema = z
  .strictObject({
    low: z.strictObject({ shownC: z.number().min(-20).max(120), trueC: z.number().min(-5).max(105) }),
    high: z.strictObject({ shownC: z.number().min(-20).max(120), trueC: z.number().min(-5).max(105) }),
  })
  .meta({ id: 'ProbeCalibration' });
export type ProbeCalibration = z.infer<typeof probeCalibrationSchema>;

/** The whole of it, with the version it was read at. */
export const updateProbeSchema = createProbeSchema
  .extend({ calibration: probeCalibrationSchema.nullable(), version: z.int() })
  .meta({ id: 'UpdateProbe' });
export type UpdateProbe = z.infer<typeof updateProbeSchema>;

/** `GET probes/:id/readings`: the newest, as the probe sent them, for the tests of a probe at the desk. */
export const probeReadingsQuerySchema = z.strictObject({ fromMs: z.coerce.number().int().nonnegative() });
export type ProbeReadingsQuery = z.infer<typeof probeReadingsQuerySchema>;
export const probeReadingsSchema = z
  .object({
    probeId: id,
    nowMs: atMs,
    readings: z.array(z.object({ atMs, tempC: z.number().nullable(), shownC: z.number().nullable() })),
  })
  .meta({ id: 'ProbeReadings' });
export type ProbeReadings = z.infer<typeof probeReadingsSchema>;

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
    calibration: probeCalibrationSchema.nullable().default(null),
    calibratedAtMs: atMs.nullable().default(null),
    lagErrorRatio: z.number().nullable().default(null),
    version: z.int().default(1),
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

const summary = z.string().trim().max(400, 'Use 400 characters or fewer.');
const note = z.string().trim().max(400, 'Use 400 characters or fewer.');

export const recipeSummarySchema = z
  .object({
    id,
    name,
    summary: z.string(),
    latestRevisionId: id,
    latestRevisionNumber: z.int().positive(),
    isArchived: z.boolean().default(false),
    volumeL: z.number().default(0),
    changedAtMs: atMs.default(0),
  })
  .meta({ id: 'RecipeSummary' });
export type RecipeSummary = z.infer<typeof recipeSummarySchema>;

/** Revisions newest first. */
export const recipeSchema = recipeSummarySchema.extend({ revisions: z.array(revisionSchema) }).meta({ id: 'Recipe' });
export type Recipe = z.infer<typeof recipeSchema>;

/** A recipe starts with its first revision; a copy is one that starts with the revision of another. */
export const createRecipeSchema = z
  .strictObject({ name, summary, note, document: recipeDocumentSchema })
  .meta({ id: 'CreateRecipe' });
export type CreateRecipe = z.infer<typeof createRecipeSchema>;

export const updateRecipeSchema = z
  .strictObject({ name: name.optional(), summary: summary.optional(), isArchived: z.boolean().optional() })
  .meta({ id: 'UpdateRecipe' });
export type UpdateRecipe = z.infer<typeof updateRecipeSchema>;

/**
 * A new revision on top of the one that the brewer saw. When another was saved meanwhile the hub refuses with `changed-meanwhile`, and
 * the brewer chooses.
 */
export const createRevisionSchema = z
  .strictObject({ baseRevisionId: id, note, document: recipeDocumentSchema })
  .meta({ id: 'CreateRevision' });
export type CreateRevision = z.infer<typeof createRevisionSchema>;

/* Stores */
export const lotSchema = lotFactsSchema
  .extend({
    id,
    ingredientId: id,
    /** Sum of the ledger; below zero when more was used than the book knows of. */
    stockG: z.number(),
    /** Set aside for batches that are planned. */
    reservedG: z.number(),
    hasPhoto: z.boolean(),
    isRemoved: z.boolean(),
    version: z.int(),
  })
  .meta({ id: 'Lot' });
export type Lot = z.infer<typeof lotSchema>;

export const ingredientSchema = z
  .object({
    id,
    facts: ingredientFactsSchema,
    stockG: z.number(),
    reservedG: z.number(),
    isLow: z.boolean(),
    isRemoved: z.boolean(),
    version: z.int(),
    /** Those with stock, or not removed; the one to use first at the head (best before, then received). */
    lots: z.array(lotSchema),
  })
  .meta({ id: 'Ingredient' });
export type Ingredient = z.infer<typeof ingredientSchema>;

export const createIngredientSchema = z.strictObject({ facts: ingredientFactsSchema }).meta({ id: 'CreateIngredient' });
export type CreateIngredient = z.infer<typeof createIngredientSchema>;
export const updateIngredientSchema = z
  .strictObject({ facts: ingredientFactsSchema, version: z.int() })
  .meta({ id: 'UpdateIngredient' });
export type UpdateIngredient = z.infer<typeof updateIngredientSchema>;

const massMoved = z.number('Type a number.').positive('A mass above 0 g.').max(1_000_000, 'At most 1000 kg.');

export const receiveLotSchema = z.strictObject({ facts: lotFactsSchema, massG: massMoved }).meta({ id: 'ReceiveLot' });
export type ReceiveLot = z.infer<typeof receiveLotSchema>;
export const updateLotSchema = z.strictObject({ facts: lotFactsSchema, version: z.int() }).meta({ id: 'UpdateLot' });
export type UpdateLot = z.infer<typeof updateLotSchema>;

/**
 * A line in the ledger by hand: `counted` sets the stock to what was weighed, `used` takes some out. Where less than nothing would be left,
 * the hub refuses with `not-enough-stock` until the person says that it may.
 */
export const moveLotSchema = z
  .discriminatedUnion('kind', [
    z.strictObject({
      kind: z.literal('counted'),
      toG: z.number('Type a number.').min(0, 'A mass of 0 g or more.').max(1_000_000, 'At most 1000 kg.'),
      reason: note,
    }),
    z.strictObject({ kind: z.literal('used'), massG: massMoved, reason: note, mayGoBelowZero: z.boolean() }),
  ])
  .meta({ id: 'MoveLot' });
export type MoveLot = z.infer<typeof moveLotSchema>;

export const lotMoveSchema = z
  .object({
    id,
    lotId: id,
    kind: lotMoveKindSchema,
    /** Signed. */
    massG: z.number(),
    reason: z.string(),
    batchId: id.nullable(),
    batchNumber: z.string().nullable(),
    atMs,
    by: z.string(),
    /** A line that was taken back: its counter-line follows it. */
    isUndone: z.boolean(),
  })
  .meta({ id: 'LotMove' });
export type LotMove = z.infer<typeof lotMoveSchema>;

/** CSV in: what each row would do, before anything is done. Row numbers as a spreadsheet shows them: the head is row 1. */
export const importStoresSchema = z
  .strictObject({
    csv: z.string().min(1, 'The file is empty.').max(2_000_000, 'At most 2 MB.'),
    /** Rows that are left out on purpose. */
    skipRows: z.array(z.int().min(2)).max(5000),
  })
  .meta({ id: 'ImportStores' });
export type ImportStores = z.infer<typeof importStoresSchema>;
export const importRowSchema = z.object({
  row: z.int().min(2),
  ingredient: z.string(),
  kind: z.string(),
  lot: z.string(),
  massG: z.number().nullable(),
  does: z.enum(['new-ingredient', 'new-lot', 'nothing']),
  /** Empty when the row is good. */
  problems: z.array(z.object({ column: z.string(), detail: z.string() })),
});
export const importPreviewSchema = z
  .object({ rows: z.array(importRowSchema), badCount: z.int(), goodCount: z.int() })
  .meta({ id: 'ImportPreview' });
export type ImportPreview = z.infer<typeof importPreviewSchema>;
export const importedStoresSchema = z
  .object({ ingredientCount: z.int(), lotCount: z.int(), skippedCount: z.int() })
  .meta({ id: 'ImportedStores' });
export type ImportedStores = z.infer<typeof importedStoresSchema>;

/* Batches and runs */
export const createBatchSchema = z
  .strictObject({
    revisionId: id,
    plannedOn: calendarDate,
    kettleId: id,
    chillerId: id.nullable(),
    kegId: id,
    probeId: id.nullable(),
    /** Set aside from the stores, by addition; a lot may stand in several. */
    reserve: z
      .array(z.strictObject({ additionId: z.string().min(1).max(60), lotId: id, massG: massMoved }))
      .max(200)
      .default([]),
    /** Where a lot has less left than is asked of it, the hub refuses with `not-enough-stock` until the person says that it may. */
    mayGoBelowZero: z.boolean().default(false),
  })
  .meta({ id: 'CreateBatch' });
export type CreateBatch = z.input<typeof createBatchSchema>;

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
    /** Learned from earlier runs. */
    probeLagErrorRatio: z.number().nullable().default(null),
    chillerPerS: z.number().nullable().default(null),
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
    status: z.enum(['planned', 'running', 'finished', 'abandoned', 'cancelled']),
    volumeL: z.number(),
    run: runSummarySchema.nullable(),
    kettleId: id,
    chillerId: id.nullable(),
    kegId: id,
    probeId: id.nullable(),
  })
  .meta({ id: 'Batch' });
export type Batch = z.infer<typeof batchSchema>;

/** What is weighed into which bag, and from which lot. */
export const weighOutLineSchema = z.object({
  additionId: z.string(),
  kind: ingredientKindSchema,
  name: z.string(),
  massG: z.number(),
  bag: z.string().nullable(),
  lots: z.array(
    z.object({
      lotId: id,
      code: z.string(),
      ingredientName: z.string(),
      massG: z.number(),
      pricePerKg: z.number().nullable(),
      /** `reserved` until the run starts, then `used`. */
      state: z.enum(['reserved', 'used']),
    }),
  ),
});
export type WeighOutLine = z.infer<typeof weighOutLineSchema>;

/** What a batch was planned with: the sheet can be changed until the run starts. */
export const batchPlanSchema = z
  .object({ batchId: id, sheet: runSheetSchema, sheetVersion: z.int(), weighOut: z.array(weighOutLineSchema) })
  .meta({ id: 'BatchPlan' });
export type BatchPlan = z.infer<typeof batchPlanSchema>;

export const updateBatchSheetSchema = z
  .strictObject({ sheet: runSheetSchema, sheetVersion: z.int() })
  .meta({ id: 'UpdateBatchSheet' });
export type UpdateBatchSheet = z.infer<typeof updateBatchSheetSchema>;

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
