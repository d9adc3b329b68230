import { Injectable, Logger, type BeforeApplicationShutdown, type OnApplicationBootstrap } from '@nestjs/common';
import type { Reading } from '@steepfall/shared/readings';
import { bootDriver, driveRun, liveView, type LiveView, type RunDriver, type RunEvent } from '@steepfall/shared/runs';
import { runTimeAt } from '@steepfall/shared/timers';
import type { Subscription } from 'rxjs';
import { Clock } from '../common/clock.js';
import { IngestionService, type AcceptedReadings } from '../readings/ingestion.service.js';
import { RunReadingsService } from '../readings/run-readings.service.js';
import { RunLogService } from '../runs/run-log.service.js';
import type { RunLog } from '../runs/run-log.js';

const STATION = 'hub';
const TICK_MS = 250;
/** Run time between two looks at a run, also when its clock is fast. */
const STEP_MS = 1_000;
/** Longer absences than this many steps are taken in one. */
const MOST_STEPS = 120;
/** Older readings tell of the past: no alert comes of them. On a fast clock the way to the hub takes longer in run time. */
const FRESH_MS = 30_000;
const FRESH_WALL_MS = 2_000;
const RETRY_MS = 1_000;

/** One open run as it is watched. */
interface Watched {
  log: RunLog;
  /** `null` until the readings of the last quarter of an hour have been looked at. */
  driver: RunDriver | null;
  /** Run clock of the last look. */
  seenMs: number;
  /** Came in while it was brought up to date. */
  early: AcceptedReadings[];
  /** Found and not yet in the log. */
  found: Map<string, RunEvent>;
  writing: Promise<void> | null;
  retryAtMs: number;
}

/**
 * Keeps watch over every open run, with or without a tablet looking: readings and time go into the driver of the run, and what it finds
 * goes into the log. Tablets run the same driver; ids derived from what is said make the same finding one fact.
 */
@Injectable()
export class RunSupervisor implements OnApplicationBootstrap, BeforeApplicationShutdown {
  private readonly logger = new Logger(RunSupervisor.name);
  private readonly watched = new Map<string, Watched>();
  private timer: NodeJS.Timeout | null = null;
  private subscription: Subscription | null = null;

  constructor(
    private readonly logs: RunLogService,
    private readonly ingestion: IngestionService,
    private readonly readings: RunReadingsService,
    private readonly clock: Clock,
  ) {}

  onApplicationBootstrap(): void {
    this.subscription = this.ingestion.accepted$.subscribe((accepted) => this.take(accepted));
    this.timer = setInterval(() => this.tick(), TICK_MS);
  }

  async beforeApplicationShutdown(): Promise<void> {
    this.subscription?.unsubscribe();
    if (this.timer) clearInterval(this.timer);
    await Promise.all([...this.watched.values()].flatMap(({ writing }) => writing ?? []));
  }

  /** What the watch makes of a run at this moment; `null` when it is over, or not yet brought up to date. */
  viewOf(log: RunLog): LiveView | null {
    const driver = this.watched.get(log.id)?.driver;
    return driver ? liveView(driver, log.state, runTimeAt(log.clock, this.clock.nowMs())) : null;
  }

  private tick(): void {
    const nowMs = this.clock.nowMs();
    const open = this.logs.openLogs;
    const openIds = new Set(open.map(({ id }) => id));
    for (const id of this.watched.keys()) if (!openIds.has(id)) this.watched.delete(id);
    for (const log of open) {
      const watched = this.watch(log);
      this.guard(watched, () => this.goOn(watched, runTimeAt(log.clock, nowMs)));
      if (watched.found.size > 0 && nowMs >= watched.retryAtMs) this.write(watched);
    }
  }

  private take(accepted: AcceptedReadings): void {
    const watched = this.watch(accepted.log);
    if (watched.driver === null) watched.early.push(accepted);
    else this.guard(watched, () => this.look(watched, accepted.nowMs, accepted.readings));
  }

