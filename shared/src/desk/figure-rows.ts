import { plusMinus, type DrinkFigures, type DrinkPlan } from '../figures/index.js';
import type { RecipeDocument } from '../sheets/index.js';
import type { UnitPreferences } from '../units/index.js';
import type { FigureRow, PlannedDay } from './types.js';

/** What the rows of one recipe are made from. */
export interface RowContext {
  document: RecipeDocument;
  day: PlannedDay;
  plan: DrinkPlan;
  figures: DrinkFigures;
  units: UnitPreferences;
}

export function figureRows({ figures }: RowContext): FigureRow[] {
  return [
    {
      id: 'water.ca',
      group: 'water',
      label: 'Calcium',
      quantity: 'mgPerL',
      band: plusMinus(figures.water.ions.ca, 0.01 * figures.water.ions.ca, 'solid'),
      isLead: true,
      word: null,
      target: null,
      workings: 'water.ions',
    },
  ];
}
