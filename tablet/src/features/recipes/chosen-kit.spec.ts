import { afterEach, describe, expect, it } from 'vitest';
import { chooseKit, chosenKit, readChoice } from './chosen-kit.ts';

afterEach(() => localStorage.clear());

describe('the kit that the figures are worked out on', () => {
  it('is the same after a reload', () => {
    chooseKit({ kettleId: 'large' });
    chooseKit({ chillerId: null });
    expect(readChoice()).toEqual({ kettleId: 'large', chillerId: null });
    expect(chosenKit.get()).toEqual(readChoice());
  });

  it('is the first of the house where something else was kept', () => {
    localStorage.setItem('steepfall.desk-kit', '{"kettleId":4');
    expect(readChoice()).toEqual({});
    localStorage.setItem('steepfall.desk-kit', '{"kettleId":4}');
    expect(readChoice()).toEqual({});
  });
});
