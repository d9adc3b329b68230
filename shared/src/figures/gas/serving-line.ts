import { bisect } from '../numeric/bisect.js';
import { GRAVITY_M_PER_S2 } from '../numeric/constants.js';
import { finite, notNegative, positive, within } from '../numeric/guard.js';

/** Where the flow is neither smooth nor surely turbulent. */
const LAMINAR_BELOW = 2300;
const TURBULENT_FROM = 4000;
const BLASIUS_TO = 1e5;

export interface LineDrop {
  kPaPerM: number;
  reynolds: number;
  /** True between smooth and turbulent flow, and beyond the formula. */
  uncertain: boolean;
}

export interface LineDrink {
  /** kg/m³; 1000 unless told. */
  densityKgPerM3?: number;
  /** Pa s; 1.567e-3, water at 4 °C, unless told. */
  viscosityPaS?: number;
}

function drink({ densityKgPerM3 = 1000, viscosityPaS = 1.567e-3 }: LineDrink) {
  return { rho: positive(densityKgPerM3, 'A density', 'kg/m³'), mu: positive(viscosityPaS, 'A viscosity', 'Pa s') };
}

function speedMPerS(flowMlPerS: number, boreMm: number): number {
  const boreM = positive(boreMm, 'A bore', 'mm') / 1000;
  return (4 * positive(flowMlPerS, 'A flow', 'mL/s') * 1e-6) / (Math.PI * boreM ** 2);
}

/**
 * Pressure that a smooth line eats per metre, kPa/m. Bores vary: a tenth narrower is two thirds more. Time one pour and
 * keep a line factor.
 *
 * @param flowMlPerS above 0, mL/s.
 * @param boreMm inner diameter, above 0, mm.
 * @throws RangeError outside these ranges.
 * @see F. M. White, Fluid Mechanics: Hagen-Poiseuille below Re 2300, Blasius above (formulas from memory).
 * @example lineDrop(59.15, 4.7625).kPaPerM // 36.5
 */
export function lineDrop(flowMlPerS: number, boreMm: number, liquid: LineDrink = {}): LineDrop {
  const { rho, mu } = drink(liquid);
  const speed = speedMPerS(flowMlPerS, boreMm);
  const boreM = boreMm / 1000;
  const reynolds = (rho * speed * boreM) / mu;
  const friction = reynolds < LAMINAR_BELOW ? 64 / reynolds : 0.3164 * reynolds ** -0.25;
  const uncertain = reynolds > BLASIUS_TO || (reynolds >= LAMINAR_BELOW && reynolds < TURBULENT_FROM);
  return { kPaPerM: ((friction / boreM) * rho * speed ** 2) / 2 / 1000, reynolds, uncertain };
}

export interface ServingLine extends LineDrink {
  gaugeKPa: number;
  /** Tap above the drink, m; negative when it is below. */
  riseM: number;
  boreMm: number;
  /** Shank and tap, 2 to 4 (from memory); 2.5 unless told. */
  fittings?: number;
  /** Learned from a timed pour: measured drop over computed drop. */
  lineFactor?: number;
}

function leftKPa(line: ServingLine, flowMlPerS: number): number {
  const { rho } = drink(line);
  const rise = rho * GRAVITY_M_PER_S2 * within(line.riseM, 'A rise', -20, 20, 'm');
  const fittings =
    (notNegative(line.fittings ?? 2.5, 'A fittings factor') * rho * speedMPerS(flowMlPerS, line.boreMm) ** 2) / 2;
  return finite(line.gaugeKPa, 'A gauge pressure', 'kPa') - (rise + fittings) / 1000;
}

/**
 * Length of line that pours at a flow, m; null when rise and fittings eat the pressure first.
 *
 * @param line gauge pressure kPa, rise -20 to 20 m, bore above 0 mm, factor above 0.
 * @param flowMlPerS above 0; 59 is common practice for beer, no source; use 30 to 45 from 3 volumes up.
 * @throws RangeError outside these ranges.
 * @see energy balance along the line with lineDrop.
 */
export function lineLengthM(line: ServingLine, flowMlPerS: number): number | null {
  const left = leftKPa(line, flowMlPerS);
  const perM = lineDrop(flowMlPerS, line.boreMm, line).kPaPerM * positive(line.lineFactor ?? 1, 'A line factor');
  return left > 0 ? left / perM : null;
}

/**
 * Flow through a line of a length, mL/s, up to 500; null when nothing flows.
 *
 * @param lengthM above 0, m.
 * @throws RangeError as above.
 */
export function lineFlowMlPerS(line: ServingLine, lengthM: number): number | null {
  const length = positive(lengthM, 'A line length', 'm');
  const factor = positive(line.lineFactor ?? 1, 'A line factor');
  const spare = (flow: number) => leftKPa(line, flow) - length * factor * lineDrop(flow, line.boreMm, line).kPaPerM;
  if (spare(1e-6) <= 0) return null;
  return bisect(spare, 1e-6, 500, false);
}
