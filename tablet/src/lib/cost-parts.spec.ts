import { expect, it } from 'vitest';
import { costParts } from './cost-parts.ts';

const cost = { total: 20, perL: 1, perServing: null, unknown: [] };

it('tells what a litre costs, or a gallon', () => {
  expect(costParts(cost, 'L')[1]).toEqual({ label: 'a litre', amount: 1 });
  expect(costParts(cost, 'gal')[1]?.label).toBe('a gallon');
  expect(costParts(cost, 'gal')[1]?.amount).toBeCloseTo(3.785, 3);
});

it('knows nothing of what is not known', () => {
  expect(costParts({ ...cost, perL: null }, 'gal').map(({ amount }) => amount)).toEqual([20, null, null]);
});
