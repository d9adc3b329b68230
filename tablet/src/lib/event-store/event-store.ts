import type { RunSummary } from '@steepfall/shared/contracts';
import type { Problem } from '@steepfall/shared/problems';
import type { Reading } from '@steepfall/shared/readings';
import type { LogEntry, RunEvent, StoredRunEvent } from '@steepfall/shared/runs';

/** An event on its way to the hub. Acknowledged ones leave the outbox; a parked one was refused and holds nobody up. */
export interface OutboxItem {
  /** The place in the queue of this station. */
  order: number;
  runId: string;
  eventId: string;
  event: RunEvent;
  status: 'pending' | 'sent' | 'parked';
  /** Why it was parked. */
  problem: Problem | null;
  /** Wall time of this device, epoch ms. */
  queuedAtMs: number;
}

/** What a run page needs beside the log to be drawn without the hub. */
export interface KeptRun {
  runId: string;
  summary: RunSummary;
  readings: Reading[];
  /** Wall time of this device, epoch ms. */
  keptAtMs: number;
}

export interface LoadedRun {
  entries: LogEntry[];
  outbox: OutboxItem[];
  run: KeptRun | null;
}

/** The log of every run this station has opened, and what it still has to send. */
export interface EventStore {
  /** False: this browser keeps nothing, and a reload loses what was not sent. */
  readonly isDurable: boolean;
  load(runId: string): Promise<LoadedRun>;
  /** Log and outbox in one transaction: when this resolves, the events survive a reload. */
  append(events: readonly RunEvent[]): Promise<void>;
  /** What the hub has: into the log with its `seq`, out of the outbox. */
  confirm(events: readonly StoredRunEvent[]): Promise<void>;
  mark(eventIds: readonly string[], status: 'pending' | 'sent'): Promise<void>;
  park(eventId: string, problem: Problem): Promise<void>;
  /** Takes an event out of the outbox and, unless the hub has it, out of the log. */
  discard(eventId: string): Promise<void>;
  outbox(): Promise<OutboxItem[]>;
  keepRun(run: KeptRun): Promise<void>;
}
