import { EU_CAFFEINE_LABEL_MG_PER_L, showBand, steepWindows } from '../figures/index.js';
import { contactMs } from './drink-plan.js';
import { hopsOf, teasOf, type Hops, type Leaf, type RowContext } from './figure-row.js';
import type { DeskWarning } from './types.js';
import { pathOf, warning, wordsIn } from './warning.js';

/** Above this oils leave the pot with the steam; a judgement. */
const AROMA_C = 65;
/** Aroma and bitterness of hops drop from here. */
const OLD_INDEX = 0.4;
/** Whoever asks for less has "caffeine-free" in mind, mg/L. */
const FREE_MG_PER_L = 20;

export function leafWarnings(context: RowContext): DeskWarning[] {
  const { document } = context;
  return [
    ...teasOf(document).flatMap((leaf, index) => steepWarnings(context, leaf, index)),
    ...coldTimerWarnings(context),
    ...caffeineWarnings(context),
    ...hopsOf(document).flatMap((hops) => hopWarnings(context, hops)),
    ...orderWarnings(context),
    ...kegWarnings(context),
  ];
}

function steepWarnings({ document, figures, day, units }: RowContext, leaf: Leaf, index: number): DeskWarning[] {
  const steep = figures.tea.steeps[index];
  const window = steepWindows[leaf.tea];
  const { inAtMs, outAtMs } = contactMs(day, leaf.id);
  const path = pathOf(document, leaf, 'out');
  if (!steep || leaf.in.at === 'transfer') return [];
  if (outAtMs <= inAtMs) {
    return [
      warning(`steep-untimed.${leaf.id}`, 'care', path, {
        what: `Nothing says how long ${leaf.name} stays in.`,
        why: 'Without a time no caffeine and no steep can be worked out: the figures count none.',
        act: 'Give it a time.',
      }),
    ];
  }
  if (!window || !steep.linesHold || steep.verdict === 'good') return [];
  const steeped = `${leaf.name} steeps for as much as ${steep.steepDoseMin.toFixed(1)} minutes at ${wordsIn(units).temp(80)}`;
  const range = `${window.from} to ${window.to}`;
  const name = (id: string) => `${id}.${leaf.id}`;
  if (steep.verdict === 'short') {
    return [
      warning(name('steep-short'), 'note', path, {
        what: `${steeped}; ${range} is usual.`,
        why: 'Caffeine comes out first and body later: a short steep is thin.',
        act: 'Steep longer or hotter, or choose it on purpose.',
      }),
    ];
  }
  const why = 'Caffeine and what is pleasant are out by then; what still comes is tannin, and nothing sweet covers it.';
  if (steep.verdict === 'long') {
    return [
      warning(name('steep-long'), 'note', path, {
        what: `${steeped}, past the usual ${range}.`,
        why,
        act: 'Take it out sooner, or taste on the way.',
      }),
    ];
  }
  const line = steep.verdict === 'red' ? window.red : window.amber;
  return [
    warning(name(`steep-${steep.verdict}`), 'care', path, {
      what: `${steeped}, past the ${steep.verdict} line at ${line}.`,
      why,
      act: 'Take it out sooner, or steep it cooler.',
    }),
  ];
}

/** What went in cold heats up with the water: its clock must not outlast that. */
function coldTimerWarnings({ document, day, units }: RowContext): DeskWarning[] {
  return document.additions.flatMap((one) => {
    if (one.in.at !== 'fill' || !('out' in one) || one.out.at !== 'timer') return [];
    const { inAtMs, outAtMs } = contactMs(day, one.id);
    const hotAfterS = (outAtMs - inAtMs) / 1000;
    if (hotAfterS >= one.out.durationS - 1) return [];
    const { temp, span } = wordsIn(units);
    return [
      warning(`cold-timer.${one.id}`, 'care', pathOf(document, one, 'out'), {
        what: `${one.name} goes in cold for ${span(one.out.durationS)}, and the water is at ${temp(document.steepC)} after ${span(hotAfterS)}.`,
        why: 'The heat is lit as soon as the kettle is full. The figures take it out when the steep is reached; the run sheet waits for its clock, over the heat.',
        act: 'Give it a shorter time, or let it stand cold as a step of your own before the heat is lit.',
      }),
    ];
  });
}

