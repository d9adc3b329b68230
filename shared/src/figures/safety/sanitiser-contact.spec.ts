import { describe, expect, it } from 'vitest';
import { sanitiserContactS, type Sanitiser } from './sanitiser-contact.js';

describe('sanitiserContactS', () => {
  it.each<[Sanitiser, number | null]>([
    [{ kind: 'hot-water-immersion', waterC: 77 }, 30],
    [{ kind: 'hot-water-immersion', waterC: 76.9 }, null],
    [{ kind: 'chlorine', mgPerL: 100, ph: 9, tempC: 20 }, 10],
    [{ kind: 'chlorine', mgPerL: 50, ph: 10, tempC: 38 }, 7],
    [{ kind: 'chlorine', mgPerL: 50, ph: 8, tempC: 24 }, 7],
    [{ kind: 'chlorine', mgPerL: 50, ph: 9, tempC: 24 }, 10],
    [{ kind: 'other' }, 30],
    [{ kind: 'other', labelS: 60 }, 60],
  ])('FDA Food Code 4-703.11: %j takes %s s', (sanitiser, contactS) => {
    expect(sanitiserContactS(sanitiser)).toBe(contactS);
  });

  it('refuses NaN', () => {
    expect(() => sanitiserContactS({ kind: 'hot-water-immersion', waterC: Number.NaN })).toThrow(RangeError);
  });
});
