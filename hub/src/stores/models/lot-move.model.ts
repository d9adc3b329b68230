import type { LotMoveKind } from '@steepfall/shared/stores';
import type { CreationOptional, InferAttributes, InferCreationAttributes } from 'sequelize';
import { Column, DataType, Table } from 'sequelize-typescript';
import { HouseOwnedModel } from '../../common/house-scope/house-owned.model.js';

/** A line in the ledger of a lot: written once, never changed. */
@Table({ tableName: 'lot_moves' })
export class LotMove extends HouseOwnedModel<InferAttributes<LotMove>, InferCreationAttributes<LotMove>> {
  @Column({ type: DataType.CHAR(36), allowNull: false })
  declare lotId: string;

  @Column({ type: DataType.STRING(10), allowNull: false })
  declare kind: LotMoveKind;

  /** Signed, to the milligram. */
  @Column({ type: DataType.DECIMAL(13, 3), allowNull: false })
  declare massG: number;

  @Column({ type: DataType.STRING(400), allowNull: false })
  declare reason: string;

  @Column({ type: DataType.CHAR(36) })
  declare batchId: CreationOptional<string | null>;

  @Column({ type: DataType.STRING(20) })
  declare batchNumber: CreationOptional<string | null>;

  @Column({ type: DataType.STRING(60) })
  declare additionId: CreationOptional<string | null>;

  @Column({ type: DataType.CHAR(36) })
  declare undoesId: CreationOptional<string | null>;

  @Column({ type: DataType.BIGINT, allowNull: false })
  declare atMs: number;

  @Column({ type: DataType.CHAR(36), allowNull: false })
  declare madeBy: string;
}
