import { drinkPlanOf } from '../desk/index.js';
import {
  curveBetween,
  drinkFigures,
  hopContactTime,
  steepDoseMin,
  steepWindows,
  type DrinkFigures,
  type DrinkPlan,
  type SteepVerdict,
  type TeaKind,
} from '../figures/index.js';
import { coolingClock, type CoolingClock } from './account-cooling.js';
import { isBrewed, recordedDay, type RecordedDay } from './account-day.js';
import type { RecordedLine } from './account-line.js';
import type { RunState } from './state.js';

/** A line further off says nothing of this steep. */
const LONGEST_PULL_S = 4 * 3600;

export interface TeaSoFar {
  additionId: string;
  name: string;
  tea: TeaKind;
  isIn: boolean;
  /** Run clock. */
  inAtMs: number;
  /** Minutes-equivalent at 80 °C. */
  doseMin: number;
  verdict: SteepVerdict;
  /** Good window and lines of this tea; null for herbs, and for a cold steep. */
  window: (typeof steepWindows)[Exclude<TeaKind, 'herbal'>] | null;
  /** When the amber line is reached at the temperature of now, run clock; past when it is passed. Null without a line, or when it is out. */
  pullAtMs: number | null;
}

export interface HopsSoFar {
  additionId: string;
  name: string;
  isIn: boolean;
  inAtMs: number;
  contactS: number;
  meanC: number | null;
}

export interface AccountSoFar {
  kind: 'account';
  day: RecordedDay;
  plan: DrinkPlan;
  figures: DrinkFigures;
  /** Whether any temperature is known: without one a steep has no dose. */
  isLineKnown: boolean;
  teas: readonly TeaSoFar[];
  hops: readonly HopsSoFar[];
  cooling: CoolingClock;
  /** In the pot: what was filled, less what steamed off and what leaf and hops hold that were taken out, L. */
  volumeL: number;
}

export type RunAccount =
  | AccountSoFar
  /** A run of an older build does not know what it is brewed from; one that has not begun has nothing to tell. */
  | { kind: 'none'; why: 'older-build' | 'not-started' }
  /** The sum cannot be done: what is the matter. */
  | { kind: 'impossible'; what: string };

/**
 * What came of a run so far: the recorded line and the true times of the acts, through the same sums as the desk.
 *
 * @param line of the liquid, run clock: `liquidLine`.
 * @param nowMs run clock.
 * @see drink-figures.ts for models, sources and bands; a line within 0.05 K moves a dose by 0.2 %, iso-alpha acids by 0.5 %.
 */
export function accountSoFar(state: RunState, line: RecordedLine, nowMs: number): RunAccount {
  if (state.status === 'not-started') return { kind: 'none', why: 'not-started' };
  if (!isBrewed(state)) return { kind: 'none', why: 'older-build' };
  try {
    const day = recordedDay(state, line, nowMs);
    const plan = drinkPlanOf(day.document, state.kit, day);
    const figures = drinkFigures(plan);
    const reheatedAtMs = state.choices.flatMap(({ choice, atMs }) => (choice === 'reheat' ? [atMs] : []));
    const clockCurve = day.curve.map(({ atMs, tempC }) => ({ atMs: atMs + day.startAtMs, tempC }));
    return {
      kind: 'account',
      day,
      plan,
      figures,
      isLineKnown: day.curve.length > 0,
      teas: teasSoFar(day, plan, figures),
      hops: hopsSoFar(day, plan),
      cooling: coolingClock(clockCurve, state.document, state.kit, reheatedAtMs),
      volumeL: volumeNow(day, figures),
    };
  } catch (error) {
    if (error instanceof RangeError) return { kind: 'impossible', what: error.message };
    throw error;
  }
}

function teasSoFar(day: RecordedDay, plan: DrinkPlan, figures: DrinkFigures): TeaSoFar[] {
  const leaves = day.document.additions.flatMap((one) => (one.kind === 'tea' ? [one] : []));
  return leaves.flatMap(({ id, name, tea }, index) => {
    const leaf = plan.teas[index];
    const steep = figures.tea.steeps[index];
    if (!leaf || !steep) return [];
    const isIn = day.inPot.includes(id);
    const window = steep.linesHold && tea !== 'herbal' ? steepWindows[tea] : null;
    const leftMin = window ? window.amber - steep.steepDoseMin : null;
    return {
      additionId: id,
      name,
      tea,
      isIn,
      inAtMs: leaf.inAtMs + day.startAtMs,
      doseMin: steep.steepDoseMin,
      verdict: steep.verdict,
      window,
      pullAtMs: isIn && leftMin !== null ? pullAt(day, leftMin) : null,
    };
  });
}

/** At the temperature of now; a dose that was passed tells since when. */
function pullAt({ curve, endAtMs }: RecordedDay, leftMin: number): number | null {
  const tempC = curve.at(-1)?.tempC;
  if (tempC === undefined) return null;
  const aMinute = [
    { atMs: 0, tempC },
    { atMs: 60_000, tempC },
  ];
  const leftS = (60 * leftMin) / steepDoseMin(aMinute);
  return leftS > LONGEST_PULL_S ? null : endAtMs + leftS * 1000;
}

function hopsSoFar(day: RecordedDay, plan: DrinkPlan): HopsSoFar[] {
  const lines = day.document.additions.flatMap((one) => (one.kind === 'hops' ? [one] : []));
  return lines.flatMap(({ id, name }, index) => {
    const one = plan.hops[index];
    if (!one) return [];
    const contact = hopContactTime(curveBetween(day.curve, one.inAtMs, one.outAtMs));
    return {
      additionId: id,
      name,
      isIn: day.inPot.includes(id),
      inAtMs: one.inAtMs + day.startAtMs,
      contactS: (one.outAtMs - one.inAtMs) / 1000,
      meanC: contact?.meanC ?? null,
    };
  });
}

/** What stands in the bag still is in the pot. */
function volumeNow({ document, inPot, evaporatedL }: RecordedDay, { yield: drink }: DrinkFigures): number {
  const held = (kind: 'tea' | 'hops', liters: number) => {
    const all = document.additions.filter((one) => one.kind === kind);
    const sumG = (list: typeof all) => list.reduce((sum, { massG }) => sum + massG, 0);
    const outG = sumG(all.filter(({ id }) => !inPot.includes(id)));
    return outG === 0 ? 0 : (liters * outG) / sumG(all);
  };
  return Math.max(0, document.waterL - evaporatedL - held('tea', drink.leafL) - held('hops', drink.hopsL));
}
