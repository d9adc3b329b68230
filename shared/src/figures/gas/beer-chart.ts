import { celsiusToFahrenheit, kpaToPsi, psiToKpa } from '../../units/index.js';
import { within } from '../numeric/guard.js';
import { co2GPerL } from './co2-solubility.js';
import { co2Volumes } from './co2-volumes.js';

const OFFSET_VOLUMES = 0.003342;

function perPsi(tempC: number): number {
  const fahrenheit = celsiusToFahrenheit(within(tempC, 'A drink temperature', 0, 15.6, '°C'));
  return 0.01821 + 0.090115 * Math.exp(-(fahrenheit - 32) / 43.11);
}

export interface BeerChartComparison {
  /** What a beer chart says, volumes. */
  chartVolumes: number;
  /** What water holds, volumes. */
  waterVolumes: number;
  /** How much more pressure the chart asks for, for what water holds here, kPa. */
  extraKPa: number;
}

/**
 * A line to compare with, not to use: a beer chart at the same pressure and temperature. Hop tea is water, and water holds 2
 * to 6 % more.
 *
 * @param tempC 0 to 15.6 °C.
 * @param absoluteKPa 100 to 600 kPa absolute.
 * @throws RangeError outside these ranges.
 * @see A. J. deLange, CO2 volumes in beer, 2011: a private fit to the ASBC Beer-13 chart (coefficients from memory).
 */
export function compareWithBeerChart(tempC: number, absoluteKPa: number): BeerChartComparison {
  const pressure = within(absoluteKPa, 'An absolute pressure', 100, 600, 'kPa');
  const chartVolumes = kpaToPsi(pressure) * perPsi(tempC) - OFFSET_VOLUMES;
  const waterVolumes = co2Volumes(co2GPerL(tempC, pressure));
  const chartKPa = psiToKpa((waterVolumes + OFFSET_VOLUMES) / perPsi(tempC));
  return { chartVolumes, waterVolumes, extraKPa: chartKPa - pressure };
}
