import { phBand, tooAcidForCopper, type Band, type PhBand } from '../figures/index.js';
import { leadingAcid, gramsForPh, wantedPh } from './acid-advice.js';
import { contactMs } from './drink-plan.js';
import type { RowContext } from './figure-row.js';
import { phBandOf, treatedWaterPh } from './still-ph.js';
import type { DeskWarning } from './types.js';
import { CODES_FIRST, pathOf, warning, wordsIn } from './warning.js';

/** As sour as lemonade, g/L as citric acid (common practice, no source). */
const SOUR_G_PER_L = 4;
const ASKS: readonly PhBand[] = ['assessment', 'low-acid'];

export function acidWarnings(context: RowContext): DeskWarning[] {
  const { acid } = context.figures;
  if (!acid) return [];
  const { document } = context;
  const still = phBandOf(document, acid.phStill);
  return [
    ...lineWarnings(context, still),
    ...targetWarnings(context, still),
    ...waterPhWarnings(context, treatedWaterPh(context, acid)),
    ...copperWarnings(context, Math.min(acid.phAfterAcid, still.low)),
    ...sourWarnings(context, acid.titratableGPerL),
    ...noAcidWarnings(context),
    ...lateWarnings(context),
  ];
}

/** Path of the acid that one would change, or of the list that lacks one. */
function acidPath({ document }: RowContext): string {
  return pathOf(document, leadingAcid(document), 'massG') ?? 'additions';
}

/** The grams that bring the drink where it is wanted, in words. */
function doseWords(context: RowContext): string {
  const { document, plan, figures } = context;
  const line = leadingAcid(document);
  if (!line || !figures.acid) return 'Add an acid.';
  const base = figures.acid.teaBaseMeqPerL + figures.acid.hopBaseMeqPerL;
  const ph = wantedPh(document);
  const dose = gramsForPh(plan, line, base, ph);
  const words = wordsIn(context.units);
  if (dose.kind === 'dose')
    return `About ${words.mass(dose.massG)} of ${line.name} in all would bring it to pH ${words.ph(ph)}.`;
  return dose.kind === 'none-needed'
    ? `Without any ${line.name} it would be at pH ${dose.ph.toFixed(1)}.`
    : `${line.name} cannot bring it to pH ${words.ph(ph)}: take a stronger acid.`;
}

function clampPh(ph: number): number {
  return Math.min(14, Math.max(0, ph));
}

function lineWarnings(context: RowContext, still: Band): DeskWarning[] {
  const value = phBand(clampPh(still.value));
  const high = phBand(clampPh(still.high));
  const { ph } = wordsIn(context.units);
  const path = acidPath(context);
  if (value === 'low-acid') {
    return [
      warning('ph-low-acid', 'danger', path, {
        what: `The planned pH is ${ph(still.value)}, still and degassed: above 4.6.`,
        why: 'Above pH 4.6 acid does not hold back the germs that form spores. The US Food Code counts such a drink as one that needs time and temperature control.',
        act: `${doseWords(context)} As it is: measure with a meter, keep it cold from the start, write down dates. ${CODES_FIRST}`,
      }),
    ];
  }
  if (value === 'assessment') {
    return [
      warning('ph-assessment', 'danger', path, {
        what: `The planned pH is ${ph(still.value)}, still and degassed: between 4.2 and 4.6.`,
        why: 'This is the band where the US Food Code asks for a product assessment when a drink is not sealed after heating.',
        act: `${doseWords(context)} As it is: treat it as needing time and temperature control. ${CODES_FIRST}`,
      }),
    ];
  }
  if (!ASKS.includes(high)) return [];
  return [
    warning('ph-may-cross', 'care', path, {
      what: `The planned pH is ${ph(still.value)}, and may come out as high as ${ph(still.high)}: over the line at 4.2.`,
      why: 'How much base leaf and hops bring is known within a factor of two. From pH 4.2 up the US Food Code asks for a product assessment when a drink is not sealed after heating.',
      act: 'Measure the pH of the finished drink with a meter, degassed, and type it in: the next plan is then good to a tenth.',
    }),
  ];
}

