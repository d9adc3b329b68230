import type { LotFacts } from '@steepfall/shared/stores';
import type { CreationOptional, InferAttributes, InferCreationAttributes, NonAttribute } from 'sequelize';
import { BelongsTo, Column, DataType, ForeignKey, Table } from 'sequelize-typescript';
import { HouseOwnedModel } from '../../common/house-scope/house-owned.model.js';
import { Ingredient } from './ingredient.model.js';

/** One delivery of an ingredient. How much of it is left is not kept here: that is the sum of its ledger. */
@Table({ tableName: 'lots' })
export class Lot extends HouseOwnedModel<InferAttributes<Lot>, InferCreationAttributes<Lot>> {
  @ForeignKey(() => Ingredient)
  @Column({ type: DataType.CHAR(36), allowNull: false })
  declare ingredientId: string;

  @Column({ type: DataType.STRING(60), allowNull: false })
  declare code: string;

  /** `YYYY-MM-DD` */
  @Column({ type: DataType.DATEONLY, allowNull: false })
  declare receivedOn: string;

  /** `YYYY-MM-DD` */
  @Column({ type: DataType.DATEONLY })
  declare bestBefore: string | null;

  @Column({ type: DataType.DOUBLE })
  declare pricePerKg: number | null;

  @Column({ type: DataType.STRING(400), allowNull: false })
  declare note: string;

  @Column({ type: DataType.JSON })
  declare hops: LotFacts['hops'];

  @Column({ type: DataType.CHAR(36) })
  declare photoId: CreationOptional<string | null>;

  @Column({ type: DataType.BIGINT, allowNull: false })
  declare createdAtMs: number;

  @Column({ type: DataType.BIGINT })
  declare removedAtMs: CreationOptional<number | null>;

  @Column({ type: DataType.INTEGER, allowNull: false, defaultValue: 1 })
  declare version: CreationOptional<number>;

  @BelongsTo(() => Ingredient)
  declare ingredient?: NonAttribute<Ingredient>;
}
