import type { SlopeLaw } from './kalman.js';
import type { KettleState } from './state.js';

/** What the liquid gives its heat to. */
export interface Surroundings {
  roomC: number;
  coolantC: number;
  kettle: KettleState;
}

/** Falling faster than this (K/s, 1.8 K/min) no pot does by itself: something chills it, tapped or not. */
export const CHILLING_C_PER_S = 0.03;
/** Exponents of the cooling law, as in figures/heat/power-law-cooling.ts. */
const LIDDED_EXPONENT = 1.25;
const OPEN_EXPONENT = 1.5;
const CHILLER_EXPONENT = 1;
/** Rate constant of a pot's own losses in 1/s, which bend a heating curve. */
const LOSSES_PER_S = 1.6e-4;
/** Relative wander of the slope, per square root of a second. */
const SLOPE_WANDER = 1e-3;
const LEAST_WANDER = 4e-10;

/** How the slope will change, given where the liquid is and how fast it moves: chilling and open cooling shade into each other. */
export function slopeLaw(tempC: number, rateCPerS: number, around: Surroundings): SlopeLaw {
  const wander = (SLOPE_WANDER * rateCPerS) ** 2 + LEAST_WANDER;
  if (rateCPerS >= 0) return { decayPerS: LOSSES_PER_S, decayGrows: 0, wander };
  const fall = -rateCPerS;
  const chilled = around.kettle.chilling ? 1 : Math.min(1, Math.max(0, fall / CHILLING_C_PER_S - 0.5));
  const exponent = around.kettle.lidOn ? LIDDED_EXPONENT : OPEN_EXPONENT;
  const passive = (exponent * fall) / Math.max(5, tempC - around.roomC);
  const chill = (CHILLER_EXPONENT * fall) / Math.max(5, tempC - around.coolantC);
  return { decayPerS: passive + chilled * (chill - passive), decayGrows: 1, wander };
}
