/** What the queue does with a plan's row around the search. Each is safe to run twice: only a row that waits is taken up. */
import { resultOf, sourceOf } from "@/lib/queries/nest-rows";
import type { NestResult, NestSource } from "@/lib/rules/nest-plans";
import { runCommand, type Actor } from "@/lib/server/command";
import { inShop, type ShopMember } from "@/lib/server/scope";
import { Nest } from "@/models";

/** Takes a plan up, also one whose worker died; null when it has ended. */
export async function takeUpNest(member: ShopMember, nestId: string): Promise<NestSource | null> {
  return runCommand(null, "unlogged", async ({ tx }) => {
    const nest = await inShop(member).locked(Nest, nestId, tx);
    if (nest.state !== "waiting" && nest.state !== "searching") return null;
    if (nest.state === "waiting") await nest.update({ state: "searching" }, { transaction: tx });
    return sourceOf(nest);
  });
}

/** Notes how far a search is. @returns whether it is still wanted. */
export async function noteNest(member: ShopMember, nestId: string, progress: { readonly cost: number; readonly bound: number } | null): Promise<boolean> {
  return runCommand(null, "unlogged", async ({ tx }) => {
    const nest = await inShop(member).locked(Nest, nestId, tx);
    if (nest.state !== "searching") return false;
    if (progress) await nest.update({ progress: JSON.stringify(progress) }, { transaction: tx });
    return true;
  });
}

/** Keeps what was found, or why nothing was, unless the plan has ended meanwhile. */
export async function finishNest(member: ShopMember, nestId: string, found: NestResult | { readonly failed: string }): Promise<void> {
  await runCommand<Actor | null, void>(null, "unlogged", async ({ tx, now, audit }) => {
    const nest = await inShop(member).locked(Nest, nestId, tx);
    if (nest.state !== "searching" || resultOf(nest) !== null) return;
    const where = { shopId: member.shopId, actor: nest.askedBy };
    if ("failed" in found) {
      await nest.update({ state: "failed", doneAt: now }, { transaction: tx });
      audit({ type: "nest.stopped", data: { nestId, title: nest.title, reason: found.failed } }, where);
      return;
    }
    await nest.update({ state: "done", result: JSON.stringify(found), doneAt: now }, { transaction: tx });
    const bars = found.groups.reduce((sum, group) => sum + group.bars.length, 0);
    audit({ type: "nest.made", data: { nestId, title: nest.title, bars, proven: found.groups.every((group) => group.proven) } }, where);
  });
}
