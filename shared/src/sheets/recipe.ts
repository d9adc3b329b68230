import { z } from 'zod';
import {
  acidKinds,
  leafCaffeineMgPerG,
  leafForms,
  saltKinds,
  steepWindows,
  type AcidKind,
  type CaffeineClass,
  type LeafForm,
  type Salt,
  type TeaKind,
} from '../figures/index.js';
import { cautionSchema, measuredQuantitySchema, meanwhileTaskSchema } from './step.js';

const keysOf = <Key extends string>(table: Record<Key, unknown>) => Object.keys(table) as [Key, ...Key[]];

export const saltSchema = z.enum(keysOf<Salt>(saltKinds), 'Choose the salt.');
export const acidSchema = z.enum(keysOf<AcidKind>(acidKinds), 'Choose the acid.');
export const teaKindSchema = z.enum(keysOf<TeaKind>(steepWindows), 'Choose the kind of tea.');
export const caffeineClassSchema = z.enum(keysOf<CaffeineClass>(leafCaffeineMgPerG));
export const leafFormSchema = z.enum(keysOf<LeafForm>(leafForms), 'Choose how the leaf is cut.');
export const hopFormSchema = z.enum(['pellets', 'cones'], 'Choose the form of the hops.');

const DAY_S = 24 * 3600;
const number = () => z.number('Type a number.');
const tempC = number().min(0, 'From 0 °C up.').max(100, 'At most 100 °C: it is water.');
const durationS = number().positive('A time above 0.').max(DAY_S, 'At most 24 hours.');

/** When an addition goes in. */
export const additionInSchema = z
  .discriminatedUnion('at', [
    /** Into the cold water, before the heat. */
    z.strictObject({ at: z.literal('fill') }),
    /** When the steep temperature is reached, or so much later. */
    z.strictObject({ at: z.literal('steep'), afterS: number().min(0, 'A time of 0 or more.').max(DAY_S) }),
    /** Caught while the temperature falls through this. */
    z.strictObject({ at: z.literal('falling'), tempC }),
    /** Into the keg. */
    z.strictObject({ at: z.literal('transfer') }),
  ])
  .meta({ id: 'AdditionIn' });
export type AdditionIn = z.infer<typeof additionInSchema>;

/** When leaf or hops come out again. */
export const additionOutSchema = z
  .discriminatedUnion('at', [
    /** So long after it went in. */
    z.strictObject({ at: z.literal('timer'), durationS }),
    z.strictObject({ at: z.literal('falling'), tempC }),
    /** It stays in until the drink goes into the keg. */
    z.strictObject({ at: z.literal('transfer') }),
  ])
  .meta({ id: 'AdditionOut' });
export type AdditionOut = z.infer<typeof additionOutSchema>;

const additionShape = {
  id: z.string().min(1).max(60),
  name: z.string('Give it a name.').trim().min(1, 'Give it a name.').max(80, 'Use 80 characters or fewer.'),
  massG: number().positive('A mass above 0 g.').max(100_000, 'At most 100 kg.'),
  /** What stays when the volume changes: the grams, or the grams per litre of water. */
  keeps: z.enum(['mass', 'g-per-l']),
  /** Where it waits until it goes in: "bag 2". */
  bag: z.string().trim().max(40, 'Use 40 characters or fewer.').optional(),
  /** The ingredient of the stores that it stands for. */
  ingredientId: z.uuid().optional(),
};
const leafShape = { in: additionInSchema, out: additionOutSchema };

/** One weighed ingredient going in, and perhaps coming out, at a condition. A blend is several of one kind. */
export const additionSchema = z
  .discriminatedUnion('kind', [
    z.strictObject({
      ...additionShape,
      kind: z.literal('salt'),
      salt: saltSchema,
      /** Share of the jar that is the salt. */
      assayPercent: number().min(1, 'From 1 %.').max(100, 'At most 100 %.').optional(),
      in: additionInSchema,
    }),
    z.strictObject({
      ...additionShape,
      kind: z.literal('acid'),
      acid: acidSchema,
      strengthPercent: number().min(1, 'From 1 %.').max(100, 'At most 100 %.').optional(),
      in: additionInSchema,
    }),
    z.strictObject({
      ...additionShape,
      kind: z.literal('tea'),
      tea: teaKindSchema,
      form: leafFormSchema,
      /** Told by its maker or a laboratory; unless told, that of its kind. */
      caffeineMgPerG: number().min(0, 'From 0 mg/g.').max(100, 'At most 100 mg/g.').optional(),
      ...leafShape,
    }),
    z.strictObject({
      ...additionShape,
      kind: z.literal('hops'),
      form: hopFormSchema,
      /** Alpha acids today, % of mass. */
      alphaPercent: number().min(0, 'From 0 %.').max(30, 'At most 30 %.'),
      storageIndex: number().min(0.2, 'From 0.2.').max(2.5, 'At most 2.5.').optional(),
      ...leafShape,
    }),
    /** Fruit peel, spice, flower: weighed and timed, in no sum but the yield. */
    z.strictObject({ ...additionShape, kind: z.literal('other'), ...leafShape }),
  ])
  .meta({ id: 'Addition' });
export type Addition = z.infer<typeof additionSchema>;
export const ingredientKindSchema = z.enum(['salt', 'acid', 'tea', 'hops', 'other']);
export type IngredientKind = z.infer<typeof ingredientKindSchema>;

const mgPerL = number().min(0, 'From 0 mg/L.').max(5000, 'At most 5000 mg/L: this is not drinking water.');

