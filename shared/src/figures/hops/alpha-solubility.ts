import { positive, within } from '../numeric/guard.js';

/** At 60 °C and low pH, mg/L, with its band: a judgement with a factor of three. */
export const alphaSolubilityAt60 = { low: 7, value: 20, high: 60 } as const;

/**
 * Alpha acids that can be dissolved, mg/L: only their ionised form dissolves well, so acid and cold put them out as haze.
 *
 * @param tempC 0 to 130 °C.
 * @param ph 2 to 9.
 * @param at60MgPerL above 0.
 * @throws RangeError outside these ranges.
 * @see judgement through 90 mg/L at pH 5.2 (Malowicki 2004) and 40 mg/L at pH 5.0 in the cold (HVG).
 * @example alphaSolubilityMgPerL(60, 3.7) // 20.3
 */
export function alphaSolubilityMgPerL(
  tempC: number,
  ph: number,
  at60MgPerL: number = alphaSolubilityAt60.value,
): number {
  const warm = Math.exp(0.02 * (within(tempC, 'A temperature', 0, 130, '°C') - 60));
  return positive(at60MgPerL, 'A solubility', 'mg/L') * warm * (1 + 10 ** (within(ph, 'A pH', 2, 9) - 5.5));
}
