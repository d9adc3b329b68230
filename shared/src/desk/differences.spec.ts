import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { compileSheet, type OwnStep, type RecipeDocument } from '../sheets/index.js';
import { buildDocument, buildHops, buildTea } from '../testing/index.js';
import { recipeDocuments, revisedDocuments } from '../testing/recipe-arbitraries.js';
import { metricPreferences } from '../units/index.js';
import { differenceWords, revisionDifferences } from './differences.js';
import { isSame } from './same-value.js';

const before = buildDocument();
const wordsOf = (after: RecipeDocument, from = before, units = metricPreferences) =>
  revisionDifferences(from, after, units).map((difference) => differenceWords(difference).replaceAll('\u00a0', ' '));
const withAdditions = (...additions: RecipeDocument['additions']) => buildDocument({ additions });

describe(revisionDifferences, () => {
  it('reads as a brewer says it', () => {
    const after = {
      ...before,
      additions: [
        before.additions[0] ?? buildTea(),
        buildTea({ out: { at: 'timer', durationS: 240 } }),
        buildHops({ massG: 48, alphaPercent: 7, in: { at: 'falling', tempC: 60 } }),
      ],
    };
    expect(wordsOf(after)).toEqual([
      'steep 3 → 4 min',
      'Cascade 60 → 48 g',
      'hops in 62 → 60 °C',
      'Cascade, alpha 6.5 → 7 %',
    ]);
    expect(revisionDifferences(before, after, metricPreferences)[1]).toEqual({
      path: 'additions.2.massG',
      what: 'Cascade',
      from: '60\u00a0g',
      to: '48\u00a0g',
    });
  });

  it('reads in the units of the person', () => {
    const units = { temperature: 'F', mass: 'oz', volume: 'gal', pressure: 'psi' } as const;
    const after = buildDocument({ steepC: 80, volumeL: 18.927, additions: [...before.additions.slice(0, 2)] });
    expect(wordsOf(after, before, units)).toEqual([
      'drink 5.28 → 5.00 gal',
      'steep at 168.8 → 176 °F',
      'Cascade taken out (2.12 oz, in at 143.6 °F, out at 86 °F)',
    ]);
  });

  it('tells charges of one hop apart, and says the condition of a blend once', () => {
    const two = [buildHops(), buildHops({ id: 'late', massG: 20 })] as const;
    const cooler = two.map((hops) => ({ ...hops, in: { at: 'falling' as const, tempC: 60 } }));
    expect(wordsOf(withAdditions(...cooler), withAdditions(...two))).toEqual(['hops in 62 → 60 °C']);
    expect(wordsOf(withAdditions(two[0], { ...two[1], massG: 25 }), withAdditions(...two))).toEqual([
      'Cascade (2) 20 → 25 g',
    ]);
  });

  it('says another way of going in or out in full', () => {
    const after = withAdditions(buildTea({ in: { at: 'fill' }, out: { at: 'falling', tempC: 60 } }));
    expect(wordsOf(after, withAdditions(buildTea()))).toEqual([
      'tea in with the steep → with the cold water',
      'tea out after 3 min → at 60 °C',
    ]);
  });

  it('says grams per litre as well where the water changed', () => {
    const after = buildDocument({ waterL: 11, additions: [buildTea({ massG: 50 })] });
    expect(wordsOf(after, withAdditions(buildTea()))).toEqual([
      'water 22.0 → 11.0 L',
      'sencha 100 g (4.55 g/L) → 50 g (4.55 g/L)',
    ]);
  });

  it('finds an addition that was entered anew by its kind and name', () => {
    const after = withAdditions(buildHops({ id: 'new', massG: 48 }));
    expect(wordsOf(after, withAdditions(buildHops()))).toEqual([
      'Cascade 60 → 48 g',
      'Cascade as it was entered → entered anew',
    ]);
  });

  it('reads waters, targets, assumptions, own steps and their order', () => {
    const [water] = before.waters;
    if (!water) throw new Error('no water');
    const after = buildDocument({
      waters: [{ ...water, report: { ...water.report, caMgPerL: 40, alkalinity: { as: 'caco3', mgPerL: 80 } } }],
      targets: { waterPh: { min: 3, max: 4.4 }, caffeineMostMgPerL: 150 },
      steps: {
        own: [{ id: 'rest', title: 'Let it rest', afterStepId: 'tea-out', done: { by: 'timer', durationS: 600 } }],
        order: ['fill', 'acid', 'salts', 'ph'],
      },
      assume: { roomC: 24 },
    });
    expect(wordsOf(after)).toEqual([
      'caffeine at most no target → 150 mg/L',
      'room at as usual → 24 °C',
      'Reverse-osmosis water, calcium 0 → 40 mg/L',
      'Reverse-osmosis water, alkalinity 0 mg/L as HCO₃ → 80 mg/L as CaCO₃',
      'Let it rest added: after tea out',
      'order of the steps as it follows from the recipe → fill, acid, salts, ph',
    ]);
  });

  it('says of a step that was moved what it follows now, and of nothing else', () => {
    const rest: OwnStep = { id: 'rest', title: 'Rinse the hoses', afterStepId: 'fill', done: { by: 'hand' } };
    const ordered = (order?: string[]) => buildDocument({ steps: { own: [rest], order } });
    const usual = compileSheet(ordered(), { altitudeM: 0, reachS: 10 }).steps.map(({ id }) => id);
    const to = (id: string, afterId: string) => {
      const others = usual.filter((one) => one !== id);
      others.splice(others.indexOf(afterId) + 1, 0, id);
      return others;
    };
    expect(wordsOf(ordered(to('rest', 'light-heat')), ordered())).toEqual([
      'Rinse the hoses after Fill the kettle → after Light the heat',
    ]);
    expect(wordsOf(ordered(), ordered(to('rest', 'light-heat')))).toEqual([
      'Rinse the hoses after Light the heat → after Fill the kettle',
    ]);
    // Written down as it was anyway: the sheet is the same, the document is not.
    expect(wordsOf(ordered(usual), ordered())).toHaveLength(1);
  });

  it('says once what was moved together', () => {
    const { steps } = compileSheet(buildDocument(), { altitudeM: 0, reachS: 10 });
    const ids = steps.map(({ id }) => id);
    const order = [...ids.slice(2), ...ids.slice(0, 2)];
    const last = steps.at(-1)?.title ?? '';
    expect(wordsOf(buildDocument({ steps: { own: [], order } }), buildDocument())).toEqual([
      `Check the kit, Fill the kettle at the head → after ${last}`,
    ]);
  });

  it('shows a difference that rounding would hide', () => {
    const [difference] = revisionDifferences(
      withAdditions(buildTea({ massG: 100.01 })),
      withAdditions(buildTea({ massG: 100.02 })),
      metricPreferences,
    );
    expect(difference).toMatchObject({ from: '100.01\u00a0g', to: '100.02\u00a0g' });
  });

  it('misses no member of a document that has them all', () => {
    const full = fullDocument();
    for (const path of leavesOf(full)) {
      const differences = revisionDifferences(full, changedAt(full, path), metricPreferences);
      expect(differences.map(differenceWords), path.join('.')).toHaveLength(1);
    }
  });

  it('lists something exactly when two documents differ, and never the same on both sides', () => {
    const check = (one: RecipeDocument, other: RecipeDocument) => {
      const differences = revisionDifferences(one, other, metricPreferences);
      expect(differences.length > 0).toBe(!isSame(one, other));
      for (const { what, from, to } of differences) {
        expect(what).not.toBe('');
        expect(from).not.toBe(to);
      }
    };
    fc.assert(fc.property(revisedDocuments, ([one, other]) => check(one, other)));
    fc.assert(
      fc.property(recipeDocuments, (one) => check(one, structuredClone(one))),
      { numRuns: 30 },
    );
  }, 30_000);
});

