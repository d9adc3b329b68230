import { z } from 'zod';
import { acidSchema, hopFormSchema, leafFormSchema, saltSchema, teaKindSchema } from '../sheets/index.js';

const number = () => z.number('Type a number.');
const name = z
  .string('Give it a name.')
  .trim()
  .min(1, 'Give it a name.')
  .max(80, 'Use 80 characters or fewer.')
  .refine((text) => text === '' || /[^\p{C}\p{Z}]/u.test(text), 'Give it a name that can be seen.');
const percent = number().min(1, 'From 1 %.').max(100, 'At most 100 %.');

const common = {
  name,
  /** Below this the stores say so; null: they keep quiet. */
  lowStockG: number().min(0, 'A mass of 0 g or more.').max(1_000_000, 'At most 1000 kg.').nullable(),
  /** As it stands on the packet: "may contain nuts". */
  allergens: z.string().trim().max(200, 'Use 200 characters or fewer.'),
};

/** What is kept on the shelf under one name. What differs from delivery to delivery is in its lots. */
export const ingredientFactsSchema = z
  .discriminatedUnion('kind', [
    z.strictObject({ ...common, kind: z.literal('salt'), salt: saltSchema, assayPercent: percent }),
    z.strictObject({ ...common, kind: z.literal('acid'), acid: acidSchema, strengthPercent: percent }),
    z.strictObject({
      ...common,
      kind: z.literal('tea'),
      tea: teaKindSchema,
      form: leafFormSchema,
      caffeineMgPerG: number().min(0, 'From 0 mg/g.').max(100, 'At most 100 mg/g.').nullable(),
    }),
    z.strictObject({ ...common, kind: z.literal('hops'), form: hopFormSchema }),
    z.strictObject({ ...common, kind: z.literal('other') }),
  ])
  .meta({ id: 'IngredientFacts' });
export type IngredientFacts = z.infer<typeof ingredientFactsSchema>;

const calendarDate = z.iso.date('Write the date as YYYY-MM-DD.');

/** What one delivery says of itself. */
export const lotFactsSchema = z
  .strictObject({
    /** As printed on the packet. */
    code: z.string('Type the lot number.').trim().min(1, 'Type the lot number.').max(60, 'Use 60 characters or fewer.'),
    receivedOn: calendarDate,
    bestBefore: calendarDate.nullable(),
    /** In the currency of the house; null: not known. */
    pricePerKg: number().min(0, 'A price of 0 or more.').max(1_000_000, 'At most 1 000 000.').nullable(),
    note: z.string().trim().max(400, 'Use 400 characters or fewer.'),
    /** Hops only: what the laboratory of the maker wrote, at harvest. */
    hops: z
      .strictObject({
        alphaPercent: number().min(0, 'From 0 %.').max(30, 'At most 30 %.'),
        oilMlPer100G: number().min(0, 'From 0 mL.').max(10, 'At most 10 mL.').nullable(),
        harvestedOn: calendarDate.nullable(),
        storageIndex: number().min(0.2, 'From 0.2.').max(2.5, 'At most 2.5.').nullable(),
      })
      .nullable(),
  })
  .meta({ id: 'LotFacts' });
export type LotFacts = z.infer<typeof lotFactsSchema>;

/** Why a mass changed: the kinds of line in the ledger of a lot. */
export const lotMoveKindSchema = z.enum(['received', 'used', 'adjusted', 'undone']);
export type LotMoveKind = z.infer<typeof lotMoveKindSchema>;
