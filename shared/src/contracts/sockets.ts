import type { StoredRunEvent, RunEvent } from '../runs/index.js';
import type { Reading } from '../readings/index.js';
import type { Problem } from '../problems/index.js';
import { z } from 'zod';
import { runEventSchema } from '../runs/index.js';
import {
  MAX_EVENTS_A_CALL,
  type AppendedEvents,
  type PushedReadings,
  type PushReadings,
  type RunSummary,
} from './api.js';

/** Grows when a message changes in a way that an older peer cannot read. Sent in the handshake. */
export const PROTOCOL_VERSION = 1;

export const joinRunSchema = z.strictObject({
  runId: z.uuid(),
  /** The last `seq` the tablet holds: only newer events come back. */
  afterSeq: z.int().nonnegative(),
  /** The name under which this device writes: its silence is noticed then. */
  station: z.string().min(1).max(60).optional(),
});
export type JoinRun = z.infer<typeof joinRunSchema>;

export const leaveRunSchema = z.strictObject({ runId: z.uuid() });
export type LeaveRun = z.infer<typeof leaveRunSchema>;

export const appendToRunSchema = z.strictObject({
  runId: z.uuid(),
  events: z.array(runEventSchema).min(1).max(MAX_EVENTS_A_CALL),
});
export type AppendToRun = { runId: string; events: RunEvent[] };

export const syncTimeSchema = z.strictObject({ sentMs: z.number() });
export type SyncTime = z.infer<typeof syncTimeSchema>;

export interface JoinedRun {
  run: RunSummary;
  events: StoredRunEvent[];
  /** The last quarter of an hour of run time, oldest first. */
  readings: Reading[];
  /** Hub wall time. */
  nowMs: number;
}

export interface RefusedAck {
  problem: Problem;
}
/** An acknowledgement is the answer, or a problem: never silence. */
export type Ack<Answer> = (answer: Answer | RefusedAck) => void;

/** Handshake of a person's device. */
export interface MemberHandshake {
  accessToken: string;
  protocol: number;
}
/** Handshake of a probe. */
export interface DeviceHandshake {
  deviceToken: string;
}

export interface ClientToHubEvents {
  'run.join': (message: JoinRun, ack: Ack<JoinedRun>) => void;
  'run.leave': (message: LeaveRun, ack: Ack<{ left: true }>) => void;
  'run.append': (message: AppendToRun, ack: Ack<AppendedEvents>) => void;
  'readings.push': (message: PushReadings, ack: Ack<PushedReadings>) => void;
  'time.sync': (message: SyncTime, ack: Ack<{ sentMs: number; hubMs: number }>) => void;
}

export interface HubToClientEvents {
  /** New events of a joined run, after commit, in `seq` order. */
  'run.events': (message: { runId: string; events: StoredRunEvent[] }) => void;
  /** Readings as they are accepted (before commit): for eyes, not for records. */
  'run.readings': (message: { runId: string; probeId: string; readings: Reading[]; acceptedMs: number }) => void;
  /** A run of the house started, ended or moved on: lists are out of date. */
  'runs.changed': (message: { runId: string }) => void;
  problem: (problem: Problem) => void;
}
