import { useEffect } from 'react';
import { alarmSounds } from '#lib/audio/alarm-sounds.ts';
import { isRinger, wantToRing } from '#lib/audio/ringer-lock.ts';
import { hubClock } from '#lib/clock/hub-clock.ts';
import { useRunStore } from '#lib/run-store/run-context.tsx';
import { ringFor } from './alert-level.ts';

/** Makes the run audible: what stands rings, and an acknowledgement from any tablet silences it. Draws nothing. */
export function Ringer() {
  const store = useRunStore();
  useEffect(() => {
    alarmSounds.start();
    alarmSounds.keepWarm(true);
    let letGo: (() => void) | null = null;
    const apply = () => {
      // A tab without sound must not keep another one from ringing.
      const canSound = alarmSounds.state.get().health === 'fine';
      if (canSound) letGo ??= wantToRing();
      // While nobody knows why the clock jumped, what rings goes on and nothing new starts.
      if (!hubClock.isSettled.get()) return;
      alarmSounds.ring(isRinger.get() ? ringFor(store.snapshot.get().state) : null);
    };
    const stops = [
      store.snapshot.subscribe(apply),
      isRinger.subscribe(apply),
      hubClock.isSettled.subscribe(apply),
      alarmSounds.state.subscribe(apply),
    ];
    apply();
    return () => {
      for (const stop of stops) stop();
      letGo?.();
      alarmSounds.ring(null);
      alarmSounds.keepWarm(false);
    };
  }, [store]);
  return null;
}
