import type { AcidKind, Salt } from '@steepfall/shared/figures';
import type { IngredientKind } from '@steepfall/shared/sheets';
import type { IngredientFacts } from '@steepfall/shared/stores';
import { formatMass, type UnitPreferences } from '@steepfall/shared/units';
import { acidNames, hopFormNames, leafFormNames, saltNames, teaNames } from '#lib/substance-names.ts';

export const kindWords: Record<IngredientKind, string> = {
  tea: 'tea',
  hops: 'hops',
  salt: 'salt',
  acid: 'acid',
  other: 'other',
};

/** One name on the shelf, and what may be in the jar under it. */
export interface Jar<Value extends string> {
  name: string;
  variants: readonly { value: Value; label: string; tell: string }[];
}

/** Asked in plain words, since the water in the crystal changes what a gram brings. */
export const saltJars: readonly Jar<Salt>[] = [
  {
    name: 'calcium chloride',
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
  jarOf(saltNames, 'gypsum'),
  jarOf(saltNames, 'magnesiumSulfateHeptahydrate'),
  jarOf(saltNames, 'magnesiumChlorideHexahydrate'),
  jarOf(saltNames, 'sodiumChloride'),
  jarOf(saltNames, 'potassiumChloride'),
  jarOf(saltNames, 'sodiumBicarbonate'),
  jarOf(saltNames, 'potassiumBicarbonate'),
  jarOf(saltNames, 'calciumCarbonate'),
  jarOf(saltNames, 'calciumHydroxide'),
];

export const acidJars: readonly Jar<AcidKind>[] = [
  {
    name: 'citric acid',
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
  jarOf(acidNames, 'lactic'),
  jarOf(acidNames, 'phosphoric'),
  jarOf(acidNames, 'malic'),
  jarOf(acidNames, 'tartaric'),
  jarOf(acidNames, 'ascorbic'),
];

function jarOf<Value extends string>(names: Record<Value, string>, value: Value): Jar<Value> {
  const name = names[value];
  return { name, variants: [{ value, label: name, tell: '' }] };
}

export function jarWith<Value extends string>(jars: readonly Jar<Value>[], value: Value): Jar<Value> {
  const found = jars.find(({ variants }) => variants.some((variant) => variant.value === value));
  if (!found) throw new RangeError(`No jar holds ${value}.`);
  return found;
}

/** What is known of an ingredient, by its kind, in a line. */
export function factsWords(facts: IngredientFacts): string {
  switch (facts.kind) {
    case 'salt':
      return `${saltNames[facts.salt]} · ${facts.assayPercent} % pure`;
    case 'acid':
      return `${acidNames[facts.acid]} · ${facts.strengthPercent} % strong`;
    case 'tea':
      return [
        teaNames[facts.tea],
        leafFormNames[facts.form],
        facts.caffeineMgPerG === null
          ? 'caffeine as usual for its kind'
          : `caffeine ${facts.caffeineMgPerG} mg/g, as told`,
      ].join(' · ');
    case 'hops':
      return hopFormNames[facts.form];
    case 'other':
      return 'weighed and timed, in no sum but the yield';
  }
}

export function lowWords({ lowStockG }: IngredientFacts, unit: UnitPreferences['mass']): string | null {
  return lowStockG === null ? null : `low below ${formatMass(lowStockG, { unit })}`;
}
