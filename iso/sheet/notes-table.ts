/** Notes of a sheet: what the detailer wrote, what was accepted by name, what needs the engineer, what was cut elsewhere. */
import { formatAngleDeg } from "../units/format";
import type { MeasureText } from "../draw/drawing-types";
import { wrapText, PLAIN } from "./text-setting";
import { isWeldJoint } from "../draw/weld-joint";
import type { SheetFacts } from "./sheet-facts";
import type { Row, Table } from "./table";

/** Mismatch at a weld above this needs the engineer's word (TRADE.md, cautions), radians: 3 degrees. */
const MISMATCH_ASKS_RAD = (3 * Math.PI) / 180;

/** A text that was cut in the title block and is shown whole here. */
export interface CutText {
  readonly label: string;
  readonly text: string;
}

/** Notes numbered, each split into rows of one line so that a long one flows over columns and pages. */
export function notesTable(facts: SheetFacts, cut: readonly CutText[], widthMm: number, measure: MeasureText): Table | null {
  const notes = [...weldNotes(facts), ...documentNotes(facts), ...acceptedNotes(facts), ...engineerNotes(facts), ...problemNotes(facts), ...longRevisions(facts), ...cut.map(({ label, text }) => `${label}: ${text}`)];
  if (notes.length === 0) return null;
  const rows = notes.flatMap((note, index): Row[] => {
    const lines = wrapText(note, widthMm - NUMBER_WIDTH - 4, PLAIN, measure);
    return lines.map((text, line) => ({ cells: [line === 0 ? String(index + 1) : "", text], open: line < lines.length - 1 }));
  });
  return { title: "NOTES", lead: [], columns: [{ head: "", share: 0, minMm: NUMBER_WIDTH, align: "middle" }, { head: "", share: 1, minMm: 40 }], rows, foot: [] };
}

const NUMBER_WIDTH = 9;
/** Characters that surely fit a revision's cell. */
const LONG_DESCRIPTION = 120;

function documentNotes(facts: SheetFacts): string[] {
  const here = new Set([...facts.components.map((component) => component.pointId), ...facts.legs.flatMap((leg) => [leg.fromPointId, leg.toPointId])]);
  const ofPoints = facts.model.document.runs.flatMap((run) => run.points.filter((point) => here.has(point.id) && point.note.trim() !== "").map((point) => point.note));
  const ofSheet = (facts.model.document.sheetNotes ?? []).filter((note) => note.spool === facts.input.spool).map((note) => note.text);
  return [...facts.model.document.notes, ...ofSheet, ...ofPoints].map((note) => note.trim()).filter((note) => note !== "");
}

function acceptedNotes(facts: SheetFacts): string[] {
  const legIds = new Set(facts.legs.map((leg) => leg.id));
  return facts.input.revision.accepted
    .filter(({ pointId }) => legIds.has(pointId))
    .map(({ pointId, by }) => `Unverified dimension accepted by ${by}: ${marksOfLeg(facts, pointId)}.`);
}

function marksOfLeg(facts: SheetFacts, legId: string): string {
  const marks = facts.pieces.filter((piece) => piece.legId === legId).map((piece) => piece.mark);
  return marks.length === 0 ? "a leg of this spool" : marks.join(", ");
}

function engineerNotes(facts: SheetFacts): string[] {
  return facts.welds
    .filter((joint) => joint.kind !== "mitre" && joint.mismatchRad > MISMATCH_ASKS_RAD)
    .map((joint) => `Weld ${joint.number}: mismatch ${formatAngleDeg(joint.mismatchRad)}, over 3°. Engineer's permission needed.`);
}

/** One typical weld, and the exceptions by number, so that no joint needs a symbol of its own (AWS A2.4 practice). */
function weldNotes(facts: SheetFacts): string[] {
  const kinds = new Map<string, string[]>();
  for (const joint of facts.welds) if (joint.number !== null && isWeldJoint(joint)) kinds.set(joint.kind, [...(kinds.get(joint.kind) ?? []), joint.number]);
  const [typical, ...others] = [...kinds].sort((p, q) => q[1].length - p[1].length);
  if (!typical) return [];
  const exceptions = others.map(([kind, numbers]) => `${numbers.join(", ")} ${WELD_KIND_WORDS[kind] ?? kind}`);
  return [`TYPICAL WELD: ${WELD_KIND_WORDS[typical[0]] ?? typical[0]}, all around, to the WPS.${exceptions.length > 0 ? ` Except: ${exceptions.join("; ")}.` : ""}`];
}

const WELD_KIND_WORDS: Readonly<Record<string, string>> = {
  butt: "butt", socket: "socket fillet", "slip-on": "slip-on fillets", branch: "branch", mitre: "mitre butt",
};

/** Findings that stop a release are printed, so that no print looks better than the model behind it. */
function problemNotes(facts: SheetFacts): string[] {
  const here = new Set([...facts.components.map((component) => component.pointId), ...facts.legs.flatMap((leg) => [leg.fromPointId, leg.toPointId])]);
  return facts.model.problems
    .filter((problem) => problem.severity === "stop" && (problem.pointId === null || here.has(problem.pointId)))
    .map((problem) => `TO BE SOLVED: ${problem.text}`);
}

/** A revision's description longer than its cell, whole. */
function longRevisions(facts: SheetFacts): string[] {
  return facts.input.revision.rows.filter((row) => row.description.length > LONG_DESCRIPTION).map((row) => `REVISION ${row.code}: ${row.description}`);
}
