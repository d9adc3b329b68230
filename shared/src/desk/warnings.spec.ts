import { describe, expect, it } from 'vitest';
import { recipeDocumentSchema, type ChillerFacts, type KettleFacts, type RecipeDocument } from '../sheets/index.js';
import { buildDocument, buildHops, buildTea } from '../testing/index.js';
import { metricPreferences } from '../units/index.js';
import { deskFigures } from './desk-figures.js';
import type { DeskKit, DeskWarning } from './types.js';

const kettle: KettleFacts = {
  volumeL: 35,
  diameterM: 0.36,
  massKg: 4,
  heaterPowerW: 3500,
  heaterEfficiency: 0.85,
  metal: 'stainless',
};
const chiller: ChillerFacts = { metal: 'stainless', lengthM: 10, coolantC: 12 };
const kit: DeskKit = { altitudeM: 0, kettle, chiller };

/** Sour enough by far, cool hops, a fall that is quick: nothing grave to say. */
const calm = buildDocument({
  additions: buildDocument().additions.map((one) => (one.kind === 'acid' ? { ...one, massG: 16 } : one)),
});

function warningsOf(document: RecipeDocument, on: DeskKit = kit, units = metricPreferences): readonly DeskWarning[] {
  const result = deskFigures(recipeDocumentSchema.parse(document), on, units);
  if (result.kind === 'impossible') throw new Error(result.what);
  return result.warnings;
}

/** The calm recipe with another list of additions: acid, tea and hops unless told. */
function having(
  change: (one: RecipeDocument['additions'][number]) => RecipeDocument['additions'][number],
  more: RecipeDocument['additions'] = [],
): RecipeDocument {
  return { ...calm, additions: [...calm.additions.map(change), ...more] };
}
const tea = (over: Parameters<typeof buildTea>[0]) => having((one) => (one.kind === 'tea' ? buildTea(over) : one));
const hops = (over: Parameters<typeof buildHops>[0]) => having((one) => (one.kind === 'hops' ? buildHops(over) : one));
const acidG = (massG: number) => having((one) => (one.kind === 'acid' ? { ...one, massG } : one));
const salt = (salt: 'gypsum' | 'calciumCarbonate' | 'calciumChlorideDihydrate' | 'sodiumChloride', massG: number) =>
  having(
    (one) => one,
    [{ id: 's', kind: 'salt', name: 'the salt', massG, keeps: 'g-per-l', salt, in: { at: 'fill' } }],
  );
const water = (report: Partial<RecipeDocument['waters'][number]['report']>): RecipeDocument => ({
  ...calm,
  waters: calm.waters.map((one) => ({ ...one, report: { ...one.report, ...report } })),
});

