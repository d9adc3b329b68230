/** Enough for the plain iteration on any drink; what is left goes to the sure way. */
const PLAIN_STEPS = 40;
const CLOSE_MOL_PER_L = 1e-11;
const HALVINGS = 60;

/**
 * The ionic strength that agrees with itself: `strengthOf(x) = x`. Plain iteration first; when that does not settle, halving
 * between 0 and the largest strength there is, which always does. Never more than a hundred calls.
 *
 * @param atMost an upper bound of what `strengthOf` can give, mol/L.
 */
export function settledStrength(strengthOf: (ionicStrength: number) => number, start: number, atMost: number): number {
  let x = start;
  for (let step = 0; step < PLAIN_STEPS; step += 1) {
    const next = strengthOf(x);
    const done = Math.abs(next - x) < CLOSE_MOL_PER_L;
    x = next;
    if (done) return x;
  }
  let low = 0;
  let high = atMost;
  for (let step = 0; step < HALVINGS; step += 1) {
    x = (low + high) / 2;
    if (strengthOf(x) > x) low = x;
    else high = x;
  }
  return x;
}
