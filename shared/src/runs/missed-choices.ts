import {
  heatCapacityJPerK,
  heatingTime,
  isomerisationPerMin,
  isomerisationTurns,
  newtonDurationS,
  newtonTempC,
  type HeatedMaterial,
  type TemperatureCurve,
} from '../figures/index.js';
import type { KettleFacts } from '../sheets/index.js';
import type { MissedChoiceKind } from './events.js';

/** How things stand when a catch on the fall was missed. */
export interface MissedCatch {
  targetC: number;
  nowC: number;
  /** Where what goes in comes out again. */
  outC: number;
  massG: number;
  /** What the liquid falls toward: the coolant, or the room. */
  surroundC: number;
  /** Now, negative on the fall; null when nobody can say. */
  rateCPerMin: number | null;
  /** Null when the run does not know what it is brewed on: then nobody can say how long a reheat takes. */
  heat: { waterL: number; roomC: number; kettle: KettleFacts } | null;
}

export interface MissedChoice {
  choice: MissedChoiceKind;
  holdS: number | null;
  extraG: number | null;
  reheatS: number | null;
  /** Time in the liquid times mass, against the plan: what aroma follows. */
  aromaRatio: number;
  /** What iso-alpha acids follow, against the plan: the bitterness that heat makes. */
  isoRatio: number;
}

/** Rate constant to count with when the fall cannot be seen, 1/s: a chiller of the usual kind (judgement). */
const USUAL_PER_S = 1.3e-3;
const SLOWEST_PER_S = 1e-5;
/** A reheat goes past the target, so that the liquid falls through it once more, K. */
const PAST_K = 3;
/** More than double the hops is another drink. */
const MOST_EXTRA = 1;
/** A hold longer than this is another day's work. */
const LONGEST_HOLD_S = 2 * 3600;
const STEP_K = 0.5;

const metals: Record<NonNullable<KettleFacts['metal']>, HeatedMaterial> = {
  stainless: 'stainlessSteel',
  aluminium: 'aluminium',
  copper: 'copper',
  'enamelled-steel': 'mildSteel',
};

function fallPerS({ nowC, surroundC, rateCPerMin }: MissedCatch): number {
  if (rateCPerMin === null || nowC - surroundC < 1) return USUAL_PER_S;
  return Math.max(SLOWEST_PER_S, -rateCPerMin / 60 / (nowC - surroundC));
}

/** The fall by Newton's law from one temperature to another, as points; a single instant where there is nothing to fall. */
function fall(fromC: number, toC: number, surroundC: number, perS: number): TemperatureCurve {
  const durationS = fromC > toC ? newtonDurationS(fromC, toC, surroundC, perS) : 0;
  // What never gets there comes out by hand after an hour.
  const lengthS = durationS ?? 3600;
  const steps = Math.max(1, Math.ceil((fromC - toC) / STEP_K));
  return Array.from({ length: steps + 1 }, (_, step) => {
    const seconds = (lengthS * step) / steps;
    return { atMs: seconds * 1000, tempC: newtonTempC(fromC, surroundC, perS, seconds) };
  });
}

function contactOf(curve: TemperatureCurve): { seconds: number; turns: number } {
  return { seconds: (curve.at(-1)?.atMs ?? 0) / 1000, turns: isomerisationTurns(curve) };
}

function reheatSeconds({ targetC, nowC, heat }: MissedCatch): number | null {
  if (!heat) return null;
  const { kettle, waterL, roomC } = heat;
  const time = heatingTime({
    heatCapacityJPerK: heatCapacityJPerK([
      { massG: waterL * 1000, material: 'water' },
      { massG: kettle.massKg * 1000, material: metals[kettle.metal ?? 'stainless'] },
    ]),
    fromC: nowC,
    toC: targetC + PAST_K,
    powerW: kettle.heaterPowerW,
    efficiency: kettle.heaterEfficiency,
    roomC,
  });
  return time.kind === 'reaches' && time.durationS > 0 ? time.durationS : null;
}

/**
 * What can still be done about hops that were not in at their temperature, and what each way does against the plan: hold them longer where
 * the liquid is now, weigh in more, heat up again, or take it as it is. Ways that lead nowhere are left out; `accept` is always there.
 *
 * @param missed temperatures 0 to 100 °C, mass of 0 g or more.
 * @throws RangeError when a temperature is outside 0 to 130 °C.
 * @see Newton's law for the fall; contact time for aroma (common practice, no source); Malowicki and Shellhammer 2005 for iso-alpha acids.
 */
export function missedChoices(missed: MissedCatch): MissedChoice[] {
  const { targetC, nowC, outC, massG, surroundC } = missed;
  const perS = fallPerS(missed);
  const plan = contactOf(fall(targetC, outC, surroundC, perS));
  const late = contactOf(fall(nowC, outC, surroundC, perS));
  const aromaRatio = plan.seconds > 0 ? late.seconds / plan.seconds : 1;
  const isoRatio = plan.turns > 0 ? late.turns / plan.turns : 1;
  const none = { holdS: null, extraG: null, reheatS: null };
  const choices: MissedChoice[] = [];

  const holdS = plan.seconds - late.seconds;
  if (holdS > 0 && holdS <= LONGEST_HOLD_S) {
    const turns = late.turns + (isomerisationPerMin(nowC) * holdS) / 60;
    choices.push({ ...none, choice: 'hold', holdS, aromaRatio: 1, isoRatio: plan.turns > 0 ? turns / plan.turns : 1 });
  }
  const extra = aromaRatio > 0 ? 1 / aromaRatio - 1 : Infinity;
  if (massG > 0 && extra > 0 && extra <= MOST_EXTRA) {
    choices.push({ ...none, choice: 'more', extraG: massG * extra, aromaRatio: 1, isoRatio: isoRatio * (1 + extra) });
  }
  const reheatS = reheatSeconds(missed);
  if (reheatS !== null) choices.push({ ...none, choice: 'reheat', reheatS, aromaRatio: 1, isoRatio: 1 });
  choices.push({ ...none, choice: 'accept', aromaRatio, isoRatio });
  return choices;
}
