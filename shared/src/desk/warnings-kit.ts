import {
  allowedGaugeKPa,
  boilingPointAtAltitudeC,
  coolingRule,
  coolingRuleLimit,
  phBand,
  tubeVolumeL,
  volumeAtTemperatureL,
  warmKegGaugeKPa,
} from '../figures/index.js';
import { isColdSteep, type RecipeDocument } from '../sheets/index.js';
import { YIELD_SHARE } from './figure-rows.js';
import type { RowContext } from './figure-row.js';
import { chillOfDay, isChilled } from './planned-day.js';
import { phBandOf } from './still-ph.js';
import { altitudeOf, dayKit, usual } from './usual-kit.js';
import type { DeskWarning, PlannedDay } from './types.js';
import { CODES_FIRST, warning, wordsIn } from './warning.js';

/** Free under the rim for waves and a lifted bag, share of the kettle (common practice, no source). */
const HEADROOM_SHARE = 0.05;
/** Room that a gram of leaf or hops takes beside the water it holds, L (common practice, no source). */
const LEAF_L_PER_G = 0.0008;
/** A kitchen in summer. */
const WARM_C = 30;
const WARM_DRINK_C = 21;
const KEG_HEADSPACE_SHARE = 0.05;
const SEA_LEVEL_KPA = 101.325;

export function kitWarnings(context: RowContext): DeskWarning[] {
  return [
    ...neverWarnings(context),
    ...fullWarnings(context),
    ...coolingWarnings(context),
    ...chillerWarnings(context),
    ...yieldWarnings(context),
    ...kegWarnings(context),
    ...coldSteepWarnings(context),
  ];
}

function neverWarnings(context: RowContext): DeskWarning[] {
  return [...notHotWarnings(context), ...notColdWarnings(context)];
}

function notHotWarnings({ day, kit, units }: RowContext): DeskWarning[] {
  const { never } = day;
  if (never?.stage !== 'heat') return [];
  const { temp } = wordsIn(units);
  const limit = temp(never.limitC);
  const wanted = temp(never.wantedC);
  if (never.limitC === boilingPointAtAltitudeC(altitudeOf(kit))) {
    return [
      warning('boils-below-steep', 'care', 'steepC', {
        what: `Water boils at ${limit} here, below the steep of ${wanted}.`,
        why: 'At this altitude water cannot get hotter; the weather moves that by less than a degree. The figures are planned at the boil.',
        act: 'Plan a cooler and longer steep.',
      }),
    ];
  }
  return [
    warning('kettle-too-weak', 'care', 'steepC', {
      what: `This kettle gets to ${limit} and no further, below the steep of ${wanted}.`,
      why: 'There it loses as much heat as reaches it. The figures are planned until near there.',
      act: 'Put the lid on, take less water, or a stronger burner.',
    }),
  ];
}

function notColdWarnings(context: RowContext): DeskWarning[] {
  const missed = missedOnTheFall(context);
  if (!missed) return [];
  const { document, kit, units } = context;
  const { temp } = wordsIn(units);
  const isChiller = isChilled(document, kit);
  return [
    warning(isChiller ? 'coolant-too-warm' : 'room-too-warm', 'care', fallPath(document, missed.wantedC), {
      what: `The pot never falls to ${temp(missed.wantedC)}: ${isChiller ? 'its coolant' : 'the room'} leaves it at ${temp(missed.limitC)}.`,
      why: 'A pot comes no colder than what cools it. The figures are planned until near there.',
      act: isChiller
        ? 'Plan a warmer temperature, colder coolant, or ice around the pot.'
        : 'Plan a warmer temperature, or choose a chiller.',
    }),
  ];
}

/** What the day says, or what it could not say any more because it was never hot enough either. */
function missedOnTheFall({ document, kit, day }: RowContext): { limitC: number; wantedC: number } | null {
  if (!day.never || isColdSteep(document)) return null;
  if (day.never.stage === 'chill') return day.never;
  const limitC = chillOfDay(document, kit)?.surroundC ?? dayKit(document, kit).roomC;
  const asked = document.additions.flatMap((one) => [one.in, ...('out' in one ? [one.out] : [])]);
  const wanted = [document.transferC, ...asked.flatMap((each) => (each.at === 'falling' ? [each.tempC] : []))];
  const missed = wanted.filter((tempC) => tempC <= limitC);
  return missed.length > 0 ? { limitC, wantedC: Math.max(...missed) } : null;
}