describe('warnings', () => {
  it('are quiet on a calm recipe: only what is good to know', () => {
    expect(warningsOf(calm).filter(({ grade }) => grade !== 'note')).toEqual([]);
  });

  it.each<[string, DeskWarning['grade'], string | null, RecipeDocument, DeskKit?]>([
    ['ph-low-acid', 'danger', 'additions.0.massG', acidG(0.2)],
    ['ph-assessment', 'danger', 'additions.0.massG', acidG(3)],
    ['ph-may-cross', 'care', 'additions.0.massG', acidG(4)],
    [
      'ph-above-target',
      'care',
      'additions.0.massG',
      { ...calm, targets: { ...calm.targets, drinkPh: { min: 2.5, max: 2.8 } } },
    ],
    [
      'ph-below-target',
      'care',
      'additions.0.massG',
      { ...calm, targets: { ...calm.targets, drinkPh: { min: 3.9, max: 4 } } },
    ],
    ['water-ph-below', 'note', 'targets.waterPh', { ...calm, targets: { waterPh: { min: 4, max: 5 } } }],
    ['no-acid', 'care', 'additions', { ...calm, additions: calm.additions.slice(1) }],
    ['sour', 'care', 'additions.0.massG', acidG(120)],
    [
      'acid-in-keg',
      'care',
      'additions.0.in',
      having((one) => (one.kind === 'acid' ? { ...one, in: { at: 'transfer' } } : one)),
    ],
    [
      'acid-after-hops',
      'note',
      'additions.0.in',
      having((one) => (one.kind === 'acid' ? { ...one, in: { at: 'falling', tempC: 25 } } : one)),
    ],
    ['copper', 'danger', null, calm, { ...kit, chiller: { ...chiller, metal: 'copper' } }],
    ['calcium-haze', 'care', 'additions.3.massG', salt('calciumChlorideDihydrate', 6)],
    ['film', 'note', 'additions.3.massG', salt('calciumChlorideDihydrate', 6)],
    ['tea-cream', 'note', 'gas.tempC', calm],
    ['salt-on-the-floor.gypsum', 'care', 'additions.3.massG', salt('gypsum', 80)],
    ['brackish', 'care', 'additions.3.massG', salt('sodiumChloride', 60)],
    ['water-unbalanced.ro', 'care', 'waters.0.report', water({ naMgPerL: 46, clMgPerL: 62 })],
    ['steep-short.sencha', 'note', 'additions.1.out', tea({ out: { at: 'timer', durationS: 60 } })],
    ['steep-long.sencha', 'note', 'additions.1.out', tea({ tea: 'black', out: { at: 'timer', durationS: 660 } })],
    ['steep-amber.sencha', 'care', 'additions.1.out', tea({ out: { at: 'timer', durationS: 900 } })],
    ['steep-red.sencha', 'care', 'additions.1.out', tea({ out: { at: 'timer', durationS: 3000 } })],
    ['caffeine-label', 'care', 'additions.1.massG', tea({ massG: 250 })],
    [
      'caffeine-above-target',
      'care',
      'targets.caffeineMostMgPerL',
      { ...calm, targets: { ...calm.targets, caffeineMostMgPerL: 30 } },
    ],
    ['caffeine-free', 'care', null, { ...calm, targets: { ...calm.targets, caffeineMostMgPerL: 5 } }],
    ['caffeine-not-measured', 'note', null, tea({ tea: 'herbal' })],
    ['hops-hot.cascade', 'care', 'additions.2.in', hops({ in: { at: 'falling', tempC: 72 } })],
    ['hops-hot.cascade', 'care', 'additions.2.in', hops({ in: { at: 'fill' } })],
    ['hops-old.cascade', 'care', 'additions.2.storageIndex', hops({ storageIndex: 0.6 })],
    ['catch-above-steep.cascade', 'note', 'additions.2.in.tempC', hops({ in: { at: 'falling', tempC: 90 } })],
    ['out-before-in.cascade', 'care', 'additions.2.out', hops({ out: { at: 'falling', tempC: 70 } })],
    ['added-cold', 'care', 'additions.2.in', hops({ in: { at: 'transfer' }, out: { at: 'transfer' } })],
    ['boils-below-steep', 'care', 'steepC', { ...calm, steepC: 96 }, { ...kit, altitudeM: 2500 }],
    ['kettle-too-weak', 'care', 'steepC', calm, { ...kit, kettle: { ...kettle, heaterPowerW: 60 } }],
    ['coolant-too-warm', 'care', 'transferC', { ...calm, transferC: 10 }],
    [
      'coolant-too-warm',
      'care',
      'additions.2.out.tempC',
      { ...hops({ out: { at: 'falling', tempC: 8 } }), transferC: 6 },
    ],
    ['coolant-too-warm', 'care', 'transferC', { ...calm, steepC: 99, transferC: 10 }, { ...kit, altitudeM: 2500 }],
    ['room-too-warm', 'care', 'transferC', { ...calm, transferC: 15 }, { ...kit, chiller: null }],
    ['no-chiller', 'care', null, { ...calm, transferC: 40 }, { ...kit, chiller: null }],
    ['kettle-too-full', 'danger', 'waterL', calm, { ...kit, kettle: { ...kettle, volumeL: 22.5 } }],
    ['kettle-too-full', 'care', 'waterL', calm, { ...kit, kettle: { ...kettle, volumeL: 24 } }],
    ['yield-low', 'care', 'waterL', { ...calm, volumeL: 22 }],
    ['no-drink-left', 'care', 'waterL', calm, { ...kit, kettle: { ...kettle, deadSpaceL: 30 } }],
    ['cooling-too-slow', 'note', 'transferC', { ...calm, transferC: 25 }, { ...kit, chiller: null }],
    ['cooling-too-slow', 'danger', 'transferC', { ...acidG(1), transferC: 25 }, { ...kit, chiller: null }],
    ['cooling-goes-on', 'note', 'transferC', { ...calm, transferC: 30 }],
    ['keg-pressure', 'danger', 'gas.volumes', { ...calm, gas: { volumes: 4.5, tempC: 20 } }],
    ['keg-warms', 'note', 'gas.volumes', { ...calm, gas: { volumes: 3.5, tempC: 4 } }],
    ['cold-steep', 'care', 'steepC', { ...calm, steepC: 5 }],
    ['steep-untimed.sencha', 'care', 'additions.1.out', { ...tea({ out: { at: 'transfer' } }), steepC: 5 }],
  ])('%s: %s at %s', (id, grade, path, document, on = kit) => {
    const found = warningsOf(document, on).find((one) => one.id === id);
    expect(found).toMatchObject({ grade, path });
    for (const text of [found?.what, found?.why, found?.act]) expect(text).toMatch(/^\S.*\.$/);
  });

  it('tell of a clock that outlasts the heating of what went in cold', () => {
    const mint = (durationS: number) =>
      having(
        (one) => one,
        [
          {
            ...{ id: 'mint', kind: 'other', name: 'mint', massG: 20, keeps: 'g-per-l' },
            ...{ in: { at: 'fill' }, out: { at: 'timer', durationS } },
          },
        ],
      );
    const found = (durationS: number) => warningsOf(mint(durationS)).find(({ id }) => id === 'cold-timer.mint');
    expect(found(600)).toBeUndefined();
    expect(found(36_000)).toMatchObject({ grade: 'care', path: 'additions.3.out' });
    expect(found(36_000)?.what).toContain('Mint goes in cold for 10 h 0 min');
    const cold = { ...mint(36_000), steepC: 8 };
    expect(warningsOf(cold).some(({ id }) => id === 'cold-timer.mint')).toBe(false);
  });

  it('come gravest first', () => {
    const grades = warningsOf(acidG(1), { ...kit, chiller: { ...chiller, metal: 'copper' } }).map(({ grade }) => grade);
    const order = ['danger', 'care', 'note'];
    expect(grades).toEqual([...grades].sort((a, b) => order.indexOf(a) - order.indexOf(b)));
    expect(grades[0]).toBe('danger');
  });

  it('write their values in the units of the person', () => {
    const units = { temperature: 'F', mass: 'oz', volume: 'gal', pressure: 'psi' } as const;
    const everything = [
      acidG(3),
      hops({ in: { at: 'falling', tempC: 72 } }),
      tea({ out: { at: 'timer', durationS: 3000 } }),
      { ...calm, gas: { volumes: 4.5, tempC: 20 }, volumeL: 22, steepC: 99 },
    ].flatMap((document) => warningsOf(document, { ...kit, altitudeM: 2500 }, units));
    const words = everything.map(({ what, why, act }) => `${what} ${why} ${act}`).join(' ');
    expect(words).toMatch(/149\s°F/);
    expect(words).toMatch(/oz/);
    expect(words).toMatch(/psi/);
    expect(words).not.toMatch(/°C|kPa/);
  });

  it('never promise anything: no word of safety, shelf life or law', () => {
    const documents = [calm, acidG(0.2), acidG(3), { ...calm, steepC: 5 }, tea({ tea: 'herbal' })];
    for (const document of documents) {
      for (const { what, why, act } of warningsOf(document)) {
        expect(`${what} ${why} ${act}`).not.toMatch(/\bsafe\b|compliant|approved|shelf.stable|sterile|legal to/i);
      }
    }
    const line = warningsOf(acidG(0.2)).find(({ id }) => id === 'ph-low-acid');
    expect(line?.act).toMatch(/local food authority or a process authority/);
    expect(line?.act).toMatch(/local food code comes first/);
  });
});
