import { atmosphericPressureKPa, chargeGaugeKPa } from '../figures/index.js';
import { dayOrder, isColdSteep, type DayEvent } from './day-order.js';
import { inStepOrder, type StepDraft } from './step-order.js';
import type { Addition, IngredientKind, RecipeDocument } from './recipe.js';
import { runSheetSchema, type RunSheet, type StepAmount, type VesselAct } from './step.js';

/** What the sheet needs to know of the kit it is brewed on. */
export interface SheetKit {
  altitudeM: number;
  /** Seconds this brewer needs from alert to act. */
  reachS: number;
}

/** A reading of pH or a dose into cold water happens before the heat; what follows is in the order of the day. */
const amountsOf = (additions: readonly Addition[]): StepAmount[] =>
  additions.map(({ name, massG, bag }) => ({ name, massG, ...(bag ? { bag } : {}) }));

/**
 * The run sheet of a revision on this kit: every step with its conditions, amounts and cautions. The gas pressure is
 * computed for this drink (nearly water) at its temperature and altitude, not read from a beer chart.
 *
 * @throws RangeError when no pressure gives the gas that is asked for.
 */
export function compileSheet(document: RecipeDocument, kit: SheetKit): RunSheet {
  const drafts = inStepOrder(
    [...beforeTheHeat(document), ...theHeat(document), ...theDay(document), ...afterTheDay(document, kit)],
    document.steps,
  );
  const steps = drafts.map((draft) => ({ start: { by: 'hand' }, done: { by: 'hand' }, reachS: kit.reachS, ...draft }));
  return runSheetSchema.parse({ steps, volumeL: document.volumeL });
}

function beforeTheHeat(document: RecipeDocument): StepDraft[] {
  const { waterPh } = document.targets;
  const cold = (kind: IngredientKind) =>
    document.additions.filter((addition) => addition.kind === kind && addition.in.at === 'fill');
  const dose = (kind: IngredientKind, draft: StepDraft): StepDraft[] => {
    const amounts = amountsOf(cold(kind));
    return amounts.length > 0 ? [{ ...draft, amounts }] : [];
  };
  return [
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
      detail: `${watersInWords(document)}. Probe in mid-liquid, away from the wall and the base.`,
      settings: [{ label: 'water', quantity: 'volumeL', value: document.waterL }],
    },
    ...(isColdSteep(document)
      ? []
      : [
          {
            id: 'light-heat',
            kind: 'heat',
            title: 'Light the heat',
            detail: 'Lid on.',
            acts: ['heat-on', 'lid-on'],
            cautions: ['burner'],
          } satisfies StepDraft,
        ]),
    ...dose('salt', { id: 'salts', kind: 'dose', title: 'Salts in', detail: 'Stir until clear.', acts: ['stirred'] }),
    ...dose('acid', {
      id: 'acid',
      kind: 'dose',
      title: 'Acid in',
      detail: 'Stir for a minute.',
      acts: ['stirred'],
      cautions: ['acid'],
    }),
    {
      id: 'ph',
      kind: 'measure',
      title: 'Measure pH',
      detail: `Cool a sample to room temperature first. Wanted: pH ${waterPh.min} to ${waterPh.max}.`,
      asks: 'pH',
      done: { by: 'measurement', quantity: 'pH', ...waterPh },
    },
    ...(['tea', 'hops', 'other'] as const).flatMap((kind) =>
      dose(kind, {
        id: `${kind}-cold`,
        kind: 'add',
        title: `${kindTitle[kind]} in`,
        ...(kind === 'tea' ? { acts: ['tea-in'] } : kind === 'hops' ? { acts: ['hops-in'] } : {}),
      }),
    ),
  ];
}

const kindTitle = { tea: 'Tea', hops: 'Hops', other: 'Aromatics', acid: 'Acid', salt: 'Salts' } as const;

function watersInWords({ waters }: RecipeDocument): string {
  const [only, ...rest] = waters.filter(({ percent }) => percent > 0);
  if (!only) return 'Water';
  if (rest.length === 0) return only.name;
  return [only, ...rest].map(({ name, percent }) => `${percent} % ${name}`).join(', ');
}

function theHeat(document: RecipeDocument): StepDraft[] {
  if (isColdSteep(document)) return [];
  return [
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
      done: { by: 'temperature', direction: 'rising', tempC: document.steepC },
      meanwhile: [
        { id: 'weigh-tea', text: 'weigh the tea into its bag' },
        { id: 'lay-out', text: 'lay out gloves, tongs and a tray' },
      ],
    },
  ];
}

