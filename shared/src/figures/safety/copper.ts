import { within } from '../numeric/guard.js';

/** Below it copper goes into what touches it. */
const COPPER_FROM_PH = 6;

/**
 * Whether a drink is too acid for copper: the US Food Code bars it below pH 6, and its exception names steps of brewing beer
 * only. It also bars copper between a backflow preventer and a carbonator, whatever the pH. Stainless steel is the way out.
 *
 * @param ph lowest that touches the copper, 0 to 14.
 * @throws RangeError outside that range.
 * @see FDA Food Code 4-101.14.
 */
export function tooAcidForCopper(ph: number): boolean {
  return within(ph, 'A pH', 0, 14) < COPPER_FROM_PH;
}
