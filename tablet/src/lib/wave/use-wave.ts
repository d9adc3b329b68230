import { useEffect, useRef } from 'react';
import { useStored, ValueStore } from '../value-store.ts';
import { watchForWaves, type WaveTrouble } from './wave-camera.ts';

const KEY = 'steepfall.wave';

function isKeptOn(): boolean {
  try {
    return localStorage.getItem(KEY) === 'on';
  } catch {
    return false;
  }
}

const isOn = new ValueStore(isKeptOn());
/** Why no wave is seen although it is switched on. */
export const waveTrouble = new ValueStore<WaveTrouble | null>(null);

export const useIsWaveOn = (): boolean => useStored(isOn);

/** Off until somebody switches it on at this station. */
export function chooseWave(next: boolean): void {
  isOn.set(next);
  waveTrouble.set(null);
  try {
    if (next) localStorage.setItem(KEY, 'on');
    else localStorage.removeItem(KEY);
  } catch {
    // It holds until the page is closed.
  }
}

/** Calls on a wave while the page is in sight; the camera is off otherwise. */
export function useWave(onWave: () => void): void {
  const isWanted = useIsWaveOn();
  const handler = useRef(onWave);
  useEffect(() => {
    handler.current = onWave;
  });
  useEffect(() => {
    if (!isWanted) return undefined;
    let stop: Promise<() => void> | null = null;
    const apply = () => {
      if (document.visibilityState === 'visible')
        stop ??= watchForWaves(
          () => handler.current(),
          (trouble) => waveTrouble.set(trouble),
        );
      else {
        void stop?.then((end) => end());
        stop = null;
      }
    };
    apply();
    document.addEventListener('visibilitychange', apply);
    return () => {
      document.removeEventListener('visibilitychange', apply);
      void stop?.then((end) => end());
    };
  }, [isWanted]);
}
