import { isInBag, amountsOf, clipped, namesOf, titleOf, type Namer } from './compile-words.js';
import type { Addition, IngredientKind } from './recipe.js';
import type { StepDraft } from './step-order.js';
import type { VesselAct } from './step.js';

/** The kind that names a step with several: leaf first, since the watch and the kettle look for it. */
function stemOf(kinds: readonly IngredientKind[]): IngredientKind {
  return (['tea', 'hops'] as const).find((kind) => kinds.includes(kind)) ?? kinds[0] ?? 'other';
}

function kindsOf(additions: readonly Addition[]): IngredientKind[] {
  return [...new Set(additions.map(({ kind }) => kind))];
}

function actsOf(kinds: readonly IngredientKind[], way: 'in' | 'out'): VesselAct[] {
  return kinds.flatMap((kind): VesselAct[] => (kind === 'tea' || kind === 'hops' ? [`${kind}-${way}`] : []));
}

const whileHopsStand = [
  { id: 'tea-bag', text: 'rinse the tea bag' },
  { id: 'sanitiser', text: 'fill the sanitiser' },
];

/** What goes into the hot liquid together. */
export function inStep(additions: readonly Addition[], name: Namer): StepDraft {
  const kinds = kindsOf(additions);
  const id = name(`${stemOf(kinds)}-in`);
  return {
    id,
    kind: additions.some(isInBag) ? 'add' : 'dose',
    title: `${titleOf(kinds)} in`,
    amounts: amountsOf(additions),
    acts: actsOf(kinds, 'in'),
    cautions: kinds.includes('acid') ? ['scald', 'acid'] : ['scald'],
    ...(id === 'hops-in' ? { meanwhile: whileHopsStand } : {}),
  };
}

/** What comes out together; named where it is not all that there is of its kind. */
export function outStep(additions: readonly Addition[], name: Namer): StepDraft {
  const kinds = kindsOf(additions);
  const stem = `${stemOf(kinds)}-out`;
  const id = name(stem);
  const names = additions.length > 1 || id !== stem ? `${clipped(namesOf(additions))}. ` : '';
  return {
    id,
    kind: 'remove',
    title: `${titleOf(kinds)} out`,
    detail: `${names}Lift, let it drain, do not squeeze.`,
    acts: actsOf(kinds, 'out'),
    cautions: kinds.includes('hops') ? ['scald', 'dogs'] : ['scald'],
  };
}

/** What stands in the liquid for so long. */
export function standStep(id: string, durationS: number): StepDraft {
  return { id, kind: 'steep', title: 'Let it stand', done: { by: 'timer', durationS } };
}
