import {
  acidKinds,
  acidMolPerL,
  band,
  complexedDrinkPh,
  drinkPh,
  juiceCitricGPerL,
  leafBaseBand,
  lotMultiplier,
  sure,
  withinFactor,
  type AcidFigures,
} from '../figures/index.js';
import { formatMass, formatTemp } from '../units/index.js';
import { acidityOf, gramsBand, gramsForPh, leadingAcid } from './acid-advice.js';
import { hopsOf, row, targetOf, within, type RowContext } from './figure-row.js';
import { leafBasesOf } from './leaf-bases.js';
import { coldAcid, phBandOf, plainPhBand, treatedWaterPh } from './still-ph.js';
import type { FigureRow } from './types.js';

/** What people aim for. */
const ASKED_PHS = [3.5, 3.8, 4.0];
/** A meter that shows less or more than the figures: how much it says about the leaf. */
const IF_MEASURED = [-0.2, 0.1];
const BUFFER_STEP = 0.01;
/** Less than this is not worth a line. */
const SHOWN_PH = 0.005;

/** Acid, what leaf and hops do to it, and the pH at every stage. */
export function acidRows(context: RowContext): FigureRow[] {
  const { acid } = context.figures;
  if (!acid) return [];
  const { document, units } = context;
  const { waterPh, drinkPh: wanted } = document.targets;
  const still = phBandOf(document, acid.phStill);
  const treated = treatedWaterPh(context, acid);
  const bases = leafBasesOf(document, acid);
  const temp = (tempC: number) => formatTemp(tempC, { unit: units.temperature, digits: 0 });
  const volumes = document.gas.volumes;
  return [
    row({
      id: 'acid.ph-still',
      label: 'pH of the drink, still',
      quantity: 'pH',
      band: still,
      isLead: true,
      target: wanted ? targetOf(still.value, wanted.min, wanted.max) : null,
    }),
    row({
      id: 'acid.ph-after-acid',
      label: 'pH of water, salts and acid',
      quantity: 'pH',
      band: plainPhBand(treated),
      isLead: true,
      target: targetOf(treated, waterPh.min, waterPh.max),
    }),
    ...complexedRows(context, acid),
    ...amountRows(context),
    row({ id: 'acid.tea-base', label: 'Base from the tea', quantity: 'meqPerL', band: bases.tea }),
    row({
      id: 'acid.ph-after-tea',
      label: 'pH after the tea',
      quantity: 'pH',
      band: phBandOf(document, acid.phAfterTea),
    }),
    row({ id: 'acid.hop-base', label: 'Base from the hops', quantity: 'meqPerL', band: bases.hops }),
    row({
      id: 'acid.ph-carbonated',
      label: `pH at ${volumes} volumes, ${temp(25)}`,
      quantity: 'pH',
      band: phBandOf(document, acid.phCarbonated),
    }),
    row({
      id: 'acid.ph-served',
      label: `pH at ${volumes} volumes, ${temp(document.gas.tempC)}`,
      quantity: 'pH',
      band: phBandOf(document, acid.phCarbonatedServed),
    }),
    row({
      id: 'acid.buffer',
      label: 'Base that one pH more would take',
      quantity: 'meqPerL',
      band: withinFactor(bufferMeqPerL(context, acid), leafBaseBand.high, 'judged'),
    }),
    ...(acid.titratableGPerL === null
      ? []
      : [
          row({
            id: 'acid.titratable',
            label: 'Titratable acidity, as citric acid',
            quantity: 'gPerL',
            band: within(acid.titratableGPerL, 0.15, 'measured'),
          }),
        ]),
    ...doseRows(context, acid),
    ...lotRows(context, acid),
  ];
}

/** Where calcium and magnesium hold citric acid the pH lies a little lower: a line beside the plain one. */
function complexedRows({ document, plan }: RowContext, acid: AcidFigures): FigureRow[] {
  const before = complexedDrinkPh(acidityOf(coldAcid({ document, plan }), 0)).ph;
  if (acid.phStill.value - acid.phStillComplexed < SHOWN_PH) return [];
  const { low, value, high } = acid.phStill;
  const off = acid.phStillComplexed - value;
  const still = { low: low + off, value: value + off, high: high + off };
  return [
    row({
      id: 'acid.ph-still-complexed',
      label: 'pH of the drink, with calcium holding citrate',
      quantity: 'pH',
      band: phBandOf(document, still),
    }),
    row({
      id: 'acid.ph-after-acid-complexed',
      label: 'pH of the water, with calcium holding citrate',
      quantity: 'pH',
      band: plainPhBand(before),
    }),
  ];
}

