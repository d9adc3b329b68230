import type { RecipeDocument } from '../sheets/index.js';
import type { UnitPreferences } from '../units/index.js';
import { differenceWords, revisionDifferences } from './differences.js';

/** A thing that both changed, and not alike. */
export interface Collision {
  what: string;
  mine: string;
  theirs: string;
}

export type Combined = { kind: 'combined'; document: RecipeDocument } | { kind: 'collides'; at: Collision[] };

export function combineRevisions(
  base: RecipeDocument,
  mine: RecipeDocument,
  theirs: RecipeDocument,
  units: UnitPreferences,
): Combined {
  const [ours, others] = [revisionDifferences(base, mine, units), revisionDifferences(base, theirs, units)];
  if (ours.length === 0) return { kind: 'combined', document: theirs };
  if (others.length === 0) return { kind: 'combined', document: mine };
  const words = (list: typeof ours) => list.map(differenceWords).join('; ');
  return { kind: 'collides', at: [{ what: 'the recipe', mine: words(ours), theirs: words(others) }] };
}
