import type { CreationOptional, InferAttributes, InferCreationAttributes } from 'sequelize';
import { Column, DataType, Model, Table } from 'sequelize-typescript';

@Table({ tableName: 'audit_log' })
export class AuditEntry extends Model<InferAttributes<AuditEntry>, InferCreationAttributes<AuditEntry>> {
  @Column({ type: DataType.BIGINT, primaryKey: true, autoIncrement: true })
  declare seq: CreationOptional<number>;

  @Column({ type: DataType.CHAR(36), allowNull: false })
  declare houseId: string;

  @Column({ type: DataType.BIGINT, allowNull: false })
  declare atMs: number;

  @Column({ type: DataType.CHAR(36) })
  declare memberId: string | null;

  @Column({ type: DataType.STRING(60), allowNull: false })
  declare action: string;

  @Column({ type: DataType.STRING(190), allowNull: false })
  declare subject: string;

  @Column({ type: DataType.JSON, allowNull: false })
  declare facts: Record<string, unknown>;
}
