import { keep, readKept } from '../kept.ts';
import type { HubLink } from '../socket/hub-link.ts';
import { ValueStore } from '../value-store.ts';
import { estimateOffset, GlidingOffset, type OffsetSample } from './offset.ts';

const SAMPLES = 8;
const SYNC_EVERY_MS = 600_000;
/** A question that got no answer is asked again after this long. */
const RETRY_MS = 10_000;
/** Wall time and monotonic time apart by more than this between two looks: the clock was set, or the device slept. */
const JUMP_MS = 2_000;
/** Without an answer from the hub this long after a jump, the device's own clock is believed again. */
const SETTLE_AT_LATEST_MS = 3_000;

export interface Clocks {
  /** Wall time of this device, epoch ms. */
  wallMs: () => number;
  /** Counts on when somebody sets the wall clock. */
  monotonicMs: () => number;
}

export interface KeptOffset {
  read: () => number | null;
  write: (offsetMs: number) => void;
}

/** The hub's time on this device: wall time plus the measured offset. */
export class HubClock {
  /** False for a moment after the device's clock jumped: nothing may ring or be skipped until it is known why. */
  readonly isSettled = new ValueStore(true);
  /** Half the best round trip; `null` before the first sync. */
  readonly errorMs = new ValueStore<number | null>(null);
  private readonly offset: GlidingOffset;
  private link: HubLink | null = null;
  private syncing: Promise<void> | null = null;
  private lastSyncMs: number | null = null;
  private lastTryMs = Number.NEGATIVE_INFINITY;
  private lastLook: { wallMs: number; monotonicMs: number };
  private unsettledAtMs = 0;

  constructor(
    private readonly clocks: Clocks,
    private readonly kept: KeptOffset = { read: () => null, write: () => undefined },
  ) {
    this.offset = new GlidingOffset(kept.read() ?? 0);
    this.lastLook = { wallMs: clocks.wallMs(), monotonicMs: clocks.monotonicMs() };
  }

  /** Hub wall time, epoch ms. */
  nowMs(): number {
    return Math.round(this.clocks.wallMs() + this.offset.at(this.clocks.monotonicMs()));
  }

  /** Asks the hub for the time on every connect from now on. */
  follow(link: HubLink): void {
    if (this.link === link) return;
    this.link = link;
    const syncWhenConnected = () => {
      if (link.state.get().status === 'connected') void this.sync();
    };
    link.state.subscribe(syncWhenConnected);
    syncWhenConnected();
  }

  /** Called on every tick, and before anything is dated: notices jumps, and asks again when the last answer is old. */
  look(): void {
    const wallMs = this.clocks.wallMs();
    const monotonicMs = this.clocks.monotonicMs();
    const wallPassedMs = wallMs - this.lastLook.wallMs;
    const passedMs = monotonicMs - this.lastLook.monotonicMs;
    this.lastLook = { wallMs, monotonicMs };
    // A long silence without a difference is a sleep on a device whose monotonic clock counts it: ask all the same.
    if (Math.abs(wallPassedMs - passedMs) > JUMP_MS || passedMs > 60_000) {
      this.isSettled.set(false);
      this.unsettledAtMs = monotonicMs;
      this.lastSyncMs = null;
      void this.sync();
    } else if (!this.isSettled.get() && monotonicMs - this.unsettledAtMs > SETTLE_AT_LATEST_MS) {
      this.isSettled.set(true);
    }
    const isDue = this.lastSyncMs === null || monotonicMs - this.lastSyncMs > SYNC_EVERY_MS;
    if (isDue && monotonicMs - this.lastTryMs >= RETRY_MS) void this.sync();
  }

  /** Measures the offset anew; callers that meet share one measurement. Without the hub nothing changes. */
  sync(): Promise<void> {
    this.syncing ??= this.measure().finally(() => {
      this.syncing = null;
    });
    return this.syncing;
  }

  private async measure(): Promise<void> {
    const { link } = this;
    if (link?.state.get().status !== 'connected') return;
    this.lastTryMs = this.clocks.monotonicMs();
    const samples: OffsetSample[] = [];
    for (let i = 0; i < SAMPLES; i += 1) {
      const sample = await this.sample(link);
      if (sample === null) break;
      samples.push(sample);
    }
    const estimate = estimateOffset(samples);
    if (estimate === null) return;
    const monotonicMs = this.clocks.monotonicMs();
    this.offset.aim(estimate.offsetMs, monotonicMs);
    this.kept.write(estimate.offsetMs);
    this.lastSyncMs = monotonicMs;
    this.errorMs.set(estimate.errorMs);
    this.isSettled.set(true);
  }

  private async sample(link: HubLink): Promise<OffsetSample | null> {
    const sentMs = this.clocks.wallMs();
    const sentMonotonicMs = this.clocks.monotonicMs();
    try {
      const { hubMs } = await link.ask('time.sync', { sentMs });
      const roundTripMs = this.clocks.monotonicMs() - sentMonotonicMs;
      const isTorn = Math.abs(this.clocks.wallMs() - sentMs - roundTripMs) > JUMP_MS;
      return { sentMs, hubMs, roundTripMs: isTorn ? -1 : roundTripMs };
    } catch {
      return null;
    }
  }
}

const OFFSET_KEY = 'steepfall.clockOffsetMs';

/** The last offset, so that a tablet that is reloaded without the hub still shows the hub's time. */
const keptOnStation: KeptOffset = {
  read: () => {
    const kept = Number(readKept(OFFSET_KEY) ?? Number.NaN);
    return Number.isFinite(kept) ? kept : null;
  },
  write: (offsetMs) => {
    keep(OFFSET_KEY, String(Math.round(offsetMs)));
  },
};

export const hubClock = new HubClock({ wallMs: () => Date.now(), monotonicMs: () => performance.now() }, keptOnStation);
