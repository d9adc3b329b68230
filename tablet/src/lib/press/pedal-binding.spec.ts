import { beforeEach, describe, expect, it, vi } from 'vitest';

async function fresh() {
  vi.resetModules();
  return import('./pedal-binding.ts');
}

beforeEach(() => localStorage.clear());

describe('the pedal of a station', () => {
  it('keeps what it was taught through a reload, until it is forgotten', async () => {
    const first = await fresh();
    expect(first.learnPedal('next', 'MediaPlayPause')).toBe(true);
    const second = await fresh();
    expect(second.pedalBinding.get()).toEqual({ MediaPlayPause: 'next' });
    second.forgetPedal();
    expect((await fresh()).pedalBinding.get()).toEqual({});
  });

  it('learns nothing from a key that cannot be a pedal, nor from what is broken', async () => {
    expect((await fresh()).learnPedal('next', 'Escape')).toBe(false);
    localStorage.setItem('steepfall.pedal', '{"Tab":"next","b":"jump","c":"back"}');
    expect((await fresh()).pedalBinding.get()).toEqual({ c: 'back' });
    localStorage.setItem('steepfall.pedal', 'null');
    expect((await fresh()).pedalBinding.get()).toEqual({});
    localStorage.setItem('steepfall.pedal', '{');
    expect((await fresh()).pedalBinding.get()).toEqual({});
  });

  it('names keys as people do', async () => {
    const { keyName } = await fresh();
    expect([' ', 'PageDown', 'b', 'MediaPlayPause'].map(keyName)).toEqual([
      'Space',
      'page down',
      'B',
      'media play pause',
    ]);
  });
});
