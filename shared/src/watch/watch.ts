import { advanceBank, believe, disturbBank, resettleBank, startBank, updateBank, type Disturbance } from './bank.js';
import { advanceRivals, updateRivals } from './rivals.js';
import { CHILLING_C_PER_S, type Surroundings } from './slope-law.js';
import type { FlatLine, Suspect, WatchState } from './state.js';
import type { WatchAct, WatchActDone, WatchReading, WatchVerdict } from './types.js';
import { FASTEST_C_PER_S, isOffTheLine, isPowerOn, isStuck, judgeRange } from './validate.js';

/** Taken where nobody knows better. */
const USUAL_ROOM_C = 21;
const USUAL_COOLANT_C = 14;
/** Readings that must agree before anything is believed. */
const READINGS_TO_START = 3;
/** Suspects in a row that agree make a step. */
const SUSPECTS_TO_STEP = 3;
/** Oldest suspect that still counts. */
const SUSPECT_MEMORY_S = 15;
const SUSPECT_MEMORY_PERIODS = 5;
/** A step that an act may bring counts from this size on. */
const STEP_C = 0.5;
/** Longest absence the filters bridge; after that the watch starts afresh. */
const LONGEST_BRIDGE_S = 900;

export function surroundings(state: WatchState): Surroundings {
  return {
    roomC: state.config.roomC ?? USUAL_ROOM_C,
    coolantC: state.config.coolantC ?? USUAL_COOLANT_C,
    kettle: state.kettle,
  };
}

/** Time between readings that counts as a gap. */
export function gapS(state: WatchState): number {
  return Math.max(3 * state.config.samplePeriodS, 3);
}

/** Variance of one reading's own noise, the probe's resolution included. */
export function readingVariance(state: WatchState): number {
  return Math.max(state.whiteVariance, 0.03 ** 2) + state.config.resolutionC ** 2 / 12;
}

/** Notes something done to the kettle. Acts that come late are taken as of now: the estimate never runs backwards. */
export function watchAct(state: WatchState, done: WatchActDone): WatchState {
  const kettle = kettleAfter(state, done.act);
  if (state.bank === null) return { ...state, kettle };
  const bank = [...state.bank];
  const atMs = Number.isFinite(done.atMs) ? Math.max(done.atMs, state.bankAtMs) : state.bankAtMs;
  if (atMs > state.bankAtMs) {
    advanceBank(bank, Math.min(LONGEST_BRIDGE_S, (atMs - state.bankAtMs) / 1000), state.config, surroundings(state));
  }
  const belief = believe(bank);
  const disturbance = disturbanceOf(done.act, belief, surroundings(state), state.config.chillerPerS ?? null);
  disturbBank(bank, disturbance);
  const steppedAtMs = disturbance.stepC >= STEP_C ? atMs : state.steppedAtMs;
  return { ...state, kettle, bank, bankAtMs: atMs, steppedAtMs, rivals: [], flat: null };
}

function kettleAfter({ kettle }: WatchState, act: WatchAct): WatchState['kettle'] {
  switch (act) {
    case 'chiller-on':
      return { ...kettle, chilling: true, heating: false };
    case 'chiller-off':
      return { ...kettle, chilling: false };
    case 'heat-on':
      return { ...kettle, heating: true, chilling: false };
    case 'heat-off':
      return { ...kettle, heating: false };
    case 'lid-on':
    case 'lid-off':
      return { ...kettle, lidOn: act === 'lid-on' };
    default:
      return kettle;
  }
}

/** Rate constant of a kettle's chiller in 1/s: the middle and the spread of what coils do. */
const CHILLER_PER_S = 2.1e-3;
const CHILLER_SPREAD_PER_S = 0.9e-3;
/** A learned one still depends on how far the tap is opened: relative spread. */
const LEARNED_SPREAD = 0.25;
/** People tap a few seconds before or after they turn the tap. */
const TAP_SPREAD_S = 1.8;

