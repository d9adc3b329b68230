import type { ReactNode } from 'react';
import { classNames } from './class-names.ts';
import { ShapeGlyph, toneText, type Shape, type Tone } from './shapes.tsx';

/** A state in a word, with a shape that says the same. */
export function StatusChip({
  shape,
  tone = 'text',
  children,
  className,
}: {
  shape: Shape;
  tone?: Tone;
  children: ReactNode;
  className?: string;
}) {
  return (
    <span
      className={classNames('inline-flex items-center gap-2 whitespace-nowrap font-medium', toneText[tone], className)}
    >
      <ShapeGlyph shape={shape} />
      {children}
    </span>
  );
}
