import { setImmediate } from 'node:timers/promises';
import { Injectable, Logger, type OnApplicationBootstrap, type OnModuleDestroy } from '@nestjs/common';
import { startKettle, type KettleSetup } from '@steepfall/probe-sim/kettle';
import type { Equipment, RunSummary, StartRehearsal } from '@steepfall/shared/contracts';
import { ProblemError } from '@steepfall/shared/problems';
import type { Reading } from '@steepfall/shared/readings';
import type { RunEventOf } from '@steepfall/shared/runs';
import { runTimeAt } from '@steepfall/shared/timers';
import type { Subscription } from 'rxjs';
import type { Transaction } from 'sequelize';
import type { Actor } from '../common/access/actor.js';
import { Clock } from '../common/clock.js';
import { newId } from '../common/ids.js';
import { EquipmentService } from '../equipment/equipment.service.js';
import { kettleSetupOf } from './kettle-setup.js';
import { HousesService } from '../houses/houses.service.js';
import { ProbesService, type ProbeFacts } from '../probes/probes.service.js';
import { IngestionService } from '../readings/ingestion.service.js';
import { RunReadingsService } from '../readings/run-readings.service.js';
import { RecipesService, type NamedRevision } from '../recipes/recipes.service.js';
import { RunLogService, type Appended } from '../runs/run-log.service.js';
import type { RunLog } from '../runs/run-log.js';
import { RunsService, type RunStart } from '../runs/runs.service.js';
import { actsOf, RehearsalKettle } from './rehearsal-kettle.js';

type KettleOfHouse = Extract<Equipment, { kind: 'kettle' }>;

const TICK_MS = 100;
const RETRY_MS = 1_000;
const IDLE_LOOK_MS = 60_000;
/** Wall time after which nobody is coming back to a rehearsal. */
const IDLE_MS = 2 * 3_600_000;
/** Readings further behind than this are left out: nobody looks at them any more. */
const RECENT_MS = 15 * 60_000;
/** A kettle that is further behind than this is not caught up with in one go. */
const LONGEST_JUMP_MS = 2 * RECENT_MS;
/** Run time that is simulated in one go before others have a turn. */
const CATCH_UP_MS = 600_000;

/** Of a house that has not written down any equipment. */
const USUAL_KETTLE: Pick<KettleOfHouse, 'facts'> = {
  facts: { volumeL: 30, diameterM: 0.36, massKg: 4.5, heaterPowerW: 3500, heaterEfficiency: 0.84 },
};
/** The laws behind the simulated kettle do not reach higher up than this. */
const LEAST_PRESSURE_KPA = 50;

/** Rehearsals: runs on a fast clock, with a kettle that does what the sheet says. */
@Injectable()
export class RehearsalsService implements OnApplicationBootstrap, OnModuleDestroy {
  private readonly logger = new Logger(RehearsalsService.name);
  /** `null` while it is made again after a restart. */
  private readonly kettles = new Map<string, RehearsalKettle | null>();
  private readonly timers: NodeJS.Timeout[] = [];
  private subscription: Subscription | null = null;

  constructor(
    private readonly runs: RunsService,
    private readonly logs: RunLogService,
    private readonly ingestion: IngestionService,
    private readonly readings: RunReadingsService,
    private readonly recipes: RecipesService,
    private readonly equipment: EquipmentService,
    private readonly houses: HousesService,
    private readonly probes: ProbesService,
    private readonly clock: Clock,
  ) {}

  onApplicationBootstrap(): void {
    this.subscription = this.logs.appended$.subscribe((appended) => this.follow(appended));
    this.timers.push(
      setInterval(() => this.tick(), TICK_MS),
      setInterval(() => void this.endIdle(), IDLE_LOOK_MS),
    );
  }

  onModuleDestroy(): void {
    this.subscription?.unsubscribe();
    for (const timer of this.timers) clearInterval(timer);
  }

