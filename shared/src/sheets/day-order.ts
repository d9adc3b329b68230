import type { Addition, RecipeDocument } from './recipe.js';

/** Usual cold water from the tap (common practice, no source). */
export const USUAL_FILL_C = 15;

/** Leaf in water that is never heated. */
export function isColdSteep({ steepC, assume }: RecipeDocument): boolean {
  return steepC <= (assume.fillC ?? USUAL_FILL_C);
}

export interface DayEvent {
  kind: 'in' | 'out';
  additions: readonly Addition[];
}

/** Seconds after the steep temperature was reached. */
export interface ClockEvent extends DayEvent {
  atS: number;
}

export interface FallEvent extends DayEvent {
  tempC: number;
  /** What goes in here and comes out by the clock. */
  outs: readonly TimedOut[];
}

/** What goes in and comes out between the steep temperature and the keg, in the order in which it happens. */
export interface DayOrder {
  byClock: readonly ClockEvent[];
  byFall: readonly FallEvent[];
}

/** What comes out together, so long after it went in. */
export interface TimedOut {
  afterS: number;
  additions: readonly Addition[];
}

function grouped<Key>(items: readonly { key: Key; addition: Addition }[]): Map<Key, Addition[]> {
  const groups = new Map<Key, Addition[]>();
  for (const { key, addition } of items) groups.set(key, [...(groups.get(key) ?? []), addition]);
  return groups;
}

/**
 * The order of the day from the conditions of the additions: first what the clock of the steep says, then, with the chiller on,
 * what the falling temperature says. Additions with the same condition are one event. What stays in until the transfer comes out at
 * the transfer temperature; what would come out before it went in comes out at once.
 */
export function dayOrder(document: RecipeDocument): DayOrder {
  return { byClock: clockEvents(document), byFall: fallEvents(document) };
}

function clockEvents(document: RecipeDocument): ClockEvent[] {
  const ins = document.additions.flatMap((addition) =>
    addition.in.at === 'steep' ? [{ key: addition.in.afterS, addition }] : [],
  );
  // Where nothing is heated, the steep begins with the water, and what went in with it comes out by the same clock.
  const cold = isColdSteep(document) ? document.additions.filter(({ in: { at } }) => at === 'fill') : [];
  const outs = [...cold.map((addition) => ({ key: 0, addition })), ...ins].flatMap(({ key, addition }) =>
    'out' in addition && addition.out.at === 'timer' ? [{ key: key + addition.out.durationS, addition }] : [],
  );
  const events = (kind: 'in' | 'out', items: typeof ins): ClockEvent[] =>
    [...grouped(items)].map(([atS, list]) => ({ kind, atS, additions: list }));
  // At the same second the first comes out before the next goes in.
  return [...events('out', outs), ...events('in', ins)].sort((a, b) => a.atS - b.atS);
}

function fallEvents({ additions, transferC }: RecipeDocument): FallEvent[] {
  const ins = additions.flatMap((addition) =>
    addition.in.at === 'falling' ? [{ key: addition.in.tempC, addition }] : [],
  );
  const outs = additions.flatMap((addition) => {
    const tempC = outLevelC(addition, transferC);
    return tempC === null || isAtOnce(addition, transferC) ? [] : [{ key: tempC, addition }];
  });
  return [
    ...[...grouped(outs)].map(([tempC, list]): FallEvent => ({ kind: 'out', tempC, additions: list, outs: [] })),
    ...[...grouped(ins)].map(([tempC, list]): FallEvent => ({
      kind: 'in',
      tempC,
      additions: list,
      outs: timedOuts(list, transferC),
    })),
  ].sort((a, b) => b.tempC - a.tempC);
}

/** The temperature that takes an addition out, °C; null when a time does, or when it stands in the keg. */
function outLevelC(addition: Addition, transferC: number): number | null {
  if (!('out' in addition) || addition.in.at === 'transfer' || addition.out.at === 'timer') return null;
  return addition.out.at === 'falling' ? addition.out.tempC : transferC;
}

/** Whether the temperature that takes it out is past when it goes in. */
function isAtOnce(addition: Addition, transferC: number): boolean {
  const level = outLevelC(addition, transferC);
  return level !== null && addition.in.at === 'falling' && level >= addition.in.tempC;
}

function timedOuts(additions: readonly Addition[], transferC: number): TimedOut[] {
  const items = additions.flatMap((addition) => {
    if ('out' in addition && addition.out.at === 'timer') return [{ key: addition.out.durationS, addition }];
    return isAtOnce(addition, transferC) ? [{ key: 0, addition }] : [];
  });
  return [...grouped(items)].map(([afterS, list]) => ({ afterS, additions: list })).sort((a, b) => a.afterS - b.afterS);
}

/** What went into the cold water and comes out by the clock, the first out first. */
export function timedFromFill({ additions }: RecipeDocument): TimedOut[] {
  const fromFill = additions.filter((addition) => addition.in.at === 'fill');
  return timedOuts(fromFill, 0);
}
