import type { ProbeCalibration } from '@steepfall/shared/contracts';
import type { CreationOptional, InferAttributes, InferCreationAttributes } from 'sequelize';
import { Column, DataType, Table } from 'sequelize-typescript';
import { HouseOwnedModel } from '../../common/house-scope/house-owned.model.js';

/** A thermometer that sends readings, real or simulated. Never deleted: curves of the past hang on it. */
@Table({ tableName: 'probes' })
export class Probe extends HouseOwnedModel<InferAttributes<Probe>, InferCreationAttributes<Probe>> {
  @Column({ type: DataType.STRING(80), allowNull: false })
  declare name: string;

  /** `null`: no token opens the door for it (simulated, or revoked). */
  @Column({ type: DataType.STRING(64) })
  declare tokenHash: CreationOptional<string | null>;

  @Column({ type: DataType.DOUBLE, allowNull: false })
  declare lagS: number;

  /** How far off `lagS` may be, as a share of it, where it was learned; `null`: only told. */
  @Column({ type: DataType.DOUBLE })
  declare lagErrorRatio: CreationOptional<number | null>;

  @Column({ type: DataType.DOUBLE, allowNull: false })
  declare resolutionC: number;

  @Column({ type: DataType.DOUBLE, allowNull: false })
  declare samplePeriodS: number;

  /** What it showed at two points that are known; `null`: it is believed as it is. */
  @Column({ type: DataType.JSON })
  declare calibration: CreationOptional<ProbeCalibration | null>;

  @Column({ type: DataType.BIGINT })
  declare calibratedAtMs: CreationOptional<number | null>;

  @Column({ type: DataType.BOOLEAN, allowNull: false, defaultValue: false })
  declare isSimulated: CreationOptional<boolean>;

  @Column({ type: DataType.BIGINT, allowNull: false })
  declare createdAtMs: number;

  @Column({ type: DataType.BIGINT })
  declare revokedAtMs: CreationOptional<number | null>;

  @Column({ type: DataType.INTEGER, allowNull: false, defaultValue: 1 })
  declare version: CreationOptional<number>;
}
