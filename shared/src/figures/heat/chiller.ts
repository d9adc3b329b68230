import { finite, positive } from '../numeric/guard.js';

export interface CoilChiller {
  /** Heat transfer of the coil, above 0, W/K. */
  transferWPerK: number;
  /** Coolant through the coil, above 0, kg/s (about L/s). */
  coolantKgPerS: number;
  coolantInC: number;
  /** Of the kettle and what is in it, above 0, J/K. */
  heatCapacityJPerK: number;
}

/** J/(kg K); the coolant is water. */
const COOLANT_SPECIFIC_HEAT = 4186;

/**
 * Share of the greatest possible cooling that a coil in a stirred vessel gives, above 0 to 1.
 *
 * @throws RangeError when an input is not above 0.
 * @see effectiveness of an exchanger with one side at one temperature: 1 - exp(-UA/(m c)).
 * @example coilEffectiveness(240, 0.1) // 0.436
 */
export function coilEffectiveness(transferWPerK: number, coolantKgPerS: number): number {
  const flowWPerK = positive(coolantKgPerS, 'A coolant flow', 'kg/s') * COOLANT_SPECIFIC_HEAT;
  return -Math.expm1(-positive(transferWPerK, 'A heat transfer', 'W/K') / flowWPerK);
}

/** Cooling constant k of the vessel with the chiller running, 1/s, for Newton's law toward the coolant inlet. */
export function chillerConstantPerS(chiller: CoilChiller): number {
  const share = coilEffectiveness(chiller.transferWPerK, chiller.coolantKgPerS);
  const flowWPerK = chiller.coolantKgPerS * COOLANT_SPECIFIC_HEAT;
  return (share * flowWPerK) / positive(chiller.heatCapacityJPerK, 'A heat capacity', 'J/K');
}

/**
 * Rate of fall with the chiller running, K/s; negative when the coolant warms the liquid.
 *
 * @throws RangeError when an input is out of range.
 * @example chillerFallCPerS(chiller, 60) * 60 // 12.3 K a minute
 */
export function chillerFallCPerS(chiller: CoilChiller, tempC: number): number {
  const height =
    finite(tempC, 'A liquid temperature', '°C') - finite(chiller.coolantInC, 'A coolant temperature', '°C');
  return chillerConstantPerS(chiller) * height;
}

/** Temperature of the coolant as it leaves the coil, °C. */
export function coolantOutC(chiller: CoilChiller, tempC: number): number {
  const height =
    finite(tempC, 'A liquid temperature', '°C') - finite(chiller.coolantInC, 'A coolant temperature', '°C');
  return chiller.coolantInC + coilEffectiveness(chiller.transferWPerK, chiller.coolantKgPerS) * height;
}
