import { Injectable } from '@nestjs/common';
import { InjectConnection, InjectModel } from '@nestjs/sequelize';
import type { FollowLink as FollowLinkAnswer, NewFollowLink } from '@steepfall/shared/contracts';
import { ProblemError } from '@steepfall/shared/problems';
import { Op } from 'sequelize';
import { Sequelize } from 'sequelize-typescript';
import { AuditService } from '../audit/audit.service.js';
import type { Actor, FollowerActor } from '../common/access/actor.js';
import { FollowerAuthenticator } from '../common/access/follower-authenticator.js';
import { Clock } from '../common/clock.js';
import { acrossHouses, inHouse } from '../common/house-scope/in-house.js';
import { newId } from '../common/ids.js';
import { hashSecret, newSecret } from '../common/secrets.js';
import { inTransaction } from '../database/retry-transaction.js';
import { MembersService } from '../members/members.service.js';
import { RunLogService } from '../runs/run-log.service.js';
import type { RunLog } from '../runs/run-log.js';
import { LONGEST_MS, openUntilMs } from './link-lifetime.js';
import { FollowLink } from './models/follow-link.model.js';
import { PushSubscriber } from './models/push-subscriber.model.js';

/** Links of the day before yesterday are of no use to anybody, not even to say that they are over. */
const KEPT_MS = 24 * 3_600_000;
const MOST_LINKS = 20;

/** Links that open one run to a phone: who makes them, and what they open. */
@Injectable()
export class FollowLinksService extends FollowerAuthenticator {
  constructor(
    @InjectModel(FollowLink) private readonly links: typeof FollowLink,
    @InjectModel(PushSubscriber) private readonly subscribers: typeof PushSubscriber,
    @InjectConnection() private readonly sequelize: Sequelize,
    private readonly logs: RunLogService,
    private readonly members: MembersService,
    private readonly audit: AuditService,
    private readonly clock: Clock,
  ) {
    super();
  }

  /** The token is told this once; the database keeps what it takes to know it again. */
  async make(actor: Actor, runId: string): Promise<NewFollowLink> {
    const { houseId, memberId } = actor;
    const log = await this.logs.get(houseId, runId);
    if (!log.isOpen) throw new ProblemError('run-already-ended', 'There is nothing to follow any more.');
    const nowMs = this.clock.nowMs();
    if ((await this.openLinks(log, nowMs)).length >= MOST_LINKS)
      throw new ProblemError('already-exists', `This run has ${MOST_LINKS} links. Take one back first.`);
    const followToken = newSecret();
    const row = await inTransaction(this.sequelize, async (transaction) => {
      await inHouse(this.links, houseId).destroy({ expiresAtMs: { [Op.lt]: nowMs - KEPT_MS } }, { transaction });
      const created = await inHouse(this.links, houseId).create(
        {
          id: newId(),
          runId,
          tokenHash: hashSecret(followToken),
          createdAtMs: nowMs,
          createdBy: memberId,
          expiresAtMs: nowMs + LONGEST_MS,
          revokedAtMs: null,
        },
        { transaction },
      );
      await this.record(actor, 'follow-link.made', created, transaction);
      return created;
    });
    const [link] = await this.present(log, [row]);
    return { link: link!, followToken };
  }

  /** Those that open the run now, the newest first. */
  async list(houseId: string, runId: string): Promise<FollowLinkAnswer[]> {
    const log = await this.logs.get(houseId, runId);
    return this.present(log, await this.openLinks(log, this.clock.nowMs()));
  }

  /** It opens nothing from now on, and its phones hear no more. Twice is once. */
  async revoke(actor: Actor, runId: string, linkId: string): Promise<void> {
    await inTransaction(this.sequelize, async (transaction) => {
      const link = await inHouse(this.links, actor.houseId).findOne({ id: linkId, runId }, { transaction });
      if (!link) throw new ProblemError('not-found', 'There is no such link.');
      await inHouse(this.subscribers, actor.houseId).destroy({ linkId }, { transaction });
      if (link.revokedAtMs !== null) return;
      await link.update({ revokedAtMs: this.clock.nowMs() }, { transaction });
      await this.record(actor, 'follow-link.revoked', link, transaction);
    });
  }

  async authenticate(followToken: string): Promise<FollowerActor | null> {
    const link = await acrossHouses(this.links).findOne({ where: { tokenHash: hashSecret(followToken) } });
    if (!link) return null;
    if (link.revokedAtMs !== null)
      throw new ProblemError('follow-link-over', 'The house took it back. Ask there for a new one.');
    const log = await this.logs.get(link.houseId, link.runId);
    if (this.clock.nowMs() >= openUntilMs(link, log.state))
      throw new ProblemError('follow-link-over', 'A link opens its run for a day, and for an hour after its end.');
    return { linkId: link.id, houseId: link.houseId, runId: link.runId };
  }

  /** The link a follower came in by. */
  async get({ houseId, linkId }: FollowerActor): Promise<FollowLink> {
    return inHouse(this.links, houseId).get(linkId, 'link');
  }

  /** Those that open this run at this instant. */
  async openLinks(log: RunLog, nowMs: number): Promise<FollowLink[]> {
    const rows = await inHouse(this.links, log.facts.houseId).findAll(
      { runId: log.id, revokedAtMs: null },
      { order: [['createdAtMs', 'DESC']] },
    );
    return rows.filter((link) => nowMs < openUntilMs(link, log.state));
  }

  private async present(log: RunLog, rows: FollowLink[]): Promise<FollowLinkAnswer[]> {
    const { houseId } = log.facts;
    const names = await this.members.displayNames(houseId);
    const phones = await inHouse(this.subscribers, houseId).findAll(
      { linkId: rows.map(({ id }) => id) },
      { attributes: ['linkId'] },
    );
    return rows.map((link) => ({
      id: link.id,
      createdAtMs: link.createdAtMs,
      createdBy: names.get(link.createdBy) ?? '',
      expiresAtMs: openUntilMs(link, log.state),
      phoneCount: phones.filter(({ linkId }) => linkId === link.id).length,
    }));
  }

  private record(
    { houseId, memberId }: Actor,
    action: string,
    { id, runId }: FollowLink,
    transaction: Parameters<AuditService['record']>[1],
  ): Promise<void> {
    return this.audit.record({ houseId, memberId, action, subject: id, facts: { runId } }, transaction);
  }
}
