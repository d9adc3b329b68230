import type { RunSheet } from '@steepfall/shared/sheets';
import type { CreationOptional, InferAttributes, InferCreationAttributes } from 'sequelize';
import { Column, DataType, Table } from 'sequelize-typescript';
import { HouseOwnedModel } from '../../common/house-scope/house-owned.model.js';

/** One production lot. Where it stands is not kept here: that follows from its run. */
@Table({ tableName: 'batches' })
export class Batch extends HouseOwnedModel<InferAttributes<Batch>, InferCreationAttributes<Batch>> {
  @Column({ type: DataType.SMALLINT, allowNull: false })
  declare year: number;

  @Column({ type: DataType.INTEGER, allowNull: false })
  declare numberInYear: number;

  /** `26-014` */
  @Column({ type: DataType.STRING(20), allowNull: false })
  declare batchNumber: string;

  @Column({ type: DataType.CHAR(36), allowNull: false })
  declare revisionId: string;

  /** `YYYY-MM-DD` */
  @Column({ type: DataType.DATEONLY, allowNull: false })
  declare plannedOn: string;

  @Column({ type: DataType.CHAR(36), allowNull: false })
  declare kettleId: string;

  @Column({ type: DataType.CHAR(36) })
  declare chillerId: string | null;

  @Column({ type: DataType.CHAR(36), allowNull: false })
  declare kegId: string;

  @Column({ type: DataType.CHAR(36) })
  declare probeId: string | null;

  @Column({ type: DataType.DOUBLE, allowNull: false })
  declare volumeL: number;

  @Column({ type: DataType.BIGINT, allowNull: false })
  declare createdAtMs: number;

  @Column({ type: DataType.CHAR(36), allowNull: false })
  declare createdBy: string;

  /** Changed by hand after it was planned; `null` while it is what follows from the revision. */
  @Column({ type: DataType.JSON })
  declare sheet: CreationOptional<RunSheet | null>;

  @Column({ type: DataType.INTEGER, allowNull: false, defaultValue: 1 })
  declare sheetVersion: CreationOptional<number>;

  @Column({ type: DataType.BIGINT })
  declare cancelledAtMs: CreationOptional<number | null>;
}
