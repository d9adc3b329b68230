/** Stock of a lot: the sum of its ledger, never a number that is kept beside it, g. @param moves signed masses, g. */
export function stockG(moves: readonly { massG: number }[]): number {
  const sum = moves.reduce((total, { massG }) => total + massG, 0);
  // Sums of decimals such as 0.1 + 0.2 must not leave a crumb that no scale shows.
  return Math.round(sum * 1000) / 1000;
}
