import type { RunSummary } from '@steepfall/shared/contracts';
import type { Problem } from '@steepfall/shared/problems';
import type { Reading } from '@steepfall/shared/readings';
import {
  bootDriver,
  decide,
  driveRun,
  foldRun,
  inLogOrder,
  liveView,
  type Decision,
  type LiveView,
  type LogEntry,
  type RunCommand,
  type RunDriver,
  type RunEvent,
  type RunState,
  type StoredRunEvent,
} from '@steepfall/shared/runs';
import { runTimeAt } from '@steepfall/shared/timers';
import type { EventStore, OutboxItem } from '../event-store/event-store.ts';
import { batteryState } from '../battery/battery.ts';
import { HubProblemError } from '../http.ts';
import type { HubLink } from '../socket/hub-link.ts';
import { ValueStore } from '../value-store.ts';
import { driverConfigOf } from './driver-config.ts';
import { isOfThisTablet, KitFaults } from './kit-faults.ts';
import type { Outbox } from './outbox.ts';
import { ReadingRing } from './reading-ring.ts';

/** The hub finds out the same and says it within this; after it, this tablet says what it found. The id is the same. */
const HUB_ANSWER_MS = 2_000;
/** A hole in the sequence may close by itself: events overtake each other on their way. */
const GAP_PATIENCE_MS = 500;
const REJOIN_MS = 3_000;
const KEEP_EVERY_MS = 15_000;

export interface RunSnapshot {
  /** `opening`: nothing to show yet. `open`: drawn from the log at hand. `missing`: the hub knows no such run for this member. */
  phase: 'opening' | 'open' | 'missing';
  state: RunState;
  /** In the order of the log, refused ones left out. */
  entries: readonly LogEntry[];
  summary: RunSummary | null;
  pendingCount: number;
  parked: readonly OutboxItem[];
  /** False while only this tablet's own copy is shown. */
  isJoined: boolean;
  isDurable: boolean;
  /** Why the hub did not let this member in. */
  problem: Problem | null;
}

/** What changes with every reading and every tick. Apart from the snapshot, so that a new number wakes the number only. */
export interface LiveState {
  /** Run clock, epoch ms. */
  nowMs: number;
  view: LiveView | null;
  newest: Reading | null;
}

export interface RunStoreParts {
  runId: string;
  link: HubLink;
  store: EventStore;
  outbox: Outbox;
  /** `look` notices that the device's clock jumped, before a time is taken from it. */
  clock: { nowMs: () => number; isSettled: ValueStore<boolean>; look: () => void };
  station: string;
  memberId: () => string | null;
  newId: () => string;
  /** Runs work once before the next frame, or soon when there are no frames. */
  schedule: (work: () => void) => void;
}

/** One run on this tablet: the log (the hub's and what is still to be sent), its fold, and the watch over its readings. */
export class RunStore {
  readonly runId: string;
  readonly snapshot: ValueStore<RunSnapshot>;
  readonly live = new ValueStore<LiveState>({ nowMs: 0, view: null, newest: null });
  readonly readings = new ReadingRing();

  private readonly confirmed = new Map<string, StoredRunEvent>();
  private readonly pending = new Map<string, RunEvent>();
  private readonly parked = new Map<string, OutboxItem>();
  private readonly held = new Map<string, { event: RunEvent; atMs: number }>();
  private driver: RunDriver | null = null;
  private incoming: Reading[] = [];
  private isFlushPlanned = false;
  private isJoined = false;
  private problem: Problem | null = null;
  private summary: RunSummary | null = null;
  private isMissing = false;
  private isClosed = false;
  private joining: Promise<void> | null = null;
  private acting: Promise<unknown> = Promise.resolve();
  private rejoinTimer: ReturnType<typeof setTimeout> | undefined;
  private keptAtMs = 0;
  private readonly kit = new KitFaults();
  private readonly stops: (() => void)[] = [];

