import { notNegative, positive } from '../numeric/guard.js';

/**
 * Liquid kept back, L per g dry. Leaf: drained, a judgement from spent leaf at 75 to 80 % moisture (from memory). Hops: pellets
 * in a drained bag to settled; cones about 10 L/kg (from memory), their band a judgement. Common practice, no source.
 */
export const heldLPerG = {
  leaf: { low: 0.003, value: 0.004, high: 0.0055 },
  hops: { low: 0.004, value: 0.007, high: 0.009 },
  cones: { low: 0.007, value: 0.01, high: 0.013 },
} as const;

export interface Losses {
  startL: number;
  leafG: number;
  /** Pellets. */
  hopsG: number;
  /** Whole cones; none unless told. */
  conesG?: number;
  evaporatedL: number;
  deadSpaceL: number;
}

export interface DrinkYield {
  low: number;
  value: number;
  high: number;
  leafL: number;
  hopsL: number;
  hopsLowL: number;
  hopsHighL: number;
}

/**
 * What reaches the keg, L at 20 °C; never below 0.
 *
 * @param losses start above 0 L, masses and volumes 0 or more.
 * @throws RangeError outside these ranges.
 * @see volume balance with heldLPerG.
 * @example drinkYieldL({ startL: 20, leafG: 100, hopsG: 60, evaporatedL: 0.05, deadSpaceL: 0 }).value // 19.1
 */
export function drinkYieldL(losses: Losses): DrinkYield {
  const start = positive(losses.startL, 'A start volume', 'L');
  const leafG = notNegative(losses.leafG, 'A mass of leaf', 'g');
  const hopsG = notNegative(losses.hopsG, 'A mass of hops', 'g');
  const conesG = notNegative(losses.conesG ?? 0, 'A mass of cones', 'g');
  const heldBy = (level: 'low' | 'value' | 'high') => heldLPerG.hops[level] * hopsG + heldLPerG.cones[level] * conesG;
  const gone =
    notNegative(losses.evaporatedL, 'The evaporated water', 'L') + notNegative(losses.deadSpaceL, 'A dead space', 'L');
  const left = (level: 'low' | 'value' | 'high') =>
    Math.max(0, start - gone - heldLPerG.leaf[level] * leafG - heldBy(level));
  return {
    low: left('high'),
    value: left('value'),
    high: left('low'),
    leafL: heldLPerG.leaf.value * leafG,
    hopsL: heldBy('value'),
    hopsLowL: heldBy('low'),
    hopsHighL: heldBy('high'),
  };
}

/**
 * How much stronger everything dissolved becomes by evaporation. Liquid that leaf holds leaves at the drink's strength and
 * changes nothing.
 *
 * @param startL above 0, L.
 * @param evaporatedL 0 or more and below `startL`, L.
 * @throws RangeError outside these ranges.
 * @see mass balance.
 */
export function concentrationFactor(startL: number, evaporatedL: number): number {
  const start = positive(startL, 'A start volume', 'L');
  return (
    start / positive(start - notNegative(evaporatedL, 'The evaporated water', 'L'), 'What evaporation leaves', 'L')
  );
}
