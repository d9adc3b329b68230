import {
  boilingPointAtAltitudeC,
  chillerConstantPerS,
  coilTransferWPerK,
  coolingExponent,
  curveBetween,
  curveTempC,
  evaporatedL,
  mixedTempC,
  potLossW,
  powerLawDurationS,
  specificHeatJPerKgK,
  tubeVolumeL,
  type TemperatureCurve,
} from '../figures/index.js';
import {
  dayOrder,
  isColdSteep,
  type Addition,
  type ChillerFacts,
  type ClockEvent,
  type FallEvent,
  type KettleFacts,
  type RecipeDocument,
} from '../sheets/index.js';
import { DayLine } from './day-line.js';
import { filledKettleJPerK, metalOf } from './kettle-heat.js';
import type { DayMark, DeskKit, PlannedDay } from './types.js';
import { altitudeOf, dayKit, usual, type DayKit } from './usual-kit.js';

/** Weather moves the boiling point by so much: up to here a steep at the boil is meant, K. */
export const BOIL_SLACK_K = 0.8;
/** The coil goes in so long before the steep temperature that the heat makes up for it, K. */
const COIL_BEFORE_K = 5;
/** What never gets there is planned until so near to where it would settle, K. */
const NEAR_LIMIT_K = 2;
/** Where the exponent of an open pot changes, °C. */
const OPEN_STEPS_C = [75, 60] as const;
/** Ends of the pot's heat balance, °C. */
const LOSS_FROM_C = 7;
const LOSS_TO_C = 95;
const HUMIDITY = 0.5;
const LEAST_AIR_KPA = 50;
/** More than this share of the water cannot be boiled off and still leave a drink to compute. */
const MOST_EVAPORATED = 0.9;

/** Everything that the stages of one day share. */
interface Pot {
  kit: DayKit;
  line: DayLine;
  marks: DayMark[];
  never: PlannedDay['never'];
  /** Of what is in the kettle, and the kettle, J/K. */
  heatCapacityJPerK: number;
  chills: ChillLaw | null;
}

/** How the chiller takes the temperature down, by Newton. */
export interface ChillLaw {
  surroundC: number;
  kPerS: number;
}

/**
 * The day as it is planned: cold water, heat, coil, steep, fall, keg; one curve that feeds the same sums as the recorded one
 * later, and a mark for every addition. It never refuses a document: what is never reached is planned until near where it
 * settles, and said in `never`.
 *
 * @param document a valid recipe document.
 * @param kit where it is brewed; without a kettle a usual one of fitting size, without a chiller the pot cools by itself unless the
 * recipe tells a chiller constant.
 * @see heating-time.ts, mixed-temp.ts, pot-loss.ts, power-law-cooling.ts, newton.ts, chiller.ts, evaporated.ts.
 */
export function plannedDay(document: RecipeDocument, kit: DeskKit): PlannedDay {
  const day = dayKit(document, kit);
  if (isColdSteep(document)) return coldDay(document);
  const pot: Pot = {
    kit: day,
    line: new DayLine(day.fillC),
    marks: [],
    never: null,
    heatCapacityJPerK: capacityJPerK(document, day.kettle),
    chills: null,
  };
  mark(pot, 'heat');
  for (const addition of document.additions) if (addition.in.at === 'fill') mark(pot, 'in', addition);
  heat(pot, document, boilingPointAtAltitudeC(altitudeOf(kit)));
  pot.chills = chillOfDay(document, kit);
  const { byClock, byFall } = dayOrder(document);
  steep(pot, byClock);
  fall(pot, byFall, document.transferC);
  timedFromFill(pot, document);
  return finished(pot, document);
}

/** Heat that warms the filled kettle, with what lies in it from the start, by one kelvin, J/K. */
export function capacityJPerK({ waterL, additions }: RecipeDocument, kettle: KettleFacts): number {
  const cold = additions.reduce((sum, one) => sum + (one.in.at === 'fill' ? leafJPerK(one) : 0), 0);
  return filledKettleJPerK(waterL, kettle) + cold;
}

/** Heat of dry leaf, hops or peel, J/K; salts and acids are too little to count. */
function leafJPerK(addition: Addition): number {
  return 'out' in addition ? (addition.massG / 1000) * specificHeatJPerKgK.dryLeaf : 0;
}

function mark(pot: Pot, kind: DayMark['kind'], addition: Addition | null = null): void {
  pot.marks.push({ kind, additionId: addition?.id ?? null, atMs: pot.line.atMs, tempC: pot.line.tempC });
}

