import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { deskFigures, plannedDay, type DeskKit } from '../desk/index.js';
import { curveTempC, type TemperatureCurve } from '../figures/index.js';
import type { Reading } from '../readings/index.js';
import { additionSteps, compileSheet, type Addition, type RecipeDocument } from '../sheets/index.js';
import { buildDocument, buildHops, buildTea, LogBuilder, START_MS } from '../testing/index.js';
import { metricPreferences } from '../units/index.js';
import { learnedBase, nextAcid, withLearnedBase } from './account-acid.js';
import { coolingClock } from './account-cooling.js';
import { isBrewed, recordedDay } from './account-day.js';
import { figurePairs } from './account-rows.js';
import { LINE_WITHIN_K, liquidLine, NO_LINE, thinnedLine } from './account-line.js';
import { accountSoFar, type AccountSoFar } from './account.js';
import { foldRun } from './fold.js';

const kit: DeskKit = {
  altitudeM: 0,
  kettle: { volumeL: 30, diameterM: 0.36, massKg: 4.5, heaterPowerW: 3500, heaterEfficiency: 0.84 },
  chiller: { metal: 'stainless', lengthM: 7.6, coolantC: 12 },
};
const LAG_S = 6;

function logOf(document: RecipeDocument): LogBuilder {
  const sheet = compileSheet(document, { altitudeM: 0, reachS: 8 });
  return new LogBuilder(sheet, { document, kit });
}

/** The acts of the planned day, each at its time. */
function actedDay(document: RecipeDocument, untilMs = Infinity): LogBuilder {
  const log = logOf(document);
  const steps = additionSteps(document);
  const day = plannedDay(document, kit);
  const done = new Map<string, number>([['light-heat', 0]]);
  for (const { kind, additionId, atMs } of day.marks) {
    if (kind === 'chill') done.set('chill', atMs);
    if (kind === 'transfer') done.set('transfer', atMs);
    const { inStepId, outStepId } = steps.get(additionId ?? '') ?? { inStepId: null, outStepId: null };
    if (kind === 'in' && inStepId) done.set(inStepId, atMs);
    if (kind === 'out' && outStepId) done.set(outStepId, atMs);
  }
  for (const [stepId, atMs] of [...done].sort(([, a], [, b]) => a - b)) {
    if (atMs <= untilMs) log.add('step.done', { stepId, cause: 'hand', tempC: null }, { atMs: START_MS + atMs });
  }
  return log;
}

const shifted = (curve: TemperatureCurve) => curve.map(({ atMs, tempC }) => ({ atMs: atMs + START_MS, tempC }));

/** What a probe with a lag and its steps of a sixteenth of a degree would have said, once a second. */
function probed(curve: TemperatureCurve): Reading[] {
  const lastMs = curve.at(-1)?.atMs ?? 0;
  let probeC = curve[0]?.tempC ?? 0;
  return Array.from({ length: Math.floor(lastMs / 1000) }, (_, second) => {
    const liquidC = curveTempC(curve, second * 1000) ?? probeC;
    probeC += (liquidC - probeC) * -Math.expm1(-1 / LAG_S);
    return { atMs: START_MS + second * 1000, tempC: Math.round(probeC * 16) / 16 };
  });
}

function account(log: LogBuilder, line = NO_LINE, atMs = Infinity): AccountSoFar {
  const nowMs = Math.min(atMs, START_MS + 48 * 3_600_000);
  const result = accountSoFar(foldRun(log.entries), line, nowMs);
  if (result.kind !== 'account') throw new Error(result.kind);
  return result;
}

function figuresOf({ figures }: Pick<AccountSoFar, 'figures'>): Record<string, number> {
  return {
    dose: figures.tea.steeps[0]?.steepDoseMin ?? 0,
    caffeine: figures.tea.caffeineMgPerL.value,
    bitterness: figures.hops?.bitternessIndex.value ?? 0,
    iso: figures.hops?.isoMgPerL.value ?? 0,
    ph: figures.acid?.phStill.value ?? 0,
    calcium: figures.water.ions.ca,
    yield: figures.yield.value,
  };
}

function planned(document: RecipeDocument) {
  const result = deskFigures(document, kit, metricPreferences);
  if (result.kind !== 'figures') throw new Error(result.what);
  return result;
}

