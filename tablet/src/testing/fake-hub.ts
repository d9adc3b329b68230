import type { AppendedEvents, JoinedRun, RunSummary } from '@steepfall/shared/contracts';
import { problem, type Problem } from '@steepfall/shared/problems';
import type { Reading } from '@steepfall/shared/readings';
import { foldRun, type RunEvent, type StoredRunEvent } from '@steepfall/shared/runs';
import { HubProblemError, HubUnreachableError } from '#lib/http.ts';
import type { HubLink, LinkState } from '#lib/socket/hub-link.ts';
import { ValueStore } from '#lib/value-store.ts';

type Handlers = Map<string, Set<(message: never) => void>>;

/** One run at a hub: order, idempotence and broadcast as the real one keeps them, without a database. */
export class FakeHub {
  readonly log: StoredRunEvent[] = [];
  readonly readings: Reading[] = [];
  readonly links = new Set<FakeLink>();
  /** Every `run.append` that reached the hub, as ids. */
  readonly appends: string[][] = [];
  /** Ids that are refused, with the problem to refuse them with. */
  readonly refusals = new Map<string, Problem>();
  /** The next appends are carried out, and their answer is lost on the way back. */
  lostAnswers = 0;
  /** The next appends fail as a whole. */
  failNext: Problem | null = null;
  nowMs = () => 0;

  constructor(
    readonly runId: string,
    stored: readonly StoredRunEvent[] = [],
    private readonly overrides: Partial<RunSummary> = {},
  ) {
    this.log.push(...stored);
  }

  connect(): FakeLink {
    const link = new FakeLink(this);
    this.links.add(link);
    link.setConnected(true);
    return link;
  }

  append(events: readonly RunEvent[]): AppendedEvents {
    const answer: AppendedEvents = { stored: [], refused: [] };
    const fresh: StoredRunEvent[] = [];
    for (const event of events) {
      const refusal = this.refusals.get(event.id);
      if (refusal) {
        answer.refused.push({ id: event.id, problem: refusal });
        continue;
      }
      let stored = this.log.find(({ id }) => id === event.id);
      if (!stored) {
        stored = { ...event, seq: this.log.length + 1, receivedAtMs: this.nowMs(), sentBy: event.by };
        this.log.push(stored);
        fresh.push(stored);
      }
      const { id, seq, receivedAtMs, sentBy } = stored;
      answer.stored.push({ id, seq, receivedAtMs, sentBy });
    }
    if (fresh.length > 0) this.broadcast('run.events', { runId: this.runId, events: fresh });
    return answer;
  }

  broadcast(name: string, message: unknown): void {
    for (const link of this.links) link.receive(name, message);
  }

  join(afterSeq: number): JoinedRun {
    return {
      run: this.summary,
      events: this.log.filter(({ seq }) => seq > afterSeq),
      readings: [...this.readings],
      nowMs: this.nowMs(),
    };
  }

  get summary(): RunSummary {
    const state = foldRun(this.log);
    const clock = state.clock ?? { anchorWallMs: 0, anchorRunMs: 0, rate: 1 };
    return {
      id: this.runId,
      title: state.title,
      batchId: null,
      batchNumber: null,
      isRehearsal: state.isRehearsal,
      status: state.status === 'ended' ? 'ended' : 'running',
      outcome: state.outcome,
      probeId: this.runId,
      probeLagS: 6,
      probeResolutionC: 0.0625,
      probeSamplePeriodS: 1,
      probeLagErrorRatio: null,
      chillerPerS: null,
      roomC: 21,
      coolantC: 12,
      startedAtMs: state.startedAtMs ?? 0,
      endedAtMs: state.endedAtMs,
      clock,
      lastSeq: this.log.length,
      currentStepTitle: null,
      alertStage: null,
      ...this.overrides,
    };
  }
}

export class FakeLink implements HubLink {
  readonly state = new ValueStore<LinkState>({ status: 'away', sinceMs: 0, problem: null });
  /** Joins that were asked for, by the `seq` the tablet held. */
  readonly joins: number[] = [];
  private readonly handlers: Handlers = new Map();
  private isJoined = false;

  constructor(private readonly hub: FakeHub) {}

  setConnected(isConnected: boolean): void {
    if (!isConnected) this.isJoined = false;
    this.state.set({ status: isConnected ? 'connected' : 'away', sinceMs: 0, problem: null });
  }

  receive(name: string, message: unknown): void {
    if (!this.isJoined) return;
    for (const handler of this.handlers.get(name) ?? []) handler(message as never);
  }

  readonly ask: HubLink['ask'] = async (name, message) => {
    await Promise.resolve();
    if (this.state.get().status !== 'connected') throw new HubUnreachableError('away');
    return (await this.answer(name, message)) as never;
  };

  readonly on: HubLink['on'] = (name, handler) => {
    const known = this.handlers.get(name) ?? new Set();
    known.add(handler as never);
    this.handlers.set(name, known);
    return () => known.delete(handler as never);
  };

  private async answer(name: string, message: unknown): Promise<unknown> {
    const { runId, afterSeq = 0, events = [] } = message as { runId: string; afterSeq?: number; events?: RunEvent[] };
    if (name === 'run.leave') return { left: true };
    if (runId !== this.hub.runId) throw new HubProblemError(problem('run-not-found', 'There is no such run.'));
    if (name === 'run.join') {
      this.joins.push(afterSeq);
      this.isJoined = true;
      return this.hub.join(afterSeq);
    }
    this.hub.appends.push(events.map(({ id }) => id));
    if (this.hub.failNext) {
      const failed = this.hub.failNext;
      this.hub.failNext = null;
      throw new HubProblemError(failed);
    }
    const answer = this.hub.append(events);
    if (this.hub.lostAnswers > 0) {
      this.hub.lostAnswers -= 1;
      throw new HubUnreachableError('the answer was lost');
    }
    return answer;
  }
}
