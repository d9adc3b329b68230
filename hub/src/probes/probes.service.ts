import { isDeepStrictEqual } from 'node:util';
import { Injectable, type OnApplicationBootstrap } from '@nestjs/common';
import { InjectConnection, InjectModel } from '@nestjs/sequelize';
import type {
  CreateProbe,
  Probe as ProbeAnswer,
  ProbeCalibration,
  ProbeWithToken,
  UpdateProbe,
} from '@steepfall/shared/contracts';
import type { ProbeCorrection } from '@steepfall/shared/figures';
import { ProblemError } from '@steepfall/shared/problems';
import { calibrationOf, calibrationRefusalWords } from '@steepfall/shared/readings';
import { Subject, type Observable } from 'rxjs';
import { Op, QueryTypes, type Transaction } from 'sequelize';
import { Sequelize } from 'sequelize-typescript';
import { AuditService } from '../audit/audit.service.js';
import type { Actor, DeviceActor } from '../common/access/actor.js';
import { DeviceAuthenticator } from '../common/access/device-authenticator.js';
import { Clock } from '../common/clock.js';
import { acrossHouses, inHouse } from '../common/house-scope/in-house.js';
import { newId } from '../common/ids.js';
import { hashSecret } from '../common/secrets.js';
import { inTransaction } from '../database/retry-transaction.js';
import { newDeviceToken } from './device-token.js';
import { Probe } from './models/probe.model.js';

/** What the watch must know of a probe. */
export interface ProbeFacts {
  id: string;
  name: string;
  lagS: number;
  resolutionC: number;
  samplePeriodS: number;
  lagErrorRatio?: number | null;
}

@Injectable()
export class ProbesService extends DeviceAuthenticator implements OnApplicationBootstrap {
  /** Of the probes that were calibrated, by id: each reading asks, and must not wait for the database. */
  private readonly corrections = new Map<string, ProbeCorrection>();
  private readonly endings = new Subject<string>();
  /** Ids of probes whose token no longer holds: sockets that came in with it must be cut. */
  readonly tokenEnded$: Observable<string> = this.endings.asObservable();

  constructor(
    @InjectModel(Probe) private readonly probes: typeof Probe,
    @InjectConnection() private readonly sequelize: Sequelize,
    private readonly audit: AuditService,
    private readonly clock: Clock,
  ) {
    super();
  }

  async onApplicationBootstrap(): Promise<void> {
    const rows = await acrossHouses(this.probes).findAll({
      where: { calibratedAtMs: { [Op.not]: null } },
      attributes: ['id', 'calibration'],
    });
    for (const { id, calibration } of rows) this.noteCorrection(id, calibration);
  }

  /** The probes that somebody owns; each rehearsal brings a simulated one of its own, and those are nobody's to manage. */
  async list(houseId: string): Promise<ProbeAnswer[]> {
    const rows = await inHouse(this.probes, houseId).findAll({ isSimulated: false }, { order: [['name', 'ASC']] });
    const lastReadings = await this.lastReadings(rows.map(({ id }) => id));
    return rows.map((row) => presentProbe(row, lastReadings.get(row.id) ?? null));
  }

  async find(houseId: string, id: string): Promise<Probe | null> {
    return inHouse(this.probes, houseId).find(id);
  }

  async create(actor: Actor, values: CreateProbe): Promise<ProbeWithToken> {
    const id = newId();
    const deviceToken = newDeviceToken(id);
    const row = await inTransaction(this.sequelize, async (transaction) => {
      const created = await inHouse(this.probes, actor.houseId).create(
        { id, ...values, tokenHash: hashSecret(deviceToken), createdAtMs: this.clock.nowMs(), revokedAtMs: null },
        { transaction },
      );
      await this.record(actor, 'probe.added', id, transaction, values);
      return created;
    });
    return { probe: presentProbe(row, null), deviceToken };
  }

  /** What is known of a probe. A new calibration counts for the readings that come from now on; those before stay as they were kept. */
  async update(actor: Actor, id: string, { version, ...values }: UpdateProbe): Promise<ProbeAnswer> {
    refuseBadPair(values.calibration);
    const row = await inTransaction(this.sequelize, async (transaction) => {
      const probe = await this.getOwned(actor.houseId, id, transaction);
      if (probe.version !== version) throw new ProblemError('changed-meanwhile', 'Load it again, then change it.');
      const isCalibratedAnew = !isDeepStrictEqual(probe.calibration, values.calibration);
      const calibratedAtMs = values.calibration === null ? null : this.clock.nowMs();
      // A lag that somebody typed is told again, and not learned.
      const kept = values.lagS === probe.lagS ? probe.lagErrorRatio : null;
      const lagErrorRatio = values.lagErrorRatio === undefined ? kept : values.lagErrorRatio;
      await probe.update(
        { ...values, lagErrorRatio, ...(isCalibratedAnew ? { calibratedAtMs } : {}), version: version + 1 },
        { transaction },
      );
      await this.record(actor, 'probe.changed', id, transaction, values);
      return probe;
    });
    this.noteCorrection(id, row.calibration);
    const lastReadings = await this.lastReadings([id]);
    return presentProbe(row, lastReadings.get(id) ?? null);
  }

