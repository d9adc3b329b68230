import { curveIntegralMin } from '../curve/curve-integral.js';
import type { TemperatureCurve } from '../curve/temperature-curve.js';
import { evaporationInto } from '../heat/evaporation.js';
import { notNegative } from '../numeric/guard.js';

/** End of the evaporation formula, °C. */
const FROM_C = 7;
const TO_C = 95;
/** Draughts can double it; still steam over a tall pot halves it: a judgement. */
export const evaporationBand = { low: 0.5, value: 1, high: 2 } as const;

/**
 * Water that an open, still kettle loses over a curve, L; none with a lid.
 *
 * @param curve temperature while it stands open; above 95 °C counted as 95, below 7 °C as nothing.
 * @param surface open area 0 m² or more, room 0 to 45 °C, humidity 0 to 1, station pressure 50 to 110 kPa (sea level unless
 * told).
 * @throws RangeError outside these ranges.
 * @see Shah 2002 (evaporation.ts); 10 min near 80 °C in a 30 cm pot are about 0.1 L.
 */
export function evaporatedL(
  curve: TemperatureCurve,
  surface: { openM2: number; roomC?: number; humidityRatio?: number; stationKPa?: number },
): number {
  const { roomC = 20, humidityRatio = 0.5 } = surface;
  const openM2 = notNegative(surface.openM2, 'An open surface', 'm²');
  if (openM2 === 0) return 0;
  const kgPerM2H = evaporationInto({ roomC, humidityRatio, stationKPa: surface.stationKPa });
  const ratePerMin = (tempC: number) => (tempC < FROM_C ? 0 : kgPerM2H(Math.min(TO_C, tempC)) / 60);
  return openM2 * curveIntegralMin(curve, ratePerMin);
}
