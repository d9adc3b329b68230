import {
  alphaSolubilityAt60,
  band,
  curveBetween,
  drinkPh,
  hopContactTime,
  isomerise,
  sure,
  withinFactor,
  type Band,
  type HopAddition,
  type TemperatureCurve,
} from '../figures/index.js';
import { acidityOf } from './acid-advice.js';
import { hopsOf, row, within, type RowContext } from './figure-row.js';
import type { FigureRow } from './types.js';

const HELD_MS = 20 * 60_000;
/** Ends of what is believed of solubility; held beyond. */
const SOLUBILITY_PH = { from: 2, to: 9 } as const;
/** Below 80 °C the rate is extrapolated. */
const RATE_SPREAD = 1.35;

/** Bitterness, and what it is made of. */
export function hopRows(context: RowContext): FigureRow[] {
  const { document, plan, figures } = context;
  const { hops } = figures;
  if (!hops || plan.hops.length === 0) return [];
  return [
    row({
      id: 'hops.bitterness',
      label: 'Bitterness index',
      quantity: 'index',
      band: hops.bitternessIndex,
      isLead: true,
      word: hops.word,
    }),
    ...hopsOf(document).flatMap((line, index) => {
      const one = plan.hops[index];
      if (!one) return [];
      const turns = hopContactTime(curveBetween(plan.curve, one.inAtMs, one.outAtMs))?.turns ?? 0;
      return [
        row({
          id: 'hops.dose',
          of: line.id,
          label: `Dose, ${line.name}`,
          quantity: 'gPerL',
          band: sure(one.massG / plan.waterL),
        }),
        row({
          id: 'hops.turns',
          of: line.id,
          label: `Isomerisation sum, ${line.name}`,
          quantity: 'ratio',
          band: withinFactor(turns, RATE_SPREAD, 'measured'),
        }),
      ];
    }),
    row({
      id: 'hops.alpha',
      label: 'Alpha acids, if all were dissolved',
      quantity: 'mgPerL',
      band: within(hops.alphaMgPerL, 0.1, 'measured'),
    }),
    row({ id: 'hops.iso', label: 'Iso-alpha acids', quantity: 'mgPerL', band: hops.isoMgPerL }),
    ...alternativeRows(context),
    row({ id: 'hops.humulinones', label: 'Humulinones', quantity: 'mgPerL', band: hops.humulinoneMgPerL }),
    row({
      id: 'hops.alpha-dissolved',
      label: 'Alpha acids that stay dissolved cold',
      quantity: 'mgPerL',
      band: hops.alphaDissolvedMgPerL,
    }),
  ];
}

/** Iso-alpha acids if the hops met other heat or other acid: why late hops in acid water stay soft. */
function alternativeRows(context: RowContext): FigureRow[] {
  const { plan, figures, day } = context;
  const { acid, hops } = figures;
  const chill = day.marks.find(({ kind }) => kind === 'chill');
  if (!acid || !hops || hops.alphaMgPerL === 0) return [];
  const iso = (curveOf: (one: HopAddition) => TemperatureCurve, ph: number, at60: number | null) =>
    plan.hops.reduce((sum, one) => sum + isoOf(context, one, curveOf(one), ph, at60), 0);
  const spread = (curveOf: (one: HopAddition) => TemperatureCurve, ph: number): Band => {
    const { low, value, high } = alphaSolubilityAt60;
    return band(
      iso(curveOf, ph, low) / RATE_SPREAD,
      iso(curveOf, ph, value),
      iso(curveOf, ph, high) * RATE_SPREAD,
      'judged',
    );
  };
  const asPlanned = (one: HopAddition) => curveBetween(plan.curve, one.inAtMs, one.outAtMs);
  const allDissolved = iso(asPlanned, acid.phAtHops, null);
  const rows = [
    row({
      id: 'hops.iso-all-dissolved',
      label: 'Iso-alpha acids, if all alpha were dissolved',
      quantity: 'mgPerL',
      band: withinFactor(allDissolved, RATE_SPREAD, 'measured'),
    }),
  ];
  if (!chill) return rows;
  const atChill = (one: HopAddition) => curveBetween(plan.curve, chill.atMs, Math.max(chill.atMs, one.outAtMs));
  const hottestC = Math.max(...plan.curve.map(({ tempC }) => tempC));
  const heldCurve = [
    { atMs: 0, tempC: hottestC },
    { atMs: HELD_MS, tempC: hottestC },
  ];
  const held = () => heldCurve;
  const alternative = (id: string, label: string, value: Band) => row({ id, label, quantity: 'mgPerL', band: value });
  return [
    ...rows,
    alternative('hops.iso-at-chill', 'Iso-alpha acids, with the hops in at chiller on', spread(atChill, acid.phAtHops)),
    alternative('hops.iso-held', 'Iso-alpha acids, held hot for 20 minutes', spread(held, acid.phAtHops)),
    alternative('hops.iso-held-acid-later', 'The same with the acid after them', spread(held, phWithoutAcid(context))),
  ];
}

function phWithoutAcid({ plan, figures: { acid } }: RowContext): number {
  const base = (acid?.teaBaseMeqPerL ?? 0) + (acid?.hopBaseMeqPerL ?? 0);
  return drinkPh(acidityOf(plan, base, () => true)).ph;
}

/** All hops share what the liquid can dissolve. */
function isoOf(
  { plan, figures: { hops } }: RowContext,
  one: HopAddition,
  curve: TemperatureCurve,
  ph: number,
  at60: number | null,
): number {
  const all = hops?.alphaMgPerL ?? 0;
  const sumG = plan.hops.reduce((sum, { massG, alphaPercent }) => sum + massG * alphaPercent, 0);
  const share = sumG > 0 ? (one.massG * one.alphaPercent) / sumG : 0;
  if (share === 0) return 0;
  const solubilityAt60MgPerL = at60 === null ? null : at60 * share;
  const held = Math.min(SOLUBILITY_PH.to, Math.max(SOLUBILITY_PH.from, ph));
  return isomerise(curve, { alphaMgPerL: all * share, ph: held, solubilityAt60MgPerL }).isoMgPerL;
}
