/** Runs the watch over one trace, reading by reading: what is raised at a reading rests on it and on earlier ones alone. */
import { forecastCrossing, startLadder, startWatch, stepLadder, watchAct, watchReading } from '../dist/watch/index.js';

/** The index does not say what probe it was; this is the usual one-wire chip. */
const PERIOD_S = 1;
const RESOLUTION_C = 0.0625;

/**
 * @typedef {object} Catch One alert of the ladder.
 * @property {number} t Seconds of the reading at which it was raised.
 * @property {import('../dist/watch/index.js').LadderStage} stage
 */

/**
 * @typedef {object} Forecast What was forecast at a reading.
 * @property {number} t
 * @property {number} atS
 * @property {number} earlyS
 * @property {number} lateS
 */

/**
 * @param {import('./traces.mjs').Trace} trace
 * @param {{ forecasts?: boolean, clock?: boolean }} [options] `clock` steps the ladder every second between readings too, as the
 *   hub and the tablets do: in a gap they need not wait for the next reading.
 * @returns {{ alerts: Catch[], forecasts: Forecast[], watch: import('../dist/watch/index.js').WatchState }}
 */
export function replayTrace(trace, { forecasts: wanted = false, clock = false } = {}) {
  const target = { tempC: trace.targetC, direction: trace.direction };
  const acts = [...trace.actions].sort((a, b) => a.t - b.t);
  let watch = startWatch({
    lagS: trace.lagS,
    roomC: trace.roomC,
    coolantC: trace.coolantC,
    samplePeriodS: PERIOD_S,
    resolutionC: RESOLUTION_C,
  });
  let ladder = startLadder({ ...target, key: trace.name, reachS: trace.reachS });
  /** @type {Catch[]} */
  const alerts = [];
  /** @type {Forecast[]} */
  const forecasts = [];
  /** @param {number} t */
  const climb = (t) => {
    const step = stepLadder(ladder, watch, Math.round(t * 1000));
    ladder = step.ladder;
    for (const { stage } of step.raised) alerts.push({ t, stage });
  };
  let before = trace.readings[0]?.[0] ?? 0;
  for (const [t, celsius] of trace.readings) {
    const atMs = Math.round(t * 1000);
    if (clock) for (let tick = before + 1; tick < t; tick += 1) climb(tick);
    before = t;
    while (acts[0] && acts[0].t <= t) {
      const { act, t: tappedS } = /** @type {import('./traces.mjs').Trace['actions'][number]} */ (acts.shift());
      watch = watchAct(watch, { act, atMs: Math.round(tappedS * 1000) });
    }
    watch = watchReading(watch, { atMs, tempC: Number.isFinite(celsius) ? celsius : null });
    climb(t);
    if (!wanted) continue;
    const forecast = forecastCrossing(watch, target, atMs);
    if (forecast.kind === 'forecast') {
      const { atMs: at, earlyMs, lateMs } = forecast;
      forecasts.push({ t, atS: at / 1000, earlyS: earlyMs / 1000, lateS: lateMs / 1000 });
    }
  }
  return { alerts, forecasts, watch };
}
