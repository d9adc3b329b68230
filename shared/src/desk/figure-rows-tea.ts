import {
  band,
  curveBetween,
  leafExtraction,
  plusMinus,
  steepDoseMin,
  steepVerdict,
  sure,
  withinFactor,
  type Band,
  type SteepVerdict,
  type TeaAddition,
} from '../figures/index.js';
import { formatVolume } from '../units/index.js';
import { row, teasOf, type Leaf, type RowContext } from './figure-row.js';
import type { FigureRow } from './types.js';

/** Rates of extraction are a judgement with a factor of two. */
const RATE_FACTOR = 2;
/** A kelvin off at the probe and in the plan, by 35 kJ/mol. */
const DOSE_SHARE = 0.1;

const words: Record<SteepVerdict, string> = {
  short: 'short',
  good: 'in the window',
  long: 'past the window',
  amber: 'past the amber line',
  red: 'past the red line',
};

/** Caffeine of the drink, and what each tea gives. */
export function teaRows(context: RowContext): FigureRow[] {
  const { document, plan, figures, units } = context;
  const { caffeineMgPerL, caffeineServingMg } = figures.tea;
  const most = document.targets.caffeineMostMgPerL;
  const serving = formatVolume(plan.servingMl / 1000, { unit: units.volume });
  return [
    row({
      id: 'tea.caffeine',
      label: 'Caffeine',
      quantity: 'mgPerL',
      band: caffeineMgPerL,
      isLead: true,
      target: most === undefined ? null : caffeineMgPerL.value > most ? 'above' : 'in',
    }),
    row({
      id: 'tea.caffeine-serving',
      label: `Caffeine in ${serving}`,
      quantity: 'mg',
      band: caffeineServingMg,
      isLead: true,
    }),
    ...teasOf(document).flatMap((leaf, index) => {
      const tea = plan.teas[index];
      return tea ? leafRows(context, leaf, tea, index) : [];
    }),
  ];
}

function leafRows({ plan, figures, day }: RowContext, leaf: Leaf, tea: TeaAddition, index: number): FigureRow[] {
  const steep = figures.tea.steeps[index];
  if (!steep) return [];
  const out = leafExtraction(curveBetween(plan.curve, tea.inAtMs, tea.outAtMs), tea.form);
  const endMs = day.marks.at(-1)?.atMs ?? tea.outAtMs;
  const isLast = endMs <= tea.outAtMs;
  const leftIn = curveBetween(plan.curve, tea.inAtMs, endMs);
  const leftInMin = steepDoseMin(leftIn);
  const of = leaf.id;
  return [
    row({
      id: 'tea.steep-dose',
      of,
      label: `Steep, ${leaf.name}`,
      quantity: 'steepMin',
      band: plusMinus(steep.steepDoseMin, DOSE_SHARE * steep.steepDoseMin, 'measured'),
      isLead: true,
      word: verdictWord(leaf, steep.verdict, steep.linesHold),
    }),
    row({ id: 'tea.dose', of, label: `Dose, ${leaf.name}`, quantity: 'gPerL', band: sure(tea.massG / plan.waterL) }),
    row({
      id: 'tea.caffeine-turns',
      of,
      label: `Caffeine sum of the steep, ${leaf.name}`,
      quantity: 'ratio',
      band: withinFactor(out.caffeineTurns, RATE_FACTOR, 'judged'),
    }),
    row({
      id: 'tea.caffeine-out',
      of,
      label: `Caffeine out of the leaf, ${leaf.name}`,
      quantity: 'percent',
      band: caffeineOut(tea, out.caffeineTurns, out.caffeineRatio),
    }),
    row({
      id: 'tea.polyphenols',
      of,
      label: `Polyphenols out, ${leaf.name}`,
      quantity: 'percent',
      band: inPercent(steep.polyphenolRatio),
    }),
    ...(isLast
      ? []
      : [
          row({
            id: 'tea.left-in',
            of,
            label: `Steep if it stays in to the keg, ${leaf.name}`,
            quantity: 'steepMin',
            band: plusMinus(leftInMin, DOSE_SHARE * leftInMin, 'measured'),
            word: verdictWord(leaf, steepVerdict(leaf.tea, leftInMin), steep.linesHold),
          }),
          row({
            id: 'tea.left-in-polyphenols',
            of,
            label: `Polyphenols out then, ${leaf.name}`,
            quantity: 'percent',
            band: polyphenolsOut(leafExtraction(leftIn, tea.form).polyphenolTurns),
          }),
        ]),
  ];
}

function verdictWord({ tea }: Leaf, verdict: SteepVerdict, linesHold: boolean): string | null {
  if (!linesHold) return null;
  return tea === 'herbal' ? 'herbs have no window' : words[verdict];
}

function inPercent({ low, value, high, grade }: Band): Band {
  return band(100 * low, 100 * value, 100 * high, grade);
}

function outAt(turns: number): number {
  return -100 * Math.expm1(-turns);
}

function polyphenolsOut(turns: number): Band {
  return band(outAt(turns / RATE_FACTOR), outAt(turns), outAt(turns * RATE_FACTOR), 'judged');
}

function caffeineOut({ caffeineMgPerG }: TeaAddition, turns: number, ratio: number): Band {
  if (turns === 0 || caffeineMgPerG === 0) return sure(100 * ratio);
  const most = ratio / -Math.expm1(-turns);
  return band(most * outAt(turns / RATE_FACTOR), 100 * ratio, most * outAt(turns * RATE_FACTOR), 'judged');
}
