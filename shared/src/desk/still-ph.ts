import { band, drinkPh, type AcidFigures, type Band, type DrinkPlan } from '../figures/index.js';
import type { RecipeDocument } from '../sheets/index.js';
import { acidityOf } from './acid-advice.js';
import { graded, hopsOf, teasOf, type RowContext } from './figure-row.js';

/** What constants and activities leave open. */
const SOLVER_PH = 0.03;

/** A pH with leaf in it carries the band of the leaf's base; without leaf that of the solver alone. */
export function phBandOf(document: RecipeDocument, ph: AcidFigures['phStill']): Band {
  if (teasOf(document).length + hopsOf(document).length === 0) return plainPhBand(ph.value);
  const { teaBaseRatio, hopBaseRatio } = document.assume;
  return graded(ph, teaBaseRatio !== undefined && hopBaseRatio !== undefined ? 'measured' : 'judged');
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
