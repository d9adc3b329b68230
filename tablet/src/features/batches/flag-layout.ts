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
  lane: number;
  hasLabel: boolean;
  /** The label runs to the left of the pole: the right edge is near. */
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
const GAP_PX = 10;

interface Taken {
  lane: number;
  from: number;
  to: number;
}

/** Gives each flag a lane in which it covers no other. Vital ones choose first; what finds no room for its words keeps its number. */
export function layoutFlags(flags: readonly Flag[], room: Room): PlacedFlag[] {
  const taken: Taken[] = [];
  const placed = flags
    .map((flag) => ({ ...flag, x: room.xOf(flag.atMs) }))
    .filter(({ x }) => x >= 0 && x <= room.width)
    .sort((a, b) => Number(b.isVital) - Number(a.isVital) || a.x - b.x)
    .map((flag) => {
      const labelPx = PENNANT_PX + flag.title.length * LETTER_PX + GAP_PX;
      const label = room.hasLabels ? fit(flag.x, labelPx, room, taken) : null;
      const spot = label ?? fit(flag.x, PENNANT_PX, room, taken) ?? crowded(flag.x);
      taken.push(spot);
      return { ...flag, lane: spot.lane, hasLabel: label !== null, isLeftward: spot.from < flag.x - 1 };
    });
  return placed.sort((a, b) => a.x - b.x);
}

function fit(x: number, width: number, { lanes, width: roomPx }: Room, taken: readonly Taken[]): Taken | null {
  const spans = [
    { from: x, to: x + width },
    { from: x - width, to: x },
  ].filter(({ from, to }) => from >= -1 && to <= roomPx + PENNANT_PX / 2);
  for (let lane = 0; lane < lanes; lane += 1) {
    const span = spans.find(({ from, to }) =>
      taken.every((other) => other.lane !== lane || to <= other.from || from >= other.to),
    );
    if (span) return { lane, ...span };
  }
  return null;
}

/** No room at all: on top of the others in the last resort, where the log still tells them apart. */
function crowded(x: number): Taken {
  return { lane: 0, from: x, to: x + PENNANT_PX };
}
