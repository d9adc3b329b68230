import { Injectable } from '@nestjs/common';
import { InjectConnection, InjectModel } from '@nestjs/sequelize';
import type { CreateMember, Member, Role, UpdateMember } from '@steepfall/shared/contracts';
import { ProblemError } from '@steepfall/shared/problems';
import { metricPreferences, type UnitPreferences } from '@steepfall/shared/units';
import { Sequelize } from 'sequelize-typescript';
import { AuditService } from '../audit/audit.service.js';
import type { Actor } from '../common/access/actor.js';
import { Clock } from '../common/clock.js';
import { acrossHouses, inHouse } from '../common/house-scope/in-house.js';
import { newId } from '../common/ids.js';
import { hashPassword } from '../common/passwords.js';
import { inTransaction } from '../database/retry-transaction.js';
import { SessionsService } from '../sessions/sessions.service.js';
import { Membership } from './models/membership.model.js';
import { User } from './models/user.model.js';

/** A membership that was loaded together with its user. */
type LoadedMembership = Membership & { user: User };

export function presentMember({ id, displayName, role, isActive, units, reachS, user }: LoadedMembership): Member {
  const own = { units: units ?? metricPreferences, reachS: reachS ?? null };
  return { id, displayName, email: user.email, role, isActive, ...own };
}

@Injectable()
export class MembersService {
  constructor(
    @InjectModel(Membership) private readonly memberships: typeof Membership,
    @InjectModel(User) private readonly users: typeof User,
    @InjectConnection() private readonly sequelize: Sequelize,
    private readonly sessions: SessionsService,
    private readonly audit: AuditService,
    private readonly clock: Clock,
  ) {}

  async list(houseId: string): Promise<LoadedMembership[]> {
    const rows = await inHouse(this.memberships, houseId).findAll(
      {},
      { include: [User], order: [['displayName', 'ASC']] },
    );
    return rows as LoadedMembership[];
  }

  async get(houseId: string, memberId: string): Promise<LoadedMembership> {
    return (await inHouse(this.memberships, houseId).get(memberId, 'member', { include: [User] })) as LoadedMembership;
  }

  /** How the members of a house are called, by id. */
  async displayNames(houseId: string): Promise<Map<string, string>> {
    const rows = await inHouse(this.memberships, houseId).findAll();
    return new Map(rows.map((row) => [row.id, row.displayName]));
  }

  /** Ids of everybody who is or was a member of the house. */
  async everIn(houseId: string): Promise<ReadonlySet<string>> {
    const rows = await inHouse(this.memberships, houseId).findAll({}, { attributes: ['id'] });
    return new Set(rows.map(({ id }) => id));
  }

  /** The roles of those of these members who are active in their house. */
  async rolesOf(memberIds: string[]): Promise<Map<string, Role>> {
    const rows = await acrossHouses(this.memberships).findAll({
      where: { id: memberIds, isActive: true },
      attributes: ['id', 'role'],
    });
    return new Map(rows.map(({ id, role }) => [id, role]));
  }

  /** The account of an address with its active memberships, the oldest first: for signing in. */
  async findAccount(email: string): Promise<{ user: User; memberships: LoadedMembership[] } | null> {
    const user = await this.users.findOne({ where: { email: email.toLowerCase() } });
    if (!user) return null;
    const memberships = await acrossHouses(this.memberships).findAll({
      where: { userId: user.id, isActive: true },
      include: [User],
      order: [
        ['createdAtMs', 'ASC'],
        ['id', 'ASC'],
      ],
    });
    return { user, memberships: memberships as LoadedMembership[] };
  }

  async create(actor: Actor, { email, password, displayName, role }: CreateMember): Promise<LoadedMembership> {
    const passwordHash = await hashPassword(password);
    const createdAtMs = this.clock.nowMs();
    const membership = await inTransaction(this.sequelize, async (transaction) => {
      const address = email.toLowerCase();
      // Also when the account belongs to another house: nobody may set a password for an account that exists.
      if (await this.users.findOne({ where: { email: address }, transaction, lock: transaction.LOCK.UPDATE }))
        throw new ProblemError('already-exists', 'This e-mail address has an account already.');
      const user = await this.users.create({ id: newId(), email: address, passwordHash, createdAtMs }, { transaction });
      const created = await inHouse(this.memberships, actor.houseId).create(
        { id: newId(), userId: user.id, displayName, role, createdAtMs },
        { transaction },
      );
      await this.record(actor, 'member.added', created.id, { role }, transaction);
      return created;
    });
    return this.get(actor.houseId, membership.id);
  }

  /** A new role counts from the member's next refresh; taking a member out ends their sessions at once. */
  async update(actor: Actor, memberId: string, changes: UpdateMember): Promise<LoadedMembership> {
    await inTransaction(this.sequelize, async (transaction) => {
      const rows = inHouse(this.memberships, actor.houseId);
      // Every owner row is locked, so that two owners cannot step down past each other.
      const owners = await rows.findAll(
        { role: 'owner', isActive: true },
        { transaction, lock: transaction.LOCK.UPDATE },
      );
      const member = await rows.get(memberId, 'member', { transaction, lock: transaction.LOCK.UPDATE });
      const staysOwner = (changes.role ?? member.role) === 'owner' && (changes.isActive ?? member.isActive);
      if (!staysOwner && owners.length === 1 && owners[0]?.id === memberId)
        throw new ProblemError('last-owner', 'Make somebody else an owner first.');
      const losesTokens = changes.isActive === false || (changes.role ?? member.role) !== member.role;
      await member.update(changes, { transaction });
      // An access token carries the role: with the old one in hand a brewer who became a taster could still act.
      if (losesTokens) await this.sessions.closeAllOfMember(actor.houseId, memberId, transaction);
      await this.record(actor, 'member.changed', memberId, changes, transaction);
    });
    return this.get(actor.houseId, memberId);
  }

  /** What one person reads and types: their own affair, so nobody else's right and nothing for the audit log. */
  async setUnits({ houseId, memberId }: Actor, units: UnitPreferences): Promise<LoadedMembership> {
    await inHouse(this.memberships, houseId).update({ id: memberId }, { units });
    return this.get(houseId, memberId);
  }

  /** How long this person takes from `now` to the act: from the next run they start, their calls come that much before. */
  async setReach({ houseId, memberId }: Actor, reachS: number | null): Promise<LoadedMembership> {
    await inHouse(this.memberships, houseId).update({ id: memberId }, { reachS });
    return this.get(houseId, memberId);
  }

  private record(
    { houseId, memberId }: Actor,
    action: string,
    subject: string,
    facts: Record<string, unknown>,
    transaction: Parameters<AuditService['record']>[1],
  ): Promise<void> {
    return this.audit.record({ houseId, memberId, action, subject, facts }, transaction);
  }
}
