import { useEffect, useRef } from 'react';
import { stationSwitch } from '../station-switch.ts';
import { useStored, ValueStore } from '../value-store.ts';
import { whileSeen } from '../while-seen.ts';
import { intentOf, type Intent } from './intents.ts';
import { listenOnDevice, type VoiceEar } from './recogniser.ts';

/** Off until somebody switches it on at this station. */
const choice = stationSwitch('steepfall.voice', false);

/** Whether somebody listens now, or why nobody does. */
export const voiceEar = new ValueStore<VoiceEar | 'off'>('off');

export const useIsVoiceOn = (): boolean => useStored(choice.store);
export const chooseVoice = choice.choose;

/** Calls on an intent while the page is in sight and the run goes on; nothing listens otherwise. */
export function useVoice(onIntent: (intent: Intent) => void, isRunning: boolean): void {
  const isWanted = useIsVoiceOn() && isRunning;
  const handler = useRef(onIntent);
  useEffect(() => {
    handler.current = onIntent;
  });
  useEffect(() => {
    if (!isWanted) return undefined;
    const listen = () => {
      let isCurrent = true;
      const listening = listenOnDevice(
        (words) => {
          const intent = intentOf(words);
          if (intent) handler.current(intent);
        },
        (ear) => {
          if (isCurrent) voiceEar.set(ear);
        },
      );
      return () => {
        isCurrent = false;
        voiceEar.set('off');
        void listening.then((end) => end());
      };
    };
    return whileSeen(listen);
  }, [isWanted]);
}
