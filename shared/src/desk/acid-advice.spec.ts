import { describe, expect, it } from 'vitest';
import { buildDocument, buildTea } from '../testing/index.js';
import { metricPreferences } from '../units/index.js';
import { acidAdvice, baseRatioFromPh } from './acid-advice.js';
import { deskFigures } from './desk-figures.js';
import type { DeskKit } from './types.js';

const kit: DeskKit = { altitudeM: 0, kettle: null, chiller: null };

const withAcid = (massG: number, acid: 'citricAnhydrous' | 'citricMonohydrate' | 'ascorbic' = 'citricAnhydrous') =>
  buildDocument({
    additions: buildDocument().additions.map((one) => (one.kind === 'acid' ? { ...one, acid, massG } : one)),
    targets: { waterPh: { min: 2, max: 5 }, drinkPh: { min: 3.6, max: 3.8 } },
  });

function stillPh(document: ReturnType<typeof buildDocument>): number {
  const result = deskFigures(document, kit, metricPreferences);
  return result.kind === 'figures' ? (result.figures.acid?.phStill.value ?? 0) : 0;
}

describe('acidAdvice', () => {
  it('gives the grams that bring the drink to the middle of its target, whatever is in it now', () => {
    const advice = acidAdvice(withAcid(1), kit);
    expect(advice).toMatchObject({ kind: 'dose', additionId: 'citric', wantedPh: 3.7 });
    if (advice?.kind !== 'dose') return;
    expect(stillPh(withAcid(advice.massG.value))).toBeCloseTo(3.7, 3);
    expect(acidAdvice(withAcid(30), kit)).toEqual(advice);
    expect(advice.massG.low).toBeLessThan(advice.massG.value);
    expect(advice.massG.high).toBeGreaterThan(advice.massG.value * 1.3);
  });

  it('counts what is in the jar: the monohydrate is 9 % weaker', () => {
    const [one, other] = (['citricAnhydrous', 'citricMonohydrate'] as const).map((acid) =>
      acidAdvice(withAcid(5, acid), kit),
    );
    if (one?.kind !== 'dose' || other?.kind !== 'dose') throw new Error('no dose');
    expect(other.massG.value / one.massG.value).toBeCloseTo(210.138 / 192.123, 4);
  });

  it('aims at 3.8 unless told', () => {
    expect(acidAdvice(buildDocument(), kit)).toMatchObject({ wantedPh: 3.8 });
  });

  it('says when this acid cannot, when none is needed, and nothing without an acid or a pH', () => {
    const sour = { ...withAcid(5, 'ascorbic'), targets: { waterPh: { min: 2, max: 5 }, drinkPh: { min: 2, max: 2 } } };
    expect(acidAdvice(sour, kit)).toMatchObject({ kind: 'never' });
    const flat = { ...withAcid(5), targets: { waterPh: { min: 2, max: 5 }, drinkPh: { min: 8, max: 8 } } };
    expect(acidAdvice(flat, kit)).toMatchObject({ kind: 'none-needed', ph: expect.closeTo(5.5, 0) });
    expect(acidAdvice(buildDocument({ additions: [buildTea()] }), kit)).toBeNull();
    const [water] = buildDocument().waters;
    if (!water) throw new Error('no water');
    const refused = buildDocument({ waters: [{ ...water, report: { ...water.report, naMgPerL: 300 } }] });
    expect(acidAdvice(refused, kit)).toBeNull();
    expect(baseRatioFromPh(refused, kit, 3.8)).toBeNull();
  });
});

describe('baseRatioFromPh', () => {
  it('is the ratio that gives the measured pH, whatever ratio the recipe has now', () => {
    const document = withAcid(6);
    const ratio = baseRatioFromPh(document, kit, 3.9) ?? Number.NaN;
    const learned = { ...document, assume: { teaBaseRatio: ratio, hopBaseRatio: ratio } };
    expect(stillPh(learned)).toBeCloseTo(3.9, 3);
    expect(baseRatioFromPh(learned, kit, 3.9)).toBeCloseTo(ratio, 9);
  });

  it('is null where no ratio explains it, and without leaf', () => {
    expect(baseRatioFromPh(withAcid(6), kit, 2)).toBeNull();
    expect(baseRatioFromPh(buildDocument({ additions: [] }), kit, 5)).toBeNull();
  });
});
