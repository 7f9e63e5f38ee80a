/** Cutting plans: asked for, cancelled, and locked when cutting begins, which takes the stock and returns the rests. */
import { createHash } from "node:crypto";
import { formatLength } from "@/iso";
import { isRow, nestChanges, nestSource } from "@/lib/queries/nest-source";
import { resultOf, sourceOf, stockUsed } from "@/lib/queries/nest-rows";
import type { NestCutForm, NestNewForm } from "@/lib/rules/nest-forms";
import { unitMm, type NestResult, type NestSource } from "@/lib/rules/nest-plans";
import type { CommandContext } from "@/lib/server/command";
import { refuseConflict } from "@/lib/server/errors";
import { enqueue } from "@/lib/server/queue";
import { inShop } from "@/lib/server/scope";
import { Job, Nest, Offcut, Shop } from "@/models";

/** Asks for a plan: what it is made from is fixed now, the search runs from the queue. @throws Refusal 404, 400. */
export async function askForNest(context: CommandContext, jobId: string, form: NestNewForm): Promise<{ id: string }> {
  const { viewer, tx, now } = context;
  await inShop(viewer).one(Job, jobId, tx);
  const source = await nestSource(viewer, jobId, form, tx);
  const text = JSON.stringify(source);
  const sourceSha256 = createHash("sha256").update(text).digest("hex");
  const nest = await inShop(viewer).add(Nest, { jobId, title: titleOf(source), state: "waiting", source: text, sourceSha256, askedBy: viewer.personId, askedAt: now }, tx);
  await enqueue("nest", { shopId: viewer.shopId, nestId: nest.id }, tx);
  context.audit({ type: "nest.asked", data: { nestId: nest.id, jobId, title: nest.title, sourceSha256 } });
  return { id: nest.id };
}

const MOST_NAMED = 3;

function titleOf({ spools }: NestSource): string {
  const byLine = new Map<string, string[]>();
  for (const { line, letter } of spools) byLine.set(line, [...(byLine.get(line) ?? []), letter]);
  const named = [...byLine].slice(0, MOST_NAMED).map(([line, letters]) => `${line} ${letters.slice(0, 6).join(" ")}${letters.length > 6 ? " ..." : ""}`);
  return `${named.join(", ")}${byLine.size > MOST_NAMED ? ` and ${byLine.size - MOST_NAMED} more lines` : ""}`.slice(0, 200);
}

/** Stops a search. @throws Refusal 404; 409 when it has ended. */
export async function cancelNest(context: CommandContext, nestId: string): Promise<void> {
  const nest = await inShop(context.viewer).locked(Nest, nestId, context.tx);
  if (nest.state !== "waiting" && nest.state !== "searching") throw refuseConflict("This search has ended. There is nothing to cancel.");
  await nest.update({ state: "cancelled", doneAt: context.now }, { transaction: context.tx });
  context.audit({ type: "nest.stopped", data: { nestId, title: nest.title, reason: "Cancelled." } });
}

/**
 * Locks a plan because cutting begins: its lengths and offcuts leave the rack, its rests go back with their heat.
 * @throws Refusal 404; 409 when it is not a finished plan, stale, or of sheets that are not FOR FABRICATION.
 */
export async function cutNest(context: CommandContext, nestId: string, form: NestCutForm): Promise<void> {
  const { viewer, tx, now } = context;
  const nest = await inShop(viewer).locked(Nest, nestId, tx);
  if (nest.state === "cut") throw refuseConflict("This plan is locked: it was cut. Make another for what is left.");
  const result = resultOf(nest);
  if (nest.state !== "done" || result === null) throw refuseConflict("There is no finished plan to cut from.");
  const source = sourceOf(nest);
  const shop = await Shop.findOne({ where: { id: viewer.shopId }, rejectOnEmpty: true, transaction: tx, lock: tx.LOCK.UPDATE });
  const drafts = source.spools.filter((spool) => spool.revisionId === null);
  if (drafts.length > 0) throw refuseConflict(`Cutting begins from sheets FOR FABRICATION only; spool ${drafts[0]!.letter} of line ${drafts[0]!.line} was a draft. Have it signed, then make the plan again.`);
  const used = stockUsed(result);
  const changes = await nestChanges(viewer, source, used, tx);
  if (changes.length > 0) throw refuseConflict(`${changes[0]} Make the plan again.`);
  const offcutsTaken = await takeStock(context, nest, shop, source, used);
  const offcutsReturned = await returnRests(context, nest, source, result, form.heats);
  await nest.update({ state: "cut", result: JSON.stringify({ ...result, heats: form.heats }), cutBy: viewer.personId, cutAt: now }, { transaction: tx });
  const lengths = [...used.values()].reduce((sum, n) => sum + n, 0) - offcutsTaken;
  context.audit({ type: "nest.cut", data: { nestId, title: nest.title, lengths, offcutsTaken, offcutsReturned } });
}

/** @returns how many offcuts left the rack. */
async function takeStock({ viewer, tx, now }: CommandContext, nest: Nest, shop: Shop, source: NestSource, used: ReadonlyMap<string, number>): Promise<number> {
  let stock = shop.settings.stock;
  let offcuts = 0;
  for (const seen of source.stock.filter((s) => used.has(s.id))) {
    if (seen.kind === "length") {
      const at = stock.findIndex((row) => isRow(row, seen));
      stock = stock.map((row, k) => (k === at && row.quantity !== null ? { ...row, quantity: row.quantity - used.get(seen.id)! } : row));
      continue;
    }
    const offcut = await inShop(viewer).locked(Offcut, seen.id, tx);
    await offcut.update({ goneAt: now, goneBy: viewer.personId, goneTo: nest.id, goneWhy: "Cut up." }, { transaction: tx });
    offcuts += 1;
  }
  await shop.update({ settings: { ...shop.settings, stock } }, { transaction: tx });
  return offcuts;
}

async function returnRests({ viewer, tx, now }: CommandContext, nest: Nest, source: NestSource, result: NestResult, heats: NestCutForm["heats"]): Promise<number> {
  let returned = 0;
  for (const [g, group] of result.groups.entries()) {
    const { nps, schedule, material, units } = source.groups[g]!;
    for (const [b, bar] of group.bars.entries()) {
      if (!bar.returned) continue;
      const heat = bar.heat ?? heats[`${g}:${b}`] ?? "";
      await inShop(viewer).add(Offcut, { nps, schedule, material, lengthMm: bar.rest * unitMm(units), heat, cameFrom: nest.id, addedBy: viewer.personId, addedAt: now }, tx);
      returned += 1;
    }
  }
  return returned;
}

/** What an offcut is called in the log. */
export function offcutWord(row: Pick<Offcut, "nps" | "schedule" | "material" | "lengthMm" | "heat">): string {
  return `NPS ${row.nps}, ${row.schedule}, ${row.material}, ${formatLength(row.lengthMm, "imperial")} (${formatLength(row.lengthMm, "metric")} mm)${row.heat ? `, heat ${row.heat}` : ", heat not known"}`;
}
