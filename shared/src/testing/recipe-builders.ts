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

/**
 * The worked example as a recipe: 20 L of pure water, calcium chloride dihydrate 6 g, gypsum 2.4 g, citric acid 7 g; 100 g of white
 * tea in at 82 °C for 4 min; chiller on; 60 g of hops of 9 % in at 60 °C, out at 30 °C, falling at 0.08 a minute toward 15 °C.
 * The pot holds its heat during the steep; the leaf is cold, as the example's is not: 0.12 K, which moves nothing out of a band.
 */
export function buildWorkedExample(): RecipeDocument {
  return buildDocument({
    volumeL: 19,
    waterL: 20,
    steepC: 82,
    transferC: 30,
    gas: { volumes: 3, tempC: 4 },
    additions: [
      {
        id: 'chloride',
        kind: 'salt',
        name: 'calcium chloride',
        massG: 6,
        keeps: 'g-per-l',
        salt: 'calciumChlorideDihydrate',
        in: { at: 'fill' },
      },
      { id: 'gypsum', kind: 'salt', name: 'gypsum', massG: 2.4, keeps: 'g-per-l', salt: 'gypsum', in: { at: 'fill' } },
      {
        id: 'citric',
        kind: 'acid',
        name: 'citric acid',
        massG: 7,
        keeps: 'g-per-l',
        acid: 'citricAnhydrous',
        in: { at: 'fill' },
      },
      buildTea({ id: 'leaf', name: 'white tea', tea: 'white', massG: 100, out: { at: 'timer', durationS: 240 } }),
      buildHops({
        id: 'hops',
        alphaPercent: 9,
        massG: 60,
        in: { at: 'falling', tempC: 60 },
        out: { at: 'falling', tempC: 30 },
      }),
    ],
    assume: { chillerConstantPerS: 0.08 / 60, fillC: 15, roomC: 20, servingMl: 355 },
  });
}
