import { acidityOf, drinkPlanOf, leadingAcid, plannedDay, wantedPh } from '../desk/index.js';
import {
  acidFigures,
  acidKinds,
  acidMassG,
  amountAtPh,
  band,
  drinkSolution,
  lotMultiplier,
  saltedWater,
  solvePh,
  type AcidSolution,
  type Band,
  type DrinkPlan,
} from '../figures/index.js';
import { additionSteps, type RecipeDocument } from '../sheets/index.js';
import { accountSoFar, type AccountSoFar } from './account.js';
import { isBrewed, type Brewed } from './account-day.js';
import type { RecordedLine } from './account-line.js';
import type { RunState } from './state.js';

/** What a cared-for meter leaves open (common practice, no source). */
const METER_PH = 0.05;
/** Around the usual aim, where the recipe tells no range (a judgement). */
const USUAL_WITHIN_PH = 0.1;
/** Off the water report by more is no water report, or no clean meter, meq/L (a judgement). */
const MOST_OFF_MEQ_PER_L = 5;
/** No correction of this drink takes more, of the pure acid, g/L (a judgement). */
const MOST_G_PER_L = 3;
const MOST_MOL_PER_L = 2;
const MOST_EQ_PER_L = 0.1;
const TEMP_C = 25;

interface AcidFrame {
  /** Treated water, or with leaf or hops in it. */
  stage: 'water' | 'drink';
  measuredPh: number;
  targetPh: number;
  /** Where the drink comes to without any correction, with all that is still to go in; null when nobody can say. */
  expectedPh: number | null;
  /** Base of the leaf that is in against the usual one, from this pH; null before the leaf. */
  ratio: number | null;
  /** Acid of the recipe that is still to go in: counted already, g of the jar. */
  pendingG: number;
}

/** What to do about a measured pH. */
export type AcidAnswer = AcidFrame &
  (
    | { kind: 'add'; additionId: string; name: string; stepId: string; massG: Band }
    | { kind: 'enough' }
    | { kind: 'too-low' }
    /** Neither the water report nor any leaf explains this pH. */
    | { kind: 'measure-again' }
    /** The recipe has none that could be weighed. */
    | { kind: 'no-acid' }
    /** Not with this acid, or more than any drink takes. */
    | { kind: 'never' }
  );

/**
 * The next dose of acid from a pH that was just measured. Before the leaf it is that of the water: what the report and the scale got wrong
 * is taken as strong ions. With leaf in it, the pH tells how much base this lot brings (`lotMultiplier`), and the dose is for the drink as it
 * will be, with what is still to go in. Never below zero, never more than a drink takes.
 *
 * @param run that is brewed from a recipe.
 * @param account of the instant of the sample.
 * @param measuredPh 1 to 9, cooled to 20 to 25 °C.
 * @returns `null` where no pH can be worked out: the water report is refused.
 * @see acid-dose.ts, lot-multiplier.ts.
 */
export function nextAcid(run: RunState, account: AccountSoFar, measuredPh: number): AcidAnswer | null {
  if (!isBrewed(run)) return null;
  try {
    const value = answerAt(run, account, measuredPh);
    if (value.kind !== 'add') return value;
    const ends = [measuredPh - METER_PH, measuredPh + METER_PH].map((ph) => answerAt(run, account, ph));
    const grams = ends.map((end) => (end.kind === 'add' ? end.massG.value : value.massG.value));
    const massG = band(Math.min(...grams), value.massG.value, Math.max(...grams), 'judged');
    return { ...value, massG };
  } catch (error) {
    if (error instanceof RangeError) return null;
    throw error;
  }
}

function answerAt(run: Brewed, account: AccountSoFar, measuredPh: number): AcidAnswer {
  const isLeafIn = account.day.document.additions.some(({ kind }) => kind === 'tea' || kind === 'hops');
  return isLeafIn ? inDrink(run, account, measuredPh) : inWater(run, account, measuredPh);
}

