import { describe, expect, it } from 'vitest';
import { hazeFlags, type HazeConditions } from './haze.js';

const base: HazeConditions = {
  caMgPerL: 110,
  hardnessAsCaCo3MgPerL: 0,
  teas: [{ kind: 'white', doseGPerL: 5 }],
  hops: true,
  chilledCold: false,
};

describe('hazeFlags', () => {
  it('Food Chem. 139, 944: calcium above 40 with pale tea is amber, with strong black tea red', () => {
    expect(hazeFlags(base)).toEqual([{ kind: 'calcium', level: 'amber' }]);
    expect(hazeFlags({ ...base, caMgPerL: 40 })).toEqual([]);
    expect(hazeFlags({ ...base, teas: [{ kind: 'black', doseGPerL: 7 }] })).toEqual([
      { kind: 'calcium', level: 'red' },
    ]);
    expect(hazeFlags({ ...base, teas: [{ kind: 'black', doseGPerL: 5 }] })).toEqual([]);
  });

  it('Jöbstl 2005 and Giacomin 2021: cold rest, and film in hard water, not with rooibos', () => {
    const cold = { ...base, caMgPerL: 0, hardnessAsCaCo3MgPerL: 120, chilledCold: true };
    expect(hazeFlags(cold).map(({ kind }) => kind)).toEqual(['cold-rest', 'film']);
    expect(hazeFlags({ ...cold, teas: [{ kind: 'herbal', doseGPerL: 5 }], hops: false })).toEqual([]);
  });

  it('refuses NaN', () => {
    expect(() => hazeFlags({ ...base, caMgPerL: Number.NaN })).toThrow(RangeError);
  });
});
