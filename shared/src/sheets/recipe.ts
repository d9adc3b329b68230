import { z } from 'zod';

export const ingredientKindSchema = z.enum(['salt', 'acid', 'tea', 'hops']);
export type IngredientKind = z.infer<typeof ingredientKindSchema>;

/** One weighed ingredient going in, and perhaps coming out, at a condition. */
export const additionSchema = z
  .strictObject({
    id: z.string().min(1).max(60),
    kind: ingredientKindSchema,
    name: z.string().min(1).max(80),
    massG: z.number().positive().max(100_000),
    /** Where it waits until it goes in: "bag 2". */
    bag: z.string().max(40).optional(),
  })
  .meta({ id: 'Addition' });
export type Addition = z.infer<typeof additionSchema>;

/** The immutable content of one revision. Temperatures and times are what the brewer means, not what happened. */
export const recipeDocumentSchema = z
  .strictObject({
    volumeL: z.number().positive().max(500),
    waterName: z.string().min(1).max(80),
    /** Water filled into the kettle; more than the drink, for leaf, hops and loss. */
    waterL: z.number().positive().max(600),
    additions: z.array(additionSchema).max(40),
    targetPh: z.strictObject({ min: z.number().min(2).max(9), max: z.number().min(2).max(9) }),
    steep: z.strictObject({
      tempC: z.number().min(20).max(100),
      durationS: z
        .number()
        .positive()
        .max(24 * 3600),
    }),
    hops: z.strictObject({ inC: z.number().min(0).max(100), outC: z.number().min(0).max(100) }),
    transferC: z.number().min(0).max(60),
    gas: z.strictObject({ volumes: z.number().min(0).max(6), tempC: z.number().min(0).max(30) }),
  })
  .meta({ id: 'RecipeDocument' });
export type RecipeDocument = z.infer<typeof recipeDocumentSchema>;
