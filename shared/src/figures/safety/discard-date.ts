const DAY_MS = 86_400_000;
const HELD_DAYS = 7;

/**
 * Last day on which an opened or unsealed drink that needs cold may be poured, when it is kept at 5 °C or below: seven days,
 * the day of making being the first. Not for a drink that needs no cold, nor a sealed one with a maker's date.
 *
 * @param prepared a calendar day, "2024-02-26".
 * @throws RangeError when it is not a day that exists.
 * @see FDA Food Code 3-501.17.
 * @example discardDate('2024-02-26') // '2024-03-03'
 */
export function discardDate(prepared: string): string {
  const parts = /^(\d{4})-(\d{2})-(\d{2})$/.exec(prepared);
  const madeMs = parts ? Date.UTC(Number(parts[1]), Number(parts[2]) - 1, Number(parts[3])) : Number.NaN;
  if (!Number.isFinite(madeMs) || new Date(madeMs).toISOString().slice(0, 10) !== prepared) {
    throw new RangeError(`A day must be written like 2024-02-26 and exist, got ${prepared}. Give the day of making.`);
  }
  return new Date(madeMs + (HELD_DAYS - 1) * DAY_MS).toISOString().slice(0, 10);
}
