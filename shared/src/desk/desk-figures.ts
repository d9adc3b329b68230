import { drinkFigures, type DrinkPlan } from '../figures/index.js';
import type { RecipeDocument } from '../sheets/index.js';
import type { UnitPreferences } from '../units/index.js';
import { drinkPlanOf } from './drink-plan.js';
import { figureRows } from './figure-rows.js';
import { impossibleFigures, refusedFigures } from './impossible.js';
import { plannedDay } from './planned-day.js';
import type { DeskKit, DeskResult } from './types.js';
import { deskWarnings } from './warnings.js';

/**
 * Everything that the desk shows beside a recipe as it is typed: the planned day, the figures as rows, what to think of. It never
 * throws on a document that the schema takes: a sum that cannot be done is an answer, with what to do and where.
 *
 * @param document a valid recipe document.
 * @param units of the person who reads the words.
 * @see workings for what each figure is, its model, source and band.
 */
export function deskFigures(document: RecipeDocument, kit: DeskKit, units: UnitPreferences): DeskResult {
  let plan: DrinkPlan | null = null;
  try {
    const day = plannedDay(document, kit);
    plan = drinkPlanOf(document, kit, day);
    const figures = drinkFigures(plan);
    const impossible = impossibleFigures(document, plan, figures);
    if (impossible) return impossible;
    const context = { document, kit, day, plan, figures, units };
    return { kind: 'figures', day, figures, rows: figureRows(context), warnings: deskWarnings(context) };
  } catch (error) {
    if (error instanceof RangeError) return refusedFigures(document, plan, error);
    throw error;
  }
}
