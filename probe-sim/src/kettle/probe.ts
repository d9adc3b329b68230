import { nextNormal, seedRandom, type RandomState } from '../random.js';
import type { ProbeSetup } from './setup.js';

/** A temperature of the liquid that the probe has not felt yet. */
interface Felt {
  atS: number;
  tempC: number;
}

export interface ProbeState {
  /** Temperature of the sensing tip. */
  tipC: number;
  /** The liquid over the last dead time, oldest first. */
  readonly recent: readonly Felt[];
  /** Present deviation, °C. */
  deviationC: number;
  random: RandomState;
}

export function startProbe(setup: ProbeSetup, tempC: number, seed: number): ProbeState {
  const draw = nextNormal(seedRandom(seed));
  return { tipC: tempC, recent: [{ atS: 0, tempC }], deviationC: setup.noiseC * draw.value, random: draw.next };
}

/** First-order lag behind the liquid as it was one dead time ago; `atS` is the end of the step of `stepS`. */
export function followLiquid(
  setup: ProbeSetup,
  probe: ProbeState,
  tempC: number,
  atS: number,
  stepS: number,
): ProbeState {
  const recent = [...probe.recent, { atS, tempC }];
  const feltAtS = atS - setup.deadTimeS;
  // One point at or before the instant that is felt is kept, to interpolate from.
  const second = recent.findIndex((point) => point.atS > feltAtS);
  const first = second === -1 ? recent.length - 1 : Math.max(0, second - 1);
  const kept = recent.slice(first);
  const feltC = between(kept, feltAtS);
  const follows = setup.tauS > 0 ? -Math.expm1(-stepS / setup.tauS) : 1;
  return { ...probe, recent: kept, tipC: probe.tipC + follows * (feltC - probe.tipC) };
}

/** The deviation after `elapsedS`: a first-order autoregression, exact for any elapsed time. */
export function wander(setup: ProbeSetup, probe: ProbeState, elapsedS: number): ProbeState {
  const keeps = setup.noiseMemoryS > 0 ? Math.exp(-elapsedS / setup.noiseMemoryS) : 0;
  const draw = nextNormal(probe.random);
  const deviationC = keeps * probe.deviationC + Math.sqrt(1 - keeps * keeps) * setup.noiseC * draw.value;
  return { ...probe, deviationC, random: draw.next };
}

/** What the probe shows now. */
export function shownC(setup: ProbeSetup, probe: ProbeState): number {
  const tempC = probe.tipC + probe.deviationC + setup.biasC;
  const stepped = setup.resolutionC > 0 ? Math.round(tempC / setup.resolutionC) * setup.resolutionC : tempC;
  return Number(stepped.toFixed(4));
}

function between(points: readonly Felt[], atS: number): number {
  const from = points[0]!;
  const to = points[1];
  if (!to || atS <= from.atS) return from.tempC;
  if (to.atS === from.atS) return to.tempC;
  return from.tempC + ((to.tempC - from.tempC) * (atS - from.atS)) / (to.atS - from.atS);
}
