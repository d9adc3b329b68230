import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { recipeDocumentSchema, type RecipeDocument } from '../sheets/index.js';
import { metricPreferences } from '../units/index.js';
import { acidAdvice, baseRatioFromPh } from './acid-advice.js';
import { deskFigures } from './desk-figures.js';
import type { DeskKit } from './types.js';
import { workings } from './workings.js';

const real = (min: number, max: number) =>
  fc.integer({ min: 0, max: 10_000 }).map((x) => min + ((max - min) * x) / 10_000);
/** As often near nothing as near the most: a digit too few or too many. */
const amount = (max: number) => fc.oneof(real(1e-6, 1), real(1, Math.min(max, 100)), real(1e-6, max));
const timeS = fc.oneof(real(1, 1200), real(1e-3, 24 * 3600));

const goesIn = fc.oneof(
  fc.constant({ at: 'fill' as const }),
  fc.record({ at: fc.constant('steep' as const), afterS: fc.oneof(fc.constant(0), real(0, 24 * 3600)) }),
  fc.record({ at: fc.constant('falling' as const), tempC: real(0, 100) }),
  fc.constant({ at: 'transfer' as const }),
);
const comesOut = fc.oneof(
  fc.record({ at: fc.constant('timer' as const), durationS: timeS }),
  fc.record({ at: fc.constant('falling' as const), tempC: real(0, 100) }),
  fc.constant({ at: 'transfer' as const }),
);
const shape = {
  name: fc.constant('a thing'),
  massG: amount(100_000),
  keeps: fc.constant('g-per-l' as const),
  in: goesIn,
};
const maybe = <Value>(value: fc.Arbitrary<Value>) => fc.option(value, { nil: undefined });

const addition = fc.oneof(
  fc.record({
    ...shape,
    kind: fc.constant('salt' as const),
    salt: fc.constantFrom(
      'calciumChlorideDihydrate',
      'gypsum',
      'sodiumBicarbonate',
      'calciumHydroxide',
      'calciumCarbonate',
    ),
    assayPercent: maybe(real(1, 100)),
  }),
  fc.record({
    ...shape,
    kind: fc.constant('acid' as const),
    acid: fc.constantFrom('citricAnhydrous', 'lactic', 'phosphoric', 'ascorbic'),
    strengthPercent: maybe(real(1, 100)),
  }),
  fc.record({
    ...shape,
    kind: fc.constant('tea' as const),
    tea: fc.constantFrom('green', 'white', 'oolong', 'black', 'herbal'),
    form: fc.constantFrom('dust', 'broken', 'whole'),
    caffeineMgPerG: maybe(real(0, 100)),
    out: comesOut,
  }),
  fc.record({
    ...shape,
    kind: fc.constant('hops' as const),
    form: fc.constantFrom('pellets', 'cones'),
    alphaPercent: real(0, 30),
    storageIndex: maybe(real(0.2, 2.5)),
    out: comesOut,
  }),
  fc.record({ ...shape, kind: fc.constant('other' as const), out: comesOut }),
);

const mgPerL = fc.oneof(fc.constant(0), real(0, 200), real(0, 5000));
const report = fc.record({
  caMgPerL: mgPerL,
  mgMgPerL: mgPerL,
  naMgPerL: mgPerL,
  kMgPerL: maybe(mgPerL),
  clMgPerL: mgPerL,
  so4MgPerL: mgPerL,
  alkalinity: fc.record({ as: fc.constantFrom('hco3', 'caco3'), mgPerL }),
});
const pure = fc.constant({
  caMgPerL: 0,
  mgMgPerL: 0,
  naMgPerL: 0,
  clMgPerL: 0,
  so4MgPerL: 0,
  alkalinity: { as: 'hco3' as const, mgPerL: 0 },
});
const phRange = fc.tuple(real(2, 9), real(2, 9)).map(([a, b]) => ({ min: Math.min(a, b), max: Math.max(a, b) }));

