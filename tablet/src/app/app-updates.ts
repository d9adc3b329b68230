import { useSyncExternalStore } from 'react';
import { registerSW } from 'virtual:pwa-register';

/** Held by the run page of any tab of this station while a run is open. */
const RUN_LOCK = 'run-active';
const HOUR_MS = 3_600_000;
const LOOK_MS = 10_000;

interface UpdateState {
  /** A new version is here and waits to be let in. */
  isWaiting: boolean;
  /** This tab runs files that the hub no longer has: it must be loaded again. */
  mustReload: boolean;
  isRunActive: boolean;
}

let state: UpdateState = { isWaiting: false, mustReload: false, isRunActive: false };
let letIn: () => Promise<void> = async () => undefined;
const listeners = new Set<() => void>();

function change(part: Partial<UpdateState>): void {
  const next = { ...state, ...part };
  if (JSON.stringify(next) === JSON.stringify(state)) return;
  state = next;
  for (const listener of listeners) listener();
}

/** Whether any tab of this station has a run open. Without Web Locks (plain HTTP) the path of this tab must do. */
async function isRunActive(): Promise<boolean> {
  const locks = (navigator as Partial<Navigator>).locks;
  if (!locks) return /^\/runs\/[^/]+\/?$/.test(location.pathname);
  const { held = [] } = await locks.query();
  return held.some(({ name }) => name === RUN_LOCK);
}

async function look(): Promise<void> {
  if (state.isWaiting || state.mustReload) change({ isRunActive: await isRunActive() });
}

/** Registers the worker, looks for new versions, and never lets one in by itself. Called once, by main. */
export function startAppUpdates(): void {
  addEventListener('vite:preloadError', (event) => {
    // A reload without the hub would lose the page that is shown: the person is asked.
    event.preventDefault();
    change({ mustReload: true });
    void look();
  });
  setInterval(() => void look(), LOOK_MS);
  if (!('serviceWorker' in navigator) || import.meta.env.DEV) return;
  letIn = registerSW({
    onNeedRefresh: () => {
      change({ isWaiting: true });
      void look();
    },
    // Another tab let the new version in. This one follows when no run is open.
    onNeedReload: () => {
      change({ isWaiting: false, mustReload: true });
      void isRunActive().then((isActive) => {
        if (!isActive) location.reload();
        else void look();
      });
    },
    onRegisteredSW: (_url, registration) => {
      if (!registration) return;
      const update = () => {
        if (document.visibilityState === 'visible') void registration.update().catch(() => undefined);
      };
      document.addEventListener('visibilitychange', update);
      addEventListener('focus', update);
      setInterval(update, HOUR_MS);
    },
  });
}

export async function takeUpdate(): Promise<void> {
  if (await isRunActive()) return change({ isRunActive: true });
  if (state.mustReload) location.reload();
  else await letIn();
}

function subscribe(listener: () => void): () => void {
  listeners.add(listener);
  return () => listeners.delete(listener);
}

export function useAppUpdate(): { isOffered: boolean } {
  const { isWaiting, mustReload, isRunActive: isHeld } = useSyncExternalStore(subscribe, () => state);
  return { isOffered: (isWaiting || mustReload) && !isHeld };
}
