import { ProblemError } from '@steepfall/shared/problems';
import type {
  Attributes,
  CountOptions,
  CreateOptions,
  CreationAttributes,
  DestroyOptions,
  FindOptions,
  ModelStatic,
  Transaction,
  UpdateOptions,
  WhereOptions,
} from 'sequelize';
import type { HouseOwnedModel } from './house-owned.model.js';

// The attributes of a model differ per feature; what all of them have is the house.
// eslint-disable-next-line @typescript-eslint/no-explicit-any
type AnyHouseOwned = HouseOwnedModel<any, any>;

type Scoped<Options> = Omit<Options, 'where'>;
type New<M extends AnyHouseOwned> = Omit<CreationAttributes<M>, 'houseId'>;

/** The rows of one model that belong to one house. Every call adds the house to its condition or to its row. */
export class HouseRows<M extends AnyHouseOwned> {
  constructor(
    private readonly model: ModelStatic<M>,
    readonly houseId: string,
  ) {}

  findAll(where: WhereOptions<Attributes<M>> = {}, options: Scoped<FindOptions<Attributes<M>>> = {}): Promise<M[]> {
    return this.model.findAll({ ...options, where: this.scope(where) });
  }

  findOne(where: WhereOptions<Attributes<M>>, options: Scoped<FindOptions<Attributes<M>>> = {}): Promise<M | null> {
    return this.model.findOne({ ...options, where: this.scope(where) });
  }

  find(id: string, options: Scoped<FindOptions<Attributes<M>>> = {}): Promise<M | null> {
    return this.findOne({ id } as unknown as WhereOptions<Attributes<M>>, options);
  }

  /** The row with this id; a row of another house is as unknown as one that never was. */
  async get(id: string, what: string, options: Scoped<FindOptions<Attributes<M>>> = {}): Promise<M> {
    const row = await this.find(id, options);
    if (!row) throw new ProblemError('not-found', `There is no such ${what}.`);
    return row;
  }

  count(where: WhereOptions<Attributes<M>> = {}, options: Scoped<CountOptions<Attributes<M>>> = {}): Promise<number> {
    return this.model.count({ ...options, where: this.scope(where) });
  }

  create(values: New<M>, options: CreateOptions<Attributes<M>> = {}): Promise<M> {
    return this.model.create({ ...values, houseId: this.houseId } as unknown as CreationAttributes<M>, options);
  }

  bulkCreate(rows: New<M>[], options: { transaction?: Transaction } = {}): Promise<M[]> {
    return this.model.bulkCreate(
      rows.map((values) => ({ ...values, houseId: this.houseId }) as unknown as CreationAttributes<M>),
      options,
    );
  }

  /** Changes rows and says how many changed. */
  async update(
    where: WhereOptions<Attributes<M>>,
    values: Partial<Attributes<M>>,
    options: Scoped<UpdateOptions<Attributes<M>>> = {},
  ): Promise<number> {
    const [changed] = await this.model.update(values, { ...options, where: this.scope(where) });
    return changed;
  }

  destroy(where: WhereOptions<Attributes<M>>, options: Scoped<DestroyOptions<Attributes<M>>> = {}): Promise<number> {
    return this.model.destroy({ ...options, where: this.scope(where) });
  }

  private scope(where: WhereOptions<Attributes<M>>): WhereOptions<Attributes<M>> {
    return { ...(where as object), houseId: this.houseId } as unknown as WhereOptions<Attributes<M>>;
  }
}

/** The only door to the rows of a house: `inHouse(Equipment, actor.houseId).findAll()`. */
export function inHouse<M extends AnyHouseOwned>(model: ModelStatic<M>, houseId: string): HouseRows<M> {
  return new HouseRows(model, houseId);
}

/**
 * The same model without a house, for the hub's own work: who is signing in, whose token this is, which runs go on after a restart.
 * A spec lists the files that may use it.
 */
export function acrossHouses<M extends AnyHouseOwned>(model: ModelStatic<M>): ModelStatic<M> {
  return model;
}
