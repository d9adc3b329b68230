import { z } from 'zod';
import { keep, keepValue, readKeptAs } from '#lib/kept.ts';
import { ValueStore } from '#lib/value-store.ts';
import type { RecipeForm } from './recipe-form.ts';

/**
 * What was typed and not saved, kept on this device for each person and recipe. Local storage, since it is written at once: also while the
 * page is being closed, or before the battery ends.
 */
export interface Draft {
  savedAtMs: number;
  /** The revision that it started from; null for a recipe that is new. */
  baseRevisionId: string | null;
  /** As it was typed, nonsense and all. */
  form: RecipeForm;
}

/** The envelope only: a half-typed form is no valid recipe, and must come back all the same. */
const draftSchema = z.object({
  savedAtMs: z.number(),
  baseRevisionId: z.string().nullable(),
  form: z.object({
    name: z.string(),
    summary: z.string(),
    document: z.looseObject({
      v: z.literal(2),
      waters: z.array(z.looseObject({ id: z.string(), report: z.looseObject({ alkalinity: z.looseObject({}) }) })),
      additions: z.array(z.looseObject({ id: z.string(), kind: z.string(), in: z.looseObject({ at: z.string() }) })),
      gas: z.looseObject({}),
      targets: z.looseObject({ waterPh: z.looseObject({}) }),
      steps: z.looseObject({ own: z.array(z.unknown()) }),
      assume: z.looseObject({}),
    }),
  }),
});

interface Person {
  houseId: string;
  memberId: string;
}

/** `new` in place of an id. */
const keyOf = ({ houseId, memberId }: Person, recipeId: string) => `steepfall.draft.${houseId}.${memberId}.${recipeId}`;

export function readDraft(person: Person, recipeId: string): Draft | null {
  return readKeptAs(draftSchema, keyOf(person, recipeId)) as Draft | null;
}

/** False when the browser keeps nothing (private mode, a full disk): the page then says so. */
export const draftsAreKept = new ValueStore(true);

export function keepDraft(person: Person, recipeId: string, draft: Draft): void {
  draftsAreKept.set(keepValue(keyOf(person, recipeId), draft));
}

export function dropDraft(person: Person, recipeId: string): void {
  keep(keyOf(person, recipeId), null);
}
