import { differenceWords, type Change } from './differences.js';
import { isSame } from './same-value.js';

/** A thing that both changed, and not alike. */
export interface Collision {
  what: string;
  mine: string;
  theirs: string;
}

export interface Versions<T> {
  base: T;
  mine: T;
  theirs: T;
}

export type Side = 'mine' | 'theirs';

/** What a thing is about: its name for when no change has one, and the keys of its changes. */
export interface Thing {
  what: string;
  covers: (key: string) => boolean;
}

/** A member and all below it. */
export function thingAt(path: string, what: string): Thing {
  return { what, covers: (key) => key === path || key.startsWith(`${path}.`) };
}

/** Chooses, thing by thing, the side that changed it, and keeps a list of what both did. */
export class Choices {
  readonly collisions: Collision[] = [];

  constructor(private readonly changes: Record<Side, readonly Change[]>) {}

  /** The side whose version of a thing counts; that of the person who combines when both changed it, which is then a collision. */
  side<T>(thing: Thing, { base, mine, theirs }: Versions<T>): Side {
    if (isSame(mine, theirs) || isSame(theirs, base)) return 'mine';
    if (isSame(mine, base)) return 'theirs';
    this.collide(thing);
    return 'mine';
  }

  pick<T>(thing: Thing, versions: Versions<T>): T {
    return versions[this.side(thing, versions)];
  }

  collide({ what, covers }: Thing): void {
    const [mine, theirs] = [this.changes.mine, this.changes.theirs].map((list) =>
      list.filter(({ key }) => covers(key)),
    );
    this.collisions.push(collisionOf(what, mine ?? [], theirs ?? []));
  }
}

function collisionOf(what: string, mine: readonly Change[], theirs: readonly Change[]): Collision {
  const [one, other] = [mine[0], theirs[0]];
  const isOneMember = mine.length === 1 && theirs.length === 1 && one?.key === other?.key;
  if (isOneMember && one?.to != null && other?.to != null && one.what === other.what) {
    return { what: one.what, mine: one.to, theirs: other.to };
  }
  const words = (changes: readonly Change[]) => changes.map(differenceWords).join('; ') || 'as it was';
  return { what, mine: words(mine), theirs: words(theirs) };
}
