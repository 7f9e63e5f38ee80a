/**
 * Whoever replaced a take-out with a measured one changed every cut length it is in. That counts as touching a spool
 * when its content is another without their words; confirming a value as tabulated changes nothing.
 */
import { Op, type Transaction } from "sequelize";
import { buildModel, type SheetInput, type TakeOutWord as Word } from "@/iso";
import { inShop, type ShopMember } from "@/lib/server/scope";
import { TakeOutWord, type Revision } from "@/models";
import { frozenInput } from "./revision-facts";

/** Ids of the people whose measured take-outs, since the last signed of `before`, are in this revision of the spool. */
export async function takeOutTouches(member: ShopMember, revision: Revision, before: readonly Revision[], tx: Transaction | null = null): Promise<string[]> {
  const since = before.filter((one) => one.signedBy !== null).reduce((latest, one) => Math.max(latest, one.submittedAt.getTime()), 0);
  const at = { [Op.gt]: new Date(since), [Op.lte]: revision.submittedAt };
  const words = await inShop(member).all(TakeOutWord, { at, valueMm: { [Op.ne]: null } }, tx);
  if (words.length === 0) return [];
  const { input } = await frozenInput(member, revision.id, tx);
  const whole = contentWith(input, input.takeOuts);
  const people = [...new Set(words.map((word) => word.by))];
  return people.filter((person) => {
    const keys = new Set(words.filter((word) => word.by === person).map((word) => word.key));
    return contentWith(input, input.takeOuts.filter((word) => !keys.has(word.key))) !== whole;
  });
}

function contentWith(input: SheetInput, takeOuts: readonly Word[]): string | null {
  return buildModel(input.document, input.marks, takeOuts).spools.find((spool) => spool.letter === input.spool)?.content ?? null;
}
