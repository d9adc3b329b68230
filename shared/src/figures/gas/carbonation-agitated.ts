import { notNegative, positive } from '../numeric/guard.js';

/**
 * First-order uptake, 1/h, from low to high. Still: computed (carbonation-still.ts). Shaking and stone in a keg: common
 * practice, no source; a factor of two (still) to ten (stone).
 */
export const uptakePerH = {
  still: { low: 0.01, high: 0.04 },
  shaking: { low: 5, high: 60 },
  stone: { low: 1, high: 20 },
} as const;

export interface AgitatedCarbonation {
  startGPerL: number;
  /** What it would come to rest at under the pressure that is on (co2GPerL). */
  restGPerL: number;
  uptakePerH: number;
}

function checked({ startGPerL, restGPerL, uptakePerH: perH }: AgitatedCarbonation) {
  return {
    start: notNegative(startGPerL, 'A CO2 content', 'g/L'),
    rest: notNegative(restGPerL, 'A CO2 content at rest', 'g/L'),
    perS: positive(perH, 'An uptake', '1/h') / 3600,
  };
}

/**
 * CO2 content after a time with stirring, shaking or a stone, g/L.
 *
 * @param carbonation contents 0 g/L or more, uptake above 0 1/h.
 * @param durationS 0 or more, s.
 * @throws RangeError outside these ranges.
 * @see first-order uptake dC/dt = kLa (C* - C).
 * @example agitatedGPerL({ startGPerL: 0, restGPerL: 5, uptakePerH: 0.025 }, 72 * 3600) // 4.17
 */
export function agitatedGPerL(carbonation: AgitatedCarbonation, durationS: number): number {
  const { start, rest, perS } = checked(carbonation);
  return rest - (rest - start) * Math.exp(-perS * notNegative(durationS, 'A duration', 's'));
}

/**
 * Time until a content is reached, s; null when the pressure that is on never gets there, 0 when it is there.
 *
 * @throws RangeError as above.
 */
export function agitatedDurationS(carbonation: AgitatedCarbonation, targetGPerL: number): number | null {
  const { start, rest, perS } = checked(carbonation);
  const target = notNegative(targetGPerL, 'A CO2 target', 'g/L');
  if (target === start) return 0;
  const share = (rest - start) / (rest - target);
  return Number.isFinite(share) && share > 1 ? Math.log(share) / perS : null;
}
