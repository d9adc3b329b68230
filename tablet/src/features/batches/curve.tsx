import { useEffect, useMemo, useRef, useState } from 'react';
import {
  celsiusToFahrenheit,
  fahrenheitToCelsius,
  formatTemp,
  inUnit,
  kelvinToFahrenheitDegrees,
} from '@steepfall/shared/units';
import uPlot from 'uplot';
import 'uplot/dist/uPlot.min.css';
import { directionDress } from '#components/direction-dress.ts';
import type { LinePoint, Stretch } from '#lib/liquid-line.ts';
import { useGround } from '#lib/theme.ts';
import { useUnits } from '#lib/units.ts';
import { clockTime } from '#lib/words.ts';
import { footnotesOf, layoutFlags, PENNANT_PX, type Flag, type PlacedFlag } from './flag-layout.ts';

export interface Level {
  tempC: number;
  title: string;
}

interface CurveProps {
  line: readonly LinePoint[];
  stretches: readonly Stretch[];
  levels: readonly Level[];
  flags: readonly Flag[];
  /** The part of the run that is shown. */
  fromMs: number;
  toMs: number;
  /** A part of the run: the height then follows the line, not the levels. */
  isClose: boolean;
}

interface Geometry {
  left: number;
  top: number;
  width: number;
  height: number;
  minC: number;
  maxC: number;
}

const LANE_PX = 30;
const MOST_LANES = 5;
const NARROW_PX = 620;
const LETTER_PX = 8.4;
const LABEL_INSET_PX = 6;
const LABEL_STRIDE_PX = 8;

function cssColor(name: string): string {
  return getComputedStyle(document.documentElement).getPropertyValue(name).trim();
}

function hueAlong(stretches: readonly Stretch[]) {
  return (plot: uPlot): string | CanvasGradient => {
    const { left, width } = plot.bbox;
    if (!(width > 0) || stretches.length === 0) return cssColor('--text');
    const gradient = plot.ctx.createLinearGradient(left, 0, left + width, 0);
    const share = (atMs: number) => Math.min(1, Math.max(0, (plot.valToPos(atMs, 'x', true) - left) / width));
    for (const { doing, fromMs, toMs } of stretches) {
      const color = cssColor(directionDress[doing].line.slice(4, -1));
      gradient.addColorStop(share(fromMs), color);
      gradient.addColorStop(share(toMs), color);
    }
    return gradient;
  };
}

/** The whole run shows every level; a closer look shows what the line does there. */
function rangeOf({ line, levels, fromMs, toMs, isClose }: Omit<CurveProps, 'flags' | 'stretches'>) {
  const seen = line.filter(({ atMs }) => atMs >= fromMs && atMs <= toMs).map(({ tempC }) => tempC);
  const shown = isClose ? seen : [...seen, ...levels.map(({ tempC }) => tempC)];
  const low = Math.min(...shown);
  const high = Math.max(...shown);
  const margin = Math.max(1, (high - low) * 0.06);
  return { low: low - margin, high: high + margin };
}

const STEPS_F = [1, 2, 5, 10, 20, 50, 100];

/** The lines of the axis lie on round numbers of the person's unit, about as far apart as uPlot would have them. */
function fahrenheitSplits(_plot: uPlot, _axis: number, lowC: number, highC: number, stepC: number): number[] {
  const step = STEPS_F.find((choice) => choice >= kelvinToFahrenheitDegrees(stepC)) ?? 100;
  const first = Math.ceil(celsiusToFahrenheit(lowC) / step);
  const last = Math.floor(celsiusToFahrenheit(highC) / step);
  return Array.from({ length: Math.max(0, last - first + 1) }, (_, i) => fahrenheitToCelsius((first + i) * step));
}

function temperatureAt(line: readonly LinePoint[], atMs: number): number | null {
  const index = line.findIndex((point) => point.atMs >= atMs);
  if (index < 0) return line.at(-1)?.tempC ?? null;
  const after = line[index]!;
  const before = line[index - 1] ?? after;
  const span = after.atMs - before.atMs;
  return span <= 0 ? after.tempC : before.tempC + ((after.tempC - before.tempC) * (atMs - before.atMs)) / span;
}

/** A climbing line leaves the lower right of a spot free, a falling one the upper right. */
function isClimbing(line: readonly LinePoint[], atMs: number): boolean {
  const before = temperatureAt(line, atMs - 30_000);
  const after = temperatureAt(line, atMs + 30_000);
  return before !== null && after !== null && after >= before;
}

