const TICK_MS = 250;
/** The two sources of ticks overlap; whichever comes second within this is left out. */
const LEAST_GAP_MS = 150;

const listeners = new Set<() => void>();
let isStarted = false;
let lastTickMs = Number.NEGATIVE_INFINITY;

function tick(isAtOnce: boolean): void {
  const nowMs = performance.now();
  if (!isAtOnce && nowMs - lastTickMs < LEAST_GAP_MS) return;
  lastTickMs = nowMs;
  for (const listener of [...listeners]) listener();
}

function start(): void {
  if (isStarted) return;
  isStarted = true;
  setInterval(() => tick(false), TICK_MS);
  try {
    const worker = new Worker(new URL('./tick-worker.ts', import.meta.url), { type: 'module' });
    worker.onmessage = () => tick(false);
  } catch {
    // Without workers the page's own timer does, as long as the page is seen.
  }
  const atOnce = () => tick(true);
  document.addEventListener('visibilitychange', atOnce);
  document.addEventListener('resume', atOnce);
  addEventListener('pageshow', atOnce);
  addEventListener('focus', atOnce);
}

/** The one heartbeat of the tablet: four a second, also in a hidden tab, and at once when the page is looked at again. */
export function subscribeTick(listener: () => void): () => void {
  start();
  listeners.add(listener);
  return () => listeners.delete(listener);
}

/** Recompute now, without waiting for the next tick. */
export function tickNow(): void {
  tick(true);
}
