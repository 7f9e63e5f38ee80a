/** Work recorded on spools, oldest first. */
import { Op } from "sequelize";
import type { WorkEntry as WorkEntryShape } from "@/lib/rules/api-types";
import { inShop, type ShopMember } from "@/lib/server/scope";
import { Revision, WorkEntry } from "@/models";
import { peopleNames } from "./people-names";

export async function workEntries(member: ShopMember, spoolId: string): Promise<WorkEntryShape[]> {
  const shop = inShop(member);
  const rows = await shop.all(WorkEntry, { spoolId }, null, { order: [["at", "ASC"], ["id", "ASC"]] });
  const name = await peopleNames(rows.map((row) => row.by));
  const revisions = await shop.all(Revision, { id: { [Op.in]: [...new Set(rows.map((row) => row.revisionId))] } });
  const codes = new Map(revisions.map((revision) => [revision.id, revision.code]));
  return rows.map((row) => ({
    id: row.id,
    kind: row.kind,
    mark: row.mark,
    key: row.key,
    values: JSON.parse(row.entryValues) as Record<string, string>,
    by: name(row.by),
    at: row.at.toISOString(),
    revisionCode: codes.get(row.revisionId) ?? "",
  }));
}
