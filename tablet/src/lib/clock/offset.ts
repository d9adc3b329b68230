/** One exchange with the hub. Wall times are epoch ms, the round trip is measured on a clock that no one sets. */
export interface OffsetSample {
  /** This device's wall time when the question left. */
  sentMs: number;
  /** The hub's wall time when it answered. */
  hubMs: number;
  roundTripMs: number;
}

export interface OffsetEstimate {
  /** Add to this device's wall time to get the hub's. */
  offsetMs: number;
  /** The truth is within this of it. */
  errorMs: number;
}

/** The sample with the shortest round trip decides: jitter only ever makes a trip longer (Cristian 1989). */
export function estimateOffset(samples: readonly OffsetSample[]): OffsetEstimate | null {
  let best: OffsetSample | null = null;
  for (const sample of samples) {
    if (sample.roundTripMs >= 0 && (best === null || sample.roundTripMs < best.roundTripMs)) best = sample;
  }
  if (best === null) return null;
  const halfTripMs = best.roundTripMs / 2;
  return { offsetMs: best.hubMs - (best.sentMs + halfTripMs), errorMs: halfTripMs };
}

/** Corrections smaller than this are taken in bit by bit, so that no countdown hops. */
const SLEW_BELOW_MS = 250;
/** A correction is spread over ten times its own length: the clock runs a tenth fast or slow meanwhile, never backwards. */
const SLEW_STRETCH = 10;

/** An offset that glides to a new value when the change is small. Times are of a clock that no one sets. */
export class GlidingOffset {
  private fromMs: number;
  private toMs: number;
  private startedMs = 0;

  constructor(initialMs: number) {
    this.fromMs = initialMs;
    this.toMs = initialMs;
  }

  at(monotonicMs: number): number {
    const spanMs = Math.abs(this.toMs - this.fromMs) * SLEW_STRETCH;
    const share = spanMs === 0 ? 1 : Math.min(1, Math.max(0, (monotonicMs - this.startedMs) / spanMs));
    return this.fromMs + (this.toMs - this.fromMs) * share;
  }

  aim(offsetMs: number, monotonicMs: number): void {
    const nowMs = this.at(monotonicMs);
    this.fromMs = Math.abs(offsetMs - nowMs) < SLEW_BELOW_MS ? nowMs : offsetMs;
    this.toMs = offsetMs;
    this.startedMs = monotonicMs;
  }
}
