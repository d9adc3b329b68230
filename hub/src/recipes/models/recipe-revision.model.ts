import type { RecipeDocument } from '@steepfall/shared/sheets';
import type { InferAttributes, InferCreationAttributes, NonAttribute } from 'sequelize';
import { BelongsTo, Column, DataType, ForeignKey, Table } from 'sequelize-typescript';
import { HouseOwnedModel } from '../../common/house-scope/house-owned.model.js';
import { Recipe } from './recipe.model.js';

/** Written once, never changed: a batch is pinned to it. */
@Table({ tableName: 'recipe_revisions' })
export class RecipeRevision extends HouseOwnedModel<
  InferAttributes<RecipeRevision>,
  InferCreationAttributes<RecipeRevision>
> {
  @ForeignKey(() => Recipe)
  @Column({ type: DataType.CHAR(36), allowNull: false })
  declare recipeId: string;

  @Column({ type: DataType.INTEGER, allowNull: false })
  declare number: number;

  @Column({ type: DataType.STRING(400), allowNull: false })
  declare note: string;

  @Column({ type: DataType.BIGINT, allowNull: false })
  declare createdAtMs: number;

  @Column({ type: DataType.CHAR(36), allowNull: false })
  declare createdBy: string;

  @Column({ type: DataType.DOUBLE, allowNull: false })
  declare volumeL: number;

  @Column({ type: DataType.JSON, allowNull: false })
  declare document: RecipeDocument;

  @BelongsTo(() => Recipe)
  declare recipe?: NonAttribute<Recipe>;
}
