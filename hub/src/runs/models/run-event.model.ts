import type { InferAttributes, InferCreationAttributes } from 'sequelize';
import { Column, DataType, Model, Table } from 'sequelize-typescript';

/** One fact of a run. Written once, never changed; reached through its run, which belongs to a house. */
@Table({ tableName: 'run_events' })
export class RunEventRow extends Model<InferAttributes<RunEventRow>, InferCreationAttributes<RunEventRow>> {
  @Column({ type: DataType.CHAR(36), primaryKey: true })
  declare runId: string;

  /** Order of the log, given by the hub. */
  @Column({ type: DataType.INTEGER.UNSIGNED, primaryKey: true })
  declare seq: number;

  /** Made where it happened; unique over all runs. */
  @Column({ type: DataType.CHAR(36), allowNull: false })
  declare id: string;

  @Column({ type: DataType.STRING(40), allowNull: false })
  declare type: string;

  @Column({ type: DataType.SMALLINT.UNSIGNED, allowNull: false })
  declare v: number;

  @Column({ type: DataType.BIGINT, allowNull: false })
  declare atMs: number;

  @Column({ type: DataType.CHAR(36) })
  declare by: string | null;

  @Column({ type: DataType.STRING(60), allowNull: false })
  declare station: string;

  @Column({ type: DataType.CHAR(36) })
  declare sentBy: string | null;

  @Column({ type: DataType.BIGINT, allowNull: false })
  declare receivedAtMs: number;

  @Column({ type: DataType.JSON, allowNull: false })
  declare payload: unknown;
}
