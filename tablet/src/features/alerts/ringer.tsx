import { useEffect } from 'react';
import { speechOf, spokenClips, standingAlerts, type RunState } from '@steepfall/shared/runs';
import { alarmSounds, type Ring } from '#lib/audio/alarm-sounds.ts';
import { isRinger, wantToRing } from '#lib/audio/ringer-lock.ts';
import { hubClock } from '#lib/clock/hub-clock.ts';
import { useRunStore } from '#lib/run-store/run-context.tsx';
import { alertStageId } from '#lib/run-store/take-over.ts';
import { useUnits } from '#lib/units.ts';
import { ringFor } from './alert-level.ts';

/** A blocked output often comes back by itself; another tab takes over when it does not. */
const BLOCKED_PATIENCE_MS = 1_000;

/** What sounds, and what is said with it. */
function spokenRing(state: RunState, unit: 'C' | 'F'): Ring | null {
  const ring = ringFor(state);
  const [worst] = standingAlerts(state);
  return ring && worst ? { ...ring, say: spokenClips(state, worst, unit) } : null;
}

/** Makes the run audible: what stands rings, and an acknowledgement from any tablet silences it. Draws nothing. */
export function Ringer() {
  const store = useRunStore();
  const { temperature } = useUnits();
  useEffect(() => {
    alarmSounds.start();
    alarmSounds.keepWarm(true);
    let letGo: (() => void) | null = null;
    let letGoTimer: ReturnType<typeof setTimeout> | undefined;
    let rung: Ring | null = null;
    let areWordsAsked = false;
    const askForTheWords = () => {
      if (areWordsAsked || alarmSounds.state.get().health !== 'fine') return;
      areWordsAsked = true;
      void alarmSounds.prepareSpeech(speechOf(store.snapshot.get().state, temperature));
    };
    const giveTheLockBack = () => {
      clearTimeout(letGoTimer);
      letGoTimer = undefined;
      const give = letGo;
      letGo = null;
      give?.();
    };
    const askForTheLock = () => {
      if (store.snapshot.get().state.status !== 'running') {
        giveTheLockBack();
        return;
      }
      // A tab without sound must not keep another one from ringing.
      if (alarmSounds.state.get().health === 'fine') {
        clearTimeout(letGoTimer);
        letGoTimer = undefined;
        letGo ??= wantToRing(store.runId);
      } else if (letGo) letGoTimer ??= setTimeout(giveTheLockBack, BLOCKED_PATIENCE_MS);
    };
    const wantedRing = (): Ring | null => {
      const { state } = store.snapshot.get();
      const wanted = isRinger.get() ? spokenRing(state, temperature) : null;
      if (hubClock.isSettled.get() || !wanted || wanted.id === rung?.id) return wanted;
      // While nobody knows why the clock jumped, what rings goes on until it is heard, and nothing new starts.
      const isStanding = standingAlerts(state).some((alert) => alertStageId(alert) === rung?.id);
      return isStanding ? rung : null;
    };
    const apply = () => {
      askForTheLock();
      askForTheWords();
      rung = wantedRing();
      alarmSounds.ring(rung);
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
      giveTheLockBack();
      alarmSounds.ring(null);
      alarmSounds.keepWarm(false);
    };
  }, [store, temperature]);
  return null;
}
