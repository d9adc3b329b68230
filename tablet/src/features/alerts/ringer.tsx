import { useEffect } from 'react';
import { alertWords, speechOf, spokenClips, type Alert, type RunState } from '@steepfall/shared/runs';
import { alarmSounds, type Ring } from '#lib/audio/alarm-sounds.ts';
import { knock } from '#lib/audio/knock.ts';
import { isRinger, wantToRing } from '#lib/audio/ringer-lock.ts';
import { hubClock } from '#lib/clock/hub-clock.ts';
import { useRunStore } from '#lib/run-store/run-context.tsx';
import type { LiveState } from '#lib/run-store/run-store.ts';
import { alertStageId, callingHere } from '#lib/run-store/take-over.ts';
import { useUnits } from '#lib/units.ts';
import { dueAtMs, ringFor } from './alert-level.ts';
import { plannedRing } from './planned-ring.ts';

/** A blocked output often comes back by itself; another tab takes over when it does not. */
const BLOCKED_PATIENCE_MS = 1_000;
/** A "now" that nobody answers for so long gets the higher, faster sound, … */
const URGENT_AFTER_MS = 20_000;
/** … and then knocks at the device itself. */
const KNOCK_AFTER_MS = 40_000;

/** What sounds for what stands, and what is said with it, as it is at this moment. */
function spokenRing(state: RunState, live: LiveState, unit: 'C' | 'F'): { ring: Ring; alert: Alert } | null {
  const ring = ringFor(state);
  const [alert] = callingHere(state);
  if (!ring || !alert) return null;
  const due = dueAtMs(alert, live);
  const lateS = due === null ? null : (live.nowMs - due) / 1000;
  return { ring: { ...ring, say: spokenClips(state, alert, unit, lateS) }, alert };
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
    let unanswered: { name: string; sinceMs: number; hasKnocked: boolean } | null = null;
    let areWordsAsked = false;
    const askForTheWords = () => {
      if (areWordsAsked || alarmSounds.state.get().health !== 'fine') return;
      areWordsAsked = true;
      alarmSounds.prepareSpeech(speechOf(store.snapshot.get().state, temperature));
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
      const wanted = isRinger.get() ? spokenRing(state, store.live.get(), temperature) : null;
      if (!wanted) {
        unanswered = null;
        return null;
      }
      // What is said was true when it began to ring; it does not change its words in the middle.
      if (wanted.ring.id === rung?.id) return escalated(rung, wanted.alert);
      if (hubClock.isSettled.get()) return escalated(wanted.ring, wanted.alert);
      // While nobody knows why the clock jumped, what rings goes on until it is heard, and nothing new starts.
      const isStanding = callingHere(state).some((alert) => alertStageId(alert) === rung?.id);
      return isStanding ? rung : null;
    };
    const escalated = (ring: Ring, alert: Alert): Ring => {
      const name = `${alert.key}/${alert.crossing}`;
      if (ring.level !== 'now' && ring.level !== 'urgent') return ring;
      if (unanswered?.name !== name) unanswered = { name, sinceMs: Date.now(), hasKnocked: false };
      const waitedMs = Date.now() - unanswered.sinceMs;
      if (waitedMs >= KNOCK_AFTER_MS && !unanswered.hasKnocked) {
        unanswered.hasKnocked = true;
        const { verb, sentence } = alertWords(store.snapshot.get().state, alert, temperature);
        void knock(name, verb, sentence);
      }
      return waitedMs >= URGENT_AFTER_MS ? { ...ring, level: 'urgent' } : ring;
    };
    const apply = () => {
      askForTheLock();
      askForTheWords();
      rung = wantedRing();
      alarmSounds.ring(rung);
      const isCertain = isRinger.get() && hubClock.isSettled.get();
      alarmSounds.plan(isCertain ? plannedRing(store.snapshot.get().state, store.live.get(), temperature) : null);
    };
    const stops = [
      store.snapshot.subscribe(apply),
      store.live.subscribe(apply),
      isRinger.subscribe(apply),
      hubClock.isSettled.subscribe(apply),
      alarmSounds.state.subscribe(apply),
    ];
    apply();
    return () => {
      for (const stop of stops) stop();
      giveTheLockBack();
      alarmSounds.ring(null);
      alarmSounds.plan(null);
      alarmSounds.keepWarm(false);
    };
  }, [store, temperature]);
  return null;
}
