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
  outs: readonly { afterS: number; additions: readonly Addition[] }[];
}

/** What goes in and comes out between the steep temperature and the keg, in the order in which it happens. */
export interface DayOrder {
  byClock: readonly ClockEvent[];
  byFall: readonly FallEvent[];
}

function grouped<Key>(items: readonly { key: Key; addition: Addition }[]): Map<Key, Addition[]> {
  const groups = new Map<Key, Addition[]>();
  for (const { key, addition } of items) groups.set(key, [...(groups.get(key) ?? []), addition]);
  return groups;
}

/**
 * The order of the day from the conditions of the additions: first what the clock of the steep says, then, with the chiller on,
 * what the falling temperature says. Additions with the same condition are one event. What stays in until the transfer comes out at
 * the transfer temperature.
 */
export function dayOrder({ additions, transferC }: RecipeDocument): DayOrder {
  const ins = additions.filter((addition) => addition.in.at === 'steep');
  const clockIns = ins.map((addition) => ({ key: addition.in.at === 'steep' ? addition.in.afterS : 0, addition }));
  const clockOuts = clockIns.flatMap(({ key, addition }) =>
    'out' in addition && addition.out.at === 'timer' ? [{ key: key + addition.out.durationS, addition }] : [],
  );
  const byClock: ClockEvent[] = [
    ...[...grouped(clockOuts)].map(([atS, list]) => ({ kind: 'out' as const, atS, additions: list })),
    ...[...grouped(clockIns)].map(([atS, list]) => ({ kind: 'in' as const, atS, additions: list })),
  ].sort((a, b) => a.atS - b.atS);

  const fallIns = additions.flatMap((addition) =>
    addition.in.at === 'falling' ? [{ key: addition.in.tempC, addition }] : [],
  );
  const fallOuts = additions.flatMap((addition) => {
    if (!('out' in addition) || addition.in.at === 'transfer') return [];
    if (addition.out.at === 'falling') return [{ key: addition.out.tempC, addition }];
    return addition.out.at === 'transfer' ? [{ key: transferC, addition }] : [];
  });
  const byFall: FallEvent[] = [
    ...[...grouped(fallOuts)].map(([tempC, list]) => ({ kind: 'out' as const, tempC, additions: list, outs: [] })),
    ...[...grouped(fallIns)].map(([tempC, list]) => ({
      kind: 'in' as const,
      tempC,
      additions: list,
      outs: timed(list),
    })),
  ].sort((a, b) => b.tempC - a.tempC);
  return { byClock, byFall };
}

function timed(additions: readonly Addition[]): FallEvent['outs'] {
  const items = additions.flatMap((addition) =>
    'out' in addition && addition.out.at === 'timer' ? [{ key: addition.out.durationS, addition }] : [],
  );
  return [...grouped(items)].map(([afterS, list]) => ({ afterS, additions: list })).sort((a, b) => a.afterS - b.afterS);
}
