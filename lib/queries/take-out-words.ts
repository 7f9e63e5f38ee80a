/** The shop's word on catalogue take-outs: the newest of each key. */
import { QueryTypes, type Transaction } from "sequelize";
import type { TakeOutWord } from "@/iso";
import { getDb } from "@/lib/server/database";
import type { ShopMember } from "@/lib/server/scope";

const NEWEST = `
SELECT DISTINCT ON (w.key) w.key, w.value_mm AS "valueMm", p.name AS "by", w.at
FROM take_out_words w JOIN people p ON p.id = w.by
WHERE w.shop_id = $shopId ORDER BY w.key, w.seq DESC`;

/** In the order of the keys, so that equal words give equal sheets. */
export async function takeOutWords({ shopId }: ShopMember, tx: Transaction | null = null): Promise<TakeOutWord[]> {
  const rows = await getDb().query<Omit<TakeOutWord, "at"> & { at: Date }>(NEWEST, { bind: { shopId }, type: QueryTypes.SELECT, transaction: tx });
  return rows.map(({ key, valueMm, by, at }) => ({ key, valueMm, by, at: at.toISOString() }));
}
