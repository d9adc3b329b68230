import { isDeepStrictEqual } from 'node:util';
import {
  foldRun,
  type DriverConfig,
  type LogEntry,
  type RunEvent,
  type RunState,
  type StoredRunEvent,
} from '@steepfall/shared/runs';
import type { RunClock } from '@steepfall/shared/timers';
import type { RunEventRow } from './models/run-event.model.js';
import type { Run } from './models/run.model.js';
import { projectionOf, type Projection } from './projection.js';

/** What stays the same over the life of a run. */
export type RunFacts = Pick<
  Run,
  | 'id'
  | 'houseId'
  | 'batchId'
  | 'isRehearsal'
  | 'probeId'
  | 'sourceProbeId'
  | 'probeLagS'
  | 'probeLagErrorRatio'
  | 'probeResolutionC'
  | 'probeSamplePeriodS'
  | 'roomC'
  | 'coolantC'
  | 'chillerPerS'
  | 'kettleSetup'
  | 'createdAtMs'
>;

/** The log of one run in memory, with its fold: a copy of what is committed, never ahead of it. */
export class RunLog {
  readonly facts: RunFacts;
  private readonly byId = new Map<string, StoredRunEvent>();
  private folded: RunState;
  private shown: Projection;

  constructor(run: RunFacts, events: StoredRunEvent[]) {
    this.facts = run;
    for (const event of events) this.byId.set(event.id, event);
    this.folded = foldRun(events);
    this.shown = projectionOf(this.folded);
  }

  get id(): string {
    return this.facts.id;
  }

  get state(): RunState {
    return this.folded;
  }

  get projection(): Projection {
    return this.shown;
  }

  /** In the order of `seq`. */
  get events(): StoredRunEvent[] {
    return [...this.byId.values()];
  }

  get lastSeq(): number {
    return this.folded.lastSeq;
  }

  get isOpen(): boolean {
    return this.folded.status !== 'ended';
  }

  get clock(): RunClock {
    return this.folded.clock as RunClock;
  }

  /** What the watch of this run is told when it begins. */
  get driverConfig(): DriverConfig {
    const { probeId, probeLagS, probeResolutionC, probeSamplePeriodS, roomC, coolantC } = this.facts;
    const probe = { lagS: probeLagS, resolutionC: probeResolutionC, samplePeriodS: probeSamplePeriodS };
    const learned = { lagErrorRatio: this.facts.probeLagErrorRatio, chillerPerS: this.facts.chillerPerS };
    return { hasProbe: probeId !== null, watch: { ...probe, ...learned, roomC, coolantC } };
  }

  find(eventId: string): StoredRunEvent | undefined {
    return this.byId.get(eventId);
  }

  eventsAfter(seq: number): StoredRunEvent[] {
    return this.events.filter((event) => event.seq > seq);
  }

  /** The state with more events, without taking them in. */
  stateWith(events: readonly LogEntry[]): RunState {
    return foldRun([...this.byId.values(), ...events]);
  }

  /** Takes in committed events that follow on the last one. */
  add(events: readonly StoredRunEvent[], state = this.stateWith(events)): void {
    for (const event of events) this.byId.set(event.id, event);
    this.folded = state;
    this.shown = projectionOf(state);
  }
}

/** Whether two events say the same: what was sent twice is one fact. */
export function isSameFact(a: RunEvent, b: RunEvent): boolean {
  return isDeepStrictEqual(contentOf(a), contentOf(b));
}

function contentOf({ id, runId, type, v, atMs, by, station, payload }: RunEvent): unknown {
  return { id, runId, type, v, atMs, by, station, payload };
}

export function storedEventOf(row: RunEventRow): StoredRunEvent {
  const { id, runId, type, v, atMs, by, station, payload, seq, receivedAtMs, sentBy } = row;
  // Rows were checked when they were written; one of a newer build is kept as it is, and the fold counts it.
  return { id, runId, type, v, atMs, by, station, payload, seq, receivedAtMs, sentBy } as StoredRunEvent;
}
