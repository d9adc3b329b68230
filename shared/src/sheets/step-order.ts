import type { OwnStep, RecipeDocument } from './recipe.js';
import type { Step } from './step.js';

/** A step before its defaults are filled in. */
export type StepDraft = Partial<Step> & Pick<Step, 'id' | 'kind' | 'title'>;

function draftOf({ id, title, detail, done, asks, meanwhile, cautions }: OwnStep): StepDraft {
  return {
    id,
    kind: asks ? 'measure' : 'prepare',
    title,
    done,
    ...(detail ? { detail } : {}),
    ...(asks ? { asks } : {}),
    ...(meanwhile ? { meanwhile } : {}),
    ...(cautions ? { cautions } : {}),
  };
}

/**
 * The steps with the brewer's own among them, in the order that the brewer wants. A step that the order does not name keeps its place
 * after the one it followed, so that a later revision with one addition more still has every step.
 */
export function inStepOrder(drafts: readonly StepDraft[], { own, order }: RecipeDocument['steps']): StepDraft[] {
  const list = [...drafts];
  for (const step of own) {
    const at = step.afterStepId === undefined ? -1 : list.findIndex(({ id }) => id === step.afterStepId);
    list.splice(step.afterStepId !== undefined && at === -1 ? list.length : at + 1, 0, draftOf(step));
  }
  if (!order) return list;
  const wanted = order.flatMap((id) => list.filter((draft) => draft.id === id));
  for (const [index, draft] of list.entries()) {
    if (wanted.includes(draft)) continue;
    const before = list[index - 1];
    wanted.splice(before ? wanted.indexOf(before) + 1 : 0, 0, draft);
  }
  return wanted;
}
