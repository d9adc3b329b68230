import { format } from 'date-fns';
import { HubProblemError, HubUnreachableError } from './http.ts';

/** "14:32", in the zone of this device. */
export function clockTime(atMs: number): string {
  return format(atMs, 'HH:mm');
}

/** "Tuesday, 1 December". */
export function longDay(date: Date | number): string {
  return format(date, 'EEEE, d MMMM');
}

/** "1 December 2025", of a calendar date as the hub writes it. */
export function calendarDay(isoDate: string): string {
  return format(localDate(isoDate), 'd MMMM yyyy');
}

/** A calendar date as a local midnight: `new Date('2025-12-01')` would be midnight in Greenwich, the day before for some. */
export function localDate(isoDate: string): Date {
  const [year = 1970, month = 1, day = 1] = isoDate.split('-').map(Number);
  return new Date(year, month - 1, day);
}

/** "48 s", "3 min", "1 h 48 min": a span for reading, not for timing. */
export function spanWords(durationS: number): string {
  const total = Math.max(0, Math.round(durationS));
  if (total < 60) return `${total} s`;
  const minutes = Math.round(total / 60);
  if (minutes < 60) return `${minutes} min`;
  const hours = Math.floor(minutes / 60);
  const rest = minutes % 60;
  return rest === 0 ? `${hours} h` : `${hours} h ${rest} min`;
}

/** "sencha, Cascade and citric acid". */
export function listWords(names: readonly string[]): string {
  if (names.length < 2) return names[0] ?? '';
  return `${names.slice(0, -1).join(', ')} and ${names.at(-1)}`;
}

/** What happened and what to do, for a person. */
export function failureWords(error: unknown): string {
  if (error instanceof HubUnreachableError) {
    return 'The hub does not answer. Check that it is on and that this device is on the same network, then try again.';
  }
  if (error instanceof HubProblemError) {
    const { title, detail, traceId } = error.problem;
    return traceId && error.problem.status >= 500 ? `${title}. ${detail} (${traceId})` : `${title}. ${detail}`;
  }
  return 'Something went wrong on this device. Try again.';
}

/** Problems of single fields, by the name of the field. */
export function fieldProblems(error: unknown): { field: string; detail: string }[] {
  if (!(error instanceof HubProblemError)) return [];
  return (error.problem.errors ?? []).map(({ pointer, detail }) => ({
    field: pointer.replace(/^\//, '').replaceAll('/', '.'),
    detail,
  }));
}