/** The recorded line with its levels, and what happened on it as flags. The drawing only: its words and its table stand beside it. */
export function Curve({ line, stretches, levels, flags, fromMs, toMs, isClose }: CurveProps) {
  const host = useRef<HTMLDivElement>(null);
  const readout = useRef<HTMLParagraphElement>(null);
  const [geometry, setGeometry] = useState<Geometry | null>(null);
  const ground = useGround();
  const { temperature: unit } = useUnits();
  const lanes = Math.min(MOST_LANES, flags.length);

  useEffect(() => {
    const element = host.current;
    if (!element) return;
    const size = () => ({ width: element.clientWidth, height: element.clientHeight });
    const { low, high } = rangeOf({ line, levels, fromMs, toMs, isClose });
    const axis: uPlot.Axis = {
      stroke: cssColor('--soft'),
      font: "15px 'Space Grotesk Variable', 'Space Grotesk Fallback', sans-serif",
      ticks: { show: false },
    };
    const options: uPlot.Options = {
      ...size(),
      ms: 1,
      padding: [lanes * LANE_PX + 12, 12, 0, 0],
      legend: { show: false },
      cursor: { drag: { x: false, y: false }, y: false, points: { size: 12 } },
      scales: {
        x: { time: true, range: [fromMs, toMs] },
        y: { range: [low, high] },
      },
      series: [{}, { stroke: hueAlong(stretches), width: 4, points: { show: false }, spanGaps: false }],
      axes: [
        { ...axis, grid: { show: false }, space: 90, values: (_plot, splits) => splits.map((atMs) => clockTime(atMs)) },
        {
          ...axis,
          grid: { stroke: cssColor('--hair'), width: 1 },
          size: 52,
          ...(unit === 'F' ? { splits: fahrenheitSplits } : {}),
          values: (_plot, splits) => splits.map((tempC) => `${Number(inUnit('temperature', tempC, unit).toFixed(1))}°`),
        },
      ],
      hooks: {
        draw: [
          (plot) => {
            const ratio = plot.bbox.width / plot.over.clientWidth || 1;
            const next: Geometry = {
              left: plot.bbox.left / ratio,
              top: plot.bbox.top / ratio,
              width: plot.over.clientWidth,
              height: plot.over.clientHeight,
              minC: plot.scales['y']?.min ?? 0,
              maxC: plot.scales['y']?.max ?? 1,
            };
            setGeometry((known) => (JSON.stringify(known) === JSON.stringify(next) ? known : next));
          },
        ],
        setCursor: [
          (plot) => {
            if (!readout.current) return;
            const index = plot.cursor.idx;
            const point = index === null || index === undefined ? undefined : line[index];
            readout.current.textContent = point ? `${clockTime(point.atMs)}  ${formatTemp(point.tempC, { unit })}` : '';
          },
        ],
      },
    };
    const data: uPlot.AlignedData = [line.map(({ atMs }) => atMs), line.map(({ tempC }) => tempC)];
    const plot = new uPlot(options, data, element);
    const observer = new ResizeObserver(() => plot.setSize(size()));
    observer.observe(element);
    return () => {
      observer.disconnect();
      plot.destroy();
    };
  }, [line, stretches, levels, fromMs, toMs, isClose, lanes, ground, unit]);

  return (
    <div className="relative" aria-hidden="true">
      <div ref={host} className="h-[26rem] w-full sm:h-[32rem]" />
      <p ref={readout} className="absolute right-3 top-0 whitespace-pre text-body font-medium tabular-nums" />
      {geometry ? <Overlay {...{ geometry, line, levels, flags, fromMs, toMs, lanes }} /> : null}
    </div>
  );
}

