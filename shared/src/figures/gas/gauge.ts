import { finite, within } from '../numeric/guard.js';

function station(stationKPa: number): number {
  return within(stationKPa, 'A station pressure', 20, 120, 'kPa');
}

/**
 * Absolute pressure from what a gauge shows, kPa. A gauge itself is off by 2 to 5 % of its full scale (from memory), more
 * than every other error here.
 *
 * @param gaugeKPa any finite number; negative is a vacuum.
 * @param stationKPa local air pressure, 20 to 120 kPa (atmosphericPressureKPa).
 * @throws RangeError outside these ranges.
 */
export function absoluteFromGaugeKPa(gaugeKPa: number, stationKPa: number): number {
  return finite(gaugeKPa, 'A gauge pressure', 'kPa') + station(stationKPa);
}

/** Gauge pressure from absolute, kPa; negative is a vacuum. @throws RangeError as above. */
export function gaugeFromAbsoluteKPa(absoluteKPa: number, stationKPa: number): number {
  return finite(absoluteKPa, 'An absolute pressure', 'kPa') - station(stationKPa);
}
