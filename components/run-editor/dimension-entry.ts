/** Editing a number where it stands on the drawing: which row it belongs to, and what its Move cell gets. Pure. */
import { parseLength, type Ref, type RunDocument } from "@/iso";
import type { CellTarget } from "./cell-commit";
import { straightOnAt } from "./cell-commit";
import { pointPlace, runOf } from "./document-edits";
import { refused, understood, type EntryResult } from "./entry-result";
import { parseMove } from "./move-entry";
import { moveText, straightOnOf } from "./move-text";

export interface DimensionEdit {
  readonly target: CellTarget;
  readonly pointId: string;
  /** What the field starts with: the length alone where the leg has one direction, else the whole move. */
  readonly text: string;
  /** What goes before and after a bare length to make the move again. */
  readonly before: string;
  readonly after: string;
}

export const OVERALL_WORDS = "An overall number: it follows from its parts. Change one of those.";

/** True for a number that is the sum of others. */
export function isOverall(ref: Ref): boolean {
  return ref.kind === "dimension" && ref.id.includes("..");
}

/** How a point's number is edited in place; null when the point is gone or starts its line. */
export function dimensionEdit(document: RunDocument, pointId: string): DimensionEdit | null {
  const place = pointPlace(document, pointId);
  const point = place ? runOf(document, place.runId)?.points[place.row] : null;
  if (!place || !point) return null;
  const target: CellTarget = { ...place, column: "move" };
  const { offset } = point;
  const whole = moveText(offset);
  if (offset.kind === "polar" || offset.kind === "slope") {
    const after = offset.kind === "slope" ? ` @ ${offset.slope.text}` : "";
    return { target, pointId, text: offset.length.text, before: `${offset.direction.text.toLowerCase()} `, after };
  }
  const straight = straightOnOf(offset);
  const single = straight ? new RegExp(`^${straight.text} (.+)$`, "i").exec(whole) : null;
  return single ? { target, pointId, text: single[1] ?? "", before: `${straight?.text.toLowerCase()} `, after: "" } : { target, pointId, text: whole, before: "", after: "" };
}

/** The Move text a typed number makes: a bare length keeps the leg's direction and slope, anything else is a move of its own. */
export function dimensionMove(document: RunDocument, edit: DimensionEdit, typed: string): EntryResult<string> {
  const { units } = document.settings;
  if (typed.trim() === "") return refused("Type the number, or leave it with Esc.");
  const bare = edit.before !== "" && parseLength(typed, units).ok;
  const text = bare ? `${edit.before}${typed.trim()}${edit.after}` : typed;
  const read = parseMove(text, units, straightOnAt(document, edit.target.runId, edit.target.row));
  return read.ok ? understood(text, read.understood) : refused(read.message);
}
