import type { RunSheet } from './step.js';

/** What is wrong with a sheet, at which step. */
export interface SheetProblem {
  stepId: string;
  detail: string;
}

/** What would go wrong on the day with a sheet that was edited by hand; empty when nothing is found. */
export function checkSheet({ steps }: RunSheet): SheetProblem[] {
  const seen = new Set<string>();
  return steps.flatMap(({ id }) => {
    if (seen.has(id)) return [{ stepId: id, detail: 'Two steps have the same id.' }];
    seen.add(id);
    return [];
  });
}
