import type { Addition, RecipeDocument } from '../sheets/index.js';

type Leaf = Extract<Addition, { kind: 'tea' }>;
type Hops = Extract<Addition, { kind: 'hops' }>;

export function buildTea(overrides: Partial<Leaf> = {}): Leaf {
  return {
    id: 'sencha',
    kind: 'tea',
    name: 'sencha',
    massG: 100,
    keeps: 'g-per-l',
    bag: 'bag 1',
    tea: 'green',
    form: 'whole',
    in: { at: 'steep', afterS: 0 },
    out: { at: 'timer', durationS: 180 },
    ...overrides,
  };
}

export function buildHops(overrides: Partial<Hops> = {}): Hops {
  return {
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
    ...overrides,
  };
}

/** A plain recipe: pure water, citric acid, sencha for three minutes, Cascade on the fall. */
export function buildDocument(overrides: Partial<RecipeDocument> = {}): RecipeDocument {
  return {
    v: 2,
    volumeL: 20,
    waterL: 22,
    waters: [
      {
        id: 'ro',
        name: 'Reverse-osmosis water',
        percent: 100,
        report: {
          caMgPerL: 0,
          mgMgPerL: 0,
          naMgPerL: 0,
          kMgPerL: 0,
          clMgPerL: 0,
          so4MgPerL: 0,
          alkalinity: { as: 'hco3', mgPerL: 0 },
        },
      },
    ],
    additions: [
      {
        id: 'citric',
        kind: 'acid',
        name: 'citric acid',
        massG: 4,
        keeps: 'g-per-l',
        acid: 'citricAnhydrous',
        in: { at: 'fill' },
      },
      buildTea(),
      buildHops(),
    ],
    steepC: 76,
    transferC: 20,
    gas: { volumes: 2.8, tempC: 4 },
    targets: { waterPh: { min: 3, max: 4.4 } },
    steps: { own: [] },
    assume: {},
    ...overrides,
  };
}