function disturbanceOf(
  act: WatchAct,
  belief: { tempC: number; rateCPerS: number },
  around: Surroundings,
  learnedChillerPerS: number | null,
): Disturbance {
  const kept = { stepC: 0, slopeCPerS: 0 };
  switch (act) {
    case 'chiller-on': {
      if (belief.rateCPerS < -CHILLING_C_PER_S) return { stepC: 0.1, slopeCPerS: 0.03 };
      const drive = Math.max(5, belief.tempC - around.coolantC);
      const meanCPerS = -(learnedChillerPerS ?? CHILLER_PER_S) * drive;
      const sdCPerS = learnedChillerPerS === null ? CHILLER_SPREAD_PER_S * drive : LEARNED_SPREAD * -meanCPerS;
      return { stepC: -meanCPerS * TAP_SPREAD_S, slopeCPerS: 0, newSlope: { meanCPerS, sdCPerS } };
    }
    case 'chiller-off':
      return { stepC: 0.2, slopeCPerS: 0, newSlope: { meanCPerS: -0.01, sdCPerS: 0.02 } };
    case 'heat-on':
      return { stepC: 0.1, slopeCPerS: 0, newSlope: { meanCPerS: 0.025, sdCPerS: 0.03 } };
    case 'heat-off':
      return { ...kept, newSlope: { meanCPerS: -0.005, sdCPerS: 0.02 } };
    case 'coil-in':
      return { stepC: 2, slopeCPerS: 0.02 };
    case 'tea-in':
      return { stepC: 0.5, slopeCPerS: 0.01 };
    case 'stirred':
      return { stepC: 0.3, slopeCPerS: 0.01 };
    case 'lid-on':
    case 'lid-off':
      return { stepC: 0.05, slopeCPerS: 0.01 };
    case 'tea-out':
    case 'hops-in':
    case 'hops-out':
      return { stepC: 0.2, slopeCPerS: 0.005 };
  }
}

/** Takes in one reading. Never throws, whatever the probe says. */
export function watchReading(state: WatchState, reading: WatchReading): WatchState {
  const { atMs } = reading;
  if (!Number.isFinite(atMs) || (state.lastReadingAtMs !== null && atMs <= state.lastReadingAtMs)) {
    return judged(state, 'late');
  }
  const range = judgeRange(reading.tempC);
  if (range !== 'good' || reading.tempC === null) return judged({ ...state, lastReadingAtMs: atMs }, range);
  const { tempC } = reading;
  const flat = flatAfter(state, { atMs, tempC });
  const seen = { ...state, lastReadingAtMs: atMs, flat };
  const lastGood = state.recent.at(-1) ?? null;
  const powerOn = isPowerOn(
    { atMs, tempC },
    {
      lastGood,
      lastReadingAtMs: state.lastReadingAtMs,
      gapS: gapS(state),
      noiseC: Math.sqrt(readingVariance(state)),
    },
  );
  if (powerOn) return judged(seen, 'power-on');
  if (state.bank === null) return starting(seen, { atMs, tempC });

  if (isDead(state, flat, atMs)) return stuck(seen, flat);

  const elapsedS = (atMs - state.bankAtMs) / 1000;
  if (elapsedS > LONGEST_BRIDGE_S) return starting({ ...seen, bank: null, recent: [], suspects: [] }, { atMs, tempC });
  const bank = [...state.bank];
  if (elapsedS > 0) advanceBank(bank, elapsedS, state.config, surroundings(state));
  const rivals = advanceRivals(state.rivals, elapsedS, atMs, state.config, surroundings(state));
  const white = readingVariance(state);
  const isOff = [bank, ...rivals.map((rival) => rival.bank)].every((opinion) => {
    const { probeC, probeVariance } = believe(opinion);
    return isOffTheLine(tempC, probeC, Math.sqrt(probeVariance + white));
  });
  return isOff ? suspected(seen, bank, { atMs, tempC }) : accepted(seen, bank, rivals, { atMs, tempC });
}

/** A slope less sure than this share of itself was not seen but expected. */
const SURE_FALL_SHARE = 0.2;

/** One more number: the same line, or the beginning of another. */
function flatAfter(
  { flat, bank, bankAtMs, lastGoodAtMs, steppedAtMs }: WatchState,
  { atMs, tempC }: Suspect,
): FlatLine {
  if (flat?.tempC === tempC) return { ...flat, count: flat.count + 1 };
  return { tempC, sinceMs: atMs, count: 1, before: { bank, bankAtMs, lastGoodAtMs, steppedAtMs } };
}

/** A probe that says one number while a chiller pulls the liquid away from it has died with that number in its mouth. */
function isDead({ kettle, config }: WatchState, { before, sinceMs, count }: FlatLine, atMs: number): boolean {
  if (!kettle.chilling || before.bank === null) return false;
  const { rateCPerS, rateVariance } = believe(before.bank);
  // Only a fall that was seen: a chiller that was tapped and never ran leaves a calm line too.
  if (Math.sqrt(Math.max(0, rateVariance)) > SURE_FALL_SHARE * -rateCPerS) return false;
  const { resolutionC } = config;
  return isStuck({ spanS: (atMs - sinceMs) / 1000, count, fallCPerS: -rateCPerS, resolutionC });
}

/** Back to what was believed before: the age of the signal, and the course from there, are then the true ones. */
function stuck(state: WatchState, { before, sinceMs }: FlatLine): WatchState {
  if (state.bankAtMs === before.bankAtMs) return judged(state, 'stuck');
  const trail = state.trail.filter(({ atMs }) => atMs < sinceMs);
  return judged({ ...state, ...before, rivals: [], suspects: [], trail }, 'stuck');
}

