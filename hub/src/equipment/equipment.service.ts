import { Injectable } from '@nestjs/common';
import { InjectConnection, InjectModel } from '@nestjs/sequelize';
import type { CreateEquipment, Equipment as EquipmentAnswer, UpdateEquipment } from '@steepfall/shared/contracts';
import { ProblemError } from '@steepfall/shared/problems';
import { Op } from 'sequelize';
import { Sequelize } from 'sequelize-typescript';
import { AuditService } from '../audit/audit.service.js';
import type { Actor } from '../common/access/actor.js';
import { Clock } from '../common/clock.js';
import { inHouse } from '../common/house-scope/in-house.js';
import { newId } from '../common/ids.js';
import { inTransaction } from '../database/retry-transaction.js';
import { Equipment } from './models/equipment.model.js';

export function presentEquipment({ id, kind, name, facts, version }: Equipment): EquipmentAnswer {
  // Kind and facts were checked together when the row was written.
  return { id, kind, name, facts, version } as EquipmentAnswer;
}

@Injectable()
export class EquipmentService {
  constructor(
    @InjectModel(Equipment) private readonly equipment: typeof Equipment,
    @InjectConnection() private readonly sequelize: Sequelize,
    private readonly audit: AuditService,
    private readonly clock: Clock,
  ) {}

  /** What can be brewed on today, or what was removed and can come back. */
  async list(houseId: string, { isRemoved } = { isRemoved: false }): Promise<EquipmentAnswer[]> {
    const rows = await this.rows(houseId).findAll(
      { removedAtMs: isRemoved ? { [Op.not]: null } : null },
      {
        order: [
          ['kind', 'ASC'],
          ['name', 'ASC'],
        ],
      },
    );
    return rows.map(presentEquipment);
  }

  /** Also finds what was removed since: a batch of the past was brewed on it. */
  async findMany(houseId: string, ids: string[]): Promise<Map<string, EquipmentAnswer & { isRemoved: boolean }>> {
    const rows = await this.rows(houseId).findAll({ id: ids });
    return new Map(
      rows.map((row) => [row.id, { ...presentEquipment(row), isRemoved: row.removedAtMs !== null }] as const),
    );
  }

  async create(actor: Actor, values: CreateEquipment): Promise<EquipmentAnswer> {
    return inTransaction(this.sequelize, async (transaction) => {
      const row = await this.rows(actor.houseId).create(
        { id: newId(), ...values, createdAtMs: this.clock.nowMs() },
        { transaction },
      );
      await this.audit.record({ ...subjectOf(actor, row.id), action: 'equipment.added', facts: values }, transaction);
      return presentEquipment(row);
    });
  }

  async update(actor: Actor, id: string, { version, ...values }: UpdateEquipment): Promise<EquipmentAnswer> {
    return inTransaction(this.sequelize, async (transaction) => {
      const row = await this.getUsable(actor.houseId, id, transaction);
      if (row.kind !== values.kind)
        throw new ProblemError('not-valid', 'One field does not fit.', {
          errors: [{ pointer: '/kind', detail: `It is a ${row.kind} and stays one.` }],
        });
      if (row.version !== version) throw new ProblemError('changed-meanwhile', 'Load it again, then change it.');
      await row.update({ name: values.name, facts: values.facts, version: version + 1 }, { transaction });
      await this.audit.record({ ...subjectOf(actor, id), action: 'equipment.changed', facts: values }, transaction);
      return presentEquipment(row);
    });
  }

  async remove(actor: Actor, id: string): Promise<void> {
    await inTransaction(this.sequelize, async (transaction) => {
      const row = await this.getUsable(actor.houseId, id, transaction);
      await row.update({ removedAtMs: this.clock.nowMs() }, { transaction });
      await this.audit.record({ ...subjectOf(actor, id), action: 'equipment.removed' }, transaction);
    });
  }

  /** Brings back what was removed; what is there already stays as it is. */
  async restore(actor: Actor, id: string): Promise<EquipmentAnswer> {
    return inTransaction(this.sequelize, async (transaction) => {
      const row = await this.rows(actor.houseId).get(id, 'equipment', { transaction, lock: transaction.LOCK.UPDATE });
      if (row.removedAtMs !== null) {
        await row.update({ removedAtMs: null }, { transaction });
        await this.audit.record({ ...subjectOf(actor, id), action: 'equipment.restored' }, transaction);
      }
      return presentEquipment(row);
    });
  }

  private rows(houseId: string) {
    return inHouse(this.equipment, houseId);
  }

  private async getUsable(houseId: string, id: string, transaction: Parameters<AuditService['record']>[1]) {
    const row = await this.rows(houseId).findOne({ id, removedAtMs: null }, { transaction, lock: true });
    if (!row) throw new ProblemError('not-found', 'There is no such equipment.');
    return row;
  }
}

const subjectOf = ({ houseId, memberId }: Actor, subject: string) => ({ houseId, memberId, subject });
