import type { Addition, IngredientKind, RecipeDocument } from './recipe.js';
import type { StepAmount } from './step.js';

export const kindTitle = {
  tea: 'Tea',
  hops: 'Hops',
  other: 'Aromatics',
  acid: 'Acid',
  salt: 'Salts',
} as const satisfies Record<IngredientKind, string>;

/** So that a sentence still fits behind it into the 400 characters of a detail. */
const MOST_NAMES = 300;

/** Names for a detail: forty of them do not fit on a step. */
export function clipped(names: string): string {
  return names.length <= MOST_NAMES ? names : `${names.slice(0, MOST_NAMES - 1)}…`;
}

export function amountsOf(additions: readonly Addition[]): StepAmount[] {
  return additions.map(({ name, massG, bag }) => ({ name, massG, ...(bag ? { bag } : {}) }));
}

export function namesOf(additions: readonly Addition[]): string {
  return additions.map(({ name }) => name).join(', ');
}

/** Leaf, hops, peel: what waits in a bag and comes out again. */
export function isInBag({ kind }: Addition): boolean {
  return kind === 'tea' || kind === 'hops' || kind === 'other';
}

/** "Tea and hops". */
export function titleOf(kinds: readonly IngredientKind[]): string {
  return kinds.map((kind, index) => (index === 0 ? kindTitle[kind] : kindTitle[kind].toLowerCase())).join(' and ');
}

/** Letters that still read from two metres with "out" behind them; longer names stand with the amounts. */
const MOST_TITLE_NAMES = 12;

/** The same, or by name, "Saaz", where the day has more than one charge of the kind. */
export function chargeTitle(additions: readonly Addition[], isOneOfSeveral: boolean): string {
  const kinds = [...new Set(additions.map(({ kind }) => kind))];
  const names = [...new Set(additions.map(({ name }) => name))].join(' and ');
  if (!isOneOfSeveral || names.length > MOST_TITLE_NAMES) return titleOf(kinds);
  return names.charAt(0).toUpperCase() + names.slice(1);
}

/** "60 % Reverse-osmosis water, 40 % Tap water". */
export function watersInWords({ waters }: RecipeDocument): string {
  const [only, ...rest] = waters.filter(({ percent }) => percent > 0);
  if (!only || rest.length === 0) return only?.name ?? 'Water';
  return [only, ...rest].map(({ name, percent }) => `${Number(percent.toFixed(1))} % ${name}`).join(', ');
}

/** Ids that stay the same from revision to revision: "hops-in", then "hops-in-2". */
export type Namer = (stem: string) => string;

export function namer(): Namer {
  const used = new Map<string, number>();
  return (stem) => {
    const count = (used.get(stem) ?? 0) + 1;
    used.set(stem, count);
    return count === 1 ? stem : `${stem}-${count}`;
  };
}
