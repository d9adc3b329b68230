import { celsiusToKelvin } from '../../units/index.js';
import { GAS_CONSTANT_J_PER_MOL_K } from '../numeric/constants.js';
import { notNegative, positive, within } from '../numeric/guard.js';

const MOLAR_KG = 0.0440095;
const OXYGEN_PERCENT = 20.9;
const MILLION = 1e6;

/**
 * A what-if for the set-up page, not a detector: gas pools low, and the floor is worse than the mean.
 * All of it by the ideal gas law, which is within 1 % here.
 */
export interface RoomLeak {
  leakKgPerH: number;
  roomM3: number;
  airChangesPerH: number;
  /** CO2 of the air that comes in, ppm; 420 unless told. */
  outdoorPpm?: number;
}

/**
 * Room that one kilogram of CO2 fills, m³/kg.
 *
 * @param tempC -50 to 100 °C.
 * @param absolutePa above 0, Pa.
 * @throws RangeError outside these ranges.
 * @see ideal gas law.
 * @example co2M3PerKg(20, 101_325) // 0.547
 */
export function co2M3PerKg(tempC = 20, absolutePa = 101_325): number {
  const kelvin = celsiusToKelvin(within(tempC, 'A gas temperature', -50, 100, '°C'));
  return (GAS_CONSTANT_J_PER_MOL_K * kelvin) / (positive(absolutePa, 'An absolute pressure', 'Pa') * MOLAR_KG);
}

/** Gas volume over room volume. */
function share(massKg: number, roomM3: number): number {
  return (notNegative(massKg, 'A gas mass', 'kg') * co2M3PerKg()) / positive(roomM3, 'A room volume', 'm³');
}

/** CO2 in a room after a release, ppm, simple and cautious. @throws RangeError when negative. @example co2PpmSimple(2.268, 25) // 49 600 */
export function co2PpmSimple(massKg: number, roomM3: number): number {
  return MILLION * share(massKg, roomM3);
}

/** The same, well mixed with room air pushed out, ppm. @throws RangeError when negative. @example co2PpmMixed(2.268, 25) // 48 400 */
export function co2PpmMixed(massKg: number, roomM3: number): number {
  return -MILLION * Math.expm1(-share(massKg, roomM3));
}

/** Oxygen left in that room, % by volume. @throws RangeError when negative. @example oxygenPercentMixed(2.268, 25) // 19.9 */
export function oxygenPercentMixed(massKg: number, roomM3: number): number {
  return OXYGEN_PERCENT * Math.exp(-share(massKg, roomM3));
}

function risePpm(leak: RoomLeak): number {
  const flowM3PerH =
    positive(leak.airChangesPerH, 'Air changes an hour') * positive(leak.roomM3, 'A room volume', 'm³');
  return (MILLION * notNegative(leak.leakKgPerH, 'A leak', 'kg/h') * co2M3PerKg()) / flowM3PerH;
}

/** Where a steady leak settles, ppm. @throws RangeError when out of range. */
export function co2SteadyPpm(leak: RoomLeak): number {
  return notNegative(leak.outdoorPpm ?? 420, 'Outdoor CO2', 'ppm') + risePpm(leak);
}

/** Minutes until a steady leak reaches a level; null when it never does, 0 when it is there. @throws RangeError when out of range. */
export function co2MinutesTo(targetPpm: number, leak: RoomLeak): number | null {
  const needed = notNegative(targetPpm, 'A CO2 level', 'ppm') - (co2SteadyPpm(leak) - risePpm(leak));
  if (needed <= 0) return 0;
  const left = 1 - needed / risePpm(leak);
  return left > 0 ? (-60 / leak.airChangesPerH) * Math.log(left) : null;
}

/** Gas that brings a room to a level, kg. @throws RangeError when negative. @example co2MaxKg(5000, 25) // 0.23 */
export function co2MaxKg(levelPpm: number, roomM3: number): number {
  return (
    (positive(roomM3, 'A room volume', 'm³') * notNegative(levelPpm, 'A CO2 level', 'ppm')) / MILLION / co2M3PerKg()
  );
}
