/**
 * `npm run bench:catch [-- COUNT SEED]`: scores the watch on the project's traces and on COUNT unseen ones drawn from SEED, next
 * to a plain threshold and a straight line; shows where the additions went in, how honest the intervals are, how far the
 * errors are from the least possible, and what a reading costs.
 */
import { fileURLToPath } from 'node:url';
import { TRACE_FAMILIES, makeTraces } from '../dist/testing/kettle-traces.js';
import { newtonCrossingSdS, startLadder, startWatch, stepLadder, watchReading } from '../dist/watch/index.js';
import { straightLine, threshold } from './plain-ways.mjs';
import { replayTrace } from './replay-trace.mjs';
import { coverage, quantile, scoreCatch, scoreLines } from './score.mjs';
import { readTraces } from './traces.mjs';

const [count = 560, seed = 1] = process.argv.slice(2).map(Number);
const OWN_TRACES = fileURLToPath(new URL('../src/testing/traces/index.json', import.meta.url));

/** Errors beyond this are drawn at the edge. */
const PLOT_HALF_C = 3;
const PLOT_WIDTH = 61;
const SHADES = ' .:-=+*#@';

/** One line: where on -3 to +3 K the additions went in, darker where more did. @param {readonly number[]} errorsC */
function strip(errorsC) {
  const bins = new Array(PLOT_WIDTH).fill(0);
  for (const error of errorsC) {
    const held = Math.max(-PLOT_HALF_C, Math.min(PLOT_HALF_C, Number.isFinite(error) ? error : -PLOT_HALF_C));
    bins[Math.round(((held + PLOT_HALF_C) / (2 * PLOT_HALF_C)) * (PLOT_WIDTH - 1))] += 1;
  }
  const most = Math.max(...bins);
  return bins.map((n) => SHADES[n === 0 ? 0 : Math.max(1, Math.round((n / most) * (SHADES.length - 1)))]).join('');
}

/**
 * Least error in kelvin that any estimator could have at the `now` of a chilled trace if its noise were white, its probe had no
 * lag, and the coolant were known: the bound of the crossing time, times the slope.
 *
 * @param {import('./traces.mjs').Trace} trace
 * @param {number} nowS
 */
function boundC(trace, nowS) {
  const chill = trace.actions.find(({ act }) => act === 'chiller-on');
  if (!chill || trace.coolantC === null || !trace.truth) return null;
  const used = trace.readings.filter(([t]) => t > chill.t + 5 && t <= nowS);
  const at = (/** @type {number} */ s) => trace.truth?.find(([t]) => t >= s)?.[1] ?? NaN;
  const [startC, nowC] = [at(chill.t + 5), at(nowS)];
  const perS = Math.log((startC - trace.coolantC) / (nowC - trace.coolantC)) / (nowS - chill.t - 5);
  const periodS = (nowS - chill.t - 5) / used.length;
  const noiseC = spreadC(used);
  const input = {
    noiseC,
    perS,
    environmentC: trace.coolantC,
    nowC,
    targetC: trace.targetC,
    periodS,
    count: used.length,
  };
  if (used.length < 10 || nowC <= trace.targetC) return null;
  return newtonCrossingSdS({ ...input, environmentFitted: false }) * perS * (trace.targetC - trace.coolantC);
}

/** Noise of readings around a parabola through them, faults left out. @param {readonly [number, number][]} rows */
function spreadC(rows) {
  const bends = [];
  const step = Math.max(1, Math.floor(rows.length / 12));
  for (let i = step; i + step < rows.length; i += 1) {
    const bend = rows[i][1] - (rows[i - step][1] + rows[i + step][1]) / 2;
    if (Math.abs(bend) < 2) bends.push(bend ** 2 / 1.5);
  }
  return Math.sqrt(bends.reduce((sum, bend) => sum + bend, 0) / Math.max(1, bends.length));
}