const recipes = fc
  .record({
    steepC: fc.integer({ min: 68, max: 96 }),
    steepS: fc.integer({ min: 60, max: 600 }),
    inC: fc.integer({ min: 45, max: 64 }),
    outC: fc.integer({ min: 25, max: 44 }),
    massG: fc.integer({ min: 20, max: 200 }),
  })
  .map(({ steepC, steepS, inC, outC, massG }) =>
    buildDocument({
      steepC,
      additions: [
        ...buildDocument().additions.filter(({ kind }) => kind === 'acid'),
        buildTea({ massG, out: { at: 'timer', durationS: steepS } }),
        buildHops({ in: { at: 'falling', tempC: inC }, out: { at: 'falling', tempC: outC } }),
      ],
    }),
  );

describe('the account of a day', () => {
  it('is what was planned, within 1 %, when the day went as planned', () => {
    fc.assert(
      fc.property(recipes, (document) => {
        const plan = planned(document);
        const line = { points: shifted(plan.day.curve), gaps: [] };
        const happened = figuresOf(account(actedDay(document), line));
        for (const [name, value] of Object.entries(figuresOf(plan))) {
          expect(Math.abs((happened[name] ?? Number.NaN) - value), name).toBeLessThanOrEqual(0.01 * value);
        }
      }),
      { numRuns: 40 },
    );
  });

  it('takes the lag of the probe out', () => {
    fc.assert(
      fc.property(recipes, (document) => {
        const plan = planned(document);
        const line = liquidLine(probed(plan.day.curve), LAG_S);
        const happened = figuresOf(account(actedDay(document), line));
        for (const [name, value] of Object.entries(figuresOf(plan))) {
          expect(Math.abs((happened[name] ?? Number.NaN) - value), name).toBeLessThanOrEqual(0.01 * value);
        }
      }),
      { numRuns: 10 },
    );
  });

  it('leaves out no point by more than it says', () => {
    fc.assert(
      fc.property(fc.array(fc.double({ min: -1, max: 1, noNaN: true }), { minLength: 2, maxLength: 200 }), (steps) => {
        let tempC = 60;
        const points = steps.map((step, second) => ({ atMs: second * 1000, tempC: (tempC += step / 3) }));
        const thin = thinnedLine(points);
        for (const point of points)
          expect(Math.abs((curveTempC(thin, point.atMs) ?? Number.NaN) - point.tempC)).toBeLessThan(
            LINE_WITHIN_K + 1e-9,
          );
      }),
    );
  });
});

const document = buildDocument();
const plan = planned(document);
const wholeLine = { points: shifted(plan.day.curve), gaps: [] };
const markMs = (kind: string, additionId: string) =>
  START_MS + (plan.day.marks.find((mark) => mark.kind === kind && mark.additionId === additionId)?.atMs ?? 0);

