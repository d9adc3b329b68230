/** Scores catches: how far from the target the addition went in, `reachS` after `now`. */

/** Further off than this it is no catch. */
const MISSED_BY_C = 3;

/**
 * @typedef {object} Score
 * @property {string} family
 * @property {number} errorC Temperature of the liquid at the addition less the target; infinite without a `now`.
 * @property {number} repeats
 * @property {boolean} warned
 */

/** @param {readonly number[]} values @param {number} share */
export function quantile(values, share) {
  const sorted = [...values].sort((a, b) => a - b);
  return sorted[Math.min(sorted.length - 1, Math.floor(share * sorted.length))] ?? NaN;
}

/**
 * @param {import('./traces.mjs').Trace} trace with its truth
 * @param {readonly import('./replay-trace.mjs').Catch[]} alerts
 * @returns {Score}
 */
export function scoreCatch({ family, truth, targetC, reachS }, alerts) {
  const now = alerts.filter((alert) => alert.stage === 'now');
  const first = now[0];
  const warned = alerts.some(
    ({ stage, t }) => (stage === 'coming-up' || stage === 'stand-by') && (!first || t < first.t),
  );
  const repeats = Math.max(0, now.length - 1);
  if (!first || !truth) return { family, errorC: Infinity, repeats, warned };
  const row = truth.find(([t]) => t >= first.t + reachS) ?? truth.at(-1);
  return { family, errorC: (row?.[1] ?? NaN) - targetC, repeats, warned };
}

/**
 * One line a family and one for all of them.
 *
 * @param {readonly Score[]} scores
 * @returns {string[]}
 */
export function scoreLines(scores) {
  const families = [...new Set(scores.map(({ family }) => family))];
  const groups = families.map((name) => ({ name, own: scores.filter(({ family }) => family === name) }));
  return [...groups, { name: 'all', own: scores }].map(({ name, own }) => {
    const sizes = own.map(({ errorC }) => Math.abs(errorC));
    const caught = sizes.filter((size) => size <= MISSED_BY_C);
    const figures = caught.length
      ? `median ${quantile(caught, 0.5).toFixed(2)}  p95 ${quantile(caught, 0.95).toFixed(2)}  max ${Math.max(...caught).toFixed(2)} K`
      : 'no catch';
    const repeats = own.reduce((sum, score) => sum + score.repeats, 0);
    const unwarned = own.filter(({ warned }) => !warned).length;
    const tail = `misses ${sizes.length - caught.length}  repeats ${repeats}  unwarned ${unwarned}`;
    return `${name.padEnd(11)} n ${String(own.length).padStart(3)}  ${figures.padEnd(36)}  ${tail}`;
  });
}

/**
 * Share of forecasts whose interval held the true crossing.
 *
 * @param {readonly { crossingS: number, forecasts: readonly import('./replay-trace.mjs').Forecast[] }[]} runs
 * @param {number} fromS least time to the crossing
 * @param {number} toS most time to the crossing
 */
export function coverage(runs, fromS, toS) {
  let inside = 0;
  let count = 0;
  for (const { crossingS, forecasts } of runs) {
    for (const { t, earlyS, lateS } of forecasts) {
      const leftS = crossingS - t;
      if (leftS <= fromS || leftS > toS) continue;
      count += 1;
      if (earlyS <= crossingS && crossingS <= lateS) inside += 1;
    }
  }
  return { count, share: count ? inside / count : NaN };
}
