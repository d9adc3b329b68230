import type { Problem } from '@steepfall/shared/problems';
import type { LogEntry, RunEvent, StoredRunEvent } from '@steepfall/shared/runs';
import type { EventStore, KeptRun, LoadedRun, OutboxItem } from './event-store.ts';

/** For a browser that keeps nothing: the day goes on, and the status line says that a reload would lose what was not sent. */
export class MemoryEventStore implements EventStore {
  readonly isDurable = false;
  private readonly log = new Map<string, LogEntry>();
  private readonly queue = new Map<string, OutboxItem>();
  private readonly runs = new Map<string, KeptRun>();
  private nextOrder = 1;

  async load(runId: string): Promise<LoadedRun> {
    const entries = [...this.log.values()].filter((entry) => entry.runId === runId);
    const outbox = [...this.queue.values()].filter((item) => item.runId === runId);
    return { entries, outbox, run: this.runs.get(runId) ?? null };
  }

  async append(events: readonly RunEvent[]): Promise<void> {
    for (const event of events) {
      if (this.log.has(event.id)) continue;
      this.log.set(event.id, event);
      this.queue.set(event.id, {
        order: this.nextOrder++,
        runId: event.runId,
        eventId: event.id,
        event,
        status: 'pending',
        problem: null,
        queuedAtMs: Date.now(),
      });
    }
  }

  async confirm(events: readonly StoredRunEvent[]): Promise<void> {
    for (const event of events) {
      this.log.set(event.id, event);
      this.queue.delete(event.id);
    }
  }

  async mark(eventIds: readonly string[], status: 'pending' | 'sent'): Promise<void> {
    for (const id of eventIds) this.change(id, { status, problem: null });
  }

  async park(eventId: string, problem: Problem): Promise<void> {
    this.change(eventId, { status: 'parked', problem });
  }

  async discard(eventId: string): Promise<void> {
    this.queue.delete(eventId);
    if (this.log.get(eventId)?.seq === undefined) this.log.delete(eventId);
  }

  async outbox(): Promise<OutboxItem[]> {
    return [...this.queue.values()];
  }

  async keepRun(run: KeptRun): Promise<void> {
    this.runs.set(run.runId, run);
  }

  private change(eventId: string, part: Partial<OutboxItem>): void {
    const item = this.queue.get(eventId);
    if (item) this.queue.set(eventId, { ...item, ...part });
  }
}
