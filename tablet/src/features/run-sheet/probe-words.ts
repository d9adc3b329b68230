import type { LiveState } from '#lib/run-store/run-store.ts';

const STALE_S = 30;

/** How fresh the newest reading is: "0.8 s ago". */
export function probeText({ nowMs, newest }: LiveState): string {
  if (!newest) return 'none yet';
  const ageS = Math.max(0, (nowMs - newest.atMs) / 1000);
  if (newest.tempC === null) return 'no signal';
  return ageS < 10 ? `${ageS.toFixed(1)} s ago` : `${Math.floor(ageS)} s ago`;
}

export function isProbeBad({ nowMs, newest }: LiveState): boolean {
  return !newest || newest.tempC === null || nowMs - newest.atMs > STALE_S * 1000;
}