function fullDocument(): RecipeDocument {
  const { waters, ...plain } = buildDocument();
  const ingredientId = 'f81d4fae-7dec-41d0-a765-00a0c91e6bf6';
  return buildDocument({
    ...plain,
    waters: waters.map((water) => ({ ...water, report: { ...water.report, kMgPerL: 1 } })),
    additions: [
      {
        ...{ id: 'salt', kind: 'salt', name: 'salt', massG: 1, keeps: 'mass', bag: 'cup', in: { at: 'fill' } },
        ...{ salt: 'gypsum', assayPercent: 98 },
      },
      {
        ...{ id: 'acid', kind: 'acid', name: 'acid', massG: 1, keeps: 'mass', in: { at: 'falling', tempC: 30 } },
        ...{ acid: 'lactic', strengthPercent: 80 },
      },
      buildTea({ caffeineMgPerG: 20, ingredientId, in: { at: 'steep', afterS: 60 } }),
      buildHops({ storageIndex: 0.3 }),
    ],
    targets: { waterPh: { min: 3, max: 4 }, drinkPh: { min: 3, max: 4 }, caffeineMostMgPerL: 150 },
    steps: {
      own: [
        {
          ...{ id: 'rest', title: 'Rest', detail: 'Covered.', afterStepId: 'tea-out', asks: 'tempC' },
          ...{ done: { by: 'timer', durationS: 60 }, meanwhile: [{ id: 'wipe', text: 'wipe' }], cautions: ['scald'] },
        },
      ],
      order: ['fill', 'salts'],
    },
    assume: {
      ...{ fillC: 12, roomC: 21, servingMl: 330, lidOn: true, chillerConstantPerS: 0.002 },
      ...{ teaBaseRatio: 1.2, hopBaseRatio: 1 },
    },
  });
}

type Path = (string | number)[];
const isBranch = (value: unknown): value is object => typeof value === 'object' && value !== null;

/** Paths of all numbers, words and switches of a document, save its version and what says which shape something has. */
function leavesOf(value: unknown): Path[] {
  if (!isBranch(value)) return [[]];
  return Object.entries(value)
    .filter(([key]) => !['v', 'kind', 'at', 'by'].includes(key))
    .flatMap(([key, inner]) => leavesOf(inner).map((path): Path => [key, ...path]));
}

function changedAt<T>(value: T, path: Path): T;
function changedAt(value: unknown, [head, ...rest]: Path): unknown {
  if (head === undefined) {
    if (typeof value === 'number') return value + 1e-9;
    if (value === 'mass' || value === 'g-per-l') return value === 'mass' ? 'g-per-l' : 'mass';
    return typeof value === 'boolean' ? !value : `${String(value)}x`;
  }
  if (Array.isArray(value)) return value.map((item, index) => (index === Number(head) ? changedAt(item, rest) : item));
  if (!isBranch(value)) return value;
  return Object.fromEntries(
    Object.entries(value).map(([key, inner]) => [key, key === head ? changedAt(inner, rest) : inner]),
  );
}
