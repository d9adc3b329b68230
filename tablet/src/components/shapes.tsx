import type { ReactNode } from 'react';

/**
 * What a thing is doing, told by shape as well as by hue: up-slant, flat, down-slant, filled diamond; dot and ring for on and off; a broken
 * square for what does not work.
 */
export type Shape = 'up' | 'flat' | 'down' | 'diamond' | 'dot' | 'ring' | 'dash' | 'broken';
export type Tone = 'copper' | 'leaf' | 'tarn' | 'ember' | 'text' | 'soft';

export const toneText: Record<Tone, string> = {
  copper: 'text-copper',
  leaf: 'text-leaf',
  tarn: 'text-tarn',
  ember: 'text-ember',
  text: 'text-text',
  soft: 'text-soft',
};

const paths: Record<Shape, ReactNode> = {
  up: <path d="M2 17 18 3" />,
  flat: <path d="M2 10h16" />,
  down: <path d="M2 3l16 14" />,
  diamond: <path d="M10 1.5l8.5 8.5-8.5 8.5L1.5 10z" fill="currentColor" stroke="none" />,
  dot: <circle cx="10" cy="10" r="6.5" fill="currentColor" stroke="none" />,
  ring: <circle cx="10" cy="10" r="6" />,
  broken: <path d="M8 2.5H2.5v15H8M12 17.5h5.5v-15H12M7 13l6-6" />,
  dash: <path d="M2 10h4M14 10h4" />,
};

export function ShapeGlyph({ shape, className = 'size-[0.8em]' }: { shape: Shape; className?: string }) {
  return (
    <svg
      viewBox="0 0 20 20"
      className={className}
      aria-hidden="true"
      fill="none"
      stroke="currentColor"
      strokeWidth="3.2"
      strokeLinecap="square"
    >
      {paths[shape]}
    </svg>
  );
}
