/** What the watch is told before the first reading. */
export interface WatchConfig {
  /** Time constant of the probe as told or learned; may be a quarter off either way. */
  lagS: number;
  /** Rough air temperature of the room; null when nobody knows. */
  roomC: number | null;
  /** Rough temperature of what runs through the chiller; null when nobody knows. */
  coolantC: number | null;
  /** Time between two readings as the probe announces it. */
  samplePeriodS: number;
  /** The smallest step the probe can show. */
  resolutionC: number;
  /** How far off `lagS` may be, as a share of it; a quarter unless learned (see `learnRun`). */
  lagErrorRatio?: number | null;
  /** Rate constant of this kettle with its chiller, learned from earlier runs. */
  chillerPerS?: number | null;
}

/** Something a person did to the kettle, as tapped on the sheet. */
export type WatchAct =
  | 'heat-on'
  | 'heat-off'
  | 'coil-in'
  | 'tea-in'
  | 'tea-out'
  | 'chiller-on'
  | 'chiller-off'
  | 'lid-on'
  | 'lid-off'
  | 'hops-in'
  | 'hops-out'
  | 'stirred';

export interface WatchActDone {
  act: WatchAct;
  /** Run clock. */
  atMs: number;
}

export interface WatchReading {
  /** Run clock. */
  atMs: number;
  /** What the probe said; null is "no signal". */
  tempC: number | null;
}

/** What was thought of a reading; only `good` ones move the estimate. */
export type WatchVerdict = 'good' | 'open-wire' | 'power-on' | 'spike' | 'implausible' | 'stuck' | 'late' | 'no-signal';

/** `starting`: too few readings to say. `stale`: no good reading for max(3 sample periods, 30 s). `lost`: for ten times that. */
export type WatchStatus = 'starting' | 'live' | 'stale' | 'lost';

export type WatchMode = 'climbing' | 'holding' | 'falling';

export interface WatchEstimate {
  status: WatchStatus;
  /** Temperature of the liquid itself, lag taken out. */
  tempC: number | null;
  /** One standard deviation of `tempC`. */
  sdC: number | null;
  /** Negative while cooling. */
  rateCPerMin: number | null;
  mode: WatchMode;
  lastGoodAtMs: number | null;
}

export type CrossingDirection = 'rising' | 'falling';

export interface CrossingTarget {
  tempC: number;
  direction: CrossingDirection;
}

/** `earlyMs` to `lateMs` holds the crossing nine times out of ten. All instants on the run clock. */
export type CrossingForecast =
  | { kind: 'crossed'; atMs: number }
  | { kind: 'forecast'; atMs: number; earlyMs: number; lateMs: number }
  /** The interval is wider than is of any use, or there are too few readings. */
  | { kind: 'too-early' }
  /** As things go, the liquid does not get there. */
  | { kind: 'never' };

/** One point of the widening wedge; `lowC` to `highC` is a 90 % interval. */
export interface ForecastPoint {
  atMs: number;
  tempC: number;
  lowC: number;
  highC: number;
}

export interface CatchTarget extends CrossingTarget {
  /** Names the step; copied to every alert. */
  key: string;
  /** Seconds this person needs from the alert to the addition. */
  reachS: number;
  /** How long before `now` the first warning comes; 120 unless told. */
  comingUpS?: number;
  /** How long before `now` the second warning comes; 30 unless told. */
  standByS?: number;
}

export interface TimerTarget {
  key: string;
  /** Run clock. */
  endsAtMs: number;
  reachS: number;
  comingUpS?: number;
  standByS?: number;
}

export type LadderStage = 'coming-up' | 'stand-by' | 'now' | 'missed';

export interface LadderAlert {
  key: string;
  stage: LadderStage;
  /** Which time through the target this is, counted from 1; with `key` and `stage` it names the alert for ever. */
  crossing: number;
  /** When the alert was raised, run clock. */
  atMs: number;
  /** Temperature of the liquid when it was raised; null on a timer. */
  tempC: number | null;
  /** When the target is (or was) crossed; null when only the fact is known. */
  crossingAtMs: number | null;
  earlyMs: number | null;
  lateMs: number | null;
}
