import { dayKit, leadingAcid, openEvaporatedL, type DayMark, type PlannedDay } from '../desk/index.js';
import { checkedCurve, curveTempC, type CurvePoint } from '../figures/index.js';
import type { Gap } from '../readings/index.js';
import {
  additionSteps,
  type Addition,
  type AdditionSteps,
  type RecipeDocument,
  type VesselAct,
} from '../sheets/index.js';
import type { RecordedLine } from './account-line.js';
import type { RunKit, RunState, StepProgress } from './state.js';

/** The day as it happened so far; what is still in the pot comes out at its end, for the sums. */
export interface RecordedDay extends PlannedDay {
  /** Run clock at which its own time begins: the first flame, or the start. */
  startAtMs: number;
  /** Where it ends so far, run clock: now, the keg, or the end of the run. */
  endAtMs: number;
  /** What is in so far, as it was weighed. */
  document: RecipeDocument;
  /** Ids of what is in the pot at its end. */
  inPot: readonly string[];
  /** Ids of what the sheet has no step for: not counted. */
  untold: readonly string[];
  /** Spans without readings, run clock: a straight line is drawn over them. */
  gaps: readonly Gap[];
  /** Since then nothing was read, and the temperature is held where it was; `null` while readings come. Run clock. */
  heldFromMs: number | null;
}

/** Silence for less at the end of the line is no news, ms. */
const HELD_AFTER_MS = 30_000;

export type Brewed = RunState & { document: RecipeDocument; kit: RunKit; startedAtMs: number };

export function isBrewed(state: RunState): state is Brewed {
  return state.document !== null && state.kit !== null && state.startedAtMs !== null;
}

/**
 * A run as the figures need it: the recorded line, and a mark for every act at its true time. Acts that were taken back do not count, and
 * what a missed catch got more counts as weighed.
 *
 * @param state of a run that knows what it is brewed from (`isBrewed`).
 * @param line of the liquid, run clock (`liquidLine`); where it has gaps, the temperatures noted at the acts stand in.
 * @param nowMs run clock.
 */
export function recordedDay(run: Brewed, line: RecordedLine, nowMs: number): RecordedDay {
  const state = asOf(run, nowMs);
  const startAtMs = actAt(state, 'heat-on') ?? state.startedAtMs;
  const kegAtMs = state.steps.find(({ step, status }) => step.kind === 'transfer' && status === 'done')?.doneAtMs;
  const endAtMs = Math.max(startAtMs, Math.min(nowMs, kegAtMs ?? Infinity, state.endedAtMs ?? Infinity));
  const known = withNotedTemps(state, line).filter(({ atMs }) => atMs <= endAtMs);
  const last = known.at(-1);
  const isHeld = last !== undefined && last.atMs < endAtMs;
  const whole = isHeld ? [...known, { atMs: endAtMs, tempC: last.tempC }] : known;
  const curve = fromInstant(whole, startAtMs).map(({ atMs, tempC }) => ({ atMs: atMs - startAtMs, tempC }));
  const { document, marks, inPot, untold } = whatWentIn(state, { startAtMs, endAtMs, curve });
  const kit = dayKit(document, state.kit);
  return {
    curve: checkedCurve(curve),
    marks,
    never: null,
    evaporatedL: openEvaporatedL(curve, openSpans(state, startAtMs, endAtMs), document.waterL, kit),
    startAtMs,
    endAtMs,
    document,
    inPot,
    untold,
    gaps: line.gaps.filter(({ fromMs }) => fromMs < endAtMs),
    heldFromMs: isHeld && endAtMs - last.atMs > HELD_AFTER_MS ? last.atMs : null,
  };
}

/** What was known at an instant: later acts and measurements are not there yet. */
export function asOf(run: Brewed, nowMs: number): Brewed {
  const isLater = (atMs: number | null) => atMs !== null && atMs > nowMs;
  if (!run.steps.some(({ doneAtMs }) => isLater(doneAtMs)) && !run.measurements.some(({ atMs }) => isLater(atMs)))
    return run;
  return {
    ...run,
    steps: run.steps.map((progress) =>
      isLater(progress.doneAtMs) ? { ...progress, status: 'ahead', doneAtMs: null, tempC: null } : progress,
    ),
    measurements: run.measurements.filter(({ atMs }) => !isLater(atMs)),
  };
}

/** When an act was last done, run clock; `null` when it was not. */
export function actAt(state: RunState, act: VesselAct): number | null {
  const times = state.steps.flatMap(({ step, doneAtMs }) =>
    step.acts.includes(act) && doneAtMs !== null ? doneAtMs : [],
  );
  return times.length > 0 ? Math.max(...times) : null;
}

/** From an instant on, with the temperature that it had there. */
function fromInstant(curve: readonly CurvePoint[], atMs: number): readonly CurvePoint[] {
  const tempC = curveTempC(curve, atMs);
  const after = curve.filter((point) => point.atMs > atMs);
  return tempC === null ? after : [{ atMs, tempC }, ...after];
}

/** What acts and people noted, where the probe has nothing. */
function withNotedTemps(state: RunState, { points, gaps }: RecordedLine): readonly CurvePoint[] {
  const first = points[0]?.atMs ?? Infinity;
  const last = points.at(-1)?.atMs ?? -Infinity;
  const isUnread = (atMs: number) =>
    atMs < first || atMs > last || gaps.some(({ fromMs, toMs }) => atMs > fromMs && atMs < toMs);
  const noted = state.steps.flatMap(({ doneAtMs, tempC }) =>
    doneAtMs !== null && tempC !== null ? [{ atMs: doneAtMs, tempC }] : [],
  );
  // A temperature typed by hand may be that of a cooled sample or of a keg: it counts where there is no probe at all.
  const typed =
    points.length > 0
      ? []
      : state.measurements.flatMap(({ quantity, value, atMs }) =>
          quantity === 'tempC' ? [{ atMs, tempC: value }] : [],
        );
  const missing = [...noted, ...typed].filter(({ atMs }) => isUnread(atMs));
  return missing.length === 0 ? points : [...points, ...missing].sort((a, b) => a.atMs - b.atMs);
}

