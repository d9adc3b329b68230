import type { RecipeDocument } from '../sheets/index.js';
import type { UnitPreferences } from '../units/index.js';

/** One thing that is not the same in two documents, in a person's words and units. */
export interface Difference {
  /** In the later document, as a form names it: 'additions.2.massG'; of what is gone, in the earlier one. */
  path: string;
  what: string;
  /** Null: it was not there. */
  from: string | null;
  /** Null: it is gone. */
  to: string | null;
}

export function revisionDifferences(
  before: RecipeDocument,
  after: RecipeDocument,
  _units: UnitPreferences,
): Difference[] {
  return JSON.stringify(before) === JSON.stringify(after)
    ? []
    : [{ path: '', what: 'the recipe', from: 'as it was', to: 'changed' }];
}

/** "hops in 62 → 60 °C". */
export function differenceWords({ what, from, to }: Difference): string {
  if (from === null) return `${what} added: ${to ?? ''}`;
  if (to === null) return `${what} taken out (${from})`;
  return `${what} ${from} → ${to}`;
}
