import { positive, notNegative } from '../numeric/guard.js';
import { checkedIons, ions, pureWater, type Ion, type IonsMgPerL } from './ions.js';

/**
 * Ions of waters poured together, alkalinity too (never pH), mg/L.
 *
 * @param parts volumes 0 L or more, together above 0.
 * @throws RangeError outside these ranges.
 * @see mass balance.
 */
export function blendedWater(parts: readonly { water: IonsMgPerL; volumeL: number }[]): IonsMgPerL {
  const totalL = positive(
    parts.reduce((sum, { volumeL }) => sum + notNegative(volumeL, 'A volume of water', 'L'), 0),
    'The volume of all waters',
    'L',
  );
  const sum: Record<Ion, number> = { ...pureWater };
  for (const { water, volumeL } of parts) {
    checkedIons(water);
    for (const ion of ions) sum[ion] += (water[ion] * volumeL) / totalL;
  }
  return sum;
}
