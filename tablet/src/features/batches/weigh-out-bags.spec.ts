import type { WeighOutLine } from '@steepfall/shared/contracts';
import { describe, expect, it } from 'vitest';
import { bagsOf, roundedG } from './weigh-out-bags.ts';

const line = (additionId: string, bag: string | null): WeighOutLine => ({
  additionId,
  kind: 'other',
  name: additionId,
  massG: 1,
  bag,
  lots: [],
});

describe(bagsOf, () => {
  it('puts together what waits in one bag, and what waits in none last', () => {
    const bags = bagsOf([line('acid', null), line('sencha', 'bag 1'), line('Saaz', 'bag 2'), line('peel', 'bag 1')]);
    expect(bags.map(({ bag, lines }) => [bag, ...lines.map(({ name }) => name)])).toEqual([
      ['bag 1', 'sencha', 'peel'],
      ['bag 2', 'Saaz'],
      [null, 'acid'],
    ]);
  });
});

describe(roundedG, () => {
  it.each([
    [4.512, 0.1, 4.5],
    [4.26, 0.5, 4.5],
    [0.3, 1, 1],
    [60, undefined, 60],
  ])('shows %s g on a scale with steps of %s g as %s g', (massG, step, shown) => {
    expect(roundedG(massG, step)).toBe(shown);
  });
});
