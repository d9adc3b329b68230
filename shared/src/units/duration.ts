/** Exact factors: 60 s to the minute, 60 minutes to the hour, 24 hours to the day (SI Brochure, table 8). */
export const SECONDS_PER_MINUTE = 60;
export const SECONDS_PER_HOUR = 3600;
export const SECONDS_PER_DAY = 86_400;

/** Time span, s to min. */
export function secondsToMinutes(durationS: number): number {
  return durationS / SECONDS_PER_MINUTE;
}

/** Time span, min to s. */
export function minutesToSeconds(durationMin: number): number {
  return durationMin * SECONDS_PER_MINUTE;
}

/** Time span, s to h. */
export function secondsToHours(durationS: number): number {
  return durationS / SECONDS_PER_HOUR;
}

/** Time span, h to s. */
export function hoursToSeconds(durationH: number): number {
  return durationH * SECONDS_PER_HOUR;
}
