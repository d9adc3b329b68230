import type { Role } from '@steepfall/shared/contracts';
import type { UnitPreferences } from '@steepfall/shared/units';
import type { CreationOptional, InferAttributes, InferCreationAttributes, NonAttribute } from 'sequelize';
import { BelongsTo, Column, DataType, ForeignKey, Table } from 'sequelize-typescript';
import { HouseOwnedModel } from '../../common/house-scope/house-owned.model.js';
import { User } from './user.model.js';

/** A user in a house, with a role. Its id is the "member" of the API. */
@Table({ tableName: 'memberships' })
export class Membership extends HouseOwnedModel<InferAttributes<Membership>, InferCreationAttributes<Membership>> {
  @ForeignKey(() => User)
  @Column({ type: DataType.CHAR(36), allowNull: false })
  declare userId: string;

  @Column({ type: DataType.STRING(80), allowNull: false })
  declare displayName: string;

  @Column({ type: DataType.STRING(20), allowNull: false })
  declare role: Role;

  @Column({ type: DataType.BOOLEAN, allowNull: false, defaultValue: true })
  declare isActive: CreationOptional<boolean>;

  /** `null`: never chosen. */
  @Column({ type: DataType.JSON })
  declare units: CreationOptional<UnitPreferences | null>;

  /** Seconds from `now` to the act; `null`: the usual. */
  @Column({ type: DataType.SMALLINT.UNSIGNED })
  declare reachS: CreationOptional<number | null>;

  @Column({ type: DataType.BIGINT, allowNull: false })
  declare createdAtMs: number;

  @BelongsTo(() => User)
  declare user?: NonAttribute<User>;
}
