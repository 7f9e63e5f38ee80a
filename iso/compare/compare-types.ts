/** What a comparison of two revisions is made of: numbered rows, and where on the drawings each of them shows. */
import type { Ref } from "../draw/drawing-types";
import type { RevisionState } from "../sheet/sheet-types";

export type CompareKind = "added" | "removed" | "moved" | "changed";
export type CompareWhat = "point" | "length" | "fitting" | "piece" | "weld" | "material" | "setting" | "note";

/** One difference, in words; its number stands in the list and on the drawings. */
export interface CompareRow {
  /** From 1, in the order of the list. */
  readonly no: number;
  readonly kind: CompareKind;
  readonly what: CompareWhat;
  readonly mark: string;
  readonly text: string;
  readonly before: string | null;
  readonly after: string | null;
  /** What the earlier drawing shows of it. */
  readonly refsBefore: readonly Ref[];
  /** What the later drawing shows of it. */
  readonly refsAfter: readonly Ref[];
  /** What its number is led to: a point, a leg or a joint; null = nothing on the drawing. */
  readonly at: Ref | null;
}

/** One of the two things compared, as its page names it. */
export interface CompareSide {
  /** Revision code; of a draft the one it would get. */
  readonly code: string;
  readonly state: RevisionState;
  readonly hold: boolean;
}

/** Words of a row's kind, on paper and on screen. */
export const KIND_WORDS: Readonly<Record<CompareKind, string>> = { added: "ADDED", removed: "REMOVED", moved: "MOVED", changed: "CHANGED" };
