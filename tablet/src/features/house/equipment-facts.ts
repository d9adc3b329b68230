import type { Equipment } from '@steepfall/shared/contracts';
import { heaterEfficiency, type HeatSource } from '@steepfall/shared/figures';
import {
  formatMass,
  formatPressure,
  formatTemp,
  formatVolume,
  NO_BREAK_SPACE,
  type UnitPreferences,
} from '@steepfall/shared/units';
import { plainQuantity, quantityOf, quantityText, type Quantity, type QuantityKind } from '#lib/units.ts';
import { spanWords } from '#lib/words.ts';

export type Kind = Equipment['kind'];
type KettleMetal = NonNullable<Extract<Equipment, { kind: 'kettle' }>['facts']['metal']>;

export const metalWords: Record<KettleMetal, string> = {
  stainless: 'stainless steel',
  aluminium: 'aluminium',
  copper: 'copper',
  'enamelled-steel': 'enamelled steel',
};

export const heatSourceWords: Record<HeatSource, string> = {
  inductionHob: 'induction hob',
  electricHob: 'electric hob',
  gasHob: 'gas hob',
  immersedElement: 'element in the water',
  outdoorGasRing: 'gas ring, outdoors',
};

const percent = (share: number) => Math.round(share * 100);

/** The middle of what is usual, to begin with. */
export function proposedEfficiency(source: HeatSource): number {
  const { low, high } = heaterEfficiency[source];
  return Math.round(((low + high) / 2) * 100) / 100;
}

export function efficiencyHint(source: HeatSource | undefined): string {
  if (!source) return 'Choose what heats it, and the usual share is put in here.';
  const { low, high } = heaterEfficiency[source];
  return `Usual with this heat: ${percent(low)} to ${percent(high)} %. Type your own if a run has shown it.`;
}

/** A constant of cooling as people can see it: how long until half of the way to what is around is done. */
export function halfwayS(coolingConstantPerS: number): number {
  return Math.LN2 / coolingConstantPerS;
}

const centimetres: Quantity = { symbol: 'cm', fromInside: (m) => m * 100, toInside: (cm) => cm / 100 };
const percentOf: Quantity = { symbol: '%', fromInside: (share) => share * 100, toInside: (shown) => shown / 100 };
const halfwayMin: Quantity = {
  symbol: 'min',
  fromInside: (perS) => halfwayS(perS) / 60,
  toInside: (minutes) => (minutes === 0 ? Number.NaN : Math.LN2 / (minutes * 60)),
};

export interface FactField {
  name: string;
  label: string;
  kind: QuantityKind | Quantity;
  hint?: string;
  /** In place of the words of the contract, where those speak of another unit than the field. */
  errorWords?: string;
}

export const factFields: Record<Kind, FactField[]> = {
  kettle: [
    { name: 'volumeL', label: 'Volume to the brim', kind: 'volume' },
    { name: 'diameterM', label: 'Width inside', kind: centimetres },
    { name: 'massKg', label: 'Mass when empty', kind: 'kilograms', hint: 'The metal takes its share of the heat.' },
    {
      name: 'deadSpaceL',
      label: 'Stays under the tap',
      kind: 'volume',
      hint: 'What cannot be drawn off. Empty: nothing.',
    },
  ],
  chiller: [
    { name: 'lengthM', label: 'Length of the coil', kind: plainQuantity('m') },
    {
      name: 'coolantC',
      label: 'Water through it',
      kind: 'temperature',
      hint: 'As it comes from the tap or the ice bath.',
    },
    {
      name: 'coolingConstantPerS',
      label: 'Halfway to that water in',
      kind: halfwayMin,
      hint: 'Stirred. Empty until a run has taught it.',
      errorWords: 'A time above a quarter of a minute, or nothing.',
    },
  ],
  keg: [
    { name: 'volumeL', label: 'Volume', kind: 'volume' },
    { name: 'tareG', label: 'Mass when empty', kind: 'mass' },
    {
      name: 'ratedKPa',
      label: 'Pressure stamped on it',
      kind: 'pressure',
      hint: 'Gauge pressure. Read it from the keg, never guess.',
    },
  ],
  scale: [
    {
      name: 'resolutionG',
      label: 'Smallest step it shows',
      kind: 'mass',
      hint: 'Amounts on the weigh-out list are rounded to it.',
    },
    { name: 'capacityG', label: 'Heaviest it takes', kind: 'mass', hint: 'Larger amounts are weighed in parts.' },
  ],
};