/** From the steep temperature to the keg: what goes in and comes out, by clock first, then by the falling temperature. */
function theDay(document: RecipeDocument): StepDraft[] {
  const { byClock, byFall } = dayOrder(document);
  const name = namer();
  const isCold = isColdSteep(document);
  const steeping: StepDraft[] = [];
  let atS = 0;
  for (const [index, event] of byClock.entries()) {
    if (event.atS > atS) steeping.push(steepStep(name('steep'), event.atS - atS));
    atS = event.atS;
    const draft = eventStep(event, name);
    if (index === 0 && event.kind === 'in' && !isCold) {
      draft.detail = 'Heat off, bag under, lid back on.';
      draft.acts = ['heat-off', ...(draft.acts ?? [])];
    }
    steeping.push(draft);
  }
  if (isCold) return [...steeping, ...byFall.map((event) => eventStep(event, name))];
  const chill: StepDraft = {
    id: 'chill',
    kind: 'chill',
    title: 'Chiller on',
    detail: 'Stir gently while it runs.',
    acts: [...(byClock.length === 0 ? (['heat-off'] as const) : []), 'lid-off', 'chiller-on'],
  };
  const falling = byFall.flatMap((event): StepDraft[] => {
    const draft: StepDraft = {
      ...eventStep(event, name),
      start: { by: 'temperature', direction: 'falling', tempC: event.tempC },
    };
    // Leaf and hops are caught on the fall; an acid can wait for its hand.
    if (event.kind === 'in') draft.kind = 'catch';
    const timed = event.outs.map(({ afterS, additions }) => [
      { ...steepStep(name('contact'), afterS), title: 'Let it stand' },
      eventStep({ kind: 'out', additions }, name),
    ]);
    return [draft, ...timed.flat()];
  });
  return [...steeping, chill, ...falling];
}

function steepStep(id: string, durationS: number): StepDraft {
  return {
    id,
    kind: 'steep',
    title: 'Steep',
    done: { by: 'timer', durationS },
    meanwhile:
      id === 'steep'
        ? [
            { id: 'weigh-hops', text: 'weigh the hops into their bag' },
            { id: 'hoses', text: 'check the hoses of the chiller' },
          ]
        : [],
  };
}

/** Ids that stay the same from revision to revision: "hops-in", then "hops-in-2". */
function namer(): (stem: string) => string {
  const used = new Map<string, number>();
  return (stem) => {
    const count = (used.get(stem) ?? 0) + 1;
    used.set(stem, count);
    return count === 1 ? stem : `${stem}-${count}`;
  };
}

function eventStep(
  { kind, additions }: Pick<DayEvent, 'kind' | 'additions'>,
  name: (stem: string) => string,
): StepDraft {
  const kinds = [...new Set(additions.map((addition) => addition.kind))];
  const stem = kinds.includes('tea') ? 'tea' : kinds.includes('hops') ? 'hops' : (kinds[0] ?? 'other');
  const what = kinds
    .map((each, index) => (index === 0 ? kindTitle[each] : kindTitle[each].toLowerCase()))
    .join(' and ');
  const acts = kinds.flatMap((each): VesselAct[] => (each === 'tea' || each === 'hops' ? [`${each}-${kind}`] : []));
  const id = name(`${stem}-${kind}`);
  if (kind === 'in') {
    return {
      id,
      kind: 'add',
      title: `${what} in`,
      amounts: amountsOf(additions),
      acts,
      cautions: ['scald', ...(kinds.includes('acid') ? (['acid'] as const) : [])],
      meanwhile:
        id === 'hops-in'
          ? [
              { id: 'tea-bag', text: 'rinse the tea bag' },
              { id: 'sanitiser', text: 'fill the sanitiser' },
            ]
          : [],
    };
  }
  const names = additions.length > 1 || id.endsWith('-2') ? `${additions.map((each) => each.name).join(', ')}. ` : '';
  return {
    id,
    kind: 'remove',
    title: `${what} out`,
    detail: `${names}Lift, let it drain, do not squeeze.`,
    acts,
    cautions: kinds.includes('hops') ? ['dogs'] : ['scald'],
  };
}

function afterTheDay(document: RecipeDocument, kit: SheetKit): StepDraft[] {
  const { gas, transferC } = document;
  const intoKeg = document.additions.filter((addition) => addition.in.at === 'transfer');
  return [
    {
      id: 'transfer',
      kind: 'transfer',
      title: 'Transfer to the keg',
      detail: isColdSteep(document) ? 'Fill from the bottom, gently.' : 'Chiller off. Fill from the bottom, gently.',
      ...(isColdSteep(document)
        ? {}
        : {
            start: { by: 'temperature', direction: 'falling', tempC: transferC } as const,
            acts: ['chiller-off'] as const,
          }),
      cautions: ['allergens'],
    } as StepDraft,
    ...(intoKeg.length > 0
      ? [
          {
            id: 'keg-in',
            kind: 'dose',
            title: 'Into the keg',
            detail: 'In a sanitised bag, on a string.',
            amounts: amountsOf(intoKeg),
          } satisfies StepDraft,
        ]
      : []),
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
}

/** Whole kilopascal: no regulator shows less. Never below zero: then the drink holds its gas without any. */
function gaugeKPa({ gas }: RecipeDocument, { altitudeM }: SheetKit): number {
  const { volumes, tempC } = gas;
  const pressureKPa = chargeGaugeKPa({ volumes, tempC, stationKPa: atmosphericPressureKPa(altitudeM) });
  if (pressureKPa === null)
    throw new RangeError(`No pressure here gives ${volumes} volumes at ${tempC} °C: plan less gas.`);
  return Math.max(0, Math.round(pressureKPa));
}
