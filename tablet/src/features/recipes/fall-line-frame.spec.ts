import { plannedDay } from '@steepfall/shared/desk';
import { buildDocument, buildHops, buildTea } from '@steepfall/shared/testing';
import { describe, expect, it } from 'vitest';
import { fallLineFrame } from './fall-line-frame.ts';

const kit = { altitudeM: 0, kettle: null, chiller: { metal: 'stainless', lengthM: 7.6, coolantC: 12 } } as const;
const blend = buildDocument({
  additions: [
    buildTea(),
    buildTea({ id: 'bancha', name: 'bancha', out: { at: 'timer', durationS: 240 } }),
    buildHops(),
    buildHops({ id: 'saaz', name: 'Saaz', in: { at: 'falling', tempC: 61 } }),
  ],
});

function frameOf(document: typeof blend, width: number) {
  return fallLineFrame(plannedDay(document, kit), document, { width, height: 380 });
}

describe(fallLineFrame, () => {
  it('has every addition on the line, in and out', () => {
    const words = frameOf(blend, 1000).labels.map(({ text }) => text);
    expect(words).toEqual(
      expect.arrayContaining([
        'sencha, bancha in',
        'sencha out',
        'bancha out',
        'Cascade in',
        'Saaz in',
        'Cascade, Saaz out',
        'into the keg',
      ]),
    );
  });

  it.each([320, 640, 1000])('keeps words apart from one another at %i px', (width) => {
    const { labels } = frameOf(blend, width);
    for (const [index, one] of labels.entries()) {
      for (const other of labels.slice(index + 1)) {
        if (one.anchor !== other.anchor) continue;
        expect(Math.abs(one.textAt.y - other.textAt.y)).toBeGreaterThanOrEqual(20);
      }
    }
  });

  it('counts what goes in cold where there is no room for its names', () => {
    const salts = ['calcium chloride', 'gypsum', 'magnesium chloride', 'table salt', 'baking soda'].map(
      (name) =>
        ({ id: name, name, kind: 'salt', salt: 'gypsum', massG: 1, keeps: 'mass', in: { at: 'fill' } }) as const,
    );
    const many = { ...blend, additions: [...salts, ...blend.additions] };
    expect(frameOf(many, 1200).labels.map(({ text }) => text)).toContain('gypsum in');
    expect(frameOf(many, 300).labels.map(({ text }) => text)).toContain('5 in, cold');
  });

  it('climbs, holds and falls', () => {
    expect(frameOf(blend, 640).stretches.map(({ doing }) => doing)).toEqual(['climbing', 'holding', 'falling']);
  });

  it('stays on the drawing when the kettle never gets so hot', () => {
    const high = plannedDay({ ...blend, steepC: 99 }, { ...kit, altitudeM: 3000 });
    expect(high.never?.stage).toBe('heat');
    const { levels } = fallLineFrame(high, { ...blend, steepC: 99 }, { width: 640, height: 380 });
    expect(levels.every(({ y }) => y >= 0 && y <= 380)).toBe(true);
    expect(levels.some(({ tempC }) => tempC === 99)).toBe(true);
  });
});
