import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { co2GPerLFromVolumes, co2MolPerLFromVolumes, co2Volumes } from './co2-volumes.js';

describe('volumes of CO2', () => {
  it('Messer, real gas: 1 volume is 1.9768 g/L, 2.7 are 5.337 g/L or 0.1213 mol/L', () => {
    expect(co2GPerLFromVolumes(1)).toBeCloseTo(1.9768, 4);
    expect(co2GPerLFromVolumes(2.7)).toBeCloseTo(5.337, 3);
    expect(co2MolPerLFromVolumes(2.7)).toBeCloseTo(0.1213, 4);
  });

  it('ideal gas, labelled: 1.9635 g/L, 2.7 volumes are 5.301 g/L', () => {
    expect(co2GPerLFromVolumes(1, 'ideal')).toBeCloseTo(1.9635, 4);
    expect(co2GPerLFromVolumes(2.7, 'ideal')).toBeCloseTo(5.301, 3);
  });

  it('comes back', () => {
    fc.assert(
      fc.property(
        fc.double({ min: 0, max: 20, noNaN: true }),
        fc.constantFrom('real', 'ideal'),
        (volumes, convention) => {
          expect(co2Volumes(co2GPerLFromVolumes(volumes, convention), convention)).toBeCloseTo(volumes, 10);
        },
      ),
    );
  });

  it('refuses a negative content', () => {
    expect(() => co2Volumes(-1)).toThrow(RangeError);
    expect(() => co2GPerLFromVolumes(Number.NaN)).toThrow(RangeError);
  });
});
