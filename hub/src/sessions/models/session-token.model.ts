import type { CreationOptional, InferAttributes, InferCreationAttributes } from 'sequelize';
import { Column, DataType, Model, Table } from 'sequelize-typescript';

/** One refresh token; the database knows its hash only. */
@Table({ tableName: 'session_tokens' })
export class SessionToken extends Model<InferAttributes<SessionToken>, InferCreationAttributes<SessionToken>> {
  @Column({ type: DataType.CHAR(64), primaryKey: true })
  declare tokenHash: string;

  @Column({ type: DataType.CHAR(36), allowNull: false })
  declare sessionId: string;

  /** The token that was given back for this one. */
  @Column({ type: DataType.CHAR(64) })
  declare parentHash: string | null;

  @Column({ type: DataType.BIGINT, allowNull: false })
  declare issuedAtMs: number;

  @Column({ type: DataType.BIGINT, allowNull: false })
  declare expiresAtMs: number;

  @Column({ type: DataType.BIGINT })
  declare rotatedAtMs: CreationOptional<number | null>;

  /** Set when its parent came back instead: the answer that carried this one was lost. */
  @Column({ type: DataType.BIGINT })
  declare voidedAtMs: CreationOptional<number | null>;
}
