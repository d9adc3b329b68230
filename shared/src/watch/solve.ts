/** Gaussian elimination with scaling, for small symmetric systems; changes nothing. */
export function solve(matrix: readonly (readonly number[])[], right: readonly number[]): number[] {
  const n = right.length;
  const scale = matrix.map((row, i) => 1 / Math.sqrt(row[i]!));
  const rows = matrix.map((row, i) => [...row.map((v, j) => v * scale[i]! * scale[j]!), right[i]! * scale[i]!]);
  for (let i = 0; i < n; i += 1) {
    for (let j = i + 1; j < n; j += 1) {
      const factor = rows[j]![i]! / rows[i]![i]!;
      for (let k = i; k <= n; k += 1) rows[j]![k]! -= factor * rows[i]![k]!;
    }
  }
  const out = new Array<number>(n).fill(0);
  for (let i = n - 1; i >= 0; i -= 1) {
    let value = rows[i]![n]!;
    for (let k = i + 1; k < n; k += 1) value -= rows[i]![k]! * out[k]!;
    out[i] = value / rows[i]![i]!;
  }
  return out.map((v, i) => v * scale[i]!);
}
