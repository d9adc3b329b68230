import { amountsOf, chargeTitle, clipped, isInBag, namesOf, titleOf, type Namer } from './compile-words.js';
import type { Addition, IngredientKind, RecipeDocument } from './recipe.js';
import { dayOrder, type DayEvent } from './day-order.js';
import type { StepDraft } from './step-order.js';
import type { VesselAct } from './step.js';

/** The kind that names a step with several: leaf first, since the watch and the kettle look for it. */
function stemOf(kinds: readonly IngredientKind[]): IngredientKind {
  return (['tea', 'hops'] as const).find((kind) => kinds.includes(kind)) ?? kinds[0] ?? 'other';
}

function kindsOf(additions: readonly Addition[]): IngredientKind[] {
  return [...new Set(additions.map(({ kind }) => kind))];
}

const stemOfEvent = (way: DayEvent['kind'], additions: readonly Addition[]) => `${stemOf(kindsOf(additions))}-${way}`;

/** What goes in, or comes out, at more than one moment of the day: "hops-in". A step of it is titled by name. */
export function severalOf(document: RecipeDocument): ReadonlySet<string> {
  const { byClock, byFall } = dayOrder(document);
  const stems = [
    ...byClock,
    ...byFall,
    ...byFall.flatMap(({ outs }) => outs.map((out) => ({ ...out, kind: 'out' as const }))),
  ].map(({ kind, additions }) => stemOfEvent(kind, additions));
  return new Set(stems.filter((stem, index) => stems.indexOf(stem) !== index));
}

/** What names the steps of a day. */
export interface DayNames {
  name: Namer;
  several: ReadonlySet<string>;
}

function actsOf(kinds: readonly IngredientKind[], way: 'in' | 'out'): VesselAct[] {
  return kinds.flatMap((kind): VesselAct[] => (kind === 'tea' || kind === 'hops' ? [`${kind}-${way}`] : []));
}

const whileHopsStand = [
  { id: 'tea-bag', text: 'rinse the tea bag' },
  { id: 'sanitiser', text: 'fill the sanitiser' },
];

/** What goes into the hot liquid together. */
export function inStep(additions: readonly Addition[], { name, several }: DayNames): StepDraft {
  const kinds = kindsOf(additions);
  const stem = stemOfEvent('in', additions);
  const id = name(stem);
  return {
    id,
    kind: additions.some(isInBag) ? 'add' : 'dose',
    title: `${chargeTitle(additions, several.has(stem))} in`,
    amounts: amountsOf(additions),
    acts: actsOf(kinds, 'in'),
    cautions: kinds.includes('acid') ? ['scald', 'acid'] : ['scald'],
    ...(id === 'hops-in' ? { meanwhile: whileHopsStand } : {}),
  };
}

/** What comes out together; named where it is not all that there is of its kind. */
export function outStep(additions: readonly Addition[], { name, several }: DayNames): StepDraft {
  const kinds = kindsOf(additions);
  const stem = stemOfEvent('out', additions);
  const id = name(stem);
  const title = chargeTitle(additions, several.has(stem));
  const isNamed = title !== titleOf(kinds) || (additions.length === 1 && id === stem);
  const names = isNamed ? '' : `${clipped(namesOf(additions))}. `;
  return {
    id,
    kind: 'remove',
    title: `${title} out`,
    detail: `${names}Lift, let it drain, do not squeeze.`,
    acts: actsOf(kinds, 'out'),
    cautions: kinds.includes('hops') ? ['scald', 'dogs'] : ['scald'],
  };
}

/** What stands in the liquid for so long. */
export function standStep(id: string, durationS: number): StepDraft {
  return { id, kind: 'steep', title: 'Let it stand', done: { by: 'timer', durationS } };
}
