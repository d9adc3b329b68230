import { useLayoutEffect, useMemo, useRef, useState } from 'react';
import type { PlannedDay } from '@steepfall/shared/desk';
import type { RecipeDocument } from '@steepfall/shared/sheets';
import { directionDress } from '#components/direction-dress.ts';
import { formatLevel, useUnits } from '#lib/units.ts';
import { spanWords } from '#lib/words.ts';
import { dayEvents } from './day-events.ts';
import { DayTable } from './day-table.tsx';
import { fallLineFrame } from './fall-line-frame.ts';

const HEIGHT = 380;
/** Before it is measured, and where nothing can be measured. */
const FIRST_WIDTH = 640;

interface FallLineProps {
  day: PlannedDay;
  document: RecipeDocument;
}

/** The planned day as weather: it climbs, holds, falls, and at each level stands what happens there. */
export function FallLine({ day, document }: FallLineProps) {
  const units = useUnits();
  const { ref, width } = useWidth();
  const frame = useMemo(() => fallLineFrame(day, document, { width, height: HEIGHT }), [day, document, width]);
  const { plot } = frame;
  const lastS = (day.curve.at(-1)?.atMs ?? 0) / 1000;
  const isHeated = day.marks.some(({ kind }) => kind === 'heat');
  const happenings = dayEvents(day, document).length;
  return (
    <figure className="grid gap-2">
      <div ref={ref} className="min-w-0">
        <svg
          viewBox={`0 0 ${width} ${HEIGHT}`}
          width="100%"
          height={HEIGHT}
          role="img"
          aria-label={`The planned day: ${spanWords(lastS)} from the first heat to the keg, ${happenings} things on the way. The table below has them all.`}
          fill="none"
          fontFamily="inherit"
          className="overflow-visible"
        >
          {frame.levels
            .filter(({ isNamed }) => isNamed)
            .map(({ tempC, y }) => (
              <g key={tempC}>
                <path
                  d={`M${plot.left} ${y}H${plot.right}`}
                  stroke="var(--edge)"
                  strokeWidth="1.25"
                  strokeDasharray="3 8"
                />
                <text
                  x={plot.left - 10}
                  y={y + 5}
                  textAnchor="end"
                  fontSize="16"
                  fontWeight="500"
                  fill="var(--text)"
                  className="tabular-nums"
                >
                  {formatLevel(tempC, units, false)}
                </text>
              </g>
            ))}
          <path d={`M${plot.left} ${plot.bottom}H${plot.right}`} stroke="var(--hair)" strokeWidth="2" />
          {frame.ticks.map(({ atMin, x }) => (
            <g key={atMin}>
              <path d={`M${x} ${plot.bottom}v6`} stroke="var(--edge)" strokeWidth="2" />
              <text
                x={x}
                y={plot.bottom + 24}
                textAnchor={atMin === 0 ? 'start' : x > plot.right - 24 ? 'end' : 'middle'}
                fontSize="15"
                fill="var(--soft)"
                className="tabular-nums"
              >
                {atMin === 0 ? (isHeated ? 'heat on' : 'start') : spanWords(atMin * 60)}
              </text>
            </g>
          ))}
          <text x={plot.left - 10} y={plot.bottom + 24} textAnchor="end" fontSize="15" fill="var(--soft)">
            °{units.temperature}
          </text>
          {frame.stretches.map(({ doing, path }) => (
            <path
              key={doing}
              d={path}
              stroke={directionDress[doing].line}
              strokeWidth="5"
              strokeLinejoin="round"
              strokeLinecap="round"
            />
          ))}
          {frame.labels.map(({ key, leader }) =>
            leader ? <path key={key} d={leader} stroke="var(--text)" strokeWidth="1.5" /> : null,
          )}
          {frame.labels.map(({ key, at }) => (
            <path
              key={key}
              d="M0-7l7 7-7 7-7-7z"
              transform={`translate(${at.x} ${at.y})`}
              fill="var(--ground)"
              stroke="var(--text)"
              strokeWidth="3"
            />
          ))}
          <g
            fontSize="15.5"
            fontWeight="500"
            fill="var(--text)"
            stroke="var(--ground)"
            strokeWidth="5"
            paintOrder="stroke"
          >
            {frame.labels.map(({ key, text, textAt, anchor }) => (
              <text key={key} x={textAt.x} y={textAt.y} textAnchor={anchor}>
                {text}
              </text>
            ))}
          </g>
        </svg>
      </div>
      <NeverWords day={day} />
      <details>
        <summary className="flex min-h-12 w-fit cursor-pointer items-center text-note text-soft underline decoration-hair underline-offset-4 hover:decoration-text">
          The day as a table
        </summary>
        <DayTable day={day} document={document} />
      </details>
    </figure>
  );
}

function NeverWords({ day: { never } }: { day: PlannedDay }) {
  const units = useUnits();
  if (!never) return null;
  const [limit, wanted] = [formatLevel(Math.round(never.limitC * 10) / 10, units), formatLevel(never.wantedC, units)];
  return (
    <p role="status" className="text-body font-medium text-ember">
      {never.stage === 'heat'
        ? `This kettle never reaches ${wanted}: here it settles near ${limit}.`
        : `This chiller never gets down to ${wanted}: it settles near ${limit}.`}
    </p>
  );
}

function useWidth() {
  const ref = useRef<HTMLDivElement>(null);
  const [width, setWidth] = useState(FIRST_WIDTH);
  useLayoutEffect(() => {
    const box = ref.current;
    if (!box || typeof ResizeObserver === 'undefined') return;
    const measure = () => {
      // Hidden it has no width: the last one stays.
      if (box.clientWidth > 0) setWidth(box.clientWidth);
    };
    measure();
    const observer = new ResizeObserver(measure);
    observer.observe(box);
    return () => observer.disconnect();
  }, []);
  return { ref, width };
}
