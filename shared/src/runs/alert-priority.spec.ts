import { describe, expect, it } from 'vitest';
import { alertPriority, canShelve, isChattering, isFlood } from './alert-priority.js';

describe(alertPriority, () => {
  it.each([
    ['temperature', 'now', 'prompt', false],
    ['temperature', 'missed', 'medium', false],
    ['timer', 'coming-up', 'prompt', false],
    ['signal', 'now', 'medium', true],
    ['battery', 'now', 'low', true],
  ] as const)('%s at %s is %s', (rule, stage, priority, shelvable) => {
    expect(alertPriority({ rule, stage })).toBe(priority);
    expect(canShelve({ rule })).toBe(shelvable);
  });
});

describe('counting alerts (EEMUA 191, ISA-18.2)', () => {
  it('eleven in ten minutes are a flood, ten are not', () => {
    const spread = (count: number) => Array.from({ length: count }, (_, i) => (i * 600_000) / 11);
    expect(isFlood(spread(11))).toBe(true);
    expect(isFlood(spread(10))).toBe(false);
  });

  it('three in a minute chatter', () => {
    expect(isChattering([0, 20_000, 45_000])).toBe(true);
    expect(isChattering([0, 40_000, 61_000])).toBe(false);
  });
});
