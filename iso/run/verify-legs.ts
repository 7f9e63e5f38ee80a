/** Whether a dimension can be trusted: assumed numbers, single readings and readings that differ cannot (TRADE: two readings by tape). */
import { READINGS_AGREE_MM } from "../geometry/tolerances";
import { formatLength, formatTerm } from "../units/format";
import type { Offset, Point, UnitSystem } from "./document";

export interface LegVerification {
  readonly unverified: boolean;
  /** Why, and what to do, without the name of the point; "" when verified. */
  readonly reason: string;
  readonly code: "" | "assumed" | "read-once" | "readings-differ";
}

/** Judges one point's dimension by its provenance. */
export function legVerification(point: Point, lengthMm: number, units: UnitSystem): LegVerification {
  const { kind, second, toleranceMm } = point.provenance;
  if (second) {
    const off = readingDifference(point.offset, lengthMm, second.mm);
    if (off > (toleranceMm ?? READINGS_AGREE_MM)) {
      return { unverified: true, code: "readings-differ", reason: `two readings differ by ${formatTerm(off, units)} ${units === "metric" ? "mm" : "in"} (second ${formatLength(second.mm, units)}). Measure again.` };
    }
  }
  if (kind === "assumed") return { unverified: true, code: "assumed", reason: "this dimension is assumed. Measure it, or have it accepted by name at signing." };
  if (kind === "measured" && !second) return { unverified: true, code: "read-once", reason: "this dimension was read once only. Enter a second reading." };
  return { unverified: false, code: "", reason: "" };
}

/** A second reading is of the number that was typed: the one offset that is not zero, or the straight length. Signs do not matter. */
function readingDifference(offset: Offset, lengthMm: number, secondMm: number): number {
  const candidates = offset.kind === "enu" ? [offset.e.mm, offset.n.mm, offset.u.mm].filter((mm) => mm !== 0) : [];
  const first = candidates.length === 1 ? Math.abs(candidates[0] ?? 0) : lengthMm;
  return Math.abs(Math.abs(secondMm) - first);
}
