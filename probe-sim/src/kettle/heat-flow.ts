import {
  coilEffectiveness,
  evaporationKgPerM2H,
  potLossW,
  specificHeatJPerKgK,
  waterDensityKgPerM3,
} from '@steepfall/shared/figures';
import type { KettleSetup } from './setup.js';

/** Liquid at 82 °C over coolant at 15 °C: where `coilUAWPerK` is given. */
const REFERENCE_HEIGHT_K = 67;
/** The evaporation law starts here (Shah 2002). */
const COLDEST_EVAPORATION_C = 7;
/** It also ends at 95 °C; near the boiling point the loss is held, and boiling takes over. */
const BELOW_BOILING_K = 5;

export interface Surface {
  tempC: number;
  waterKg: number;
  isLidOn: boolean;
  boilingC: number;
}

export interface Loss {
  /** To the room; negative when the liquid is colder than the room. */
  powerW: number;
  evaporationKgPerS: number;
}

/** What the kettle loses to the room without boiling. */
export function lossToRoom(setup: KettleSetup, surface: Surface): Loss {
  const { roomC, diameterM } = setup;
  const humidityRatio = setup.humidityPercent / 100;
  const topM2 = (Math.PI * diameterM ** 2) / 4;
  const depthM = surface.waterKg / waterDensityKgPerM3(surface.tempC) / topM2;
  const hottestC = Math.min(95, surface.boilingC - BELOW_BOILING_K);
  const within = (tempC: number) => Math.min(hottestC, Math.max(COLDEST_EVAPORATION_C, tempC));
  if (surface.tempC <= roomC) {
    // Still air carries heat as well down as up, near enough for a cold pot; nothing evaporates.
    const mirroredC = within(2 * roomC - surface.tempC);
    const gainW = potLossW({ tempC: mirroredC, roomC, humidityRatio, diameterM, depthM, lid: true });
    return { powerW: -Math.max(0, gainW), evaporationKgPerS: 0 };
  }
  const tempC = within(surface.tempC);
  const powerW = potLossW({ tempC, roomC, humidityRatio, diameterM, depthM, lid: surface.isLidOn });
  // At the pressure of the sea: by the same law it differs by a hundredth or two up a mountain.
  const kgPerM2H = surface.isLidOn ? 0 : evaporationKgPerM2H({ waterC: tempC, roomC, humidityRatio });
  return { powerW, evaporationKgPerS: (kgPerM2H * topM2) / 3600 };
}

/**
 * Heat that the running coil takes out, W; negative when the coolant is the warmer one.
 *
 * In still liquid the flow around the coil dies down with the temperature difference. A square root through the values
 * computed for a 9.5 mm by 7.6 m coil (Churchill and Chu outside, Gnielinski inside) meets 241, 180 and 110 W/K at 60, 40 and
 * 25 °C within 4 %.
 */
export function coilPowerW(setup: KettleSetup, tempC: number, isStirred: boolean): number {
  const height = tempC - setup.coolantC;
  if (Math.abs(height) < 1e-6) return 0;
  const transferWPerK = isStirred
    ? setup.coilStirredUAWPerK
    : setup.coilUAWPerK * Math.sqrt(Math.abs(height) / REFERENCE_HEIGHT_K);
  const share = coilEffectiveness(transferWPerK, setup.coolantKgPerS);
  return share * setup.coolantKgPerS * specificHeatJPerKgK.water * height;
}
