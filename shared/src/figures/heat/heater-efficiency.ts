import { notNegative, positive } from '../numeric/guard.js';

/**
 * Share of the bought power that reaches the vessel, from low to high. Hobs: Sweeney et al., Induction cooking technology
 * design and assessment, ACEEE 2014, and Schott 2015. Immersed element: from memory, its losses are counted apart.
 * Outdoor gas ring: common practice, no source.
 */
export const heaterEfficiency = {
  gasHob: { low: 0.4, high: 0.44 },
  electricHob: { low: 0.74, high: 0.8 },
  inductionHob: { low: 0.84, high: 0.9 },
  immersedElement: { low: 0.95, high: 1 },
  outdoorGasRing: { low: 0.25, high: 0.45 },
} as const;

export type HeatSource = keyof typeof heaterEfficiency;

/**
 * Efficiency learned from a measured heating rate, 0 and up; above 1 means that the power or the mass is wrong.
 *
 * @param measured heat capacity J/K above 0, rate K/s, power W above 0, losses W of 0 or more.
 * @throws RangeError outside these ranges.
 * @see energy balance: eta = (C r + losses) / P.
 * @example learnedHeaterEfficiency({ heatCapacityJPerK: 43_110, rateCPerS: 0.0418, powerW: 2000, lossW: 0 }) // 0.90
 */
export function learnedHeaterEfficiency(measured: {
  heatCapacityJPerK: number;
  rateCPerS: number;
  powerW: number;
  lossW: number;
}): number {
  const heat =
    positive(measured.heatCapacityJPerK, 'A heat capacity', 'J/K') *
    notNegative(measured.rateCPerS, 'A heating rate', 'K/s');
  return (heat + notNegative(measured.lossW, 'A heat loss', 'W')) / positive(measured.powerW, 'A heating power', 'W');
}
