import { curveTempC, planCurve, type CurvePoint, type PlannedStage } from '../figures/index.js';

type Stage = PlannedStage extends infer One ? (One extends { id: string } ? Omit<One, 'id'> : never) : never;

/** Nobody waits longer for a temperature, ms. */
const MOST_WAIT_MS = 48 * 3_600_000;

/** Coolant can be colder than water ever gets, °C. */
const ICE_C = 0;

/** A planned temperature that grows stage by stage, since what comes next depends on where it stands. */
export class DayLine {
  readonly curve: CurvePoint[];
  /** Spans that stand open to the room. */
  readonly open: { fromMs: number; toMs: number }[] = [];

  constructor(startC: number) {
    this.curve = [{ atMs: 0, tempC: startC }];
  }

  private get end(): CurvePoint {
    return this.curve.at(-1) ?? { atMs: 0, tempC: 0 };
  }

  get atMs(): number {
    return this.end.atMs;
  }

  get tempC(): number {
    return this.end.tempC;
  }

  /** Adds a stage. @returns where it settles, or stands after two days, when it does not get there; nothing is added then. */
  add(stage: Stage, isOpen: boolean): { limitC: number } | null {
    const fromMs = this.atMs;
    const planned = planCurve(this.tempC, [{ ...stage, id: stage.kind }]);
    if (planned.kind === 'never') return { limitC: planned.limitC };
    const after = curveTempC(planned.curve, MOST_WAIT_MS);
    if (after !== null && 'toC' in stage) return { limitC: after };
    for (const { atMs, tempC } of planned.curve.slice(1)) {
      this.curve.push({ atMs: fromMs + atMs, tempC: Math.max(ICE_C, tempC) });
    }
    if (isOpen && this.atMs > fromMs) this.open.push({ fromMs, toMs: this.atMs });
    return null;
  }
}
