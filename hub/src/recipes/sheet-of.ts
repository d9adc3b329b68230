import { ProblemError } from '@steepfall/shared/problems';
import { compileSheet, usualReachS, type RecipeDocument, type RunSheet } from '@steepfall/shared/sheets';

/**
 * The sheet of a document at this place. Gas that no pressure gives is said so at its field, and is not a fault of the hub; every other
 * document that the schema takes makes a sheet.
 *
 * @param at JSON pointer of the document in the request; `null` where the request holds none.
 */
export function sheetOf(document: RecipeDocument, altitudeM: number, at: string | null): RunSheet {
  try {
    return compileSheet(document, { altitudeM, reachS: usualReachS });
  } catch (error) {
    if (!(error instanceof RangeError)) throw error;
    const errors = at === null ? {} : { errors: [{ pointer: `${at}/gas/volumes`, detail: error.message }] };
    throw new ProblemError('not-valid', `This recipe makes no run sheet. ${error.message}`, errors);
  }
}
