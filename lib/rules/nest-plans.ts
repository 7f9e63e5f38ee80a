/** Cutting plans as they are stored and shown: what one was made from, what was found, and what to say about it. */
import type { NestBar, NestPlan, UnitSystem } from "@/iso";

export type NestState = "waiting" | "searching" | "done" | "failed" | "cancelled" | "cut";

export interface NestingSettings {
  readonly saws: readonly { readonly name: string; readonly kerfMm: number }[];
  /** Cut off each end of a length before use. */
  readonly endTrimMm: number;
  /** A rest at least this long goes back to the rack. */
  readonly leastOffcutMm: number;
  /** Worth of such a rest, as a share of new pipe of its length. */
  readonly offcutShare: number;
}

/** Where a shop begins: kerfs of common saws and a foot of least rest, from memory; the shop enters its own. */
export const NESTING_START: NestingSettings = {
  saws: [
    { name: "Band saw", kerfMm: 1.6 },
    { name: "Abrasive saw", kerfMm: 3.2 },
  ],
  endTrimMm: 0,
  leastOffcutMm: 304.8,
  offcutShare: 0.5,
};

export interface NestPiece {
  /** Spool and key: the same piece in every plan. */
  readonly id: string;
  readonly mark: string;
  readonly line: string;
  readonly spool: string;
  /** The rounded cut length in the group's whole units. */
  readonly length: number;
}

/** Pieces that may share a length of pipe. */
export interface NestGroup {
  readonly nps: string;
  readonly schedule: string;
  readonly material: string;
  readonly specification: string;
  readonly units: UnitSystem;
  readonly pieces: readonly NestPiece[];
}

export interface NestStockRow {
  readonly id: string;
  readonly kind: "length" | "offcut";
  readonly nps: string;
  readonly schedule: string;
  readonly material: string;
  readonly lengthMm: number;
  /** null = as many as wanted. */
  readonly quantity: number | null;
  /** null = not entered. */
  readonly cost: number | null;
  /** "" = not known. */
  readonly heat: string;
}

export interface NestSpool {
  readonly spoolId: string;
  readonly line: string;
  readonly letter: string;
  /** null = a draft. */
  readonly revisionId: string | null;
  readonly code: string;
  readonly contentSha256: string;
}

export interface NestSource {
  readonly version: 1;
  readonly saw: { readonly name: string; readonly kerfMm: number };
  readonly endTrimMm: number;
  readonly leastOffcutMm: number;
  readonly offcutShare: number;
  /** Only stock of this heat; null = any. */
  readonly heat: string | null;
  readonly seconds: number;
  readonly groups: readonly NestGroup[];
  readonly stock: readonly NestStockRow[];
  readonly spools: readonly NestSpool[];
  /** Pieces not planned, and why in words. */
  readonly leftOut: readonly { readonly mark: string; readonly reason: string }[];
}

export interface NestGroupPlan extends Omit<NestPlan, "bars"> {
  readonly bars: readonly NestBar[];
  /** Whether the shop's costs are counted; else the cost is the metres taken. */
  readonly costed: boolean;
}

export interface NestResult {
  /** One per group of the source. */
  readonly groups: readonly NestGroupPlan[];
  /** Heats written down when the lengths were taken: "group:bar" to heat. */
  readonly heats?: Readonly<Record<string, string>>;
}

export interface NestRow {
  readonly id: string;
  readonly title: string;
  readonly state: NestState;
  readonly askedBy: string;
  readonly askedAt: string;
  readonly pieces: number;
}

export interface NestDetail extends NestRow {
  readonly jobId: string;
  readonly jobNumber: string;
  readonly source: NestSource;
  readonly result: NestResult | null;
  readonly progress: { readonly cost: number; readonly bound: number } | null;
  readonly cutBy: string;
  readonly cutAt: string | null;
  /** What changed since the plan was made, in words: the plan is stale. Empty once it is cut. */
  readonly stale: readonly string[];
}

export interface OffcutRow {
  readonly id: string;
  readonly nps: string;
  readonly schedule: string;
  readonly material: string;
  readonly lengthMm: number;
  readonly heat: string;
  readonly addedBy: string;
  readonly addedAt: string;
}

export const NEST_STATE_WORDS: Readonly<Record<NestState, string>> = {
  waiting: "WAITING", searching: "SEARCHING", done: "PLANNED", failed: "FAILED", cancelled: "CANCELLED", cut: "LOCKED, CUT",
};

const UNPLACED: Readonly<Record<NestPlan["unplaced"][number]["reason"], string>> = {
  "too-long": "no stock of its kind is long enough for it",
  "no-heat": "no stock of the heat asked for is long enough",
  "stock-short": "the stock ran out",
};

export function unplacedWord(reason: NestPlan["unplaced"][number]["reason"]): string {
  return UNPLACED[reason];
}

/** One unit of a group's lengths, mm: what the shop cuts to. */
export function unitMm(units: UnitSystem): number {
  return units === "metric" ? 1 : 25.4 / 16;
}

/** How good a plan is, in a sentence. */
export function planWord({ proven, cost, bound }: Pick<NestPlan, "proven" | "cost" | "bound">): string {
  if (proven) return "Proven: no plan costs less.";
  if (!(bound > 0) || !(cost > 0)) return "Not proven.";
  return `Not proven: no plan costs less than ${amountText(bound)}, so at most ${(((cost - bound) / cost) * 100).toFixed(2)} % could be saved.`;
}

/** Two decimals, thousands parted. */
export function amountText(amount: number): string {
  return amount.toLocaleString("en-US", { minimumFractionDigits: 2, maximumFractionDigits: 2 });
}
