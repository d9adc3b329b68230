import { notNegative } from '../numeric/guard.js';
import type { TeaKind } from '../tea/steep-dose.js';

export interface HazeConditions {
  caMgPerL: number;
  hardnessAsCaCo3MgPerL: number;
  teas: readonly { kind: TeaKind; doseGPerL: number }[];
  hops: boolean;
  /** Below 10 °C within a day of going into the keg. */
  chilledCold: boolean;
}

export type HazeFlag =
  /** Calcium with the acids of tea: oxalate first, days later as sediment. */
  | { kind: 'calcium'; level: 'amber' | 'red' }
  /** Tea cream and hop resin come out in the cold: rest cold, then rack off the sediment. */
  | { kind: 'cold-rest'; level: 'amber' }
  /** Film on the surface from polyphenols and calcium; acid weakens it. */
  | { kind: 'film'; level: 'amber' };

const CALCIUM_FROM = 40;
const STRONG_BLACK_G_PER_L = 6;
const FILM_FROM_HARDNESS = 50;

/**
 * What may cloud the drink; an empty list is no promise.
 *
 * @param conditions numbers 0 or more.
 * @throws RangeError when negative or not finite.
 * @see calcium above 40 mg/L with green tea, Food Chem. 139, 944, 2013; film from 50 mg/L CaCO3, none with rooibos, Giacomin and
 * Fischer 2021 and Giacomin et al. 2023; cream, Jöbstl et al. 2005. Levels are judgement.
 */
export function hazeFlags(conditions: HazeConditions): HazeFlag[] {
  const ca = notNegative(conditions.caMgPerL, 'Calcium', 'mg/L');
  const hardness = notNegative(conditions.hardnessAsCaCo3MgPerL, 'Hardness', 'mg/L');
  const teas = conditions.teas.filter(({ doseGPerL }) => notNegative(doseGPerL, 'A dose of leaf', 'g/L') > 0);
  const leaf = teas.filter(({ kind }) => kind !== 'herbal');
  const strongBlack = leaf.some(({ kind, doseGPerL }) => kind === 'black' && doseGPerL > STRONG_BLACK_G_PER_L);
  const pale = leaf.some(({ kind }) => kind === 'green' || kind === 'white');
  const flags: HazeFlag[] = [];
  if (ca > CALCIUM_FROM && strongBlack) flags.push({ kind: 'calcium', level: 'red' });
  else if (ca > CALCIUM_FROM && pale) flags.push({ kind: 'calcium', level: 'amber' });
  if (conditions.chilledCold && (leaf.length > 0 || conditions.hops)) flags.push({ kind: 'cold-rest', level: 'amber' });
  if (hardness >= FILM_FROM_HARDNESS && leaf.length > 0) flags.push({ kind: 'film', level: 'amber' });
  return flags;
}