function Overlay({
  geometry,
  line,
  levels,
  flags,
  fromMs,
  toMs,
  lanes,
}: Omit<CurveProps, 'stretches' | 'isClose'> & { geometry: Geometry; lanes: number }) {
  const { left, top, width, height, minC, maxC } = geometry;
  const { temperature: unit } = useUnits();
  const isNarrow = width < NARROW_PX;
  const levelsInSight = levels.filter(({ tempC }) => tempC >= minC && tempC <= maxC);
  const xOf = (atMs: number) => ((atMs - fromMs) / (toMs - fromMs)) * width;
  const yOf = (tempC: number) => height * (1 - (tempC - minC) / (maxC - minC));
  const placed = useMemo(
    () => layoutFlags(flags, { width, lanes, hasLabels: !isNarrow, xOf }),
    // eslint-disable-next-line react-hooks/exhaustive-deps -- xOf follows from the others
    [flags, width, lanes, isNarrow, fromMs, toMs],
  );
  const footOf = ({ atMs }: Flag): number | null => {
    const tempC = temperatureAt(line, atMs);
    return tempC === null ? null : yOf(tempC);
  };
  /** Whether line, poles and spots leave this part of the drawing free. */
  const isFree = (from: number, to: number, upper: number, lower: number) =>
    !line.some((point) => {
      const x = xOf(point.atMs);
      const y = yOf(point.tempC);
      return x >= from && x <= to && y >= upper && y <= lower;
    }) &&
    !placed.some((flag) => {
      const bottom = (footOf(flag) ?? height) + 8;
      const isPole = flag.lane !== null && bottom >= upper;
      const isSpot = bottom - 16 <= lower && bottom >= upper;
      return flag.x >= from - 6 && flag.x <= to + 6 && (isPole || isSpot);
    });
  /** At the right end of the level, or where the first free place is from there; its number alone if there is none for the words. */
  const labelOf = ({ tempC, title }: Level): { text: string; endX: number } => {
    const number = formatTemp(tempC, { unit });
    const [upper, lower] = [yOf(tempC) - 24, yOf(tempC) - 2];
    for (const text of isNarrow ? [number] : [`${title} ${number}`, number]) {
      const px = text.length * LETTER_PX;
      for (let endX = width - LABEL_INSET_PX; endX - px >= LABEL_INSET_PX; endX -= LABEL_STRIDE_PX) {
        if (isFree(endX - px, endX, upper, lower)) return { text, endX };
      }
    }
    return { text: number, endX: width - LABEL_INSET_PX };
  };
  return (
    <svg className="pointer-events-none absolute inset-0 h-full w-full overflow-visible" fontFamily="inherit">
      <g transform={`translate(${left} ${top})`}>
        {levelsInSight.map(({ tempC, title }) => (
          <path
            key={`${tempC}${title}`}
            d={`M0 ${yOf(tempC)}H${width}`}
            stroke="var(--edge)"
            strokeWidth="1.5"
            strokeDasharray="8 8"
          />
        ))}
        {placed.map((flag) => {
          const footY = footOf(flag);
          return (
            <g key={flag.id} transform={`translate(${flag.x} 0)`}>
              {flag.lane === null ? null : <Pennant flag={flag} rise={flag.lane - lanes} footY={footY ?? height} />}
              {footY === null ? null : (
                <path
                  d={flag.isVital ? 'M0-8l8 8-8 8-8-8z' : 'M0-5l5 5-5 5-5-5z'}
                  transform={`translate(0 ${footY})`}
                  fill="var(--ground)"
                  stroke="var(--text)"
                  strokeWidth="2.5"
                />
              )}
            </g>
          );
        })}
        {footnotesOf(placed).map(({ id, numbers, flags: noted }) => {
          const first = noted[0]!;
          const last = noted.at(-1)!;
          const isLeft = last.x + 12 + numbers.length * LETTER_PX > width;
          const footY = footOf(isLeft ? first : last);
          return footY === null ? null : (
            <text
              key={id}
              x={isLeft ? first.x - 10 : last.x + 10}
              y={footY + (isClimbing(line, last.atMs) === isLeft ? -6 : 18)}
              textAnchor={isLeft ? 'end' : 'start'}
              fontSize="14"
              fontWeight="600"
              fill="var(--text)"
              stroke="var(--ground)"
              strokeWidth="4"
              paintOrder="stroke"
            >
              {numbers}
            </text>
          );
        })}
        {levelsInSight.map((level) => {
          const { text, endX } = labelOf(level);
          return (
            <text
              key={`${level.tempC}${level.title}`}
              x={endX}
              y={yOf(level.tempC) - 7}
              textAnchor="end"
              fontSize="15"
              fill="var(--soft)"
              stroke="var(--ground)"
              strokeWidth="6"
              paintOrder="stroke"
            >
              {text}
            </text>
          );
        })}
      </g>
    </svg>
  );
}

function Pennant({ flag, rise, footY }: { flag: PlacedFlag; rise: number; footY: number }) {
  const y = rise * LANE_PX;
  const side = flag.isLeftward ? -1 : 1;
  return (
    <>
      <path d={`M0 ${y}V${footY}`} stroke="var(--text)" strokeWidth="1.5" opacity="0.5" />
      <path
        d={`M0 0H${PENNANT_PX - 5}l5 11-5 11H0z`}
        fill="var(--text)"
        transform={`translate(0 ${y}) scale(${side} 1)`}
      />
      <text x={side * 13} y={y + 16} textAnchor="middle" fontSize="14" fontWeight="600" fill="var(--ground)">
        {flag.number}
      </text>
      {flag.hasLabel ? (
        <text
          x={side * (PENNANT_PX + 5)}
          y={y + 16}
          textAnchor={flag.isLeftward ? 'end' : 'start'}
          fontSize="15"
          fontWeight={flag.isVital ? 600 : 400}
          fill="var(--text)"
        >
          {flag.title}
        </text>
      ) : null}
    </>
  );
}
