import { useMemo } from 'react';
import { directionDress } from '#components/direction-dress.ts';
import { LineSketch } from '#components/line-sketch.tsx';
import { stretchesOf, type LinePoint } from '#lib/liquid-line.ts';

interface LiquidSketchProps {
  line: readonly LinePoint[];
  levels?: readonly number[];
  hasEnd?: boolean;
  className?: string;
}

/** The recorded line, drawn without numbers. */
export function LiquidSketch({ line, levels = [], hasEnd = false, className = '' }: LiquidSketchProps) {
  const points = useMemo(() => line.map(({ atMs, tempC }) => ({ x: atMs, y: tempC })), [line]);
  const stretches = useMemo(
    () =>
      stretchesOf(line).map(({ doing, fromMs, toMs }) => ({
        fromX: fromMs,
        toX: toMs,
        color: directionDress[doing].line,
      })),
    [line],
  );
  return <LineSketch points={points} stretches={stretches} levels={levels} hasEnd={hasEnd} className={className} />;
}
