import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { co2MolPerLFromVolumes } from '../gas/co2-volumes.js';
import { carbonicLogHenry, type Dissociating } from './dissociation.js';
import { solvePh } from './solve-ph.js';
import { chargeAt, prepared, type AcidSolution } from './solution.js';

const alone = (acid: Dissociating, molPerL: number, tempC = 25): AcidSolution => ({
  acidsMolPerL: { [acid]: molPerL },
  strongIonEqPerL: 0,
  tempC,
});
const ph = (solution: AcidSolution) => solvePh(solution).ph;

describe('solvePh', () => {
  it.each<[Dissociating, number, number]>([
    ['citric', 0.001, 3.24],
    ['citric', 0.1, 2.08],
    ['lactic', 0.01, 2.96],
    ['phosphoric', 0.001, 3.06],
    ['carbonic', 0.01, 4.18],
  ])('calculated table of common acids: %s at %s mol/L is pH %s', (acid, molPerL, expected) => {
    expect(Math.abs(ph(alone(acid, molPerL)) - expected)).toBeLessThan(0.02);
  });

  it.each([
    [0.5, 25, 2.97],
    [1, 25, 2.79],
    [1, 5, 2.81],
    [1, 60, 2.77],
    [10, 25, 2.23],
  ])('Goldberg 2002 and Davies, computed: citric acid %s g/L at %s °C is pH %s', (gPerL, tempC, expected) => {
    expect(Math.abs(ph(alone('citric', gPerL / 192.123, tempC)) - expected)).toBeLessThan(0.03);
  });

  it.each([
    [25, 3.776],
    [0, 3.863],
    [50, 3.749],
  ])(
    'Staples and Bates 1969 (0 and 50 °C from memory): potassium dihydrogen citrate at %s °C is pH %s',
    (tempC, expected) => {
      expect(Math.abs(ph({ ...alone('citric', 0.05, tempC), strongIonEqPerL: 0.05 }) - expected)).toBeLessThan(0.02);
    },
  );

  it('Goldberg 2002, computed: the same without activities is 3.947', () => {
    const ideal = ph({ ...alone('citric', 0.05), strongIonEqPerL: 0.05, activity: false });
    expect(Math.abs(ideal - 3.947)).toBeLessThan(0.005);
  });

  it('NIST (from memory) and JIS Z 8802: equal phosphates are pH 6.865', () => {
    expect(Math.abs(ph({ ...alone('phosphoric', 0.05), strongIonEqPerL: 0.075 }) - 6.865)).toBeLessThan(0.02);
  });

  it('Goldberg 2002 and Davies, computed: 5 mM citric with 5 meq/L of strong base is 3.917, without activities 3.981', () => {
    const half = { ...alone('citric', 0.005), strongIonEqPerL: 0.005 };
    expect(Math.abs(ph(half) - 3.917)).toBeLessThan(0.01);
    expect(Math.abs(ph({ ...half, activity: false }) - 3.981)).toBeLessThan(0.01);
  });

  it.each([
    [25, 3.61],
    [4, 3.7],
  ])('Plummer and Busenberg 1982, computed: pure water at 3 volumes and %s °C is pH %s', (tempC, expected) => {
    expect(Math.abs(ph(alone('carbonic', co2MolPerLFromVolumes(3), tempC)) - expected)).toBeLessThan(0.02);
  });

  it('Plummer and Busenberg 1982, computed: water that took up the CO2 of air at 420 ppm is pH 5.64', () => {
    expect(Math.abs(ph(alone('carbonic', 10 ** carbonicLogHenry(25) * 420e-6)) - 5.64)).toBeLessThan(0.01);
  });

  it('is neutral with nothing in it, at any temperature', () => {
    expect(ph({ acidsMolPerL: {}, strongIonEqPerL: 0, tempC: 25 })).toBeCloseTo(13.995 / 2, 2);
  });

  it('gives the buffer value that a step of base shows', () => {
    const base = { ...alone('citric', 0.005), strongIonEqPerL: 0.005, activity: false };
    const { bufferEqPerLPerPh } = solvePh(base);
    const moved = ph({ ...base, strongIonEqPerL: 0.005 + 1e-6 }) - ph(base);
    expect(1e-6 / moved / bufferEqPerLPerPh).toBeCloseTo(1, 4);
  });

  it('ends with no charge left over for any valid drink', () => {
    const acids: Dissociating[] = ['citric', 'lactic', 'phosphoric', 'malic', 'tartaric', 'ascorbic', 'carbonic'];
    const amount = fc.oneof(
      fc.constant(0),
      fc.double({ min: -9, max: 0.3, noNaN: true }).map((log) => 10 ** log),
    );
    const drink = fc.record({
      acidsMolPerL: fc.dictionary(fc.constantFrom(...acids), amount),
      strongIonEqPerL: fc.oneof(fc.constant(0), fc.double({ min: -2, max: 2, noNaN: true })),
      sulfateMolPerL: amount,
      strongIonicStrength: amount,
      sites: fc.array(fc.record({ molPerL: amount, pK: fc.double({ min: 2, max: 9, noNaN: true }) }), { maxLength: 4 }),
      tempC: fc.double({ min: 0, max: 77, noNaN: true }),
    });
    fc.assert(
      fc.property(drink, (solution) => {
        const answer = solvePh(solution);
        const scale = 1e-9 * Math.max(1e-3, answer.bufferEqPerLPerPh);
        expect(answer.ph).toBeGreaterThan(-1.5);
        expect(answer.ph).toBeLessThan(16);
        expect(Math.abs(answer.leftEqPerL)).toBeLessThan(scale);
        const settled = chargeAt(prepared(solution), answer.ph, answer.ionicStrength).ionicStrength;
        expect(Math.abs(settled - answer.ionicStrength)).toBeLessThan(1e-8);
      }),
      { numRuns: 500 },
    );
  });

  it('refuses what it cannot hold', () => {
    expect(() => solvePh(alone('citric', -1))).toThrow(RangeError);
    expect(() => solvePh(alone('citric', Number.NaN))).toThrow(RangeError);
    expect(() => solvePh(alone('citric', 0.01, 95))).toThrow(RangeError);
    expect(() => solvePh({ ...alone('citric', 0.01), strongIonEqPerL: Infinity })).toThrow(/strong-ion/);
  });
});
