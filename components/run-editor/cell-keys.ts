/** What a key means in a cell. Pure, so that every key of the help panel is tested without a screen. */
import type { CursorStep } from "./editor-types";

export interface KeyPress {
  readonly key: string;
  readonly ctrl: boolean;
  readonly shift: boolean;
  readonly alt: boolean;
}

export interface CellMood {
  /** A text is being typed or edited; arrows then belong to the text. */
  readonly editing: boolean;
  /** The list of items is open under the cell. */
  readonly listOpen: boolean;
  /** A row of the list is picked out. */
  readonly picked: boolean;
  /** First cell of the first row, last cell of the last one: Tab leaves the grid there. */
  readonly first: boolean;
  readonly last: boolean;
  /** More than this cell is picked out. */
  readonly block: boolean;
  /** A question mark is an ordinary character there. */
  readonly freeText: boolean;
}

export type KeyIntent =
  | { readonly kind: "commit"; readonly step: CursorStep }
  | { readonly kind: "take"; readonly step: CursorStep }
  | { readonly kind: "step"; readonly step: "row-start" | "row-end" | "first" | "last" }
  | { readonly kind: "list"; readonly by: 1 | -1 }
  | { readonly kind: "move"; readonly by: 1 | -1 }
  | { readonly kind: "extend"; readonly step: "up" | "down" | "left" | "right" }
  | { readonly kind: "fill"; readonly series: boolean }
  | { readonly kind: "pick-rows"; readonly all: boolean }
  | { readonly kind: "clear" | "let-go" | "double" }
  | { readonly kind: "insert" | "remove" | "undo" | "redo" | "edit" | "cancel" | "leave" | "help" };

/** The intent of a key, or null when the browser should do what it does. */
export function keyIntent(press: KeyPress, mood: CellMood): KeyIntent | null {
  if (press.ctrl) return withControl(press, mood);
  if (press.alt) return withAlt(press);
  if (press.shift && !mood.editing) {
    const stretch = stretched(press, mood);
    if (stretch) return stretch;
  }
  switch (press.key) {
    case "Enter": return { kind: mood.picked ? "take" : "commit", step: press.shift ? "up" : "next-row" };
    case "Tab": return tabbed(press, mood);
    case "ArrowDown": return mood.listOpen ? { kind: "list", by: 1 } : { kind: "commit", step: "down" };
    case "ArrowUp": return mood.listOpen ? { kind: "list", by: -1 } : { kind: "commit", step: "up" };
    case "ArrowLeft": return mood.editing ? null : { kind: "commit", step: "left" };
    case "ArrowRight": return mood.editing ? null : { kind: "commit", step: "right" };
    case "Home": return mood.editing ? null : { kind: "step", step: "row-start" };
    case "End": return mood.editing ? null : { kind: "step", step: "row-end" };
    case "F2": return { kind: "edit" };
    case "Escape": return { kind: mood.editing ? "cancel" : mood.block ? "let-go" : "leave" };
    case "Delete": case "Backspace": return mood.block && !mood.editing ? { kind: "clear" } : null;
    case "?": return mood.editing || mood.freeText ? null : { kind: "help" };
    default: return null;
  }
}

/** Shift stretches the block from cell to cell; with the space bar it takes the whole row. */
function stretched(press: KeyPress, mood: CellMood): KeyIntent | null {
  switch (press.key) {
    case "ArrowUp": return mood.listOpen ? null : { kind: "extend", step: "up" };
    case "ArrowDown": return mood.listOpen ? null : { kind: "extend", step: "down" };
    case "ArrowLeft": return { kind: "extend", step: "left" };
    case "ArrowRight": return { kind: "extend", step: "right" };
    case " ": return { kind: "pick-rows", all: false };
    default: return null;
  }
}

function tabbed(press: KeyPress, mood: CellMood): KeyIntent | null {
  if (!mood.editing && (press.shift ? mood.first : mood.last)) return null;
  return { kind: mood.picked && !press.shift ? "take" : "commit", step: press.shift ? "left" : "right" };
}

function withControl(press: KeyPress, mood: CellMood): KeyIntent | null {
  switch (press.key) {
    case "Enter": return { kind: "insert" };
    case "Delete": return { kind: "remove" };
    case "Home": return { kind: "step", step: "first" };
    case "End": return { kind: "step", step: "last" };
    case "d": case "D": return { kind: "fill", series: press.shift };
    case "a": case "A": return mood.editing ? null : { kind: "pick-rows", all: true };
    case "z": return mood.editing ? { kind: "cancel" } : { kind: press.shift ? "redo" : "undo" };
    case "Z": return { kind: "redo" };
    case "y": return mood.editing ? null : { kind: "redo" };
    default: return null;
  }
}

function withAlt(press: KeyPress): KeyIntent | null {
  if (press.key === "ArrowDown" && press.shift) return { kind: "double" };
  if (press.key === "ArrowUp") return { kind: "move", by: -1 };
  if (press.key === "ArrowDown") return { kind: "move", by: 1 };
  return null;
}

/** The help panel's list, in the order a beginner needs it. */
export const KEY_HELP: readonly { readonly keys: readonly string[]; readonly does: string }[] = [
  { keys: ["Enter"], does: "takes the entry and goes to the next row's Move" },
  { keys: ["Tab"], does: "takes it and goes to the next cell; Shift+Tab back" },
  { keys: ["↑", "↓", "←", "→"], does: "go from cell to cell; while typing, left and right move in the text" },
  { keys: ["Home", "End"], does: "first and last cell of the row; with Ctrl first and last row" },
  { keys: ["F2"], does: "edits the text in the cell; in Item it opens the list" },
  { keys: ["Esc"], does: "drops what was typed; once more leaves the grid" },
  { keys: ["Shift+↑", "Shift+↓", "Shift+←", "Shift+→"], does: "pick out a block of cells; so does a press with Shift held" },
  { keys: ["Shift+Space"], does: "picks out the whole row; Ctrl+A all rows of the run" },
  { keys: ["Ctrl+C", "Ctrl+X", "Ctrl+V"], does: "copy, cut and paste cells or rows, also from and to a spreadsheet: Move, Item, Joint, Source, Note" },
  { keys: ["Ctrl+D"], does: "fills down: the block from its top row, or a cell from the one above" },
  { keys: ["Ctrl+Shift+D"], does: "fills a series: N1, N2, N3; e 1-0, e 2-0, e 3-0" },
  { keys: ["Delete"], does: "empties the cells of a block" },
  { keys: ["Ctrl+Enter"], does: "puts a row in above, or as many as are picked out" },
  { keys: ["Alt+Shift+↓"], does: "doubles the row, or the rows picked out, below" },
  { keys: ["Ctrl+Delete"], does: "takes the row or the rows picked out, with their branches" },
  { keys: ["Alt+↑", "Alt+↓"], does: "move the row or the rows picked out" },
  { keys: ["Ctrl+Z", "Ctrl+Y"], does: "undo and redo, one entry, paste, fill or move at a time" },
  { keys: ["?"], does: "shows this help" },
];