  async start(actor: Actor, { rate, revisionId, probeId, seed }: StartRehearsal): Promise<RunSummary> {
    const { houseId } = actor;
    const [revision, house] = await Promise.all([this.revisionFor(houseId, revisionId), this.houses.get(houseId)]);
    const sheet = this.recipes.sheetOf(revision, house.altitudeM);
    const source = probeId === undefined ? null : await this.sourceProbe(houseId, probeId);
    const { altitudeM } = house;
    const { kettle, chiller } = await this.kitFor(houseId, revision);
    const setup = { kettle, chiller, document: revision.document, altitudeM, seed: seed ?? randomSeed() };
    const kettleSetup = source ? null : simulatedKettle(setup);
    const facts = source ? probeLike(source) : simulatedProbe(kettleSetup as KettleSetup);
    return this.runs.start(actor, async (transaction: Transaction): Promise<RunStart> => {
      const nowMs = this.clock.nowMs();
      return {
        title: `Rehearsal: ${revision.recipeName}`,
        batch: null,
        revisionId: revision.id,
        sheet,
        document: revision.document,
        kit: { altitudeM, kettle: kettle.facts, chiller: chiller?.facts ?? null },
        clock: { anchorWallMs: nowMs, anchorRunMs: nowMs, rate },
        probe: await this.probes.createSimulated(houseId, facts, transaction),
        roomC: kettleSetup?.roomC ?? null,
        coolantC: kettleSetup?.coolantC ?? null,
        chillerPerS: null,
        rehearsal: { seed: kettleSetup?.seed ?? null, kettleSetup, sourceProbeId: source?.id ?? null },
      };
    });
  }

  /** Ends rehearsals that nobody has touched for long; a real run stays open over night and is never ended by the hub. */
  async endIdle(): Promise<void> {
    const nowMs = this.clock.nowMs();
    for (const log of this.logs.openLogs.filter(({ facts }) => facts.isRehearsal)) {
      const touchedMs = log.events.findLast(({ sentBy }) => sentBy !== null)?.receivedAtMs ?? log.facts.createdAtMs;
      if (nowMs - touchedMs < IDLE_MS) continue;
      const ended: RunEventOf<'run.ended'> = {
        id: newId(),
        runId: log.id,
        type: 'run.ended',
        v: 1,
        atMs: runTimeAt(log.clock, nowMs),
        by: null,
        station: 'hub',
        payload: { outcome: 'abandoned', reason: 'Nobody touched this rehearsal for two hours.' },
      };
      await this.logs
        .append(log.facts.houseId, log.id, [ended], null)
        .catch((error: unknown) => this.complain(log, error));
    }
  }

  private tick(): void {
    const open = this.logs.openLogs.filter(({ facts }) => facts.kettleSetup);
    const openIds = new Set(open.map(({ id }) => id));
    for (const id of this.kettles.keys()) if (!openIds.has(id)) this.kettles.delete(id);
    for (const log of open) {
      try {
        this.goOn(log);
      } catch (error) {
        this.complain(log, error);
      }
    }
  }

  private goOn(log: RunLog): void {
    if (!this.kettles.has(log.id)) void this.makeAgain(log);
    const kettle = this.kettles.get(log.id);
    // Without its probe in the kettle nobody knows what it does.
    if (!kettle || log.projection.probeOutAtMs !== null) return;
    const nowMs = runTimeAt(log.clock, this.clock.nowMs());
    // The probe was put back in after a long time: caught up with in turns, as after a restart.
    if (nowMs - kettle.nowMs > LONGEST_JUMP_MS) this.kettles.delete(log.id);
    else this.read(log, kettle, nowMs);
  }

  private read(log: RunLog, kettle: RehearsalKettle, nowMs: number): void {
    this.tell(
      log,
      kettle.readingsUntil(nowMs).filter(({ atMs }) => atMs >= nowMs - RECENT_MS),
    );
  }

  /** A simulated probe does not store and forward: what cannot be kept just now is gone. */
  private tell(log: RunLog, readings: Reading[]): void {
    if (readings.length === 0) return;
    this.ingestion.ingest(log.facts.probeId as string, readings).catch((error: unknown) => this.complain(log, error));
  }

  private follow({ log, events }: Appended): void {
    const kettle = this.kettles.get(log.id);
    const acts = events.filter(({ type }) => type === 'step.done' || type === 'event.undone');
    const last = acts.at(-1);
    if (!kettle || !last) return;
    try {
      // The instant that the log keeps, and not this one: made again after a restart, the kettle does it at that instant too.
      const learnedAtMs = runTimeAt(log.clock, last.receivedAtMs);
      if (log.projection.probeOutAtMs === null) this.read(log, kettle, learnedAtMs);
      kettle.follow(log.state, learnedAtMs);
    } catch (error) {
      this.complain(log, error);
    }
  }

