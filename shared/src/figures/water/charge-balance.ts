import { ionCharge, ionMeqPerL, ions, type IonsMgPerL } from './ions.js';

const FLAG_ABOVE_PERCENT = 5;
const REFUSE_ABOVE_PERCENT = 20;

export interface ChargeBalance {
  cationsMeqPerL: number;
  anionsMeqPerL: number;
  /** 100 (cations - anions)/(cations + anions); 0 for water without ions. */
  imbalancePercent: number;
  /** `flagged` above 5 %: ask for the report again. `refused` above 20 %: no pH is computed from it. */
  verdict: 'balanced' | 'flagged' | 'refused';
}

/**
 * Whether the plus and minus charges of a water report agree: what is missing shows here.
 *
 * @throws RangeError when an ion is negative or not finite.
 * @see electroneutrality.
 */
export function chargeBalance(water: IonsMgPerL): ChargeBalance {
  let cationsMeqPerL = 0;
  let anionsMeqPerL = 0;
  for (const ion of ions) {
    if (ionCharge[ion] > 0) cationsMeqPerL += ionMeqPerL(water, ion);
    else anionsMeqPerL += ionMeqPerL(water, ion);
  }
  const total = cationsMeqPerL + anionsMeqPerL;
  const imbalancePercent = total === 0 ? 0 : (100 * (cationsMeqPerL - anionsMeqPerL)) / total;
  const size = Math.abs(imbalancePercent);
  const verdict = size > REFUSE_ABOVE_PERCENT ? 'refused' : size > FLAG_ABOVE_PERCENT ? 'flagged' : 'balanced';
  return { cationsMeqPerL, anionsMeqPerL, imbalancePercent, verdict };
}
