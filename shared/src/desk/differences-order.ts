import { draftSteps, type RecipeDocument } from '../sheets/index.js';
import type { Change } from './difference.js';
import { labelsOf } from './differences-match.js';
import { apart, inWords, type Texts } from './differences-words.js';
import { canonical, isSame } from './same-value.js';

type Order = RecipeDocument['steps']['order'];
const path = 'steps.order';
/** Moves no step. */
const SEA_LEVEL_M = 0;

/** The order of the steps: each that stands elsewhere in the sheet, with what it follows. */
export function orderChanges(before: RecipeDocument, after: RecipeDocument): Change[] {
  if (isSame(before.steps.order, after.steps.order)) return [];
  // The later recipe in either order: what came or went with other changes is not said here again.
  const [earlier, later] = [titledSteps(after, before.steps.order), titledSteps(after, after.steps.order)];
  const ownIds = new Set(after.steps.own.map(({ id }) => id));
  const moved = earlier && later ? movedBlocks([...earlier.keys()], [...later.keys()], ownIds) : [];
  if (!earlier || !later || moved.length === 0) return [bareChange(before, after)];
  const behind = (id: string | undefined) => (id === undefined ? 'at the head' : `after ${later.get(id) ?? id}`);
  return moved.map(({ ids, from, to }) => ({
    ...{ key: path, path, what: ids.map((id) => later.get(id) ?? id).join(', ') },
    ...{ from: behind(from), to: behind(to) },
  }));
}

/** Titles of the sheet by step id, in its order; null where no sheet can be made of the document. */
function titledSteps(document: RecipeDocument, order: Order): Map<string, string> | null {
  try {
    const steps = draftSteps({ ...document, steps: { ...document.steps, order } }, SEA_LEVEL_M);
    const labels = labelsOf(steps.map(({ title }) => title));
    return new Map(steps.map(({ id }, at) => [id, labels[at] ?? id]));
  } catch (error) {
    if (error instanceof RangeError) return null;
    throw error;
  }
}

interface Moved {
  /** Neighbours that went together. */
  ids: string[];
  /** What stands before them; nothing at the head. */
  from: string | undefined;
  to: string | undefined;
}

/**
 * The fewest steps that have to move to come from one order to the other, those of one's own first. Both hold the same steps.
 */
function movedBlocks(earlier: readonly string[], later: readonly string[], ownIds: ReadonlySet<string>): Moved[] {
  const at = new Map(earlier.map((id, index) => [id, index]));
  const stays = staying(later.map((id) => ({ id, at: at.get(id) ?? 0, weight: ownIds.has(id) ? 1 : 1.001 })));
  const blocks: Moved[] = [];
  for (const [index, id] of later.entries()) {
    if (stays.has(id)) continue;
    const [from, to] = [earlier[(at.get(id) ?? 0) - 1], later[index - 1]];
    const last = blocks.at(-1);
    if (last && from === to && last.ids.at(-1) === to) last.ids.push(id);
    else blocks.push({ ids: [id], from, to });
  }
  return blocks;
}

interface Chain {
  ids: readonly string[];
  at: number;
  weight: number;
}

/** The heaviest part of a list that was in this order before. */
function staying(list: readonly { id: string; at: number; weight: number }[]): ReadonlySet<string> {
  const none: Chain = { ids: [], at: -1, weight: 0 };
  const heaviest = (chains: readonly Chain[]) =>
    chains.reduce((best, chain) => (chain.weight > best.weight ? chain : best), none);
  const chains: Chain[] = [];
  for (const { id, at, weight } of list) {
    const head = heaviest(chains.filter((chain) => chain.at < at));
    chains.push({ ids: [...head.ids, id], at, weight: head.weight + weight });
  }
  return new Set(heaviest(chains).ids);
}

/** Two orders that give the same sheet, or none: only the stretch that is not the same. */
function bareChange({ steps: before }: RecipeDocument, { steps: after }: RecipeDocument): Change {
  const [from, to] = stretch(before.order ?? [], after.order ?? []);
  const titles = new Map([...before.own, ...after.own].map(({ id, title }) => [id, title]));
  const texts = (order: Order, part: readonly string[]): Texts => [
    order ? part.map((id) => titles.get(id) ?? inWords(id)).join(', ') || 'nothing' : 'as it follows from the recipe',
    order ? part.join(', ') : 'as it follows from the recipe',
    canonical(order),
  ];
  const [fromText, toText] = apart(texts(before.order, from), texts(after.order, to));
  return { key: path, path, what: 'order of the steps', from: fromText, to: toText };
}

/** Two lists without the head and the tail that they share. */
function stretch<T>(one: readonly T[], other: readonly T[]): [T[], T[]] {
  const shorter = Math.min(one.length, other.length);
  let head = 0;
  while (head < shorter && one[head] === other[head]) head += 1;
  let tail = 0;
  while (tail < shorter - head && one.at(-1 - tail) === other.at(-1 - tail)) tail += 1;
  return [one.slice(head, one.length - tail), other.slice(head, other.length - tail)];
}