export const heatFields: FactField[] = [
  { name: 'heaterPowerW', label: 'Power', kind: plainQuantity('W') },
  {
    name: 'heaterEfficiency',
    label: 'Share that reaches the water',
    kind: percentOf,
    errorWords: 'A share from 10 to 100 %.',
  },
];

export const learnedField: FactField = {
  name: 'coolingConstantPerS',
  label: 'Halfway to the room in',
  kind: halfwayMin,
  hint: 'Lid on, heat off. Empty until a finished run has taught it.',
  errorWords: 'A time above a quarter of a minute, or nothing.',
};

export const kindWords: Record<Kind, string> = { kettle: 'Kettle', chiller: 'Chiller', keg: 'Keg', scale: 'Scale' };

/** What a new one starts with. */
export const usualFacts: Record<Kind, Record<string, unknown>> = {
  kettle: {
    volumeL: 30,
    diameterM: 0.34,
    massKg: 3.5,
    heaterPowerW: 3000,
    heatSource: 'inductionHob',
    heaterEfficiency: proposedEfficiency('inductionHob'),
    metal: 'stainless',
    hasLid: true,
  },
  chiller: { metal: 'stainless', lengthM: 8, coolantC: 14 },
  keg: { volumeL: 19, tareG: 4200 },
  scale: { resolutionG: 0.1, capacityG: 5000 },
};

/** The step of a scale is smaller than a mass is written elsewhere. */
function fineMass(massG: number, units: UnitPreferences): string {
  const mass = quantityOf('mass', units);
  return `${quantityText(massG, mass)}${NO_BREAK_SPACE}${mass.symbol}`;
}

/** What is known of a piece in one line. */
export function factWords(item: Equipment, units: UnitPreferences): string {
  const volume = (volumeL: number) => formatVolume(volumeL, { unit: units.volume });
  const mass = (massG: number) => formatMass(massG, { unit: units.mass });
  switch (item.kind) {
    case 'kettle': {
      const { facts } = item;
      return [
        volume(facts.volumeL),
        facts.metal && metalWords[facts.metal],
        facts.hasLid === undefined ? '' : facts.hasLid ? 'with a lid' : 'no lid',
        [`${facts.heaterPowerW} W`, facts.heatSource && heatSourceWords[facts.heatSource]].filter(Boolean).join(' '),
        facts.deadSpaceL ? `${volume(facts.deadSpaceL)} stays` : '',
      ]
        .filter(Boolean)
        .join(' · ');
    }
    case 'chiller':
      return [
        `${item.facts.metal === 'stainless' ? 'stainless steel' : 'copper'} coil, ${item.facts.lengthM} m`,
        `water at ${formatTemp(item.facts.coolantC, { unit: units.temperature })}`,
      ].join(' · ');
    case 'keg':
      return [
        volume(item.facts.volumeL),
        `${mass(item.facts.tareG)} empty`,
        `stamped ${formatPressure(item.facts.ratedKPa, { unit: units.pressure })}`,
      ].join(' · ');
    case 'scale':
      return `steps of ${fineMass(item.facts.resolutionG, units)} · up to ${mass(item.facts.capacityG)}`;
  }
}

/** What a run has taught of it, in words; `null` when none has. */
export function learnedWords(item: Equipment): string | null {
  if (item.kind !== 'kettle' && item.kind !== 'chiller') return null;
  const { coolingConstantPerS } = item.facts;
  if (coolingConstantPerS === undefined) return null;
  return `Learned: halfway to the ${item.kind === 'kettle' ? 'room' : 'coolant'} in ${spanWords(halfwayS(coolingConstantPerS))}`;
}
