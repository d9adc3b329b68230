import type { Addition, RecipeDocument, WaterPart } from '@steepfall/shared/sheets';
import { demoId } from './demo-house.js';

export interface DemoRecipe {
  id: string;
  name: string;
  summary: string;
  /** The oldest first. */
  revisions: readonly { id: string; note: string; document: RecipeDocument }[];
}

/** Of the stores of the demo house; a lot of each is there under the same key. */
export type DemoIngredient =
  'calcium-chloride' | 'gypsum' | 'citric-acid' | 'sencha' | 'oolong' | 'chamomile' | 'cascade' | 'saaz' | 'hallertau';

/** What an addition is on the shelf; a recipe adds how much of it, and when. */
const shelf = (key: DemoIngredient, name: string) => ({
  id: key,
  name,
  keeps: 'g-per-l' as const,
  ingredientId: demoId(`ingredient/${key}`),
});
const inTheCold = { in: { at: 'fill' } } as const;

const calciumChloride = (massG: number): Addition => ({
  ...shelf('calcium-chloride', 'calcium chloride'),
  kind: 'salt',
  salt: 'calciumChlorideDihydrate',
  massG,
  bag: 'cup 1',
  ...inTheCold,
});
const gypsum = (massG: number): Addition => ({
  ...shelf('gypsum', 'gypsum'),
  kind: 'salt',
  salt: 'gypsum',
  massG,
  bag: 'cup 1',
  ...inTheCold,
});
const citricAcid = (massG: number): Addition => ({
  ...shelf('citric-acid', 'citric acid'),
  kind: 'acid',
  acid: 'citricAnhydrous',
  massG,
  bag: 'cup 2',
  ...inTheCold,
});

type Leaf = Extract<Addition, { kind: 'tea' }>;
type Hops = Extract<Addition, { kind: 'hops' }>;
const leaf = (rest: Omit<Leaf, 'kind' | 'keeps' | 'in'>): Addition => ({
  ...rest,
  kind: 'tea',
  keeps: 'g-per-l',
  in: { at: 'steep', afterS: 0 },
});
const pellets = (rest: Omit<Hops, 'kind' | 'keeps' | 'form'>): Addition => ({
  ...rest,
  kind: 'hops',
  keeps: 'g-per-l',
  form: 'pellets',
});

const roWater = (percent: number): WaterPart => ({
  id: 'ro',
  name: 'Reverse-osmosis water',
  percent,
  report: {
    caMgPerL: 1,
    mgMgPerL: 0.3,
    naMgPerL: 2.5,
    kMgPerL: 0.3,
    clMgPerL: 3,
    so4MgPerL: 0.5,
    alkalinity: { as: 'caco3', mgPerL: 4.5 },
  },
});
const tapWater = (percent: number): WaterPart => ({
  id: 'tap',
  name: 'Tap water',
  percent,
  report: {
    caMgPerL: 48,
    mgMgPerL: 7,
    naMgPerL: 14,
    kMgPerL: 2,
    clMgPerL: 24,
    so4MgPerL: 31,
    alkalinity: { as: 'hco3', mgPerL: 155 },
  },
});

/**
 * The salts keep calcium under 40 mg/L, above which green tea goes hazy. The citric acid gives the water pH 3.2 before tea and hops
 * come in, and the drink about pH 4.1 after them (band 3.8 to 4.4 by the figures of this build), below the 4.6 that food codes look at.
 */
const senchaAndCascade = (senchaG: number): RecipeDocument => ({
  v: 2,
  volumeL: 20,
  waterL: 22.5,
  waters: [roWater(100)],
  additions: [
    calciumChloride(2),
    gypsum(1),
    citricAcid(4.5),
    leaf({
      ...shelf('sencha', 'sencha'),
      massG: senchaG,
      bag: 'bag 1',
      tea: 'green',
      form: 'whole',
      out: { at: 'timer', durationS: 180 },
    }),
    pellets({
      ...shelf('cascade', 'Cascade'),
      massG: 60,
      bag: 'bag 2',
      alphaPercent: 6.5,
      in: { at: 'falling', tempC: 62 },
      out: { at: 'falling', tempC: 30 },
    }),
  ],
  steepC: 76,
  transferC: 20,
  gas: { volumes: 2.8, tempC: 4 },
  targets: { waterPh: { min: 3.1, max: 3.4 }, drinkPh: { min: 3.6, max: 4.2 } },
  steps: { own: [] },
  assume: {},
});

