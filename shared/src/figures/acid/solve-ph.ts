import { settledStrength } from './settle.js';
import { chargeAt, prepared, type AcidSolution, type PreparedSolution } from './solution.js';

const LOWEST_PH = -2;
const HIGHEST_PH = 17;
/** Every second step at least halves the bracket or the step before: far fewer are ever used. */
const STEPS = 200;
const CLOSE_PH = 1e-12;

export interface PhResult {
  /** On the activity scale: what a meter shows. */
  ph: number;
  ionicStrength: number;
  /** Strong base that one pH more takes, eq/L. */
  bufferEqPerLPerPh: number;
  /** Charges left over at that pH, eq/L: how well it is solved. */
  leftEqPerL: number;
}

/** The pH without left-over charge at a given ionic strength; the charge falls monotonically, so there is exactly one. */
export function phAtStrength(solution: PreparedSolution, ionicStrength: number, start = 4): number {
  let low = LOWEST_PH;
  let high = HIGHEST_PH;
  let ph = start;
  let stepBefore = high - low;
  let lastStep = stepBefore;
  for (let step = 0; step < STEPS; step += 1) {
    const { leftEqPerL, bufferEqPerLPerPh } = chargeAt(solution, ph, ionicStrength);
    if (leftEqPerL === 0) return ph;
    if (leftEqPerL > 0) low = ph;
    else high = ph;
    const newton = leftEqPerL / bufferEqPerLPerPh;
    // Newton while it stays inside and closes in; otherwise the middle, so that the end is sure.
    const closes = ph + newton > low && ph + newton < high && Math.abs(newton) < Math.abs(stepBefore) / 2;
    const move = closes ? newton : (low + high) / 2 - ph;
    stepBefore = lastStep;
    lastStep = move;
    if (ph + move === ph) return ph;
    ph += move;
    if (Math.abs(move) < CLOSE_PH) return ph;
  }
  return ph;
}

/** An upper bound of the ionic strength of a solution, mol/L. */
export function greatestStrength(solution: PreparedSolution): number {
  const acids = solution.ladders.reduce((sum, { molPerL, betas }) => sum + molPerL * (betas.length - 1) ** 2, 0);
  return 20 + solution.strongIonicStrength + acids;
}

/**
 * pH of a mixture of weak acids, leaf bases, strong ions and water, with activities. Exact for its model: every charge is
 * counted and must cancel. It ends after a bounded number of steps for any valid input. Complexes of calcium with citrate
 * are left out unless `citrateMetals` are told: at 110 mg/L of calcium the pH then reads 0.02 to 0.06 too high.
 *
 * @param solution see AcidSolution for the ranges.
 * @throws RangeError when an input is out of range.
 * @see electroneutrality with the constants of dissociation.ts and the Davies formula.
 * @example solvePh({ acidsMolPerL: { citric: 0.001 }, strongIonEqPerL: 0, tempC: 25 }).ph // 3.24
 */
export function solvePh(solution: AcidSolution): PhResult {
  return solvePrepared(prepared(solution));
}

/** The same for constants that are worked out already. */
export function solvePrepared(ready: PreparedSolution): PhResult {
  let ph = 4;
  const strengthOf = (ionicStrength: number) => {
    ph = phAtStrength(ready, ionicStrength, ph);
    return chargeAt(ready, ph, ionicStrength).ionicStrength;
  };
  const ionicStrength = settledStrength(strengthOf, ready.strongIonicStrength, greatestStrength(ready));
  ph = phAtStrength(ready, ionicStrength, ph);
  const { leftEqPerL, bufferEqPerLPerPh } = chargeAt(ready, ph, ionicStrength);
  return { ph, ionicStrength, bufferEqPerLPerPh, leftEqPerL };
}
