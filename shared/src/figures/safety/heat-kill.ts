import type { TemperatureCurve } from '../curve/temperature-curve.js';
import { checkedCurve } from '../curve/temperature-curve.js';
import { finite, positive } from '../numeric/guard.js';

/** K for a factor of ten, from 1.393 for one kelvin. */
const UNIT_Z_K = Math.LN10 / Math.log(1.393);
const UNIT_REFERENCE_C = 60;
const UNIT_FROM_C = 50;

/** Exact integral of 10^((T - reference)/z) over a straight line, minutes. */
function straightMin(fromC: number, toC: number, durationMin: number, referenceC: number, zK: number): number {
  const at = (tempC: number) => 10 ** ((tempC - referenceC) / zK);
  if (Math.abs(toC - fromC) < 1e-9) return durationMin * at((fromC + toC) / 2);
  return ((durationMin * zK) / (Math.LN10 * (toC - fromC))) * (at(toC) - at(fromC));
}

function overCurve(curve: TemperatureCurve, referenceC: number, zK: number, aboveC: number): number {
  let sum = 0;
  for (const [index, b] of checkedCurve(curve).entries()) {
    const a = curve[index - 1];
    if (!a || (a.tempC < aboveC && b.tempC < aboveC)) continue;
    const fromC = Math.max(a.tempC, aboveC);
    const toC = Math.max(b.tempC, aboveC);
    const share = a.tempC === b.tempC ? 1 : (toC - fromC) / (b.tempC - a.tempC);
    sum += straightMin(fromC, toC, ((b.atMs - a.atMs) / 60_000) * share, referenceC, zK);
  }
  return sum;
}

/**
 * Minutes at a reference temperature that kill as much as the curve did. Always keep z and the reference with the number; it
 * is not a claim about the drink: spores survive a steep, and everything after it brings germs back.
 *
 * @param z kelvin for a factor of ten: 10 for spores, 5 to 7 for growing cells (from memory); above 0.
 * @throws RangeError on a bad curve, or z not above 0.
 * @see textbook lethality, exact on straight lines.
 */
export function lethalityMin(curve: TemperatureCurve, z: { referenceC: number; zK: number }): number {
  return overCurve(curve, finite(z.referenceC, 'A reference', '°C'), positive(z.zK, 'A z value', 'K'), -Infinity);
}

/**
 * Pasteurisation units of a curve: minutes at 60 °C, times 1.393 for each kelvin, counted from 50 °C up. A yardstick of beer
 * spoilage that is right from 60 to 72 °C and overstates above; it says nothing about spores.
 *
 * @throws RangeError on a bad curve.
 * @see MEBAK B-420.13.032; H. W. Del Vecchio et al. 1951.
 */
export function pasteurisationUnits(curve: TemperatureCurve): number {
  return overCurve(curve, UNIT_REFERENCE_C, UNIT_Z_K, UNIT_FROM_C);
}
