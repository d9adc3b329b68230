import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { Dissociating } from './dissociation.js';
import { prepared, type AcidSolution } from './solution.js';
import { solvePh, solvePrepared } from './solve-ph.js';

const acids: readonly Dissociating[] = ['citric', 'lactic', 'phosphoric', 'malic', 'tartaric', 'ascorbic', 'carbonic'];
const number = (min: number, max: number) => fc.double({ min, max, noNaN: true });
/** Nothing, a trace or as much as there is: ends come more often than in an even draw. */
const amount = fc.oneof(
  fc.constantFrom(0, 1e-12, 1, 2),
  number(-9, 0).map((log) => 10 ** log),
);
const everyAcid = fc.record(
  Object.fromEntries(acids.map((acid) => [acid, amount])) as Record<Dissociating, typeof amount>,
);
const anything = fc.record({
  acidsMolPerL: everyAcid,
  strongIonEqPerL: fc.oneof(fc.constantFrom(-2, 0, 2), number(-0.1, 0.1)),
  sulfateMolPerL: amount,
  gasCo2MolPerL: amount,
  strongIonicStrength: fc.oneof(fc.constantFrom(0, 0.49, 0.51, 20), number(0, 1)),
  sites: fc.array(fc.record({ molPerL: amount, pK: number(2, 9) }), { maxLength: 4 }),
  tempC: fc.oneof(fc.constantFrom(0, 50, 77), number(0, 77)),
}) satisfies fc.Arbitrary<AcidSolution>;

/** Sums of all charges that one answer takes: `hydrogenSulfateK` is read once in each. */
function sumsFor(solution: AcidSolution): number {
  const ready = prepared(solution);
  let sums = 0;
  solvePrepared(
    Object.defineProperty({ ...ready }, 'hydrogenSulfateK', {
      get: () => {
        sums += 1;
        return ready.hydrogenSulfateK;
      },
    }),
  );
  return sums;
}

describe('solvePh, whatever goes in', () => {
  it('ends after a bounded number of steps, with no charge left over', () => {
    let most = 0;
    fc.assert(
      fc.property(anything, (solution) => {
        const answer = solvePh(solution);
        expect(Number.isFinite(answer.ph)).toBe(true);
        expect(Math.abs(answer.leftEqPerL)).toBeLessThan(1e-9 * Math.max(1e-3, answer.bufferEqPerLPerPh));
        most = Math.max(most, sumsFor(solution));
      }),
      { numRuns: 1000 },
    );
    expect(most).toBeLessThan(2000);
  });

  it('falls with more of any acid, and rises with more strong base', () => {
    fc.assert(
      fc.property(anything, fc.constantFrom(...acids), number(1e-6, 0.5), (solution, acid, more) => {
        // The ionic strength is told apart, so that only the acid or the base changes.
        const held = { ...solution, activity: false };
        const { ph } = solvePh(held);
        const present = Math.min(1.4, held.acidsMolPerL[acid]);
        const less = { ...held, acidsMolPerL: { ...held.acidsMolPerL, [acid]: present } };
        const acidic = { ...held, acidsMolPerL: { ...held.acidsMolPerL, [acid]: present + more } };
        expect(solvePh(acidic).ph).toBeLessThanOrEqual(solvePh(less).ph + 1e-9);
        const base = Math.min(2, held.strongIonEqPerL + more);
        expect(solvePh({ ...held, strongIonEqPerL: base }).ph).toBeGreaterThanOrEqual(ph - 1e-9);
      }),
      { numRuns: 300 },
    );
  });

  it('does so with activities as well, as strong as drinks are', () => {
    const drinks = fc.record({
      citric: number(0, 0.05),
      alkalinity: number(0, 0.02),
      strongIonicStrength: number(0, 0.05),
      tempC: number(0, 77),
      more: number(1e-5, 0.01),
    });
    fc.assert(
      fc.property(drinks, ({ citric, alkalinity, strongIonicStrength, tempC, more }) => {
        const ph = (acid: number, base: number) =>
          solvePh({ acidsMolPerL: { citric: acid }, strongIonEqPerL: base, strongIonicStrength, tempC }).ph;
        expect(ph(citric + more, alkalinity)).toBeLessThan(ph(citric, alkalinity));
        expect(ph(citric, alkalinity + more)).toBeGreaterThan(ph(citric, alkalinity));
      }),
      { numRuns: 300 },
    );
  });

  it('answers or refuses from freezing to boiling, and never hangs', () => {
    fc.assert(
      fc.property(anything, number(0, 100), (solution, tempC) => {
        if (tempC <= 77) expect(Number.isFinite(solvePh({ ...solution, tempC }).ph)).toBe(true);
        else expect(() => solvePh({ ...solution, acidsMolPerL: { citric: 0.01 }, tempC })).toThrow(RangeError);
      }),
      { numRuns: 200 },
    );
  });
});