  constructor(private readonly parts: RunStoreParts) {
    this.runId = parts.runId;
    this.snapshot = new ValueStore<RunSnapshot>({
      phase: 'opening',
      state: foldRun([]),
      entries: [],
      summary: null,
      pendingCount: 0,
      parked: [],
      isJoined: false,
      isDurable: parts.store.isDurable,
      problem: null,
    });
  }

  /** Shows what this tablet holds, then joins the run at the hub. */
  async open(): Promise<void> {
    const { link, outbox } = this.parts;
    this.stops.push(
      link.state.subscribe(() => this.followLink()),
      link.on('run.events', ({ runId, events }) => {
        if (runId === this.runId) this.confirm(events);
      }),
      link.on('run.readings', ({ runId, readings }) => {
        if (runId === this.runId) this.take(readings);
      }),
      outbox.onSent((runId, sent) => {
        if (runId !== this.runId) return;
        if (sent.kind === 'confirmed') this.confirm(sent.events);
        else if (sent.kind === 'dropped') this.forget(sent.eventId);
        else void this.reload();
      }),
    );
    await this.reload();
    this.followLink();
  }

  close(): void {
    this.isClosed = true;
    clearTimeout(this.rejoinTimer);
    for (const stop of this.stops.splice(0)) stop();
    this.keep();
    if (this.isJoined) void this.parts.link.ask('run.leave', { runId: this.runId }).catch(() => undefined);
  }

  get link(): HubLink {
    return this.parts.link;
  }

  /** Run clock, epoch ms. */
  nowMs(): number {
    const hubMs = this.parts.clock.nowMs();
    const clock = this.snapshot.get().state.clock ?? this.summary?.clock;
    return clock ? runTimeAt(clock, hubMs) : hubMs;
  }

  /** What a person asked for: decided on the state at its turn, on disk before it is shown, then on its way. */
  act(command: RunCommand): Promise<Decision> {
    const turn = this.acting.then(async () => {
      this.parts.clock.look();
      const { memberId, station, newId } = this.parts;
      const decision = decide(this.snapshot.get().state, command, {
        nowMs: this.nowMs(),
        by: memberId(),
        station,
        newId,
      });
      if (decision.ok) await this.write(decision.events);
      return decision;
    });
    this.acting = turn.catch(() => undefined);
    return turn;
  }

  /** One heartbeat: time moves the watch, the timers and the alerts on. */
  tick(): void {
    this.drive([]);
    this.lookAtKit();
    this.releaseHeld(HUB_ANSWER_MS);
    const nowMs = Date.now();
    if (nowMs - this.keptAtMs > KEEP_EVERY_MS) this.keep();
  }

  /** Puts readings and summary aside for a reload without the hub. */
  keep(): void {
    this.keptAtMs = Date.now();
    if (!this.summary) return;
    const run = { runId: this.runId, summary: this.summary, readings: [...this.readings.all], keptAtMs: this.keptAtMs };
    void this.parts.store.keepRun(run).catch(() => undefined);
  }

  /** Takes in what another tab of this station wrote. */
  async reload(): Promise<void> {
    const { entries, outbox, run } = await this.parts.store
      .load(this.runId)
      .catch(() => ({ entries: [], outbox: [], run: null }));
    if (this.isClosed) return;
    this.parked.clear();
    for (const item of [...outbox, ...this.parts.outbox.parkedInMemory(this.runId)]) {
      if (item.status === 'parked') this.parked.set(item.eventId, item);
    }
    for (const entry of entries) {
      if (entry.seq !== undefined) this.confirmed.set(entry.id, entry as StoredRunEvent);
      else if (!this.parked.has(entry.id)) this.pending.set(entry.id, entry as RunEvent);
    }
    for (const id of this.parked.keys()) this.pending.delete(id);
    for (const id of this.confirmed.keys()) this.pending.delete(id);
    this.summary ??= run?.summary ?? null;
    if (run && this.readings.newest === null) this.readings.add(run.readings);
    this.publish();
    this.boot();
  }