/** @param {string} title @param {readonly import('./traces.mjs').Trace[]} traces */
function report(title, traces) {
  console.log(`\n${title}\n${'='.repeat(title.length)}`);
  const replays = traces.map((trace) => ({ trace, ...replayTrace(trace, { forecasts: true }) }));
  const ways = [
    { name: 'the watch', scores: replays.map(({ trace, alerts }) => scoreCatch(trace, alerts)) },
    {
      name: 'the watch, with a clock between readings',
      scores: traces.map((trace) => scoreCatch(trace, replayTrace(trace, { clock: true }).alerts)),
    },
    { name: 'straight line', scores: traces.map((trace) => scoreCatch(trace, straightLine(trace))) },
    { name: 'threshold', scores: traces.map((trace) => scoreCatch(trace, threshold(trace))) },
  ];
  for (const { name, scores } of ways) {
    const lines = scoreLines(scores);
    console.log(`\n${name}`);
    console.log((name.startsWith('the watch') ? lines : lines.slice(-1)).map((line) => `  ${line}`).join('\n'));
  }
  console.log('\nwhere the additions went in, K off the target');
  for (const { name, scores } of ways.filter((way) => !way.name.includes('clock')))
    console.log(`  ${name.padEnd(14)}|${strip(scores.map(({ errorC }) => errorC))}|`);
  const axis = [-3, -2, -1, 0, 1, 2, 3].map((mark) => String(mark).padStart(2).padEnd(10)).join('');
  console.log(`  ${' '.repeat(14)}${axis.trimEnd()}`);

  const runs = replays.map(({ trace, forecasts }) => ({
    crossingS: trace.crossingS ?? NaN,
    family: trace.family,
    // Before the last act was tapped nobody could know.
    forecasts: forecasts.filter(({ t }) => trace.actions.every((act) => t > act.t)),
  }));
  console.log('\ntrue crossing inside the 90 % interval, by time to go');
  const bands = /** @type {const} */ ([
    [0, 30],
    [30, 120],
    [120, 1e9],
    [0, 1e9],
  ]);
  const steady = runs.filter(({ family }) => family !== 'flowChange');
  for (const [name, own] of /** @type {const} */ ([
    ['all families', runs],
    ['without untold changes of flow', steady],
  ])) {
    const shares = bands.map(([from, to]) => {
      const { share, count: n } = coverage(own, from, to);
      return `${to > 1e6 ? (from ? `over ${from} s` : 'all') : `${from}-${to} s`} ${(100 * share).toFixed(0)} % (n ${n})`;
    });
    console.log(`  ${name.padEnd(31)} ${shares.join('   ')}`);
  }

  const pairs = replays.flatMap(({ trace, alerts }) => {
    const now = alerts.find(({ stage }) => stage === 'now');
    const bound = now && boundC(trace, now.t);
    return now && bound ? [{ bound, errorC: scoreCatch(trace, alerts).errorC }] : [];
  });
  const rms = (/** @type {number[]} */ values) =>
    Math.sqrt(values.reduce((sum, value) => sum + value ** 2, 0) / values.length);
  console.log(
    `\nchilled traces: rms error ${rms(pairs.map(({ errorC }) => errorC)).toFixed(2)} K; least possible with white noise, no lag and a known coolant ` +
      `${rms(pairs.map(({ bound }) => bound)).toFixed(2)} K (n ${pairs.length}). The rest is lag told wrong, eddies, untold changes, gaps, and the time between readings.`,
  );
}

/** @param {readonly import('./traces.mjs').Trace[]} traces */
function cost(traces) {
  /** @type {number[]} */
  const watched = [];
  /** @type {number[]} */
  const bare = [];
  let processor = process.cpuUsage();
  for (const pass of ['warm-up', 'measured']) {
    processor = process.cpuUsage();
    for (const trace of traces) {
      let watch = startWatch({
        lagS: trace.lagS,
        roomC: trace.roomC,
        coolantC: trace.coolantC,
        samplePeriodS: 1,
        resolutionC: 0.0625,
      });
      let ladder = startLadder({
        key: trace.name,
        tempC: trace.targetC,
        direction: trace.direction,
        reachS: trace.reachS,
      });
      let mean = 0;
      for (const [t, tempC] of trace.readings) {
        const start = performance.now();
        watch = watchReading(watch, { atMs: t * 1000, tempC });
        ladder = stepLadder(ladder, watch, t * 1000).ladder;
        const between = performance.now();
        mean += 0.1 * (tempC - mean);
        const end = performance.now();
        if (pass === 'measured') {
          watched.push((between - start) * 1000);
          bare.push((end - between) * 1000);
        }
      }
    }
  }
  // Wall time waits for other programs too; processor time does not.
  const { user, system } = process.cpuUsage(processor);
  const [p50, p99, bare50] = [quantile(watched, 0.5), quantile(watched, 0.99), Math.max(0.01, quantile(bare, 0.5))];
  console.log('\ncost of a reading, watch and ladder together');
  console.log(
    `  p50 ${p50.toFixed(1)} µs  p99 ${p99.toFixed(1)} µs; ${(p50 / bare50).toFixed(0)} times a bare pass (p50 ${bare50.toFixed(2)} µs, the clock's own cost included); mean processor time ${((user + system) / watched.length).toFixed(1)} µs`,
  );
}

const own = readTraces(OWN_TRACES);
report(`the project's ${own.length} traces`, own);
report(`${count} unseen traces, seed ${seed}`, makeTraces(TRACE_FAMILIES, count, seed));
cost(own);
