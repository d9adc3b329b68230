import { drinkFigures } from '../figures/index.js';
import type { RecipeDocument } from '../sheets/index.js';
import type { UnitPreferences } from '../units/index.js';
import { drinkPlanOf } from './drink-plan.js';
import { figureRows } from './figure-rows.js';
import { plannedDay } from './planned-day.js';
import type { DeskKit, DeskResult } from './types.js';
import { deskWarnings } from './warnings.js';

/**
 * Everything that the desk shows beside a recipe as it is typed. It never throws on a document that the schema takes.
 *
 * @param units of the person who reads the words.
 */
export function deskFigures(document: RecipeDocument, kit: DeskKit, units: UnitPreferences): DeskResult {
  try {
    const day = plannedDay(document, kit);
    const plan = drinkPlanOf(document, kit, day);
    const figures = drinkFigures(plan);
    return {
      kind: 'figures',
      day,
      figures,
      rows: figureRows({ document, day, plan, figures, units }),
      warnings: deskWarnings({ document, kit, day, figures, units }),
    };
  } catch (error) {
    if (!(error instanceof RangeError)) throw error;
    return { kind: 'impossible', what: error.message, act: 'Look at the amounts once more.', path: null };
  }
}
