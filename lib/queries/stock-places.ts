/** Out of which length each piece of a spool is cut, by the cutting plans that are locked. */
import { Op } from "sequelize";
import type { StockPlace } from "@/iso";
import { planGroups } from "@/lib/rules/nest-table";
import { inShop, type ShopMember } from "@/lib/server/scope";
import { Nest } from "@/models";
import { resultOf, sourceOf } from "./nest-rows";

/** By piece key; a piece that stands in several plans, as after a recut, has the one locked last. */
export async function stockPlaces(member: ShopMember, spoolId: string): Promise<Readonly<Record<string, StockPlace>>> {
  const nests = await inShop(member).all(Nest, { state: "cut", source: { [Op.like]: `%${spoolId}%` } }, null, { order: [["cutAt", "ASC"]] });
  return Object.fromEntries(nests.flatMap((nest) => placesOf(nest, `${spoolId}|`)));
}

function placesOf(nest: Nest, prefix: string): [string, StockPlace][] {
  const result = resultOf(nest);
  if (result === null) return [];
  const bars = planGroups(sourceOf(nest), result).flatMap((group) => group.bars);
  return bars.flatMap((bar) => bar.pieces.flatMap(({ piece, startMm, lengthMm }, index): [string, StockPlace][] => {
    if (!piece.id.startsWith(prefix)) return [];
    const place = { plan: nest.title, length: bar.number, stockMm: bar.lengthMm, offcut: bar.offcut, heat: bar.heat, cut: index + 1, cuts: bar.pieces.length, startMm, plannedMm: lengthMm };
    return [[piece.id.slice(prefix.length), place]];
  }));
}
