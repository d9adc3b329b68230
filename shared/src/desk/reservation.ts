import type { RecipeDocument } from '../sheets/index.js';
import { firstToUse, freeG, ingredientOf, type StockedIngredient } from './stocked.js';

/** So much of a lot for an addition. */
export interface ReservationLine {
  additionId: string;
  lotId: string;
  massG: number;
}

/** An addition that the stores cannot fill. */
export interface ReservationShort {
  additionId: string;
  name: string;
  neededG: number;
  /** What is left for it after the additions before it took theirs. */
  freeG: number;
}

export interface Reservation {
  lines: ReservationLine[];
  short: ReservationShort[];
}

const CRUMB_G = 0.0005;
const grams = (massG: number) => Math.round(massG * 1000) / 1000;

/**
 * What to set aside for a batch: lots that must be used first are used first, and an addition is split over lots where one is not
 * enough. Additions of one ingredient share what there is. Masses below half a milligram are not split off.
 *
 * @returns lines in the order of the additions, and what is short: all that the stores do not know of, with 0 g free.
 */
export function proposeReservation(document: RecipeDocument, stocked: readonly StockedIngredient[]): Reservation {
  const left = new Map(stocked.flatMap(({ lots }) => lots.map((lot) => [lot.id, freeG(lot)] as const)));
  const answer: Reservation = { lines: [], short: [] };
  for (const addition of document.additions) {
    const { id: additionId, name, massG } = addition;
    let wantedG = massG;
    for (const lot of firstToUse(ingredientOf(addition, stocked)?.lots ?? [])) {
      const takeG = grams(Math.min(wantedG, left.get(lot.id) ?? 0));
      if (takeG < CRUMB_G || wantedG < CRUMB_G) continue;
      left.set(lot.id, grams((left.get(lot.id) ?? 0) - takeG));
      answer.lines.push({ additionId, lotId: lot.id, massG: takeG });
      wantedG = grams(wantedG - takeG);
    }
    if (wantedG >= CRUMB_G) answer.short.push({ additionId, name, neededG: massG, freeG: grams(massG - wantedG) });
  }
  return answer;
}
