import { kettleRun, type KettleRun, type KettleSetup, type KettleState } from '@steepfall/probe-sim/kettle';
import type { Reading } from '@steepfall/shared/readings';
import { foldRun, type RunState, type StoredRunEvent } from '@steepfall/shared/runs';
import type { VesselAct } from '@steepfall/shared/sheets';
import { runTimeAt, type RunClock } from '@steepfall/shared/timers';

type Switch = 'heat' | 'lid' | 'chiller' | 'tea' | 'hops';
type Switches = Record<Switch, boolean>;

/** Acts that can be taken back in a kettle: what they set, and to what. */
const switchOf: Partial<Record<VesselAct, [Switch, boolean]>> = {
  'heat-on': ['heat', true],
  'heat-off': ['heat', false],
  'lid-on': ['lid', true],
  'lid-off': ['lid', false],
  'chiller-on': ['chiller', true],
  'chiller-off': ['chiller', false],
  'tea-in': ['tea', true],
  'tea-out': ['tea', false],
  'hops-in': ['hops', true],
  'hops-out': ['hops', false],
};

/**
 * The kettle of a rehearsal: what is done on the sheet happens to it, at the run time at which it was done, and what is taken back there
 * is taken back here. It depends on nothing but its setup and the log.
 */
export class RehearsalKettle {
  private readonly kettle: KettleRun;
  private readonly told = new Set<string>();
  private simulatedUntilMs: number;

  constructor(setup: KettleSetup, startedAtMs: number) {
    this.kettle = kettleRun(setup, startedAtMs);
    this.simulatedUntilMs = startedAtMs - 1;
  }

  get state(): KettleState {
    return this.kettle.state;
  }

  /** Run clock up to which it has been simulated. */
  get nowMs(): number {
    return this.simulatedUntilMs;
  }

  /** Does what the sheet says by now. `nowMs` is the run time at which the hub learned of it: nothing happens later than that. */
  follow(state: RunState, nowMs: number): void {
    const done = state.steps
      .flatMap(({ step, doneEventId, doneAtMs }) =>
        doneEventId === null || doneAtMs === null ? [] : [{ acts: step.acts, eventId: doneEventId, atMs: doneAtMs }],
      )
      .sort((a, b) => a.atMs - b.atMs);
    for (const { acts, eventId, atMs } of done) {
      if (this.told.has(eventId)) continue;
      this.told.add(eventId);
      for (const act of acts) this.kettle.act(act, Math.min(atMs, nowMs));
    }
    this.correct(wantedSwitches(done.flatMap(({ acts }) => acts)), nowMs);
  }

  /** Readings that came due since the last time it was asked. */
  readingsUntil(nowMs: number): Reading[] {
    this.simulatedUntilMs = Math.max(this.simulatedUntilMs, nowMs);
    return this.kettle.readingsUntil(nowMs);
  }

  private correct(wanted: Switches, nowMs: number): void {
    const { isHeatOn, isLidOn, isChillerOn, isTeaIn, isHopsIn } = this.kettle.state;
    const now: Switches = { heat: isHeatOn, lid: isLidOn, chiller: isChillerOn, tea: isTeaIn, hops: isHopsIn };
    for (const [act, [name, isOn]] of Object.entries(switchOf) as [VesselAct, [Switch, boolean]][])
      if (wanted[name] !== now[name] && wanted[name] === isOn) this.kettle.act(act, nowMs);
  }
}

function wantedSwitches(acts: readonly VesselAct[]): Switches {
  const switches: Switches = { heat: false, lid: false, chiller: false, tea: false, hops: false };
  for (const act of acts) {
    const found = switchOf[act];
    if (found) switches[found[0]] = found[1];
  }
  return switches;
}

export interface Act {
  state: RunState;
  /** Run time at which the hub learned of it. */
  learnedAtMs: number;
}

/** The steps of a log at which something happened to the kettle, as the hub learned of them: to make the same kettle again. */
export function actsOf(events: readonly StoredRunEvent[]): Act[] {
  const acts: Act[] = [];
  events.forEach((event, index) => {
    if (event.type !== 'step.done' && event.type !== 'event.undone') return;
    const state = foldRun(events.slice(0, index + 1));
    acts.push({ state, learnedAtMs: runTimeAt(state.clock as RunClock, event.receivedAtMs) });
  });
  return acts;
}
