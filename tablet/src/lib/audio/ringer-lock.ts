import { ValueStore } from '../value-store.ts';

/** Two tabs of one tablet must not ring against each other: for each run, the one that holds the lock rings. */
export const isRinger = new ValueStore(!('locks' in navigator));

let release: (() => void) | null = null;

/** Asks to be the tab that rings for this run; another one takes over when it closes or lets go. */
export function wantToRing(runId: string): () => void {
  const locks = (navigator as Partial<Navigator>).locks;
  if (!locks || release) return () => undefined;
  const waiting = new AbortController();
  let isWanted = true;
  let letGo = () => undefined as void;
  const done = new Promise<void>((resolve) => {
    letGo = resolve;
  });
  release = letGo;
  locks
    .request(`steepfall-ringer-${runId}`, { signal: waiting.signal }, () => {
      if (isWanted) isRinger.set(true);
      return done;
    })
    .catch(() => undefined);
  return () => {
    if (!isWanted) return;
    isWanted = false;
    waiting.abort();
    letGo();
    release = null;
    isRinger.set(false);
  };
}
