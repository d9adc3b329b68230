import { Injectable } from '@nestjs/common';
import { InjectConnection, InjectModel } from '@nestjs/sequelize';
import type { Ingredient as IngredientAnswer } from '@steepfall/shared/contracts';
import { ProblemError } from '@steepfall/shared/problems';
import { Sequelize } from 'sequelize-typescript';
import { AttachmentsService } from '../attachments/attachments.service.js';
import type { Picture } from '../attachments/picture.js';
import { AuditService } from '../audit/audit.service.js';
import type { Actor } from '../common/access/actor.js';
import { inHouse } from '../common/house-scope/in-house.js';
import { inTransaction } from '../database/retry-transaction.js';
import { Lot } from './models/lot.model.js';
import { ShelfService } from './shelf.service.js';

/** The label of a lot, as it was photographed. */
@Injectable()
export class LotPhotosService {
  constructor(
    @InjectModel(Lot) private readonly lots: typeof Lot,
    @InjectConnection() private readonly sequelize: Sequelize,
    private readonly attachments: AttachmentsService,
    private readonly shelf: ShelfService,
    private readonly audit: AuditService,
  ) {}

  async get(houseId: string, lotId: string): Promise<{ mediaType: string; bytes: Buffer }> {
    const { photoId } = await inHouse(this.lots, houseId).get(lotId, 'lot');
    if (photoId === null) throw noPhoto();
    return this.attachments.get(houseId, photoId);
  }

  async set(actor: Actor, lotId: string, sent: Buffer): Promise<IngredientAnswer> {
    await inHouse(this.lots, actor.houseId).get(lotId, 'lot');
    return this.replace(actor, lotId, await this.attachments.readPicture(sent, '/photo'));
  }

  async remove(actor: Actor, lotId: string): Promise<IngredientAnswer> {
    const { photoId } = await inHouse(this.lots, actor.houseId).get(lotId, 'lot');
    if (photoId === null) throw noPhoto();
    return this.replace(actor, lotId, null);
  }

  private async replace(actor: Actor, lotId: string, picture: Picture | null): Promise<IngredientAnswer> {
    const { houseId, memberId } = actor;
    const ingredientId = await inTransaction(this.sequelize, async (transaction) => {
      const lot = await inHouse(this.lots, houseId).get(lotId, 'lot', { transaction, lock: true });
      const before = lot.photoId;
      const photoId = picture && (await this.attachments.add(actor, picture, transaction));
      await lot.update({ photoId }, { transaction });
      if (before !== null) await this.attachments.remove(houseId, before, transaction);
      const action = picture ? 'lot.photographed' : 'lot.photo-removed';
      await this.audit.record({ houseId, memberId, action, subject: lotId }, transaction);
      return lot.ingredientId;
    });
    return this.shelf.get(houseId, ingredientId);
  }
}

const noPhoto = () => new ProblemError('not-found', 'This lot has no photo.');
