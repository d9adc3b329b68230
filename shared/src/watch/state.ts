import type { Rival } from './rivals.js';
import type { WatchConfig, WatchVerdict } from './types.js';

/** What the kettle is taken to be doing, from the steps done; the slope has the last word. */
export interface KettleState {
  chilling: boolean;
  heating: boolean;
  lidOn: boolean;
}

/** A reading that was in range but off the line: three that agree are a step of the liquid, one is a spike. */
export interface Suspect {
  atMs: number;
  tempC: number;
}

/** The same number again and again: since when, and what was believed before it came. */
export interface FlatLine {
  readonly tempC: number;
  readonly sinceMs: number;
  readonly count: number;
  readonly before: Pick<WatchState, 'bank' | 'bankAtMs' | 'lastGoodAtMs' | 'steppedAtMs'>;
}

/** All that is known after some readings. Plain data: it survives JSON and is never changed in place. */
export interface WatchState {
  readonly config: WatchConfig;
  readonly kettle: KettleState;
  readonly lastVerdict: WatchVerdict | null;
  /** Readings so far by verdict. */
  readonly verdictCounts: Readonly<Record<WatchVerdict, number>>;
  readonly firstGoodAtMs: number | null;
  readonly lastGoodAtMs: number | null;
  /** Newest reading of any verdict but `late`. */
  readonly lastReadingAtMs: number | null;
  /** Good readings before the bank is started, then the newest three. */
  readonly recent: readonly { atMs: number; tempC: number }[];
  readonly suspects: readonly Suspect[];
  /** null before the first number, and after each act. */
  readonly flat: FlatLine | null;
  /** The filters, flat; null until enough readings agree. Holds at `bankAtMs`. */
  readonly bank: readonly number[] | null;
  readonly bankAtMs: number;
  /** Running estimate of the variance of the white part of the noise, and how many readings it rests on. */
  readonly whiteVariance: number;
  readonly whiteCount: number;
  readonly rivals: readonly Rival[];
  /** Last instant at which something went in that may have stepped the liquid by half a kelvin or more. */
  readonly steppedAtMs: number | null;
  /** The estimate so far, thinned, to say when a target was crossed. */
  readonly trail: readonly { atMs: number; tempC: number }[];
}

const NO_VERDICTS: Record<WatchVerdict, number> = {
  good: 0,
  'open-wire': 0,
  'power-on': 0,
  spike: 0,
  implausible: 0,
  stuck: 0,
  late: 0,
  'no-signal': 0,
};

/** A watch that has seen nothing yet. */
export function startWatch(config: WatchConfig): WatchState {
  return {
    config,
    kettle: { chilling: false, heating: false, lidOn: false },
    lastVerdict: null,
    verdictCounts: NO_VERDICTS,
    firstGoodAtMs: null,
    lastGoodAtMs: null,
    lastReadingAtMs: null,
    recent: [],
    suspects: [],
    flat: null,
    bank: null,
    bankAtMs: 0,
    whiteVariance: 0.1 ** 2,
    whiteCount: 0,
    rivals: [],
    steppedAtMs: null,
    trail: [],
  };
}
