import type { CreationOptional, InferAttributes, InferCreationAttributes } from 'sequelize';
import { Column, DataType, Table } from 'sequelize-typescript';
import { HouseOwnedModel } from '../../common/house-scope/house-owned.model.js';

/** What a planned batch has set aside of a lot for one of its additions. */
@Table({ tableName: 'lot_reservations' })
export class LotReservation extends HouseOwnedModel<
  InferAttributes<LotReservation>,
  InferCreationAttributes<LotReservation>
> {
  @Column({ type: DataType.CHAR(36), allowNull: false })
  declare batchId: string;

  @Column({ type: DataType.CHAR(36), allowNull: false })
  declare lotId: string;

  @Column({ type: DataType.STRING(60), allowNull: false })
  declare additionId: string;

  @Column({ type: DataType.DECIMAL(13, 3), allowNull: false })
  declare massG: number;

  @Column({ type: DataType.BIGINT, allowNull: false })
  declare createdAtMs: number;

  /** The batch was cancelled. */
  @Column({ type: DataType.BIGINT })
  declare releasedAtMs: CreationOptional<number | null>;
}
