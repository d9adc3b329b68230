import { useSyncExternalStore } from 'react';
import { keep, readKept } from './kept.ts';

/** What the station was told; `system` follows the device. */
export type GroundChoice = 'system' | 'night' | 'day';
export type Ground = 'night' | 'day';

/** Read by /boot.js before the first paint as well. */
const KEY = 'steepfall.ground';
const themeColor: Record<Ground, string> = { night: '#12201C', day: '#F6F1E7' };
const darkQuery = '(prefers-color-scheme: dark)';

let choice: GroundChoice = 'system';
const listeners = new Set<() => void>();

function resolve(): Ground {
  if (choice !== 'system') return choice;
  return matchMedia(darkQuery).matches ? 'night' : 'day';
}

function apply(): void {
  const ground = resolve();
  document.documentElement.dataset['ground'] = ground;
  document.querySelector('meta[name="theme-color"]')?.setAttribute('content', themeColor[ground]);
  for (const listener of listeners) listener();
}

/** Reads the choice of this station and follows the system from here on. Called once, by main. */
export function startTheme(): void {
  const kept = readKept(KEY);
  if (kept === 'night' || kept === 'day') choice = kept;
  matchMedia(darkQuery).addEventListener('change', apply);
  apply();
}

export function chooseGround(next: GroundChoice): void {
  choice = next;
  keep(KEY, next === 'system' ? null : next);
  apply();
}

function subscribe(listener: () => void): () => void {
  listeners.add(listener);
  return () => listeners.delete(listener);
}

export function useGroundChoice(): GroundChoice {
  return useSyncExternalStore(subscribe, () => choice);
}

/** The ground that is shown now. Drawings on a canvas must be redrawn when it changes. */
export function useGround(): Ground {
  return useSyncExternalStore(subscribe, resolve);
}
