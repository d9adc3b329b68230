import { stationSwitch } from '../station-switch.ts';

interface AudioSession {
  type: string;
}

function session(): AudioSession | null {
  return (navigator as { audioSession?: AudioSession }).audioSession ?? null;
}

const choice = stationSwitch('steepfall.past-silent-switch', true);

/** Whether alarms sound although the silent switch of an iPad is on. It may pause the music of the kitchen, so it is a choice. */
export const isPastSilentSwitch = choice.store;

/** Only some browsers can be told. */
export const canPassSilentSwitch = (): boolean => session() !== null;

export function choosePastSilentSwitch(next: boolean): void {
  choice.choose(next);
  passSilentSwitch();
}

/** To be called inside the tap that lets sound out. */
export function passSilentSwitch(): void {
  const found = session();
  if (found) found.type = isPastSilentSwitch.get() ? 'playback' : 'auto';
}