function amountRows({ plan, figures }: RowContext): FigureRow[] {
  const gPerL = plan.acids.reduce((sum, { massG }) => sum + massG, 0) / plan.waterL;
  if (gPerL === 0) return [];
  const molPerL = plan.acids.reduce((sum, one) => sum + acidMolPerL(one, plan.waterL), 0);
  const { low, value, high } = juiceCitricGPerL.freshLemon;
  const juice = figures.acid?.lemonJuiceMl ?? 0;
  return [
    row({ id: 'acid.dose', label: 'Acid, of the jar', quantity: 'gPerL', band: sure(gPerL) }),
    row({ id: 'acid.amount', label: 'Acid, pure', quantity: 'molPerL', band: within(molPerL, 0.01, 'solid') }),
    ...(juice > 0
      ? [
          row({
            id: 'acid.lemon-juice',
            label: 'As much fresh lemon juice',
            quantity: 'volumeMl',
            band: band((juice * value) / high, juice, (juice * value) / low, 'measured'),
          }),
        ]
      : []),
  ];
}

/** What leaf and hops would have to bring more to raise the pH by one, from how the pH moves here. */
function bufferMeqPerL({ plan }: RowContext, acid: AcidFigures): number {
  const base = acid.teaBaseMeqPerL + acid.hopBaseMeqPerL;
  if (base < BUFFER_STEP) return acid.bufferMeqPerLPerPh;
  const at = (meqPerL: number) => drinkPh(acidityOf(plan, meqPerL)).ph;
  return (2 * BUFFER_STEP) / (at(base + BUFFER_STEP) - at(base - BUFFER_STEP));
}

/** How much acid some usual aims take, with this leaf and without. */
function doseRows({ document, plan, units }: RowContext, acid: AcidFigures): FigureRow[] {
  const line = leadingAcid(document);
  if (!line) return [];
  const base = leafBasesOf(document, acid).all;
  return ASKED_PHS.flatMap((ph) => {
    const dose = gramsBand(plan, line, base, ph);
    if (dose.kind === 'never') return [];
    const bare = base.value > 0 ? gramsForPh(plan, line, 0, ph) : null;
    const bareG = bare?.kind === 'dose' ? bare.massG : bare?.kind === 'none-needed' ? 0 : null;
    return [
      row({
        id: 'acid.for-ph',
        of: ph.toFixed(1),
        label: `${acidWord(line.acid)} for pH ${ph.toFixed(1)}`,
        quantity: 'massG',
        band: dose.kind === 'dose' ? dose.massG : sure(0),
        word: bareG === null ? null : `${formatMass(bareG, { unit: units.mass })} without leaf and hops`,
      }),
    ];
  });
}

function acidWord(acid: keyof typeof acidKinds): string {
  return `${acidKinds[acid].dissociates.replace(/^./, (letter) => letter.toUpperCase())} acid`;
}

/** What a pH a little off would say about this leaf and these hops. */
function lotRows({ document, plan }: RowContext, acid: AcidFigures): FigureRow[] {
  const base = acid.teaBaseMeqPerL + acid.hopBaseMeqPerL;
  if (base === 0) return [];
  const { teaBaseRatio = 1, hopBaseRatio = 1 } = document.assume;
  // Once the ratios of tea and hops differ there is no one number to put in place of them.
  if (teaBaseRatio !== hopBaseRatio) return [];
  const near = Math.floor(acid.phStill.value * 20) / 20;
  return IF_MEASURED.flatMap((off) => {
    const measured = near + off;
    if (measured < 1 || measured > 9) return [];
    const times = lotMultiplier(acidityOf(plan, base), measured);
    if (times === null) return [];
    const what = hopsOf(document).length > 0 ? 'leaf and hops' : 'leaf';
    return [
      row({
        id: 'acid.base-ratio',
        of: off < 0 ? 'lower' : 'higher',
        label: `Base of ${what}, if the meter says ${measured.toFixed(2)}`,
        quantity: 'ratio',
        band: within(times * teaBaseRatio, 0.1, 'measured'),
        word: 'times the usual',
      }),
    ];
  });
}
