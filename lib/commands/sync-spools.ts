/**
 * Keeps the rows of a line's spools in step with what its model falls into. A letter that is gone is void and keeps
 * its row when anything was ever submitted under it; a draft's letter just goes.
 */
import type { Model } from "@/iso";
import type { CommandContext } from "@/lib/server/command";
import { inShop } from "@/lib/server/scope";
import { Revision, Spool } from "@/models";

export async function syncSpools({ viewer, tx, now }: CommandContext, lineId: string, model: Model): Promise<void> {
  const shop = inShop(viewer);
  const letters = new Set(model.spools.map((spool) => spool.letter));
  const rows = await shop.all(Spool, { lineId }, tx);
  const known = new Set(rows.map((row) => row.letter));
  for (const letter of letters) {
    if (!known.has(letter)) await shop.add(Spool, { lineId, letter, status: "live", createdAt: now }, tx);
  }
  for (const row of rows) {
    const status = letters.has(row.letter) ? "live" : "void";
    if (status === row.status) continue;
    const submitted = await shop.first(Revision, { spoolId: row.id }, tx);
    if (status === "void" && submitted === null) await row.destroy({ transaction: tx });
    else await row.update({ status }, { transaction: tx });
  }
}
