import { KPA_PER_ATM, celsiusToKelvin } from '../../units/index.js';
import { within } from '../numeric/guard.js';
import { waterVapourPressureKPa } from './vapour-pressure.js';

const DRY_AIR_J_PER_KG_K = 287.05;
const VAPOUR_TO_AIR_MOLAR = 0.622;

export interface EvaporationConditions {
  waterC: number;
  roomC: number;
  /** Relative humidity of the room, 0 to 1. */
  humidityRatio: number;
  /** Station pressure, kPa; sea level unless told. */
  stationKPa?: number;
}

/**
 * Water that a still, open, warm surface gives to still air, kg/(m² h). Draughts easily double it; another published way
 * of sums gives up to half more at 85 °C.
 *
 * @param conditions water 7 to 95 °C, room 0 to 45 °C and not above the water, humidity 0 to 1, pressure 50 to 110 kPa.
 * @returns 0 when the room air is as moist, or as dense, as the air at the surface.
 * @throws RangeError outside these ranges.
 * @see M. M. Shah, HVAC&R Research 8(1), 125-131, 2002 (7 to 94 °C, mean deviation 18 %); constants from memory.
 * @example evaporationKgPerM2H({ waterC: 70, roomC: 22, humidityRatio: 0.5 }) // 5.2
 */
export function evaporationKgPerM2H({ waterC, ...room }: EvaporationConditions): number {
  return evaporationInto(room)(waterC);
}

/**
 * The same for one room and any water temperature: the room is worked out once, for sums over a curve.
 *
 * @throws RangeError as above; the returned function for water outside 7 to 95 °C.
 */
export function evaporationInto(room: Omit<EvaporationConditions, 'waterC'>): (waterC: number) => number {
  const roomC = within(room.roomC, 'A room temperature', 0, 45, '°C');
  const pressureKPa = within(room.stationKPa ?? KPA_PER_ATM, 'A station pressure', 50, 110, 'kPa');
  const around = air(roomC, within(room.humidityRatio, 'A relative humidity', 0, 1), pressureKPa);
  return (waterC) => {
    const surface = air(within(waterC, 'A water temperature', 7, 95, '°C'), 1, pressureKPa);
    const lift = around.dryAirKgPerM3 - surface.dryAirKgPerM3;
    const moisture = surface.vapourPerDryAir - around.vapourPerDryAir;
    return lift > 0 && moisture > 0 ? 35 * surface.dryAirKgPerM3 * Math.cbrt(lift) * moisture : 0;
  };
}

function air(tempC: number, humidity: number, pressureKPa: number) {
  const vapourKPa = humidity * waterVapourPressureKPa(tempC);
  const dryKPa = Math.max(pressureKPa - vapourKPa, 0.01 * pressureKPa);
  return {
    dryAirKgPerM3: (dryKPa * 1000) / (DRY_AIR_J_PER_KG_K * celsiusToKelvin(tempC)),
    vapourPerDryAir: (VAPOUR_TO_AIR_MOLAR * vapourKPa) / dryKPa,
  };
}
