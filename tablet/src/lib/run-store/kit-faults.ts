import { faultEvents, type FaultSight, type RunEvent, type RunState } from '@steepfall/shared/runs';
import { isBatteryLow, type BatteryState } from '../battery/battery.ts';

/** Wall time. A hub that restarts, or a walk past the fridge, is no fault. */
const HUB_AWAY_FOR_MS = 10_000;
const BATTERY_LOW_FOR_MS = 10_000;
/** Plugged in is plugged in; a plug that is loose has to hold for a while. */
const BATTERY_FED_FOR_MS = 10_000;

export interface KitPlace {
  runId: string;
  station: string;
  /** Run clock. */
  nowMs: number;
  /** A steady clock of this device, ms. */
  steadyMs: number;
}

/**
 * What only this tablet can find out: that it lost the hub, and that its battery runs out. Keeps since when each has been so, and says what
 * follows for the log: on this tablet at once, on the hub when it is back.
 */
export class KitFaults {
  private readonly seen = new Map<string, { isTrue: boolean; sinceMs: number }>();

  look(
    state: RunState,
    { isJoined, battery }: { isJoined: boolean; battery: BatteryState },
    place: KitPlace,
  ): RunEvent[] {
    if (state.status !== 'running') return [];
    const hubKey = `hub:${place.station}`;
    const batteryKey = `battery:${place.station}`;
    const isLow = isBatteryLow(battery, this.seen.get(batteryKey)?.isTrue ?? false);
    return [
      ...this.follow(state, place, {
        // Joined again it is over in the same breath: what was written meanwhile goes to the hub together with it.
        ...{ rule: 'hub', key: hubKey, isTrue: !isJoined, onDelayMs: HUB_AWAY_FOR_MS, offDelayMs: 0 },
      }),
      ...this.follow(state, place, {
        ...{ rule: 'battery', key: batteryKey, isTrue: isLow },
        ...{ onDelayMs: BATTERY_LOW_FOR_MS, offDelayMs: BATTERY_FED_FOR_MS },
      }),
    ];
  }

  private follow(state: RunState, place: KitPlace, sight: Omit<FaultSight, 'heldMs' | 'stepId'>): RunEvent[] {
    const { key, isTrue } = sight;
    let seen = this.seen.get(key);
    if (seen?.isTrue !== isTrue) this.seen.set(key, (seen = { isTrue, sinceMs: place.steadyMs }));
    return faultEvents(state, { ...sight, stepId: null, heldMs: place.steadyMs - seen.sinceMs }, place);
  }
}

/** Facts of this tablet alone: nobody else finds them, so nobody is waited for. */
export function isOfThisTablet(event: RunEvent): boolean {
  if (event.type !== 'alert.raised' && event.type !== 'alert.cleared') return false;
  return /^(hub|battery):/.test(event.payload.key);
}
