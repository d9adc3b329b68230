import { useEffect, useRef } from 'react';
import { stationSwitch } from '../station-switch.ts';
import { useStored, ValueStore } from '../value-store.ts';
import { whileSeen } from '../while-seen.ts';
import { watchForWaves, type WaveSight } from './wave-camera.ts';

/** Off until somebody switches it on at this station. */
const choice = stationSwitch('steepfall.wave', false);

/** What the camera does now, or why it does nothing. */
export const waveSight = new ValueStore<WaveSight | 'off'>('off');

export const useIsWaveOn = (): boolean => useStored(choice.store);
export const chooseWave = choice.choose;

/** Calls on a wave while the page is in sight and the run goes on; the camera is off otherwise. */
export function useWave(onWave: () => void, isRunning: boolean): void {
  const isWanted = useIsWaveOn() && isRunning;
  const handler = useRef(onWave);
  useEffect(() => {
    handler.current = onWave;
  });
  useEffect(() => {
    if (!isWanted) return undefined;
    const look = () => {
      let isCurrent = true;
      const watching = watchForWaves(
        () => handler.current(),
        (sight) => {
          if (isCurrent) waveSight.set(sight);
        },
      );
      return () => {
        isCurrent = false;
        waveSight.set('off');
        void watching.then((end) => end());
      };
    };
    return whileSeen(look);
  }, [isWanted]);
}
