import { kettleRun, type KettleSetup } from '@steepfall/probe-sim/kettle';
import type { RunEvents, RunSummary } from '@steepfall/shared/contracts';
import { currentStep, foldRun, type RunEvent, type RunState, type StoredRunEvent } from '@steepfall/shared/runs';
import { clockAtRate, runTimeAt } from '@steepfall/shared/timers';
import { v7 } from 'uuid';
import type { HubApi } from './hub-api.ts';
import type { Product } from './product.ts';

/** A rehearsal that is brought to its scene past the screens. */
export class Rehearsal {
  private constructor(
    private readonly api: HubApi,
    readonly run: RunSummary,
  ) {}

  static async start(api: HubApi, rate: number, seed = 7): Promise<Rehearsal> {
    return new Rehearsal(api, await api.startRehearsal({ rate, seed }));
  }

  get path(): string {
    return `/runs/${this.run.id}`;
  }

  async events(): Promise<StoredRunEvent[]> {
    return (await this.api.get<RunEvents>(`runs/${this.run.id}/events?afterSeq=0`)).events;
  }

  async state(): Promise<RunState> {
    return foldRun(await this.events());
  }

  async write(type: RunEvent['type'], payload: unknown, atMs?: number): Promise<void> {
    const { clock } = await this.state();
    const nowMs = clock ? runTimeAt(clock, Date.now()) : Date.now();
    await this.api.append(this.run.id, [
      {
        id: v7(),
        runId: this.run.id,
        type,
        v: 1,
        atMs: Math.round(atMs ?? nowMs),
        by: this.api.session.member.id,
        station: 'scene',
        payload,
      } as RunEvent,
    ]);
  }

  done(stepId: string): Promise<void> {
    return this.write('step.done', { stepId, cause: 'hand', tempC: null });
  }

  /** Does what the sheet asks for, as it asks, until it comes to this step. */
  async goTo(stepId: string): Promise<void> {
    const untilMs = Date.now() + 150_000;
    while (Date.now() < untilMs) {
      const current = currentStep(await this.state())?.step;
      if (!current || current.id === stepId) return;
      const isByItself = current.done.by === 'temperature' || current.done.by === 'timer';
      if (isByItself) await new Promise((passed) => setTimeout(passed, 200));
      else await this.done(current.id);
    }
    throw new Error(`The sheet never came to ${stepId}.`);
  }

  async setRate(rate: number): Promise<void> {
    const { clock } = await this.state();
    if (!clock) throw new Error('The run has no clock.');
    const next = clockAtRate(clock, rate, Date.now());
    await this.write('clock.changed', { clock: next }, next.anchorRunMs);
  }

  /** A timer that somebody sets for themselves, and the name of its alert. */
  async startTimer(label: string, durationS: number): Promise<{ key: string; endsAtMs: number }> {
    const { clock } = await this.state();
    if (!clock) throw new Error('The run has no clock.');
    const nowMs = Math.round(runTimeAt(clock, Date.now()));
    const timerId = v7();
    await this.write('timer.started', { timerId, label, durationS }, nowMs);
    return { key: `timer:${timerId}`, endsAtMs: nowMs + durationS * 1000 };
  }

  async raised(key: string, stage?: string): Promise<Extract<StoredRunEvent, { type: 'alert.raised' }>[]> {
    const events = await this.events();
    return events.filter(
      (event) =>
        event.type === 'alert.raised' && event.payload.key === key && (!stage || event.payload.stage === stage),
    ) as Extract<StoredRunEvent, { type: 'alert.raised' }>[];
  }

  /** The liquid itself at an instant of the run clock, whatever the probe said: the kettle is made again from its setup and the log. */
  async liquidAt(product: Product, atMs: number): Promise<{ tempC: number; perMin: number }> {
    const [row] = await product.rows<{ kettle_setup: unknown }>('SELECT kettle_setup FROM runs WHERE id = ?', [
      this.run.id,
    ]);
    const kept = row?.kettle_setup;
    const setup = (typeof kept === 'string' ? JSON.parse(kept) : kept) as KettleSetup;
    const kettle = kettleRun(setup, this.run.startedAtMs);
    const events = await this.events();
    events.forEach((event, index) => {
      if (event.type !== 'step.done' || event.atMs >= atMs) return;
      const { clock, steps } = foldRun(events.slice(0, index + 1));
      const acts = steps.find(({ doneEventId }) => doneEventId === event.id)?.step.acts ?? [];
      // As in the hub: an act counts from when the hub learned of it.
      const learnedAtMs = clock ? runTimeAt(clock, event.receivedAtMs) : event.atMs;
      kettle.readingsUntil(learnedAtMs);
      for (const act of acts) kettle.act(act, Math.min(event.atMs, learnedAtMs));
    });
    const at = (ms: number) => {
      kettle.readingsUntil(ms);
      return kettle.state.tempC;
    };
    // Its readings are a second apart, on whole seconds since the start.
    const fromMs = this.run.startedAtMs + Math.floor((atMs - this.run.startedAtMs) / 1000) * 1000;
    const [from, to] = [at(fromMs), at(fromMs + 1000)];
    return { tempC: from + ((to - from) * (atMs - fromMs)) / 1000, perMin: (to - from) * 60 };
  }
}
