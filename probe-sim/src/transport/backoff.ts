const FIRST_MS = 500;
const LONGEST_MS = 10_000;

/**
 * How long to wait before trying again: doubling to ten seconds, the second half of it by chance, so that many devices do not
 * come back in step when a hub returns.
 *
 * @param attempt 1 after the first failure.
 * @param random 0 to 1.
 */
export function backoffMs(attempt: number, random: number): number {
  const most = Math.min(LONGEST_MS, FIRST_MS * 2 ** (attempt - 1));
  return Math.round(most * (0.5 + 0.5 * random));
}
