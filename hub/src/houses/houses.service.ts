import { Injectable } from '@nestjs/common';
import { InjectConnection, InjectModel } from '@nestjs/sequelize';
import type { House as HouseAnswer, UpdateHouse } from '@steepfall/shared/contracts';
import { ProblemError } from '@steepfall/shared/problems';
import type { Transaction } from 'sequelize';
import { Sequelize } from 'sequelize-typescript';
import { AuditService } from '../audit/audit.service.js';
import type { Actor } from '../common/access/actor.js';
import { inTransaction } from '../database/retry-transaction.js';
import { House } from './models/house.model.js';

export function presentHouse({ id, name, altitudeM, currency, version }: House): HouseAnswer {
  return { id, name, altitudeM, currency, version };
}

@Injectable()
export class HousesService {
  constructor(
    @InjectModel(House) private readonly houses: typeof House,
    @InjectConnection() private readonly sequelize: Sequelize,
    private readonly audit: AuditService,
  ) {}

  async get(houseId: string): Promise<House> {
    const house = await this.houses.findByPk(houseId);
    if (!house) throw new ProblemError('not-found', 'There is no such house.');
    return house;
  }

  /** Holds the row until the transaction ends: whoever counts something per house waits here in line. */
  async lock(houseId: string, transaction: Transaction): Promise<void> {
    await this.houses.findByPk(houseId, { attributes: ['id'], transaction, lock: transaction.LOCK.UPDATE });
  }

  async update(actor: Actor, { version, ...values }: UpdateHouse): Promise<House> {
    await inTransaction(this.sequelize, async (transaction) => {
      const [changed] = await this.houses.update(
        { ...values, version: version + 1 },
        { where: { id: actor.houseId, version }, transaction },
      );
      if (changed === 0) throw new ProblemError('changed-meanwhile', 'Load the house again, then change it.');
      await this.audit.record(
        {
          houseId: actor.houseId,
          memberId: actor.memberId,
          action: 'house.changed',
          subject: actor.houseId,
          facts: values,
        },
        transaction,
      );
    });
    return this.get(actor.houseId);
  }
}
