import { describe, expect, it } from 'vitest';
import { assumptionsSchema, type Assumptions, type RecipeDocument } from '../sheets/index.js';
import { buildDocument, buildHops, buildTea } from '../testing/index.js';
import { metricPreferences } from '../units/index.js';
import { deskFigures } from './desk-figures.js';
import type { DeskKit } from './types.js';
import { workings } from './workings.js';

const kit: DeskKit = { altitudeM: 200, kettle: null, chiller: null };

/** Something of everything, so that every row is there. */
const rich = buildDocument({
  additions: [
    ...buildDocument().additions.filter(({ kind }) => kind === 'acid'),
    {
      id: 'chloride',
      kind: 'salt',
      name: 'calcium chloride',
      massG: 4,
      keeps: 'g-per-l',
      salt: 'calciumChlorideDihydrate',
      in: { at: 'fill' },
    },
    { id: 'gypsum', kind: 'salt', name: 'gypsum', massG: 2, keeps: 'g-per-l', salt: 'gypsum', in: { at: 'fill' } },
    buildTea({ out: { at: 'falling', tempC: 70 } }),
    buildHops(),
  ],
  transferC: 26,
});

function rowsOf(assume: Assumptions, on: DeskKit = kit) {
  const document: RecipeDocument = { ...rich, assume };
  const result = deskFigures(document, on, metricPreferences);
  if (result.kind === 'impossible') throw new Error(result.what);
  return result.rows;
}

describe('workings', () => {
  it('are there for every row, and for nothing else', () => {
    const named = new Set(rowsOf({}).map((row) => row.workings));
    expect([...named].filter((key) => !workings[key])).toEqual([]);
    expect(Object.keys(workings).filter((key) => !named.has(key))).toEqual([]);
  });

  it('say what it is, how, from where and how well', () => {
    for (const { meaning, model, source, band, defaults } of Object.values(workings)) {
      for (const text of [meaning, model, source, band]) expect(text).toMatch(/^[A-ZÀ-Ž0-9].*\.$/);
      for (const key of defaults) expect(Object.keys(assumptionsSchema.shape)).toContain(key);
    }
  });

  const other: Required<Assumptions> = {
    fillC: 40,
    roomC: 32,
    servingMl: 250,
    lidOn: false,
    chillerConstantPerS: 0.003,
    teaBaseRatio: 2,
    hopBaseRatio: 0.5,
  };
  const chilled: DeskKit = { ...kit, chiller: { metal: 'stainless', lengthM: 8, coolantC: 15 } };

  it.each(Object.keys(other) as (keyof Assumptions)[])('name %s where it moves a figure, and only there', (key) => {
    const much = new Set<string>();
    const atAll = new Set<string>();
    // On the pot that cools by itself and on one with a chiller: each default moves what it moves on either.
    for (const on of [kit, chilled]) {
      const after = new Map(rowsOf({ [key]: other[key] }, on).map((row) => [row.id, row.band]));
      for (const { id, band, workings: named } of rowsOf({}, on)) {
        const now = after.get(id);
        if (!now) atAll.add(named);
        else if (Math.abs(now.value - band.value) > 0.02 * Math.abs(band.value)) much.add(named);
        if (now && (now.value !== band.value || now.low !== band.low)) atAll.add(named);
      }
    }
    const named = Object.entries(workings).flatMap(([id, { defaults }]) => (defaults.includes(key) ? [id] : []));
    expect([...much].filter((id) => !named.includes(id)).sort()).toEqual([]);
    expect(named.filter((id) => !atAll.has(id)).sort()).toEqual([]);
  });
});
