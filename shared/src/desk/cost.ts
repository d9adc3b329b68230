import type { RecipeDocument } from '../sheets/index.js';
import { proposeReservation } from './reservation.js';
import { ingredientOf, type StockedIngredient } from './stocked.js';
import { usual } from './usual-kit.js';

/** What a batch costs in ingredients, in the currency of the house. */
export interface Cost {
  /** Of what has a price; see `unknown`. */
  total: number;
  perL: number | null;
  perServing: number | null;
  /** Names of what has no price: the sum is without them. */
  unknown: string[];
}

/** The part of a line of the weigh-out list that costs. */
export interface CostLine {
  name: string;
  massG: number;
  lots: readonly { massG: number; pricePerKg: number | null }[];
}

export interface CostShare {
  volumeL: number;
  /** Usual serving unless told, mL. */
  servingMl?: number;
}

const CRUMB_G = 0.0005;

/**
 * Cost of a batch from the lots that were set aside or used. What came from no lot, or from one without a price, is named, never
 * counted as free.
 *
 * @param share drink in the batch, L; per litre and per serving are null when it is not above 0.
 */
export function costOf(lines: readonly CostLine[], { volumeL, servingMl = usual.servingMl }: CostShare): Cost {
  const unknown = new Set<string>();
  let total = 0;
  for (const { name, massG, lots } of lines) {
    let pricedG = 0;
    for (const lot of lots) {
      if (lot.pricePerKg === null) continue;
      total += (lot.massG / 1000) * lot.pricePerKg;
      pricedG += lot.massG;
    }
    if (massG - pricedG > CRUMB_G) unknown.add(name);
  }
  const perL = volumeL > 0 ? total / volumeL : null;
  return { total, perL, perServing: perL === null ? null : (perL * servingMl) / 1000, unknown: [...unknown] };
}

/**
 * Cost of a recipe from the lots that would be used first. What the stores are short of is counted at the price of the newest
 * delivery that has one; without any it is named.
 */
export function recipeCost(document: RecipeDocument, stocked: readonly StockedIngredient[]): Cost {
  const { lines } = proposeReservation(document, stocked);
  const costLines = document.additions.map((addition): CostLine => {
    const lots = ingredientOf(addition, stocked)?.lots ?? [];
    const taken = lines
      .filter(({ additionId }) => additionId === addition.id)
      .map(({ lotId, massG }) => ({ massG, pricePerKg: lots.find(({ id }) => id === lotId)?.pricePerKg ?? null }));
    const shortG = addition.massG - taken.reduce((sum, { massG }) => sum + massG, 0);
    const newest = lots
      .filter(({ pricePerKg }) => pricePerKg !== null)
      .sort(byReceived)
      .at(-1);
    const bought = shortG > CRUMB_G && newest ? [{ massG: shortG, pricePerKg: newest.pricePerKg }] : [];
    return { name: addition.name, massG: addition.massG, lots: [...taken, ...bought] };
  });
  const { servingMl } = document.assume;
  return costOf(costLines, { volumeL: document.volumeL, ...(servingMl === undefined ? {} : { servingMl }) });
}

const byReceived = (a: { receivedOn: string }, b: { receivedOn: string }) => a.receivedOn.localeCompare(b.receivedOn);