/** Whatever the schema takes, and much that no brewer means. */
const anyDocument = fc
  .record({
    v: fc.constant(2),
    volumeL: amount(500),
    waterL: amount(600),
    report: fc.oneof({ weight: 4, arbitrary: pure }, { weight: 1, arbitrary: report }),
    additions: fc.array(addition, { maxLength: 7 }),
    steepC: real(1, 100),
    transferC: real(0, 60),
    gas: fc.record({ volumes: real(0, 6), tempC: real(0, 30) }),
    targets: fc.record({ waterPh: phRange, drinkPh: maybe(phRange), caffeineMostMgPerL: maybe(amount(2000)) }),
    assume: fc.record({
      fillC: maybe(real(0, 60)),
      roomC: maybe(real(0, 45)),
      servingMl: maybe(amount(2000)),
      lidOn: maybe(fc.boolean()),
      chillerConstantPerS: maybe(real(1e-7, 0.05)),
      teaBaseRatio: maybe(real(0, 20)),
      hopBaseRatio: maybe(real(0, 20)),
    }),
  })
  .map(({ report: one, ...rest }) =>
    recipeDocumentSchema.parse({
      ...JSON.parse(JSON.stringify(rest)),
      additions: JSON.parse(JSON.stringify(rest.additions)).map((each: object, index: number) => ({
        ...each,
        id: `a${index}`,
      })),
      waters: [{ id: 'w', name: 'water', percent: 100, report: JSON.parse(JSON.stringify(one)) }],
      steps: { own: [] },
    }),
  );

const anyKit: fc.Arbitrary<DeskKit> = fc.record({
  altitudeM: real(-430, 6000),
  kettle: fc.option(
    fc.record({
      volumeL: amount(1000),
      diameterM: real(0.05, 3),
      massKg: amount(500),
      heaterPowerW: real(1, 100_000),
      heaterEfficiency: real(0.1, 1),
      metal: fc.constantFrom('stainless' as const, 'aluminium' as const, 'copper' as const, 'enamelled-steel' as const),
      hasLid: fc.boolean(),
      deadSpaceL: real(0, 100),
    }),
  ),
  chiller: fc.option(
    fc.record({
      metal: fc.constantFrom('copper' as const, 'stainless' as const),
      lengthM: real(0.1, 100),
      coolantC: real(-5, 40),
    }),
  ),
});

/** Where a value that should be a number is none. */
function noNumbers(value: unknown, path = ''): string[] {
  if (typeof value === 'number') return Number.isFinite(value) ? [] : [path];
  if (value === null || typeof value !== 'object') return [];
  return Object.entries(value).flatMap(([key, one]) => noNumbers(one, `${path}.${key}`));
}

function promises(document: RecipeDocument, kit: DeskKit): void {
  const result = deskFigures(document, kit, metricPreferences);
  expect(noNumbers(result)).toEqual([]);
  if (result.kind === 'impossible') {
    expect(result.what.length > 0 && result.act.length > 0).toBe(true);
    return;
  }
  const texts = result.warnings.flatMap(({ what, why, act }) => [what, why, act]);
  expect(texts.filter((text) => /NaN|undefined|null|Infinity/.test(text))).toEqual([]);
  const ids = [...result.rows, ...result.warnings].map(({ id }) => id);
  expect(new Set(ids).size).toBe(ids.length);
  for (const row of result.rows) {
    expect(row.band.low <= row.band.value && row.band.value <= row.band.high).toBe(true);
    expect(workings[row.workings]).toBeDefined();
  }
  const { curve, marks } = result.day;
  expect(curve.every((point, index) => index === 0 || point.atMs >= (curve[index - 1]?.atMs ?? 0))).toBe(true);
  expect(marks.every(({ atMs }) => atMs >= 0 && atMs <= (curve.at(-1)?.atMs ?? 0))).toBe(true);
  for (const { id } of document.additions) {
    expect(marks.filter((mark) => mark.kind === 'in' && mark.additionId === id)).toHaveLength(1);
  }
}

describe('deskFigures', () => {
  it('gives figures or says what is impossible for whatever the schema takes, and never a number that is none', () => {
    fc.assert(fc.property(anyDocument, anyKit, promises), { numRuns: 250 });
  });

  it('advises on the acid of whatever the schema takes', () => {
    fc.assert(
      fc.property(anyDocument, anyKit, real(1, 9), (document, kit, ph) => {
        expect(noNumbers([acidAdvice(document, kit), baseRatioFromPh(document, kit, ph)])).toEqual([]);
      }),
      { numRuns: 150 },
    );
  });
});
