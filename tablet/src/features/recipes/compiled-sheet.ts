import { compileSheet, type RecipeDocument, type RunSheet } from '@steepfall/shared/sheets';

/** What the sheet is compiled for when nobody in particular reads it. */
const USUAL_REACH_S = 10;

/** The run sheet of a document, or why there is none. */
export function compiledSheet(document: RecipeDocument, altitudeM: number): RunSheet | string {
  try {
    return compileSheet(document, { altitudeM, reachS: USUAL_REACH_S });
  } catch (error) {
    return error instanceof RangeError ? error.message : 'This recipe gives no run sheet.';
  }
}
