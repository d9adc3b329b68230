import { Injectable, type OnApplicationBootstrap } from '@nestjs/common';
import { InjectConnection, InjectModel } from '@nestjs/sequelize';
import type { AppendedEvents } from '@steepfall/shared/contracts';
import { problem, ProblemError, type Problem } from '@steepfall/shared/problems';
import { foldRun, type RunEvent, type RunEventOf, type RunState, type StoredRunEvent } from '@steepfall/shared/runs';
import { Subject, type Observable } from 'rxjs';
import { Op, UniqueConstraintError, type CreationAttributes, type Transaction } from 'sequelize';
import { Sequelize } from 'sequelize-typescript';
import { Clock } from '../common/clock.js';
import { acrossHouses, inHouse } from '../common/house-scope/in-house.js';
import { inTransaction } from '../database/retry-transaction.js';
import { MembersService } from '../members/members.service.js';
import { judgeEvent, type SentEvent } from './judge-event.js';
import { RunEventRow } from './models/run-event.model.js';
import { Run } from './models/run.model.js';
import { isNews, projectionOf, type Projection } from './projection.js';
import { isSameFact, RunLog, storedEventOf } from './run-log.js';
import { Turns } from './turns.js';

/** Ended runs that are kept at hand: somebody looks at a batch, or a tablet delivers late. */
const ENDED_AT_HAND = 50;
/** Two runs that write one id at the same instant: the second try sees the first one's row. */
const ID_RACE_TRIES = 3;

export interface Appended {
  log: RunLog;
  /** Newly committed, in the order of `seq`. */
  events: StoredRunEvent[];
  before: RunState;
}

type Refusal = AppendedEvents['refused'][number];

/** Settings of a new run; what lists show of it follows from its first event. */
export type NewRun = Omit<CreationAttributes<Run>, keyof Projection | 'houseId'>;

interface Sorted {
  fresh: RunEvent[];
  known: StoredRunEvent[];
  refused: Refusal[];
}

interface Written {
  /** Committed by this call, or by one whose answer never came. */
  events: StoredRunEvent[];
  /** The state with them; `null` when there are none. */
  state: RunState | null;
  acknowledged: StoredRunEvent[];
  refused: Refusal[];
}

/**
 * The one place where run logs grow. Events get their order under a lock on the run, and are acknowledged and told to others only
 * after commit. Open runs are held in memory, folded; a run that is not at hand is read from the database.
 */
@Injectable()
export class RunLogService implements OnApplicationBootstrap {
  private readonly open = new Map<string, RunLog>();
  /** In the order of their last use. */
  private readonly ended = new Map<string, RunLog>();
  private readonly turns = new Turns();
  private readonly appends = new Subject<Appended>();
  private readonly changes = new Subject<{ runId: string; houseId: string }>();
  /** After commit; for one run in the order of `seq`. */
  readonly appended$: Observable<Appended> = this.appends.asObservable();
  /** Lists of runs look different now. */
  readonly changed$: Observable<{ runId: string; houseId: string }> = this.changes.asObservable();

  constructor(
    @InjectModel(Run) private readonly runs: typeof Run,
    @InjectModel(RunEventRow) private readonly rows: typeof RunEventRow,
    @InjectConnection() private readonly sequelize: Sequelize,
    private readonly members: MembersService,
    private readonly clock: Clock,
  ) {}

  /** Every run that was open when the hub went down goes on. */
  async onApplicationBootstrap(): Promise<void> {
    for (const run of await acrossHouses(this.runs).findAll({ where: { status: 'running' } }))
      this.hold(await this.read(run));
  }

  /** Every open run of every house. */
  get openLogs(): RunLog[] {
    return [...this.open.values()];
  }

  /**
   * The open run that the readings of this probe belong to: the youngest one that still has it in the kettle. A rehearsal keeps the
   * probe to its end, since it has its own clock.
   */
  attachedTo(probeId: string): RunLog | null {
    const holders = this.openLogs.filter(
      ({ facts, projection }) =>
        (facts.sourceProbeId ?? facts.probeId) === probeId && (facts.isRehearsal || projection.probeOutAtMs === null),
    );
    return holders.sort((a, b) => b.facts.createdAtMs - a.facts.createdAtMs)[0] ?? null;
  }

