/** Shapes of the editor's state and of what may be done to it. */
import type { Item, Point, RunDocument } from "@/iso";
import type { CellTarget } from "./cell-commit";

/** A typed text that was not understood stays with its cell until it is mended or dropped. */
export interface Draft {
  readonly text: string;
  readonly message: string;
}

export interface EditorState {
  readonly document: RunDocument;
  readonly past: readonly RunDocument[];
  readonly future: readonly RunDocument[];
  readonly drafts: Readonly<Record<string, Draft>>;
  readonly cursor: CellTarget;
  /** Where a block of cells was begun; the cursor is its other corner. null = the cursor's cell alone. */
  readonly anchor: CellTarget | null;
  /** The block takes its rows whole. */
  readonly wholeRows: boolean;
  /** What the last paste did; null when it was read and put away. */
  readonly report: PasteReport | null;
  /** Counts the moves of the cursor that should take the focus along. */
  readonly focusTurn: number;
  /** The document with the valid entry being typed, for the drawing only; null when nothing is being typed. */
  readonly preview: RunDocument | null;
  /** How the text being typed reads so far; null when nothing is being typed. */
  readonly typing: TypingEcho | null;
  /** Each run ends in an empty row that takes the next point; not for a reader. */
  readonly emptyRows: boolean;
  /** Id the next new point of each run will get, so that its row keeps its identity. */
  readonly nextIds: Readonly<Record<string, string>>;
}

/** The echo of a text still being typed, or the sentence that says what is missing. */
export interface TypingEcho {
  readonly ok: boolean;
  readonly words: string;
}

/** What a paste took, and each cell it did not understand; those wait in their cells. */
export interface PasteReport {
  readonly lines: number;
  readonly cells: number;
  readonly refused: readonly PasteRefusal[];
}

export interface PasteRefusal {
  /** Line of the pasted text, from 1. */
  readonly line: number;
  readonly target: CellTarget;
  readonly text: string;
  readonly message: string;
}

/** Fresh ids that come with each action; as many as it may need. */
export interface Stamp {
  readonly by: string;
  readonly at: string;
  readonly ids: readonly string[];
  readonly branchId: string;
}

/** Where the cursor goes after an entry. */
export type CursorStep = "stay" | "next-row" | "right" | "left" | "up" | "down";

export type Step = CursorStep | "row-start" | "row-end" | "first" | "last";

export type EditorAction =
  | { readonly type: "commit"; readonly target: CellTarget; readonly text: string; readonly step: CursorStep; readonly stamp: Stamp }
  | { readonly type: "typing"; readonly target: CellTarget; readonly text: string | null; readonly stamp: Stamp }
  | { readonly type: "drop"; readonly target: CellTarget }
  | { readonly type: "cursor"; readonly target: CellTarget; readonly focus: boolean }
  | { readonly type: "step"; readonly step: Step }
  | { readonly type: "show-point"; readonly pointId: string; readonly focus: boolean }
  | { readonly type: "row-insert"; readonly target: CellTarget; readonly stamp: Stamp }
  | { readonly type: "row-remove"; readonly target: CellTarget; readonly stamp: Stamp }
  | { readonly type: "extend"; readonly step: "up" | "down" | "left" | "right" }
  | { readonly type: "stretch"; readonly target: CellTarget; readonly rows: boolean }
  | { readonly type: "pick-rows"; readonly runId: string; readonly from: number; readonly to: number }
  | { readonly type: "pick-run"; readonly runId: string }
  | { readonly type: "let-go" }
  | { readonly type: "row-double"; readonly target: CellTarget; readonly stamp: Stamp }
  | { readonly type: "clear"; readonly stamp: Stamp }
  | { readonly type: "cut"; readonly stamp: Stamp }
  | { readonly type: "fill"; readonly series: boolean; readonly stamp: Stamp }
  | { readonly type: "report-read" }
  | { readonly type: "row-move"; readonly target: CellTarget; readonly by: -1 | 1; readonly stamp: Stamp }
  | { readonly type: "point-patch"; readonly pointId: string; readonly patch: Partial<Omit<Point, "id">>; readonly stamp: Stamp }
  | { readonly type: "point-replace"; readonly point: Point; readonly stamp: Stamp }
  | { readonly type: "item-set"; readonly pointId: string; readonly item: Item; readonly stamp: Stamp }
  | { readonly type: "points-insert"; readonly runId: string; readonly row: number; readonly points: readonly Point[]; readonly patch: PointPatch | null; readonly stamp: Stamp }
  | { readonly type: "document-patch"; readonly patch: Partial<Pick<RunDocument, "settings" | "view" | "notes" | "sheetNotes" | "sheets" | "number" | "title" | "runs">>; readonly stamp: Stamp }
  | { readonly type: "paste"; readonly target: CellTarget; readonly text: string; readonly stamp: Stamp }
  | { readonly type: "replace"; readonly document: RunDocument; readonly stamp: Stamp }
  | { readonly type: "undo" }
  | { readonly type: "redo" };

/** A change of one point that goes with an insertion (the point after it moves, say). */
export interface PointPatch {
  readonly pointId: string;
  readonly patch: Partial<Omit<Point, "id">>;
}
