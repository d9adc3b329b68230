import type { Reading } from '@steepfall/shared/readings';

const HEADER = 'seconds,celsius';

/**
 * Reads a recorded trace: a heading `seconds,celsius`, then one reading a line. An empty temperature is "no signal".
 *
 * @returns readings with `atMs` counted from the start of the trace, in the order of the file.
 * @throws RangeError with the number of the first bad line.
 */
export function readTrace(text: string): Reading[] {
  const lines = text.replace(/^\uFEFF/, '').split(/\r?\n/);
  if (lines[0]?.trim().toLowerCase() !== HEADER) {
    throw new RangeError(`line 1 is not the heading "${HEADER}".`);
  }
  const readings = lines.flatMap((line, i) => (i === 0 || line.trim() === '' ? [] : [readLine(line, i + 1)]));
  if (readings.length === 0) throw new RangeError('it has no readings.');
  return readings;
}

function readLine(line: string, number: number): Reading {
  const [seconds, celsius, ...more] = line.split(',').map((cell) => cell.trim());
  const atS = seconds ? Number(seconds) : Number.NaN;
  const tempC = celsius ? Number(celsius) : null;
  if (celsius === undefined || more.length > 0 || !(atS >= 0) || Number.isNaN(tempC)) {
    throw new RangeError(`line ${number} is not "seconds,celsius": ${line.slice(0, 60)}`);
  }
  return { atMs: Math.round(atS * 1000), tempC };
}
