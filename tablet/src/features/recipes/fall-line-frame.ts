import type { PlannedDay } from '@steepfall/shared/desk';
import type { RecipeDocument } from '@steepfall/shared/sheets';
import { dayEvents, eventWords, type DayEvent } from './day-events.ts';

export interface Point {
  x: number;
  y: number;
}

export interface LineStretch {
  doing: 'climbing' | 'holding' | 'falling';
  path: string;
}

export interface LineLabel {
  key: string;
  /** On the line. */
  at: Point;
  text: string;
  textAt: Point;
  anchor: 'start' | 'end';
  /** From the mark to its words, where they stand apart. */
  leader: string | null;
}

export interface LineFrame {
  stretches: LineStretch[];
  labels: LineLabel[];
  /** Temperatures at which something happens. */
  levels: { tempC: number; y: number; isNamed: boolean }[];
  ticks: { atMin: number; x: number }[];
  plot: { left: number; top: number; right: number; bottom: number };
}

const LEFT_PX = 52;
const RIGHT_PX = 14;
const BOTTOM_PX = 34;
/** A day that stays where it is still has some height. */
const LEAST_SPAN_C = 12;
const ROW_PX = 21;
const GAP_PX = 14;
/** Of the type that the words are set in, on average. */
const LETTER_PX = 8.3;
const TICK_STEPS_MIN = [2, 5, 10, 15, 20, 30, 60, 120, 180, 240, 360, 720, 1440];
/** Room for "1 h 30 min" and some air. */
const TICK_PX = 84;

type Part = 'climb' | 'hold' | 'fall';

/** Where the line, its levels and the words at it stand on a drawing of this size. Words never lie on one another. */
export function fallLineFrame(
  day: PlannedDay,
  document: RecipeDocument,
  size: { width: number; height: number },
): LineFrame {
  const { curve } = day;
  const events = dayEvents(day, document).filter(({ kind }) => kind !== 'heat');
  const lastMs = Math.max(60_000, curve.at(-1)?.atMs ?? 0);
  const temps = [...curve.map(({ tempC }) => tempC), document.transferC, ...(day.never ? [day.never.wantedC] : [])];
  const [leastC, mostC] = [Math.min(...temps), Math.max(...temps)];
  const spanC = Math.max(LEAST_SPAN_C, mostC - leastC);
  const lowC = (leastC + mostC - spanC) / 2;

  const parts = partsOf(day);
  const within = (part: Part) => events.filter((event) => partAt(parts, event) === part);
  const flags = within('hold');
  const falls = within('fall');
  const endMs = falls.at(-1)?.atMs;
  const atTheEnd = falls.filter(({ atMs }) => atMs === endMs).length;
  const plot = {
    left: LEFT_PX,
    right: size.width - RIGHT_PX,
    top: 16 + flags.length * ROW_PX,
    bottom: size.height - BOTTOM_PX,
  };
  const lowestY = plot.bottom - GAP_PX - Math.max(0, atTheEnd - 1) * ROW_PX;
  const x = (atMs: number) => plot.left + ((plot.right - plot.left) * atMs) / lastMs;
  const y = (tempC: number) => lowestY - ((lowestY - plot.top) * (tempC - lowC)) / spanC;
  const at = ({ atMs, tempC }: { atMs: number; tempC: number }): Point => ({ x: x(atMs), y: y(tempC) });
  const words = (event: DayEvent) => eventWords(shortened(event, size.width));
  const place = { plot, at, words, curve: curve.map(at) };

  return {
    plot,
    stretches: stretchesOf(curve, parts, at),
    labels: [...climbAndFallLabels(within('climb'), falls, place), ...flagLabels(flags, place)],
    levels: levelsOf(events, day).map((tempC, index, all) => ({
      tempC,
      y: y(tempC),
      isNamed: all.slice(0, index).every((other) => Math.abs(y(other) - y(tempC)) >= ROW_PX - 2),
    })),
    ticks: ticksOf(lastMs, x, Math.max(2, Math.floor((plot.right - plot.left) / TICK_PX))),
  };
}

/** Long names are cut on the drawing; the table has them whole. */
function shortened(event: DayEvent, width: number): DayEvent {
  const most = Math.max(10, Math.floor(width / LETTER_PX / 3 / Math.max(1, Math.min(2, event.names.length))));
  const cut = (name: string) => (name.length > most ? `${name.slice(0, most - 1).trimEnd()}…` : name);
  return { ...event, names: event.names.map(cut) };
}

interface Parts {
  topMs: number;
  chillMs: number;
}

/** Climbs until it is hottest for the first time, holds until the chiller, falls from there on. */
function partsOf({ curve, marks }: PlannedDay): Parts {
  const top = curve.reduce(
    (most, point) => (point.tempC > most.tempC + 0.01 ? point : most),
    curve[0] ?? { atMs: 0, tempC: 0 },
  );
  const chill = marks.find(({ kind }) => kind === 'chill');
  return { topMs: top.atMs, chillMs: chill?.atMs ?? Infinity };
}

/** What happens at the very end of a part belongs to the next: the tea at the top is no longer on the climb. */
function partAt({ topMs, chillMs }: Parts, { atMs, kind }: { atMs: number; kind?: string }): Part {
  if (kind === 'transfer' && chillMs !== Infinity) return 'fall';
  if (atMs < topMs) return 'climb';
  return atMs <= chillMs ? 'hold' : 'fall';
}

const doingOf = { climb: 'climbing', hold: 'holding', fall: 'falling' } as const;

