import { useEffect, useRef, useState } from 'react';
import { formatRate, formatTemp } from '@steepfall/shared/units';
import { forecastCurve } from '@steepfall/shared/watch';
import type { RunState } from '@steepfall/shared/runs';
import { ShapeGlyph } from '#components/shapes.tsx';
import { useLive, useRunState, useRunStore } from '#lib/run-store/run-context.tsx';
import type { RunStore } from '#lib/run-store/run-store.ts';
import { useGround } from '#lib/theme.ts';
import { formatLevel, useUnits } from '#lib/units.ts';
import { fallFrame, levelMarks, strokesOf, type Doing, type LevelMark } from './fall-frame.ts';
import { levelsInSight, levelsOf } from './levels.ts';
import { forecastText } from './sheet-words.ts';

const GAP_MS = 30_000;
/** Three times the pixels on a fine screen are nine times the work; two is enough for a line. */
const FINEST_RATIO = 2;
const TABLE_ROWS = 16;

const hueOf: Record<Doing, string> = { climbing: '--copper-line', holding: '--leaf-line', falling: '--tarn-line' };

interface Picture {
  marks: LevelMark[];
  nowX: number;
  pastMin: number;
  aheadMin: number;
}

function draw(canvas: HTMLCanvasElement, store: RunStore, state: RunState): Picture | null {
  const width = canvas.clientWidth;
  const height = canvas.clientHeight;
  const pen = canvas.getContext('2d');
  if (!pen || width === 0 || height === 0) return null;
  const ratio = Math.min(FINEST_RATIO, devicePixelRatio || 1);
  if (canvas.width !== Math.round(width * ratio)) canvas.width = Math.round(width * ratio);
  if (canvas.height !== Math.round(height * ratio)) canvas.height = Math.round(height * ratio);
  pen.setTransform(ratio, 0, 0, ratio, 0, 0);
  pen.clearRect(0, 0, width, height);
  pen.lineCap = 'round';
  pen.lineJoin = 'round';
  const style = getComputedStyle(canvas);
  const hue = (name: string) => style.getPropertyValue(name);

  const { nowMs, view } = store.live.get();
  const readings = store.readings.all;
  const forecast = view?.forecast ?? null;
  const crossingAtMs = forecast?.kind === 'forecast' || forecast?.kind === 'crossed' ? forecast.atMs : null;
  const isLive = view?.estimate.status === 'live';
  const { watch } = store;
  const curve = watch && isLive ? forecastCurve(watch, nowMs, 15 * 60, 15) : [];
  const target = view?.target ?? null;
  const levels = levelsInSight(levelsOf(state), target?.stepId ?? null);
  const frame = fallFrame({ width, height, nowMs, readings, target, crossingAtMs, curve, levels });
  const next = target ? { key: target.stepId, crossingAtMs, about: forecastText(forecast, nowMs) } : null;
  const marks = levelMarks(levels, frame, { width, height }, next);

  pen.lineWidth = 2;
  pen.setLineDash([3, 9]);
  for (const { y, key } of marks) {
    pen.strokeStyle = hue(key === next?.key ? '--text' : '--edge');
    pen.beginPath();
    pen.moveTo(52, y);
    pen.lineTo(width, y);
    pen.stroke();
  }
  pen.setLineDash([]);

  const nowX = frame.x(nowMs);
  const shownCurve = curve.filter(({ atMs }) => atMs <= frame.toMs);
  if (shownCurve.length > 1 && view) {
    pen.fillStyle = hue(hueOf[view.estimate.mode]);
    pen.globalAlpha = 0.36;
    pen.beginPath();
    shownCurve.forEach(({ atMs, highC }, i) =>
      (i === 0 ? pen.moveTo : pen.lineTo).call(pen, frame.x(atMs), frame.y(highC)),
    );
    for (const { atMs, lowC } of shownCurve.toReversed()) pen.lineTo(frame.x(atMs), frame.y(lowC));
    pen.fill();
    pen.globalAlpha = 0.8;
    pen.lineWidth = 2;
    pen.setLineDash([6, 7]);
    pen.strokeStyle = hue(hueOf[view.estimate.mode]);
    pen.beginPath();
    shownCurve.forEach(({ atMs, tempC }, i) =>
      (i === 0 ? pen.moveTo : pen.lineTo).call(pen, frame.x(atMs), frame.y(tempC)),
    );
    pen.stroke();
    pen.setLineDash([]);
    pen.globalAlpha = 1;
  }

  pen.lineWidth = 4;
  for (const { doing, points } of strokesOf(readings, frame, GAP_MS)) {
    pen.strokeStyle = hue(hueOf[doing]);
    pen.beginPath();
    points.forEach(({ x, y }, i) => (i === 0 ? pen.moveTo : pen.lineTo).call(pen, x, y));
    pen.stroke();
  }

  const tempC = view?.estimate.tempC ?? null;
  if (isLive && tempC !== null) {
    pen.fillStyle = hue('--text');
    pen.beginPath();
    pen.arc(nowX, frame.y(tempC), 7, 0, 2 * Math.PI);
    pen.fill();
  }
  return {
    marks,
    nowX,
    pastMin: (nowMs - frame.fromMs) / 60_000,
    aheadMin: (frame.toMs - nowMs) / 60_000,
  };
}