/** The field that asks for a temperature on the fall. */
function fallPath({ additions, transferC }: RecipeDocument, wantedC: number): string {
  if (transferC === wantedC) return 'transferC';
  const isAsked = (condition: { at: string; tempC?: number }) =>
    condition.at === 'falling' && condition.tempC === wantedC;
  const inIndex = additions.findIndex((one) => isAsked(one.in));
  if (inIndex !== -1) return `additions.${inIndex}.in.tempC`;
  const outIndex = additions.findIndex((one) => 'out' in one && isAsked(one.out));
  return outIndex === -1 ? 'transferC' : `additions.${outIndex}.out.tempC`;
}

/** Hot water is more than cold, and leaf and coil want their room. */
function fullWarnings({ document, kit, day, units }: RowContext): DeskWarning[] {
  const { kettle, chiller } = kit;
  if (!kettle) return [];
  const hottestC = Math.max(...day.curve.map(({ tempC }) => tempC));
  const leafG = document.additions.reduce((sum, one) => sum + ('out' in one ? one.massG : 0), 0);
  const coilL = chiller ? tubeVolumeL(chiller.lengthM, usual.coilOuterMm) : 0;
  const hotL = volumeAtTemperatureL(document.waterL, 20, hottestC);
  const fullL = hotL + LEAF_L_PER_G * leafG + coilL;
  const most = kettle.volumeL * (1 - HEADROOM_SHARE);
  if (fullL <= most) return [];
  const { volume, temp } = wordsIn(units);
  const parts = [...(leafG > 0 ? ['leaf'] : []), ...(coilL > 0 ? ['coil'] : [])].join(' and ');
  return [
    warning('kettle-too-full', fullL > kettle.volumeL ? 'danger' : 'care', 'waterL', {
      what: `${volume(document.waterL)} of water ${parts ? `with ${parts} ` : ''}take ${volume(fullL)} at ${temp(hottestC)}; the kettle holds ${volume(kettle.volumeL)}.`,
      why: 'Hot water expands by 3 %, and a bag that is lifted makes waves. What spills over scalds.',
      act: `Fill at most ${volume(Math.max(0, document.waterL - (fullL - most)))}, or take a larger kettle.`,
    }),
  ];
}

/** The planned fall against the rule for food that needs time and temperature control. */
function coolingWarnings(context: RowContext): DeskWarning[] {
  const { document, day, figures, units } = context;
  const { acid } = figures;
  if (isColdSteep(document) || !acid) return [];
  const { temp, span } = wordsIn(units);
  const asks = phBand(Math.min(14, Math.max(0, phBandOf(document, acid.phStill).high)));
  const mustRule = asks === 'assessment' || asks === 'low-acid';
  const grade = mustRule ? 'danger' : 'note';
  const why = `The US Food Code asks for ${temp(57)} to ${temp(WARM_DRINK_C)} within 2 hours where a drink needs time and temperature control${mustRule ? ', and this one may' : '; for others it is a good guide'}.`;
  const { startsAtMs, toWarmS, outcome } = coolingRule(fallOf(day));
  const endC = day.curve.at(-1)?.tempC ?? 0;
  if (startsAtMs === null || (outcome !== 'fail' && toWarmS === null && endC <= WARM_DRINK_C)) return [];
  if (outcome === 'fail') {
    const lastMs = day.curve.at(-1)?.atMs ?? startsAtMs;
    return [
      warning('cooling-too-slow', grade, 'transferC', {
        what: `The plan takes ${span(toWarmS ?? (lastMs - startsAtMs) / 1000)} from ${temp(57)} to ${temp(Math.max(endC, WARM_DRINK_C))}.`,
        why,
        act: `Colder coolant, more flow, stirring, ice, or a smaller pot. ${CODES_FIRST}`,
      }),
    ];
  }
  if (toWarmS !== null) return [];
  const leftS = coolingRuleLimit.hotToWarmS - ((day.curve.at(-1)?.atMs ?? 0) - startsAtMs) / 1000;
  return [
    warning('cooling-goes-on', grade === 'danger' ? 'care' : 'note', 'transferC', {
      what: `The plan ends at ${temp(endC)}: the keg has ${span(leftS)} left to reach ${temp(WARM_DRINK_C)}.`,
      why,
      act: `Chill further before the transfer, or put the keg into ice water. ${CODES_FIRST}`,
    }),
  ];
}