/** A water report as it is typed in. */
export const waterReportSchema = z
  .strictObject({
    caMgPerL: mgPerL,
    mgMgPerL: mgPerL,
    naMgPerL: mgPerL,
    kMgPerL: mgPerL.optional(),
    clMgPerL: mgPerL,
    so4MgPerL: mgPerL,
    alkalinity: z.strictObject({ as: z.enum(['hco3', 'caco3']), mgPerL }),
  })
  .meta({ id: 'WaterReportForm' });

/** One of the waters that are poured together; a single one has the whole. */
export const waterPartSchema = z.strictObject({
  id: z.string().min(1).max(60),
  name: z.string().trim().min(1, 'Give it a name.').max(80, 'Use 80 characters or fewer.'),
  /** Share of the water in the kettle. */
  percent: number().min(0, 'From 0 %.').max(100, 'At most 100 %.'),
  report: waterReportSchema,
});
export type WaterPart = z.infer<typeof waterPartSchema>;

/** A step that the brewer adds to those that follow from the recipe. */
export const ownStepSchema = z
  .strictObject({
    id: z.string().min(1).max(60),
    title: z.string().trim().min(1, 'Say what to do, verb first.').max(80, 'Use 80 characters or fewer.'),
    detail: z.string().trim().max(400, 'Use 400 characters or fewer.').optional(),
    /** Id of the step that it follows; at the head of the sheet without one. */
    afterStepId: z.string().max(60).optional(),
    done: z.discriminatedUnion('by', [
      z.strictObject({ by: z.literal('hand') }),
      z.strictObject({ by: z.literal('timer'), durationS }),
    ]),
    asks: measuredQuantitySchema.optional(),
    meanwhile: z.array(meanwhileTaskSchema).max(10).optional(),
    cautions: z.array(cautionSchema).max(6).optional(),
  })
  .meta({ id: 'OwnStep' });
export type OwnStep = z.infer<typeof ownStepSchema>;

/** What the figures take for granted unless the brewer knows better. */
export const assumptionsSchema = z
  .strictObject({
    /** Water as it comes from the tap. */
    fillC: number().min(0, 'From 0 °C.').max(60, 'At most 60 °C.'),
    roomC: number().min(0, 'From 0 °C.').max(45, 'At most 45 °C.'),
    servingMl: number().positive('A serving above 0 mL.').max(2000, 'At most 2000 mL.'),
    lidOn: z.boolean(),
    /** Stirred, toward the coolant. */
    chillerConstantPerS: number().positive('A constant above 0.').max(0.05, 'At most 0.05 a second.'),
    /** How much more base this tea and these hops bring than usual, from a measured pH. */
    teaBaseRatio: number().min(0, 'From 0.').max(20, 'At most 20.'),
    hopBaseRatio: number().min(0, 'From 0.').max(20, 'At most 20.'),
  })
  .partial()
  .meta({ id: 'Assumptions' });
export type Assumptions = z.infer<typeof assumptionsSchema>;

const haveOwnIds = (list: readonly { id: string }[]) => new Set(list.map(({ id }) => id)).size === list.length;

const ph = number().min(2, 'From pH 2.').max(9, 'At most pH 9.');
const phRange = z
  .strictObject({ min: ph, max: ph })
  .refine(({ min, max }) => min <= max, { path: ['max'], message: 'The upper end is below the lower one.' });

/** The immutable content of one revision. Temperatures and times are what the brewer means, not what happened. */
export const recipeDocumentSchema = z
  .strictObject({
    v: z.literal(2),
    /** Drink wanted in the keg. */
    volumeL: number().positive('A volume above 0 L.').max(500, 'At most 500 L.'),
    /** Water filled into the kettle; more than the drink, for leaf, hops and loss. */
    waterL: number().positive('A volume above 0 L.').max(600, 'At most 600 L.'),
    waters: z
      .array(waterPartSchema)
      .min(1, 'Add a water.')
      .max(6, 'At most 6 waters.')
      .refine(haveOwnIds, 'Two waters have the same id.'),
    additions: z
      .array(additionSchema)
      .max(40, 'At most 40 additions.')
      .refine(haveOwnIds, 'Two additions have the same id.'),
    /** Where the treated water leaves the cold, and the tea goes in. */
    steepC: number().min(1, 'From 1 °C.').max(100, 'At most 100 °C: it is water.'),
    transferC: number().min(0, 'From 0 °C.').max(60, 'At most 60 °C.'),
    gas: z.strictObject({
      volumes: number().min(0, 'From 0.').max(6, 'At most 6.'),
      tempC: number().min(0, 'From 0 °C.').max(30, 'At most 30 °C.'),
    }),
    targets: z.strictObject({
      /** Of the treated water, measured on a cooled sample before the heat. */
      waterPh: phRange,
      /** Of the drink, still and degassed. */
      drinkPh: phRange.optional(),
      caffeineMostMgPerL: number().positive('Above 0 mg/L.').max(2000, 'At most 2000 mg/L.').optional(),
    }),
    steps: z.strictObject({
      own: z
        .array(ownStepSchema)
        .max(20, 'At most 20 steps of your own.')
        .refine(haveOwnIds, 'Two steps of your own have the same id.'),
      /** Ids in the order that the brewer wants; steps that are not named keep their place after the one before. */
      order: z.array(z.string().min(1).max(60)).max(100).optional(),
    }),
    assume: assumptionsSchema,
  })
  .refine(({ waters }) => Math.abs(waters.reduce((sum, { percent }) => sum + percent, 0) - 100) < 0.05, {
    path: ['waters'],
    message: 'The waters together are 100 %.',
  })
  .meta({ id: 'RecipeDocument' });
export type RecipeDocument = z.infer<typeof recipeDocumentSchema>;
