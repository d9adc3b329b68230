import type { IngredientFacts } from '@steepfall/shared/stores';
import type { CreationOptional, InferAttributes, InferCreationAttributes } from 'sequelize';
import { Column, DataType, Table } from 'sequelize-typescript';
import { HouseOwnedModel } from '../../common/house-scope/house-owned.model.js';

/** What is kept on the shelf under one name. */
@Table({ tableName: 'ingredients' })
export class Ingredient extends HouseOwnedModel<InferAttributes<Ingredient>, InferCreationAttributes<Ingredient>> {
  @Column({ type: DataType.STRING(20), allowNull: false })
  declare kind: IngredientFacts['kind'];

  @Column({ type: DataType.STRING(80), allowNull: false })
  declare name: string;

  /** Everything but the kind and the name, which the database compares. */
  @Column({ type: DataType.JSON, allowNull: false })
  declare facts: Record<string, unknown>;

  @Column({ type: DataType.BIGINT, allowNull: false })
  declare createdAtMs: number;

  /** Lots and batches of the past still point at it, so a row is never deleted. */
  @Column({ type: DataType.BIGINT })
  declare removedAtMs: CreationOptional<number | null>;

  @Column({ type: DataType.INTEGER, allowNull: false, defaultValue: 1 })
  declare version: CreationOptional<number>;
}
