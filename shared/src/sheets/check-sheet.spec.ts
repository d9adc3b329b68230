import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { buildDocument, buildHops, buildTea } from '../testing/index.js';
import { recipeDocuments } from '../testing/recipe-arbitraries.js';
import { checkSheet } from './check-sheet.js';
import { compileSheet } from './compile.js';
import type { RunSheet } from './step.js';

const kit = { altitudeM: 0, reachS: 12 };
const sheet = compileSheet(buildDocument(), kit);
const without = (...ids: string[]): RunSheet => ({
  ...sheet,
  steps: sheet.steps.filter(({ id }) => !ids.includes(id)),
});

/** The sheet with one step moved in front of another. */
function moved(id: string, before: string): RunSheet {
  const steps = sheet.steps.flatMap((step) => {
    if (step.id === id) return [];
    return step.id === before ? [...sheet.steps.filter((one) => one.id === id), step] : [step];
  });
  return { ...sheet, steps };
}
const idsOf = (edited: RunSheet) => checkSheet(edited).map(({ stepId }) => stepId);

describe(checkSheet, () => {
  it('finds nothing on a sheet as it comes from a recipe', () => {
    expect(checkSheet(sheet)).toEqual([]);
    const usual = buildDocument({
      additions: [
        buildTea({ in: { at: 'fill' }, out: { at: 'timer', durationS: 60 } }),
        buildTea({ id: 'late', in: { at: 'steep', afterS: 60 } }),
        buildHops({ out: { at: 'timer', durationS: 600 } }),
        buildHops({ id: 'two', in: { at: 'falling', tempC: 50 }, out: { at: 'transfer' } }),
      ],
    });
    expect(checkSheet(compileSheet(usual, kit))).toEqual([]);
    fc.assert(
      fc.property(recipeDocuments, ({ steps: _, ...document }) => {
        const compiled = compileSheet({ ...document, gas: { volumes: 2, tempC: 4 }, steps: { own: [] } }, kit);
        expect(checkSheet(compiled)).toEqual([]);
      }),
      { numRuns: 50 },
    );
  }, 30_000);

  it('says at the step what would go wrong on the day', () => {
    expect(checkSheet(moved('tea-out', 'tea-in'))[0]).toEqual({
      stepId: 'tea-out',
      detail: 'Tea cannot come out here, since none is in: move “Tea out” behind the step that puts it in.',
    });
    expect(idsOf(without('hops-out'))).toEqual(['hops-in']);
    expect(idsOf(without('tea-in'))).toContain('tea-out');
    expect(checkSheet(moved('hops-in', 'chill'))).toEqual([
      {
        stepId: 'hops-in',
        detail: 'The temperature hardly falls before “Chiller on”: put this step behind it.',
      },
    ]);
    expect(idsOf(without('light-heat'))).toEqual(['heat', 'hops-in', 'hops-out', 'transfer']);
  });

  it('lets the pot cool by itself', () => {
    expect(checkSheet(without('chill'))).toEqual([]);
  });

  it('misses the steps that must not be lost', () => {
    expect(idsOf(without('ph'))).toEqual(['fill']);
    expect(idsOf(without('purge'))).toEqual(['transfer']);
    expect(idsOf(without('check-kit', 'purge'))).toEqual(['transfer', 'gas']);
    const unlit = {
      ...sheet,
      steps: sheet.steps.map((step) => ({ ...step, acts: step.acts.filter((act) => act !== 'heat-off') })),
    };
    expect(idsOf(unlit)).toEqual(['light-heat']);
  });

  it('refuses an empty sheet, and two steps with one id', () => {
    expect(checkSheet({ ...sheet, steps: [] })).toHaveLength(1);
    expect(idsOf({ ...sheet, steps: [...sheet.steps, ...sheet.steps.slice(-1)] })).toEqual(['next-time']);
  });
});
