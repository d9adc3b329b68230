/** What a kettle is watched with today, to compare with: neither knows more than is said here. */

/** Length of the straight line. */
const LINE_S = 20;
const LEAST_POINTS = 5;

/** @param {import('./traces.mjs').Trace} trace @param {number} celsius */
function isPast({ direction, targetC }, celsius) {
  return direction === 'falling' ? celsius <= targetC : celsius >= targetC;
}

/**
 * A beep when the reading passes the target.
 *
 * @param {import('./traces.mjs').Trace} trace
 * @returns {import('./replay-trace.mjs').Catch[]}
 */
export function threshold(trace) {
  const hit = trace.readings.find(([, celsius]) => isPast(trace, celsius));
  return hit ? [{ t: hit[0], stage: 'now' }] : [];
}

/**
 * A straight line through the last twenty seconds, drawn on by the probe's lag as told and the person's reach.
 *
 * @param {import('./traces.mjs').Trace} trace
 * @returns {import('./replay-trace.mjs').Catch[]}
 */
export function straightLine(trace) {
  /** @type {[number, number][]} */
  let recent = [];
  for (const [t, celsius] of trace.readings) {
    if (!(celsius > -20 && celsius < 115)) continue;
    recent = [...recent.filter(([earlier]) => t - earlier <= LINE_S), [t, celsius]];
    if (recent.length < LEAST_POINTS) continue;
    const meanT = recent.reduce((sum, [x]) => sum + x, 0) / recent.length;
    const meanC = recent.reduce((sum, [, y]) => sum + y, 0) / recent.length;
    const slope =
      recent.reduce((sum, [x, y]) => sum + (x - meanT) * (y - meanC), 0) /
      recent.reduce((sum, [x]) => sum + (x - meanT) ** 2, 0);
    if (isPast(trace, meanC + slope * (t + trace.lagS + trace.reachS - meanT))) return [{ t, stage: 'now' }];
  }
  return [];
}
