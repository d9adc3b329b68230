import type { Shape, Tone } from './shapes.tsx';

/** A direction of travel: its word, its shape, its hue. One place, so that no screen tells it differently. */
export const directionDress = {
  climbing: { word: 'climbing', shape: 'up', tone: 'copper', line: 'var(--copper-line)' },
  holding: { word: 'holding', shape: 'flat', tone: 'leaf', line: 'var(--leaf-line)' },
  falling: { word: 'falling', shape: 'down', tone: 'tarn', line: 'var(--tarn-line)' },
} as const satisfies Record<string, { word: string; shape: Shape; tone: Tone; line: string }>;
