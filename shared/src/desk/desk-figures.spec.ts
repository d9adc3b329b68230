import { describe, expect, it } from 'vitest';
import { recipeDocumentSchema, type RecipeDocument } from '../sheets/index.js';
import { buildDocument, buildHops, buildTea, buildWorkedExample } from '../testing/index.js';
import { metricPreferences } from '../units/index.js';
import { baseRatioFromPh } from './acid-advice.js';
import { deskFigures } from './desk-figures.js';
import type { DeskKit, FigureRow } from './types.js';

const example = buildWorkedExample();
const kit: DeskKit = {
  altitudeM: 0,
  kettle: {
    volumeL: 25,
    diameterM: 0.3,
    massKg: 3,
    heaterPowerW: 3500,
    heaterEfficiency: 0.9,
    coolingConstantPerS: 1e-7,
    deadSpaceL: 0,
  },
  chiller: null,
};

function rowsOf(document: RecipeDocument, on: DeskKit = kit): Map<string, FigureRow> {
  const result = deskFigures(recipeDocumentSchema.parse(document), on, metricPreferences);
  if (result.kind === 'impossible') throw new Error(result.what);
  return new Map(result.rows.map((row) => [row.id, row]));
}

describe('the worked example, from a recipe document to the rows of the page', () => {
  const rows = rowsOf(example);

  /** Row, value, how near it must come, and the printed band where there is one. */
  it.each<[string, number, number, [number, number, number]?]>([
    // Stoichiometry.
    ['water.ca', 109.7, 0.1],
    ['water.cl', 144.7, 0.1],
    ['water.so4', 67.0, 0.1],
    ['water.cations', 5.475, 0.001],
    ['water.anions', 5.475, 0.001],
    ['water.cl-so4-ions', 2.16, 0.005],
    ['water.cl-so4-salts', 2.5, 1e-9],
    ['water.hardness', 274, 0.5],
    ['water.ionic-strength', 0.0089, 0.00005],
    ['water.conductivity', 685, 7],
    // Goldberg et al. 2002; Davies; leaf a judgement with a factor of two.
    ['acid.dose', 0.35, 1e-9],
    ['acid.amount', 0.001822, 0.000001],
    ['acid.lemon-juice', 146, 1],
    ['acid.ph-after-acid', 3.08, 0.01],
    ['acid.ph-after-acid-complexed', 3.07, 0.01],
    ['acid.ph-still-complexed', 3.72, 0.01],
    ['acid.tea-base', 0.935, 0.005],
    ['acid.ph-after-tea', 3.33, 0.01, [3.23, 3.5, 0.01]],
    ['acid.hop-base', 1.92, 0.002],
    ['acid.ph-still', 3.78, 0.01, [3.53, 4.09, 0.01]],
    ['acid.ph-carbonated', 3.67, 0.01],
    ['acid.ph-served', 3.72, 0.01, [3.5, 3.98, 0.01]],
    ['acid.buffer', 5.1, 0.05],
    ['acid.base-ratio.lower', 0.63, 0.005],
    ['acid.base-ratio.higher', 1.13, 0.005],
    ['acid.for-ph.3.5', 11.0, 0.1],
    ['acid.for-ph.3.8', 6.8, 0.1],
    ['acid.for-ph.4.0', 4.9, 0.1],
    // Newton's law.
    ['day.fall.hops', 4.98 * 60, 3],
    ['day.contact.hops', 13.73 * 60, 3],
    ['day.contact.leaf', 240, 0.001],
    // Jaganyi and Price 1999; J. Tea Sci. Res. 2024; rates a judgement with a factor of two.
    ['tea.caffeine-turns.leaf', 2.161, 0.02],
    ['tea.caffeine-out.leaf', 100 * 0.885 * 0.9, 0.5],
    ['tea.caffeine', 139, 1, [86, 192, 7]],
    ['tea.caffeine-serving', 50, 1, [30, 70, 5]],
    ['tea.polyphenols.leaf', 72, 0.5, [47, 92, 1]],
    ['tea.steep-dose.leaf', 4.28, 0.03],
    ['tea.left-in.leaf', 11.4, 0.1],
    ['tea.left-in-polyphenols.leaf', 97, 0.5],
    // Malowicki and Shellhammer 2005; Maye 2015; solubility a judgement with a factor of three.
    ['hops.alpha', 270, 1],
    ['hops.turns.hops', 8.34e-4, 0.05e-4],
    ['hops.iso-all-dissolved', 0.23, 0.01],
    ['hops.iso', 0.014, 0.001, [0.003, 0.05, 0.01]],
    ['hops.humulinones', 8.4, 0.05, [4.8, 12.7, 0.4]],
    ['hops.alpha-dissolved', 6, 0.7, [2.4, 15, 5]],
    ['hops.bitterness', 6.1, 0.15, [3.7, 9.4, 0.4]],
    ['hops.iso-at-chill', 0.14, 0.01],
    ['hops.iso-held', 1.6, 0.05],
    ['hops.iso-held-acid-later', 3.1, 0.2],
    // Volume balance.
    ['yield.keg', 19.1, 0.05],
    ['yield.leaf', 0.4, 1e-9],
    ['yield.hops', 0.42, 1e-9],
    ['yield.evaporated', 0.05, 0.005],
    // Weiss 1974.
    ['gas.gauge', 107.9, 2.5],
  ])('%s is %s within %s', (id, value, near, printed) => {
    const band = rows.get(id)?.band;
    expect(Math.abs((band?.value ?? Number.NaN) - value)).toBeLessThanOrEqual(near);
    if (!band || !printed) return;
    expect(Math.abs(band.low - printed[0])).toBeLessThanOrEqual(printed[2]);
    expect(Math.abs(band.high - printed[1])).toBeLessThanOrEqual(printed[2]);
  });

  it('says it in words: soft, in the window, and what the acid would be without leaf', () => {
    expect(rows.get('hops.bitterness')?.word).toBe('soft');
    expect(rows.get('tea.steep-dose.leaf')?.word).toBe('in the window');
    expect(rows.get('tea.left-in.leaf')?.word).toBe('in the window');
    expect(rows.get('acid.for-ph.3.5')?.word).toMatch(/^1\.8\sg without leaf and hops$/);
    expect(rows.get('acid.for-ph.4.0')?.word).toMatch(/^0\.41\sg /);
  });

  it('flags calcium with white tea, and caffeine whose band crosses the line of labels', () => {
    const result = deskFigures(example, kit, metricPreferences);
    const warnings = result.kind === 'figures' ? result.warnings : [];
    expect(warnings).toContainEqual(expect.objectContaining({ id: 'calcium-haze', grade: 'care' }));
    expect(warnings).toContainEqual(expect.objectContaining({ id: 'caffeine-label', grade: 'care' }));
  });

  it('learns the base of the lot from a measured pH, and is good to a tenth from then on', () => {
    expect(baseRatioFromPh(example, kit, 3.55)).toBeCloseTo(0.63, 2);
    expect(baseRatioFromPh(example, kit, 3.85)).toBeCloseTo(1.13, 2);
    const ratio = baseRatioFromPh(example, kit, 3.55) ?? 1;
    const learned = { ...example, assume: { ...example.assume, teaBaseRatio: ratio, hopBaseRatio: ratio } };
    const still = rowsOf(learned).get('acid.ph-still')?.band;
    expect(still?.value).toBeCloseTo(3.55, 2);
    expect((still?.high ?? 0) - (still?.low ?? 0)).toBeCloseTo(0.2, 2);
  });
});

