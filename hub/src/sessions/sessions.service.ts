import { Injectable, Logger } from '@nestjs/common';
import { InjectConnection, InjectModel } from '@nestjs/sequelize';
import { ProblemError } from '@steepfall/shared/problems';
import { Subject, type Observable } from 'rxjs';
import { Op, type Transaction } from 'sequelize';
import { Sequelize } from 'sequelize-typescript';
import { Clock } from '../common/clock.js';
import { acrossHouses, inHouse } from '../common/house-scope/in-house.js';
import { newId } from '../common/ids.js';
import { hashSecret, newSecret } from '../common/secrets.js';
import { inTransaction } from '../database/retry-transaction.js';
import { SessionToken } from './models/session-token.model.js';
import { Session } from './models/session.model.js';

export const REFRESH_LIFETIME_MS = 30 * 24 * 3600 * 1000;
/** Two tabs that wake up together send the same token twice; both get a new one. */
const RACE_GRACE_MS = 10_000;

export interface OpenedSession {
  sessionId: string;
  houseId: string;
  memberId: string;
  refreshToken: string;
  refreshExpiresAtMs: number;
}

type RevokedBecause = NonNullable<Session['revokedBecause']>;

/** Sign-ins that last: refresh tokens that rotate, and the end of a session. */
@Injectable()
export class SessionsService {
  private readonly logger = new Logger(SessionsService.name);
  private readonly endings = new Subject<{ sessionId: string; memberId: string }>();
  /** Sessions that have ended: sockets that belong to them must be cut. */
  readonly ended$: Observable<{ sessionId: string; memberId: string }> = this.endings.asObservable();

  constructor(
    @InjectModel(Session) private readonly sessions: typeof Session,
    @InjectModel(SessionToken) private readonly tokens: typeof SessionToken,
    @InjectConnection() private readonly sequelize: Sequelize,
    private readonly clock: Clock,
  ) {}

  async open(member: { houseId: string; memberId: string }, userAgent: string): Promise<OpenedSession> {
    return inTransaction(this.sequelize, async (transaction) => {
      const session = await inHouse(this.sessions, member.houseId).create(
        {
          id: newId(),
          memberId: member.memberId,
          userAgent: userAgent.slice(0, 200),
          createdAtMs: this.clock.nowMs(),
        },
        { transaction },
      );
      return this.issue(session, null, transaction);
    });
  }

  /**
   * Takes a refresh token and gives the next one. A token that was rotated before is taken again in two cases: within seconds (two tabs),
   * and later when none of its successors was ever used, since then the answer was lost on the way; those successors become void. In
   * any other case somebody holds a copy, and the whole session ends.
   */
  async rotate(refreshToken: string): Promise<OpenedSession> {
    const nowMs = this.clock.nowMs();
    const result = await inTransaction(this.sequelize, async (transaction) => {
      const token = await this.tokens.findByPk(hashSecret(refreshToken), {
        transaction,
        lock: transaction.LOCK.UPDATE,
      });
      if (!token || token.expiresAtMs <= nowMs) return null;
      const session = await acrossHouses(this.sessions).findByPk(token.sessionId, {
        transaction,
        lock: transaction.LOCK.UPDATE,
      });
      if (!session || session.revokedAtMs !== null) return null;
      if (token.voidedAtMs !== null || !(await this.mayRotate(token, nowMs, transaction))) {
        await this.markRevoked(session, 'token-reused', transaction);
        return { reusedSession: session };
      }
      await this.tokens.destroy({
        where: { sessionId: session.id, expiresAtMs: { [Op.lte]: nowMs } },
        transaction,
      });
      if (token.rotatedAtMs === null) await token.update({ rotatedAtMs: nowMs }, { transaction });
      return { opened: await this.issue(session, token.tokenHash, transaction) };
    });
    if (result?.opened) return result.opened;
    if (result?.reusedSession) {
      const { id, memberId } = result.reusedSession;
      this.logger.warn('session.token-reused', { sessionId: id, memberId });
      this.endings.next({ sessionId: id, memberId });
    }
    throw new ProblemError('session-expired', 'Sign in again.');
  }

  /** Of these sessions, the ones that go on. */
  async openAmong(sessionIds: string[]): Promise<Set<string>> {
    const rows = await acrossHouses(this.sessions).findAll({
      where: { id: sessionIds, revokedAtMs: null },
      attributes: ['id'],
    });
    return new Set(rows.map(({ id }) => id));
  }

  /** Ends the session of this refresh token; an unknown token is no error. */
  /** Ids of the sessions of every house that have ended since then. */
  async endedSince(sinceMs: number): Promise<string[]> {
    const ended = await acrossHouses(this.sessions).findAll({ where: { revokedAtMs: { [Op.gte]: sinceMs } } });
    return ended.map(({ id }) => id);
  }

  async closeByToken(refreshToken: string): Promise<void> {
    const token = await this.tokens.findByPk(hashSecret(refreshToken));
    const session = token && (await acrossHouses(this.sessions).findByPk(token.sessionId));
    if (!session || session.revokedAtMs !== null) return;
    await this.markRevoked(session, 'signed-out');
    this.endings.next({ sessionId: session.id, memberId: session.memberId });
  }

  /** Ends every session of a member, inside the caller's transaction; sockets are cut once it is committed. */
  async closeAllOfMember(houseId: string, memberId: string, transaction: Transaction): Promise<void> {
    const open = await inHouse(this.sessions, houseId).findAll({ memberId, revokedAtMs: null }, { transaction });
    for (const session of open) await this.markRevoked(session, 'member-changed', transaction);
    transaction.afterCommit(() => {
      for (const session of open) this.endings.next({ sessionId: session.id, memberId });
    });
  }

  private async mayRotate(token: SessionToken, nowMs: number, transaction: Transaction): Promise<boolean> {
    if (token.rotatedAtMs === null || nowMs - token.rotatedAtMs <= RACE_GRACE_MS) return true;
    const successors = await this.tokens.findAll({ where: { parentHash: token.tokenHash }, transaction });
    if (successors.some(({ rotatedAtMs }) => rotatedAtMs !== null)) return false;
    await this.tokens.update(
      { voidedAtMs: nowMs },
      { where: { parentHash: token.tokenHash, voidedAtMs: null }, transaction },
    );
    return true;
  }

  private async issue(session: Session, parentHash: string | null, transaction: Transaction): Promise<OpenedSession> {
    const refreshToken = newSecret();
    const issuedAtMs = this.clock.nowMs();
    const expiresAtMs = issuedAtMs + REFRESH_LIFETIME_MS;
    await this.tokens.create(
      { tokenHash: hashSecret(refreshToken), sessionId: session.id, parentHash, issuedAtMs, expiresAtMs },
      { transaction },
    );
    return {
      sessionId: session.id,
      houseId: session.houseId,
      memberId: session.memberId,
      refreshToken,
      refreshExpiresAtMs: expiresAtMs,
    };
  }

  private async markRevoked(session: Session, because: RevokedBecause, transaction?: Transaction): Promise<void> {
    await session.update({ revokedAtMs: this.clock.nowMs(), revokedBecause: because }, { transaction });
  }
}
