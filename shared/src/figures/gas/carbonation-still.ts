import { waterViscosityPaS } from '../heat/water-viscosity.js';
import { GRAVITY_M_PER_S2 } from '../numeric/constants.js';
import { notNegative, positive } from '../numeric/guard.js';
import { co2DiffusionM2PerS } from './co2-diffusion.js';

/** How much denser one g/L of CO2 makes water, kg/m³ per g/L. */
const DENSITY_PER_G_PER_L = 0.25;
/** Constant of turbulent heat transfer above a hot plate, borrowed (from memory). */
const PLUME_CONSTANT = 0.15;

/**
 * First uptake of a still keg under gas, 1/h: water rich in CO2 is heavier and sinks. A factor of two either way.
 *
 * @param keg temperature 0 to 40 °C, content at rest above 0 g/L, depth of the drink above 0 m (0.55 unless told).
 * @throws RangeError outside these ranges.
 * @see turbulent plumes, kL = 0.15 (D/L) Ra^(1/3); computed.
 * @example stillUptakePerH({ tempC: 3, restGPerL: 5 }) // 0.020
 */
export function stillUptakePerH(keg: { tempC: number; restGPerL: number; depthM?: number }): number {
  const depthM = positive(keg.depthM ?? 0.55, 'A depth', 'm');
  const diffusion = co2DiffusionM2PerS(keg.tempC);
  const heavier = DENSITY_PER_G_PER_L * positive(keg.restGPerL, 'A CO2 content at rest', 'g/L');
  const rayleigh = (GRAVITY_M_PER_S2 * heavier * depthM ** 3) / (waterViscosityPaS(keg.tempC) * diffusion);
  return ((PLUME_CONSTANT * diffusion * Math.cbrt(rayleigh)) / depthM ** 2) * 3600;
}

export interface StillCarbonation {
  startGPerL: number;
  restGPerL: number;
  /** First uptake from nothing, 1/h (stillUptakePerH). */
  uptakePerH: number;
}

function checked({ startGPerL, restGPerL, uptakePerH }: StillCarbonation) {
  const rest = positive(restGPerL, 'A CO2 content at rest', 'g/L');
  return {
    rest,
    missing: 1 - notNegative(startGPerL, 'A CO2 content', 'g/L') / rest,
    perS: positive(uptakePerH, 'An uptake', '1/h') / 3600,
  };
}

/**
 * Time until a still keg reaches a content, s; null when the pressure that is on never gets there (or the keg holds more
 * already and has to lose gas), 0 when it is there.
 *
 * @param carbonation contents 0 g/L or more, rest and uptake above 0.
 * @throws RangeError outside these ranges.
 * @see du/dt = -k0 u^(4/3), u the share that is missing; t = 3 (u^(-1/3) - 1)/k0 from nothing. Computed.
 */
export function stillDurationS(carbonation: StillCarbonation, targetGPerL: number): number | null {
  const { rest, missing, perS } = checked(carbonation);
  const left = 1 - notNegative(targetGPerL, 'A CO2 target', 'g/L') / rest;
  if (left === missing) return 0;
  return left > 0 && missing > left ? (3 / perS) * (left ** (-1 / 3) - missing ** (-1 / 3)) : null;
}

/**
 * Content of a still keg after a time, g/L; a keg at or above its rest is taken to stay as it is.
 *
 * @throws RangeError as above.
 */
export function stillGPerL(carbonation: StillCarbonation, durationS: number): number {
  const { rest, missing, perS } = checked(carbonation);
  const turns = (perS * notNegative(durationS, 'A duration', 's')) / 3;
  return missing <= 0 ? carbonation.startGPerL : rest * (1 - (missing ** (-1 / 3) + turns) ** -3);
}
