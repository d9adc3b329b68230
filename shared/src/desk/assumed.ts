import type { Assumptions, RecipeDocument } from '../sheets/index.js';
import { chillOfDay } from './planned-day.js';
import type { DeskKit } from './types.js';
import { dayKit, usual } from './usual-kit.js';

/** Every default with the value that the figures use now; null where nothing chills the pot. */
export type AssumedValues = Required<Omit<Assumptions, 'chillerConstantPerS'>> & { chillerConstantPerS: number | null };

/** What the figures take for granted on this kit: the recipe's own word where there is one, else the usual. */
export function assumedValues(document: RecipeDocument, kit: DeskKit): AssumedValues {
  const { fillC, roomC, isLidOn } = dayKit(document, kit);
  const { servingMl = usual.servingMl, teaBaseRatio = 1, hopBaseRatio = 1 } = document.assume;
  const chillerConstantPerS = chillOfDay(document, kit)?.kPerS ?? null;
  return { fillC, roomC, servingMl, lidOn: isLidOn, chillerConstantPerS, teaBaseRatio, hopBaseRatio };
}
