import { ValueStore } from '../value-store.ts';

/** `idle`: no run is open. `refused` is what a browser says on low battery, or before the first tap. */
export type WakeState = 'idle' | 'awake' | 'https-needed' | 'unsupported' | 'refused';

export const wakeState = new ValueStore<WakeState>('idle');

let isWanted = false;
let sentinel: WakeLockSentinel | null = null;
let isAsking = false;

async function ask(): Promise<void> {
  if (!isWanted || sentinel || isAsking || document.visibilityState !== 'visible') return;
  if (!window.isSecureContext) return wakeState.set('https-needed');
  const { wakeLock } = navigator as Partial<Navigator>;
  if (!wakeLock) return wakeState.set('unsupported');
  isAsking = true;
  try {
    const held = await wakeLock.request('screen');
    held.addEventListener('release', () => {
      if (sentinel === held) sentinel = null;
      if (isWanted && document.visibilityState === 'visible') {
        wakeState.set('refused');
        void ask();
      }
    });
    if (!isWanted) return void held.release();
    sentinel = held;
    wakeState.set('awake');
  } catch {
    wakeState.set('refused');
  } finally {
    isAsking = false;
  }
}

const again = () => void ask();

/** Keeps the screen on until the returned function is called. Ask again inside a tap: some browsers want one. */
export function keepAwake(): () => void {
  isWanted = true;
  void ask();
  document.addEventListener('visibilitychange', again);
  return () => {
    isWanted = false;
    document.removeEventListener('visibilitychange', again);
    void sentinel?.release().catch(() => undefined);
    sentinel = null;
    wakeState.set('idle');
  };
}

/** For taps: the lock that was refused without a gesture may be granted with one. */
export function askToStayAwake(): void {
  void ask();
}