function targetWarnings(context: RowContext, still: Band): DeskWarning[] {
  const wanted = context.document.targets.drinkPh;
  if (!wanted) return [];
  const { ph } = wordsIn(context.units);
  const range = `${ph(wanted.min)} to ${ph(wanted.max)}`;
  if (still.value > wanted.max) {
    return [
      warning('ph-above-target', 'care', acidPath(context), {
        what: `The drink comes to pH ${ph(still.value)}; you want ${range}.`,
        why: 'Leaf and hops take up acid: after them there is less of it than after the dose.',
        act: doseWords(context),
      }),
    ];
  }
  if (still.value >= wanted.min) return [];
  return [
    warning('ph-below-target', 'care', acidPath(context), {
      what: `The drink comes to pH ${ph(still.value)}; you want ${range}.`,
      why: 'There is more acid than leaf and hops take up.',
      act: doseWords(context),
    }),
  ];
}

function waterPhWarnings(context: RowContext, value: number): DeskWarning[] {
  const { min, max } = context.document.targets.waterPh;
  if (value >= min && value <= max) return [];
  const { ph } = wordsIn(context.units);
  return [
    warning(value < min ? 'water-ph-below' : 'water-ph-above', 'note', 'targets.waterPh', {
      what: `The treated water comes to pH ${ph(value)}; the run sheet will wait for ${ph(min)} to ${ph(max)}.`,
      why: 'The step that measures the water asks for a value in this range.',
      act: 'Set the range around what the water will be, or change the acid.',
    }),
  ];
}

function copperWarnings({ kit }: RowContext, lowestPh: number): DeskWarning[] {
  const parts = [
    ...(kit.kettle?.metal === 'copper' ? ['kettle'] : []),
    ...(kit.chiller?.metal === 'copper' ? ['chiller'] : []),
  ];
  if (parts.length === 0 || !tooAcidForCopper(clampPh(lowestPh))) return [];
  return [
    warning('copper', 'danger', null, {
      what: `The ${parts.join(' and the ')} ${parts.length > 1 ? 'are' : 'is'} of copper, and the liquid is below pH 6.`,
      why: 'Acid takes copper into the drink. The US Food Code bars copper from food below pH 6; its exception names beer, which this is not. Copper also eats hop aroma.',
      act: 'Use stainless steel.',
    }),
  ];
}

function sourWarnings(context: RowContext, titratableGPerL: number | null): DeskWarning[] {
  if (titratableGPerL === null || titratableGPerL < SOUR_G_PER_L) return [];
  return [
    warning('sour', 'care', acidPath(context), {
      what: `The drink holds ${titratableGPerL.toFixed(1)} g/L of acid, as citric acid.`,
      why: 'Sourness follows this number more than the pH: it will be as sour as lemonade, with no sugar against it.',
      act: 'Taste a small glass of it first, or plan less acid and less leaf: leaf is what asks for the acid.',
    }),
  ];
}

function noAcidWarnings({ document }: RowContext): DeskWarning[] {
  if (leadingAcid(document)) return [];
  return [
    warning('no-acid', 'care', 'additions', {
      what: 'There is no acid in this recipe.',
      why: 'Leaf and hops bring base. Without acid the drink ends near pH 5 to 6, tastes flat, and has nothing that holds germs back.',
      act: 'Add citric, lactic or another acid; the desk works out the grams.',
    }),
  ];
}

/** Acid after the hops is a choice with a price, and acid in the keg is in no reading of the day. */
function lateWarnings({ document, plan, day }: RowContext): DeskWarning[] {
  const late = document.additions.filter((one) => one.kind === 'acid' && one.in.at === 'transfer');
  const first = late[0];
  if (first) {
    return [
      warning('acid-in-keg', 'care', pathOf(document, first, 'in'), {
        what: `${first.name} goes into the keg, after everything else.`,
        why: 'Hops and tea meet a high pH all day, and no reading of the day shows the pH of the finished drink.',
        act: 'Stir or roll the keg, and measure the pH of a degassed glass from it.',
      }),
    ];
  }
  const acid = document.additions.find((one) => one.kind === 'acid');
  if (!acid || !plan.acidAfterHops || contactMs(day, acid.id).inAtMs === 0) return [];
  return [
    warning('acid-after-hops', 'note', pathOf(document, acid, 'in'), {
      what: 'The acid goes in after the hops.',
      why: 'At a higher pH more alpha acids dissolve, so more of them turn bitter and more fall out as haze when the acid comes.',
      act: 'Put the acid in with the cold water unless you want this.',
    }),
  ];
}
