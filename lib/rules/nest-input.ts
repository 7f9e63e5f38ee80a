/** From a plan's source to the whole-number problem of one group, and the sum over what its answer uses. Pure. */
import type { NestInput, NestStock } from "@/iso";
import { unitMm, type NestGroup, type NestSource, type NestStockRow } from "./nest-plans";

/** Spaces and capitals aside, the same schedule or material. */
export function sameWord(a: string, b: string): boolean {
  const plain = (text: string) => text.trim().replace(/\s+/g, " ").toUpperCase();
  return plain(a) === plain(b);
}

/** Without costs, a metre of new pipe counts 1. */
const COST_PER_MM = 0.001;
/** Share of a unit, so that 20 ft stays 3 840 sixteenths when it was stored as millimetres. */
const GRAIN = 1e-4;

export interface GroupInput {
  readonly input: NestInput;
  readonly costed: boolean;
}

/** @param used how many of each stock other groups have taken already. */
export function groupInput(source: NestSource, group: NestGroup, used: ReadonlyMap<string, number>): GroupInput {
  const unit = unitMm(group.units);
  const rows = source.stock.filter((s) => s.nps === group.nps && sameWord(s.schedule, group.schedule) && sameWord(s.material, group.material));
  const priced = rows.flatMap((s) => (s.kind === "length" && s.cost !== null ? [s.cost / s.lengthMm] : []));
  const perMm = priced.length > 0 ? Math.min(...priced) : COST_PER_MM;
  const stocks = rows.flatMap((s): NestStock[] => {
    const quantity = s.quantity === null ? null : s.quantity - (used.get(s.id) ?? 0);
    if (quantity !== null && quantity <= 0) return [];
    return [{ id: s.id, length: Math.floor(s.lengthMm / unit + GRAIN), quantity, cost: costOf(s, perMm, source.offcutShare), heat: s.heat || null }];
  });
  return {
    costed: priced.length > 0,
    input: {
      demands: demandsOf(group, source.heat), stocks, kerf: Math.ceil(source.saw.kerfMm / unit - GRAIN), endTrim: Math.ceil(source.endTrimMm / unit - GRAIN),
      leastOffcut: Math.max(1, Math.ceil(source.leastOffcutMm / unit - GRAIN)), offcutValue: perMm * unit * source.offcutShare,
    },
  };
}

function costOf(stock: NestStockRow, perMm: number, share: number): number {
  if (stock.kind === "offcut") return stock.lengthMm * perMm * share;
  return stock.cost ?? stock.lengthMm * perMm;
}

function demandsOf({ pieces }: NestGroup, heat: string | null): NestInput["demands"] {
  const byLength = new Map<number, string[]>();
  for (const piece of pieces) byLength.set(piece.length, [...(byLength.get(piece.length) ?? []), piece.id]);
  return [...byLength].map(([length, marks]) => ({ length, marks, heat }));
}
