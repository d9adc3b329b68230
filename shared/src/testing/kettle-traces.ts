/**
 * Kettles that never were: traces with a known liquid, a lagging noisy probe and rough knowledge, drawn from a seed. The same
 * seed gives the same trace for ever, so figures measured on them can be measured again.
 *
 * Physics: the liquid gives heat to the room and to a coil in proportion to the temperature differences and takes a constant
 * heating power; eddies pass the probe, the probe follows them and the liquid with its lag, then reads with white noise in
 * steps of its resolution.
 */

export const TRACE_FAMILIES = ['chill', 'passive', 'heat', 'lateChill', 'flowChange', 'gap', 'spikes'] as const;
/** Harder ones, for behaviour rather than for figures. */
export const HARD_FAMILIES = ['coilStep', 'openPot', 'unannounced', 'slowTap', 'noRoom'] as const;

export type TraceFamily = (typeof TRACE_FAMILIES)[number] | (typeof HARD_FAMILIES)[number];

export interface TraceAct {
  act: 'chiller-on' | 'heat-on' | 'coil-in';
  /** Seconds from the start of the trace. */
  t: number;
}

export interface KettleTrace {
  name: string;
  family: TraceFamily;
  targetC: number;
  direction: 'rising' | 'falling';
  /** As told; the true one is up to a quarter off. */
  lagS: number;
  trueLagS: number;
  reachS: number;
  crossingS: number;
  actions: TraceAct[];
  roomC: number | null;
  coolantC: number | null;
  periodS: number;
  resolutionC: number;
  /** What the probe read: [seconds, celsius]. */
  readings: [number, number][];
  /** The liquid itself every half second: [seconds, celsius]. */
  truth: [number, number][];
}

/** A small generator of uniform numbers in [0, 1): a 32-bit mix of a counter. */
export function seeded(seed: number): () => number {
  let counter = seed >>> 0;
  return () => {
    counter = (counter + 0x9e3779b9) >>> 0;
    let z = counter;
    z = Math.imul(z ^ (z >>> 16), 0x85ebca6b);
    z = Math.imul(z ^ (z >>> 13), 0xc2b2ae35);
    return ((z ^ (z >>> 16)) >>> 0) / 4294967296;
  };
}

interface Draw {
  uniform: (low: number, high: number) => number;
  normal: () => number;
  chance: (share: number) => boolean;
  pick: <V>(values: readonly V[]) => V;
}

function drawFrom(seed: number): Draw {
  const random = seeded(seed);
  return {
    uniform: (low, high) => low + (high - low) * random(),
    normal: () => Math.sqrt(-2 * Math.log(1 - random())) * Math.cos(2 * Math.PI * random()),
    chance: (share) => random() < share,
    pick: (values) => values[Math.floor(random() * values.length)]!,
  };
}

const GRID_S = 0.1;
const AFTER_CROSSING_S = 120;
const LONGEST_S = 2400;
/** Later than this before the crossing nothing can be learned of a change in time. */
const LEAST_AFTER_CHANGE_S = 50;
const LEAST_CHILL_S = 50;

interface Kettle {
  startC: number;
  targetC: number;
  direction: 'rising' | 'falling';
  roomC: number;
  coolantC: number;
  lossesPerS: number;
  exponent: number;
  heatCPerS: number;
  chillPerS: number;
  chillFromS: number;
  flowChange: { atS: number; factor: number } | null;
  coilStep: { atS: number; stepC: number } | null;
}

