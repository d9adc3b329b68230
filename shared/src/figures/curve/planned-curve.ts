import { heatingTime, type Heating } from '../heat/heating-time.js';
import { newtonDurationS, newtonTempC } from '../heat/newton.js';
import { powerLawDurationS, powerLawTempC } from '../heat/power-law-cooling.js';
import { finite, notNegative } from '../numeric/guard.js';
import type { CurvePoint, TemperatureCurve } from './temperature-curve.js';

/** A fall ends at a temperature or after a time. */
export type StageEnd = { toC: number } | { durationS: number };

/** One part of a planned day; `id` comes back on its mark. */
export type PlannedStage = { id: string } & (
  | ({ kind: 'heat'; toC: number } & Omit<Heating, 'fromC' | 'toC'>)
  | { kind: 'hold'; durationS: number }
  /** A cold (or hot) addition: at once to `toC` (mixedTempC). */
  | { kind: 'mix'; toC: number }
  /** Toward a surrounding, by Newton: a stirred chiller. */
  | ({ kind: 'cool'; surroundC: number; kPerS: number } & StageEnd)
  /** A pot on its own, or a chiller in an unstirred one (coolingExponent). */
  | ({ kind: 'fall'; referenceC: number; fallCPerS: number; exponent: number } & StageEnd)
);

export interface StageMark {
  id: string;
  fromMs: number;
  toMs: number;
  fromC: number;
  toC: number;
}

export type PlannedCurve =
  | { kind: 'planned'; curve: TemperatureCurve; marks: readonly StageMark[] }
  /** One stage does not get where it should; the curve ends before it. */
  | { kind: 'never'; stageId: string; limitC: number; curve: TemperatureCurve; marks: readonly StageMark[] };

/** Curved stages get a point for each step of this height, K; a straight line between two is then right within 0.01 K. */
const STEP_K = 0.5;

interface Shape {
  durationS: number;
  tempAt: (seconds: number) => number;
}

type Shaped = Shape | { limitC: number };

function endS(end: StageEnd, durationToC: (toC: number) => number | null): number | null {
  return 'toC' in end ? durationToC(end.toC) : notNegative(end.durationS, 'A duration', 's');
}

function shapeOf(stage: PlannedStage, fromC: number): Shaped {
  switch (stage.kind) {
    case 'hold':
      return { durationS: notNegative(stage.durationS, 'A duration', 's'), tempAt: () => fromC };
    case 'mix':
      return { durationS: 0, tempAt: () => finite(stage.toC, 'A mixed temperature', '°C') };
    case 'heat': {
      const time = heatingTime({ ...stage, fromC });
      if (time.kind === 'never') return { limitC: time.limitC };
      const usefulW = stage.powerW * stage.efficiency;
      const lossWPerK = stage.lossWPerK ?? 0;
      const line = (s: number) => fromC + (usefulW / stage.heatCapacityJPerK) * s;
      // With a small loss the limit is hotter than anything that a temperature may be; it is only a number here.
      const limitC = (stage.roomC ?? 0) + usefulW / lossWPerK;
      const bent = (s: number) => fromC - (limitC - fromC) * Math.expm1((-lossWPerK * s) / stage.heatCapacityJPerK);
      return { durationS: time.durationS, tempAt: lossWPerK === 0 ? line : bent };
    }
    case 'cool': {
      const durationS = endS(stage, (toC) => newtonDurationS(fromC, toC, stage.surroundC, stage.kPerS));
      if (durationS === null) return { limitC: stage.surroundC };
      return { durationS, tempAt: (s) => newtonTempC(fromC, stage.surroundC, stage.kPerS, s) };
    }
    case 'fall': {
      const cooling = { ...stage, fromC };
      const durationS = endS(stage, (toC) => powerLawDurationS(cooling, toC));
      if (durationS === null) return { limitC: stage.referenceC };
      return { durationS, tempAt: (s) => powerLawTempC(cooling, s) };
    }
  }
}

/**
 * The temperature of a planned day, from the stages a run sheet means. It feeds the same sums that the recorded curve feeds
 * afterwards; `marks` say when each stage begins and ends, ms from the start.
 *
 * @param startC °C.
 * @throws RangeError when a stage has a number out of range.
 * @see heating-time.ts, newton.ts, power-law-cooling.ts.
 */
export function planCurve(startC: number, stages: readonly PlannedStage[]): PlannedCurve {
  const curve: CurvePoint[] = [{ atMs: 0, tempC: finite(startC, 'A start temperature', '°C') }];
  const marks: StageMark[] = [];
  let atMs = 0;
  let tempC = startC;
  for (const stage of stages) {
    const shape = shapeOf(stage, tempC);
    if ('limitC' in shape) return { kind: 'never', stageId: stage.id, limitC: shape.limitC, curve, marks };
    const fromMs = atMs;
    const fromC = tempC;
    const climb = Math.abs(shape.tempAt(shape.durationS) - fromC);
    const steps = shape.durationS === 0 ? 1 : Math.max(1, Math.ceil(climb / STEP_K));
    for (let step = 1; step <= steps; step += 1) {
      const seconds = (shape.durationS * step) / steps;
      atMs = fromMs + seconds * 1000;
      tempC = shape.tempAt(seconds);
      curve.push({ atMs, tempC });
    }
    marks.push({ id: stage.id, fromMs, toMs: atMs, fromC, toC: tempC });
  }
  return { kind: 'planned', curve, marks };
}
