import type { Equipment as EquipmentAnswer } from '@steepfall/shared/contracts';
import type { CreationOptional, InferAttributes, InferCreationAttributes } from 'sequelize';
import { Column, DataType, Table } from 'sequelize-typescript';
import { HouseOwnedModel } from '../../common/house-scope/house-owned.model.js';

@Table({ tableName: 'equipment' })
export class Equipment extends HouseOwnedModel<InferAttributes<Equipment>, InferCreationAttributes<Equipment>> {
  @Column({ type: DataType.STRING(20), allowNull: false })
  declare kind: EquipmentAnswer['kind'];

  @Column({ type: DataType.STRING(80), allowNull: false })
  declare name: string;

  @Column({ type: DataType.JSON, allowNull: false })
  declare facts: EquipmentAnswer['facts'];

  @Column({ type: DataType.BIGINT, allowNull: false })
  declare createdAtMs: number;

  /** Batches of the past still point at it, so a row is never deleted. */
  @Column({ type: DataType.BIGINT })
  declare removedAtMs: CreationOptional<number | null>;

  @Column({ type: DataType.INTEGER, allowNull: false, defaultValue: 1 })
  declare version: CreationOptional<number>;
}
