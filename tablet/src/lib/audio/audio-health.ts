/** What an AudioContext says of itself; `interrupted` is WebKit's, after a call or a lock. */
export type ContextState = 'running' | 'suspended' | 'interrupted' | 'closed';

export interface AudioSigns {
  /** `null`: there is no Web Audio here. */
  state: ContextState | null;
  /** Its clock went on between two looks a quarter of a second apart. A context may say "running" and stand still. */
  isClockMoving: boolean;
}

/** `blocked`: nobody would hear an alarm now. A blocked context never says no by itself, so this is the only way to know. */
export type SoundHealth = 'fine' | 'blocked' | 'unsupported';

export function soundHealth({ state, isClockMoving }: AudioSigns): SoundHealth {
  if (state === null) return 'unsupported';
  return state === 'running' && isClockMoving ? 'fine' : 'blocked';
}

export type AudioRepair = 'none' | 'resume' | 'suspend-and-resume' | 'rebuild';

/**
 * What to try next. `triedCount` is how many repairs have failed since sound was last fine. A new context outside a tap would
 * start blocked, so rebuilding waits for one.
 */
export function nextRepair(signs: AudioSigns, triedCount: number, isInTap: boolean): AudioRepair {
  const { state } = signs;
  if (state === null || soundHealth(signs) === 'fine') return 'none';
  const ladder: AudioRepair[] =
    state === 'closed'
      ? ['rebuild']
      : state === 'running'
        ? ['suspend-and-resume', 'rebuild']
        : ['resume', 'suspend-and-resume', 'rebuild'];
  const repair = ladder[Math.min(triedCount, ladder.length - 1)] ?? 'none';
  if (repair === 'rebuild' && !isInTap) return state === 'closed' ? 'none' : 'resume';
  return repair;
}