  /** The same kettle after a restart, or a new one: its setup, and everything that was done, at the time it was done. */
  private async makeAgain(log: RunLog): Promise<void> {
    this.kettles.set(log.id, null);
    try {
      const nowMs = () => runTimeAt(log.clock, this.clock.nowMs());
      const startedAtMs = log.state.startedAtMs as number;
      const kettle = new RehearsalKettle(log.facts.kettleSetup as KettleSetup, startedAtMs);
      const lastToldMs = (await this.readings.recent(log, this.clock.nowMs())).at(-1)?.atMs ?? startedAtMs - 1;
      const untoldFromMs = Math.max(lastToldMs + 1, nowMs() - RECENT_MS);
      const untold: Reading[] = [];
      const passTime = async (untilMs: number) => {
        while (log.isOpen && kettle.nowMs < untilMs) {
          const readings = kettle.readingsUntil(Math.min(untilMs, kettle.nowMs + CATCH_UP_MS));
          untold.push(...readings.filter(({ atMs }) => atMs >= untoldFromMs));
          await setImmediate();
        }
      };
      for (const { state, learnedAtMs } of actsOf(log.events)) {
        await passTime(learnedAtMs);
        kettle.follow(state, learnedAtMs);
      }
      if (log.projection.probeOutAtMs === null) {
        await passTime(untoldFromMs);
        this.tell(log, untold);
      }
      // What was done while this went on.
      kettle.follow(log.state, nowMs());
      if (log.isOpen) this.kettles.set(log.id, kettle);
    } catch (error) {
      this.complain(log, error);
      // Forgotten, the next tick finds it missing and tries again; not at once, since a database that is away stays so for a moment.
      setTimeout(() => this.kettles.delete(log.id), RETRY_MS).unref();
    }
  }

  private async revisionFor(houseId: string, revisionId: string | undefined): Promise<NamedRevision> {
    if (revisionId === undefined) return this.recipes.getFirstRecipeRevision(houseId);
    const revision = await this.recipes.findRevision(houseId, revisionId);
    if (!revision) throw invalid('/revisionId', 'There is no such revision.');
    return revision;
  }

  private async sourceProbe(houseId: string, probeId: string): Promise<ProbeFacts> {
    const probe = await this.probes.find(houseId, probeId);
    if (!probe || probe.isSimulated) throw invalid('/probeId', 'There is no such probe.');
    if (probe.revokedAtMs !== null) throw invalid('/probeId', 'This probe has been shut out. Make a new token for it.');
    if (this.logs.attachedTo(probeId)) throw invalid('/probeId', 'This probe is in the kettle of another run.');
    return probe;
  }

  /** The smallest kettle of the house that holds the water, and its chiller. */
  private async kitFor(houseId: string, { document }: NamedRevision) {
    const equipment = await this.equipment.list(houseId);
    const bySize = equipment
      .filter((piece): piece is KettleOfHouse => piece.kind === 'kettle')
      .sort((a, b) => a.facts.volumeL - b.facts.volumeL);
    const kettle = bySize.find(({ facts }) => facts.volumeL >= document.waterL) ?? bySize.at(-1) ?? USUAL_KETTLE;
    return { kettle, chiller: equipment.find((piece) => piece.kind === 'chiller') ?? null };
  }

  private complain({ id }: RunLog, error: unknown): void {
    this.logger.error('rehearsal.failed', error instanceof Error ? error.stack : String(error), { runId: id });
  }
}

/** The kettle that does what the sheet says. @throws ProblemError when no such kettle can be simulated. */
function simulatedKettle(kit: Parameters<typeof kettleSetupOf>[0]): KettleSetup {
  const setup = kettleSetupOf(kit);
  setup.pressureKPa = Math.max(LEAST_PRESSURE_KPA, setup.pressureKPa);
  try {
    startKettle(setup);
  } catch (error) {
    if (error instanceof RangeError) throw new ProblemError('not-valid', error.message);
    throw error;
  }
  return setup;
}

function simulatedProbe({ probe }: KettleSetup): Omit<ProbeFacts, 'id'> {
  const { tauS, deadTimeS, resolutionC, samplePeriodS } = probe;
  return { name: 'Simulated kettle', lagS: tauS + deadTimeS, resolutionC, samplePeriodS };
}

function probeLike({ name, lagS, resolutionC, samplePeriodS }: ProbeFacts): Omit<ProbeFacts, 'id'> {
  return { name, lagS, resolutionC, samplePeriodS };
}

function randomSeed(): number {
  return 1 + Math.floor(Math.random() * 2_147_483_646);
}

function invalid(pointer: string, detail: string): ProblemError {
  return new ProblemError('not-valid', detail, { errors: [{ pointer, detail }] });
}
