import { describe, expect, it } from 'vitest';
import { isLearnable, pedalActOf, withLearned, type PedalKey } from './pedal-keys.ts';

const plain: Omit<PedalKey, 'key'> = {
  hasModifier: false,
  isTyping: false,
  isDialogOpen: false,
  isAlertStanding: false,
  isOnTabbedControl: false,
  isOnTabbedChoice: false,
};

describe(pedalActOf, () => {
  it.each([
    ['PageDown', 'next'],
    ['ArrowRight', 'next'],
    ['ArrowDown', 'next'],
    [' ', 'next'],
    ['Enter', 'next'],
    ['PageUp', 'back'],
    ['ArrowLeft', 'back'],
    ['ArrowUp', 'back'],
    ['Tab', null],
    ['a', null],
    ['Escape', null],
  ])('%j is %s', (key, act) => {
    expect(pedalActOf({ key, ...plain })).toBe(act);
  });

  it.each(['hasModifier', 'isTyping', 'isDialogOpen'] as const)('does nothing with %s', (what) => {
    expect(pedalActOf({ key: 'PageDown', ...plain, [what]: true })).toBeNull();
  });

  it('lets "next" through a dialog while an alert stands, and nothing that a field would write', () => {
    const alerted = { ...plain, isDialogOpen: true, isAlertStanding: true };
    expect(['PageDown', ' ', 'Enter', 'PageUp'].map((key) => pedalActOf({ key, ...alerted }))).toEqual([
      'next',
      'next',
      'next',
      null,
    ]);
    const typing = { ...alerted, isTyping: true };
    expect(['PageDown', ' ', 'Enter', 'ArrowRight'].map((key) => pedalActOf({ key, ...typing }))).toEqual([
      'next',
      null,
      null,
      null,
    ]);
  });

  it('leaves Space and Enter to a button reached with Tab, and no other key', () => {
    const onButton = { ...plain, isOnTabbedControl: true };
    expect([' ', 'Enter', 'PageDown', 'ArrowRight'].map((key) => pedalActOf({ key, ...onButton }))).toEqual([
      null,
      null,
      'next',
      'next',
    ]);
  });

  it('leaves the arrows to a choice reached with Tab', () => {
    const onChoice = { ...plain, isOnTabbedControl: true, isOnTabbedChoice: true };
    expect(['ArrowRight', 'ArrowUp', 'PageDown'].map((key) => pedalActOf({ key, ...onChoice }))).toEqual([
      null,
      null,
      'next',
    ]);
  });
});

describe(withLearned, () => {
  it('goes before what is usual, and leaves the other usual keys', () => {
    const learned = withLearned(withLearned({}, 'next', 'PageUp'), 'back', 'b');
    expect(['PageUp', 'b', 'PageDown'].map((key) => pedalActOf({ key, ...plain }, learned))).toEqual([
      'next',
      'back',
      'next',
    ]);
  });

  it('has one key for each act, and one act for a key', () => {
    expect(withLearned({ a: 'next', b: 'back' }, 'next', 'c')).toEqual({ b: 'back', c: 'next' });
    expect(withLearned({ a: 'next' }, 'back', 'a')).toEqual({ a: 'back' });
  });

  it('says "heard it" from within a field only with a key that writes nothing', () => {
    const learned = withLearned(withLearned({}, 'next', 'MediaPlayPause'), 'back', 'b');
    const typing = { ...plain, isTyping: true, isAlertStanding: true };
    expect(['MediaPlayPause', 'b'].map((key) => pedalActOf({ key, ...typing }, learned))).toEqual(['next', null]);
  });

  it('is not taught what a keyboard needs for itself', () => {
    expect(['Tab', 'Escape', 'Shift', 'Unidentified', 'AudioVolumeUp', 'b'].map(isLearnable)).toEqual([
      false,
      false,
      false,
      false,
      true,
      true,
    ]);
  });
});
