/**
 * How long the figures take: all figures of one recipe as they are computed at every key press at the desk, and the sums over
 * a recorded curve of ten hours at one reading a second. It reports; the specs never assert on time. On a busy machine the clock
 * also counts the wait for a processor: the load is printed first, and the processor's own time beside it.
 */
import { availableParallelism, loadavg } from 'node:os';
import { performance } from 'node:perf_hooks';
import * as desk from '../dist/desk/index.js';
import * as figures from '../dist/figures/index.js';
import * as runs from '../dist/runs/index.js';
import { compileSheet } from '../dist/sheets/index.js';
import { buildDocument, LogBuilder, START_MS } from '../dist/testing/index.js';

const chiller = { kind: 'cool', surroundC: 15, kPerS: 0.08 / 60 };
const heat = {
  kind: 'heat',
  toC: 82,
  heatCapacityJPerK: 85_000,
  powerW: 3500,
  efficiency: 0.9,
  lossWPerK: 8,
  roomC: 20,
};

/** A recipe with two salts, two acids, two teas and two hops, and a whole planned day. */
function recipe(step) {
  const day = figures.planCurve(15, [
    { id: 'heat', ...heat },
    { id: 'coil', kind: 'mix', toC: 80 },
    { id: 'steep', kind: 'hold', durationS: 240 + (step % 60) },
    { id: 'chill', ...chiller, toC: 60 },
    { id: 'hops', ...chiller, toC: 30 },
    { id: 'cold', ...chiller, toC: 21 },
  ]);
  const mark = (id) => day.marks.find((one) => one.id === id);
  const steep = { inAtMs: mark('steep').fromMs, outAtMs: mark('steep').toMs };
  const hops = { inAtMs: mark('hops').fromMs, outAtMs: mark('hops').toMs };
  return figures.drinkFigures({
    waterL: 20,
    source: { ca: 20, mg: 4, na: 12, k: 1, cl: 18, so4: 22, hco3: 51 },
    salts: [
      { salt: 'calciumChlorideDihydrate', massG: 6 + (step % 10) / 10 },
      { salt: 'gypsum', massG: 2.4 },
    ],
    acids: [
      { acid: 'citricAnhydrous', massG: 7 + (step % 7) / 10 },
      { acid: 'lactic', massG: 1, strengthPercent: 80 },
    ],
    teas: [
      { kind: 'white', form: 'whole', massG: 80, ...steep },
      { kind: 'black', form: 'broken', massG: 20, ...steep },
    ],
    hops: [
      { massG: 40, alphaPercent: 9, ...hops },
      { massG: 20, alphaPercent: 6, storageIndex: 0.45, ...hops },
    ],
    curve: day.curve,
    evaporatedL: figures.evaporatedL(day.curve, { openM2: 0.07 }),
    deadSpaceL: 0.2,
    servingMl: 355,
    gas: { volumes: 3, tempC: 4, stationKPa: 98 },
  });
}

const HOURS = 10;
const recorded = Array.from({ length: HOURS * 3600 + 1 }, (_, second) => ({
  atMs: second * 1000,
  tempC: 4 + 88 * Math.exp(-second / 9000) + 0.05 * Math.sin(second),
}));

/** Every sum that a recorded curve feeds, over the whole of it. */
function account() {
  return [
    figures.leafExtraction(recorded, 'whole'),
    figures.steepDoseMin(recorded),
    figures.isomerise(recorded, { alphaMgPerL: 270, ph: 3.8 }),
    figures.evaporatedL(recorded, { openM2: 0.07 }),
    figures.pasteurisationUnits(recorded),
    figures.coolingRule(recorded),
  ];
}

function spread(times) {
  const sorted = times.toSorted((a, b) => a - b);
  const at = (share) => sorted[Math.min(sorted.length - 1, Math.floor(share * sorted.length))].toFixed(2);
  return `p50 ${at(0.5)}, p99 ${at(0.99)}, slowest ${at(1)} ms`;
}

/** A run that has come to its keg, with a reading a second for two hours: what the run sheet works out every second. */
function runOfTwoHours() {
  const document = buildDocument();
  const kit = { altitudeM: 0, kettle: null, chiller: { metal: 'copper', lengthM: 7.6, coolantC: 12 } };
  const { curve } = desk.plannedDay(document, kit);
  const log = new LogBuilder(compileSheet(document, { altitudeM: 0, reachS: 8 }), { document, kit });
  log.done('light-heat', 'salts', 'acid').wait(3000).done('tea-in').wait(240).done('tea-out', 'chill').wait(600);
  log.done('hops-in').wait(1200).done('hops-out');
  const readings = Array.from({ length: 7200 }, (_, second) => ({
    atMs: START_MS + second * 1000,
    tempC: (figures.curveTempC(curve, second * 1000) ?? 20) + 0.05 * Math.sin(second),
  }));
  return { state: runs.foldRun(log.entries), readings };
}
const run = runOfTwoHours();
const line = runs.liquidLine(run.readings, 6);

function measure(name, limitMs, runs, warm, work) {
  for (let run = 0; run < warm; run += 1) work(run);
  const [clock, processor] = [[], []];
  for (let run = 0; run < runs; run += 1) {
    const used = process.cpuUsage();
    const start = performance.now();
    work(run);
    clock.push(performance.now() - start);
    const { user, system } = process.cpuUsage(used);
    processor.push((user + system) / 1000);
  }
  console.log(`${name} (${runs} runs, limit ${limitMs} ms): ${spread(clock)}; of the processor ${spread(processor)}`);
}

console.log(`load ${loadavg()[0].toFixed(1)} on ${availableParallelism()} processors`);
const cold = performance.now();
recipe(0);
console.log(`all figures of a recipe, first time in a fresh process: ${(performance.now() - cold).toFixed(2)} ms`);
measure('all figures of a recipe', 16, 500, 20, recipe);
measure(`all sums over a ${HOURS} h curve at 1 Hz`, 50, 60, 3, account);
measure(`steep dose over a ${HOURS} h curve at 1 Hz`, 50, 60, 3, () => figures.steepDoseMin(recorded));
measure('the line of two hours at 1 Hz, once', 200, 60, 3, () => runs.liquidLine(run.readings, 6));
measure(`the account of a run while it runs (${line.points.length} points), every second`, 16, 500, 20, (second) =>
  runs.accountSoFar(run.state, line, START_MS + 6_000_000 + second),
);