function judged(state: WatchState, verdict: WatchVerdict): WatchState {
  return {
    ...state,
    lastVerdict: verdict,
    verdictCounts: { ...state.verdictCounts, [verdict]: state.verdictCounts[verdict] + 1 },
  };
}

/** Before the bank: wait until the newest readings lie within reach of each other. */
function starting(state: WatchState, good: Suspect): WatchState {
  const recent = [...state.recent, good].slice(-READINGS_TO_START);
  const next = judged({ ...state, recent }, 'good');
  if (recent.length < READINGS_TO_START || !agree(recent)) return next;
  const middle = [...recent].sort((a, b) => a.tempC - b.tempC)[1]!;
  return {
    ...next,
    bank: startBank(middle.tempC, state.config),
    bankAtMs: good.atMs,
    firstGoodAtMs: state.firstGoodAtMs ?? good.atMs,
    lastGoodAtMs: good.atMs,
    suspects: [],
    trail: [...state.trail, { atMs: good.atMs, tempC: middle.tempC }],
  };
}

/** True when no two neighbours are further apart than a kettle moves between them, noise allowed. */
function agree(readings: readonly Suspect[]): boolean {
  return readings.every((reading, i) => {
    const before = readings[i - 1];
    if (!before) return true;
    const spanS = Math.min(10, (reading.atMs - before.atMs) / 1000);
    return Math.abs(reading.tempC - before.tempC) <= 1 + FASTEST_C_PER_S * spanS;
  });
}

/** A reading off the line: a spike, unless it is the third in a row that says the same. */
function suspected(state: WatchState, bank: number[], suspect: Suspect): WatchState {
  const memoryS = Math.max(SUSPECT_MEMORY_S, SUSPECT_MEMORY_PERIODS * state.config.samplePeriodS);
  const fresh = state.suspects.filter((s) => suspect.atMs - s.atMs <= memoryS * 1000);
  const suspects = [...fresh, suspect].slice(-SUSPECTS_TO_STEP);
  if (suspects.length < SUSPECTS_TO_STEP || !agree(suspects)) return judged({ ...state, suspects }, 'spike');
  resettleBank(bank, suspect.tempC, 3);
  return judged(
    {
      ...state,
      bank,
      bankAtMs: suspect.atMs,
      suspects: [],
      recent: suspects,
      lastGoodAtMs: suspect.atMs,
      steppedAtMs: suspect.atMs,
      rivals: [],
    },
    'good',
  );
}

/** Readings the white-noise estimate remembers. */
const WHITE_MEMORY = 120;

function accepted(
  state: WatchState,
  bank: number[],
  rivals: ReturnType<typeof advanceRivals>,
  good: Suspect,
): WatchState {
  const recent = [...state.recent.slice(-2), good];
  const white = whiteNoise(state, recent);
  const variance = readingVariance({ ...state, ...white });
  const evidence = updateBank(bank, good.tempC, variance);
  const contest = updateRivals(rivals, bank, evidence, good, variance);
  const standing = contest.winner ?? bank;
  return judged(
    {
      ...state,
      ...white,
      bank: standing,
      bankAtMs: good.atMs,
      rivals: contest.rivals,
      recent,
      suspects: [],
      lastGoodAtMs: good.atMs,
      trail: remembered(state, standing, good.atMs),
    },
    'good',
  );
}

/** White noise from second differences: the liquid and the eddies hardly bend within three readings. */
function whiteNoise(state: WatchState, recent: readonly Suspect[]): Pick<WatchState, 'whiteVariance' | 'whiteCount'> {
  const [a, b, c] = recent;
  if (!a || !b || !c || (c.atMs - a.atMs) / 1000 > 2 * gapS(state)) return state;
  const share = (b.atMs - a.atMs) / (c.atMs - a.atMs);
  const bend = b.tempC - a.tempC - share * (c.tempC - a.tempC);
  const gain = 1 + share ** 2 + (1 - share) ** 2;
  const one = Math.min(bend ** 2 / gain, 9 * state.whiteVariance);
  const whiteCount = Math.min(WHITE_MEMORY, state.whiteCount + 1);
  // Twenty readings' worth of the starting guess keeps the first few from deciding.
  return { whiteCount, whiteVariance: state.whiteVariance + (one - state.whiteVariance) / (20 + whiteCount) };
}

const TRAIL_STEP_S = 5;
const TRAIL_LENGTH = 240;

/** The estimate every few seconds; when full, every second point of the older half goes. */
function remembered(state: WatchState, bank: readonly number[], atMs: number): WatchState['trail'] {
  const last = state.trail.at(-1);
  if (last && atMs - last.atMs < TRAIL_STEP_S * 1000) return state.trail;
  const trail = [...state.trail, { atMs, tempC: believe(bank).tempC }];
  return trail.length <= TRAIL_LENGTH ? trail : trail.filter((_, i) => i > TRAIL_LENGTH / 2 || i % 2 === 0);
}