interface BlendChoices {
  steepC: number;
  saazInC: number;
  oolongG: number;
  chamomileG: number;
  salts: Addition[];
  volumes: number;
}

/** A blend in two waters, with the hops in two charges: something to compare, revision by revision. */
const oolongAndChamomile = ({
  steepC,
  saazInC,
  oolongG,
  chamomileG,
  salts,
  volumes,
}: BlendChoices): RecipeDocument => ({
  v: 2,
  volumeL: 15,
  waterL: 17,
  waters: [roWater(75), tapWater(25)],
  additions: [
    ...salts,
    citricAcid(6),
    leaf({
      ...shelf('oolong', 'oolong'),
      massG: oolongG,
      bag: 'bag 1',
      tea: 'oolong',
      form: 'whole',
      out: { at: 'timer', durationS: 240 },
    }),
    leaf({
      ...shelf('chamomile', 'chamomile'),
      massG: chamomileG,
      bag: 'bag 2',
      tea: 'herbal',
      form: 'broken',
      out: { at: 'timer', durationS: 420 },
    }),
    pellets({
      ...shelf('saaz', 'Saaz'),
      massG: 30,
      bag: 'bag 3',
      alphaPercent: 3.4,
      in: { at: 'falling', tempC: saazInC },
      out: { at: 'falling', tempC: 30 },
    }),
    pellets({
      ...shelf('hallertau', 'Hallertau'),
      massG: 25,
      bag: 'bag 4',
      alphaPercent: 4.2,
      in: { at: 'falling', tempC: 45 },
      out: { at: 'transfer' },
    }),
  ],
  steepC,
  transferC: 18,
  gas: { volumes, tempC: 4 },
  targets: { waterPh: { min: 3.1, max: 3.5 }, drinkPh: { min: 3.6, max: 4.2 } },
  steps: {
    own: [
      {
        id: 'smell-bags',
        title: 'Smell both leaf bags',
        detail: 'Chamomile that smells of hay is too old.',
        afterStepId: 'coil-in',
        done: { by: 'hand' },
      },
    ],
  },
  assume: { servingMl: 250 },
});

export const senchaRecipe = {
  id: demoId('recipe'),
  name: 'Sencha and Cascade',
  summary: 'Green and bright: a short steep, hops on the fall, lively gas.',
  revisions: [
    { id: demoId('recipe/1'), note: 'First try.', document: senchaAndCascade(110) },
    { id: demoId('recipe/2'), note: 'Less leaf: the first batch was dry at the end.', document: senchaAndCascade(90) },
  ],
} as const satisfies DemoRecipe;

const firstBlend = {
  steepC: 88,
  saazInC: 72,
  oolongG: 85,
  chamomileG: 24,
  salts: [calciumChloride(1), gypsum(0.7)],
  volumes: 2.7,
};
const coolerBlend = { ...firstBlend, steepC: 85, saazInC: 62, oolongG: 75 };
const rounderBlend = { ...coolerBlend, chamomileG: 32, salts: [calciumChloride(1.5)], volumes: 2.4 };

export const oolongRecipe = {
  id: demoId('recipe/oolong'),
  name: 'Oolong and chamomile',
  summary: 'Round and flowery: a blend of leaf, noble hops in two charges, soft gas.',
  revisions: [
    {
      id: demoId('recipe/oolong/1'),
      note: 'Two leaves, two hops, on paper.',
      document: oolongAndChamomile(firstBlend),
    },
    {
      id: demoId('recipe/oolong/2'),
      note: 'Steeped in a jug: sharp and a little bitter. Steep cooler, less oolong, and Saaz later on the fall.',
      document: oolongAndChamomile(coolerBlend),
    },
    {
      id: demoId('recipe/oolong/3'),
      note: 'Thin in the middle. More chamomile, chloride in place of gypsum, less gas.',
      document: oolongAndChamomile(rounderBlend),
    },
  ],
} as const satisfies DemoRecipe;

export const demoRecipes: readonly DemoRecipe[] = [senchaRecipe, oolongRecipe];