function isSamePicture(a: Picture | null, b: Picture | null): boolean {
  if (!a || !b || a.marks.length !== b.marks.length || Math.abs(a.nowX - b.nowX) > 1) return a === b;
  if (a.pastMin !== b.pastMin || a.aheadMin !== b.aheadMin) return false;
  return a.marks.every((mark, i) => {
    const other = b.marks[i]!;
    const isNear = Math.abs(mark.x - other.x) <= 1 && Math.abs(mark.y - other.y) <= 1;
    return (
      mark.key === other.key &&
      mark.label === other.label &&
      Math.abs(mark.labelX - other.labelX) <= 1 &&
      mark.isDone === other.isDone &&
      isNear
    );
  });
}

/** The last quarter of an hour as a line, what is to come as a wedge, and the levels with what they ask for. */
export function FallLine() {
  const store = useRunStore();
  const state = useRunState();
  const ground = useGround();
  const canvas = useRef<HTMLCanvasElement>(null);
  const [picture, setPicture] = useState<Picture | null>(null);

  useEffect(() => {
    const element = canvas.current;
    if (!element) return undefined;
    let frame = 0;
    const paint = () => {
      frame = 0;
      const next = draw(element, store, store.snapshot.get().state);
      setPicture((before) => (isSamePicture(before, next) ? before : next));
    };
    const plan = () => {
      if (frame === 0 && document.visibilityState === 'visible') frame = requestAnimationFrame(paint);
    };
    const stop = store.live.subscribe(plan);
    const watchSize = new ResizeObserver(plan);
    watchSize.observe(element);
    plan();
    return () => {
      stop();
      watchSize.disconnect();
      cancelAnimationFrame(frame);
    };
  }, [store, state, ground]);

  return (
    <figure className="fall-line" aria-label="Fall line">
      <figcaption className="sr-only">
        <FallSummary />
      </figcaption>
      <canvas ref={canvas} aria-hidden="true" />
      <div className="fall-labels" aria-hidden="true">
        {picture?.marks.map((mark) => (
          <LevelLabel key={mark.key} mark={mark} />
        ))}
        {picture ? (
          <>
            <span className="fall-time" style={{ left: 0 }}>
              {Math.round(picture.pastMin)} min ago
            </span>
            <span className="fall-time" style={{ left: picture.nowX, transform: 'translateX(-50%)' }}>
              now
            </span>
            <span className="fall-time" style={{ right: 0 }}>
              in {Math.round(picture.aheadMin)} min
            </span>
          </>
        ) : null}
      </div>
      <FallTable />
    </figure>
  );
}

function LevelLabel({ mark: { x, y, label, labelX, isBelow, isDone, tempC } }: { mark: LevelMark }) {
  const units = useUnits();
  return (
    <>
      <span className="fall-level" style={{ top: y }}>
        {formatLevel(tempC, units, false)}
      </span>
      <span className="fall-mark" data-done={isDone || undefined} style={{ top: y, left: x }}>
        <ShapeGlyph shape="diamond" className="size-5" />
      </span>
      <span className="fall-what" data-below={isBelow || undefined} style={{ top: y, left: labelX }}>
        {label}
      </span>
    </>
  );
}

/** The picture in a sentence. */
function FallSummary() {
  const units = useUnits();
  const unit = units.temperature;
  const text = useLive(({ view, nowMs }) => {
    if (!view) return 'No reading yet.';
    const { estimate, target, forecast } = view;
    if (estimate.status !== 'live') return 'No reading comes in.';
    const rate =
      estimate.mode === 'holding' ? 'holding' : `${estimate.mode} ${formatRate(estimate.rateCPerMin, { unit })}`;
    const soon = target
      ? ` ${formatLevel(target.tempC, units)}, ${target.direction}: ${forecastText(forecast, nowMs) ?? 'no forecast yet'}.`
      : '';
    return `${formatTemp(estimate.tempC, { unit })}, ${rate}.${soon}`;
  });
  return text;
}

/** One row a minute, for those who cannot see the line. */
function FallTable() {
  const { temperature } = useUnits();
  const store = useRunStore();
  const minute = useLive(({ nowMs }) => Math.floor(nowMs / 60_000));
  const rows: { agoMin: number; tempC: number }[] = [];
  for (let agoMin = 0; agoMin < TABLE_ROWS; agoMin += 1) {
    const untilMs = (minute + 1 - agoMin) * 60_000;
    const reading = store.readings.all.findLast(
      ({ atMs, tempC }) => atMs < untilMs && atMs >= untilMs - 60_000 && tempC !== null,
    );
    if (reading?.tempC != null) rows.push({ agoMin, tempC: reading.tempC });
  }
  return (
    <table className="sr-only">
      <caption>Temperature of the last quarter of an hour</caption>
      <thead>
        <tr>
          <th scope="col">Minutes ago</th>
          <th scope="col">Temperature</th>
        </tr>
      </thead>
      <tbody>
        {rows.map(({ agoMin, tempC }) => (
          <tr key={agoMin}>
            <td>{agoMin}</td>
            <td>{formatTemp(tempC, { unit: temperature })}</td>
          </tr>
        ))}
      </tbody>
    </table>
  );
}
