import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { buildDocument, buildHops, buildTea } from '../testing/index.js';
import { recipeDocuments } from '../testing/recipe-arbitraries.js';
import { additionSteps } from './addition-steps.js';
import { compileSheet } from './compile.js';

describe(additionSteps, () => {
  it('names the steps of leaf, hops and acid', () => {
    expect(Object.fromEntries(additionSteps(buildDocument()))).toEqual({
      citric: { inStepId: 'acid', outStepId: null },
      sencha: { inStepId: 'tea-in', outStepId: 'tea-out' },
      cascade: { inStepId: 'hops-in', outStepId: 'hops-out' },
    });
  });

  it('tells two teas and two hops apart', () => {
    const document = buildDocument({
      additions: [
        buildTea({ id: 'a', out: { at: 'timer', durationS: 120 } }),
        buildTea({ id: 'b', out: { at: 'timer', durationS: 240 } }),
        buildHops({ id: 'c', in: { at: 'falling', tempC: 70 } }),
        buildHops({ id: 'd', in: { at: 'falling', tempC: 50 }, out: { at: 'timer', durationS: 60 } }),
      ],
    });
    expect(Object.fromEntries(additionSteps(document))).toEqual({
      a: { inStepId: 'tea-in', outStepId: 'tea-out' },
      b: { inStepId: 'tea-in', outStepId: 'tea-out-2' },
      c: { inStepId: 'hops-in', outStepId: 'hops-out-2' },
      d: { inStepId: 'hops-in-2', outStepId: 'hops-out' },
    });
  });

  it('finds every addition of any recipe on its sheet', () => {
    fc.assert(
      fc.property(recipeDocuments, (document) => {
        const plain = { ...document, gas: { volumes: 2.5, tempC: 4 }, steps: { own: [] } };
        const { steps } = compileSheet(plain, { altitudeM: 0, reachS: 8 });
        const found = additionSteps(plain);
        for (const addition of plain.additions) {
          const { inStepId, outStepId } = found.get(addition.id) ?? { inStepId: '', outStepId: null };
          const inStep = steps.find(({ id }) => id === inStepId);
          expect(inStep?.amounts.map(({ name }) => name)).toContain(addition.name);
          const comesOut = 'out' in addition && (addition.in.at !== 'transfer' || addition.out.at === 'timer');
          if (!comesOut) expect(outStepId).toBeNull();
          else expect(steps.find(({ id }) => id === outStepId)?.kind).toBe('remove');
        }
      }),
    );
  });
});
