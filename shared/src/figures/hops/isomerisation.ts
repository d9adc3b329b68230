import { celsiusToKelvin } from '../../units/index.js';
import { curveIntegralMin } from '../curve/curve-integral.js';
import { checkedCurve, type TemperatureCurve } from '../curve/temperature-curve.js';
import { notNegative, within } from '../numeric/guard.js';
import { alphaSolubilityMgPerL } from './alpha-solubility.js';

/** A step of the sum is never longer than this, nor steeper. */
const STEP_MIN = 0.5;
const STEP_K = 1;

function kelvinOf(tempC: number): number {
  return celsiusToKelvin(within(tempC, 'A kettle temperature', 0, 130, '°C'));
}

/**
 * Rate at which dissolved alpha acids turn into iso-alpha acids, 1/min. Solid at 90 to 130 °C, extrapolated below 80: ten
 * percent of error in its energy moves it by 35 % at 60 °C, and the pH of this drink by up to three times.
 *
 * @param tempC 0 to 130 °C.
 * @throws RangeError outside that range.
 * @see M. G. Malowicki, T. H. Shellhammer, J. Agric. Food Chem. 53, 4434, 2005.
 * @example isomerisationPerMin(60) // 2.75e-4
 */
export function isomerisationPerMin(tempC: number): number {
  return 7.9e11 * Math.exp(-11_858 / kelvinOf(tempC));
}

/** Rate at which iso-alpha acids are lost again, 1/min. @throws RangeError outside 0 to 130 °C. @see Malowicki and Shellhammer 2005. */
export function isoLossPerMin(tempC: number): number {
  return 4.1e12 * Math.exp(-12_994 / kelvinOf(tempC));
}

/** Share of always dissolved alpha that would have turned, for small shares: the sum of the rate. @throws RangeError on a bad curve. */
export function isomerisationTurns(curve: TemperatureCurve): number {
  return curveIntegralMin(curve, isomerisationPerMin);
}

export interface Isomerisation {
  isoMgPerL: number;
  alphaLeftMgPerL: number;
}

export interface HopContact {
  /** Of the hops, dissolved or not, mg/L. */
  alphaMgPerL: number;
  ph: number;
  /** At 60 °C and low pH, mg/L; null takes everything as dissolved, the upper bound. */
  solubilityAt60MgPerL?: number | null;
}

/**
 * Iso-alpha acids made while hops are in the liquid. Only dissolved alpha reacts, and little dissolves.
 *
 * @param curve temperature from hops in to hops out, 0 to 130 °C.
 * @param contact alpha 0 mg/L or more, pH 2 to 9.
 * @throws RangeError outside these ranges.
 * @see Malowicki and Shellhammer 2005; solubility is a judgement with a factor of three (alpha-solubility.ts).
 */
export function isomerise(curve: TemperatureCurve, contact: HopContact): Isomerisation {
  checkedCurve(curve);
  let alpha = notNegative(contact.alphaMgPerL, 'The alpha acid', 'mg/L');
  let iso = 0;
  for (let index = 1; index < curve.length; index += 1) {
    const a = curve[index - 1];
    const b = curve[index];
    if (!a || !b || b.atMs <= a.atMs) continue;
    const durationMin = (b.atMs - a.atMs) / 60_000;
    const steps = Math.max(1, Math.ceil(durationMin / STEP_MIN), Math.ceil(Math.abs(b.tempC - a.tempC) / STEP_K));
    for (let step = 0; step < steps; step += 1) {
      const tempC = a.tempC + ((b.tempC - a.tempC) * (step + 0.5)) / steps;
      const dtMin = durationMin / steps;
      const k1 = isomerisationPerMin(tempC);
      const keep = Math.exp(-isoLossPerMin(tempC) * dtMin);
      const limit =
        contact.solubilityAt60MgPerL === null
          ? Infinity
          : alphaSolubilityMgPerL(tempC, contact.ph, contact.solubilityAt60MgPerL);
      const made = alpha <= limit ? -alpha * Math.expm1(-k1 * dtMin) : Math.min(alpha, k1 * limit * dtMin);
      // What is made during the step has lost half a step of what it will lose.
      iso = iso * keep + made * Math.sqrt(keep);
      alpha -= made;
    }
  }
  return { isoMgPerL: iso, alphaLeftMgPerL: alpha };
}
