import { describe, expect, it } from 'vitest';
import { buildDocument } from '../testing/index.js';
import { assumedValues } from './assumed.js';

describe('assumedValues', () => {
  it('is what is usual, what the kit says, and what the recipe says, the last word last', () => {
    const bare = { altitudeM: 0, kettle: null, chiller: null };
    expect(assumedValues(buildDocument(), bare)).toEqual({
      fillC: 15,
      roomC: 20,
      servingMl: 355,
      lidOn: true,
      chillerConstantPerS: null,
      teaBaseRatio: 1,
      hopBaseRatio: 1,
    });
    const chiller = { metal: 'stainless' as const, lengthM: 7.6, coolantC: 15 };
    expect(assumedValues(buildDocument(), { ...bare, chiller }).chillerConstantPerS).toBeCloseTo(0.0019, 4);
    const learned = { ...bare, chiller: { ...chiller, coolingConstantPerS: 0.001 } };
    expect(assumedValues(buildDocument(), learned).chillerConstantPerS).toBe(0.001);
    const told = buildDocument({ assume: { chillerConstantPerS: 0.003, lidOn: false, fillC: 10 } });
    expect(assumedValues(told, learned)).toMatchObject({ chillerConstantPerS: 0.003, lidOn: false, fillC: 10 });
  });
});