function drawKettle(family: TraceFamily, draw: Draw): Kettle {
  const roomC = draw.uniform(17, 27);
  const coolantC = draw.uniform(10, 15);
  const startC = draw.uniform(78, 88);
  const calm: Kettle = {
    startC,
    targetC: draw.uniform(54, 64),
    direction: 'falling',
    roomC,
    coolantC,
    lossesPerS: draw.uniform(1.2e-4, 2.7e-4),
    exponent: 1,
    heatCPerS: 0,
    chillPerS: draw.uniform(4, 12.5) / 60 / (startC - coolantC),
    chillFromS: draw.uniform(55, 200),
    flowChange: null,
    coilStep: null,
  };
  const never = { chillPerS: 0, chillFromS: Infinity };
  switch (family) {
    case 'passive':
      return { ...calm, ...never, targetC: startC - draw.uniform(3, 8) };
    case 'openPot':
      return { ...calm, ...never, exponent: draw.uniform(1.6, 2.4), targetC: startC - draw.uniform(3, 8) };
    case 'heat': {
      const heatCPerS = draw.uniform(1.2, 2.8) / 60;
      return {
        ...calm,
        ...never,
        startC: draw.uniform(60, 66),
        targetC: draw.uniform(76, 86),
        direction: 'rising',
        heatCPerS,
      };
    }
    case 'lateChill':
      return { ...calm, startC: draw.uniform(66, 74), chillFromS: draw.uniform(100, 260) };
    case 'flowChange': {
      const chillFromS = draw.uniform(50, 90);
      const factor = draw.chance(0.5) ? draw.uniform(0.45, 0.8) : draw.uniform(1.2, 1.6);
      return { ...calm, chillFromS, flowChange: { atS: chillFromS + draw.uniform(60, 160), factor } };
    }
    case 'coilStep': {
      const atS = draw.uniform(60, 150);
      const targetC = startC - draw.uniform(5, 9);
      return { ...calm, ...never, targetC, coilStep: { atS, stepC: -draw.uniform(1, 3.5) } };
    }
    default:
      return calm;
  }
}

/** The liquid on a fine grid, up to two minutes after the crossing; null when it never crosses in time. */
function simulateLiquid(kettle: Kettle): { grid: number[]; crossingS: number } | null {
  const towards = kettle.direction === 'rising' ? 1 : -1;
  const grid = [kettle.startC];
  let crossingS: number | null = null;
  let temp = kettle.startC;
  for (let i = 1; i * GRID_S <= LONGEST_S; i += 1) {
    const t = i * GRID_S;
    const above = temp - kettle.roomC;
    // The exponent bends the losses without changing them at the start.
    const bent = above * (above / (kettle.startC - kettle.roomC)) ** (kettle.exponent - 1);
    const factor = kettle.flowChange && t >= kettle.flowChange.atS ? kettle.flowChange.factor : 1;
    const chill = t >= kettle.chillFromS ? kettle.chillPerS * factor * (temp - kettle.coolantC) : 0;
    temp += GRID_S * (kettle.heatCPerS - kettle.lossesPerS * bent - chill);
    if (kettle.coilStep && Math.abs(t - kettle.coilStep.atS) < GRID_S / 2) temp += kettle.coilStep.stepC;
    if (crossingS === null && (temp - kettle.targetC) * towards >= 0) crossingS = t;
    grid.push(temp);
    if (crossingS !== null && t > crossingS + AFTER_CROSSING_S) return { grid, crossingS };
  }
  return null;
}

interface Probe {
  lagS: number;
  eddyC: number;
  eddyMemoryS: number;
  whiteC: number;
  resolutionC: number;
  periodS: number;
}

function drawProbe(draw: Draw): Probe {
  return {
    lagS: draw.chance(0.75) ? draw.uniform(3, 10) : draw.uniform(10, 17),
    eddyC: draw.uniform(0.06, 0.3),
    eddyMemoryS: draw.uniform(4, 11),
    whiteC: draw.uniform(0.03, 0.14),
    resolutionC: draw.pick([0.01, 0.0625, 0.1]),
    periodS: draw.pick([0.75, 1, 1, 1, 2]),
  };
}

const round = (value: number, step: number): number => Number((Math.round(value / step) * step).toFixed(4));

