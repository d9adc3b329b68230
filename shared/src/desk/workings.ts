import { dayWorkings } from './workings-day.js';
import { drinkWorkings } from './workings-drink.js';
import { waterAcidWorkings } from './workings-water-acid.js';
import type { Workings } from './types.js';

/** How each figure is worked out, by the key that its row names. */
export const workings: Readonly<Record<string, Workings>> = {
  ...dayWorkings,
  ...waterAcidWorkings,
  ...drinkWorkings,
};