/** From the hottest of the day on: how long it heats is not how long it cools. */
function fallOf({ curve }: PlannedDay): PlannedDay['curve'] {
  const hottestC = Math.max(...curve.map(({ tempC }) => tempC));
  return curve.slice(curve.findLastIndex(({ tempC }) => tempC === hottestC));
}

function chillerWarnings({ document, kit, day, units }: RowContext): DeskWarning[] {
  if (isColdSteep(document) || isChilled(document, kit) || day.never) return [];
  const fromMs = day.marks.find(({ kind }) => kind === 'chill')?.atMs ?? 0;
  const fallS = ((day.curve.at(-1)?.atMs ?? fromMs) - fromMs) / 1000;
  const { span, temp } = wordsIn(units);
  return [
    warning('no-chiller', 'care', null, {
      what: `Without a chiller the pot takes ${span(fallS)} to fall to ${temp(document.transferC)}.`,
      why: 'It cools by itself: leaf and hops are in for all of that time, and it stays warm for long.',
      act: 'Choose a chiller, or plan with ice around the pot.',
    }),
  ];
}

function yieldWarnings({ document, figures, units }: RowContext): DeskWarning[] {
  const { value, low } = figures.yield;
  const { volumeL, waterL } = document;
  const { volume } = wordsIn(units);
  if (value === 0) {
    return [
      warning('no-drink-left', 'care', 'waterL', {
        what: 'Nothing is left for the keg.',
        why: 'Leaf, hops, steam and the dead space of the kettle take all the water.',
        act: 'Fill more water, or take less leaf and hops.',
      }),
    ];
  }
  if (value >= volumeL * (1 - YIELD_SHARE)) return [];
  const lost = waterL - value;
  return [
    warning('yield-low', 'care', 'waterL', {
      what: `${volume(value)} come out (at least ${volume(low)}); you want ${volume(volumeL)}.`,
      why: 'Leaf holds 4 times its mass of water, hops 7 times (cones 10); steam and the kettle keep some.',
      act: `Fill about ${volume(volumeL + lost)} of water, or plan less drink.`,
    }),
  ];
}

/** What the gas asks of the keg; the keg itself is chosen with the batch. */
function kegWarnings({ document, plan, figures, units }: RowContext): DeskWarning[] {
  const { volumes, tempC } = document.gas;
  const gaugeKPa = figures.gas.gaugeKPa ?? 0;
  const { gaugeKPa: allowedKPa } = allowedGaugeKPa(null);
  const { pressure, temp } = wordsIn(units);
  const drinkL = Math.max(0.001, document.volumeL);
  const closed = { drinkL, headspaceL: KEG_HEADSPACE_SHARE * drinkL, volumes, closedAtC: tempC };
  if (gaugeKPa > allowedKPa) {
    return [
      warning('keg-pressure', 'danger', 'gas.volumes', {
        what: `${volumes} volumes at ${temp(tempC)} need ${pressure(gaugeKPa)} on the gauge.`,
        why: `Some kegs and most plastic ones are only allowed ${pressure(allowedKPa)}.`,
        act: 'Read the pressure stamped on keg and regulator and never pass it. Plan less gas, or charge it colder.',
      }),
    ];
  }
  const warmKPa = warmKegGaugeKPa({ ...closed, stationKPa: plan.gas.stationKPa ?? SEA_LEVEL_KPA }, WARM_C);
  if (warmKPa !== null && warmKPa <= allowedKPa) return [];
  return [
    warning('keg-warms', 'note', 'gas.volumes', {
      what: `Closed and left at ${temp(WARM_C)}, the keg comes to ${warmKPa === null ? 'more than any keg bears' : pressure(warmKPa)}.`,
      why: `Warm drink lets go of its gas. Some kegs are only allowed ${pressure(allowedKPa)}.`,
      act: 'Keep it in the cold, and use a keg with a relief valve and a stamp above that.',
    }),
  ];
}

function coldSteepWarnings({ document, units }: RowContext): DeskWarning[] {
  if (!isColdSteep(document)) return [];
  const { temp } = wordsIn(units);
  return [
    warning('cold-steep', 'care', 'steepC', {
      what: `The leaf steeps cold, at ${temp(document.steepC)}.`,
      why: `No heat goes over leaf and hops. The US Food Code asks for ${temp(5)} within 4 hours where such a drink needs time and temperature control.`,
      act: `Steep in the fridge, sanitise everything, and write down times. ${CODES_FIRST}`,
    }),
  ];
}
