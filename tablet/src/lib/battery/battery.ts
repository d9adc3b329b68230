import { isShallowSame, ValueStore } from '../value-store.ts';

export interface BatteryState {
  /** `unsupported`: this browser tells pages nothing about the battery. */
  status: 'unknown' | 'known' | 'unsupported';
  /** 0 to 1. */
  level: number;
  isCharging: boolean;
}

/** Of the browser; not in the types of the DOM, since some browsers have it and some do not. */
interface BatteryManager extends EventTarget {
  level: number;
  charging: boolean;
}

const LOW_BELOW = 0.2;
/** It has to climb this far above the limit before it counts as fed, unless it hangs on a cable. */
const DEADBAND = 0.02;

export const batteryState = new ValueStore<BatteryState>(
  { status: 'unknown', level: 1, isCharging: false },
  isShallowSame,
);

let isFollowed = false;

/** Begins to listen to the battery, once. */
export function followBattery(): void {
  if (isFollowed) return;
  isFollowed = true;
  const { getBattery } = navigator as { getBattery?: () => Promise<BatteryManager> };
  const isUnsupported = () => batteryState.set({ status: 'unsupported', level: 1, isCharging: false });
  if (!getBattery) {
    isUnsupported();
    return;
  }
  getBattery.call(navigator).then((battery) => {
    const look = () => batteryState.set({ status: 'known', level: battery.level, isCharging: battery.charging });
    for (const name of ['levelchange', 'chargingchange']) battery.addEventListener(name, look);
    look();
  }, isUnsupported);
}

/** @param wasLow a limit that is left behind by a hair is still crossed. */
export function isBatteryLow({ status, level, isCharging }: BatteryState, wasLow: boolean): boolean {
  if (status !== 'known' || isCharging) return false;
  return level < (wasLow ? LOW_BELOW + DEADBAND : LOW_BELOW);
}

/** "18 %, not charging"; what it means that nobody knows. */
export function batteryWords({ status, level, isCharging }: BatteryState): { word: string; text: string } {
  if (status !== 'known')
    return {
      word: 'not told',
      text: 'This browser does not tell how full the battery is, so it cannot warn you. Plug the tablet in for the day.',
    };
  const word = `${Math.round(level * 100)} %, ${isCharging ? 'charging' : 'not charging'}`;
  const text = isCharging
    ? 'It is fed, and will last.'
    : 'Below 20 % it calls you, since a dark tablet calls nobody. Better: plug it in now.';
  return { word, text };
}
