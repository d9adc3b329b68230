export interface Flag {
  id: string;
  /** The number on the pennant; the log shows the same one. */
  number: number;
  title: string;
  atMs: number;
  /** Labelled before others when there is little room. */
  isVital: boolean;
}

export interface PlacedFlag extends Flag {
  x: number;
  /** Counted from the top; `null` when there was no room, and the number stands at the spot on the line. */
  lane: number | null;
  hasLabel: boolean;
  /** The flag flies to the left of its pole: the right edge is near. */
  isLeftward: boolean;
}

interface Room {
  width: number;
  lanes: number;
  /** False on a phone: numbers only. */
  hasLabels: boolean;
  xOf: (atMs: number) => number;
}

export const PENNANT_PX = 30;
const LETTER_PX = 8.4;
const GAP_PX = 12;

interface Taken {
  lane: number;
  poleX: number;
  from: number;
  to: number;
}

/**
 * Gives each flag a lane in which it covers no other, and no pole runs through a label. Vital ones choose first; what finds no
 * room for its words shows its number, and what finds none for that is numbered on the line.
 */
export function layoutFlags(flags: readonly Flag[], room: Room): PlacedFlag[] {
  const taken: Taken[] = [];
  const placed = flags
    .map((flag) => ({ ...flag, x: room.xOf(flag.atMs) }))
    .filter(({ x }) => x >= 0 && x <= room.width)
    .sort((a, b) => Number(b.isVital) - Number(a.isVital) || a.x - b.x)
    .map((flag) => {
      const labelPx = PENNANT_PX + flag.title.length * LETTER_PX + GAP_PX;
      const withLabel = room.hasLabels ? fit(flag.x, labelPx, room, taken) : null;
      const spot = withLabel ?? fit(flag.x, PENNANT_PX, room, taken);
      if (spot) taken.push(spot);
      return {
        ...flag,
        lane: spot?.lane ?? null,
        hasLabel: withLabel !== null,
        isLeftward: spot !== null && spot.from < flag.x - 1,
      };
    });
  return placed.sort((a, b) => a.x - b.x);
}

function fit(x: number, width: number, { lanes, width: roomPx }: Room, taken: readonly Taken[]): Taken | null {
  const spans = [
    { from: x, to: x + width },
    { from: x - width, to: x },
  ].filter(({ from, to }) => from >= -1 && to <= roomPx + GAP_PX);
  for (let lane = 0; lane < lanes; lane += 1) {
    const span = spans.find(({ from, to }) => taken.every((other) => isClear({ lane, poleX: x, from, to }, other)));
    if (span) return { lane, poleX: x, ...span };
  }
  return null;
}

function isClear(flag: Taken, other: Taken): boolean {
  if (flag.lane === other.lane) return flag.to <= other.from || flag.from >= other.to;
  // The pole of the upper one runs down past the lower one.
  const [upper, lower] = flag.lane < other.lane ? [flag, other] : [other, flag];
  return upper.poleX <= lower.from || upper.poleX >= lower.to;
}

export interface Footnote {
  id: string;
  /** "6", "6–7" or "6, 9". */
  numbers: string;
  /** Those it numbers, from left to right. */
  flags: PlacedFlag[];
}

/** As near as this, two numbers beside their spots would overprint. */
const TOGETHER_PX = 34;

/** The numbers of the flags that no lane had room for: those that stand close together share one. */
export function footnotesOf(placed: readonly PlacedFlag[]): Footnote[] {
  const groups: PlacedFlag[][] = [];
  for (const flag of placed) {
    if (flag.lane !== null) continue;
    const group = groups.at(-1);
    if (group && flag.x - group.at(-1)!.x < TOGETHER_PX) group.push(flag);
    else groups.push([flag]);
  }
  return groups.map((flags) => ({ id: flags[0]!.id, numbers: numbersText(flags.map(({ number }) => number)), flags }));
}

function numbersText(numbers: readonly number[]): string {
  const spans: { first: number; last: number }[] = [];
  for (const number of [...numbers].sort((a, b) => a - b)) {
    const span = spans.at(-1);
    if (span?.last === number - 1) span.last = number;
    else spans.push({ first: number, last: number });
  }
  return spans.map(({ first, last }) => (first === last ? String(first) : `${first}–${last}`)).join(', ');
}
