import type { AcidKind, LeafForm, Salt, TeaKind } from '@steepfall/shared/figures';
import type { IngredientKind } from '@steepfall/shared/sheets';
import type { IngredientFacts } from '@steepfall/shared/stores';
import { formatMass, type UnitPreferences } from '@steepfall/shared/units';

export const kindWords: Record<IngredientKind, string> = {
  tea: 'tea',
  hops: 'hops',
  salt: 'salt',
  acid: 'acid',
  other: 'other',
};

export const teaWords: Record<TeaKind, string> = {
  green: 'green tea',
  white: 'white tea',
  oolong: 'oolong',
  black: 'black tea',
  herbal: 'herbs, without tea',
};

export const formWords: Record<LeafForm, string> = {
  whole: 'whole leaf',
  broken: 'broken leaf',
  dust: 'dust, as in tea bags',
};

/** One name on the shelf, and what may be in the jar under it. */
export interface Jar<Value extends string> {
  name: string;
  variants: readonly { value: Value; label: string; tell: string }[];
}

/** Asked in plain words, since the water in the crystal changes what a gram brings. */
export const saltJars: readonly Jar<Salt>[] = [
  {
    name: 'Calcium chloride',
    variants: [
      {
        value: 'calciumChlorideDihydrate',
        label: 'With water in it: dihydrate',
        tell: 'The label says dihydrate or CaCl2·2H2O. The usual one in flakes; take it if the label says nothing.',
      },
      {
        value: 'calciumChlorideAnhydrous',
        label: 'Dry: anhydrous',
        tell: 'The label says anhydrous. It warms the water well when it dissolves, and a gram brings a third more calcium.',
      },
    ],
  },
  jarOf('Gypsum, calcium sulfate', 'gypsum'),
  jarOf('Magnesium sulfate, the heptahydrate', 'magnesiumSulfateHeptahydrate'),
  jarOf('Magnesium chloride, the hexahydrate', 'magnesiumChlorideHexahydrate'),
  jarOf('Table salt, sodium chloride', 'sodiumChloride'),
  jarOf('Potassium chloride', 'potassiumChloride'),
  jarOf('Baking soda, sodium bicarbonate', 'sodiumBicarbonate'),
  jarOf('Potassium bicarbonate', 'potassiumBicarbonate'),
  jarOf('Chalk, calcium carbonate', 'calciumCarbonate'),
  jarOf('Slaked lime, calcium hydroxide', 'calciumHydroxide'),
];

export const acidJars: readonly Jar<AcidKind>[] = [
  {
    name: 'Citric acid',
    variants: [
      {
        value: 'citricAnhydrous',
        label: 'Dry: anhydrous',
        tell: 'The label says anhydrous. The usual one in the kitchen; take it if the label says nothing.',
      },
      {
        value: 'citricMonohydrate',
        label: 'With water in it: monohydrate',
        tell: 'The label says monohydrate. A gram is 9 % weaker.',
      },
    ],
  },
  jarOf('Lactic acid', 'lactic'),
  jarOf('Phosphoric acid', 'phosphoric'),
  jarOf('Malic acid', 'malic'),
  jarOf('Tartaric acid', 'tartaric'),
  jarOf('Ascorbic acid', 'ascorbic'),
];

function jarOf<Value extends string>(name: string, value: Value): Jar<Value> {
  return { name, variants: [{ value, label: name, tell: '' }] };
}

export function jarWith<Value extends string>(jars: readonly Jar<Value>[], value: Value): Jar<Value> {
  const found = jars.find(({ variants }) => variants.some((variant) => variant.value === value));
  if (!found) throw new RangeError(`No jar holds ${value}.`);
  return found;
}

function substanceWords<Value extends string>(jars: readonly Jar<Value>[], value: Value): string {
  const { name, variants } = jarWith(jars, value);
  if (variants.length === 1) return name;
  const variant = variants.find((each) => each.value === value);
  return variant ? `${name}, ${variant.label.slice(variant.label.indexOf(': ') + 2)}` : name;
}

/** What is known of an ingredient, by its kind, in a line. */
export function factsWords(facts: IngredientFacts): string {
  switch (facts.kind) {
    case 'salt':
      return `${substanceWords(saltJars, facts.salt)} · ${facts.assayPercent} % pure`;
    case 'acid':
      return `${substanceWords(acidJars, facts.acid)} · ${facts.strengthPercent} % strong`;
    case 'tea':
      return [
        teaWords[facts.tea],
        formWords[facts.form],
        facts.caffeineMgPerG === null
          ? 'caffeine as usual for its kind'
          : `caffeine ${facts.caffeineMgPerG} mg/g, as told`,
      ].join(' · ');
    case 'hops':
      return facts.form === 'pellets' ? 'pellets' : 'whole cones';
    case 'other':
      return 'weighed and timed, in no sum but the yield';
  }
}

export function lowWords({ lowStockG }: IngredientFacts, unit: UnitPreferences['mass']): string | null {
  return lowStockG === null ? null : `low below ${formatMass(lowStockG, { unit })}`;
}
