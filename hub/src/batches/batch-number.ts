/** Year and number in that year, as written on a keg tag: `26-014`. Numbers above 999 simply grow. */
export function formatBatchNumber({ year, numberInYear }: { year: number; numberInYear: number }): string {
  return `${String(year % 100).padStart(2, '0')}-${String(numberInYear).padStart(3, '0')}`;
}
