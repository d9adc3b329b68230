import { contrastRatio } from '@steepfall/shared/figures';
import { describe, expect, it } from 'vitest';
import styles from './styles.css?raw';

type Ground = 'day' | 'night' | 'alert';

function paletteOf(ground: Ground): Map<string, string> {
  const opening = ground === 'alert' ? 'main\\[data-alert\\]' : `\\[data-ground='${ground}'\\]`;
  const block = new RegExp(`${opening} \\{([^}]*)\\}`).exec(styles)?.[1] ?? '';
  return new Map([...block.matchAll(/--([\w-]+): (#[0-9a-f]{6});/g)].map(([, name = '', value = '']) => [name, value]));
}

const fills = new Map(
  [...styles.matchAll(/--color-(\w+-fill): (#[0-9a-f]{6});/g)].map(([, name = '', v = '']) => [name, v]),
);
const hues = ['copper', 'leaf', 'tarn', 'ember'];

describe.each<Ground>(['day', 'night', 'alert'])('the %s ground', (ground) => {
  const palette = paletteOf(ground);
  const color = (name: string) => palette.get(name) ?? `${name} is missing`;
  const least = (name: string) =>
    Math.min(...['ground', 'raised', 'sunken'].map((under) => contrastRatio(color(name), color(under))));

  it.each(['text', 'soft', ...hues])('carries %s as text (WCAG 2.2 AA, 4.5:1)', (name) => {
    expect(least(name)).toBeGreaterThanOrEqual(4.5);
  });

  it.each(['text', ...hues.map((hue) => `${hue}-strong`)])('carries %s as a large figure (7:1)', (name) => {
    expect(least(name)).toBeGreaterThanOrEqual(7);
  });

  it.each(['edge', ...hues.map((hue) => `${hue}-line`)])('shows %s as a shape (3:1)', (name) => {
    expect(least(name)).toBeGreaterThanOrEqual(3);
  });
});

describe('the fills', () => {
  it.each(hues.map((hue) => `${hue}-fill`))('%s is written on (6:1, on any ground)', (name) => {
    expect(contrastRatio(fills.get(name) ?? '', '#fffaf1')).toBeGreaterThanOrEqual(6);
  });
});
