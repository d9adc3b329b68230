import { alarmSounds } from '#lib/audio/alarm-sounds.ts';
import { useRunState } from '#lib/run-store/run-context.tsx';
import { useStoredPart } from '#lib/value-store.ts';

/** True while nobody would hear an alert of this run, and a tap may change that. */
export function useSoundOff(): boolean {
  const health = useStoredPart(alarmSounds.state, ({ health: now }) => now);
  const { status } = useRunState();
  return status === 'running' && health !== 'fine' && health !== 'unsupported';
}
