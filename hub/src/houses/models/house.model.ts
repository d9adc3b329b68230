import type { CreationOptional, InferAttributes, InferCreationAttributes } from 'sequelize';
import { Column, DataType, Model, Table } from 'sequelize-typescript';

@Table({ tableName: 'houses' })
export class House extends Model<InferAttributes<House>, InferCreationAttributes<House>> {
  @Column({ type: DataType.CHAR(36), primaryKey: true })
  declare id: string;

  @Column({ type: DataType.STRING(80), allowNull: false })
  declare name: string;

  @Column({ type: DataType.DOUBLE, allowNull: false })
  declare altitudeM: number;

  /** ISO 4217. */
  @Column({ type: DataType.CHAR(3), allowNull: false, defaultValue: 'EUR' })
  declare currency: CreationOptional<string>;

  @Column({ type: DataType.BOOLEAN, allowNull: false, defaultValue: false })
  declare isDemo: CreationOptional<boolean>;

  @Column({ type: DataType.BIGINT, allowNull: false })
  declare createdAtMs: number;

  @Column({ type: DataType.INTEGER, allowNull: false, defaultValue: 1 })
  declare version: CreationOptional<number>;
}