  /** The log of a run of this house; throws `run-not-found`. */
  async get(houseId: string, runId: string): Promise<RunLog> {
    const log =
      this.atHand(runId) ??
      (await this.turns.take(runId, async () => this.atHand(runId) ?? (await this.load(houseId, runId))));
    if (log.facts.houseId !== houseId) throw runNotFound();
    this.hold(log);
    return log;
  }

  /** Writes the row of a new run with its first event, in the caller's transaction; `announce` it after commit. */
  async create(
    houseId: string,
    run: NewRun,
    started: RunEventOf<'run.started'>,
    transaction: Transaction,
  ): Promise<RunLog> {
    const first: StoredRunEvent = { ...started, seq: 1, receivedAtMs: this.clock.nowMs(), sentBy: started.by };
    const row = await inHouse(this.runs, houseId).create(
      { ...run, ...projectionOf(foldRun([first])) },
      { transaction },
    );
    await this.insert([first], transaction);
    return new RunLog(row, [first]);
  }

  /** A new run is committed: it is supervised and shown from now on. */
  announce(log: RunLog): void {
    this.hold(log);
    this.changes.next({ runId: log.id, houseId: log.facts.houseId });
  }

  /**
   * Adds events to a run. Sending again what is known changes nothing and is acknowledged with the `seq` it has; a refused event does
   * not hold up the others. Resolves after commit.
   *
   * @param sentBy the member whose sign-in delivers them; `null` for the hub itself.
   */
  async append(
    houseId: string,
    runId: string,
    sent: readonly SentEvent[],
    sentBy: string | null,
  ): Promise<AppendedEvents> {
    await this.get(houseId, runId);
    const memberIds = await this.members.everIn(houseId);
    return this.turns.take(runId, async () => {
      const log = this.atHand(runId) ?? (await this.load(houseId, runId));
      const nowMs = this.clock.nowMs();
      const { isRehearsal } = log.facts;
      const room = { runId, isRehearsal, clock: log.clock, nowMs, memberIds, isHub: sentBy === null };
      const refused: Refusal[] = [];
      const events = new Map<string, RunEvent>();
      for (const candidate of sent) {
        const verdict = judgeEvent(candidate, room);
        const twin = events.get(candidate.id);
        if ('problem' in verdict) refused.push({ id: candidate.id, problem: verdict.problem });
        else if (twin && !isSameFact(twin, verdict.event)) refused.push({ id: candidate.id, problem: idTaken() });
        else events.set(candidate.id, verdict.event);
      }
      const written = await this.write(log, [...events.values()], sentBy);
      const stored = written.acknowledged
        .sort((a, b) => a.seq - b.seq)
        .map(({ id, seq, receivedAtMs, sentBy: by }) => ({ id, seq, receivedAtMs, sentBy: by }));
      return { stored, refused: [...refused, ...written.refused] };
    });
  }

  private async write(log: RunLog, events: RunEvent[], sentBy: string | null): Promise<Written> {
    // What is at hand is committed: what is known already needs no transaction.
    const quick = sortEvents(events, (id) => log.find(id));
    if (quick.fresh.length === 0) return { events: [], state: null, acknowledged: quick.known, refused: quick.refused };

    const before = log.state;
    const shownBefore = log.projection;
    const written = await this.commit(log, events, sentBy);
    if (!written.state) return written;
    log.add(written.events, written.state);
    this.hold(log);
    this.appends.next({ log, events: written.events, before });
    if (isNews(shownBefore, log.projection)) this.changes.next({ runId: log.id, houseId: log.facts.houseId });
    return written;
  }

  private async commit(log: RunLog, events: RunEvent[], sentBy: string | null): Promise<Written> {
    for (let attempt = 1; ; attempt += 1) {
      try {
        return await inTransaction(this.sequelize, (transaction) => this.insertFresh(log, events, sentBy, transaction));
      } catch (error) {
        if (!(error instanceof UniqueConstraintError) || attempt === ID_RACE_TRIES) throw error;
      }
    }
  }

