import { ProblemError } from '@steepfall/shared/problems';
import { compileSheet, usualReachS, type RecipeDocument, type RunSheet } from '@steepfall/shared/sheets';
import { ZodError } from 'zod';

/** What in the document keeps a step from having room for it. */
function fieldOf({ path: [, , member] }: ZodError['issues'][number]): { pointer: string; detail: string } {
  if (member === undefined)
    return {
      pointer: '/steps/own',
      detail: 'A step of your own has the id of another one, or there are too many steps.',
    };
  if (member === 'amounts')
    return { pointer: '/additions', detail: 'More goes in at one moment than a step can list: spread it over two.' };
  return { pointer: '/additions', detail: 'More happens at one moment than a step can say: spread it over two.' };
}

/**
 * The sheet of a document at this place. A plan that physics does not allow, or that makes no sheet, is said so at the field, and is not
 * a fault of the hub.
 *
 * @param at JSON pointer of the document in the request; `null` where the request holds none.
 */
export function sheetOf(document: RecipeDocument, altitudeM: number, at: string | null): RunSheet {
  try {
    return compileSheet(document, { altitudeM, reachS: usualReachS });
  } catch (error) {
    const field =
      error instanceof RangeError
        ? { pointer: '/gas/volumes', detail: error.message }
        : error instanceof ZodError && error.issues[0]
          ? fieldOf(error.issues[0])
          : null;
    if (!field) throw error;
    const errors = at === null ? {} : { errors: [{ ...field, pointer: `${at}${field.pointer}` }] };
    throw new ProblemError('not-valid', `This recipe makes no run sheet. ${field.detail}`, errors);
  }
}
