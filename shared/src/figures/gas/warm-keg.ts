import { KPA_PER_ATM } from '../../units/index.js';
import { waterDensityKgPerM3 } from '../heat/water-density.js';
import { bisect } from '../numeric/bisect.js';
import { notNegative, positive } from '../numeric/guard.js';
import { co2GasG } from './co2-budget.js';
import { CO2_MOLAR_MASS, co2MolPerKg } from './co2-solubility.js';
import { co2GPerLFromVolumes } from './co2-volumes.js';
import { equilibriumAbsoluteKPa } from './charge-pressure.js';
import { gaugeFromAbsoluteKPa } from './gauge.js';

/** End of the solubility model, kPa absolute. */
const MAX_KPA = 1100;

export interface ClosedKeg {
  drinkL: number;
  headspaceL: number;
  /** Content when it was closed at rest, volumes. */
  volumes: number;
  closedAtC: number;
  stationKPa?: number;
}

/**
 * Gauge pressure in a closed keg after it has come to rest at another temperature, kPa; null above 1100 kPa absolute (or
 * when it could not have been closed like that). Less headspace does not lower it. It comes fast on the way.
 *
 * @param keg volumes above 0 L (headspace 0 or more), content 0 volumes or more, 0 to 40 °C.
 * @param tempC 0 to 40 °C.
 * @throws RangeError outside these ranges.
 * @see CO2 kept between drink and headspace: Weiss 1974 and the gas law; expansion of the drink (up to 2 %) left out.
 * @example warmKegGaugeKPa({ drinkL: 18, headspaceL: 1, volumes: 2.7, closedAtC: 3 }, 30) // 307
 */
export function warmKegGaugeKPa(keg: ClosedKeg, tempC: number): number | null {
  const drinkL = positive(keg.drinkL, 'A volume of drink', 'L');
  const headspaceL = notNegative(keg.headspaceL, 'A headspace', 'L');
  const massKg = (drinkL * waterDensityKgPerM3(keg.closedAtC)) / 1000;
  const closedKPa = equilibriumAbsoluteKPa(co2GPerLFromVolumes(keg.volumes), keg.closedAtC);
  if (closedKPa === null) return null;
  const held = (atC: number, kPa: number) =>
    co2MolPerKg(atC, kPa) * CO2_MOLAR_MASS * massKg + co2GasG({ volumeL: headspaceL, tempC: atC, absoluteKPa: kPa });
  const totalG = held(keg.closedAtC, closedKPa);
  if (held(tempC, MAX_KPA) < totalG) return null;
  const restKPa = bisect((kPa) => held(tempC, kPa) - totalG, 0, MAX_KPA, true);
  return gaugeFromAbsoluteKPa(restKPa, keg.stationKPa ?? KPA_PER_ATM);
}

/** Allowed when no value is stamped, kPa gauge: the lowest of the common kinds (DIN 6647-1 and -3). */
const UNSTAMPED_GAUGE_KPA = 300;

/**
 * What a keg may hold, kPa gauge: the value stamped on it, or 3 bar with a word that it is assumed.
 *
 * @param stampedGaugeKPa above 0; null when nothing is stamped.
 * @throws RangeError when not above 0.
 * @see DIN 6647-1.
 */
export function allowedGaugeKPa(stampedGaugeKPa: number | null): { gaugeKPa: number; assumed: boolean } {
  if (stampedGaugeKPa === null) return { gaugeKPa: UNSTAMPED_GAUGE_KPA, assumed: true };
  return { gaugeKPa: positive(stampedGaugeKPa, 'A stamped pressure', 'kPa'), assumed: false };
}
