import { atmosphericPressureKPa, chargeGaugeKPa } from '../figures/index.js';
import { amountsOf, clipped, isInBag } from './compile-words.js';
import { dayOrder, isColdSteep } from './day-order.js';
import type { Addition, RecipeDocument } from './recipe.js';
import type { StepDraft } from './step-order.js';

/** From the kettle into the keg, the gas, and the glass. @throws RangeError when no pressure gives the gas that is asked for. */
export function afterTheDay(document: RecipeDocument, altitudeM: number): StepDraft[] {
  return [
    transfer(document),
    ...intoTheKeg(document),
    {
      id: 'purge',
      kind: 'transfer',
      title: 'Purge and close',
      detail: 'Purge the headspace three times, then into the fridge.',
      cautions: ['co2', 'pressure', 'lift', 'cold'],
    },
    cleanDown(document),
    setTheGas(document, altitudeM),
    {
      id: 'look-again',
      kind: 'measure',
      title: 'Look again',
      detail: 'Tomorrow: does the gauge still stand where you set it? No hiss, no drip?',
      asks: 'pressureKPa',
      cautions: ['pressure'],
    },
    ...outOfTheKeg(document),
    {
      id: 'taste',
      kind: 'taste',
      title: 'Taste and note',
      detail: 'A small cold glass. Give it 1 to 9, and write what you taste.',
      asks: 'tasteScore',
      ...(document.additions.some(mayHoldCaffeine) ? { cautions: ['caffeine'] } : {}),
    },
    {
      id: 'next-time',
      kind: 'taste',
      title: 'For next time',
      detail: 'What would you change? One thing at a time. Write it as a note.',
    },
  ];
}

function transfer(document: RecipeDocument): StepDraft {
  const step: StepDraft = { id: 'transfer', kind: 'transfer', title: 'Fill the keg', cautions: ['allergens'] };
  if (isColdSteep(document)) return { ...step, detail: 'Fill from the bottom, gently.' };
  const lowestC = Math.min(document.transferC, ...dayOrder(document).byFall.map(({ tempC }) => tempC));
  return {
    ...step,
    detail: 'Chiller off. Fill from the bottom, gently.',
    start: { by: 'temperature', direction: 'falling', tempC: lowestC },
    acts: ['chiller-off'],
  };
}

const goesIntoKeg = (addition: Addition) => addition.in.at === 'transfer';

function intoTheKeg({ additions }: RecipeDocument): StepDraft[] {
  const into = additions.filter(goesIntoKeg);
  if (into.length === 0) return [];
  const hasAcid = into.some(({ kind }) => kind === 'acid');
  return [
    {
      id: 'keg-in',
      kind: 'dose',
      title: 'Into the keg',
      ...(into.some(isInBag) ? { detail: 'In a sanitised bag, on a string.' } : {}),
      amounts: amountsOf(into),
      ...(hasAcid ? { cautions: ['acid'] } : {}),
    },
  ];
}

/** What stands in the keg for a time comes out by hand: nobody waits a day at the sheet. */
function outOfTheKeg({ additions }: RecipeDocument): StepDraft[] {
  const out = additions.filter((addition) => goesIntoKeg(addition) && 'out' in addition && addition.out.at === 'timer');
  if (out.length === 0) return [];
  const when = out.map((addition) => `${addition.name} after ${standsFor(addition)}`).join(', ');
  return [
    {
      id: 'keg-out',
      kind: 'remove',
      title: 'Out of the keg',
      detail: `Shut the gas and vent first. ${clipped(when)}.`,
      cautions: ['pressure', 'co2', ...(out.some(({ kind }) => kind === 'hops') ? (['dogs'] as const) : [])],
    },
  ];
}

/** "90 min", "24 h". */
function standsFor(addition: Addition): string {
  const durationS = 'out' in addition && addition.out.at === 'timer' ? addition.out.durationS : 0;
  const minutes = Math.max(1, Math.round(durationS / 60));
  return minutes < 120 ? `${minutes} min` : `${Number((minutes / 60).toFixed(1))} h`;
}

function cleanDown({ additions }: RecipeDocument): StepDraft {
  const hops = additions.some(({ kind }) => kind === 'hops');
  return {
    id: 'clean',
    kind: 'clean',
    title: 'Clean down',
    detail: hops ? 'Heat off and gas shut? Bag and bin the hops.' : 'Heat off and gas shut?',
    cautions: hops ? ['dogs', 'burner'] : ['burner'],
  };
}

function mayHoldCaffeine(addition: Addition): boolean {
  if (addition.kind !== 'tea') return false;
  return addition.caffeineMgPerG === undefined ? addition.tea !== 'herbal' : addition.caffeineMgPerG > 0;
}

function setTheGas(document: RecipeDocument, altitudeM: number): StepDraft {
  const { volumes, tempC } = document.gas;
  return {
    id: 'gas',
    kind: 'charge',
    title: 'Set the gas',
    detail: `For ${volumes} volumes. Set it when the keg is cold; the regulator stays open.`,
    settings: [
      { label: 'gauge', quantity: 'pressureKPa', value: gaugeKPa(document, altitudeM) },
      { label: 'keg at', quantity: 'tempC', value: tempC },
    ],
    cautions: ['pressure', 'co2'],
  };
}

/** Whole kilopascal: no regulator shows less. Never below zero: then the drink holds its gas without any. */
function gaugeKPa({ gas: { volumes, tempC } }: RecipeDocument, altitudeM: number): number {
  const pressureKPa = chargeGaugeKPa({ volumes, tempC, stationKPa: atmosphericPressureKPa(altitudeM) });
  if (pressureKPa === null)
    throw new RangeError(`No pressure here gives ${volumes} volumes at ${tempC} °C: plan less gas.`);
  return Math.max(0, Math.round(pressureKPa));
}