interface Frame {
  startAtMs: number;
  endAtMs: number;
  curve: readonly CurvePoint[];
}

function whatWentIn(
  state: Brewed,
  frame: Frame,
): { document: RecipeDocument; marks: DayMark[]; inPot: string[]; untold: string[] } {
  const steps = additionSteps(state.document);
  const progressOf = (stepId: string | null) => state.steps.find(({ step }) => step.id === stepId);
  const mark = (kind: DayMark['kind'], additionId: string | null, doneAtMs: number): DayMark => {
    const atMs = Math.min(frame.endAtMs, Math.max(frame.startAtMs, doneAtMs)) - frame.startAtMs;
    return { kind, additionId, atMs, tempC: curveTempC(frame.curve, atMs) ?? frame.curve.at(-1)?.tempC ?? 0 };
  };
  const additions: Addition[] = [];
  const marks: DayMark[] = [];
  const inPot: string[] = [];
  const untold: string[] = [];
  for (const addition of state.document.additions) {
    const { inStepId, outStepId } = steps.get(addition.id) as AdditionSteps;
    const inStep = progressOf(inStepId);
    if (!inStep) untold.push(addition.id);
    if (!inStep || inStep.doneAtMs === null) continue;
    additions.push({ ...addition, massG: massIn(state, addition, inStep) });
    marks.push(mark('in', addition.id, inStep.doneAtMs));
    if (!('out' in addition)) continue;
    const outAtMs = progressOf(outStepId)?.doneAtMs ?? null;
    if (outAtMs === null && inStep.doneAtMs < frame.endAtMs) inPot.push(addition.id);
    marks.push(mark('out', addition.id, outAtMs ?? frame.endAtMs));
  }
  const chillAtMs = actAt(state, 'chiller-on');
  const kegAtMs =
    state.steps.find(({ step, status }) => step.kind === 'transfer' && status === 'done')?.doneAtMs ?? null;
  return {
    document: { ...state.document, waterL: filledL(state), additions },
    marks: [
      ...(actAt(state, 'heat-on') === null ? [] : [mark('heat', null, frame.startAtMs)]),
      ...marks,
      ...(chillAtMs === null ? [] : [mark('chill', null, chillAtMs)]),
      ...(kegAtMs === null ? [] : [mark('transfer', null, kegAtMs)]),
    ].sort((a, b) => a.atMs - b.atMs),
    inPot: kegAtMs === null ? inPot : [],
    untold,
  };
}

/** As the sheet had it weighed, with what was chosen for a missed catch; acid that was weighed in later on top. */
function massIn({ sheet, measurements, document }: Brewed, addition: Addition, { step }: StepProgress): number {
  const own = step.amounts.find(({ name }) => name === addition.name);
  const planned = sheet?.steps.find(({ id }) => id === step.id)?.amounts ?? [];
  const sumG = (amounts: readonly { massG: number }[]) => amounts.reduce((sum, { massG }) => sum + massG, 0);
  const plannedG = sumG(planned);
  const isAlone = step.amounts.filter(({ name }) => name === addition.name).length === 1;
  const massG = own && isAlone ? own.massG : addition.massG * (plannedG > 0 ? sumG(step.amounts) / plannedG : 1);
  if (leadingAcid(document)?.id !== addition.id) return massG;
  return massG + sumG(measurements.flatMap((one) => (isAcidDose(one, step.id) ? [{ massG: one.value }] : [])));
}

function isAcidDose({ quantity, stepId }: RunState['measurements'][number], acidStepId: string): boolean {
  return quantity === 'massG' && stepId === acidStepId;
}

/** As it was measured at the fill, or as it is told. */
function filledL({ document, measurements, steps }: Brewed): number {
  const fill = steps.find(({ step }) => step.kind === 'fill')?.step.id;
  const measured = measurements.findLast(({ quantity, stepId }) => quantity === 'volumeL' && stepId === fill);
  return measured !== undefined && fill !== undefined && measured.value > 0 ? measured.value : document.waterL;
}

/** Where the lid was off, in the day's own time; a kettle without one stands open all the time. */
function openSpans(state: Brewed, startAtMs: number, endAtMs: number): { fromMs: number; toMs: number }[] {
  const whole = endAtMs - startAtMs;
  if (!dayKit(state.document, state.kit).isLidOn) return [{ fromMs: 0, toMs: whole }];
  const turns = state.steps
    .flatMap(({ step, doneAtMs }) =>
      doneAtMs === null
        ? []
        : step.acts.flatMap((act) =>
            act === 'lid-off' || act === 'lid-on' ? [{ isOpen: act === 'lid-off', doneAtMs }] : [],
          ),
    )
    .sort((a, b) => a.doneAtMs - b.doneAtMs);
  return turns.flatMap(({ isOpen, doneAtMs }, index) => {
    const fromMs = Math.max(0, doneAtMs - startAtMs);
    const toMs = Math.min(whole, (turns[index + 1]?.doneAtMs ?? endAtMs) - startAtMs);
    return isOpen && toMs > fromMs ? [{ fromMs, toMs }] : [];
  });
}
