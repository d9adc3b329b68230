import { notNegative, positive } from '../numeric/guard.js';

/**
 * A mass for another volume, g: grams per litre are kept, times never are. Sum the temperature curve of the other kettle
 * again. Rounded to what the scale shows; never to nothing.
 *
 * @param massG 0 or more, g.
 * @param fromL above 0, L.
 * @param toL above 0, L.
 * @param resolutionG what the scale shows, above 0, g; without it nothing is rounded.
 * @throws RangeError outside these ranges.
 * @see proportion.
 * @example scaledMassG(40, 20, 12.4, 1) // 25
 */
export function scaledMassG(massG: number, fromL: number, toL: number, resolutionG?: number): number {
  const exact = (notNegative(massG, 'A mass', 'g') * positive(toL, 'A volume', 'L')) / positive(fromL, 'A volume', 'L');
  if (resolutionG === undefined || exact === 0) return exact;
  const step = positive(resolutionG, 'A scale resolution', 'g');
  const steps = Math.max(1, Math.round(exact / step));
  // 3 * 0.1 is 0.30000000000000004; nobody wants to weigh that.
  return Number((steps * step).toPrecision(12));
}

export interface StockNeed {
  name: string;
  massG: number;
  stockG: number;
}

/**
 * The largest volume that the stores allow, L, and which ingredient decides; never above the volume asked for.
 *
 * @param volumeL above 0, L, that the masses are for.
 * @param needs masses and stocks 0 g or more.
 * @throws RangeError outside these ranges.
 * @see proportion.
 */
export function volumeForStockL(
  volumeL: number,
  needs: readonly StockNeed[],
): { volumeL: number; limitedBy: string | null } {
  let share = 1;
  let limitedBy: string | null = null;
  for (const { name, massG, stockG } of needs) {
    const needed = notNegative(massG, `The ${name} needed`, 'g');
    const own = needed === 0 ? 1 : notNegative(stockG, `The ${name} in stock`, 'g') / needed;
    if (own < share) {
      share = own;
      limitedBy = name;
    }
  }
  return { volumeL: share * positive(volumeL, 'A volume', 'L'), limitedBy };
}

/**
 * Cooling constant of a kettle of another size, 1/s: it falls with surface over volume, the cube root. A start value.
 *
 * @throws RangeError when not above 0.
 * @see geometry of like shapes.
 */
export function scaledCoolingConstantPerS(kPerS: number, fromL: number, toL: number): number {
  return (
    positive(kPerS, 'A cooling constant', '1/s') *
    Math.cbrt(positive(fromL, 'A volume', 'L') / positive(toL, 'A volume', 'L'))
  );
}
