import type { Addition, OwnStep, RecipeDocument, WaterPart } from '../sheets/index.js';
import { NO_BREAK_SPACE, type UnitPreferences } from '../units/index.js';
import type { Change, Difference } from './difference.js';
import { additionFacts, documentFacts, ownStepFacts, waterFacts, type Fact, type Place } from './differences-facts.js';
import { labelsOf, matchLists, type Alike } from './differences-match.js';
import { orderChanges } from './differences-order.js';
import { apart, inWords, wordsIn, type Texts, type Words } from './differences-words.js';
import { canonical, isSame } from './same-value.js';

export type { Change, Difference } from './difference.js';

/**
 * Everything that differs between two documents, in the order of the recipe: the drink, what goes in, the waters, the steps. Additions
 * are the same one when they have the same id, or else the same kind and name. Empty exactly when the documents say the same.
 *
 * @param units of the person who reads it; a difference too small for them is written with all its digits.
 */
export function revisionDifferences(
  before: RecipeDocument,
  after: RecipeDocument,
  units: UnitPreferences,
): Difference[] {
  const changes = changesOf(before, after, units);
  return withBlendsTogether(changes, before, after).map(({ path, what, from, to }) => ({ path, what, from, to }));
}

/** The same with keys, one for each member: 'additions.<id>.massG'. */
export function changesOf(before: RecipeDocument, after: RecipeDocument, units: UnitPreferences): Change[] {
  const say = wordsIn(units);
  return [
    ...changesOfFacts(documentFacts(before, say), documentFacts(after, say)),
    ...additionChanges(before, after, say),
    ...listChanges(before, after, { ...watersAlike, facts: (water, at) => waterFacts(water, at, say) }),
    ...listChanges(before, after, {
      ...ownStepsAlike,
      facts: (step, at) => ownStepFacts(step, at, say),
    }),
    ...orderChanges(before, after),
  ];
}

function changesOfFacts(before: readonly Fact[], after: readonly Fact[]): Change[] {
  const earlier = new Map(before.map((fact) => [fact.key, fact]));
  const later = new Map(after.map((fact) => [fact.key, fact]));
  return [...new Set([...later.keys(), ...earlier.keys()])].flatMap((key) => {
    const [from, to] = [earlier.get(key), later.get(key)];
    const fact = to ?? from;
    return !fact || isSame(from?.value, to?.value) ? [] : [changeOf(fact, from, to)];
  });
}

function changeOf({ key, path, what, absent }: Fact, from?: Fact, to?: Fact): Change {
  const isBrief = from?.brief !== undefined && from.brief.sort === to?.brief?.sort;
  const textsOf = (fact?: Fact): Texts => [
    ...(fact ? ((isBrief ? fact.brief?.texts : undefined) ?? fact.texts) : [absent]),
    canonical(fact?.value),
  ];
  const [fromText, toText] = apart(textsOf(from), textsOf(to));
  return { key, path, what: (isBrief ? to?.brief?.what : undefined) ?? what, from: fromText, to: toText };
}

interface ListOf<T> extends Alike<T> {
  /** Where the list is: 'additions'. */
  path: string;
  /** The list in words: 'additions'. */
  what: string;
  items: (document: RecipeDocument) => readonly T[];
  facts: (item: T, place: Place, document: RecipeDocument) => Fact[];
  /** A whole item in words, when it came or went. */
  whole: (item: T) => string;
}

function listChanges<T>(before: RecipeDocument, after: RecipeDocument, list: ListOf<T>): Change[] {
  const { path, id, name } = list;
  const [earlier, later] = [list.items(before), list.items(after)];
  const [labelsBefore, labelsAfter] = [labelsOf(earlier.map(name)), labelsOf(later.map(name))];
  const { pairs, removed, added } = matchLists(earlier, later, list);
  const changed = pairs.flatMap((pair) => {
    const label = labelsAfter[pair.afterAt] ?? '';
    const key = `${path}.${id(pair.before)}`;
    const place = (at: number): Place => ({ key, path: `${path}.${at}`, label });
    return [
      ...changesOfFacts(
        list.facts(pair.before, place(pair.beforeAt), before),
        list.facts(pair.after, place(pair.afterAt), after),
      ),
      ...(id(pair.before) === id(pair.after)
        ? []
        : [{ key, path: `${path}.${pair.afterAt}`, what: label, from: 'as it was entered', to: 'entered anew' }]),
    ];
  });
  return [
    ...changed,
    ...added.map(({ item, at }) => ({
      ...{ key: `${path}.${id(item)}`, path: `${path}.${at}`, what: labelsAfter[at] ?? '' },
      ...{ from: null, to: list.whole(item) },
    })),
    ...removed.map(({ item, at }) => ({
      ...{ key: `${path}.${id(item)}`, path: `${path}.${at}`, what: labelsBefore[at] ?? '' },
      ...{ from: list.whole(item), to: null },
    })),
    ...reordered(
      pairs.map(({ beforeAt, afterAt }) => ({ label: labelsAfter[afterAt] ?? '', at: beforeAt })),
      list,
    ),
  ];
}

