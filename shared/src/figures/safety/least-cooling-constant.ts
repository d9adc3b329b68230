import { finite } from '../numeric/guard.js';
import { newtonDurationS } from '../heat/newton.js';
import { coolingRuleLimit } from './cooling-rule.js';

/**
 * The least cooling constant that keeps the cooling rule in a cold place, 1/s, and which of its two limits asks for it;
 * null when the place is not below 5 °C. A lidded 10 L pot in a fridge has about 0.35e-4: chill first.
 *
 * @param surroundC temperature of the cold place, °C.
 * @throws RangeError when not finite.
 * @see FDA Food Code 3-501.14 with Newton's law.
 * @example leastCoolingConstant(4) // { perS: 1.84e-4, ruledBy: 'to-cold' }
 */
export function leastCoolingConstant(surroundC: number): { perS: number; ruledBy: 'to-warm' | 'to-cold' } | null {
  const surround = finite(surroundC, 'A surrounding temperature', '°C');
  const warmTurns = newtonDurationS(57, 21, surround, 1);
  const coldTurns = newtonDurationS(57, 5, surround, 1);
  if (warmTurns === null || coldTurns === null) return null;
  const warmPerS = warmTurns / coolingRuleLimit.hotToWarmS;
  const coldPerS = coldTurns / coolingRuleLimit.hotToColdS;
  return warmPerS > coldPerS ? { perS: warmPerS, ruledBy: 'to-warm' } : { perS: coldPerS, ruledBy: 'to-cold' };
}
