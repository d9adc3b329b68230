import {
  acidDose,
  acidKinds,
  acidMolPerL,
  acidFigures,
  band,
  lotMultiplier,
  saltedWater,
  type AcidKind,
  type Band,
  type DrinkAcidity,
  type DrinkPlan,
} from '../figures/index.js';
import type { RecipeDocument } from '../sheets/index.js';
import { drinkPlanOf } from './drink-plan.js';
import { leafBasesOf } from './leaf-bases.js';
import { plannedDay } from './planned-day.js';
import type { AcidAdvice, DeskKit } from './types.js';

/** The usual aim of a hop tea: tart, and under the lines of food codes (common practice, no source). */
export const USUAL_DRINK_PH = 3.8;
const TEMP_C = 25;
/** Nobody doses an acid for more. */
const MOST_PH = 8;
/** More acid than any drink bears, of the jar, g/L (common practice, no source). */
const MOST_G_PER_L = 50;

type AcidLine = Extract<RecipeDocument['additions'][number], { kind: 'acid' }>;

/** The acid that is dosed: the first one of the recipe. */
export function leadingAcid({ additions }: RecipeDocument): AcidLine | null {
  return additions.find((one): one is AcidLine => one.kind === 'acid') ?? null;
}

export function wantedPh({ targets: { drinkPh } }: RecipeDocument): number {
  return drinkPh ? Math.min(MOST_PH, (drinkPh.min + drinkPh.max) / 2) : USUAL_DRINK_PH;
}

/** The drink as the pH sees it, without the additions that are left out; with a base of leaf. */
export function acidityOf(
  plan: DrinkPlan,
  leafBaseMeqPerL: number,
  without: (kind: AcidKind) => boolean = () => false,
): DrinkAcidity {
  const acidsMolPerL: DrinkAcidity['acidsMolPerL'] = {};
  for (const addition of plan.acids) {
    if (without(addition.acid)) continue;
    const { dissociates } = acidKinds[addition.acid];
    acidsMolPerL[dissociates] = (acidsMolPerL[dissociates] ?? 0) + acidMolPerL(addition, plan.waterL);
  }
  return { water: saltedWater(plan.waterL, plan.salts, plan.source), acidsMolPerL, leafBaseMeqPerL, tempC: TEMP_C };
}

/** Grams of one acid of the recipe for a still pH, in place of what there is of it, at a base of leaf. */
export function gramsForPh(
  plan: DrinkPlan,
  { acid, strengthPercent }: Pick<AcidLine, 'acid' | 'strengthPercent'>,
  leafBaseMeqPerL: number,
  ph: number,
): { kind: 'dose'; massG: number } | { kind: 'none-needed'; ph: number } | { kind: 'never' } {
  const rest = acidityOf(plan, leafBaseMeqPerL, (kind) => kind === acid);
  const dose = acidDose(rest, ph, acid, strengthPercent ?? 100);
  if (dose.kind !== 'add') return dose;
  return dose.gPerL > MOST_G_PER_L ? { kind: 'never' } : { kind: 'dose', massG: dose.gPerL * plan.waterL };
}

/** Null where the sum refuses: the page then says why. */
function orNull<Value>(work: () => Value): Value | null {
  try {
    return work();
  } catch (error) {
    if (error instanceof RangeError) return null;
    throw error;
  }
}

function basesOf(document: RecipeDocument, kit: DeskKit): { plan: DrinkPlan; base: Band } {
  const plan = drinkPlanOf(document, kit, plannedDay(document, kit));
  const acid = acidFigures(plan, saltedWater(plan.waterL, plan.salts, plan.source));
  return { plan, base: leafBasesOf(document, acid).all };
}

/** Grams of an acid for a pH, over what is believed of the leaf's base. */
export function gramsBand(
  plan: DrinkPlan,
  line: AcidLine,
  base: Band,
  ph: number,
): { kind: 'dose'; massG: Band } | { kind: 'none-needed'; ph: number } | { kind: 'never' } {
  const at = (meqPerL: number) => gramsForPh(plan, line, meqPerL, ph);
  const middle = at(base.value);
  if (middle.kind !== 'dose') return middle;
  const low = at(base.low);
  const high = at(base.high);
  const massG = band(
    low.kind === 'dose' ? Math.min(low.massG, middle.massG) : 0,
    middle.massG,
    high.kind === 'dose' ? Math.max(high.massG, middle.massG) : middle.massG,
    base.grade,
  );
  return { kind: 'dose', massG };
}

/**
 * How much of the recipe's acid brings the drink to the middle of its pH target, or to 3.8; null without an acid, or where no pH
 * can be worked out. Other acids stay as they are.
 *
 * @param document a valid recipe document.
 * @see acid-dose.ts; the band is that of the leaf's base, 0.6 to 1.7 times unless it was learned.
 */
export function acidAdvice(document: RecipeDocument, kit: DeskKit): AcidAdvice | null {
  const line = leadingAcid(document);
  return line && orNull(() => adviceOn(document, kit, line));
}

function adviceOn(document: RecipeDocument, kit: DeskKit, line: AcidLine): AcidAdvice {
  const { plan, base } = basesOf(document, kit);
  const ph = wantedPh(document);
  return { additionId: line.id, name: line.name, wantedPh: ph, ...gramsBand(plan, line, base, ph) };
}

/**
 * How much more base this tea and these hops bring than usual, from one measured pH of the finished drink: for
 * `assume.teaBaseRatio` and `assume.hopBaseRatio`. Null when no ratio from 0 to 20 explains it, or there is no leaf.
 *
 * @param measuredPh still, degassed, at 20 to 25 °C, 1 to 9.
 * @see lot-multiplier.ts.
 */
export function baseRatioFromPh(document: RecipeDocument, kit: DeskKit, measuredPh: number): number | null {
  const usualLeaf = { ...document, assume: { ...document.assume, teaBaseRatio: 1, hopBaseRatio: 1 } };
  return orNull(() => {
    const { plan, base } = basesOf(usualLeaf, kit);
    return base.value > 0 ? lotMultiplier(acidityOf(plan, base.value), measuredPh) : null;
  });
}
