/**
 * Reads a folder of kettle traces: `index.json`, `NAME.csv` (what the probe read) and `NAME.truth.csv` (the liquid itself).
 */
import { existsSync, readFileSync } from 'node:fs';
import { dirname, join, resolve } from 'node:path';

/**
 * @typedef {object} Trace
 * @property {string} name
 * @property {string} family
 * @property {number} targetC
 * @property {'rising' | 'falling'} direction
 * @property {number} lagS As told: up to a quarter off.
 * @property {number} reachS
 * @property {number} [crossingS] When the liquid truly crossed; for scoring only.
 * @property {{ act: import('../dist/watch/index.js').WatchAct, t: number }[]} actions
 * @property {number | null} roomC
 * @property {number | null} coolantC
 * @property {[number, number][]} readings Seconds and degrees Celsius.
 * @property {[number, number][] | null} truth The same for the liquid; null when the folder does not tell.
 */

/** @param {string} file @returns {[number, number][]} */
function rowsOf(file) {
  const lines = readFileSync(file, 'utf8').trim().split('\n').slice(1);
  return lines.map((line) => {
    const [seconds, celsius] = line.split(',');
    return [Number(seconds), celsius === undefined || celsius.trim() === '' ? NaN : Number(celsius)];
  });
}

/**
 * @param {string} indexFile Path of an index.json; a relative one is taken from where the command was typed.
 * @returns {Trace[]}
 */
export function readTraces(indexFile) {
  const file = resolve(process.env.INIT_CWD ?? process.cwd(), indexFile);
  const dir = dirname(file);
  /** @type {Omit<Trace, 'readings' | 'truth'>[]} */
  const entries = JSON.parse(readFileSync(file, 'utf8'));
  return entries.map((entry) => {
    const truthFile = join(dir, `${entry.name}.truth.csv`);
    return {
      ...entry,
      actions: entry.actions ?? [],
      readings: rowsOf(join(dir, `${entry.name}.csv`)),
      truth: existsSync(truthFile) ? rowsOf(truthFile) : null,
    };
  });
}
