import { celsiusToKelvin } from '../../units/index.js';
import { GAS_CONSTANT_J_PER_MOL_K } from '../numeric/constants.js';
import { entryOf, finite, within } from '../numeric/guard.js';

const FARADAY = 96_485.33212;
/** Limits of a healthy electrode (from memory). */
const SLOPE_PERCENT = { from: 95, to: 102 };
const OFFSET_MV = 30;

/**
 * What one pH is worth at an ideal electrode, mV.
 *
 * @param tempC 0 to 100 °C.
 * @throws RangeError outside that range.
 * @see Nernst equation.
 * @example nernstSlopeMv(25) // 59.16
 */
export function nernstSlopeMv(tempC: number): number {
  const kelvin = celsiusToKelvin(within(tempC, 'A temperature', 0, 100, '°C'));
  return ((GAS_CONSTANT_J_PER_MOL_K * kelvin * Math.LN10) / FARADAY) * 1000;
}

export interface ElectrodeCheck {
  slopePercent: number;
  offsetMv: number;
  verdict: 'good' | 'slope' | 'offset';
}

/**
 * Health of an electrode from its two calibration points.
 *
 * @param points millivolts in two buffers of different pH, and their temperature 0 to 100 °C.
 * @throws RangeError when not finite, or both buffers have the same pH.
 * @see Nernst equation; limits 95 to 102 % and 30 mV from memory.
 */
export function electrodeCheck(points: {
  ph1: number;
  mv1: number;
  ph2: number;
  mv2: number;
  tempC: number;
}): ElectrodeCheck {
  const span = within(points.ph2, 'A buffer pH', 0, 14) - within(points.ph1, 'A buffer pH', 0, 14);
  if (span === 0) throw new RangeError(`Two buffers must differ, got pH ${points.ph1} twice. Use 4.01 and 7.00.`);
  const mvPerPh = (finite(points.mv1, 'A reading', 'mV') - finite(points.mv2, 'A reading', 'mV')) / span;
  const slopePercent = (100 * mvPerPh) / nernstSlopeMv(points.tempC);
  const offsetMv = points.mv1 - mvPerPh * (7 - points.ph1);
  if (!(slopePercent >= SLOPE_PERCENT.from && slopePercent <= SLOPE_PERCENT.to))
    return { slopePercent, offsetMv, verdict: 'slope' };
  return { slopePercent, offsetMv, verdict: Math.abs(offsetMv) < OFFSET_MV ? 'good' : 'offset' };
}

/** °C and pH of technical buffers as printed with an analyser (MI 611-211, 2005). */
const tables = {
  seven: [
    [0, 7.12],
    [5, 7.09],
    [20, 7.02],
    [25, 7.0],
    [30, 6.99],
    [40, 6.98],
  ],
  ten: [
    [0, 10.32],
    [20, 10.06],
    [25, 10.01],
    [40, 9.89],
  ],
} as const satisfies Record<string, readonly (readonly [number, number])[]>;

/**
 * pH of the 0.05 m phthalate buffer ("4.01") at its temperature.
 *
 * @param tempC 0 to 60 °C.
 * @throws RangeError outside that range.
 * @see H. B. Hetzer, R. A. Durst, R. A. Robinson, R. G. Bates, J. Res. NBS 81A, 21, 1977.
 * @example phthalatePh(25) // 4.006
 */
export function phthalatePh(tempC: number): number {
  const k = celsiusToKelvin(within(tempC, 'A buffer temperature', 0, 60, '°C'));
  return 2073.44 / k - 13.327 + 0.045199 * k - 3.4846e-5 * k ** 2;
}

/** pH of a technical "7.00" or "10.01" buffer at its temperature, 0 to 40 °C, on straight lines. @throws RangeError outside. */
export function technicalBufferPh(buffer: keyof typeof tables, tempC: number): number {
  const t = within(tempC, 'A buffer temperature', 0, 40, '°C');
  const table: readonly (readonly [number, number])[] = entryOf(tables, buffer, 'A buffer');
  const after = table.findIndex(([at]) => at >= t);
  const [t2, ph2] = table[after] ?? [40, Number.NaN];
  const [t1, ph1] = table[after - 1] ?? [t2, ph2];
  return t2 === t1 ? ph2 : ph1 + ((ph2 - ph1) * (t - t1)) / (t2 - t1);
}
