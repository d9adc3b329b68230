import { ValueStore } from '../value-store.ts';

/** Two tabs of one tablet must not ring against each other: the one that holds the lock rings. */
export const isRinger = new ValueStore(!('locks' in navigator));

let release: (() => void) | null = null;

/** Asks to be the tab that rings; another one takes over when it closes or lets go. */
export function wantToRing(): () => void {
  const locks = (navigator as Partial<Navigator>).locks;
  if (!locks || release) return () => undefined;
  const waiting = new AbortController();
  const done = new Promise<void>((resolve) => {
    release = resolve;
  });
  locks
    .request('steepfall-ringer', { signal: waiting.signal }, () => {
      isRinger.set(true);
      return done;
    })
    .catch(() => undefined);
  return () => {
    waiting.abort();
    release?.();
    release = null;
    isRinger.set(false);
  };
}