describe('deskFigures', () => {
  it('judges rows against the targets of the recipe', () => {
    const rows = rowsOf({
      ...example,
      volumeL: 25,
      targets: { waterPh: { min: 4, max: 5 }, drinkPh: { min: 3.7, max: 3.9 }, caffeineMostMgPerL: 100 },
    });
    expect(rows.get('acid.ph-after-acid')?.target).toBe('below');
    expect(rows.get('acid.ph-still')?.target).toBe('in');
    expect(rows.get('tea.caffeine')?.target).toBe('above');
    expect(rows.get('yield.keg')?.target).toBe('below');
    expect(rowsOf(example).get('acid.ph-still')?.target).toBeNull();
  });

  it('puts the few that lead a group before its others', () => {
    const groups = new Map<string, boolean[]>();
    for (const { group, isLead } of rowsOf(example).values()) groups.set(group, [...(groups.get(group) ?? []), isLead]);
    for (const leads of groups.values()) expect(leads).toEqual([...leads].sort((a, b) => Number(b) - Number(a)));
    expect([...groups.keys()]).toEqual(['day', 'water', 'acid', 'tea', 'hops', 'yield', 'gas']);
  });

  it('writes labels in the units of the person', () => {
    const result = deskFigures(example, kit, { ...metricPreferences, temperature: 'F', volume: 'gal' });
    const labels = result.kind === 'figures' ? result.rows.map(({ label }) => label) : [];
    expect(labels.some((label) => label.includes('140\u00a0°F'))).toBe(true);
    expect(labels.some((label) => label.includes('°C'))).toBe(false);
    expect(labels.some((label) => /^Caffeine in 12\sfl\soz$/.test(label))).toBe(true);
  });

  it('takes the told caffeine of a leaf before that of its kind', () => {
    const told = (caffeineMgPerG: number) =>
      rowsOf({
        ...example,
        additions: example.additions.map((one) => (one.kind === 'tea' ? { ...one, caffeineMgPerG } : one)),
      }).get('tea.caffeine')?.band;
    expect(told(0)?.high).toBe(0);
    expect((told(70)?.value ?? 0) / (rowsOf(example).get('tea.caffeine')?.band.value ?? 1)).toBeCloseTo(2, 6);
  });

  it.each<[string, RecipeDocument, string | null, RegExp]>([
    [
      'a water report that cannot be right',
      buildDocument({
        waters: buildDocument().waters.map((water) => ({ ...water, report: { ...water.report, naMgPerL: 300 } })),
      }),
      'waters.0.report',
      /report/,
    ],
    [
      'salt without end',
      buildDocument({
        additions: [
          {
            id: 's',
            kind: 'salt',
            name: 'salt',
            massG: 3000,
            keeps: 'mass',
            salt: 'sodiumChloride',
            in: { at: 'fill' },
          },
        ],
      }),
      'additions.0.massG',
      /sea/,
    ],
    [
      'a base ratio that no leaf has',
      buildDocument({
        additions: [buildHops({ massG: 8000 })],
        assume: { hopBaseRatio: 20 },
      }),
      'assume.hopBaseRatio',
      /base ratio/,
    ],
    ['leaf without water', buildDocument({ waterL: 0.05 }), 'additions.1.massG', /more leaf/],
    [
      'acid without end',
      buildDocument({
        additions: buildDocument().additions.map((one) => (one.kind === 'acid' ? { ...one, massG: 20_000 } : one)),
      }),
      'additions.0.massG',
      /acid/,
    ],
  ])('says what is impossible, what to do and where: %s', (_name, document, path, what) => {
    const result = deskFigures(recipeDocumentSchema.parse(document), kit, metricPreferences);
    expect(result.kind).toBe('impossible');
    if (result.kind !== 'impossible') return;
    expect(result.what).toMatch(what);
    expect(result.act).not.toBe('');
    expect(result.path).toBe(path);
  });
});

describe('what is held back', () => {
  const held = (id: string, additions: RecipeDocument['additions']) =>
    rowsOf(buildDocument({ additions })).get(id)?.band.value;

  it('is more in cones than in pellets', () => {
    expect(held('yield.hops', [buildHops({ massG: 60 })])).toBeCloseTo(0.42, 9);
    expect(held('yield.hops', [buildHops({ massG: 60, form: 'cones' })])).toBeCloseTo(0.6, 9);
  });

  it('counts peel and spice in the kettle like leaf', () => {
    const { kind: _, tea: __, form: ___, ...shape } = buildTea({ id: 'peel', name: 'orange peel', massG: 50 });
    const peel = { ...shape, kind: 'other' } as const;
    expect(held('yield.leaf', [buildTea({ massG: 100 }), peel])).toBeCloseTo(0.6, 9);
    expect(held('yield.leaf', [buildTea({ massG: 100 }), { ...peel, in: { at: 'transfer' } }])).toBeCloseTo(0.4, 9);
  });
});
