/** What of two lists belongs together. */
export interface Matched<T> {
  pairs: { before: T; after: T; beforeAt: number; afterAt: number }[];
  removed: { item: T; at: number }[];
  added: { item: T; at: number }[];
}

export interface Alike<T> {
  id: (item: T) => string;
  /** What nothing else may be taken for, although it has the same id: a tea never is hops. */
  sort: (item: T) => string;
  name: (item: T) => string;
}

/** Pairs of two lists: by id; then, of what is left, by name. The pairs are in the order of the later list. */
export function matchLists<T>(before: readonly T[], after: readonly T[], { id, sort, name }: Alike<T>): Matched<T> {
  const left = new Set(before.keys());
  const partners = new Map<number, number>();
  for (const key of [id, name]) {
    const keyOf = (item: T) => JSON.stringify([sort(item), key(item)]);
    for (const [afterAt, item] of after.entries()) {
      if (partners.has(afterAt)) continue;
      const beforeAt = [...left].find((at) => before[at] !== undefined && keyOf(before[at]) === keyOf(item));
      if (beforeAt === undefined) continue;
      left.delete(beforeAt);
      partners.set(afterAt, beforeAt);
    }
  }
  const matched: Matched<T> = { pairs: [], removed: [], added: [] };
  for (const [afterAt, item] of after.entries()) {
    const beforeAt = partners.get(afterAt);
    const partner = beforeAt === undefined ? undefined : before[beforeAt];
    if (beforeAt === undefined || partner === undefined) matched.added.push({ item, at: afterAt });
    else matched.pairs.push({ before: partner, after: item, beforeAt, afterAt });
  }
  for (const at of left) {
    const item = before[at];
    if (item !== undefined) matched.removed.push({ item, at });
  }
  return matched;
}

/** Names of a list; the second of the same name is "Cascade (2)". */
export function labelsOf(names: readonly string[]): string[] {
  return names.map((name, at) => {
    const count = names.slice(0, at + 1).filter((other) => other === name).length;
    return count === 1 ? name : `${name} (${count})`;
  });
}
