import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { recipeDocumentSchema, type RecipeDocument } from '../sheets/index.js';
import { buildDocument, buildHops, buildTea } from '../testing/index.js';
import { recipeDocuments, revisedDocuments, revisedTwice } from '../testing/recipe-arbitraries.js';
import { metricPreferences } from '../units/index.js';
import { combineRevisions } from './combine.js';
import { scaleToVolume } from './scale.js';
import { isSame } from './same-value.js';

const base = buildDocument();
const combine = (mine: RecipeDocument, theirs: RecipeDocument, from = base) =>
  combineRevisions(from, mine, theirs, metricPreferences);
const withHops = (overrides: Parameters<typeof buildHops>[0]) =>
  buildDocument({ additions: [...base.additions.slice(0, 2), buildHops(overrides)] });
const plain = (text: string) => text.replaceAll('\u00a0', ' ');
const collisions = (mine: RecipeDocument, theirs: RecipeDocument, from = base) => {
  const answer = combine(mine, theirs, from);
  if (answer.kind === 'combined') return [];
  return answer.at.map((at) => ({ what: plain(at.what), mine: plain(at.mine), theirs: plain(at.theirs) }));
};

describe(combineRevisions, () => {
  it('joins what both changed on different things, down to the parts of one addition', () => {
    const mine = { ...withHops({ massG: 48 }), steepC: 78, assume: { roomC: 24 } };
    const theirs = {
      ...base,
      gas: { ...base.gas, volumes: 2.5 },
      assume: { servingMl: 250 },
      additions: [
        buildTea({ id: 'oolong', name: 'oolong', tea: 'oolong' }),
        ...base.additions.slice(0, 2),
        buildHops({ alphaPercent: 7 }),
      ],
      steps: { own: [{ id: 'rest', title: 'Rest', done: { by: 'hand' as const } }] },
    };
    expect(combine(mine, theirs)).toEqual({
      kind: 'combined',
      document: {
        ...theirs,
        steepC: 78,
        assume: { roomC: 24, servingMl: 250 },
        additions: [...theirs.additions.slice(0, 3), buildHops({ massG: 48, alphaPercent: 7 })],
      },
    });
  });

  it('says what collides', () => {
    expect(collisions(withHops({ massG: 48 }), withHops({ massG: 40 }))).toEqual([
      { what: 'Cascade', mine: '48 g', theirs: '40 g' },
    ]);
    expect(
      collisions(withHops({ in: { at: 'falling', tempC: 60 } }), withHops({ out: { at: 'timer', durationS: 600 } })),
    ).toEqual([{ what: 'Cascade', mine: 'Cascade in 62 → 60 °C', theirs: 'Cascade out at 30 °C → after 10 min' }]);
    expect(collisions(withHops({ massG: 48 }), buildDocument({ additions: base.additions.slice(0, 2) }))).toEqual([
      {
        what: 'Cascade',
        mine: 'Cascade 60 → 48 g',
        theirs: 'Cascade taken out (60 g, in at 62 °C, out at 30 °C)',
      },
    ]);
  });

  it('tells one who scaled and one who changed amounts', () => {
    const scaled = scaleToVolume(base, 10);
    expect(collisions(scaled, withHops({ massG: 48 })).map(({ what }) => what)).toContain('water and amounts');
    const added = { ...base, additions: [...base.additions, buildHops({ id: 'saaz', name: 'Saaz' })] };
    expect(collisions(added, scaled)).toEqual([
      expect.objectContaining({ what: 'water and amounts', mine: 'Saaz added: 60 g, in at 62 °C, out at 30 °C' }),
    ]);
    expect(combine(scaled, { ...base, steepC: 80 }).kind).toBe('combined');
  });

  it('keeps the waters together at 100 %, and joins a report with a share', () => {
    const [water] = base.waters;
    if (!water) throw new Error('no water');
    const tap = { ...water, id: 'tap', name: 'Tap water' };
    const of = (percent: number, calcium = 0) => ({
      ...base,
      waters: [
        { ...water, percent },
        { ...tap, percent: 100 - percent, report: { ...tap.report, caMgPerL: calcium } },
      ],
    });
    expect(combine(of(60), of(50, 80), of(50))).toEqual({ kind: 'combined', document: of(60, 80) });
    expect(collisions(of(60), of(70), of(50)).map(({ what }) => what)).toEqual(['waters']);
  });

  it('tells what no recipe may be', () => {
    const many = (from: number, count: number) =>
      Array.from({ length: count }, (_, index) => buildTea({ id: `tea-${from + index}`, keeps: 'mass' }));
    const mine = { ...base, additions: [...base.additions, ...many(0, 20)] };
    const theirs = { ...base, additions: [...base.additions, ...many(20, 20)] };
    expect(collisions(mine, theirs).map(({ what }) => what)).toEqual(['At most 40 additions.']);
  });

  it('is the other side where one changed nothing', () => {
    fc.assert(
      fc.property(revisedDocuments, ([from, other]) => {
        for (const answer of [combine(other, from, from), combine(from, other, from), combine(other, other, from)]) {
          expect(answer.kind === 'combined' && isSame(answer.document, other)).toBe(true);
        }
      }),
    );
    fc.assert(
      fc.property(recipeDocuments, recipeDocuments, (from, other) => {
        const answer = combine(from, other, from);
        expect(answer.kind === 'combined' && isSame(answer.document, other)).toBe(true);
      }),
      { numRuns: 30 },
    );
  }, 30_000);

  it('is a recipe whenever it is combined, and alike from either side', () => {
    fc.assert(
      fc.property(revisedTwice, ([from, mine, theirs]) => {
        const [answer, mirrored] = [combine(mine, theirs, from), combine(theirs, mine, from)];
        expect(mirrored.kind).toBe(answer.kind);
        if (answer.kind === 'collides') {
          for (const { what, mine: here, theirs: there } of answer.at) expect([what, here, there]).not.toContain('');
        } else if (mirrored.kind === 'combined') {
          expect(recipeDocumentSchema.safeParse(answer.document).error).toBeUndefined();
          // Who combines decides at most where in a list the new ones stand.
          expect(isSame(sorted(answer.document), sorted(mirrored.document))).toBe(true);
        }
      }),
    );
  }, 30_000);
});

function sorted(document: RecipeDocument) {
  const byId = <T extends { id: string }>(list: readonly T[]) => list.toSorted((a, b) => (a.id < b.id ? -1 : 1));
  const { additions, waters, steps } = document;
  return { ...document, additions: byId(additions), waters: byId(waters), steps: { ...steps, own: byId(steps.own) } };
}
