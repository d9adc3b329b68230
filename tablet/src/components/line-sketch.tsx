import { useId } from 'react';
import { classNames } from './class-names.ts';

export interface SketchPoint {
  x: number;
  y: number;
}

export interface SketchStretch {
  fromX: number;
  toX: number;
  /** A CSS colour. */
  color: string;
}

interface LineSketchProps {
  points: readonly SketchPoint[];
  /** Hue along the line; where none is given it is written in the text colour. */
  stretches?: readonly SketchStretch[];
  /** Heights that are marked by a dashed line. */
  levels?: readonly number[];
  /** Kept free above and below, as a share of the range. */
  padding?: number;
  /** A smaller range is drawn as if it were this: the steps of a probe at rest are no weather. */
  leastSpan?: number;
  strokeWidth?: number;
  /** Marks the end of the line: where it stands now. */
  hasEnd?: boolean;
  className?: string;
}

const WIDTH = 1000;
const HEIGHT = 300;

/** A line as weather: no axes, no numbers. What it says is said in words beside it. */
export function LineSketch({
  points,
  stretches = [],
  levels = [],
  padding = 0.12,
  leastSpan = 0,
  strokeWidth = 6,
  hasEnd,
  className,
}: LineSketchProps) {
  const gradientId = useId();
  const first = points[0];
  const last = points.at(-1);
  if (!first || !last || last.x <= first.x) return null;
  const heights = [...points.map(({ y }) => y), ...levels];
  const range = Math.max(...heights) - Math.min(...heights);
  const span = Math.max(range, leastSpan) || 1;
  const low = Math.min(...heights) - (span - range) / 2;
  const toX = (x: number) => ((x - first.x) / (last.x - first.x)) * WIDTH;
  const toY = (y: number) => HEIGHT * (1 - padding - ((y - low) / span) * (1 - 2 * padding));
  const path = points.map(({ x, y }, i) => `${i === 0 ? 'M' : 'L'}${toX(x).toFixed(1)} ${toY(y).toFixed(1)}`).join('');
  const line = (
    <svg
      viewBox={`0 0 ${WIDTH} ${HEIGHT}`}
      preserveAspectRatio="none"
      className="absolute inset-0 h-full w-full"
      aria-hidden="true"
      fill="none"
    >
      {stretches.length > 0 ? (
        <linearGradient id={gradientId} gradientUnits="userSpaceOnUse" x1="0" x2={WIDTH} y1="0" y2="0">
          {stretches.flatMap(({ fromX, toX: end, color }) => [
            <stop key={`${fromX}a`} offset={toX(fromX) / WIDTH} style={{ stopColor: color }} />,
            <stop key={`${fromX}b`} offset={toX(end) / WIDTH} style={{ stopColor: color }} />,
          ])}
        </linearGradient>
      ) : null}
      {levels.map((level) => (
        <path
          key={level}
          d={`M0 ${toY(level).toFixed(1)}H${WIDTH}`}
          stroke="var(--edge)"
          strokeWidth="1.5"
          strokeDasharray="8 8"
          vectorEffect="non-scaling-stroke"
        />
      ))}
      <path
        d={path}
        stroke={stretches.length > 0 ? `url(#${gradientId})` : 'currentColor'}
        strokeWidth={strokeWidth}
        strokeLinejoin="round"
        vectorEffect="non-scaling-stroke"
      />
    </svg>
  );
  return (
    <div className={classNames('relative', className)} aria-hidden="true">
      {line}
      {hasEnd ? (
        <span
          className="absolute right-0 size-5 translate-x-1/2 -translate-y-1/2 rotate-45 border-4 border-text bg-ground"
          style={{ top: `${(toY(last.y) / HEIGHT) * 100}%` }}
        />
      ) : null}
    </div>
  );
}
