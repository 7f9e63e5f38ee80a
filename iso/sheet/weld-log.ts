/**
 * The log under a weld map: one row a joint, blanks to write in or what the work record says. One number, one joint, for
 * ever: a void weld stays listed; a weld made again after a rejected look is a repair (TRADE.md, quality; common practice).
 */
import { STRAIGHT_RAD } from "../geometry/tolerances";
import type { Joint } from "../run/model-types";
import { formatAngleDeg } from "../units/format";
import type { SheetSetExtras, WorkRecord } from "./set-types";
import { sizeText, type SheetFacts } from "./sheet-facts";
import { fieldCautions, JOINT_WORDS, PLACE_WORDS } from "./spool-tables";
import type { Cell, CellLine, Column, Row, Table } from "./table";
import { issuedText } from "./title-fields";

/** Room to write in by hand, mm. */
const ROW_HEIGHT = 9.6;

const COLUMNS: readonly Column[] = [
  { head: "WELD", share: 0, minMm: 12.6, align: "middle" }, { head: "TYPE", share: 1, minMm: 17.4 }, { head: "SIZE", share: 0.6, minMm: 20 }, { head: "PLACE", share: 0, minMm: 14 },
  { head: "WPS, REV", share: 1, minMm: 19.4 }, { head: "HEAT A", share: 1, minMm: 21 }, { head: "HEAT B", share: 1, minMm: 21 }, { head: "FIT-UP BY, DATE", share: 1, minMm: 22 },
  { head: "WELDER", share: 1, minMm: 18 }, { head: "DATE", share: 0, minMm: 21.6 }, { head: "VISUAL", share: 1, minMm: 21.6 }, { head: "NDE", share: 1, minMm: 14 }, { head: "REPAIRS", share: 0.4, minMm: 17.6 },
];

/** The log, or null when the spool has no weld and had none. */
export function weldLogTable(facts: SheetFacts, { work }: SheetSetExtras): Table | null {
  const voided = facts.input.marks.voided.filter((mark) => mark.kind === "weld");
  if (facts.welds.length === 0 && voided.length === 0) return null;
  const entries = work?.entries ?? [];
  const byKey = new Map<string, WorkRecord[]>();
  for (const entry of entries) byKey.set(entry.key, [...(byKey.get(entry.key) ?? []), entry]);
  const told = work ? (entries.length > 0 ? `As recorded ${issuedText(work.readAt)}; nothing later is in it.` : `Nothing recorded by ${issuedText(work.readAt)}.`) : "A blank log: what was recorded is not shown.";
  const nde = facts.model.document.settings.asEntered.nde.trim();
  return {
    title: "WELD LOG",
    lead: [`${told} NDE as entered, per owner's specification: ${nde === "" ? "not entered" : nde}. Heat A is the upstream side, B the downstream. Confirm heat number or PMI: look-alike elbows get swapped.`],
    columns: COLUMNS,
    rows: [
      ...facts.welds.map((joint) => rowOf(facts, joint, byKey)),
      ...voided.map(({ mark }): Row => ({ cells: [[{ text: mark, face: "bold" }], "VOID", ...COLUMNS.slice(2).map(() => "")], struck: true })),
    ],
    foot: fieldCautions(facts),
  };
}

function rowOf(facts: SheetFacts, joint: Joint, byKey: ReadonlyMap<string, readonly WorkRecord[]>): Row {
  const mine = byKey.get(joint.key) ?? [];
  const last = (kind: WorkRecord["kind"]) => mine.filter((entry) => entry.kind === kind).at(-1);
  const [fitUp, weld, visual] = [last("fit-up"), last("weld"), last("visual")];
  const heat = (side: string | null, entered: string | undefined): string => entered || (side === null ? "" : (cutOf(byKey, side)?.values.heat ?? ""));
  return {
    leastMm: ROW_HEIGHT,
    cells: [
      [{ text: joint.number ?? "", face: "bold", capMm: 3 }], typeText(joint), sizeText(joint.nps, scheduleOf(facts, joint), facts.input.units),
      joint.place === "shop" ? PLACE_WORDS.shop : [{ text: PLACE_WORDS[joint.place], face: "bold" }],
      weld?.values.procedure ?? "", heat(joint.a, weld?.values.heatA), heat(joint.b, weld?.values.heatB),
      fitUp ? [{ text: fitUp.by }, { text: day(fitUp) }] : "", weld?.values.welder ?? "", weld ? day(weld) : "", visualCell(visual), "", repairText(mine),
    ],
  };
}

const day = ({ at }: WorkRecord): string => at.slice(0, 10);

function cutOf(byKey: ReadonlyMap<string, readonly WorkRecord[]>, key: string): WorkRecord | undefined {
  return byKey.get(key)?.filter(({ kind }) => kind === "cut").at(-1);
}

function typeText({ kind, mismatchRad }: Joint): string {
  if (kind === "mitre") return `${JOINT_WORDS.mitre}, cut ${formatAngleDeg(mismatchRad / 2)}`;
  return mismatchRad < STRAIGHT_RAD ? JOINT_WORDS[kind] : `${JOINT_WORDS[kind]}, off ${formatAngleDeg(mismatchRad)}`;
}

/** Schedule of the pipe at the joint, else of the fitting; null when neither has one. */
function scheduleOf({ model }: SheetFacts, { a, b }: Joint): string | null {
  const ids = [a, b].filter((id) => id !== null);
  const piece = model.pieces.find(({ key }) => ids.includes(key));
  return piece?.schedule ?? model.components.find(({ id, schedule }) => ids.includes(id) && schedule !== null)?.schedule ?? null;
}

function visualCell(visual: WorkRecord | undefined): Cell {
  if (!visual) return "";
  const result: CellLine = { text: visual.values.result ?? "", face: "bold", ink: visual.values.result === "rejected" ? "alert" : "ink" };
  return [result, { text: visual.by }, { text: day(visual) }];
}

/** Welds recorded after a rejected look, R1, R2; an entry that follows no reject is a correction. */
function repairText(entries: readonly WorkRecord[]): string {
  let [repairs, rejected] = [0, false];
  for (const { kind, values } of entries) {
    if (kind === "visual") rejected = values.result === "rejected";
    else if (kind === "weld" && rejected) [repairs, rejected] = [repairs + 1, false];
  }
  const made = Array.from({ length: repairs }, (_, i) => `R${i + 1}`).join(", ");
  return rejected ? [made, "to repair"].filter((text) => text !== "").join(", ") : made;
}
