import {
  heatingTime,
  isomerisationPerMin,
  isomerisationTurns,
  newtonDurationS,
  newtonTempC,
  type TemperatureCurve,
} from '../figures/index.js';
import { filledKettleJPerK } from '../desk/index.js';
import type { KettleFacts } from '../sheets/index.js';
import type { MissedChoiceKind } from './events.js';

/** How things stand when a catch on the fall was missed. */
export interface MissedCatch {
  targetC: number;
  nowC: number;
  /** What ends the contact: a level on the fall, or the time that it stands. */
  out: { tempC: number } | { standS: number };
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

/** The name of the timer of a hold: its end asks for the chiller. */
export const HOLD_TIMER = 'Hold';

/** Rate constant to count with when the fall cannot be seen, 1/s: a chiller of the usual kind (judgement). */
const USUAL_PER_S = 1.3e-3;
/** A reheat goes past the target, so that the liquid falls through it once more, K. */
const PAST_K = 3;
/** More than double the hops is another drink. */
const MOST_EXTRA = 1;
/** A hold or a reheat longer than this is another day's work. */
const LONGEST_WAIT_S = 2 * 3600;
/** What differs by less than this from the plan is the plan: nobody tastes it, and nobody weighs it (judgement). */
export const AS_PLANNED = 0.05;
/** Slower than this (0.1 K/min) is no fall that anything can be told from. */
const LEAST_FALL_C_PER_MIN = 0.1;
/** What never gets there comes out by hand after an hour. */
const BY_HAND_S = 3600;
const STEP_K = 0.5;

function fallPerS({ nowC, surroundC, rateCPerMin }: MissedCatch): number {
  const fallCPerMin = rateCPerMin === null ? 0 : -rateCPerMin;
  if (fallCPerMin < LEAST_FALL_C_PER_MIN || nowC - surroundC < 1) return USUAL_PER_S;
  return fallCPerMin / 60 / (nowC - surroundC);
}

/** The fall by Newton's law over that time, as points; a single instant where there is nothing to fall. */
function fall(fromC: number, lengthS: number, surroundC: number, perS: number): TemperatureCurve {
  const toC = newtonTempC(fromC, surroundC, perS, lengthS);
  const steps = Math.max(1, Math.ceil(Math.abs(fromC - toC) / STEP_K));
  return Array.from({ length: steps + 1 }, (_, step) => {
    const seconds = (lengthS * step) / steps;
    // Coolant may be colder than ice; what is brewed is not.
    return { atMs: seconds * 1000, tempC: Math.max(0, newtonTempC(fromC, surroundC, perS, seconds)) };
  });
}

/** How long what goes in at this temperature stays in. */
function contactS(fromC: number, { out, surroundC }: MissedCatch, perS: number): number {
  if ('standS' in out) return out.standS;
  return fromC > out.tempC ? (newtonDurationS(fromC, out.tempC, surroundC, perS) ?? BY_HAND_S) : 0;
}

function contactOf(curve: TemperatureCurve): { seconds: number; turns: number } {
  return { seconds: (curve.at(-1)?.atMs ?? 0) / 1000, turns: isomerisationTurns(curve) };
}

function reheatSeconds({ targetC, nowC, heat }: MissedCatch): number | null {
  if (!heat) return null;
  const { kettle, waterL, roomC } = heat;
  const time = heatingTime({
    heatCapacityJPerK: filledKettleJPerK(waterL, kettle),
    fromC: nowC,
    toC: reheatToC(targetC),
    powerW: kettle.heaterPowerW,
    efficiency: kettle.heaterEfficiency,
    roomC,
  });
  const isWayBack = time.kind === 'reaches' && time.durationS > 0 && time.durationS <= LONGEST_WAIT_S;
  return isWayBack ? time.durationS : null;
}

/** Short spans to ten seconds, longer ones to half a minute: what a person can keep to. */
function keepableS(seconds: number): number {
  const step = seconds < 120 ? 10 : 30;
  return Math.max(step, Math.round(seconds / step) * step);
}

/** Grams from ten up, tenths below: what a kitchen scale shows. */
function weighableG(massG: number): number {
  return massG >= 10 ? Math.round(massG) : Math.max(0.1, Math.round(massG * 10) / 10);
}

/**
 * What can still be done about hops that were not in at their temperature, and what each way does against the plan: hold them longer where
 * the liquid is now, weigh in more, heat up again, or take it as it is. Ways that lead nowhere or change nothing are left out; `accept` is
 * always there, and comes first when little is lost. Times and masses are rounded to what a person can keep to.
 *
 * @param missed temperatures 0 to 100 °C, mass of 0 g or more, a stand above 0 s.
 * @throws RangeError when a temperature is outside 0 to 130 °C.
 * @see Newton's law for the fall; contact time for aroma (common practice, no source); Malowicki and Shellhammer 2005 for iso-alpha acids.
 */
export function missedChoices(missed: MissedCatch): MissedChoice[] {
  const { targetC, nowC, massG, surroundC } = missed;
  const perS = fallPerS(missed);
  const plan = contactOf(fall(targetC, contactS(targetC, missed, perS), surroundC, perS));
  const late = contactOf(fall(nowC, contactS(nowC, missed, perS), surroundC, perS));
  const aromaRatio = plan.seconds > 0 ? late.seconds / plan.seconds : 1;
  const isoRatio = plan.turns > 0 ? late.turns / plan.turns : 1;
  const none = { holdS: null, extraG: null, reheatS: null };
  const accept: MissedChoice = { ...none, choice: 'accept', aromaRatio, isoRatio };
  const isShort = aromaRatio < 1 - AS_PLANNED;
  const choices: MissedChoice[] = isShort ? [] : [accept];

  const shortS = plan.seconds - late.seconds;
  if (isShort && shortS <= LONGEST_WAIT_S) {
    const holdS = keepableS(shortS);
    const turns = late.turns + (isomerisationPerMin(nowC) * shortS) / 60;
    choices.push({ ...none, choice: 'hold', holdS, aromaRatio: 1, isoRatio: plan.turns > 0 ? turns / plan.turns : 1 });
  }
  const extra = aromaRatio > 0 ? 1 / aromaRatio - 1 : Infinity;
  if (isShort && massG > 0 && extra <= MOST_EXTRA) {
    const extraG = weighableG(massG * extra);
    choices.push({ ...none, choice: 'more', extraG, aromaRatio: 1, isoRatio: isoRatio * (1 + extra) });
  }
  const reheatS = nowC < targetC ? reheatSeconds(missed) : null;
  if (reheatS !== null) {
    const wholeMinutesS = Math.max(60, Math.round(reheatS / 60) * 60);
    choices.push({ ...none, choice: 'reheat', reheatS: wholeMinutesS, aromaRatio: 1, isoRatio: 1 });
  }
  return isShort ? [...choices, accept] : choices;
}

/** How far past the target a reheat goes, so that the liquid falls through it once more, °C. */
export function reheatToC(targetC: number): number {
  return targetC + PAST_K;
}
