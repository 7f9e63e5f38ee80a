/**
 * The one place queries are kept to a shop. Rows are found by (shop, id), so another shop's id finds nothing and
 * answers 404 like an id that never was.
 */
import { randomUUID } from "node:crypto";
import type { Attributes, CreationAttributes, FindOptions, Model, ModelStatic, Transaction, WhereOptions } from "sequelize";
import { getDb } from "./database";
import { refuseNotFound } from "./errors";

/** Anyone who acts within a shop. */
export interface ShopMember {
  readonly shopId: string;
}

type ShopRow = Model & { shopId: string; id: string };
type Reading<M extends ShopRow> = Omit<FindOptions<Attributes<M>>, "where" | "transaction">;

export interface Scope {
  /** The row with this id. @throws Refusal 404 when this shop has none. */
  one<M extends ShopRow>(model: ModelStatic<M>, id: string, tx?: Transaction | null): Promise<M>;
  /** As `one`, locked until the transaction ends. */
  locked<M extends ShopRow>(model: ModelStatic<M>, id: string, tx: Transaction): Promise<M>;
  /** The first row that fits, or null. */
  first<M extends ShopRow>(model: ModelStatic<M>, where: WhereOptions<Attributes<M>>, tx?: Transaction | null, reading?: Reading<M>): Promise<M | null>;
  all<M extends ShopRow>(model: ModelStatic<M>, where: WhereOptions<Attributes<M>>, tx?: Transaction | null, reading?: Reading<M>): Promise<M[]>;
  /** A new row of this shop with a new id. */
  add<M extends ShopRow>(model: ModelStatic<M>, values: Omit<CreationAttributes<M>, "shopId" | "id">, tx: Transaction): Promise<M>;
}

/** Reads and writes of one shop. */
export function inShop(member: ShopMember): Scope {
  getDb();
  const { shopId } = member;
  const within = <M extends ShopRow>(where: WhereOptions<Attributes<M>>) => ({ ...(where as object), shopId }) as unknown as WhereOptions<Attributes<M>>;
  return {
    one: async (model, id, tx = null) => found(await model.findOne({ where: within({ id } as never), transaction: tx })),
    locked: async (model, id, tx) => found(await model.findOne({ where: within({ id } as never), transaction: tx, lock: tx.LOCK.UPDATE })),
    first: (model, where, tx = null, reading = {}) => model.findOne({ ...reading, where: within(where), transaction: tx }),
    all: (model, where, tx = null, reading = {}) => model.findAll({ ...reading, where: within(where), transaction: tx }),
    add: (model, values, tx) => model.create({ ...values, shopId, id: randomUUID() } as never, { transaction: tx }),
  };
}

function found<M>(row: M | null): M {
  if (row === null) throw refuseNotFound();
  return row;
}