function caffeineWarnings({ document, figures, units }: RowContext): DeskWarning[] {
  const teas = teasOf(document);
  if (teas.length === 0) return [];
  const { caffeineMgPerL: caffeine, caffeineLine } = figures.tea;
  const { mgPerL } = wordsIn(units);
  const most = document.targets.caffeineMostMgPerL;
  const mostLeaf = [...teas].sort((a, b) => b.massG - a.massG)[0] ?? null;
  const mostLeafPath = pathOf(document, mostLeaf, 'massG');
  const isGuessed = teas.some(({ tea, caffeineMgPerG }) => tea === 'herbal' && caffeineMgPerG === undefined);
  return [
    ...(caffeineLine === 'below'
      ? []
      : [
          warning('caffeine-label', 'care', mostLeafPath, {
            what: `Caffeine is planned at ${showBand(caffeine)} mg/L: ${caffeineLine === 'above' ? 'above' : 'perhaps above'} the line of ${EU_CAFFEINE_LABEL_MG_PER_L} mg/L.`,
            why: 'Above it the EU asks for "high caffeine content" on the label, unless the drink is made from tea and its name says tea.',
            act: 'Take less leaf or a shorter steep, have it measured, or look at the name with your local food authority.',
          }),
        ]),
    ...(most !== undefined && caffeine.value > most
      ? [
          warning('caffeine-above-target', 'care', 'targets.caffeineMostMgPerL', {
            what: `Caffeine is planned at ${mgPerL(caffeine.value)}; you want at most ${mgPerL(most)}.`,
            why: 'It follows the grams of leaf, its kind and the steep.',
            act: 'Take less leaf, or a blend with a herb.',
          }),
        ]
      : []),
    ...(caffeine.high > 0 && (isGuessed || (most !== undefined && most <= FREE_MG_PER_L))
      ? [
          warning('caffeine-free', 'care', null, {
            what: 'This drink cannot be called caffeine-free.',
            why: 'It holds tea. The kind of tea says little about how much caffeine is in it.',
            act: 'Say that it holds caffeine, or leave the tea out.',
          }),
        ]
      : []),
    ...(caffeine.high === 0 && isGuessed
      ? [
          warning('caffeine-not-measured', 'note', null, {
            what: 'Herbs count as without caffeine here; nobody measured these.',
            why: 'Rooibos and most herbs have none, but mate, guayusa and yaupon do.',
            act: 'Type the caffeine of such a herb, and call a drink caffeine-free only when a laboratory found none.',
          }),
        ]
      : []),
  ];
}

function hopWarnings({ document, day, units }: RowContext, hops: Hops): DeskWarning[] {
  const { temp } = wordsIn(units);
  const mark = day.marks.find(({ kind, additionId }) => kind === 'in' && additionId === hops.id);
  const hottestC = Math.max(mark?.tempC ?? 0, ...(hops.in.at === 'fill' ? day.curve.map(({ tempC }) => tempC) : []));
  const { storageIndex } = hops;
  return [
    ...(hottestC > AROMA_C
      ? [
          warning(`hops-hot.${hops.id}`, 'care', pathOf(document, hops, 'in'), {
            what: `${hops.name} meets ${temp(hottestC)}; aroma keeps below ${temp(AROMA_C)}.`,
            why: 'The oils go off with the steam, the hotter and the wider the pot the more. How much cannot be worked out.',
            act: 'Let it fall further before they go in, and keep the lid on.',
          }),
        ]
      : []),
    ...(storageIndex !== undefined && storageIndex > OLD_INDEX
      ? [
          warning(`hops-old.${hops.id}`, 'care', pathOf(document, hops, 'storageIndex'), {
            what: `${hops.name} is old: its storage index is ${storageIndex}.`,
            why: 'From 0.4 up aroma drops, alpha acids are lost, and humulinones make it more bitter than its alpha says.',
            act: 'Smell it first, type the alpha of today, or take a fresher lot.',
          }),
        ]
      : []),
  ];
}

/** Conditions that the falling temperature meets at once, or the wrong way round. */
function orderWarnings({ document, units }: RowContext): DeskWarning[] {
  const { temp } = wordsIn(units);
  return document.additions.flatMap((one) => {
    if (one.in.at !== 'falling') return [];
    const isCaughtAtOnce = one.in.tempC >= document.steepC;
    const isOutFirst = 'out' in one && one.out.at === 'falling' && one.out.tempC >= one.in.tempC;
    return [
      ...(isCaughtAtOnce
        ? [
            warning(`catch-above-steep.${one.id}`, 'note', pathOf(document, one, 'in.tempC'), {
              what: `${one.name} is to go in at ${temp(one.in.tempC)}, and the steep is at ${temp(document.steepC)}.`,
              why: 'The temperature never falls through it: it goes in as soon as the chiller is on.',
              act: 'Choose a temperature below the steep.',
            }),
          ]
        : []),
      ...(isOutFirst
        ? [
            warning(`out-before-in.${one.id}`, 'care', pathOf(document, one, 'out'), {
              what: `${one.name} is to come out before the temperature is low enough to put it in.`,
              why: 'It would be in for no time; the figures count none.',
              act: 'Take it out at a lower temperature, or by the clock.',
            }),
          ]
        : []),
    ];
  });
}

/** What goes into the keg was in no heat, and its time there is in no figure. */
function kegWarnings({ document }: RowContext): DeskWarning[] {
  const cold = document.additions.filter((one) => one.in.at === 'transfer' && 'out' in one);
  const first = cold[0];
  if (!first) return [];
  return [
    warning('added-cold', 'care', pathOf(document, first, 'in'), {
      what: `${cold.map(({ name }) => name).join(', ')} goes into the keg cold.`,
      why: 'Nothing heats it any more, so it brings its germs along; and how long it stays is in no figure of this page.',
      act: 'Sanitise bag and string, take it out after a day or two, taste daily. Your local food code comes first.',
    }),
  ];
}
