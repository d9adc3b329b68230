import type { CreationOptional, InferAttributes, InferCreationAttributes } from 'sequelize';
import { Column, DataType, Table } from 'sequelize-typescript';
import { HouseOwnedModel } from '../../common/house-scope/house-owned.model.js';

/** Opens one run to whoever holds its token. */
@Table({ tableName: 'follow_links' })
export class FollowLink extends HouseOwnedModel<InferAttributes<FollowLink>, InferCreationAttributes<FollowLink>> {
  @Column({ type: DataType.CHAR(36), allowNull: false })
  declare runId: string;

  @Column({ type: DataType.STRING(64), allowNull: false })
  declare tokenHash: string;

  @Column({ type: DataType.BIGINT, allowNull: false })
  declare createdAtMs: number;

  @Column({ type: DataType.CHAR(36), allowNull: false })
  declare createdBy: string;

  /** At the latest; the end of the run can bring it forward. */
  @Column({ type: DataType.BIGINT, allowNull: false })
  declare expiresAtMs: number;

  @Column({ type: DataType.BIGINT })
  declare revokedAtMs: CreationOptional<number | null>;
}
