import type { CreationOptional } from 'sequelize';
import { Column, DataType, Model } from 'sequelize-typescript';

/** A row that belongs to one house. Reached through `inHouse` only, so that no query can forget whose rows it means. */
export abstract class HouseOwnedModel<Attributes extends object, Creation extends object> extends Model<
  Attributes,
  Creation
> {
  @Column({ type: DataType.CHAR(36), primaryKey: true })
  declare id: string;

  @Column({ type: DataType.CHAR(36), allowNull: false })
  declare houseId: CreationOptional<string>;
}