  private async insertFresh(
    log: RunLog,
    events: RunEvent[],
    sentBy: string | null,
    transaction: Transaction,
  ): Promise<Written> {
    const row = await inHouse(this.runs, log.facts.houseId).find(log.id, {
      transaction,
      lock: transaction.LOCK.UPDATE,
    });
    if (!row) throw runNotFound();
    // Committed and not at hand: the answer to an earlier call was lost, or another hub writes to the same database.
    const missed = row.lastSeq > log.lastSeq ? await this.readEvents(log.id, log.lastSeq, transaction) : [];
    const known = new Map(
      (await this.rows.findAll({ where: { id: events.map(({ id }) => id) }, transaction })).map((found) => [
        found.id,
        storedEventOf(found),
      ]),
    );
    const sorted = sortEvents(events, (id) => known.get(id));
    const { fresh, refused } = await this.withoutReopening(log, missed, sorted, transaction);
    const receivedAtMs = this.clock.nowMs();
    const stored = fresh.map((event, index) => ({ ...event, seq: row.lastSeq + index + 1, receivedAtMs, sentBy }));
    const all = [...missed, ...stored];
    const acknowledged = [...sorted.known, ...stored];
    if (all.length === 0) return { events: [], state: null, acknowledged, refused };
    const state = log.stateWith(all);
    await this.insert(stored, transaction);
    await row.update(projectionOf(state), { transaction });
    return { events: all, state, acknowledged, refused };
  }

  /** A batch has one open run: the end of an older run cannot be taken back once a newer one is on its way. */
  private async withoutReopening(
    log: RunLog,
    missed: StoredRunEvent[],
    { fresh, refused }: Sorted,
    transaction: Transaction,
  ): Promise<Pick<Sorted, 'fresh' | 'refused'>> {
    const { batchId, houseId } = log.facts;
    const reopens =
      batchId !== null &&
      log.stateWith(missed).status === 'ended' &&
      log.stateWith([...missed, ...fresh]).status !== 'ended';
    if (!reopens) return { fresh, refused };
    const others = { batchId, status: 'running' as const, id: { [Op.ne]: log.id } };
    if ((await inHouse(this.runs, houseId).count(others, { transaction })) === 0) return { fresh, refused };
    const isUndo = ({ type }: RunEvent) => type === 'event.undone';
    const taken = problem('batch-already-running', 'Another run of this batch is on its way.');
    return {
      fresh: fresh.filter((event) => !isUndo(event)),
      refused: [...refused, ...fresh.filter(isUndo).map(({ id }) => ({ id, problem: taken }))],
    };
  }

  private async insert(events: StoredRunEvent[], transaction: Transaction): Promise<void> {
    if (events.length > 0) await this.rows.bulkCreate(events, { transaction });
  }

  private async load(houseId: string, runId: string): Promise<RunLog> {
    const row = await inHouse(this.runs, houseId).find(runId);
    if (!row) throw runNotFound();
    const log = await this.read(row);
    this.hold(log);
    return log;
  }

  private async read(row: Run): Promise<RunLog> {
    return new RunLog(row, await this.readEvents(row.id, 0));
  }

  private async readEvents(runId: string, afterSeq: number, transaction?: Transaction): Promise<StoredRunEvent[]> {
    const rows = await this.rows.findAll({
      where: { runId, seq: { [Op.gt]: afterSeq } },
      order: [['seq', 'ASC']],
      transaction,
    });
    return rows.map(storedEventOf);
  }

  private atHand(runId: string): RunLog | undefined {
    return this.open.get(runId) ?? this.ended.get(runId);
  }

  private hold(log: RunLog): void {
    this.open.delete(log.id);
    this.ended.delete(log.id);
    if (log.isOpen) {
      this.open.set(log.id, log);
      return;
    }
    this.ended.set(log.id, log);
    const [oldest] = this.ended.keys();
    if (this.ended.size > ENDED_AT_HAND && oldest) this.ended.delete(oldest);
  }
}

function sortEvents(events: readonly RunEvent[], storedOf: (id: string) => StoredRunEvent | undefined): Sorted {
  const sorted: Sorted = { fresh: [], known: [], refused: [] };
  for (const event of events) {
    const twin = storedOf(event.id);
    if (!twin) sorted.fresh.push(event);
    else if (isSameFact(twin, event)) sorted.known.push(twin);
    else sorted.refused.push({ id: event.id, problem: idTaken() });
  }
  return sorted;
}

function runNotFound(): ProblemError {
  return new ProblemError('run-not-found', 'There is no such run in this house.');
}

function idTaken(): Problem {
  return problem('event-id-taken', 'Another event has this id. Make a new id for it.');
}
