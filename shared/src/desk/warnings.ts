import type { DrinkFigures } from '../figures/index.js';
import type { RecipeDocument } from '../sheets/index.js';
import type { UnitPreferences } from '../units/index.js';
import type { DeskKit, DeskWarning, PlannedDay } from './types.js';

export interface WarningContext {
  document: RecipeDocument;
  kit: DeskKit;
  day: PlannedDay;
  figures: DrinkFigures;
  units: UnitPreferences;
}

export function deskWarnings(context: WarningContext): DeskWarning[] {
  return context.day.never ? [] : [];
}