  private followLink(): void {
    const { status } = this.parts.link.state.get();
    if (status === 'connected') {
      if (!this.isJoined) void this.join();
      return;
    }
    clearTimeout(this.rejoinTimer);
    if (this.isJoined) {
      this.isJoined = false;
      this.publish();
    }
    this.releaseHeld(0);
  }

  private join(): Promise<void> {
    this.joining ??= this.joinOnce().finally(() => {
      this.joining = null;
    });
    return this.joining;
  }

  private async joinOnce(): Promise<void> {
    const { link, outbox } = this.parts;
    try {
      const joined = await link.ask('run.join', {
        runId: this.runId,
        afterSeq: this.contiguousSeq(),
        station: this.parts.station,
      });
      if (this.isClosed) return;
      this.isJoined = link.state.get().status === 'connected';
      this.isMissing = false;
      this.problem = null;
      this.summary = joined.run;
      this.readings.add(joined.readings);
      this.confirm(joined.events);
      this.boot();
      this.keep();
      this.lookAtKit();
      await outbox.send(this.runId);
    } catch (error) {
      if (this.isClosed) return;
      if (error instanceof HubProblemError && [403, 404].includes(error.problem.status)) {
        this.isMissing = true;
        this.problem = error.problem;
        this.publish();
        return;
      }
      this.planRejoin(REJOIN_MS);
    }
  }

  private planRejoin(waitMs: number): void {
    clearTimeout(this.rejoinTimer);
    this.rejoinTimer = setTimeout(() => {
      const isDue = !this.isJoined || this.hasGap();
      if (isDue && this.parts.link.state.get().status === 'connected') void this.join();
    }, waitMs);
  }

  /** The last `seq` up to which nothing is missing. */
  private contiguousSeq(): number {
    const held = new Set([...this.confirmed.values()].map(({ seq }) => seq));
    let seq = 0;
    while (held.has(seq + 1)) seq += 1;
    return seq;
  }

  private hasGap(): boolean {
    return this.contiguousSeq() < this.confirmed.size;
  }

  private confirm(events: readonly StoredRunEvent[]): void {
    const fresh = events.filter(({ id, seq }) => this.confirmed.get(id)?.seq !== seq);
    if (fresh.length === 0) return;
    for (const event of fresh) {
      this.confirmed.set(event.id, event);
      this.pending.delete(event.id);
      this.held.delete(event.id);
      this.parked.delete(event.id);
    }
    void this.parts.store.confirm(fresh).catch(() => undefined);
    this.publish();
    if (this.hasGap()) this.planRejoin(GAP_PATIENCE_MS);
    this.drive([]);
  }

  private forget(eventId: string): void {
    const wasPending = this.pending.delete(eventId);
    const wasParked = this.parked.delete(eventId);
    if (wasPending || wasParked) this.publish();
  }

  private has(eventId: string): boolean {
    return this.confirmed.has(eventId) || this.pending.has(eventId) || this.parked.has(eventId);
  }

  private async write(events: readonly RunEvent[]): Promise<void> {
    const { store, outbox } = this.parts;
    try {
      await store.append(events);
    } catch {
      outbox.carry(events);
    }
    for (const event of events) {
      if (!this.confirmed.has(event.id)) this.pending.set(event.id, event);
    }
    this.publish();
    this.drive([]);
    void outbox.send(this.runId);
  }

  private publish(): void {
    const entries = inLogOrder([...this.confirmed.values(), ...this.pending.values()]);
    const state = foldRun(entries);
    const isOpen = state.status !== 'not-started' && !this.isMissing;
    this.snapshot.set({
      phase: this.isMissing ? 'missing' : isOpen ? 'open' : 'opening',
      state,
      entries,
      summary: this.summary,
      pendingCount: this.pending.size,
      parked: [...this.parked.values()],
      isJoined: this.isJoined,
      isDurable: this.parts.store.isDurable,
      problem: this.problem,
    });
  }

