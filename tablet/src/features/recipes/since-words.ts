import { format } from 'date-fns';
import { spanWords } from '#lib/words.ts';

const DAY_MS = 24 * 3_600_000;

/** "just now", "12 min ago", "on 3 May". */
export function sinceWords(atMs: number, nowMs: number): string {
  const span = nowMs - atMs;
  if (span < 60_000) return 'just now';
  if (span < DAY_MS) return `${spanWords(span / 1000)} ago`;
  return `on ${format(atMs, 'd MMMM yyyy')}`;
}
