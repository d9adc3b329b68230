import { afterTheDay } from './compile-after.js';
import { beforeTheHeat, theHeat } from './compile-before.js';
import { theDay } from './compile-day.js';
import { namer } from './compile-words.js';
import type { RecipeDocument } from './recipe.js';
import { inStepOrder, type StepDraft } from './step-order.js';
import { runSheetSchema, type RunSheet } from './step.js';

/** What the sheet needs to know of the kit it is brewed on. */
export interface SheetKit {
  altitudeM: number;
  /** Seconds this brewer needs from alert to act. */
  reachS: number;
}

/**
 * The run sheet of a revision on this kit: every step with its conditions, amounts and cautions. The gas pressure is
 * computed for this drink (nearly water) at its temperature and altitude, not read from a beer chart.
 *
 * @param document as `recipeDocumentSchema` takes it.
 * @param kit altitude -500 to 11 000 m, reach 0 to 120 s.
 * @throws RangeError when no pressure gives the gas that is asked for; nothing else of a document keeps it from its sheet.
 */
export function compileSheet(document: RecipeDocument, kit: SheetKit): RunSheet {
  const steps = draftSteps(document, kit.altitudeM).map((draft) => ({
    start: { by: 'hand' },
    done: { by: 'hand' },
    reachS: kit.reachS,
    ...draft,
  }));
  return runSheetSchema.parse({ steps, volumeL: document.volumeL });
}

/**
 * The same steps in their order, unchecked and without their defaults: to compare what two documents would ask for.
 *
 * @throws RangeError as `compileSheet`.
 */
export function draftSteps(document: RecipeDocument, altitudeM: number): StepDraft[] {
  const name = namer();
  const drafts = [
    ...beforeTheHeat(document, name),
    ...theHeat(document),
    ...theDay(document, name),
    ...afterTheDay(document, altitudeM),
  ];
  return inStepOrder(drafts, document.steps);
}