function inWater(run: Brewed, { plan }: AccountSoFar, measuredPh: number): AcidAnswer {
  const { waterPh } = run.document.targets;
  const told = drinkSolution(acidityOf(plan, 0));
  const offEqPerL = offsetEqPerL(told, measuredPh);
  const targetPh = (waterPh.min + waterPh.max) / 2;
  const common = { stage: 'water', measuredPh, targetPh, ratio: null, pendingG: 0 } as const;
  if (offEqPerL === null || Math.abs(offEqPerL) * 1000 > MOST_OFF_MEQ_PER_L) {
    const isLow = measuredPh < waterPh.min;
    return { ...common, expectedPh: null, kind: isLow ? 'too-low' : 'measure-again' };
  }
  const { teaMeqPerL, hopMeqPerL } = plannedBases(run);
  const { teaBaseRatio = 1, hopBaseRatio = 1 } = run.document.assume;
  const later = withPending(run, plan);
  const drink = drinkSolution(acidityOf(later, teaMeqPerL * teaBaseRatio + hopMeqPerL * hopBaseRatio));
  const frame = { ...common, expectedPh: solvePh(shifted(drink, offEqPerL)).ph };
  if (measuredPh < waterPh.min) return { ...frame, kind: 'too-low' };
  if (measuredPh <= waterPh.max) return { ...frame, kind: 'enough' };
  return doseFor(run, frame, shifted(told, offEqPerL), plan.waterL);
}

function inDrink(run: Brewed, account: AccountSoFar, measuredPh: number): AcidAnswer {
  const { plan, day } = account;
  const planned = plannedBases(run);
  const usual = basesSoFar(account, planned);
  const ratio = lotMultiplier(acidityOf(plan, usual.teaMeqPerL + usual.hopMeqPerL), measuredPh);
  const targetPh = wantedPh(run.document);
  const { min, max } = run.document.targets.drinkPh ?? {
    min: targetPh - USUAL_WITHIN_PH,
    max: targetPh + USUAL_WITHIN_PH,
  };
  const later = withPending(run, plan);
  const sumG = (acids: DrinkPlan['acids']) => acids.reduce((sum, { massG }) => sum + massG, 0);
  const common = {
    stage: 'drink',
    measuredPh,
    targetPh,
    ratio,
    pendingG: sumG(later.acids) - sumG(plan.acids),
  } as const;
  if (ratio === null) {
    const isLow = measuredPh < min;
    return { ...common, expectedPh: null, kind: isLow ? 'too-low' : 'measure-again' };
  }
  const isComing = (kind: 'tea' | 'hops') =>
    run.document.additions.some(
      (one) =>
        one.kind === kind && (day.inPot.includes(one.id) || !day.document.additions.some(({ id }) => id === one.id)),
    );
  const { teaBaseRatio = 1, hopBaseRatio = 1 } = run.document.assume;
  const whole = (soFar: number, plan: number, isMore: boolean) => (isMore ? Math.max(soFar, plan) : soFar);
  const baseMeqPerL =
    whole(usual.teaMeqPerL, planned.teaMeqPerL, isComing('tea')) * (usual.teaMeqPerL > 0 ? ratio : teaBaseRatio) +
    whole(usual.hopMeqPerL, planned.hopMeqPerL, isComing('hops')) * (usual.hopMeqPerL > 0 ? ratio : hopBaseRatio);
  const drink = drinkSolution(acidityOf(later, baseMeqPerL));
  const expectedPh = solvePh(drink).ph;
  const frame = { ...common, expectedPh };
  if (expectedPh < min) return { ...frame, kind: 'too-low' };
  if (expectedPh <= max) return { ...frame, kind: 'enough' };
  return doseFor(run, frame, drink, plan.waterL);
}

function doseFor(run: Brewed, frame: AcidFrame, solution: AcidSolution, waterL: number): AcidAnswer {
  const line = leadingAcid(run.document);
  if (!line) return { ...frame, kind: 'no-acid' };
  const { acid, strengthPercent = 100, id, name } = line;
  const unit = { acidsMolPerL: { [acidKinds[acid].dissociates]: 1 }, strongIonEqPerL: 0, tempC: solution.tempC };
  const molPerL = amountAtPh(solution, unit, frame.targetPh, MOST_MOL_PER_L);
  if (molPerL === null || molPerL <= 0) return { ...frame, kind: 'never' };
  if (acidMassG(acid, molPerL, 1, 100) > MOST_G_PER_L) return { ...frame, kind: 'never' };
  const massG = acidMassG(acid, molPerL, waterL, strengthPercent);
  const stepId = additionSteps(run.document).get(id)?.inStepId ?? '';
  return { ...frame, kind: 'add', additionId: id, name, stepId, massG: band(massG, massG, massG, 'judged') };
}

