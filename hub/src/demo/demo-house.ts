import type { CreateEquipment, Role } from '@steepfall/shared/contracts';
import type { RecipeDocument } from '@steepfall/shared/sheets';
import { v5 } from 'uuid';

/** Ids of the demo are the same each time it is made: links to it stay good after a reset. */
const NAMESPACE = '5d6f2a0e-6a57-4e0c-8d2b-3f4f0f3f9b61';
export const demoId = (name: string): string => v5(name, NAMESPACE);

export const demoHouse = { id: demoId('house'), name: 'Wrenfold Drinks', altitudeM: 120 } as const;

export interface DemoSignIn {
  role: Role;
  displayName: string;
  email: string;
  password: string;
}

/** Known to everybody who can read, and therefore good for nothing but the demo: with the demo switched off they open no door. */
export const demoSignIns: readonly DemoSignIn[] = (
  [
    ['owner', 'Owner'],
    ['brewer', 'Brewer'],
    ['hand', 'Hand'],
    ['taster', 'Taster'],
    ['pourer', 'Pourer'],
  ] as const
).map(([role, displayName]) => ({
  role,
  displayName,
  email: `${role}@wrenfold.example`,
  password: `wrenfold-${role}`,
}));

export const demoMemberId = (role: Role): string => demoId(`member/${role}`);

export const demoEquipment = {
  kettle: {
    kind: 'kettle',
    name: 'Kettle 30 L',
    facts: { volumeL: 30, diameterM: 0.36, massKg: 4.5, heaterPowerW: 3500, heaterEfficiency: 0.84 },
  },
  coil: {
    kind: 'chiller',
    name: 'Stainless coil',
    facts: { metal: 'stainless', lengthM: 7.6, coolantC: 12 },
  },
  kegA: { kind: 'keg', name: 'Keg A, 23 L', facts: { volumeL: 23, tareG: 5200, ratedKPa: 900 } },
  kegB: { kind: 'keg', name: 'Keg B, 23 L', facts: { volumeL: 23, tareG: 5180, ratedKPa: 900 } },
} as const satisfies Record<string, CreateEquipment>;

/** A slow waterproof one-wire probe; nothing is connected until somebody makes a token for it. */
export const demoProbe = { name: 'Kettle probe', lagS: 7.5, resolutionC: 0.0625, samplePeriodS: 1 } as const;

/**
 * The salts keep calcium under 40 mg/L, above which green tea goes hazy. The citric acid gives the water pH 3.2 before tea and hops
 * come in, and the drink about pH 4.0 after them (band 3.8 to 4.3 by the figures of this build), below the 4.6 that food codes look at.
 */
function senchaAndCascade(senchaG: number): RecipeDocument {
  const inTheCold = { keeps: 'g-per-l', in: { at: 'fill' } } as const;
  return {
    v: 2,
    volumeL: 20,
    waterL: 22.5,
    waters: [
      {
        id: 'ro',
        name: 'Reverse-osmosis water',
        percent: 100,
        report: {
          caMgPerL: 1,
          mgMgPerL: 0.3,
          naMgPerL: 2.5,
          kMgPerL: 0.3,
          clMgPerL: 3,
          so4MgPerL: 0.5,
          alkalinity: { as: 'caco3', mgPerL: 4.5 },
        },
      },
    ],
    additions: [
      {
        id: 'calcium-chloride',
        kind: 'salt',
        name: 'calcium chloride',
        massG: 2,
        bag: 'cup 1',
        salt: 'calciumChlorideDihydrate',
        ...inTheCold,
      },
      { id: 'gypsum', kind: 'salt', name: 'gypsum', massG: 1, bag: 'cup 1', salt: 'gypsum', ...inTheCold },
      {
        id: 'citric-acid',
        kind: 'acid',
        name: 'citric acid',
        massG: 4.5,
        bag: 'cup 2',
        acid: 'citricAnhydrous',
        ...inTheCold,
      },
      {
        id: 'sencha',
        kind: 'tea',
        name: 'sencha',
        massG: senchaG,
        keeps: 'g-per-l',
        bag: 'bag 1',
        tea: 'green',
        form: 'whole',
        in: { at: 'steep', afterS: 0 },
        out: { at: 'timer', durationS: 180 },
      },
      {
        id: 'cascade',
        kind: 'hops',
        name: 'Cascade',
        massG: 60,
        keeps: 'g-per-l',
        bag: 'bag 2',
        form: 'pellets',
        alphaPercent: 6.5,
        in: { at: 'falling', tempC: 62 },
        out: { at: 'falling', tempC: 30 },
      },
    ],
    steepC: 76,
    transferC: 20,
    gas: { volumes: 2.8, tempC: 4 },
    targets: { waterPh: { min: 3.1, max: 3.4 }, drinkPh: { min: 3.6, max: 4.2 } },
    steps: { own: [] },
    assume: {},
  };
}

export const demoRecipe = {
  id: demoId('recipe'),
  name: 'Sencha and Cascade',
  summary: 'Green and bright: a short steep, hops on the fall, lively gas.',
  revisions: [
    { id: demoId('recipe/1'), note: 'First try.', document: senchaAndCascade(110) },
    { id: demoId('recipe/2'), note: 'Less leaf: the first batch was dry at the end.', document: senchaAndCascade(90) },
  ],
} as const;
