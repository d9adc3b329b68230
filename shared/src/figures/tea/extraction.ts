import { curveIntegralMin } from '../curve/curve-integral.js';
import { curveBetween, type TemperatureCurve } from '../curve/temperature-curve.js';
import { arrheniusFactor } from '../numeric/arrhenius.js';
import { entryOf, notNegative, positive } from '../numeric/guard.js';

/**
 * Rate at 80 °C, 1/min, and the share that can come out at all. A judgement with a factor of two on the rates, from Jaganyi
 * and Price 1999 (caffeine, broken leaf), Farakte et al. 2015 (polyphenols by size) and Price and Spiro 1985 (size).
 */
export const leafForms = {
  dust: { caffeinePerMin: 2.0, polyphenolPerMin: 1.3, mostRatio: 0.95 },
  broken: { caffeinePerMin: 1.0, polyphenolPerMin: 0.5, mostRatio: 0.93 },
  whole: { caffeinePerMin: 0.5, polyphenolPerMin: 0.3, mostRatio: 0.9 },
} as const;

export type LeafForm = keyof typeof leafForms;

/** kJ/mol. Caffeine: Jaganyi and Price 1999. Polyphenols: near Farakte 2015. */
const ENERGY = { caffeine: 40.3, polyphenol: 35 } as const;
/** The model is held outside this, °C. */
const FROM_C = 5;
const TO_C = 100;

/**
 * Sum of an extraction rate over the time the leaf is in, without unit: 1 - exp(-X) of what can come out is out.
 *
 * @param curve temperature from leaf in to leaf out; below 5 and above 100 °C the rate is held.
 * @param rateAt80PerMin above 0, 1/min.
 * @param energyKjPerMol activation energy.
 * @throws RangeError outside these ranges.
 * @see first-order extraction with an Arrhenius rate.
 */
export function extractionTurns(curve: TemperatureCurve, rateAt80PerMin: number, energyKjPerMol: number): number {
  const k80 = positive(rateAt80PerMin, 'An extraction rate', '1/min');
  const rate = (tempC: number) => k80 * arrheniusFactor(Math.min(TO_C, Math.max(FROM_C, tempC)), energyKjPerMol, 80);
  return curveIntegralMin(curve, rate);
}

export interface Extraction {
  caffeineTurns: number;
  polyphenolTurns: number;
  /** Share of the caffeine in the leaf that is in the drink, 0 to 1. */
  caffeineRatio: number;
  /** Polyphenols that are out, over what can come out, 0 to 1. */
  polyphenolRatio: number;
}

/**
 * What a steep takes out of the leaf.
 *
 * @param options `rateFactor` above 0 multiplies both rates (for a band); `wettingLagS` 0 or more is cut off the start: 15 to
 * 25 s for dry whole leaf.
 * @throws RangeError outside these ranges.
 * @see leafForms.
 */
export function leafExtraction(
  curve: TemperatureCurve,
  form: LeafForm,
  { rateFactor = 1, wettingLagS = 0 }: { rateFactor?: number; wettingLagS?: number } = {},
): Extraction {
  const { caffeinePerMin, polyphenolPerMin, mostRatio } = entryOf(leafForms, form, 'A leaf form');
  const factor = positive(rateFactor, 'A rate factor');
  const wetMs = (curve[0]?.atMs ?? 0) + notNegative(wettingLagS, 'A wetting lag', 's') * 1000;
  const wet = wettingLagS > 0 ? afterWetting(curve, wetMs) : curve;
  const caffeineTurns = factor * extractionTurns(wet, caffeinePerMin, ENERGY.caffeine);
  const polyphenolTurns = factor * extractionTurns(wet, polyphenolPerMin, ENERGY.polyphenol);
  return {
    caffeineTurns,
    polyphenolTurns,
    caffeineRatio: -mostRatio * Math.expm1(-caffeineTurns),
    polyphenolRatio: -Math.expm1(-polyphenolTurns),
  };
}

function afterWetting(curve: TemperatureCurve, fromMs: number): TemperatureCurve {
  return curveBetween(curve, fromMs, curve.at(-1)?.atMs ?? fromMs);
}