/** Strong ions that the water has over what it was told to have, eq/L; null when none explain the pH. */
function offsetEqPerL(solution: AcidSolution, ph: number): number | null {
  return amountAtPh(solution, { acidsMolPerL: {}, strongIonEqPerL: 1, tempC: TEMP_C }, ph, MOST_EQ_PER_L);
}

function shifted(solution: AcidSolution, eqPerL: number): AcidSolution {
  return { ...solution, strongIonEqPerL: solution.strongIonEqPerL + eqPerL };
}

/** Base of leaf and hops as usual, meq/L. */
function basesOf(plan: DrinkPlan): { teaMeqPerL: number; hopMeqPerL: number } {
  const usual = <Leaf extends object>(leaf: Leaf): Leaf => ({ ...leaf, baseMultiplier: 1 });
  const figures = acidFigures(
    { ...plan, teas: plan.teas.map(usual), hops: plan.hops.map(usual) },
    saltedWater(plan.waterL, plan.salts, plan.source),
  );
  return { teaMeqPerL: figures.teaBaseMeqPerL, hopMeqPerL: figures.hopBaseMeqPerL };
}

/** Without a temperature nobody knows how much a steep brought out: then what was planned. */
function basesSoFar({ plan, isLineKnown }: AccountSoFar, planned: ReturnType<typeof basesOf>) {
  const soFar = basesOf(plan);
  return isLineKnown || plan.teas.length === 0 ? soFar : { ...soFar, teaMeqPerL: planned.teaMeqPerL };
}

function plannedBases({ document, kit }: Brewed) {
  return basesOf(drinkPlanOf(document, kit, plannedDay(document, kit)));
}

/** With the acid of the recipe that is still to go in. */
function withPending({ document, steps }: Brewed, plan: DrinkPlan): DrinkPlan {
  const stepsOf = additionSteps(document);
  const pending = document.additions.flatMap((one) => {
    const step = steps.find(({ step: { id } }) => id === stepsOf.get(one.id)?.inStepId);
    if (one.kind !== 'acid' || !step || step.status === 'done') return [];
    const { acid, massG, strengthPercent } = one;
    return [{ acid, massG, ...(strengthPercent ? { strengthPercent } : {}) }];
  });
  return { ...plan, acids: [...plan.acids, ...pending] };
}

export interface LearnedBase {
  measuredPh: number;
  /** Run clock. */
  atMs: number;
  /** Against the usual base; for `assume.teaBaseRatio` and `assume.hopBaseRatio`. */
  ratio: number;
  /** What was in when it was measured. */
  of: readonly ('tea' | 'hops')[];
}

/**
 * How much more base this tea and these hops brought than usual, from the last pH that was measured with leaf in it, before the gas; null
 * when there is none, or no ratio explains it.
 */
export function learnedBase(run: RunState, line: RecordedLine): LearnedBase | null {
  const gasAtMs = run.steps.find(({ step }) => step.kind === 'charge')?.doneAtMs ?? Infinity;
  const measured = run.measurements.filter(({ quantity, atMs }) => quantity === 'pH' && atMs <= gasAtMs).at(-1);
  if (!measured || !isBrewed(run)) return null;
  const account = accountSoFar(run, line, measured.atMs);
  if (account.kind !== 'account') return null;
  const { teas, hops } = account.plan;
  const of = [...(teas.length > 0 ? (['tea'] as const) : []), ...(hops.length > 0 ? (['hops'] as const) : [])];
  const answer = of.length > 0 ? nextAcid(run, account, measured.value) : null;
  return answer?.ratio == null ? null : { measuredPh: measured.value, atMs: measured.atMs, ratio: answer.ratio, of };
}

/** The recipe with what a pH taught in it. */
export function withLearnedBase(document: RecipeDocument, { ratio, of }: LearnedBase): RecipeDocument {
  const rounded = Math.round(ratio * 100) / 100;
  const assume = {
    ...document.assume,
    ...(of.includes('tea') ? { teaBaseRatio: rounded } : {}),
    ...(of.includes('hops') ? { hopBaseRatio: rounded } : {}),
  };
  return { ...document, assume };
}