/** What the pot loses to the room at a temperature, W/K, with a learned constant where there is one. */
function lossWPerK(pot: Pot, tempC: number): number {
  const { kettle, isLidOn, roomC } = pot.kit;
  if (isLidOn && kettle.coolingConstantPerS !== undefined) return kettle.coolingConstantPerS * pot.heatCapacityJPerK;
  const at = Math.min(LOSS_TO_C, Math.max(LOSS_FROM_C, roomC + 1, tempC));
  return potLossW({ tempC: at, roomC, humidityRatio: HUMIDITY, lid: isLidOn, ...sizeOf(pot) }) / (at - roomC);
}

function sizeOf({ kit: { kettle }, heatCapacityJPerK }: Pot): { diameterM: number; depthM: number } {
  const waterM3 = heatCapacityJPerK / specificHeatJPerKgK.water / 1000;
  return { diameterM: kettle.diameterM, depthM: waterM3 / ((Math.PI * kettle.diameterM ** 2) / 4) };
}

/** Heats to the steep temperature, or as near as it gets; the coil goes in shortly before and is heated with the rest. */
function heat(pot: Pot, { steepC }: RecipeDocument, boilC: number): void {
  const { kettle, chiller, roomC } = pot.kit;
  if (steepC > boilC + BOIL_SLACK_K) pot.never = { stage: 'heat', limitC: boilC, wantedC: steepC };
  const toC = Math.min(steepC, boilC);
  const to = (wantedC: number) => {
    const stage = {
      kind: 'heat',
      heatCapacityJPerK: pot.heatCapacityJPerK,
      powerW: kettle.heaterPowerW,
      efficiency: kettle.heaterEfficiency,
      lossWPerK: lossWPerK(pot, steepC),
      roomC,
    } as const;
    const stuck = pot.line.add({ ...stage, toC: wantedC }, !pot.kit.isLidOn);
    if (!stuck) return;
    pot.never = { stage: 'heat', limitC: stuck.limitC, wantedC: steepC };
    const nearC = stuck.limitC - NEAR_LIMIT_K;
    if (nearC > pot.line.tempC) pot.line.add({ ...stage, toC: nearC }, !pot.kit.isLidOn);
  };
  if (chiller) {
    to(Math.max(pot.line.tempC, toC - COIL_BEFORE_K));
    mixIn(pot, coilJPerK(chiller));
  }
  to(toC);
}

/** Metal of the coil and the water inside it, J/K. */
export function coilJPerK(chiller: ChillerFacts): number {
  const metalKg = chiller.lengthM * usual.coilKgPerM[chiller.metal];
  const waterKg = tubeVolumeL(chiller.lengthM, usual.coilBoreMm);
  return metalKg * specificHeatJPerKgK[metalOf[chiller.metal]] + waterKg * specificHeatJPerKgK.water;
}

/** Puts in something that stood in the room. */
function mixIn(pot: Pot, ownJPerK: number): void {
  if (ownJPerK === 0) return;
  const together = pot.heatCapacityJPerK + ownJPerK;
  // Only shares of the heat capacity count, whatever they are made of.
  const part = (jPerK: number, tempC: number) => ({ massG: jPerK / together, specificHeatJPerKgK: 1, tempC });
  const toC = mixedTempC([part(pot.heatCapacityJPerK, pot.line.tempC), part(ownJPerK, pot.kit.roomC)]);
  pot.line.add({ kind: 'mix', toC }, false);
  pot.heatCapacityJPerK = together;
}

function addIn(pot: Pot, additions: readonly Addition[]): void {
  mixIn(
    pot,
    additions.reduce((sum, one) => sum + leafJPerK(one), 0),
  );
  for (const addition of additions) mark(pot, 'in', addition);
}

/** By the clock of the steep: the heat stays on until the first thing goes in, then the pot cools by itself. */
function steep(pot: Pot, byClock: readonly ClockEvent[]): void {
  const startMs = pot.line.atMs;
  for (const [index, event] of byClock.entries()) {
    const waitS = event.atS - (pot.line.atMs - startMs) / 1000;
    if (waitS > 0 && index === 0) pot.line.add({ kind: 'hold', durationS: waitS }, !pot.kit.isLidOn);
    else if (waitS > 0) coolAlone(pot, { durationS: waitS });
    if (event.kind === 'in') addIn(pot, event.additions);
    else for (const addition of event.additions) mark(pot, 'out', addition);
  }
}

type End = { toC: number } | { durationS: number };