describe('while it runs', () => {
  it('says when the leaf must come out, and that it is out', () => {
    const inAtMs = markMs('in', 'sencha');
    const log = actedDay(document, inAtMs - START_MS);
    const soon = account(log, wholeLine, inAtMs + 60_000).teas[0]!;
    expect(soon).toMatchObject({ isIn: true, verdict: 'short', window: { from: 2.5, amber: 8 } });
    // At 76 °C a minute counts 0.87: 8 of them take 9.2 min.
    expect((soon.pullAtMs! - inAtMs) / 60_000).toBeCloseTo(9.3, 0);
    const held = {
      points: [...wholeLine.points.filter(({ atMs }) => atMs <= inAtMs), { atMs: inAtMs + 720_000, tempC: 76 }],
      gaps: [],
    };
    const late = account(log, held, inAtMs + 720_000).teas[0]!;
    expect(late.verdict).toBe('amber');
    expect(late.pullAtMs).toBeLessThan(inAtMs + 720_000);
    const out = account(actedDay(document), wholeLine, markMs('out', 'sencha') + 60_000).teas[0]!;
    expect(out).toMatchObject({ isIn: false, pullAtMs: null });
    expect(out.doseMin).toBeCloseTo(plan.figures.tea.steeps[0]!.steepDoseMin, 1);
  });

  it('does not count what was taken back, nor what is not in yet', () => {
    const log = actedDay(document, markMs('in', 'sencha') - START_MS);
    expect(account(log, wholeLine).hops).toEqual([]);
    expect(account(log, wholeLine).figures.hops?.bitternessIndex.value).toBe(0);
    log.undo(log.lastId);
    expect(account(log, wholeLine)).toMatchObject({ teas: [], figures: { tea: { caffeineMgPerL: { value: 0 } } } });
  });

  it('counts what was weighed in more for a missed catch', () => {
    const log = actedDay(document);
    const before = account(log, wholeLine).figures.hops!.alphaMgPerL;
    log.add('choice.made', {
      ...{ key: 'hops-in', crossing: 1, stepId: 'hops-in', choice: 'more' },
      ...{ holdS: null, extraG: 30, reheatS: null },
    });
    expect(account(log, wholeLine).figures.hops!.alphaMgPerL / before).toBeCloseTo(1.5, 6);
  });

  it('takes late readings in, and a gap as a straight line that it tells of', () => {
    const all = probed(plan.day.curve);
    const fromMs = markMs('in', 'sencha') + 30_000;
    const holed = all.filter(({ atMs }) => atMs < fromMs || atMs > fromMs + 120_000);
    const log = actedDay(document);
    const known = account(log, liquidLine(holed, LAG_S));
    expect(known.day.gaps).toHaveLength(1);
    const whole = account(log, liquidLine(all, LAG_S));
    expect(whole.day.gaps).toEqual([]);
    expect(known.teas[0]!.doseMin / whole.teas[0]!.doseMin).toBeCloseTo(1, 1);
  });

  it('holds the temperature when readings stop, and says since when', () => {
    const inAtMs = markMs('in', 'sencha');
    const log = actedDay(document, inAtMs - START_MS);
    const cut = { points: wholeLine.points.filter(({ atMs }) => atMs <= inAtMs + 20_000), gaps: [] };
    const held = account(log, cut, inAtMs + 180_000);
    expect(held.day.heldFromMs).toBeLessThanOrEqual(inAtMs + 20_000);
    expect(held.teas[0]!.doseMin).toBeCloseTo(2.6, 0);
  });

  it('has no dose without any temperature, and one from what was noted at the acts', () => {
    const log = actedDay(document, markMs('in', 'sencha') - START_MS);
    const inAtMs = markMs('in', 'sencha');
    expect(account(log, NO_LINE, inAtMs + 60_000).isLineKnown).toBe(false);
    log.add('measurement.recorded', { stepId: null, quantity: 'tempC', value: 80 }, { atMs: inAtMs });
    const typed = account(log, NO_LINE, inAtMs + 120_000);
    expect(typed.isLineKnown).toBe(true);
    expect(typed.teas[0]!.doseMin).toBeCloseTo(2, 1);
  });

  it('says so when the run does not know what it is brewed from', () => {
    expect(accountSoFar(foldRun(new LogBuilder().entries), NO_LINE, START_MS)).toEqual({
      kind: 'none',
      why: 'older-build',
    });
  });

  it('tells what an edited sheet has no step for', () => {
    const sheet = compileSheet(document, { altitudeM: 0, reachS: 8 });
    const without = { ...sheet, steps: sheet.steps.filter(({ id }) => id !== 'acid') };
    const state = foldRun(new LogBuilder(without, { document, kit }).entries);
    if (!isBrewed(state)) throw new Error('It is.');
    expect(recordedDay(state, NO_LINE, START_MS).untold).toEqual(['citric']);
  });
});

describe(figurePairs, () => {
  it('puts each figure of the desk beside what came of it', () => {
    const state = foldRun(actedDay(document).entries);
    const pairs = figurePairs(state, account(actedDay(document), wholeLine), metricPreferences);
    expect(pairs.filter(({ isLead }) => isLead).length).toBeGreaterThan(5);
    for (const { id, planned: before, happened } of pairs) {
      expect(happened, id).not.toBeNull();
      expect(happened?.word, id).toBe(before?.word);
    }
  });

  it('has no figure of a steep where no temperature is known', () => {
    const log = actedDay(document);
    const pairs = figurePairs(foldRun(log.entries), account(log), metricPreferences);
    const happened = (id: string) => pairs.find((pair) => pair.id === id)?.happened;
    expect(happened('tea.steep-dose.sencha')).toBeNull();
    expect(happened('water.ca')).not.toBeNull();
  });
});

