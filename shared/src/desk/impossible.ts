import {
  blendedWater,
  chargeBalance,
  salinity,
  waterFromReport,
  type DrinkFigures,
  type DrinkPlan,
} from '../figures/index.js';
import type { Addition, RecipeDocument } from '../sheets/index.js';
import type { DeskResult } from './types.js';

type Impossible = Extract<DeskResult, { kind: 'impossible' }>;

/** More dry leaf than this in a litre of water is no drink, g/L. */
const MOST_LEAF_G_PER_L = 400;
/** More salt than this in a litre is brine, g/L. */
const MOST_SALT_G_PER_L = 40;
/** More acid than this in a litre, g/L. */
const MOST_ACID_G_PER_L = 150;

/** Why there are no figures although they were summed; null when they are good. */
export function impossibleFigures(document: RecipeDocument, plan: DrinkPlan, figures: DrinkFigures): Impossible | null {
  if (figures.water.salinity === 'salt') return saltWater(document);
  // Salts that are weighed balance themselves, and would hide how wrong the report is.
  if (!figures.acid || chargeBalance(plan.source).verdict === 'refused') return refusedWater(document);
  if (figures.gas.gaugeKPa === null) {
    return impossible(
      `No pressure that a keg bears gives ${document.gas.volumes} volumes at this temperature.`,
      'Plan less gas, or a colder keg.',
      'gas.volumes',
    );
  }
  return null;
}

/** Why the sums refuse: what is most out of proportion, or their own words. */
export function refusedFigures(document: RecipeDocument, plan: DrinkPlan | null, error: RangeError): Impossible {
  const leafGPerL = gPerLOf(document, (one) => one.kind === 'tea' || one.kind === 'hops');
  if (leafGPerL > MOST_LEAF_G_PER_L) {
    return impossible(
      'There is more leaf and hops than the water can wet.',
      'Look at the grams and at the volume of water: one of them has a digit too many or too few.',
      largestPath(document, (one) => one.kind === 'tea' || one.kind === 'hops') ?? 'waterL',
    );
  }
  if (gPerLOf(document, (one) => one.kind === 'acid') > MOST_ACID_G_PER_L) {
    return impossible(
      'There is more acid than any drink bears.',
      'Look at the grams of acid and at the volume of water.',
      largestPath(document, (one) => one.kind === 'acid') ?? 'waterL',
    );
  }
  if (gPerLOf(document, (one) => one.kind === 'salt') > MOST_SALT_G_PER_L) return saltWater(document);
  if (plan && chargeBalance(plan.source).verdict === 'refused') return refusedWater(document);
  const { teaBaseRatio = 1, hopBaseRatio = 1 } = document.assume;
  if (Math.max(teaBaseRatio, hopBaseRatio) > 1) {
    return impossible(
      'With this base ratio the leaf brings more base than any drink bears.',
      'Measure the pH again, degassed and cool, and let the ratio be worked out from it; or clear it.',
      teaBaseRatio > hopBaseRatio ? 'assume.teaBaseRatio' : 'assume.hopBaseRatio',
    );
  }
  return impossible(error.message, 'Look at the amounts and at the volume of water.', null);
}

function refusedWater(document: RecipeDocument): Impossible {
  const index = document.waters.findIndex(
    ({ percent, report }) => percent > 0 && chargeBalance(waterFromReport(report)).verdict === 'refused',
  );
  const name = document.waters[index]?.name;
  return impossible(
    `The plus and minus charges of ${name ?? 'the water'} differ by more than 20 %: its report cannot be right, and no pH follows from it.`,
    'Type the report again: every ion in mg/L, and the alkalinity in the form that the report names.',
    index === -1 ? 'waters' : `waters.${index}.report`,
  );
}

function saltWater(document: RecipeDocument): Impossible {
  const waters = document.waters.map(({ report, percent }) => ({ water: waterFromReport(report), volumeL: percent }));
  const isSource = salinity(blendedWater(waters)) !== 'fresh';
  return impossible(
    'This water is as salt as the sea: the pH of it cannot be worked out.',
    isSource ? 'Look at the water report: every ion in mg/L.' : 'Look at the grams of salt and at the volume of water.',
    (isSource ? null : largestPath(document, (one) => one.kind === 'salt')) ?? 'waters',
  );
}

function gPerLOf({ additions, waterL }: RecipeDocument, isMeant: (one: Addition) => boolean): number {
  return additions.filter(isMeant).reduce((sum, { massG }) => sum + massG, 0) / waterL;
}

function largestPath({ additions }: RecipeDocument, isMeant: (one: Addition) => boolean): string | null {
  const largest = additions.filter(isMeant).sort((a, b) => b.massG - a.massG)[0];
  return largest ? `additions.${additions.indexOf(largest)}.massG` : null;
}

function impossible(what: string, act: string, path: string | null): Impossible {
  return { kind: 'impossible', what, act, path };
}