/** The pot on its own, toward the room. @returns where it would settle when it never gets so cold. */
function coolAlone(pot: Pot, end: End): { limitC: number } | null {
  const { kettle, isLidOn, roomC } = pot.kit;
  const isOpen = !isLidOn;
  if (pot.line.tempC <= roomC + 0.1) {
    if ('toC' in end) return pot.line.tempC <= end.toC ? null : { limitC: roomC };
    return pot.line.add({ kind: 'hold', ...end }, isOpen);
  }
  if (isLidOn && kettle.coolingConstantPerS !== undefined) {
    return pot.line.add({ kind: 'cool', surroundC: roomC, kPerS: kettle.coolingConstantPerS, ...end }, false);
  }
  let left = end;
  for (const stepC of isLidOn ? [] : OPEN_STEPS_C) {
    if (pot.line.tempC <= stepC || ('toC' in left && left.toC >= stepC)) continue;
    const law = coolingLaw(pot);
    const untilS = powerLawDurationS({ ...law, fromC: pot.line.tempC }, stepC);
    if (untilS === null || ('durationS' in left && left.durationS <= untilS)) break;
    pot.line.add({ kind: 'fall', ...law, toC: stepC }, true);
    if ('durationS' in left) left = { durationS: left.durationS - untilS };
  }
  return pot.line.add({ kind: 'fall', ...coolingLaw(pot), ...left }, isOpen);
}

function coolingLaw(pot: Pot): { referenceC: number; fallCPerS: number; exponent: number } {
  const { isLidOn, roomC } = pot.kit;
  const { tempC } = pot.line;
  return {
    referenceC: roomC,
    fallCPerS: (lossWPerK(pot, tempC) * (tempC - roomC)) / pot.heatCapacityJPerK,
    exponent: isLidOn ? coolingExponent.liddedPot : openExponent(tempC),
  };
}

function openExponent(tempC: number): number {
  const [hotC, warmC] = OPEN_STEPS_C;
  if (tempC > hotC) return coolingExponent.openPotNearBoiling;
  return tempC > warmC ? coolingExponent.openPotHot : coolingExponent.openPotWarm;
}

/** Whether a chiller takes the temperature down; without one the pot cools by itself. */
export function isChilled({ assume }: RecipeDocument, { chiller }: Pick<DeskKit, 'chiller'>): boolean {
  return chiller !== null || assume.chillerConstantPerS !== undefined;
}

/** Toward the coolant, by a told, a learned or a computed constant; null when there is no chiller. */
export function chillOfDay(document: RecipeDocument, kit: DeskKit): ChillLaw | null {
  const { chiller } = kit;
  const surroundC = chiller?.coolantC ?? usual.coolantC;
  const known = document.assume.chillerConstantPerS ?? chiller?.coolingConstantPerS;
  if (known !== undefined) return { surroundC, kPerS: known };
  if (!chiller) return null;
  const kPerS = chillerConstantPerS({
    transferWPerK: coilTransferWPerK({
      outerMm: usual.coilOuterMm,
      lengthM: chiller.lengthM,
      stirred: false,
      tempC: usual.coilAtC,
    }).value,
    coolantKgPerS: usual.coolantKgPerS,
    coolantInC: surroundC,
    heatCapacityJPerK: capacityJPerK(document, dayKit(document, kit).kettle) + coilJPerK(chiller),
  });
  return { surroundC, kPerS };
}

/** With the lid off and the chiller on; without one the pot on its own. */
function chill(pot: Pot, end: End): { limitC: number } | null {
  if (!pot.chills) return coolAlone(pot, end);
  return pot.line.add({ kind: 'cool', ...pot.chills, ...end }, true);
}

interface Due {
  atMs: number;
  additions: readonly Addition[];
}

/** What the falling temperature says, and contact times among it: those run on while the fall goes on. */
function fall(pot: Pot, byFall: readonly FallEvent[], transferC: number): void {
  mark(pot, 'chill');
  const due: Due[] = [];
  for (const event of byFall) {
    fallTo(pot, event.tempC, due);
    if (event.kind === 'out') for (const addition of event.additions) mark(pot, 'out', addition);
    else addIn(pot, event.additions);
    for (const out of event.outs) due.push({ atMs: pot.line.atMs + out.afterS * 1000, additions: out.additions });
    due.sort((a, b) => a.atMs - b.atMs);
  }
  fallTo(pot, transferC, due);
  for (const one of due.splice(0)) outAt(pot, one);
  mark(pot, 'transfer');
}

/** Falls to a temperature; contact times that end on the way are marked in between. */
function fallTo(pot: Pot, toC: number, due: Due[]): void {
  if (pot.line.tempC <= toC) return;
  const fromMs = pot.line.atMs;
  const stuck = chill(pot, { toC });
  if (stuck) {
    pot.never ??= { stage: 'chill', limitC: stuck.limitC, wantedC: toC };
    const nearC = stuck.limitC + NEAR_LIMIT_K;
    if (nearC < pot.line.tempC) chill(pot, { toC: nearC });
  }
  while (due[0] && due[0].atMs <= pot.line.atMs) {
    const one = due.shift();
    if (one) markOut(pot, one.additions, Math.max(fromMs, one.atMs));
  }
}