function read(grid: readonly number[], probe: Probe, draw: Draw): [number, number][] {
  const readings: [number, number][] = [];
  const keep = Math.exp(-GRID_S / probe.eddyMemoryS);
  let eddy = draw.normal() * probe.eddyC;
  let tip = grid[0]!;
  let nextS = 0;
  for (const [i, liquid] of grid.entries()) {
    const t = i * GRID_S;
    eddy = keep * eddy + Math.sqrt(1 - keep * keep) * probe.eddyC * draw.normal();
    tip += (1 - Math.exp(-GRID_S / probe.lagS)) * (liquid + eddy - tip);
    if (t + 1e-9 < nextS) continue;
    readings.push([round(t, 0.1), round(tip + probe.whiteC * draw.normal(), probe.resolutionC)]);
    nextS += probe.periodS * (1 + 0.05 * (draw.uniform(0, 1) - 0.5));
  }
  return readings;
}

function withSpikes(readings: [number, number][], draw: Draw): [number, number][] {
  return readings.map(([t, c]) => [t, draw.chance(0.025) ? draw.pick([-127, 85, 0]) : c]);
}

function withGap(readings: [number, number][], crossingS: number, draw: Draw): [number, number][] {
  const from = crossingS - draw.uniform(30, 70);
  const to = Math.min(crossingS - draw.uniform(3, 15), from + draw.uniform(20, 50));
  return readings.filter(([t]) => t <= from || t >= to);
}

function actsOf(family: TraceFamily, kettle: Kettle, draw: Draw): TraceAct[] {
  if (family === 'heat') return [{ act: 'heat-on', t: 0 }];
  if (kettle.coilStep) return [{ act: 'coil-in', t: round(kettle.coilStep.atS + draw.uniform(-3, 3), 0.1) }];
  if (family === 'unannounced' || !Number.isFinite(kettle.chillFromS)) return [];
  const tapErrorS = family === 'slowTap' ? draw.uniform(-12, 12) : draw.uniform(-2.6, 2.6);
  return [{ act: 'chiller-on', t: round(kettle.chillFromS + tapErrorS, 0.1) }];
}

/** One trace of a family. */
export function makeTrace(family: TraceFamily, seed: number): KettleTrace {
  const draw = drawFrom(seed);
  for (;;) {
    const kettle = drawKettle(family, draw);
    const liquid = simulateLiquid(kettle);
    if (liquid === null) continue;
    const { grid, crossingS } = liquid;
    if (kettle.flowChange && kettle.flowChange.atS > crossingS - LEAST_AFTER_CHANGE_S) continue;
    if (Number.isFinite(kettle.chillFromS) && kettle.chillFromS > crossingS - LEAST_CHILL_S) continue;
    const probe = drawProbe(draw);
    const plain = read(grid, probe, draw);
    const faulty =
      family === 'spikes' ? withSpikes(plain, draw) : family === 'gap' ? withGap(plain, crossingS, draw) : plain;
    // Now and then a chip answers with its power-on value in any family.
    const readings = faulty;
    const knows = family !== 'noRoom';
    const chilled = Number.isFinite(kettle.chillFromS);
    return {
      name: `${family}-${seed}`,
      family,
      targetC: kettle.targetC,
      direction: kettle.direction,
      lagS: round(probe.lagS * draw.uniform(0.75, 1.25), 0.1),
      trueLagS: probe.lagS,
      reachS: draw.pick([6, 10, 15]),
      crossingS,
      actions: actsOf(family, kettle, draw),
      roomC: knows ? Math.round(kettle.roomC + draw.uniform(-2, 2)) : null,
      coolantC: knows && chilled ? Math.round(kettle.coolantC + draw.uniform(-1, 1)) : null,
      periodS: probe.periodS,
      resolutionC: probe.resolutionC,
      readings,
      truth: grid.filter((_, i) => i % 5 === 0).map((temp, i) => [i * 0.5, temp]),
    };
  }
}

/** `count` traces, the families in turn. */
export function makeTraces(families: readonly TraceFamily[], count: number, seed: number): KettleTrace[] {
  return Array.from({ length: count }, (_, i) => makeTrace(families[i % families.length]!, seed * 100_003 + i));
}
