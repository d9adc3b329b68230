import { usFluidOuncesToLiters } from '../../units/index.js';
import { notNegative, positive } from '../numeric/guard.js';

/** Above this the EU asks for words on the label, mg/L. */
export const EU_CAFFEINE_LABEL_MG_PER_L = 150;

/**
 * Whether the EU asks for "high caffeine content" words: above 150 mg/L, unless the drink is based on tea or coffee and its
 * name says tea or coffee.
 *
 * @throws RangeError when negative or not finite.
 * @see Regulation (EU) 1169/2011, Annex III.
 */
export function euCaffeineStatementNeeded(drink: {
  caffeineMgPerL: number;
  teaOrCoffeeBased: boolean;
  nameSaysTeaOrCoffee: boolean;
}): boolean {
  const high = notNegative(drink.caffeineMgPerL, 'Caffeine', 'mg/L') > EU_CAFFEINE_LABEL_MG_PER_L;
  return high && !(drink.teaOrCoffeeBased && drink.nameSaysTeaOrCoffee);
}

/** Caffeine in mg/L from a serving in US fluid ounces. @throws RangeError when out of range. @example caffeineMgPerL(61, 6) // 344 */
export function caffeineMgPerL(servingMg: number, servingFlOz: number): number {
  const servingL = usFluidOuncesToLiters(positive(servingFlOz, 'A serving', 'fl oz'));
  return notNegative(servingMg, 'Caffeine', 'mg') / servingL;
}

/**
 * Servings until a limit; null for a drink without caffeine, which never gets there. Adults: 400 mg a day and 200 mg at
 * once raise no concern (EFSA 2015).
 *
 * @throws RangeError when out of range.
 */
export function servingsToLimit(mgPerL: number, servingMl: number, limitMg: number): number | null {
  const mgPerServing = (notNegative(mgPerL, 'Caffeine', 'mg/L') * positive(servingMl, 'A serving', 'mL')) / 1000;
  const limit = positive(limitMg, 'A caffeine limit', 'mg');
  return mgPerServing === 0 ? null : limit / mgPerServing;
}

/** Caffeine a day that raises no concern for a child or teenager, mg: 3 mg per kg (EFSA 2015). @throws RangeError when not above 0. */
export function childCaffeineMgPerDay(bodyKg: number): number {
  return 3 * positive(bodyKg, 'A body mass', 'kg');
}
