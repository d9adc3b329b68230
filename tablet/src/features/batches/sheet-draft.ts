import type { RunSheet, Step } from '@steepfall/shared/sheets';
import { newId } from '#lib/ids.ts';

/** A sheet being changed, with the states before it. */
interface SheetDraft {
  sheet: RunSheet;
  past: readonly RunSheet[];
}

type SheetAct =
  | { act: 'move'; stepId: string; by: -1 | 1 }
  | { act: 'replace'; step: Step }
  | { act: 'insert'; step: Step; afterStepId: string | null }
  | { act: 'take-out'; stepId: string }
  | { act: 'undo' };

function stepsAfter(steps: readonly Step[], act: Exclude<SheetAct, { act: 'undo' }>): Step[] {
  switch (act.act) {
    case 'move': {
      const from = steps.findIndex(({ id }) => id === act.stepId);
      const to = from + act.by;
      const step = steps[from];
      if (!step || to < 0 || to >= steps.length) return [...steps];
      return steps.toSpliced(from, 1).toSpliced(to, 0, step);
    }
    case 'replace':
      return steps.map((step) => (step.id === act.step.id ? act.step : step));
    case 'insert':
      return steps.toSpliced(steps.findIndex(({ id }) => id === act.afterStepId) + 1, 0, act.step);
    case 'take-out':
      return steps.filter(({ id }) => id !== act.stepId);
  }
}

export function changeDraft({ sheet, past }: SheetDraft, act: SheetAct): SheetDraft {
  if (act.act === 'undo') {
    const before = past.at(-1);
    return before ? { sheet: before, past: past.slice(0, -1) } : { sheet, past };
  }
  const steps = stepsAfter(sheet.steps, act);
  // A sheet has one step at least.
  if (steps.length === 0) return { sheet, past };
  return { sheet: { ...sheet, steps }, past: [...past, sheet] };
}

/** A step that the brewer adds: done by hand unless told otherwise. */
export function ownStep(sheet: RunSheet): Step {
  return {
    id: `own-${newId()}`,
    kind: 'prepare',
    title: '',
    amounts: [],
    start: { by: 'hand' },
    done: { by: 'hand' },
    acts: [],
    meanwhile: [],
    cautions: [],
    settings: [],
    reachS: sheet.steps[0]?.reachS ?? 10,
  };
}
