import { band, drinkPh, type AcidFigures, type Band, type DrinkPlan } from '../figures/index.js';
import type { RecipeDocument } from '../sheets/index.js';
import { acidityOf } from './acid-advice.js';
import { graded, hopsOf, teasOf, type RowContext } from './figure-row.js';

/** With a base ratio from a measured pH the next one is good to about this; a judgement. */
const LEARNED_PH = 0.1;
/** What constants and activities leave open. */
const SOLVER_PH = 0.03;

/** Whether the base of all leaf and hops in it was learned from a measured pH. */
export function isBaseLearned(document: RecipeDocument): boolean {
  const { teaBaseRatio, hopBaseRatio } = document.assume;
  const isTeaKnown = teasOf(document).length === 0 || teaBaseRatio !== undefined;
  const areHopsKnown = hopsOf(document).length === 0 || hopBaseRatio !== undefined;
  return isTeaKnown && areHopsKnown;
}

/** A pH with leaf in it: the band of the leaf's base, or a tenth either way once that was measured. */
export function phBandOf(document: RecipeDocument, ph: AcidFigures['phStill']): Band {
  if (teasOf(document).length + hopsOf(document).length === 0) return plainPhBand(ph.value);
  if (isBaseLearned(document)) return band(ph.value - LEARNED_PH, ph.value, ph.value + LEARNED_PH, 'measured');
  return graded(ph, 'judged');
}

export function plainPhBand(ph: number): Band {
  return band(ph - SOLVER_PH, ph, ph + SOLVER_PH, 'solid');
}

/** The plan with the acid alone that goes into the cold water. */
export function coldAcid({ document, plan }: Pick<RowContext, 'document' | 'plan'>): DrinkPlan {
  const lines = document.additions.filter(({ kind }) => kind === 'acid');
  return { ...plan, acids: plan.acids.filter((_, index) => lines[index]?.in.at === 'fill') };
}

/** What the sheet asks to measure before the heat: acid that goes in later is not in it yet. */
export function treatedWaterPh(context: Pick<RowContext, 'document' | 'plan'>, acid: AcidFigures): number {
  const cold = coldAcid(context);
  return cold.acids.length === context.plan.acids.length ? acid.phAfterAcid : drinkPh(acidityOf(cold, 0)).ph;
}
