import { inStep, outStep } from './compile-event.js';
import { namer } from './compile-words.js';
import { dayOrder, isColdSteep, timedFromFill } from './day-order.js';
import type { Addition, RecipeDocument } from './recipe.js';

/** The steps of a compiled sheet that put an addition in and take it out; `null` where nothing takes it out. */
export interface AdditionSteps {
  inStepId: string;
  outStepId: string | null;
}

const coldSteps = { salt: 'salts', acid: 'acid', tea: 'tea-cold', hops: 'hops-cold', other: 'other-cold' } as const;

/**
 * Which steps of the compiled sheet put each addition in and take it out, by its id: names come in the order of `compileSheet`, from the
 * same steps. A sheet that was edited by hand may have lost such a step.
 */
export function additionSteps(document: RecipeDocument): ReadonlyMap<string, AdditionSteps> {
  const names = { name: namer(), several: new Set<string>() };
  const ins = new Map<string, string>();
  const outs = new Map<string, string>();
  const note = (steps: Map<string, string>, additions: readonly Addition[], stepId: string) => {
    for (const { id } of additions) steps.set(id, stepId);
  };
  for (const addition of document.additions) {
    if (addition.in.at === 'fill') note(ins, [addition], coldSteps[addition.kind]);
    if (addition.in.at !== 'transfer') continue;
    note(ins, [addition], 'keg-in');
    if ('out' in addition && addition.out.at === 'timer') note(outs, [addition], 'keg-out');
  }
  for (const [kind, additions] of namedEvents(document)) {
    if (kind === 'in') note(ins, additions, inStep(additions, names).id);
    else note(outs, additions, outStep(additions, names).id);
  }
  return new Map([...ins].map(([id, inStepId]) => [id, { inStepId, outStepId: outs.get(id) ?? null }]));
}

/** What goes in and comes out of the kettle, in the order in which the sheet names it. */
function namedEvents(document: RecipeDocument): ['in' | 'out', readonly Addition[]][] {
  const { byClock, byFall } = dayOrder(document);
  const coldOuts = isColdSteep(document) ? [] : timedFromFill(document);
  return [
    ...coldOuts.map(({ additions }) => ['out', additions] as ['out', readonly Addition[]]),
    ...byClock.map(({ kind, additions }) => [kind, additions] as ['in' | 'out', readonly Addition[]]),
    ...byFall.flatMap(({ kind, additions, outs }): ['in' | 'out', readonly Addition[]][] => [
      [kind, additions],
      ...outs.map((out) => ['out', out.additions] as ['out', readonly Addition[]]),
    ]),
  ];
}
