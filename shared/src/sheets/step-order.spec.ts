import { describe, expect, it } from 'vitest';
import type { OwnStep } from './recipe.js';
import { inStepOrder, type StepDraft } from './step-order.js';

const drafts = ['fill', 'heat', 'tea-in', 'tea-out'].map((id): StepDraft => ({ id, kind: 'prepare', title: id }));
const own = (id: string, afterStepId?: string): OwnStep => ({
  ...{ id, title: id, done: { by: 'hand' } },
  ...(afterStepId === undefined ? {} : { afterStepId }),
});
const idsOf = (steps: OwnStep[], order?: string[]) =>
  inStepOrder(drafts, { own: steps, ...(order ? { order } : {}) }).map(({ id }) => id);

describe(inStepOrder, () => {
  it('puts own steps where they belong, in their own order, also behind each other', () => {
    expect(idsOf([own('c', 'b'), own('a', 'heat'), own('b', 'heat'), own('first')])).toEqual([
      ...['first', 'fill', 'heat', 'a', 'b', 'c', 'tea-in', 'tea-out'],
    ]);
  });

  it('loses no step: at the end what follows one that is gone, by another id what has that of a usual one', () => {
    expect(idsOf([own('a', 'gone'), own('b', 'a'), own('heat', 'heat')])).toEqual([
      ...['fill', 'heat', 'own-2-heat', 'tea-in', 'tea-out', 'a', 'b'],
    ]);
    expect(idsOf([own('a', 'b'), own('b', 'a')])).toEqual(['fill', 'heat', 'tea-in', 'tea-out', 'a', 'b']);
  });

  it('takes the order of the brewer; what it does not name stays behind the one before it', () => {
    expect(idsOf([own('a', 'tea-in')], ['heat', 'heat', 'gone', 'fill'])).toEqual([
      ...['heat', 'tea-in', 'a', 'tea-out', 'fill'],
    ]);
  });
});
