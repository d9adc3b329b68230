import { Injectable, Logger, type BeforeApplicationShutdown, type OnApplicationBootstrap } from '@nestjs/common';
import { faultEvents, openFaults, standingAlerts, type FaultSight, type RunEvent } from '@steepfall/shared/runs';
import { runTimeAt } from '@steepfall/shared/timers';
import { Clock } from '../common/clock.js';
import type { RunLog } from '../runs/run-log.js';
import { RunLogService } from '../runs/run-log.service.js';
import { RunPresence, type PresentStation } from '../runs/run-presence.service.js';

const STATION = 'hub';
const LOOK_EVERY_MS = 1_000;
/** Wall time: a reload, a lock of the screen or a walk to the far end of the house is no silence. */
const SILENT_FOR_MS = 60_000;
const BACK_FOR_MS = 10_000;

/**
 * Misses a tablet that rang for a run and went away without leaving: its battery is empty, it fell into the kettle, or its browser was shut.
 * While somebody else has the run open and nothing calls, it is nobody's worry.
 */
@Injectable()
export class SilentTablets implements OnApplicationBootstrap, BeforeApplicationShutdown {
  private readonly logger = new Logger(SilentTablets.name);
  private timer: NodeJS.Timeout | null = null;
  private looking: Promise<void> | null = null;

  constructor(
    private readonly logs: RunLogService,
    private readonly presence: RunPresence,
    private readonly clock: Clock,
  ) {}

  onApplicationBootstrap(): void {
    this.timer = setInterval(() => {
      this.looking ??= this.look().finally(() => {
        this.looking = null;
      });
    }, LOOK_EVERY_MS);
  }

  async beforeApplicationShutdown(): Promise<void> {
    if (this.timer) clearInterval(this.timer);
    await this.looking;
  }

  private async look(): Promise<void> {
    const open = this.logs.openLogs;
    this.presence.keepOnly(new Set(open.map(({ id }) => id)));
    for (const log of open) {
      try {
        const found = this.find(log);
        if (found.length > 0) await this.logs.append(log.facts.houseId, log.id, found, null);
      } catch (error) {
        // Looked at again in a second.
        this.logger.error('tablets.not-watched', error instanceof Error ? error.stack : String(error));
      }
    }
  }

  private find(log: RunLog): RunEvent[] {
    const nowMs = this.clock.nowMs();
    const place = { runId: log.id, station: STATION, nowMs: runTimeAt(log.clock, nowMs) };
    const stations = this.presence.of(log.id);
    return stations
      .flatMap((one) => sightOf(log, one, stations, nowMs) ?? [])
      .flatMap((sight) => faultEvents(log.state, sight, place))
      .filter(({ id }) => !log.find(id));
  }
}

function sightOf(
  log: RunLog,
  { station, isHere, sinceMs }: PresentStation,
  stations: readonly PresentStation[],
  nowMs: number,
): FaultSight | null {
  const key = `station:${station}`;
  const isRaised = openFaults(log.state).some((fault) => fault.key === key);
  const isAlone = !stations.some((other) => other.station !== station && other.isHere);
  const calls = standingAlerts(log.state).some(({ rule }) => rule !== 'station');
  // Raised, it goes on until the tablet is back: that another one came does not tell where this one is.
  if (!isHere && !isRaised && (!wasHeard(log, station) || !(isAlone || calls))) return null;
  return {
    ...{ rule: 'station', key, stepId: null, isTrue: !isHere, heldMs: nowMs - sinceMs },
    ...{ onDelayMs: SILENT_FOR_MS, offDelayMs: BACK_FOR_MS },
  };
}

/** A tablet that somebody said they hear from where they work. */
function wasHeard(log: RunLog, station: string): boolean {
  const check = log.events.findLast((event) => event.type === 'sound.checked' && event.station === station);
  return check?.type === 'sound.checked' && check.payload.isHeard;
}
