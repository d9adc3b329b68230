import { band, type Band, type DrinkFigures, type DrinkPlan, type Grade } from '../figures/index.js';
import type { Addition, RecipeDocument } from '../sheets/index.js';
import type { UnitPreferences } from '../units/index.js';
import type { DeskKit, FigureRow, PlannedDay } from './types.js';

/** What the rows of one recipe are made from. */
export interface RowContext {
  document: RecipeDocument;
  kit: DeskKit;
  day: PlannedDay;
  plan: DrinkPlan;
  figures: DrinkFigures;
  units: UnitPreferences;
}

type RowDraft = Pick<FigureRow, 'id' | 'label' | 'quantity' | 'band'> &
  Partial<Pick<FigureRow, 'isLead' | 'word' | 'target'>> & {
    /** Of what it belongs to, when the same figure is there once for each. */
    of?: string;
    /** Unless told, those of its id, whatever it is a figure of. */
    workings?: string;
  };

/** A row of the group that its id begins with. */
export function row({ of, id, ...draft }: RowDraft): FigureRow {
  return {
    isLead: false,
    word: null,
    target: null,
    workings: id,
    ...draft,
    id: of === undefined ? id : `${id}.${of}`,
    group: id.slice(0, id.indexOf('.')) as FigureRow['group'],
  };
}

/** So much of the value either way. */
export function within(value: number, share: number, grade: Grade): Band {
  const spread = Math.abs(value) * share;
  return band(value - spread, value, value + spread, grade);
}

/** Low, value and high of a figure that comes without its grade. */
export function graded({ low, value, high }: { low: number; value: number; high: number }, grade: Grade): Band {
  return band(Math.min(low, value), value, Math.max(high, value), grade);
}

export function targetOf(value: number, min: number, max: number): FigureRow['target'] {
  if (value < min) return 'below';
  return value > max ? 'above' : 'in';
}

export type Leaf = Extract<Addition, { kind: 'tea' }>;
export type Hops = Extract<Addition, { kind: 'hops' }>;

export function teasOf({ additions }: RecipeDocument): Leaf[] {
  return additions.filter((one): one is Leaf => one.kind === 'tea');
}

export function hopsOf({ additions }: RecipeDocument): Hops[] {
  return additions.filter((one): one is Hops => one.kind === 'hops');
}