describe(coolingClock, () => {
  const at = (...points: [number, number][]) => points.map(([min, tempC]) => ({ atMs: min * 60_000, tempC }));

  it('runs from 57 °C, and sees whether it will be met', () => {
    expect(coolingClock(at([0, 20], [30, 60]), document, kit)).toEqual({ kind: 'not-yet' });
    const falling = coolingClock(at([0, 80], [10, 57], [13, 51], [16, 46]), document, kit);
    expect(falling).toMatchObject({ kind: 'running', sinceMs: 600_000, leftS: 7200 - 360, forecast: 'in-time' });
    const slow = coolingClock(at([0, 80], [10, 57], [40, 52], [43, 51.6]), document, kit);
    expect(slow).toMatchObject({ kind: 'running', forecast: 'late' });
    expect(coolingClock(at([0, 80], [10, 57], [40, 50], [43, 50]), document, kit)).toMatchObject({ forecast: 'never' });
  });

  it('stops at 21 °C with what it took', () => {
    const there = coolingClock(at([0, 80], [10, 57], [40, 21], [41, 20]), document, kit);
    expect(there).toMatchObject({ kind: 'there', isInTime: true, tookS: 1800 });
  });
});

describe(nextAcid, () => {
  const water: Addition[] = document.additions;
  const atWater = () => {
    const log = logOf(buildDocument({ additions: water }));
    log.done('light-heat', 'acid');
    return log;
  };
  const answer = (log: LogBuilder, ph: number, line = NO_LINE, atMs = Infinity) =>
    nextAcid(foldRun(log.entries), account(log, line, atMs), ph);

  it('gives grams for the water before the heat, and follows what was weighed in', () => {
    const log = logOf(buildDocument({ targets: { waterPh: { min: 3, max: 3.4 } } })).done('light-heat', 'acid');
    const first = answer(log, 3.9)!;
    expect(first).toMatchObject({ kind: 'add', stage: 'water', name: 'citric acid', stepId: 'acid', ratio: null });
    if (first.kind !== 'add') return;
    expect(first.massG.value).toBeGreaterThan(1);
    expect(first.massG.value).toBeLessThan(15);
    expect(first.massG.low).toBeLessThan(first.massG.value);
    log.add('measurement.recorded', { stepId: 'acid', quantity: 'massG', value: first.massG.value });
    expect(account(log).plan.acids[0]!.massG).toBeCloseTo(4 + first.massG.value, 9);
    // With that acid in it, a meter that shows the target asks for nothing more.
    expect(answer(log, 3.2)).toMatchObject({ kind: 'enough' });
  });

  it('never asks for acid where it is sour enough, and says what it comes to', () => {
    const low = answer(atWater(), 2.7)!;
    expect(low.kind).toBe('too-low');
    expect(low.expectedPh).toBeGreaterThan(2.7);
    expect(answer(atWater(), 3.5)).toMatchObject({ kind: 'enough' });
  });

  it('does not believe what nothing explains', () => {
    expect(answer(atWater(), 9)!.kind).toBe('measure-again');
    for (const ph of [1, 2, 4.5, 5, 6, 7, 8]) {
      const one = answer(atWater(), ph);
      if (one?.kind === 'add') expect(one.massG.value / 22).toBeLessThan(3.01);
    }
  });

  it('learns the base of this leaf, and doses for the drink as it will be', () => {
    const log = actedDay(document, markMs('out', 'sencha') - START_MS);
    const nowMs = markMs('out', 'sencha') + 1000;
    const usualPh = account(log, wholeLine, nowMs).figures.acid!.phStill.value;
    expect(answer(log, usualPh, wholeLine, nowMs)!.ratio).toBeCloseTo(1, 2);
    const more = answer(log, usualPh + 0.3, wholeLine, nowMs)!;
    expect(more).toMatchObject({ stage: 'drink', kind: 'add' });
    expect(more.ratio).toBeGreaterThan(1.5);
    // The hops are still to come: the drink ends above what the meter shows.
    expect(more.expectedPh).toBeGreaterThan(usualPh + 0.3);
    // Without a probe the steep is taken as planned.
    expect(answer(log, usualPh, NO_LINE, nowMs)!.ratio).toBeCloseTo(1, 1);
  });

  it('offers what was learned for the next revision', () => {
    const log = actedDay(document);
    const endMs = START_MS + (plan.day.curve.at(-1)?.atMs ?? 0);
    const ph = plan.figures.acid!.phStill.value;
    expect(learnedBase(foldRun(log.entries), wholeLine)).toBeNull();
    log.add('measurement.recorded', { stepId: null, quantity: 'pH', value: ph + 0.1 }, { atMs: endMs });
    const learned = learnedBase(foldRun(log.entries), wholeLine)!;
    expect(learned).toMatchObject({ of: ['tea', 'hops'] });
    expect(learned.ratio).toBeGreaterThan(1.1);
    const next = planned(withLearnedBase(document, learned));
    expect(next.figures.acid!.phStill.value).toBeCloseTo(ph + 0.1, 1);
  });
});
