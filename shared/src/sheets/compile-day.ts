import { inStep, outStep, severalOf, standStep, type DayNames } from './compile-event.js';
import { isInBag, type Namer } from './compile-words.js';
import { dayOrder, isColdSteep, type ClockEvent, type FallEvent } from './day-order.js';
import type { RecipeDocument } from './recipe.js';
import type { StepDraft } from './step-order.js';
import type { VesselAct } from './step.js';

/** From the steep temperature to the keg: what goes in and comes out, by clock first, then by the falling temperature. */
export function theDay(document: RecipeDocument, name: Namer): StepDraft[] {
  const { byClock, byFall } = dayOrder(document);
  const names = { name, several: severalOf(document) };
  const steeps = steeping(document, byClock, names);
  if (isColdSteep(document)) return [...steeps, ...byFall.flatMap((event) => fallSteps(event, names))].map(cold);
  return [...steeps, chill(byClock.length === 0), ...byFall.flatMap((event) => caughtSteps(event, names))];
}

/** Below it a scald takes minutes (hospital scald tables); the mark on every step would soon be read on none. */
const SCALDS_ABOVE_C = 49;

/** What is not hot does not scald. */
function cold(step: StepDraft): StepDraft {
  return { ...step, cautions: step.cautions?.filter((caution) => caution !== 'scald') };
}

function steeping(document: RecipeDocument, events: readonly ClockEvent[], names: DayNames): StepDraft[] {
  const isCold = isColdSteep(document);
  let atS = 0;
  return events.flatMap((event, index) => {
    const waitS = event.atS - atS;
    atS = event.atS;
    const isFirst = index === 0;
    const step = event.kind === 'in' ? inStep(event.additions, names) : outStep(event.additions, names);
    return [
      ...(waitS > 0 ? [isFirst && !isCold ? holdStep(names.name, waitS) : steepStep(document, names.name, waitS)] : []),
      isFirst && !isCold ? withHeatOff(step, event) : step,
    ];
  });
}

/** The heat goes off with the first thing that goes in; lid and time do the rest. */
function withHeatOff(step: StepDraft, { additions }: ClockEvent): StepDraft {
  const acts: VesselAct[] = ['heat-off', ...(step.acts ?? [])];
  return {
    ...step,
    detail: additions.some(isInBag) ? 'Heat off, bag under, lid back on.' : 'Heat off, lid back on.',
    acts,
  };
}

/** What goes in later than the steep temperature is reached finds the same temperature. */
function holdStep(name: Namer, durationS: number): StepDraft {
  return { id: name('hold'), kind: 'heat', title: 'Hold the temperature', done: { by: 'timer', durationS } };
}

function steepStep(document: RecipeDocument, name: Namer, durationS: number): StepDraft {
  const id = name('steep');
  const step: StepDraft = { id, kind: 'steep', title: 'Steep', done: { by: 'timer', durationS } };
  if (id !== 'steep') return step;
  const hasHops = document.additions.some(({ kind, in: { at } }) => kind === 'hops' && at === 'falling');
  return {
    ...step,
    meanwhile: [
      ...(hasHops ? [{ id: 'weigh-hops', text: 'weigh the hops into their bag' }] : []),
      ...(isColdSteep(document) ? [] : [{ id: 'hoses', text: 'check the hoses of the chiller' }]),
    ],
  };
}

function chill(isHeatStillOn: boolean): StepDraft {
  return {
    id: 'chill',
    kind: 'chill',
    title: 'Chiller on',
    detail: isHeatStillOn ? 'Heat off first. Stir gently while it runs.' : 'Stir gently while it runs.',
    acts: [...(isHeatStillOn ? (['heat-off'] as const) : []), 'lid-off', 'chiller-on'],
  };
}

/** What goes in or comes out, and what of it comes out again by the clock. */
function fallSteps({ kind, additions, outs }: FallEvent, names: DayNames): [StepDraft, ...StepDraft[]] {
  if (kind === 'out') return [outStep(additions, names)];
  let atS = 0;
  return [
    inStep(additions, names),
    ...outs.flatMap(({ afterS, additions: done }) => {
      const waitS = afterS - atS;
      atS = afterS;
      return [...(waitS > 0 ? [standStep(names.name('contact'), waitS)] : []), outStep(done, names)];
    }),
  ];
}

/** The same, called for by the falling temperature. Leaf and hops are caught; a dose can wait for its hand. */
function caughtSteps(event: FallEvent, names: DayNames): StepDraft[] {
  const careful = (step: StepDraft) => (event.tempC > SCALDS_ABOVE_C ? step : cold(step));
  const [first, ...rest] = fallSteps(event, names);
  return [
    {
      ...careful(first),
      ...(first.kind === 'add' ? { kind: 'catch' } : {}),
      start: { by: 'temperature', direction: 'falling', tempC: event.tempC },
    },
    ...rest.map(careful),
  ];
}