/** A line when what is in both lists stands in another order. @param pairs in the order of the later list. */
function reordered(
  pairs: readonly { label: string; at: number }[],
  { path, what }: { path: string; what: string },
): Change[] {
  const earlier = [...pairs].sort((a, b) => a.at - b.at);
  if (earlier.every((pair, index) => pair === pairs[index])) return [];
  const names = (list: typeof earlier) => list.map(({ label }) => label).join(', ');
  return [{ key: `${path}.order`, path, what: `order of the ${what}`, from: names(earlier), to: names([...pairs]) }];
}

const watersAlike = {
  items: ({ waters }: RecipeDocument) => waters,
  path: 'waters',
  what: 'waters',
  id: ({ id }: WaterPart) => id,
  sort: () => 'water',
  name: ({ name }: WaterPart) => name,
  whole: ({ percent }: WaterPart) => `${Number(percent.toFixed(1))}${NO_BREAK_SPACE}%`,
};
const ownStepsAlike = {
  items: ({ steps }: RecipeDocument) => steps.own,
  path: 'steps.own',
  what: 'steps of your own',
  id: ({ id }: OwnStep) => id,
  sort: () => 'step',
  name: ({ title }: OwnStep) => title,
  whole: ({ afterStepId }: OwnStep) => (afterStepId ? `after ${inWords(afterStepId)}` : 'at the head'),
};

function additionChanges(before: RecipeDocument, after: RecipeDocument, say: Words): Change[] {
  const isWaterSame = before.waterL === after.waterL;
  return listChanges<Addition>(before, after, {
    items: ({ additions }) => additions,
    path: 'additions',
    what: 'additions',
    id: ({ id }) => id,
    sort: ({ kind }) => kind,
    name: ({ name }) => name,
    facts: (addition, place, { waterL }) =>
      additionFacts(addition, place, { say, waterL: isWaterSame ? null : waterL }),
    whole: say.addition,
  });
}

/** Conditions that all hops, or all teas, share are said once: "hops in 62 → 60 °C". */
function withBlendsTogether(changes: readonly Change[], before: RecipeDocument, after: RecipeDocument): Change[] {
  const said = new Map<Change, Change | null>();
  for (const kind of ['tea', 'hops'] as const) {
    const ids = before.additions.filter((addition) => addition.kind === kind).map(({ id }) => id);
    if (ids.length === 0 || after.additions.filter((addition) => addition.kind === kind).length !== ids.length)
      continue;
    for (const member of ['in', 'out'] as const) {
      const alike = changes.filter(({ key }) => ids.some((id) => key === `additions.${id}.${member}`));
      const [first, ...others] = alike;
      const isShared = first && alike.length === ids.length;
      if (!isShared || others.some(({ from, to }) => from !== first.from || to !== first.to)) continue;
      said.set(first, { ...first, what: blendWords(kind, member, first.what) });
      for (const other of others) said.set(other, null);
    }
  }
  return changes.flatMap((change) => {
    const together = said.get(change);
    if (together === null) return [];
    return [together ?? change];
  });
}

function blendWords(kind: 'tea' | 'hops', member: 'in' | 'out', what: string): string {
  if (what.endsWith(' steep')) return 'steep';
  return what.endsWith(' stands') ? `${kind} stand` : `${kind} ${member}`;
}

/** "hops in 62 → 60 °C", "Saaz added: 10 g, in at 30 °C". */
export function differenceWords({ what, from, to }: Difference): string {
  if (from === null) return `${what} added: ${to ?? ''}`;
  if (to === null) return `${what} taken out (${from})`;
  const unit = sharedUnit(from, to);
  return `${what} ${unit ? from.slice(0, -unit.length) : from} → ${to}`;
}

/** The unit, with its space, that ends both; empty when there is none, or when one is more than a number and a unit. */
function sharedUnit(from: string, to: string): string {
  const unitOf = (text: string) => /^[\d.,:\u2212-]+(\u00a0\S+)$/.exec(text)?.[1] ?? '';
  return unitOf(from) === unitOf(to) ? unitOf(from) : '';
}
