import { Injectable } from '@nestjs/common';
import { InjectModel } from '@nestjs/sequelize';
import type { Transaction } from 'sequelize';
import type { Actor } from '../common/access/actor.js';
import { Clock } from '../common/clock.js';
import { inHouse } from '../common/house-scope/in-house.js';
import { newId } from '../common/ids.js';
import { Attachment } from './models/attachment.model.js';
import { readPicture, type Picture } from './picture.js';

/** Pictures beside the rows of other features. */
@Injectable()
export class AttachmentsService {
  constructor(
    @InjectModel(Attachment) private readonly attachments: typeof Attachment,
    private readonly clock: Clock,
  ) {}

  /** What was sent, made fit to keep; refused at the field where it is no picture. */
  readPicture(sent: Buffer, pointer: string): Promise<Picture> {
    return readPicture(sent, pointer);
  }

  /** Keeps a picture and gives its id. */
  async add({ houseId, memberId }: Actor, picture: Picture, transaction: Transaction): Promise<string> {
    const id = newId();
    await inHouse(this.attachments, houseId).create(
      { id, ...picture, createdAtMs: this.clock.nowMs(), createdBy: memberId },
      { transaction },
    );
    return id;
  }

  async get(houseId: string, id: string): Promise<{ mediaType: string; bytes: Buffer }> {
    const { mediaType, bytes } = await inHouse(this.attachments, houseId).get(id, 'picture');
    return { mediaType, bytes };
  }

  async remove(houseId: string, id: string, transaction: Transaction): Promise<void> {
    await inHouse(this.attachments, houseId).destroy({ id }, { transaction });
  }
}