  private watch(log: RunLog): Watched {
    let watched = this.watched.get(log.id);
    if (watched?.log === log) return watched;
    const { found, writing } = watched ?? { found: new Map<string, RunEvent>(), writing: null };
    watched = { log, driver: null, seenMs: 0, early: [], found, writing, retryAtMs: 0 };
    this.watched.set(log.id, watched);
    void this.bringUpToDate(watched);
    return watched;
  }

  /** After a restart the driver is rebuilt from the log and the readings on disk: what it finds again is known by its id. */
  private async bringUpToDate(watched: Watched): Promise<void> {
    const { log } = watched;
    try {
      const wallMs = this.clock.nowMs();
      const nowMs = runTimeAt(log.clock, wallMs);
      const readings = await this.readings.recent(log, wallMs);
      const booted = bootDriver({
        config: log.driverConfig,
        entries: log.events,
        readings: readings.filter(({ atMs }) => atMs <= nowMs),
        nowMs,
        runId: log.id,
        station: STATION,
      });
      watched.driver = booted.driver;
      watched.seenMs = nowMs;
      this.note(watched, booted.events);
      for (const accepted of watched.early.splice(0)) this.look(watched, accepted.nowMs, accepted.readings);
    } catch (error) {
      this.complain(watched, error);
      // The next tick finds it missing and tries again.
      if (this.watched.get(log.id) === watched) this.watched.delete(log.id);
    }
  }

  /** Time alone moves timers, silence and forecasts: in steps of run time, however fast the clock is. */
  private goOn(watched: Watched, nowMs: number): void {
    if (watched.driver === null) return;
    if (nowMs - watched.seenMs > MOST_STEPS * STEP_MS) this.look(watched, nowMs);
    while (watched.seenMs + STEP_MS <= nowMs) this.look(watched, watched.seenMs + STEP_MS);
  }

  private look(watched: Watched, nowMs: number, readings: readonly Reading[] = []): void {
    const { log, driver } = watched;
    if (driver === null) return;
    const oldestMs = nowMs - Math.max(FRESH_MS, FRESH_WALL_MS * log.clock.rate);
    const fresh = readings.filter(({ atMs }) => atMs >= oldestMs);
    const input = { runId: log.id, station: STATION, readings: fresh, nowMs: Math.max(nowMs, watched.seenMs) };
    const driven = driveRun(driver, log.state, input);
    watched.driver = driven.driver;
    watched.seenMs = input.nowMs;
    this.note(watched, driven.events);
  }

  private note(watched: Watched, events: readonly RunEvent[]): void {
    const news = events.filter(({ id }) => !watched.log.find(id) && !watched.found.has(id));
    for (const event of news) watched.found.set(event.id, event);
    if (news.length > 0) this.write(watched);
  }

  private write(watched: Watched): void {
    watched.writing ??= this.writeFound(watched).finally(() => {
      watched.writing = null;
      if (watched.found.size > 0 && this.clock.nowMs() >= watched.retryAtMs) this.write(watched);
    });
  }

  /** What cannot be written now is kept and tried again: an alert must not get lost because the database was away for a moment. */
  private async writeFound(watched: Watched): Promise<void> {
    const { log, found } = watched;
    const events = [...found.values()];
    try {
      const { refused } = await this.logs.append(log.facts.houseId, log.id, events, null);
      for (const { id } of events) found.delete(id);
      // A tablet was quicker: its word for the same finding stands.
      const isOddly = ({ problem }: (typeof refused)[number]) => problem.type !== '/problems/event-id-taken';
      if (refused.some(isOddly)) this.logger.error('alert.refused', { runId: log.id, refused });
    } catch (error) {
      watched.retryAtMs = this.clock.nowMs() + RETRY_MS;
      this.complain(watched, error);
    }
  }

  /** One run that cannot be watched must not blind the hub for the others. */
  private guard(watched: Watched, work: () => void): void {
    try {
      work();
    } catch (error) {
      this.complain(watched, error);
    }
  }

  private complain({ log }: Watched, error: unknown): void {
    this.logger.error('run.not-watched', error instanceof Error ? error.stack : String(error), { runId: log.id });
  }
}
