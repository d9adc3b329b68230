import { describe, expect, it } from 'vitest';
import { foldRun, openFaults } from '@steepfall/shared/runs';
import { LogBuilder, RUN_ID, START_MS } from '@steepfall/shared/testing';
import type { BatteryState } from '../battery/battery.ts';
import { KitFaults } from './kit-faults.ts';

const full: BatteryState = { status: 'known', level: 0.9, isCharging: false };
const low: BatteryState = { ...full, level: 0.18 };

/** A tablet that looks four times a second, in a rehearsal that runs ten times as fast. */
function tablet() {
  const log = new LogBuilder();
  const kit = new KitFaults();
  let steadyMs = 0;
  const stand = (seconds: number, sight: { isJoined?: boolean; battery?: BatteryState }) => {
    for (let i = 0; i < seconds * 4; i += 1) {
      steadyMs += 250;
      const place = { runId: RUN_ID, station: 'one', nowMs: START_MS + steadyMs * 10, steadyMs };
      log.entries.push(...kit.look(foldRun(log.entries), { isJoined: true, battery: full, ...sight }, place));
    }
    return openFaults(foldRun(log.entries)).map(({ key }) => key);
  };
  return { log, stand };
}

describe(KitFaults, () => {
  it('says that the hub is lost after ten seconds of the wall, and that it is back at once', () => {
    const { stand } = tablet();
    expect(stand(10, { isJoined: false })).toEqual([]);
    expect(stand(1, { isJoined: false })).toEqual(['hub:one']);
    expect(stand(0.25, { isJoined: true })).toEqual([]);
  });

  it('does not speak of a hub that was away for a moment', () => {
    const { log, stand } = tablet();
    for (let time = 0; time < 5; time += 1) {
      stand(8, { isJoined: false });
      stand(2, { isJoined: true });
    }
    expect(log.entries).toHaveLength(1);
  });

  it('calls for the plug below a fifth, not while it charges, and is not fooled by a hair of charge', () => {
    const { stand } = tablet();
    expect(stand(11, { battery: { ...low, isCharging: true } })).toEqual([]);
    expect(stand(11, { battery: low })).toEqual(['battery:one']);
    expect(stand(30, { battery: { ...full, level: 0.205 } })).toEqual(['battery:one']);
    expect(stand(11, { battery: { ...low, isCharging: true } })).toEqual([]);
  });

  it('says nothing of a battery that nobody tells of', () => {
    expect(tablet().stand(30, { battery: { status: 'unsupported', level: 0, isCharging: false } })).toEqual([]);
  });
});
