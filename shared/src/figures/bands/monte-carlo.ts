import { notNegative, within } from '../numeric/guard.js';
import { band, weakest, type Band, type Grade } from './band.js';

/** A stream of numbers from 0 to below 1 that a seed alone decides. */
export type Draw = () => number;

/**
 * Seeded numbers: the same seed gives the same answer everywhere, so a band never flickers.
 *
 * @param seed any number; its whole 32 bits count.
 * @see mulberry32 (public domain).
 */
export function seededDraw(seed: number): Draw {
  let state = seed >>> 0;
  return () => {
    state = (state + 0x6d2b79f5) >>> 0;
    let mixed = Math.imul(state ^ (state >>> 15), state | 1);
    mixed = (mixed + Math.imul(mixed ^ (mixed >>> 7), mixed | 61)) ^ mixed;
    return ((mixed ^ (mixed >>> 14)) >>> 0) / 4_294_967_296;
  };
}

/** An unsure input. */
export type Unsure =
  | { kind: 'sure'; value: number }
  /** Anything between is as likely. */
  | { kind: 'even'; low: number; high: number; grade: Grade }
  /** Between the ends, most likely at the value: a triangle. */
  | { kind: 'peaked'; low: number; value: number; high: number; grade: Grade }
  /** Nine times out of ten within a factor of the middle. */
  | { kind: 'factor'; value: number; factor: number; grade: Grade }
  /** Nine times out of ten within plus or minus. */
  | { kind: 'spread'; value: number; spread: number; grade: Grade };

/** Standard deviations from the middle to the end of a nine-in-ten range. */
const NINETY = 1.6448536;

function normal(draw: Draw): number {
  return Math.sqrt(-2 * Math.log(1 - draw())) * Math.cos(2 * Math.PI * draw());
}

function triangle({ low, value, high }: { low: number; value: number; high: number }, share: number): number {
  const width = high - low;
  if (width <= 0) return value;
  const peak = (value - low) / width;
  if (share < peak) return low + Math.sqrt(share * width * (value - low));
  return high - Math.sqrt((1 - share) * width * (high - value));
}

function one(input: Unsure, draw: Draw): number {
  if (input.kind === 'sure') return input.value;
  if (input.kind === 'even') return input.low + (input.high - input.low) * draw();
  if (input.kind === 'peaked') return triangle(input, draw());
  if (input.kind === 'spread') return input.value + (normal(draw) * input.spread) / NINETY;
  return input.value * input.factor ** (normal(draw) / NINETY);
}

function checked(input: Unsure): void {
  if (input.kind === 'even') band(input.low, input.low, input.high, input.grade);
  else if (input.kind === 'peaked') band(input.low, input.value, input.high, input.grade);
  else if (input.kind === 'spread') notNegative(input.spread, 'A spread');
  else if (input.kind === 'factor') within(input.factor, 'A factor', 1, 1e6);
}

/**
 * The median and the nine-in-ten range of a figure whose inputs are unsure and independent.
 *
 * @param inputs what goes in: ends in order, spread 0 or more, factor 1 or more.
 * @param figure the sum; called `runs` times, each time with the same object: it must not keep it.
 * @param options seed, and runs from 100 up (1000 unless told): ends are then good to about 3 %.
 * @throws RangeError when there are fewer runs, an input is out of range, or `figure` gives something that is not a number.
 * @see Monte Carlo with order statistics.
 */
export function monteCarlo<Name extends string>(
  inputs: Readonly<Record<Name, Unsure>>,
  figure: (drawn: Record<Name, number>) => number,
  { seed = 1, runs = 1000 }: { seed?: number; runs?: number } = {},
): Band {
  if (!Number.isInteger(runs) || runs < 100) {
    throw new RangeError(`Runs must be a whole number of 100 or more, got ${runs}. Give more runs.`);
  }
  const draw = seededDraw(seed);
  const entries = Object.entries<Unsure>(inputs) as [Name, Unsure][];
  for (const [, input] of entries) checked(input);
  const results = new Float64Array(runs);
  const drawn = Object.fromEntries(entries.map(([name]) => [name, 0])) as Record<Name, number>;
  for (let run = 0; run < runs; run += 1) {
    for (const [name, input] of entries) drawn[name] = one(input, draw);
    const result = figure(drawn);
    if (!Number.isFinite(result)) throw new RangeError(`A figure must give a number, got ${result}. Check its inputs.`);
    results[run] = result;
  }
  results.sort();
  const at = (share: number) => results[Math.round(share * (runs - 1))] ?? Number.NaN;
  const grades = entries.map(([, input]) => (input.kind === 'sure' ? 'solid' : input.grade));
  return { low: at(0.05), value: at(0.5), high: at(0.95), grade: weakest(...grades) };
}
