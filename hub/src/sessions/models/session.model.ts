import type { CreationOptional, InferAttributes, InferCreationAttributes } from 'sequelize';
import { Column, DataType, Table } from 'sequelize-typescript';
import { HouseOwnedModel } from '../../common/house-scope/house-owned.model.js';

/** One sign-in of one member on one device, for as long as its refresh tokens go on. */
@Table({ tableName: 'sessions' })
export class Session extends HouseOwnedModel<InferAttributes<Session>, InferCreationAttributes<Session>> {
  @Column({ type: DataType.CHAR(36), allowNull: false })
  declare memberId: string;

  @Column({ type: DataType.STRING(200), allowNull: false })
  declare userAgent: string;

  @Column({ type: DataType.BIGINT, allowNull: false })
  declare createdAtMs: number;

  @Column({ type: DataType.BIGINT })
  declare revokedAtMs: CreationOptional<number | null>;

  @Column({ type: DataType.STRING(40) })
  declare revokedBecause: CreationOptional<'signed-out' | 'member-changed' | 'token-reused' | null>;
}
