import { z } from 'zod';

/** A hand with its gloves on, from alert to act, s. */
export const usualReachS = 10;

/** What kind of work a step is. The kind picks the shape and the words on the sheet, never the rules. */
export const stepKindSchema = z.enum([
  'prepare',
  'fill',
  'heat',
  'dose',
  'measure',
  'add',
  'steep',
  'remove',
  'chill',
  'catch',
  'transfer',
  'charge',
  'taste',
  'clean',
]);
export type StepKind = z.infer<typeof stepKindSchema>;

/** What is done to the vessel by a step: the watch and the simulated kettle both react to it. */
export const vesselActSchema = z.enum([
  'heat-on',
  'heat-off',
  'lid-on',
  'lid-off',
  'coil-in',
  'tea-in',
  'tea-out',
  'chiller-on',
  'chiller-off',
  'hops-in',
  'hops-out',
  'stirred',
]);
export type VesselAct = z.infer<typeof vesselActSchema>;

/** What can be measured on a run, with the unit in the name (pH has none). */
export const measuredQuantitySchema = z.enum(['pH', 'tempC', 'volumeL', 'massG', 'pressureKPa', 'tasteScore']);
export type MeasuredQuantity = z.infer<typeof measuredQuantitySchema>;

export const directionSchema = z.enum(['rising', 'falling']);
export type Direction = z.infer<typeof directionSchema>;

const byHand = z.strictObject({ by: z.literal('hand') });
const byTemperature = z.strictObject({
  by: z.literal('temperature'),
  direction: directionSchema,
  tempC: z.number().min(-5).max(105),
});

/** When a step may begin: at once, when a person gets to it, or when the liquid crosses a level. */
export const startConditionSchema = z.discriminatedUnion('by', [byHand, byTemperature]).meta({ id: 'StartCondition' });
export type StartCondition = z.infer<typeof startConditionSchema>;

/** What makes a step done. Only `hand` needs a person; the others advance by themselves. */
export const doneConditionSchema = z
  .discriminatedUnion('by', [
    byHand,
    byTemperature,
    z.strictObject({
      by: z.literal('timer'),
      durationS: z
        .number()
        .positive()
        .max(14 * 24 * 3600),
    }),
    z.strictObject({
      by: z.literal('measurement'),
      quantity: measuredQuantitySchema,
      min: z.number().optional(),
      max: z.number().optional(),
    }),
  ])
  .meta({ id: 'DoneCondition' });
export type DoneCondition = z.infer<typeof doneConditionSchema>;

/** The usual cautions of the trade; their words are in `cautions.ts`. */
export const cautionSchema = z.enum([
  'scald',
  'co2',
  'pressure',
  'acid',
  'dogs',
  'lift',
  'caffeine',
  'allergens',
  'cold',
  'burner',
]);
export type Caution = z.infer<typeof cautionSchema>;

/** One thing that is weighed and goes in with a step. */
export const stepAmountSchema = z.strictObject({
  name: z.string().min(1).max(80),
  massG: z.number().positive().max(100_000),
  /** The bag or cup it waits in, so that a wet hand finds it: "bag 2". */
  bag: z.string().max(40).optional(),
});
export type StepAmount = z.infer<typeof stepAmountSchema>;

/** A number that a step sets; shown in the reader's units. */
export const stepSettingSchema = z.strictObject({
  label: z.string().min(1).max(40),
  quantity: measuredQuantitySchema,
  value: z.number(),
});
export type StepSetting = z.infer<typeof stepSettingSchema>;

/** A small task to do while a step waits ("rinse the tea bag"). */
export const meanwhileTaskSchema = z.strictObject({ id: z.string().min(1).max(60), text: z.string().min(1).max(160) });
export type MeanwhileTask = z.infer<typeof meanwhileTaskSchema>;

export const stepSchema = z
  .strictObject({
    id: z.string().min(1).max(60),
    kind: stepKindSchema,
    /** Verb first, few words: "Hops in". */
    title: z.string().min(1).max(80),
    /** What to know while doing it, in a sentence or two. */
    detail: z.string().max(400).optional(),
    amounts: z.array(stepAmountSchema).max(40).default([]),
    start: startConditionSchema,
    done: doneConditionSchema,
    /** What doing this step does to the vessel. */
    acts: z.array(vesselActSchema).max(4).default([]),
    meanwhile: z.array(meanwhileTaskSchema).max(10).default([]),
    cautions: z.array(cautionSchema).max(6).default([]),
    /** Seconds this person needs from alert to act. */
    reachS: z.number().min(0).max(120).default(usualReachS),
    /** What is set or filled, with its number: "gauge pressure 96 kPa". */
    settings: z.array(stepSettingSchema).max(4).default([]),
    /** A measurement that the step asks for without waiting on its value. */
    asks: measuredQuantitySchema.optional(),
  })
  .meta({ id: 'Step' });
export type Step = z.infer<typeof stepSchema>;

/** The ordered steps of one run, copied into its first event: later edits cannot rewrite the past. */
export const runSheetSchema = z
  .strictObject({
    steps: z
      .array(stepSchema)
      .min(1)
      // Forty additions that each go in, stand and come out by themselves, those of the brewer, and the usual ones.
      .max(250)
      .refine((steps) => new Set(steps.map((step) => step.id)).size === steps.length, 'Two steps have the same id.'),
    /** Volume of finished drink the sheet was compiled for. */
    volumeL: z.number().positive().max(500),
  })
  .meta({ id: 'RunSheet' });
export type RunSheet = z.infer<typeof runSheetSchema>;
