import type { CreationOptional, InferAttributes, InferCreationAttributes } from 'sequelize';
import { Column, DataType, Table } from 'sequelize-typescript';
import { HouseOwnedModel } from '../../common/house-scope/house-owned.model.js';

/** A chain of revisions under one name. */
@Table({ tableName: 'recipes' })
export class Recipe extends HouseOwnedModel<InferAttributes<Recipe>, InferCreationAttributes<Recipe>> {
  @Column({ type: DataType.STRING(80), allowNull: false })
  declare name: string;

  @Column({ type: DataType.STRING(400), allowNull: false })
  declare summary: string;

  @Column({ type: DataType.BIGINT, allowNull: false })
  declare createdAtMs: number;

  /** Put away: lists leave it out, nothing else changes. */
  @Column({ type: DataType.BIGINT })
  declare archivedAtMs: CreationOptional<number | null>;
}
