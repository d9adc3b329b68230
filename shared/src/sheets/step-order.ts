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
 * after the one it followed, so that a later revision with one addition more still has every step. A step of one's own that has the id
 * of a usual one gets another; one whose place is gone stands at the end.
 */
export function inStepOrder(drafts: readonly StepDraft[], { own, order }: RecipeDocument['steps']): StepDraft[] {
  const list = withOwn(drafts, own);
  return order ? ordered(list, order) : list;
}

function withOwn(drafts: readonly StepDraft[], own: readonly OwnStep[]): StepDraft[] {
  const list = [...drafts];
  const isOwn = new Set<StepDraft>();
  let waiting = [...own];
  while (waiting.length > 0) {
    const placed = waiting.filter(({ afterStepId }) => placeAfter(list, isOwn, afterStepId) !== null);
    // What follows a step that is not there stands at the end, and then others can follow it.
    const [next = waiting[0]] = placed;
    if (!next) break;
    const draft = { ...draftOf(next), id: freeId(list, next.id) };
    list.splice(placeAfter(list, isOwn, next.afterStepId) ?? list.length, 0, draft);
    isOwn.add(draft);
    waiting = waiting.filter((step) => step !== next);
  }
  return list;
}

/** Where a step goes that follows another: behind those of one's own that follow it already; null when there is no such step. */
function placeAfter(list: readonly StepDraft[], isOwn: ReadonlySet<StepDraft>, afterStepId?: string): number | null {
  const at = afterStepId === undefined ? -1 : list.findIndex(({ id }) => id === afterStepId);
  if (afterStepId !== undefined && at === -1) return null;
  const rest = list.slice(at + 1);
  const others = rest.findIndex((draft) => !isOwn.has(draft));
  return at + 1 + (others === -1 ? rest.length : others);
}

function freeId(list: readonly StepDraft[], id: string): string {
  const isFree = (wanted: string) => list.every((draft) => draft.id !== wanted);
  if (isFree(id)) return id;
  for (let count = 2; ; count += 1) {
    const wanted = `own-${count}-${id}`.slice(0, 60);
    if (isFree(wanted)) return wanted;
  }
}

function ordered(list: readonly StepDraft[], order: readonly string[]): StepDraft[] {
  const wanted = [...new Set(order)].flatMap((id) => list.filter((draft) => draft.id === id));
  for (const [index, draft] of list.entries()) {
    if (wanted.includes(draft)) continue;
    const before = list[index - 1];
    wanted.splice(before ? wanted.indexOf(before) + 1 : 0, 0, draft);
  }
  return wanted;
}