function stretchesOf(
  curve: PlannedDay['curve'],
  { topMs, chillMs }: Parts,
  at: (point: { atMs: number; tempC: number }) => Point,
): LineStretch[] {
  const within: [Part, number, number][] = [
    ['climb', 0, topMs],
    ['hold', topMs, chillMs],
    ['fall', chillMs, Infinity],
  ];
  return within.flatMap(([part, fromMs, toMs]) => {
    const points = curve.filter(({ atMs }) => atMs >= fromMs && atMs <= toMs);
    if (points.length < 2) return [];
    return [{ doing: doingOf[part], path: pathOf(points.map(at)) }];
  });
}

function pathOf(points: readonly Point[]): string {
  return points.map(({ x, y }, index) => `${index === 0 ? 'M' : 'L'}${x.toFixed(1)} ${y.toFixed(1)}`).join('');
}

function levelsOf(events: readonly DayEvent[], { never, curve }: PlannedDay): number[] {
  const topC = Math.max(...curve.map(({ tempC }) => tempC));
  const met = events.filter(({ kind }) => kind !== 'chill').map(({ tempC }) => tempC);
  const rounded = [topC, ...met, ...(never ? [never.wantedC] : [])].map((tempC) => Math.round(tempC * 10) / 10);
  return [...new Set(rounded)].sort((a, b) => b - a);
}

interface Place {
  plot: LineFrame['plot'];
  at: (point: { atMs: number; tempC: number }) => Point;
  curve: readonly Point[];
  words: (event: DayEvent) => string;
}

const widthOf = (text: string) => text.length * LETTER_PX;

/** Where the words of the climb would lie on those of the fall, they are counted in place of told. */
function climbAndFallLabels(climbs: readonly DayEvent[], falls: readonly DayEvent[], place: Place): LineLabel[] {
  const fallen = fallLabels(falls, place);
  const told = climbLabels(climbs, place);
  if (!told.some((one) => fallen.some((other) => isOnTop(one, other)))) return [...told, ...fallen];
  const count = climbs.reduce((sum, { names }) => sum + names.length, 0);
  const [first] = climbs;
  if (!first) return fallen;
  const mark = place.at(first);
  return [label('climb', mark, `${count} in, cold`, { x: mark.x + GAP_PX, y: mark.y + 5 }, 'start'), ...fallen];
}

function isOnTop(one: LineLabel, other: LineLabel): boolean {
  const edges = ({ text, textAt, anchor }: LineLabel) =>
    anchor === 'start' ? [textAt.x, textAt.x + widthOf(text)] : [textAt.x - widthOf(text), textAt.x];
  const [fromA = 0, toA = 0] = edges(one);
  const [fromB = 0, toB = 0] = edges(other);
  return Math.abs(one.textAt.y - other.textAt.y) < ROW_PX - 4 && fromA < toB && fromB < toA;
}

/** On the climb the words stand under the line, one row over the other along its slope. */
function climbLabels(events: readonly DayEvent[], { at, curve, plot, words }: Place): LineLabel[] {
  let row = 0;
  return events.flatMap((event, index) => {
    const mark = at(event);
    const lines =
      event.names.length > 1 ? event.names.map((name) => words({ ...event, names: [name] })) : [words(event)];
    return lines.map((text, line) => {
      const textY = mark.y + 5 - row * ROW_PX;
      const onLine = curve.find(({ y, x }) => y <= textY - 6 && x >= mark.x) ?? mark;
      row += 1;
      const textX = Math.min(onLine.x + GAP_PX, Math.max(plot.left, plot.right - widthOf(text)));
      return label(`climb${index}.${line}`, mark, text, { x: textX, y: textY }, 'start');
    });
  });
}

/** While it holds the words fly above the line: the first one highest, so that no pole crosses them. */
function flagLabels(events: readonly DayEvent[], { at, plot, words }: Place): LineLabel[] {
  return events.map((event, index) => {
    const mark = at(event);
    const text = words(event);
    const textY = mark.y - 12 - (events.length - 1 - index) * ROW_PX;
    const edge = plot.right + RIGHT_PX;
    const fits = mark.x + 8 + widthOf(text) <= edge;
    const textAt = { x: fits ? mark.x + 8 : Math.max(edge, widthOf(text)), y: textY };
    const leader = `M${mark.x} ${mark.y}V${textY - 11}`;
    return label(`hold${index}`, mark, text, textAt, fits ? 'start' : 'end', leader);
  });
}

/** On the fall the words stand at the right of the line where there is room, else under it. */
function fallLabels(events: readonly DayEvent[], { at, plot, words }: Place): LineLabel[] {
  const lastY = { start: -Infinity, end: -Infinity };
  return events.map((event, index) => {
    const mark = at(event);
    const text = words(event);
    const anchor = mark.x + GAP_PX + widthOf(text) <= plot.right + RIGHT_PX ? 'start' : 'end';
    const wantedY = anchor === 'start' ? mark.y + 1 : mark.y + 16;
    const textY = Math.max(wantedY, lastY[anchor] + ROW_PX);
    lastY[anchor] = textY;
    const textX = anchor === 'start' ? mark.x + GAP_PX : Math.max(widthOf(text), mark.x - 8);
    return label(`fall${index}`, mark, text, { x: textX, y: textY }, anchor);
  });
}

function label(
  key: string,
  at: Point,
  text: string,
  textAt: Point,
  anchor: LineLabel['anchor'],
  leader: string | null = null,
): LineLabel {
  return { key, at, text, textAt, anchor, leader };
}

function ticksOf(lastMs: number, x: (atMs: number) => number, most: number): LineFrame['ticks'] {
  const lastMin = lastMs / 60_000;
  const step = TICK_STEPS_MIN.find((each) => lastMin / each <= most) ?? Math.ceil(lastMin / most / 1440) * 1440;
  return Array.from({ length: Math.floor(lastMin / step) + 1 }, (_, index) => ({
    atMin: index * step,
    x: x(index * step * 60_000),
  }));
}
