import type { KettleSetup } from '@steepfall/probe-sim/kettle';
import type { RunSummary } from '@steepfall/shared/contracts';
import type { CreationOptional, InferAttributes, InferCreationAttributes } from 'sequelize';
import { Column, DataType, Table } from 'sequelize-typescript';
import { HouseOwnedModel } from '../../common/house-scope/house-owned.model.js';

/** Settings of a run, and a projection of its log for lists. The log is the truth; the projection is written along with it. */
@Table({ tableName: 'runs' })
export class Run extends HouseOwnedModel<InferAttributes<Run>, InferCreationAttributes<Run>> {
  @Column({ type: DataType.CHAR(36) })
  declare batchId: string | null;

  @Column({ type: DataType.STRING(20) })
  declare batchNumber: string | null;

  @Column({ type: DataType.CHAR(36) })
  declare revisionId: string | null;

  @Column({ type: DataType.STRING(120), allowNull: false })
  declare title: string;

  @Column({ type: DataType.BOOLEAN, allowNull: false })
  declare isRehearsal: boolean;

  @Column({ type: DataType.INTEGER.UNSIGNED })
  declare seed: CreationOptional<number | null>;

  /** The simulated kettle of a rehearsal; `null` when the readings come from a real probe. */
  @Column({ type: DataType.JSON })
  declare kettleSetup: CreationOptional<KettleSetup | null>;

  /** Under which its readings are kept. */
  @Column({ type: DataType.CHAR(36) })
  declare probeId: string | null;

  /** The real probe that a rehearsal listens to; its readings are kept under `probeId` while the run is open. */
  @Column({ type: DataType.CHAR(36) })
  declare sourceProbeId: CreationOptional<string | null>;

  @Column({ type: DataType.DOUBLE, allowNull: false })
  declare probeLagS: number;

  /** Where its lag was learned from earlier runs: how far off it may be. */
  @Column({ type: DataType.DOUBLE })
  declare probeLagErrorRatio: CreationOptional<number | null>;

  @Column({ type: DataType.DOUBLE, allowNull: false })
  declare probeResolutionC: number;

  @Column({ type: DataType.DOUBLE, allowNull: false })
  declare probeSamplePeriodS: number;

  @Column({ type: DataType.DOUBLE })
  declare roomC: number | null;

  @Column({ type: DataType.DOUBLE })
  declare coolantC: number | null;

  /** Of the chiller in its kettle, learned from earlier runs. */
  @Column({ type: DataType.DOUBLE })
  declare chillerPerS: CreationOptional<number | null>;

  @Column({ type: DataType.STRING(20), allowNull: false })
  declare status: RunSummary['status'];

  @Column({ type: DataType.STRING(20) })
  declare outcome: CreationOptional<RunSummary['outcome']>;

  /** Run clock, like every instant of a run. */
  @Column({ type: DataType.BIGINT, allowNull: false })
  declare startedAtMs: number;

  @Column({ type: DataType.BIGINT })
  declare endedAtMs: CreationOptional<number | null>;

  @Column({ type: DataType.CHAR(36) })
  declare startedBy: string | null;

  @Column({ type: DataType.BIGINT, allowNull: false })
  declare clockAnchorWallMs: number;

  @Column({ type: DataType.BIGINT, allowNull: false })
  declare clockAnchorRunMs: number;

  @Column({ type: DataType.DOUBLE, allowNull: false })
  declare clockRate: number;

  @Column({ type: DataType.INTEGER.UNSIGNED, allowNull: false })
  declare lastSeq: number;

  @Column({ type: DataType.STRING(80) })
  declare currentStepTitle: CreationOptional<string | null>;

  @Column({ type: DataType.STRING(20) })
  declare alertStage: CreationOptional<RunSummary['alertStage']>;

  /** When the probe came out of the kettle; readings after that belong to something else. */
  @Column({ type: DataType.BIGINT })
  declare probeOutAtMs: CreationOptional<number | null>;

  /** Hub wall time. */
  @Column({ type: DataType.BIGINT, allowNull: false })
  declare createdAtMs: number;
}
