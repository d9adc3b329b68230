import type { DayMark, PlannedDay } from '@steepfall/shared/desk';
import type { RecipeDocument } from '@steepfall/shared/sheets';

/** What happens at one moment of the planned day, with everything that has it in common. */
export interface DayEvent {
  kind: DayMark['kind'];
  atMs: number;
  tempC: number;
  /** Of the additions. */
  names: readonly string[];
}

/** The moments of the day in order; what goes in or comes out together is one. */
export function dayEvents({ marks }: PlannedDay, { additions }: RecipeDocument): DayEvent[] {
  const names = new Map(additions.map(({ id, name }) => [id, name]));
  const events: DayEvent[] = [];
  for (const { kind, additionId, atMs, tempC } of marks.toSorted((a, b) => a.atMs - b.atMs)) {
    const name = additionId === null ? null : (names.get(additionId) ?? null);
    const same = events.find((event) => event.kind === kind && event.atMs === atMs);
    if (same && name !== null) same.names = [...same.names, name];
    else events.push({ kind, atMs, tempC, names: name === null ? [] : [name] });
  }
  return events;
}

const MOST_NAMES = 3;

/** "sencha in", "Cascade, Saaz out", "chiller on". */
export function eventWords({ kind, names }: DayEvent): string {
  const [shown, rest] = [names.slice(0, MOST_NAMES), names.length - MOST_NAMES];
  const list = rest > 0 ? `${shown.join(', ')} and ${rest} more` : shown.join(', ');
  switch (kind) {
    case 'heat':
      return 'heat on';
    case 'in':
      return `${list} in`;
    case 'out':
      return `${list} out`;
    case 'chill':
      return 'chiller on';
    case 'transfer':
      return 'into the keg';
  }
}
