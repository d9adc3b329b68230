import { thingAt, type Choices, type Versions } from './combine-choice.js';
import { isSame } from './same-value.js';

export interface ListJoin<T> {
  /** Where it is in the document: 'additions'. */
  path: string;
  /** The list in words. */
  what: string;
  nameOf: (item: T) => string;
  /** An item that is in all three. */
  join: (versions: Versions<T>) => T;
}

interface Item {
  id: string;
}

/** Two lists of things with ids, from one: what came on either side is there, what went is gone, in an order that both agree to. */
export function joinLists<T extends Item>(versions: Versions<readonly T[]>, choices: Choices, list: ListJoin<T>): T[] {
  const { base, mine, theirs } = versions;
  const byId = (items: readonly T[], id: string) => items.find((item) => item.id === id);
  return orderOf(versions, choices, list).flatMap((id) => {
    const [was, here, there] = [byId(base, id), byId(mine, id), byId(theirs, id)];
    if (was && here && there) return [list.join({ base: was, mine: here, theirs: there })];
    return joinPresence({ was, here, there }, choices, list);
  });
}

/** An item that is not in all three: added, by one or both, or taken out by one. */
function joinPresence<T extends Item>(
  { was, here, there }: { was?: T | undefined; here?: T | undefined; there?: T | undefined },
  choices: Choices,
  { path, nameOf }: ListJoin<T>,
): T[] {
  const left = here ?? there;
  if (!left) return [];
  const isCame = !was && !(here && there);
  if (isCame || isSame(here, there)) return [left];
  if (isSame(was, left)) return [];
  choices.collide(thingAt(`${path}.${left.id}`, nameOf(left)));
  return [left];
}

/** Ids of all three: as mine stands, or theirs when only they moved something; what only the other has follows what it followed there. */
function orderOf<T extends Item>(versions: Versions<readonly T[]>, choices: Choices, list: ListJoin<T>): string[] {
  const ids = {
    base: versions.base.map(({ id }) => id),
    mine: versions.mine.map(({ id }) => id),
    theirs: versions.theirs.map(({ id }) => id),
  };
  const isMoved = (side: 'mine' | 'theirs') => !isSame(common(ids.base, ids[side]), common(ids[side], ids.base));
  const [isMineMoved, isTheirsMoved] = [isMoved('mine'), isMoved('theirs')];
  if (isMineMoved && isTheirsMoved && !isSame(common(ids.mine, ids.theirs), common(ids.theirs, ids.mine))) {
    choices.collide(thingAt(`${list.path}.order`, `order of the ${list.what}`));
  }
  return isTheirsMoved && !isMineMoved ? woven(ids.theirs, ids.mine) : woven(ids.mine, ids.theirs);
}

/** Of the first, what the second has too, in the order of the first. */
function common(one: readonly string[], other: readonly string[]): string[] {
  return one.filter((id) => other.includes(id));
}

function woven(first: readonly string[], second: readonly string[]): string[] {
  const ids = [...first];
  for (const [at, id] of second.entries()) {
    if (ids.includes(id)) continue;
    const before = second.slice(0, at).findLast((other) => ids.includes(other));
    ids.splice(before === undefined ? 0 : ids.indexOf(before) + 1, 0, id);
  }
  return ids;
}
