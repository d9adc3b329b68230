import { within } from '../numeric/guard.js';

export type PhBand = 'acid' | 'below-assessment' | 'assessment' | 'low-acid';

/**
 * Band of the finished, degassed pH: `acid` to 4.0, `below-assessment` under 4.2, `assessment` to 4.6 (keep cold, dates and
 * the cooling rule), `low-acid` above (ask a process authority before any keg leaves). It records; it does not clear a drink.
 *
 * @param degassedPh 0 to 14.
 * @param uncertaintyPh of the meter, 0 to 1: the band is judged at pH plus this.
 * @throws RangeError outside these ranges.
 * @see growth in alcohol-free beer at pH 4.3 and not at 4.0, J. Food Prot. 74(10), 1670, 2011; FDA Food Code, TCS table B.
 */
export function phBand(degassedPh: number, uncertaintyPh = 0): PhBand {
  const worst = within(degassedPh, 'A pH', 0, 14) + within(uncertaintyPh, 'A pH uncertainty', 0, 1);
  // Sums of decimals such as 4.1 + 0.1 must not cross a limit by the last bit.
  const ph = Math.round(worst * 1e6) / 1e6;
  if (ph <= 4.0) return 'acid';
  if (ph < 4.2) return 'below-assessment';
  return ph <= 4.6 ? 'assessment' : 'low-acid';
}

export type TcsClass = 'non-tcs' | 'product-assessment';
export type TcsTable = 'heated-and-sealed' | 'not-sealed';

/**
 * Whether the US Food Code asks for a product assessment (hold it as needing time and temperature control until then).
 * Kegged hop tea is normally `not-sealed`: heated, but not sealed after heating.
 *
 * @param product degassed pH 0 to 14, water activity 0 to 1 (0.99 when not measured).
 * @throws RangeError outside these ranges.
 * @see FDA Food Code, definition of TCS food, tables A and B.
 */
export function tcsClass({
  ph,
  waterActivity = 0.99,
  table,
}: {
  ph: number;
  waterActivity?: number;
  table: TcsTable;
}): TcsClass {
  const acid = within(ph, 'A pH', 0, 14);
  const aw = within(waterActivity, 'A water activity', 0, 1);
  const asks = table === 'heated-and-sealed' ? sealedAsks(acid, aw) : openAsks(acid, aw);
  return asks ? 'product-assessment' : 'non-tcs';
}

function sealedAsks(ph: number, aw: number): boolean {
  if (aw <= 0.92) return false;
  return aw <= 0.95 ? ph > 5.6 : ph > 4.6;
}

function openAsks(ph: number, aw: number): boolean {
  if (aw < 0.88) return false;
  if (aw <= 0.9) return ph > 5.0;
  return aw <= 0.92 ? ph > 4.6 : ph >= 4.2;
}

/**
 * How this pH has to be measured: above 4.0 a meter, at 4.0 or below any suitable way.
 *
 * @throws RangeError outside 0 to 14.
 * @see 21 CFR 114, borrowed as good practice.
 */
export function phMethod(expectedPh: number): 'meter' | 'any-suitable' {
  return within(expectedPh, 'A pH', 0, 14) > 4.0 ? 'meter' : 'any-suitable';
}
