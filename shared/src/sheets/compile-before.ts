import { outStep, standStep } from './compile-event.js';
import { amountsOf, clipped, kindTitle, watersInWords, type Namer } from './compile-words.js';
import { isColdSteep, timedFromFill } from './day-order.js';
import type { IngredientKind, RecipeDocument } from './recipe.js';
import type { StepDraft } from './step-order.js';

/** The kit, the water, and what goes into it cold: pH is read before leaf comes in. */
export function beforeTheHeat(document: RecipeDocument, name: Namer): StepDraft[] {
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
      detail: `${clipped(watersInWords(document))}. Probe in mid-liquid, away from the wall and the base.`,
      settings: [{ label: 'water', quantity: 'volumeL', value: document.waterL }],
    },
    ...lightHeat(document),
    ...doses(document),
    measurePh(document),
    ...coldLeaf(document),
    ...coldOuts(document, name),
  ];
}

function lightHeat(document: RecipeDocument): StepDraft[] {
  if (isColdSteep(document)) return [];
  return [
    {
      ...{ id: 'light-heat', kind: 'heat', title: 'Light the heat', detail: 'Lid on.' },
      ...{ acts: ['heat-on', 'lid-on'], cautions: ['burner'] },
    },
  ];
}

/** A step for what of a kind goes into the cold water; none when nothing does. */
function coldStep(document: RecipeDocument, kind: IngredientKind, draft: StepDraft): StepDraft[] {
  const additions = document.additions.filter((addition) => addition.kind === kind && addition.in.at === 'fill');
  return additions.length > 0 ? [{ ...draft, amounts: amountsOf(additions) }] : [];
}

function doses(document: RecipeDocument): StepDraft[] {
  return [
    ...coldStep(document, 'salt', {
      ...{ id: 'salts', kind: 'dose', title: 'Salts in', detail: 'Stir until clear.', acts: ['stirred'] },
    }),
    ...coldStep(document, 'acid', {
      ...{ id: 'acid', kind: 'dose', title: 'Acid in', detail: 'Stir for a minute.', acts: ['stirred'] },
      cautions: ['acid'],
    }),
  ];
}

function measurePh({ targets: { waterPh } }: RecipeDocument): StepDraft {
  return {
    id: 'ph',
    kind: 'measure',
    title: 'Measure pH',
    detail: `Cool a sample to room temperature first. Wanted: pH ${waterPh.min} to ${waterPh.max}.`,
    asks: 'pH',
    done: { by: 'measurement', quantity: 'pH', ...waterPh },
  };
}

function coldLeaf(document: RecipeDocument): StepDraft[] {
  const step = (kind: 'tea' | 'hops' | 'other'): StepDraft => ({
    id: `${kind}-cold`,
    kind: 'add',
    title: `${kindTitle[kind]} in`,
    ...(kind === 'other' ? {} : { acts: [`${kind}-in`] }),
  });
  return (['tea', 'hops', 'other'] as const).flatMap((kind) => coldStep(document, kind, step(kind)));
}

/** In a hot recipe, what stands in the cold water for a time; in a cold one the clock of the steep has it. */
function coldOuts(document: RecipeDocument, name: Namer): StepDraft[] {
  if (isColdSteep(document)) return [];
  let atS = 0;
  return timedFromFill(document).flatMap(({ afterS, additions }) => {
    const stand = standStep(name('cold-stand'), afterS - atS);
    atS = afterS;
    return [stand, outStep(additions, { name, several: new Set() })];
  });
}

/** Coil in and up to the steep. */
export function theHeat(document: RecipeDocument): StepDraft[] {
  if (isColdSteep(document)) return [];
  const hasTea = document.additions.some(({ kind, in: { at } }) => kind === 'tea' && at !== 'fill');
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
      title: 'Heat to steep',
      done: { by: 'temperature', direction: 'rising', tempC: document.steepC },
      meanwhile: [
        ...(hasTea ? [{ id: 'weigh-tea', text: 'weigh the tea into its bag' }] : []),
        { id: 'lay-out', text: 'lay out gloves, tongs and a tray' },
      ],
    },
  ];
}
