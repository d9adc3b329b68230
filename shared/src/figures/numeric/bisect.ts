/**
 * The point of `low` to `high` where a monotonic function passes zero, by halving: it always ends, after `steps` halvings.
 *
 * @param rising whether the function grows with its argument.
 * @returns `low` or `high` when the sign does not change between them: the caller decides what that means.
 */
export function bisect(f: (x: number) => number, low: number, high: number, rising: boolean, steps = 60): number {
  let from = low;
  let to = high;
  for (let step = 0; step < steps; step += 1) {
    const middle = (from + to) / 2;
    if (f(middle) < 0 === rising) from = middle;
    else to = middle;
  }
  return (from + to) / 2;
}
