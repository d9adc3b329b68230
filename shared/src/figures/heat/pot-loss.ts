import { celsiusToKelvin } from '../../units/index.js';
import { positive, within } from '../numeric/guard.js';
import { evaporationKgPerM2H } from './evaporation.js';
import { latentHeatJPerKg } from './latent-heat.js';

const STEFAN_BOLTZMANN = 5.670374419e-8;
/** Emissivities: water 0.95, bright steel 0.3 (from memory). */
const WATER_EMISSIVITY = 0.95;
const STEEL_EMISSIVITY = 0.3;

export interface PotLossConditions {
  tempC: number;
  roomC: number;
  humidityRatio: number;
  diameterM: number;
  /** Height of the wetted wall, m. */
  depthM: number;
  lid: boolean;
}

/**
 * Heat that a pot with no flame under it loses to a still room, W: walls and top by air and radiation, and without a lid by
 * evaporation, which is about 70 % of it. A start value, good to about 30 %: learn the kettle's own from its traces.
 *
 * @param conditions liquid 7 to 95 °C and not below the room, room 0 to 45 °C, humidity 0 to 1, sizes above 0 m.
 * @throws RangeError outside these ranges.
 * @see natural convection in air: wall 1.42 (dT/H)^0.25, top 1.32 (dT/L)^0.25, W/(m² K), lengths in m, simplified relations
 * (Engineers Edge); Stefan-Boltzmann; Shah 2002 (evaporation.ts).
 */
export function potLossW(conditions: PotLossConditions): number {
  const tempC = within(conditions.tempC, 'A liquid temperature', 7, 95, '°C');
  const roomC = within(conditions.roomC, 'A room temperature', 0, 45, '°C');
  const diameterM = positive(conditions.diameterM, 'A diameter', 'm');
  const depthM = positive(conditions.depthM, 'A depth', 'm');
  const warmer = Math.max(0, tempC - roomC);
  const wallM2 = Math.PI * diameterM * depthM;
  const topM2 = (Math.PI * diameterM ** 2) / 4;
  const glowWPerM2 = STEFAN_BOLTZMANN * (celsiusToKelvin(tempC) ** 4 - celsiusToKelvin(roomC) ** 4);
  const wallW = wallM2 * (1.42 * (warmer / depthM) ** 0.25 * warmer + STEEL_EMISSIVITY * glowWPerM2);
  const topAirW = 1.32 * (warmer / diameterM) ** 0.25 * warmer;
  if (conditions.lid) return wallW + topM2 * (topAirW + STEEL_EMISSIVITY * glowWPerM2);
  const steamW =
    (evaporationKgPerM2H({ waterC: tempC, roomC, humidityRatio: conditions.humidityRatio }) / 3600) *
    latentHeatJPerKg(tempC);
  return wallW + topM2 * (topAirW + WATER_EMISSIVITY * glowWPerM2 + steamW);
}
