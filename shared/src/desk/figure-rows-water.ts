import { plusMinus, sure, type Ion } from '../figures/index.js';
import { formatTemp } from '../units/index.js';
import { row, within, type RowContext } from './figure-row.js';
import type { FigureRow } from './types.js';

/** Salts as labelled, and scales. */
const SALT_SHARE = 0.01;
const CONDUCTIVITY_SHARE = 0.05;

const ionLabels: readonly [Ion, string][] = [
  ['ca', 'Calcium'],
  ['mg', 'Magnesium'],
  ['na', 'Sodium'],
  ['k', 'Potassium'],
  ['cl', 'Chloride'],
  ['so4', 'Sulfate'],
  ['hco3', 'Bicarbonate'],
];

/** Treated water, before heat. */
export function waterRows({ figures: { water }, units }: RowContext): FigureRow[] {
  const { balance, chlorideSulfate } = water;
  const ratio = (id: string, label: string, value: number | null, isLead: boolean): FigureRow[] =>
    value === null ? [] : [row({ id, label, quantity: 'ratio', band: within(value, SALT_SHARE, 'solid'), isLead })];
  return [
    ...ionLabels.map(([ion, label]) =>
      row({
        id: `water.${ion}`,
        workings: 'water.ions',
        label,
        quantity: 'mgPerL',
        band: within(water.ions[ion], SALT_SHARE, 'solid'),
        isLead: ion === 'ca',
      }),
    ),
    ...ratio('water.cl-so4-ions', 'Chloride to sulfate, by mg/L', chlorideSulfate.byIonMass, true),
    ...ratio('water.cl-so4-salts', 'Chloride to sulfate, by grams of salt', chlorideSulfate.bySaltMass, false),
    row({
      id: 'water.hardness',
      label: 'Hardness, as CaCO₃',
      quantity: 'mgPerL',
      band: within(water.hardnessAsCaCo3, SALT_SHARE, 'solid'),
    }),
    row({
      id: 'water.alkalinity',
      label: 'Alkalinity',
      quantity: 'meqPerL',
      band: within(water.alkalinityMeqPerL, SALT_SHARE, 'solid'),
    }),
    row({ id: 'water.cations', label: 'Plus charges', quantity: 'meqPerL', band: sure(balance.cationsMeqPerL) }),
    row({
      id: 'water.anions',
      label: 'Minus charges',
      quantity: 'meqPerL',
      band: sure(balance.anionsMeqPerL),
      word: { balanced: 'they agree', flagged: 'they differ', refused: 'they cannot be right' }[balance.verdict],
    }),
    row({
      id: 'water.ionic-strength',
      label: 'Ionic strength',
      quantity: 'molPerL',
      band: within(water.ionicStrength, SALT_SHARE, 'solid'),
    }),
    row({
      id: 'water.conductivity',
      label: `Conductivity at ${formatTemp(25, { unit: units.temperature, digits: 0 })}`,
      quantity: 'uSPerCm',
      band: plusMinus(water.conductivityUsPerCm, CONDUCTIVITY_SHARE * water.conductivityUsPerCm, 'measured'),
    }),
  ];
}
