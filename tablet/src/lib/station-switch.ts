import { ValueStore } from './value-store.ts';

export interface StationSwitch {
  readonly store: ValueStore<boolean>;
  choose: (isOn: boolean) => void;
}

/** Something that is on or off at this station, and stays so through a reload. */
export function stationSwitch(key: string, isOnAtFirst: boolean): StationSwitch {
  const store = new ValueStore(isOnAtFirst);
  try {
    const kept = localStorage.getItem(key);
    if (kept !== null) store.set(kept === 'on');
  } catch {
    // A browser that keeps nothing starts as it does at first.
  }
  const choose = (isOn: boolean) => {
    store.set(isOn);
    try {
      localStorage.setItem(key, isOn ? 'on' : 'off');
    } catch {
      // It holds until the page is closed.
    }
  };
  return { store, choose };
}
