import { followedRunSchema, type FollowedRun } from '@steepfall/shared/contracts';
import type { Problem } from '@steepfall/shared/problems';
import { runTimeAt } from '@steepfall/shared/timers';
import { estimateOffset, GlidingOffset, type OffsetSample } from '#lib/clock/offset.ts';
import { subscribeTick } from '#lib/clock/ticker.ts';
import { HubProblemError, requestHub } from '#lib/http.ts';
import { ValueStore } from '#lib/value-store.ts';

const ASK_EVERY_MS = 2_000;
/** After the end little happens. */
const ASK_AFTER_END_EVERY_MS = 20_000;
const PATIENCE_MS = 6_000;
const SAMPLES = 8;

export type Following =
  | { status: 'starting'; isAway: boolean }
  | { status: 'seen'; run: FollowedRun; isAway: boolean }
  /** The link opens nothing: mistyped, taken back, or its time is over. */
  | { status: 'over'; problem: Problem };

/** A run as the hub tells it to a phone: asked for every two seconds, with the clock of the hub beside it. */
export class FollowStore {
  readonly following = new ValueStore<Following>({ status: 'starting', isAway: false });
  private readonly offset = new GlidingOffset(0);
  private samples: OffsetSample[] = [];
  private askedAtMs = Number.NEGATIVE_INFINITY;
  private heardAtMs: number | null = null;
  private isAsking = false;

  constructor(private readonly token: string) {}

  start(): () => void {
    const look = () => {
      const now = this.following.get();
      if (now.status === 'over' || this.isAsking) return;
      const isEnded = now.status === 'seen' && now.run.status === 'ended';
      if (performance.now() - this.askedAtMs >= (isEnded ? ASK_AFTER_END_EVERY_MS : ASK_EVERY_MS)) void this.ask();
    };
    look();
    return subscribeTick(look);
  }

  /** The clock of the run. */
  nowMs(): number {
    const now = this.following.get();
    const hubMs = Date.now() + this.offset.at(performance.now());
    return now.status === 'seen' ? runTimeAt(now.run.clock, hubMs) : hubMs;
  }

  /** How long the hub has said nothing; `null` before its first word. */
  silentMs(): number | null {
    return this.heardAtMs === null ? null : performance.now() - this.heardAtMs;
  }

  private async ask(): Promise<void> {
    this.isAsking = true;
    this.askedAtMs = performance.now();
    const sentMs = Date.now();
    try {
      const request = { followToken: this.token, signal: AbortSignal.timeout(PATIENCE_MS) };
      const run = followedRunSchema.parse(await requestHub('follow', request));
      this.heardAtMs = performance.now();
      this.setClock({ sentMs, hubMs: run.nowMs, roundTripMs: this.heardAtMs - this.askedAtMs });
      this.following.set({ status: 'seen', run, isAway: false });
    } catch (error) {
      const isOver = error instanceof HubProblemError && /^follow-link-/.test(error.type ?? '');
      if (isOver) this.following.set({ status: 'over', problem: error.problem });
      else this.beAway();
    } finally {
      this.isAsking = false;
    }
  }

  private beAway(): void {
    const now = this.following.get();
    if (now.status !== 'over' && !now.isAway) this.following.set({ ...now, isAway: true });
  }

  private setClock(sample: OffsetSample): void {
    this.samples = [...this.samples, sample].slice(-SAMPLES);
    const estimate = estimateOffset(this.samples);
    if (estimate) this.offset.aim(estimate.offsetMs, performance.now());
  }
}
