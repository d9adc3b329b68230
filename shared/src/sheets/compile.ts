import { atmosphericPressureKPa, chargeGaugeKPa } from '../figures/index.js';
import type { IngredientKind, RecipeDocument } from './recipe.js';
import { runSheetSchema, type RunSheet, type Step } from './step.js';

/** What the sheet needs to know of the kit it is brewed on. */
export interface SheetKit {
  altitudeM: number;
  /** Seconds this brewer needs from alert to act. */
  reachS: number;
}

type StepDraft = Partial<Step> & Pick<Step, 'id' | 'kind' | 'title'>;

/**
 * The run sheet of a revision on this kit: every step with its conditions, amounts and cautions. The gas pressure is
 * computed for this drink (nearly water) at its temperature and altitude, not read from a beer chart.
 */
export function compileSheet(document: RecipeDocument, kit: SheetKit): RunSheet {
  const amounts = (kind: IngredientKind) =>
    document.additions
      .filter((addition) => addition.kind === kind)
      .map(({ name, massG, bag }) => ({ name, massG, ...(bag ? { bag } : {}) }));
  const { steep, hops, gas, targetPh } = document;

  const drafts: StepDraft[] = [
    {
      id: 'check-kit',
      kind: 'prepare',
      title: 'Check the kit',
      detail: 'Keg sanitised, purged and vented. Kettle clean. Probe read 0 in ice water.',
      cautions: ['pressure', 'co2'],
    },
    {
      id: 'fill',
      kind: 'fill',
      title: 'Fill the kettle',
      detail: `${document.waterName}. Probe in mid-liquid, away from the wall and the base.`,
      settings: [{ label: 'water', quantity: 'volumeL', value: document.waterL }],
    },
    {
      id: 'light-heat',
      kind: 'heat',
      title: 'Light the heat',
      detail: 'Lid on.',
      acts: ['heat-on', 'lid-on'],
      cautions: ['burner'],
    },
    {
      id: 'salts',
      kind: 'dose',
      title: 'Salts in',
      detail: 'Stir until clear.',
      amounts: amounts('salt'),
      acts: ['stirred'],
    },
    {
      id: 'acid',
      kind: 'dose',
      title: 'Acid in',
      detail: 'Stir for a minute.',
      amounts: amounts('acid'),
      acts: ['stirred'],
      cautions: ['acid'],
    },
    {
      id: 'ph',
      kind: 'measure',
      title: 'Measure pH',
      detail: `Cool a sample to room temperature first. Wanted: pH ${targetPh.min} to ${targetPh.max}.`,
      asks: 'pH',
      done: { by: 'measurement', quantity: 'pH', ...targetPh },
    },
    {
      id: 'coil-in',
      kind: 'prepare',
      title: 'Coil in',
      detail: 'It is sanitised by the hot water, and takes some heat out of it.',
      acts: ['coil-in'],
      cautions: ['scald'],
    },
    {
      id: 'heat',
      kind: 'heat',
      title: 'Heat to the steep',
      done: { by: 'temperature', direction: 'rising', tempC: steep.tempC },
      meanwhile: [
        { id: 'weigh-tea', text: 'weigh the tea into its bag' },
        { id: 'lay-out', text: 'lay out gloves, tongs and a tray' },
      ],
    },
    {
      id: 'tea-in',
      kind: 'add',
      title: 'Tea in',
      detail: 'Heat off, bag under, lid back on.',
      amounts: amounts('tea'),
      acts: ['heat-off', 'tea-in'],
      cautions: ['scald'],
    },
    {
      id: 'steep',
      kind: 'steep',
      title: 'Steep',
      done: { by: 'timer', durationS: steep.durationS },
      meanwhile: [
        { id: 'weigh-hops', text: 'weigh the hops into their bag' },
        { id: 'hoses', text: 'check the hoses of the chiller' },
      ],
    },
    {
      id: 'tea-out',
      kind: 'remove',
      title: 'Tea out',
      detail: 'Lift, let it drain, do not squeeze.',
      acts: ['tea-out'],
      cautions: ['scald'],
    },
    {
      id: 'chill',
      kind: 'chill',
      title: 'Chiller on',
      detail: 'Stir gently while it runs.',
      acts: ['lid-off', 'chiller-on'],
    },
    {
      id: 'hops-in',
      kind: 'catch',
      title: 'Hops in',
      start: { by: 'temperature', direction: 'falling', tempC: hops.inC },
      amounts: amounts('hops'),
      acts: ['hops-in'],
      cautions: ['scald'],
      meanwhile: [
        { id: 'tea-bag', text: 'rinse the tea bag' },
        { id: 'sanitiser', text: 'fill the sanitiser' },
      ],
    },
    {
      id: 'hops-out',
      kind: 'remove',
      title: 'Hops out',
      detail: 'Lift and let it drain.',
      start: { by: 'temperature', direction: 'falling', tempC: hops.outC },
      acts: ['hops-out'],
      cautions: ['dogs'],
    },
    {
      id: 'transfer',
      kind: 'transfer',
      title: 'Transfer to the keg',
      detail: 'Chiller off. Fill from the bottom, gently.',
      start: { by: 'temperature', direction: 'falling', tempC: document.transferC },
      acts: ['chiller-off'],
      cautions: ['allergens'],
    },
    {
      id: 'purge',
      kind: 'transfer',
      title: 'Purge, close, fridge',
      detail: 'Purge the headspace three times, then into the fridge.',
      cautions: ['co2', 'pressure', 'lift', 'cold'],
    },
    {
      id: 'clean',
      kind: 'clean',
      title: 'Clean down',
      detail: 'Heat off and gas shut? Bag and bin the hops.',
      cautions: ['dogs', 'burner'],
    },
    {
      id: 'gas',
      kind: 'charge',
      title: 'Set the gas',
      detail: `For ${gas.volumes} volumes. Set it when the keg is cold; the regulator stays open.`,
      settings: [
        { label: 'gauge', quantity: 'pressureKPa', value: gaugeKPa(document, kit) },
        { label: 'keg at', quantity: 'tempC', value: gas.tempC },
      ],
      cautions: ['pressure', 'co2'],
    },
    {
      id: 'look-again',
      kind: 'measure',
      title: 'Look again tomorrow',
      detail: 'Does the gauge still stand where you set it? No hiss, no drip?',
      asks: 'pressureKPa',
      cautions: ['pressure'],
    },
    {
      id: 'taste',
      kind: 'taste',
      title: 'Taste and note',
      detail: 'A small cold glass. Give it 1 to 9, and write what you taste.',
      asks: 'tasteScore',
      cautions: ['caffeine'],
    },
    {
      id: 'next-time',
      kind: 'taste',
      title: 'What to change next time',
      detail: 'One change at a time. Write it as a note.',
    },
  ];

  const steps = drafts
    .filter(({ kind, amounts: weighed }) => kind !== 'dose' || (weighed?.length ?? 0) > 0)
    .map((draft) => ({ start: { by: 'hand' }, done: { by: 'hand' }, reachS: kit.reachS, ...draft }));
  return runSheetSchema.parse({ steps, volumeL: document.volumeL });
}

/** Whole kilopascal: no regulator shows less. Never below zero: then the drink holds its gas without any. */
function gaugeKPa({ gas }: RecipeDocument, { altitudeM }: SheetKit): number {
  const { volumes, tempC } = gas;
  const pressureKPa = chargeGaugeKPa({ volumes, tempC, stationKPa: atmosphericPressureKPa(altitudeM) });
  if (pressureKPa === null)
    throw new RangeError(`No pressure here gives ${volumes} volumes at ${tempC} °C: plan less gas.`);
  return Math.max(0, Math.round(pressureKPa));
}
