import {
  atmosphericPressureKPa,
  blendedWater,
  waterFromReport,
  type DrinkPlan,
  type HopAddition,
  type TeaAddition,
} from '../figures/index.js';
import type { RecipeDocument } from '../sheets/index.js';
import type { DeskKit, PlannedDay } from './types.js';
import { altitudeOf, usual } from './usual-kit.js';

/** When an addition is in the liquid, ms from the first flame; an end that comes before its start is no time at all. */
export function contactMs(day: PlannedDay, additionId: string): { inAtMs: number; outAtMs: number } {
  const atMs = (kind: 'in' | 'out') =>
    day.marks.find((mark) => mark.kind === kind && mark.additionId === additionId)?.atMs;
  const inAtMs = atMs('in') ?? 0;
  return { inAtMs, outAtMs: Math.max(inAtMs, atMs('out') ?? inAtMs) };
}

/** A ratio in the recipe comes from a measured pH. */
function baseOf(ratio: number | undefined): Pick<TeaAddition, 'baseMultiplier' | 'isBaseMeasured'> {
  return ratio === undefined ? {} : { baseMultiplier: ratio, isBaseMeasured: true };
}

/** What the figures need to know of a recipe on its planned day. */
export function drinkPlanOf(document: RecipeDocument, kit: DeskKit, day: PlannedDay): DrinkPlan {
  const { additions, assume, waterL, waters, gas } = document;
  const teas = additions.flatMap((one): TeaAddition[] => {
    if (one.kind !== 'tea') return [];
    const { massG, tea, form, caffeineMgPerG } = one;
    const told = caffeineMgPerG === undefined ? {} : { caffeineMgPerG };
    return [{ massG, kind: tea, form, ...told, ...baseOf(assume.teaBaseRatio), ...contactMs(day, one.id) }];
  });
  const hops = additions.flatMap((one): HopAddition[] => {
    if (one.kind !== 'hops') return [];
    const { massG, alphaPercent, storageIndex, form } = one;
    const told = storageIndex === undefined ? {} : { storageIndex };
    return [
      {
        massG,
        alphaPercent,
        isCones: form === 'cones',
        ...told,
        ...baseOf(assume.hopBaseRatio),
        ...contactMs(day, one.id),
      },
    ];
  });
  const acids = additions.flatMap((one) => (one.kind === 'acid' ? [one] : []));
  const firstHopsMs = Math.min(...hops.map(({ inAtMs }) => inAtMs));
  return {
    waterL,
    source: blendedWater(
      waters.map(({ report, percent }) => ({ water: waterFromReport(report), volumeL: (percent / 100) * waterL })),
    ),
    salts: additions.flatMap((one) =>
      one.kind === 'salt'
        ? [{ salt: one.salt, massG: one.massG, ...(one.assayPercent ? { assayPercent: one.assayPercent } : {}) }]
        : [],
    ),
    acids: acids.map(({ acid, massG, strengthPercent }) => ({
      acid,
      massG,
      ...(strengthPercent ? { strengthPercent } : {}),
    })),
    acidAfterHops: acids.length > 0 && acids.every(({ id }) => contactMs(day, id).inAtMs > firstHopsMs),
    teas,
    hops,
    othersG: additions.reduce(
      (sum, { kind, in: { at }, massG }) => (kind === 'other' && at !== 'transfer' ? sum + massG : sum),
      0,
    ),
    curve: day.curve,
    evaporatedL: day.evaporatedL,
    deadSpaceL: kit.kettle?.deadSpaceL ?? 0,
    servingMl: assume.servingMl ?? usual.servingMl,
    gas: { volumes: gas.volumes, tempC: gas.tempC, stationKPa: atmosphericPressureKPa(altitudeOf(kit)) },
  };
}