  private take(readings: readonly Reading[]): void {
    this.incoming.push(...readings);
    if (this.isFlushPlanned) return;
    this.isFlushPlanned = true;
    this.parts.schedule(() => {
      this.isFlushPlanned = false;
      if (!this.isClosed) this.drive(this.readings.add(this.incoming.splice(0)));
    });
  }

  private boot(): void {
    if (!this.summary || this.snapshot.get().phase !== 'open') return;
    const nowMs = this.nowMs();
    const { driver, events } = bootDriver({
      config: driverConfigOf(this.summary),
      entries: this.snapshot.get().entries,
      readings: this.readings.all.filter(({ atMs }) => atMs <= nowMs),
      nowMs,
      runId: this.runId,
      station: this.parts.station,
    });
    this.driver = driver;
    this.show(nowMs);
    this.raise(events);
  }

  private drive(readings: readonly Reading[]): void {
    this.parts.clock.look();
    const { state, phase } = this.snapshot.get();
    const nowMs = this.nowMs();
    // While nobody knows why the clock jumped, nothing is found out: a wrong time would become a wrong fact.
    if (!this.driver || phase !== 'open' || !this.parts.clock.isSettled.get()) {
      this.show(nowMs);
      return;
    }
    const { runId } = this;
    const { driver, events } = driveRun(this.driver, state, { runId, station: this.parts.station, readings, nowMs });
    this.driver = driver;
    this.show(nowMs);
    this.raise(events);
  }

  /** What this tablet finds out about itself, on its own. */
  private lookAtKit(): void {
    const { state, phase } = this.snapshot.get();
    if (phase !== 'open' || !this.parts.clock.isSettled.get()) return;
    const { runId, isJoined } = this;
    const place = { runId, station: this.parts.station, nowMs: this.nowMs(), steadyMs: performance.now() };
    this.raise(this.kit.look(state, { isJoined, battery: batteryState.get() }, place));
  }

  private show(nowMs: number): void {
    const { state } = this.snapshot.get();
    const view = this.driver ? liveView(this.driver, state, nowMs) : null;
    this.live.set({ nowMs, view, newest: this.readings.newest });
  }

  /** The watch as it stands, for drawing what is to come. */
  get watch(): RunDriver['watch'] | null {
    return this.driver?.watch ?? null;
  }

  private raise(events: readonly RunEvent[]): void {
    const fresh = events.filter(({ id }) => !this.has(id) && !this.held.has(id));
    const byTime = fresh.filter(isFoundByTime);
    const byReadings = fresh.filter((event) => !isFoundByTime(event));
    const toWrite = this.isJoined ? byTime : fresh;
    if (this.isJoined) {
      const atMs = Date.now();
      for (const event of byReadings) this.held.set(event.id, { event, atMs });
    }
    if (toWrite.length > 0) void this.write(toWrite);
  }

  /** What the hub has not said for so long (it may be stuck, or see other readings) or can no longer say: this tablet says it. */
  private releaseHeld(leastAgeMs: number): void {
    const { state } = this.snapshot.get();
    const latestMs = Date.now() - leastAgeMs;
    const due = [...this.held.values()].filter(({ atMs }) => atMs <= latestMs).map(({ event }) => event);
    for (const { id } of due) this.held.delete(id);
    const isDone = (event: RunEvent) =>
      event.type === 'step.done' &&
      state.steps.some(({ step, status }) => step.id === event.payload.stepId && status === 'done');
    const toWrite = due.filter((event) => !this.has(event.id) && !isDone(event));
    if (toWrite.length > 0 && state.status === 'running') void this.write(toWrite);
  }
}

/** Facts that need no reading, and nobody to find them as well. */
function isFoundByTime(event: RunEvent): boolean {
  if (isOfThisTablet(event)) return true;
  if (event.type === 'alert.raised') return event.payload.rule === 'timer';
  return event.type === 'step.done' && event.payload.cause === 'timer';
}
