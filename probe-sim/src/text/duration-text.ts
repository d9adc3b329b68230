const SHAPE = /^(?:(\d+)h)?(?:(\d+)m)?(?:(\d+(?:\.\d+)?)s?)?$/;

/**
 * Milliseconds in `90`, `90s`, `1m30s`, `2m` or `1h`; a bare number is seconds.
 *
 * @throws RangeError when the text is no duration.
 */
export function durationMsFromText(text: string): number {
  const [, hours, minutes, seconds] = SHAPE.exec(text.trim()) ?? [];
  if (hours === undefined && minutes === undefined && seconds === undefined) {
    throw new RangeError(`"${text}" is no duration. Write 90s, 1m30s or 2m.`);
  }
  return Math.round((Number(hours ?? 0) * 3600 + Number(minutes ?? 0) * 60 + Number(seconds ?? 0)) * 1000);
}
