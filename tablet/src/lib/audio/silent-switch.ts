import { ValueStore } from '../value-store.ts';

const KEY = 'steepfall.silent-switch';

function isKeptOff(): boolean {
  try {
    return localStorage.getItem(KEY) === 'obeyed';
  } catch {
    return false;
  }
}

/** Whether alarms sound although the silent switch of an iPad is on. It may pause the music of the kitchen, so it is a choice. */
export const isPastSilentSwitch = new ValueStore(!isKeptOff());

interface AudioSession {
  type: string;
}

function session(): AudioSession | null {
  return (navigator as { audioSession?: AudioSession }).audioSession ?? null;
}

/** Only some browsers can be told. */
export const canPassSilentSwitch = (): boolean => session() !== null;

export function choosePastSilentSwitch(next: boolean): void {
  isPastSilentSwitch.set(next);
  try {
    if (next) localStorage.removeItem(KEY);
    else localStorage.setItem(KEY, 'obeyed');
  } catch {
    // It holds until the page is closed.
  }
  passSilentSwitch();
}

/** To be called inside the tap that lets sound out. */
export function passSilentSwitch(): void {
  const found = session();
  if (found) found.type = isPastSilentSwitch.get() ? 'playback' : 'auto';
}
