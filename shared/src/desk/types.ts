import type { Band, DrinkFigures, PlannedCurve } from '../figures/index.js';
import type { ChillerFacts, KettleFacts } from '../sheets/index.js';

/**
 * What a recipe is planned on. Without a kettle the desk takes a usual one of fitting size; without a chiller the pot cools by
 * itself, unless the recipe tells a chiller constant (`assume.chillerConstantPerS`). The workings say so.
 */
export interface DeskKit {
  altitudeM: number;
  kettle: KettleFacts | null;
  chiller: ChillerFacts | null;
}

/** A moment of the planned day, for the line and for the sums. */
export interface DayMark {
  kind: 'heat' | 'in' | 'out' | 'chill' | 'transfer';
  /** Of an addition: its id. */
  additionId: string | null;
  /** ms from the first flame. */
  atMs: number;
  tempC: number;
}

/** The whole day from cold water to the keg. */
export interface PlannedDay {
  curve: PlannedCurve['curve'];
  marks: readonly DayMark[];
  /** Where it stops short: the kettle never gets so hot, or the chiller never so cold. */
  never: { stage: 'heat' | 'chill'; limitC: number; wantedC: number } | null;
  evaporatedL: number;
}

export type FigureQuantity =
  | 'pH'
  | 'mgPerL'
  | 'meqPerL'
  | 'molPerL'
  | 'uSPerCm'
  | 'gPerL'
  | 'percent'
  | 'ratio'
  | 'mg'
  | 'massG'
  | 'volumeL'
  | 'volumeMl'
  | 'tempC'
  | 'pressureKPa'
  | 'durationS'
  /** Minutes at 80 °C that take out as much. */
  | 'steepMin'
  | 'volumes'
  /** The bitterness index: a number of its own, in no laboratory unit. */
  | 'index';

export type FigureGroup = 'day' | 'water' | 'acid' | 'tea' | 'hops' | 'yield' | 'gas';

/** How a figure is worked out, for the drawer beside it. */
export interface Workings {
  /** What it is, in a sentence that a brewer understands. */
  meaning: string;
  /** The model, in words. */
  model: string;
  source: string;
  /** What makes the band. */
  band: string;
  assumptions: readonly string[];
  /** Members of `assume` in the recipe document that move it. */
  defaults: readonly string[];
}

export interface FigureRow {
  /** Stable: 'water.ca', 'acid.ph-still', 'tea.steep-dose.<additionId>'. */
  id: string;
  group: FigureGroup;
  label: string;
  quantity: FigureQuantity;
  band: Band;
  /** One of the few that lead their group. */
  isLead: boolean;
  /** A word beside the number: "soft", "in the window". */
  word: string | null;
  /** Against the recipe's own target. */
  target: 'in' | 'below' | 'above' | null;
  /** Key of `workings`. */
  workings: string;
}

export type WarningGrade =
  /** Good to know. */
  | 'note'
  /** Do something about it, or choose it on purpose. */
  | 'care'
  /** It touches people's safety or the law of the place. */
  | 'danger';

export interface DeskWarning {
  /** Stable: 'copper', 'kettle-too-full'. */
  id: string;
  grade: WarningGrade;
  /** What is the matter, with its number: plain words, values in inside units are given as `figures`. */
  what: string;
  why: string;
  /** What to do. */
  act: string;
  /** Path in the document that it belongs to, as react-hook-form writes it: 'steepC', 'additions.2.massG'. */
  path: string | null;
}

/** How much of the recipe's acid brings the drink to a pH. */
export type AcidAdvice = {
  /** Of the addition whose grams it is. */
  additionId: string;
  name: string;
  wantedPh: number;
} & (
  | {
      kind: 'dose';
      /** Of the jar, g, all of this acid that the recipe needs; the band is that of the leaf's base. */
      massG: Band;
    }
  /** The drink is that sour without any of it. */
  | { kind: 'none-needed'; ph: number }
  /** This acid cannot do it: too weak for that pH, or more than any drink bears. */
  | { kind: 'never' }
);

export type DeskResult =
  | {
      kind: 'figures';
      day: PlannedDay;
      figures: DrinkFigures;
      rows: readonly FigureRow[];
      warnings: readonly DeskWarning[];
    }
  /** The sum itself cannot be done: what, and where. */
  | { kind: 'impossible'; what: string; act: string; path: string | null };
