import type { InferAttributes, InferCreationAttributes } from 'sequelize';
import { Column, DataType, Model, Table } from 'sequelize-typescript';

/** A person with an address and a password; a member of one house or of several. */
@Table({ tableName: 'users' })
export class User extends Model<InferAttributes<User>, InferCreationAttributes<User>> {
  @Column({ type: DataType.CHAR(36), primaryKey: true })
  declare id: string;

  /** Lower case. */
  @Column({ type: DataType.STRING(190), allowNull: false })
  declare email: string;

  @Column({ type: DataType.STRING(200), allowNull: false })
  declare passwordHash: string;

  @Column({ type: DataType.BIGINT, allowNull: false })
  declare createdAtMs: number;
}
