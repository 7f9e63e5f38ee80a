/** Names of people by id, for rows that keep ids only. */
import type { Transaction } from "sequelize";
import { getDb } from "@/lib/server/database";
import { Person } from "@/models";

/** Looks up names once for many rows; no id reads "", one that is not there "Somebody". */
export async function peopleNames(ids: readonly (string | null)[], tx: Transaction | null = null): Promise<(id: string | null) => string> {
  getDb();
  const wanted = [...new Set(ids.filter((id): id is string => id !== null))];
  const rows = await Person.findAll({ where: { id: wanted }, attributes: ["id", "name"], transaction: tx });
  const names = new Map(rows.map((row) => [row.id, row.name]));
  return (id) => (id === null ? "" : (names.get(id) ?? "Somebody"));
}