/** The fall goes on until a contact time is over. */
function outAt(pot: Pot, { atMs, additions }: Due): void {
  const waitS = (atMs - pot.line.atMs) / 1000;
  if (waitS > 0 && chill(pot, { durationS: waitS })) pot.line.add({ kind: 'hold', durationS: waitS }, false);
  markOut(pot, additions, pot.line.atMs);
}

function markOut(pot: Pot, additions: readonly Addition[], atMs: number): void {
  const tempC = curveTempC(pot.line.curve, atMs) ?? pot.line.tempC;
  for (const { id } of additions) pot.marks.push({ kind: 'out', additionId: id, atMs, tempC });
}

/** What went into the cold water and comes out by the clock, wherever the day stands then. */
function timedFromFill(pot: Pot, { additions }: RecipeDocument): void {
  for (const addition of additions) {
    if (addition.in.at !== 'fill' || !('out' in addition) || addition.out.at !== 'timer') continue;
    markOut(pot, [addition], Math.min(pot.line.atMs, addition.out.durationS * 1000));
  }
}

function finished(pot: Pot, document: RecipeDocument): PlannedDay {
  intoKeg(pot, document);
  const { line, marks, never, kit } = pot;
  return {
    curve: line.curve,
    marks: marks.sort((a, b) => a.atMs - b.atMs),
    never,
    evaporatedL: openEvaporatedL(line.curve, line.open, document.waterL, kit),
  };
}

/** What the pot gives to the room over the spans of a curve in which it stands open, L; never nearly all of its water. */
export function openEvaporatedL(
  curve: TemperatureCurve,
  open: readonly { fromMs: number; toMs: number }[],
  waterL: number,
  kit: Pick<DayKit, 'kettle' | 'roomC' | 'stationKPa'>,
): number {
  const surface = {
    openM2: (Math.PI * kit.kettle.diameterM ** 2) / 4,
    roomC: kit.roomC,
    humidityRatio: HUMIDITY,
    // The formula ends there.
    stationKPa: Math.max(LEAST_AIR_KPA, kit.stationKPa),
  };
  const gone = open.reduce((sum, { fromMs, toMs }) => sum + evaporatedL(curveBetween(curve, fromMs, toMs), surface), 0);
  return Math.min(MOST_EVAPORATED * waterL, gone);
}

/** What goes into the keg, and what the order of the day could not take out. */
function intoKeg(pot: Pot, { additions }: RecipeDocument): void {
  const last = { atMs: pot.line.atMs, tempC: pot.line.tempC };
  const has = (kind: DayMark['kind'], id: string) =>
    pot.marks.some((one) => one.kind === kind && one.additionId === id);
  for (const addition of additions) {
    if (!has('in', addition.id)) pot.marks.push({ kind: 'in', additionId: addition.id, ...last });
    if ('out' in addition && !has('out', addition.id))
      pot.marks.push({ kind: 'out', additionId: addition.id, ...last });
  }
}

/** Leaf in cold water: a flat line for as long as the clock says. */
function coldDay(document: RecipeDocument): PlannedDay {
  const { steepC, additions } = document;
  const { byClock, byFall } = dayOrder(document);
  const clockS = byClock.at(-1)?.atS ?? 0;
  const fallS = Math.max(0, ...byFall.flatMap(({ outs }) => outs.map(({ afterS }) => afterS)));
  const fillS = additions.map((one) =>
    one.in.at === 'fill' && 'out' in one && one.out.at === 'timer' ? one.out.durationS : 0,
  );
  const endS = Math.max(clockS + fallS, ...fillS);
  const at = (kind: DayMark['kind'], additionId: string | null, atS: number): DayMark => ({
    kind,
    additionId,
    atMs: atS * 1000,
    tempC: steepC,
  });
  const marks = additions.flatMap((one) => {
    const inS = coldInS(one, clockS, endS);
    const ins = [at('in', one.id, inS)];
    return 'out' in one
      ? [...ins, at('out', one.id, one.out.at === 'timer' ? Math.min(endS, inS + one.out.durationS) : endS)]
      : ins;
  });
  return {
    curve: [
      { atMs: 0, tempC: steepC },
      { atMs: endS * 1000, tempC: steepC },
    ],
    marks: [...marks, at('transfer', null, endS)].sort((a, b) => a.atMs - b.atMs),
    never: null,
    evaporatedL: 0,
  };
}

function coldInS({ in: goesIn }: Addition, clockS: number, endS: number): number {
  if (goesIn.at === 'fill') return 0;
  if (goesIn.at === 'steep') return goesIn.afterS;
  return goesIn.at === 'falling' ? clockS : endS;
}
