import { describe, expect, it } from 'vitest';
import { nextRepair, soundHealth, type AudioRepair, type ContextState } from './audio-health.ts';

describe(soundHealth, () => {
  it.each<[ContextState | null, boolean, string]>([
    ['running', true, 'fine'],
    ['running', false, 'blocked'],
    ['suspended', true, 'blocked'],
    ['suspended', false, 'blocked'],
    ['interrupted', true, 'blocked'],
    ['interrupted', false, 'blocked'],
    ['closed', true, 'blocked'],
    ['closed', false, 'blocked'],
    [null, false, 'unsupported'],
  ])('%s with its clock moving: %s is %s', (state, isClockMoving, health) => {
    expect(soundHealth({ state, isClockMoving })).toBe(health);
  });
});

describe(nextRepair, () => {
  it.each<[ContextState | null, boolean, AudioRepair[]]>([
    ['running', true, ['none', 'none', 'none', 'none']],
    ['running', false, ['suspend-and-resume', 'rebuild', 'rebuild', 'rebuild']],
    ['suspended', false, ['resume', 'suspend-and-resume', 'rebuild', 'rebuild']],
    ['interrupted', false, ['resume', 'suspend-and-resume', 'rebuild', 'rebuild']],
    ['interrupted', true, ['resume', 'suspend-and-resume', 'rebuild', 'rebuild']],
    ['closed', false, ['rebuild', 'rebuild', 'rebuild', 'rebuild']],
    [null, false, ['none', 'none', 'none', 'none']],
  ])('%s, clock moving %s, in a tap: %j', (state, isClockMoving, expected) => {
    expect([0, 1, 2, 3].map((tried) => nextRepair({ state, isClockMoving }, tried, true))).toEqual(expected);
  });

  it('never makes a new context outside a tap: it would start blocked', () => {
    for (const state of ['running', 'suspended', 'interrupted', 'closed'] as const) {
      for (const tried of [0, 1, 2, 9]) {
        expect(nextRepair({ state, isClockMoving: false }, tried, false)).not.toBe('rebuild');
      }
    }
  });
});
