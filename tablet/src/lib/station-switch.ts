import { keep, readKept } from './kept.ts';
import { ValueStore } from './value-store.ts';

export interface StationSwitch {
  readonly store: ValueStore<boolean>;
  choose: (isOn: boolean) => void;
}

/** Something that is on or off at this station, and stays so through a reload. */
export function stationSwitch(key: string, isOnAtFirst: boolean): StationSwitch {
  const kept = readKept(key);
  const store = new ValueStore(kept === null ? isOnAtFirst : kept === 'on');
  const choose = (isOn: boolean) => {
    store.set(isOn);
    keep(key, isOn ? 'on' : 'off');
  };
  return { store, choose };
}
