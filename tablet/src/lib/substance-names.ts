import type { AcidKind, LeafForm, Salt, TeaKind } from '@steepfall/shared/figures';

/** The names on the jars, with the water in the crystal where it matters. */
export const saltNames: Record<Salt, string> = {
  calciumChlorideDihydrate: 'calcium chloride, dihydrate',
  calciumChlorideAnhydrous: 'calcium chloride, anhydrous',
  gypsum: 'gypsum (calcium sulfate, dihydrate)',
  magnesiumSulfateHeptahydrate: 'Epsom salt (magnesium sulfate, heptahydrate)',
  magnesiumChlorideHexahydrate: 'magnesium chloride, hexahydrate',
  sodiumChloride: 'table salt (sodium chloride)',
  potassiumChloride: 'potassium chloride',
  sodiumBicarbonate: 'baking soda (sodium bicarbonate)',
  potassiumBicarbonate: 'potassium bicarbonate',
  calciumCarbonate: 'chalk (calcium carbonate)',
  calciumHydroxide: 'slaked lime (calcium hydroxide)',
};

export const acidNames: Record<AcidKind, string> = {
  citricAnhydrous: 'citric acid, anhydrous',
  citricMonohydrate: 'citric acid, monohydrate',
  lactic: 'lactic acid',
  phosphoric: 'phosphoric acid',
  malic: 'malic acid',
  tartaric: 'tartaric acid',
  ascorbic: 'ascorbic acid',
};

export const teaNames: Record<TeaKind, string> = {
  green: 'green tea',
  white: 'white tea',
  oolong: 'oolong',
  black: 'black tea',
  herbal: 'herbs, rooibos, flowers',
};

export const leafFormNames: Record<LeafForm, string> = {
  whole: 'whole leaf',
  broken: 'broken leaf',
  dust: 'dust, as in tea bags',
};

export const hopFormNames = { pellets: 'pellets', cones: 'whole cones' } as const;

/** "calcium chloride" of "calcium chloride, dihydrate": how it is called on a sheet. */
export function shortName(name: string): string {
  return name.replace(/ \(.*$/, '').replace(/,.*$/, '');
}

export function choicesOf<Key extends string>(names: Record<Key, string>): { value: Key; label: string }[] {
  return (Object.keys(names) as Key[]).map((value) => ({ value, label: names[value] }));
}
