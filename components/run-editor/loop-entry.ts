/** A run that comes back to its line: "meet 7" in the Item cell of its last row closes a loop at the fitting of row 7. */
import { isBranchFitting, type RunDocument } from "@/iso";
import { pointPlace, runOf } from "./document-edits";
import { refused, understood, type EntryResult } from "./entry-result";

const MEET = /^(?:meets?|loop)\b\s*(.*)$/i;
/** "7" is a row of the main run, "b2 3" row 3 of branch 2. */
const ROW_NAME = /^(?:b(?:ranch)?\s*(\d+)\s*[.\s:]\s*)?(?:row\s*)?(\d+)$/i;
const HINT = "Type meet and the row of the fitting the run comes back to: meet 7, or meet b2 3 for row 3 of branch 2.";

/** True when an Item cell's text speaks of closing a loop. */
export function isMeet(text: string): boolean {
  return MEET.test(text.trim());
}

/** Reads "meet 7". @returns the id of the point met. */
export function parseMeet(document: RunDocument, runId: string, row: number, text: string): EntryResult<string> {
  const name = ROW_NAME.exec((MEET.exec(text.trim())?.[1] ?? "").trim());
  if (!name) return refused(HINT);
  const run = document.runs[Number(name[1] ?? 0)];
  const point = run?.points[Number(name[2]) - 1];
  const own = runOf(document, runId);
  if (own && row < own.points.length - 1) return refused("A loop closes in the last row of its run.");
  if (!point) return refused(`There is no such row. ${HINT}`);
  if (!isBranchFitting(point.item)) return refused("There has to be a tee, a cross, an outlet or a stub-in in the row that is met.");
  return understood(point.id, meetEcho(rowName(document, point.id)));
}

/** How a row is named in "meet": "7" or "b2 3"; "" when the point is gone. */
export function rowName(document: RunDocument, pointId: string): string {
  const place = pointPlace(document, pointId);
  if (!place) return "";
  const branch = document.runs.findIndex((run) => run.id === place.runId);
  return branch === 0 ? String(place.row + 1) : `b${branch} ${place.row + 1}`;
}

/** The row a run's last row meets, by its name; null elsewhere. */
export function meetsAt(document: RunDocument, runId: string, row: number): string | null {
  const run = runOf(document, runId);
  return run?.to && row === run.points.length - 1 ? rowName(document, run.to) : null;
}

export function meetEcho(name: string): string {
  const branch = /^b(\d+) (\d+)$/.exec(name);
  return `comes back to ${branch ? `row ${branch[2]} of branch ${branch[1]}` : `row ${name}`}, which closes a loop`;
}

/** The document with a run's end set; null lets the run end by itself. */
export function withMeet(document: RunDocument, runId: string, pointId: string | null): RunDocument {
  const run = runOf(document, runId);
  if (!run || (run.to ?? null) === pointId) return document;
  const { to: _before, ...open } = run;
  return { ...document, runs: document.runs.map((each) => (each === run ? (pointId === null ? open : { ...open, to: pointId }) : each)) };
}
