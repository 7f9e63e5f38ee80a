/** Notes of one spool's sheet within a run document. Pure. */
import type { RunDocument } from "@/iso";

const MOST_NOTES = 40;
const NOTE_LIMIT = 2_000;
/** Most notes of all sheets together that a document holds. */
const MOST_SHEET_NOTES = 200;

type SheetNotes = NonNullable<RunDocument["sheetNotes"]>;

/** One note a line; empty lines are none. */
export function linesOfNotes(text: string): readonly string[] {
  return text.split("\n").map((note) => note.trim().slice(0, NOTE_LIMIT)).filter((note) => note !== "").slice(0, MOST_NOTES);
}

export function notesOfSpool(document: RunDocument, spool: string): readonly string[] {
  return (document.sheetNotes ?? []).filter((note) => note.spool === spool).map((note) => note.text);
}

/** The sheet notes with those of one spool replaced; undefined when none is left, as in a document that never had any. */
export function withSpoolNotes(document: RunDocument, spool: string, notes: readonly string[]): SheetNotes | undefined {
  const others = (document.sheetNotes ?? []).filter((note) => note.spool !== spool);
  const all = [...others, ...notes.map((text) => ({ spool, text }))].slice(0, MOST_SHEET_NOTES);
  return all.length === 0 ? undefined : all;
}