  /** What the readings of this probe are corrected by; `null`: they are believed as they are. */
  correctionOf(id: string): ProbeCorrection | null {
    return this.corrections.get(id) ?? null;
  }

  /** A new token for a probe, also for one that was shut out; the old token is worth nothing from now on. */
  async rotateToken(actor: Actor, id: string): Promise<ProbeWithToken> {
    const deviceToken = newDeviceToken(id);
    const row = await inTransaction(this.sequelize, async (transaction) => {
      const probe = await this.getOwned(actor.houseId, id, transaction);
      await probe.update({ tokenHash: hashSecret(deviceToken), revokedAtMs: null }, { transaction });
      await this.record(actor, 'probe.token-rotated', id, transaction);
      return probe;
    });
    this.endings.next(id);
    const lastReadings = await this.lastReadings([id]);
    return { probe: presentProbe(row, lastReadings.get(id) ?? null), deviceToken };
  }

  async revokeToken(actor: Actor, id: string): Promise<void> {
    await inTransaction(this.sequelize, async (transaction) => {
      const probe = await this.getOwned(actor.houseId, id, transaction);
      await probe.update({ tokenHash: null, revokedAtMs: this.clock.nowMs() }, { transaction });
      await this.record(actor, 'probe.revoked', id, transaction);
    });
    this.endings.next(id);
  }

  override async authenticate(deviceToken: string): Promise<DeviceActor | null> {
    const probe = await acrossHouses(this.probes).findOne({ where: { tokenHash: hashSecret(deviceToken) } });
    return probe && { probeId: probe.id, houseId: probe.houseId };
  }

  /** Of these probes, the ones whose token still holds. */
  async stillTrusted(probeIds: string[]): Promise<Set<string>> {
    const rows = await acrossHouses(this.probes).findAll({ where: { id: probeIds }, attributes: ['id', 'tokenHash'] });
    return new Set(rows.filter(({ tokenHash }) => tokenHash !== null).map(({ id }) => id));
  }

  /** The probe of one rehearsal: readings on a fast clock must never lie among those of a real one. */
  createSimulated(
    houseId: string,
    facts: Omit<ProbeFacts, 'id'>,
    transaction: Transaction | undefined,
  ): Promise<Probe> {
    return inHouse(this.probes, houseId).create(
      { id: newId(), ...facts, isSimulated: true, createdAtMs: this.clock.nowMs() },
      { transaction },
    );
  }

  private noteCorrection(id: string, calibration: ProbeCalibration | null): void {
    const verdict = calibration && calibrationOf(calibration);
    if (verdict?.kind === 'accepted') this.corrections.set(id, verdict.correction);
    else this.corrections.delete(id);
  }

  private async getOwned(houseId: string, id: string, transaction: Transaction): Promise<Probe> {
    const probe = await inHouse(this.probes, houseId).get(id, 'probe', { transaction, lock: transaction.LOCK.UPDATE });
    if (probe.isSimulated) throw new ProblemError('not-found', 'A simulated probe is nobody’s to change.');
    return probe;
  }

  private async lastReadings(probeIds: string[]): Promise<Map<string, number>> {
    if (probeIds.length === 0) return new Map();
    const rows = await this.sequelize.query<{ probeId: string; atMs: number }>(
      'SELECT probe_id AS probeId, MAX(at_ms) AS atMs FROM readings WHERE probe_id IN (:probeIds) GROUP BY probe_id',
      { type: QueryTypes.SELECT, replacements: { probeIds } },
    );
    return new Map(rows.map(({ probeId, atMs }) => [probeId, atMs]));
  }

  private record(
    { houseId, memberId }: Actor,
    action: string,
    subject: string,
    transaction: Transaction,
    facts: Record<string, unknown> = {},
  ): Promise<void> {
    return this.audit.record({ houseId, memberId, action, subject, facts }, transaction);
  }
}

function refuseBadPair(calibration: ProbeCalibration | null): void {
  const verdict = calibration && calibrationOf(calibration);
  if (verdict?.kind !== 'refused') return;
  throw new ProblemError('not-valid', 'The probe was not calibrated.', {
    errors: [{ pointer: `/calibration/${verdict.at}/shownC`, detail: calibrationRefusalWords[verdict.reason] }],
  });
}

function presentProbe(row: Probe, lastReadingAtMs: number | null): ProbeAnswer {
  const { id, name, lagS, resolutionC, samplePeriodS, isSimulated } = row;
  return {
    id,
    name,
    lagS,
    resolutionC,
    samplePeriodS,
    isSimulated,
    isRevoked: row.revokedAtMs !== null,
    lastReadingAtMs,
    calibration: row.calibration ?? null,
    calibratedAtMs: row.calibratedAtMs ?? null,
    lagErrorRatio: row.lagErrorRatio ?? null,
    version: row.version,
  };
}
