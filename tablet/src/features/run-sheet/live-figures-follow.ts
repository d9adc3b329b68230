import { useSyncExternalStore } from 'react';
import { accountSoFar, liquidLine, type RecordedLine, type RunAccount } from '@steepfall/shared/runs';
import { downsampleMinMax, type Reading } from '@steepfall/shared/readings';
import { runReadingsQuery } from '#lib/hub-queries.ts';
import { queryClient } from '#lib/query-client.ts';
import { useRunStore } from '#lib/run-store/run-context.tsx';
import type { RunStore } from '#lib/run-store/run-store.ts';
import { ValueStore } from '#lib/value-store.ts';

/** A figure that moves more often is no calmer, and costs the more. On a fast clock it moves more. */
const EVERY_MS = 1_000;
const EVERY_FAST_MS = 250;
const BUCKETS = 1_200;
/** More old readings than this are thinned: the line keeps its shape. */
const MOST_PAST = 5_000;
/** Before the ring there is a hole: the hub is asked again, not more often than this. */
const HOLE_MS = 60_000;
const ASK_AGAIN_MS = 20_000;

/** All readings of a run on this tablet: those of the last minutes as they are, older ones thinned, the oldest from the hub. */
export class ReadingsKept {
  private past: readonly Reading[] = [];
  private ring: readonly Reading[] = [];

  /** The newest minutes; what fell out of them since the last time is kept. */
  follow(ring: readonly Reading[]): void {
    const fromMs = ring[0]?.atMs ?? Infinity;
    const newestMs = this.past.at(-1)?.atMs ?? -Infinity;
    const fallen = this.ring.filter(({ atMs }) => atMs < fromMs && atMs > newestMs);
    if (fallen.length > 0) this.past = [...this.past, ...fallen];
    if (this.past.length > MOST_PAST) this.past = downsampleMinMax(this.past, BUCKETS);
    this.ring = ring;
  }

  /** What the hub has from before; what only this tablet has stays. */
  fillIn(readings: readonly Reading[]): void {
    const byTime = new Map([...this.past, ...readings].map((reading) => [reading.atMs, reading]));
    this.past = [...byTime.values()].sort((a, b) => a.atMs - b.atMs);
  }

  get all(): readonly Reading[] {
    const fromMs = this.ring[0]?.atMs ?? Infinity;
    return [...this.past.filter(({ atMs }) => atMs < fromMs), ...this.ring];
  }

  /** Whether something is missing between the start of the run and what is at hand. */
  isHoled(startedAtMs: number): boolean {
    const ringMs = this.ring[0]?.atMs;
    return ringMs !== undefined && ringMs - (this.past.at(-1)?.atMs ?? startedAtMs) > HOLE_MS;
  }
}

/** The account of an open run, a moment old at most while somebody looks. */
class AccountFollower {
  readonly account = new ValueStore<RunAccount | null>(null);
  private readonly kept = new ReadingsKept();
  private users = 0;
  private workedAtMs = 0;
  private askedAtMs = -Infinity;
  private stops: (() => void)[] = [];

  constructor(private readonly store: RunStore) {}

  readonly subscribe = (listener: () => void): (() => void) => {
    const stop = this.account.subscribe(listener);
    this.users += 1;
    if (this.users === 1) this.start();
    return () => {
      stop();
      this.users -= 1;
      if (this.users > 0) return;
      for (const one of this.stops.splice(0)) one();
    };
  };

  private start(): void {
    this.stops = [
      this.store.live.subscribe(() => this.work(false)),
      this.store.snapshot.subscribe(() => this.work(true)),
    ];
    // Not while React subscribes: the first account is a change like any other.
    queueMicrotask(() => this.work(true));
  }

  private work(isAtOnce: boolean): void {
    const { state } = this.store.snapshot.get();
    const everyMs = (state.clock?.rate ?? 1) > 1 ? EVERY_FAST_MS : EVERY_MS;
    if (!isAtOnce && Date.now() - this.workedAtMs < everyMs) return;
    this.workedAtMs = Date.now();
    this.kept.follow(this.store.readings.all);
    if (state.document && state.startedAtMs !== null && this.kept.isHoled(state.startedAtMs)) void this.ask();
    this.account.set(accountSoFar(state, this.line(), this.store.nowMs()));
  }

  private line(): RecordedLine {
    const { summary } = this.store.snapshot.get();
    const { nowMs, view } = this.store.live.get();
    const trail = this.store.watch?.trail ?? [];
    const isLive = view?.estimate.status === 'live' && view.estimate.tempC !== null;
    const newest =
      isLive && nowMs > (trail.at(-1)?.atMs ?? Infinity) ? [{ atMs: nowMs, tempC: view.estimate.tempC as number }] : [];
    return liquidLine(this.kept.all, summary?.probeLagS ?? 0, [...trail, ...newest]);
  }

  private async ask(): Promise<void> {
    if (Date.now() - this.askedAtMs < ASK_AGAIN_MS) return;
    this.askedAtMs = Date.now();
    try {
      const query = runReadingsQuery(this.store.runId, { buckets: BUCKETS });
      const { readings } = await queryClient.fetchQuery({ ...query, staleTime: 0, retry: false });
      this.kept.fillIn(readings);
      this.work(true);
    } catch {
      // Without the hub the account rests on what this tablet has seen.
    }
  }
}

const followers = new WeakMap<RunStore, AccountFollower>();

function followerOf(store: RunStore): AccountFollower {
  const known = followers.get(store) ?? new AccountFollower(store);
  followers.set(store, known);
  return known;
}

/** What came of this run so far; `null` for the first moment. Wakes its component every second. */
export function useAccount(): RunAccount | null {
  const follower = followerOf(useRunStore());
  return useSyncExternalStore(follower.subscribe, follower.account.get);
}
