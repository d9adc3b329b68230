import type { InferAttributes, InferCreationAttributes } from 'sequelize';
import { Column, DataType, Table } from 'sequelize-typescript';
import { HouseOwnedModel } from '../../common/house-scope/house-owned.model.js';

/** A phone that gets notifications through a follow link. Goes with the link. */
@Table({ tableName: 'push_subscriptions' })
export class PushSubscriber extends HouseOwnedModel<
  InferAttributes<PushSubscriber>,
  InferCreationAttributes<PushSubscriber>
> {
  @Column({ type: DataType.CHAR(36), allowNull: false })
  declare linkId: string;

  @Column({ type: DataType.STRING(1000), allowNull: false })
  declare endpoint: string;

  @Column({ type: DataType.STRING(64), allowNull: false })
  declare endpointHash: string;

  @Column({ type: DataType.STRING(100), allowNull: false })
  declare p256dh: string;

  @Column({ type: DataType.STRING(40), allowNull: false })
  declare auth: string;

  /** Whom the push service can turn to: a `mailto:` or `https:` address. */
  @Column({ type: DataType.STRING(300), allowNull: false })
  declare contact: string;

  @Column({ type: DataType.BIGINT, allowNull: false })
  declare createdAtMs: number;
}
