import type { RunSheet, Step, VesselAct } from './step.js';

/** What is wrong with a sheet, at which step; at none (an empty id) where there is no step to say it at. */
export interface SheetProblem {
  stepId: string;
  detail: string;
}

/**
 * What would go wrong on the day with a sheet that was edited by hand: leaf that comes out before it is in or never comes out, a level
 * that nothing leads to, steps that were lost and that people's safety hangs on. Empty when nothing is found, which is no promise.
 */
export function checkSheet({ steps }: RunSheet): SheetProblem[] {
  if (steps.length === 0) return [{ stepId: '', detail: 'The sheet is empty: put a step on it.' }];
  return [
    ...sameIds(steps),
    ...leafProblems(steps, { leaf: 'Tea', goesIn: 'tea-in', comesOut: 'tea-out' }),
    ...leafProblems(steps, { leaf: 'Hops', goesIn: 'hops-in', comesOut: 'hops-out' }),
    ...levelProblems(steps),
    ...heatProblems(steps),
    ...lostSteps(steps),
  ];
}

const does = (act: VesselAct) => (step: Step) => step.acts.includes(act);

function sameIds(steps: readonly Step[]): SheetProblem[] {
  return steps
    .filter(({ id }, index) => steps.findIndex((step) => step.id === id) < index)
    .map(({ id, title }) => ({
      stepId: id,
      detail: `“${title}” has the id of another step: take it out and add it anew.`,
    }));
}

interface Leaf {
  leaf: string;
  goesIn: VesselAct;
  comesOut: VesselAct;
}

function leafProblems(steps: readonly Step[], { leaf, goesIn, comesOut }: Leaf): SheetProblem[] {
  const problems: SheetProblem[] = [];
  let inStep: Step | null = null;
  for (const step of steps) {
    if (step.acts.includes(comesOut)) {
      if (!inStep && !steps.slice(0, steps.indexOf(step)).some(does(goesIn))) {
        problems.push({
          stepId: step.id,
          detail: `${leaf} cannot come out here, since none is in: move “${step.title}” behind the step that puts it in.`,
        });
      }
      inStep = null;
    }
    if (step.acts.includes(goesIn)) inStep = step;
  }
  if (inStep) {
    problems.push({
      stepId: inStep.id,
      detail: `${leaf} goes in here and never comes out: put the step that takes it out behind “${inStep.title}”.`,
    });
  }
  return problems;
}

/** Levels need something that leads to them before: heat for a rise, and heat and then the chiller for a fall. */
function levelProblems(steps: readonly Step[]): SheetProblem[] {
  const heatAt = steps.findIndex(does('heat-on'));
  const chillAt = steps.findIndex(does('chiller-on'));
  return steps.flatMap((step, index): SheetProblem[] => {
    const [level] = [step.start, step.done].flatMap((one) => (one.by === 'temperature' ? [one] : []));
    if (!level) return [];
    const way = level.direction === 'rising' ? 'rises' : 'falls';
    if (heatAt < 0 || heatAt > index) {
      const detail = `Nothing is heated before this, so the temperature never ${way} to it: light the heat first.`;
      return [{ stepId: step.id, detail }];
    }
    if (level.direction === 'falling' && chillAt > index) {
      const { title } = steps[chillAt] ?? step;
      return [{ stepId: step.id, detail: `The temperature hardly falls before “${title}”: put this step behind it.` }];
    }
    return [];
  });
}

function heatProblems(steps: readonly Step[]): SheetProblem[] {
  const lit = steps.findLast(does('heat-on'));
  if (!lit || steps.slice(steps.indexOf(lit)).some(does('heat-off'))) return [];
  return [{ stepId: lit.id, detail: 'The heat is lit here, and no step turns it off: put one on the sheet.' }];
}

/** Steps that must not be lost, said at the step that they belong to. */
function lostSteps(steps: readonly Step[]): SheetProblem[] {
  const measuresPh = ({ asks, done }: Step) => asks === 'pH' || (done.by === 'measurement' && done.quantity === 'pH');
  const fill = steps.find(({ kind }) => kind === 'fill') ?? steps[0];
  const transfer = steps.findLast(({ kind }) => kind === 'transfer') ?? steps.at(-1);
  const charge = steps.find(({ kind }) => kind === 'charge');
  const beforeCharge = charge ? steps.slice(0, steps.indexOf(charge)) : [];
  const lost = [
    {
      at: steps.some(measuresPh) ? undefined : fill,
      detail: 'No step measures the pH, and what keeps in the keg hangs on it: put one on the sheet.',
    },
    {
      at: steps.some(({ cautions }) => cautions.includes('cold')) ? undefined : transfer,
      detail: 'No step puts the keg into the cold: put one behind the transfer.',
    },
    {
      at: beforeCharge.some(({ cautions }) => cautions.includes('pressure')) ? undefined : charge,
      detail: 'No step before this looks at the keg: check it before it is under pressure.',
    },
  ];
  return lost.flatMap(({ at, detail }) => (at ? [{ stepId: at.id, detail }] : []));
}
