import type { LiveState } from '#lib/run-store/run-store.ts';

const STALE_S = 30;

/** How fresh the newest reading is: "0.8 s ago". */
export function probeText({ nowMs, newest }: LiveState): string {
  if (!newest) return 'none yet';
  const ageS = Math.max(0, (nowMs - newest.atMs) / 1000);
  if (newest.tempC === null) return 'no signal';
  if (ageS < 10) return `${ageS.toFixed(1)} s ago`;
  return ageS < 120 ? `${Math.floor(ageS)} s ago` : `${Math.floor(ageS / 60)} min ago`;
}

/** Silence is a fault while a level is waited for; later the probe is out of the liquid. */
export function isProbeBad({ nowMs, newest, view }: LiveState): boolean {
  if (view !== null && view.target === null) return false;
  return !newest || newest.tempC === null || nowMs - newest.atMs > STALE_S * 1000;
}
