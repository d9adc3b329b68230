import type { InferAttributes, InferCreationAttributes } from 'sequelize';
import { Column, DataType, Table } from 'sequelize-typescript';
import { HouseOwnedModel } from '../../common/house-scope/house-owned.model.js';

/** A picture, kept with the rows that it belongs to: backed up, scoped and committed together with them. */
@Table({ tableName: 'attachments' })
export class Attachment extends HouseOwnedModel<InferAttributes<Attachment>, InferCreationAttributes<Attachment>> {
  @Column({ type: DataType.STRING(40), allowNull: false })
  declare mediaType: string;

  @Column({ type: DataType.INTEGER, allowNull: false })
  declare widthPx: number;

  @Column({ type: DataType.INTEGER, allowNull: false })
  declare heightPx: number;

  @Column({ type: DataType.BLOB('medium'), allowNull: false })
  declare bytes: Buffer;

  @Column({ type: DataType.BIGINT, allowNull: false })
  declare createdAtMs: number;

  @Column({ type: DataType.CHAR(36), allowNull: false })
  declare createdBy: string;
}
