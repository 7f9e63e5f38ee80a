/** Tables of a spool besides the cut list: materials, welds, trimmed elbows. Cautions stand where the work is done. */
import { STRAIGHT_RAD } from "../geometry/tolerances";
import type { Vec3 } from "../geometry/types";
import { formatAngleDeg, formatDecimal, formatLength, formatTerm, formatWeight } from "../units/format";
import type { UnitSystem } from "../run/document";
import type { Component, Joint, MaterialRow, Spool } from "../run/model-types";
import { volumeLeftOut } from "../run/spool-volume";
import { outsideDiameterMm, sizeText, type SheetFacts } from "./sheet-facts";
import { weldsOf } from "./pipe-work-tables";
import type { Cell, Row, Table } from "./table";

/** Materials with quantities: pipe as the summed cut length, the rest counted. */
export function materialsTable(facts: SheetFacts): Table | null {
  const rows = facts.spool?.materials ?? [];
  if (rows.length === 0) return null;
  return {
    title: "MATERIALS",
    lead: [],
    columns: [
      { head: "ITEM", share: 0, minMm: 11, align: "middle" },
      { head: "QTY", share: 0, minMm: 22, align: "end" },
      { head: "SIZE", share: 0, minMm: roomFor(rows.map((row) => row.size), 15, 26) },
      { head: "DESCRIPTION", share: 1, minMm: 40 },
      { head: "MATERIAL", share: 0, minMm: roomFor(rows.map((row) => row.material), 22, 36) },
    ],
    rows: rows.map((row) => ({
      cells: [[{ text: String(row.item), face: "bold" }], quantityText(row, facts.input.units), row.size, row.description, row.material],
    })),
    foot: ["Confirm heat number or PMI of every part: look-alike elbows get swapped."],
  };
}

/** About what the longest of some texts takes on one line, within bounds, mm; a longer one wraps. */
function roomFor(texts: readonly string[], leastMm: number, mostMm: number): number {
  return Math.min(mostMm, Math.max(leastMm, Math.max(...texts.map((text) => text.length)) * MM_PER_CHARACTER + 2.4));
}

/** Mean advance of Roboto at TEXT_CAP in sizes and grades, rounded up, mm. */
const MM_PER_CHARACTER = 1.75;

function quantityText(row: MaterialRow, units: UnitSystem): string {
  if (row.unit === "ea") return `${formatDecimal(row.quantity, 0)} ea`;
  return units === "metric" ? `${formatDecimal(row.quantity, 0)} mm` : formatLength(row.quantity, units);
}

export const JOINT_WORDS: Readonly<Record<Joint["kind"], string>> = {
  butt: "butt", socket: "socket fillet", "slip-on": "slip-on fillets", branch: "branch", mitre: "mitre butt", attachment: "attachment",
  threaded: "threaded", bolted: "bolted",
};
export const PLACE_WORDS: Readonly<Record<Joint["place"], string>> = { shop: "SHOP", field: "FW", "field-fit": "FFW" };

/** Welds with blanks for who made and looked at them. */
export function weldsTable(facts: SheetFacts): Table | null {
  const voided = facts.input.marks.voided.filter((mark) => mark.kind === "weld");
  if (facts.welds.length === 0 && voided.length === 0) return null;
  return {
    title: "WELDS",
    lead: [],
    columns: [
      { head: "NO.", share: 0, minMm: 11, align: "middle" },
      { head: "TYPE", share: 1, minMm: 27 },
      { head: "PLACE", share: 0, minMm: 14 },
      { head: "SIZE", share: 0.5, minMm: 18 },
      { head: "WELDER", share: 1, minMm: 17 },
      { head: "DATE", share: 1, minMm: 13 },
      { head: "VISUAL", share: 1, minMm: 15 },
    ],
    rows: [
      ...facts.welds.map((joint) => weldRow(facts, joint)),
      ...voided.map((mark): Row => ({ cells: [[{ text: mark.mark, face: "bold" }], "VOID", "", "", "", "", ""], struck: true })),
    ],
    foot: fieldCautions(facts),
  };
}

function weldRow(facts: SheetFacts, joint: Joint): Row {
  const place: Cell = joint.place === "shop" ? PLACE_WORDS.shop : [{ text: PLACE_WORDS[joint.place], face: "bold" }];
  const type = joint.kind === "mitre" ? `${JOINT_WORDS.mitre}, cut ${formatAngleDeg(joint.mismatchRad / 2)}` : joint.mismatchRad < STRAIGHT_RAD ? JOINT_WORDS[joint.kind] : `${JOINT_WORDS[joint.kind]}, off ${formatAngleDeg(joint.mismatchRad)}`;
  return { cells: [[{ text: joint.number ?? "", face: "bold" }], type, place, sizeText(joint.nps, null, facts.input.units), "", "", ""] };
}

/** Cautions of field welds, printed where field welds are (do not force: ASME B31.3 335.1.1, from memory). */
export function fieldCautions(facts: SheetFacts): string[] {
  if (!facts.welds.some((joint) => joint.place !== "shop")) return [];
  return [
    "FW field weld, FFW field-fit weld: do not pull, jack or heat pipe to fit. Hot work: permit, isolate, gas test, fire watch.",
  ];
}

/**
 * Cutting marks of trimmed elbows: arc lengths on the surface from the kept face, theta in radians. Throat
 * (R - OD/2)·theta, both sides R·theta, back (R + OD/2)·theta; take-out R·tan(theta/2) (common practice).
 */
export function trimmedElbowsTable(facts: SheetFacts): Table | null {
  const elbows = facts.components.filter((component) => component.kind === "trimmed-elbow");
  if (elbows.length === 0) return null;
  return {
    title: "TRIMMED ELBOWS, MARKS ON THE SURFACE",
    lead: ["Trimmed fitting: confirm it is permitted (engineer). Measure from the face kept; cut square to the arc."],
    columns: [
      { head: "ELBOW", share: 3, minMm: 52 },
      { head: "ANGLE KEPT", share: 1, minMm: 25 },
      { head: "TAKE-OUT", share: 1, minMm: 22 },
      { head: "THROAT", share: 1, minMm: 20 },
      { head: "SIDES", share: 1, minMm: 20 },
      { head: "BACK", share: 1, minMm: 20 },
    ],
    rows: elbows.map((elbow) => trimmedRow(facts, elbow)),
    foot: [],
  };
}

function trimmedRow(facts: SheetFacts, elbow: Component): Row {
  const { units } = facts.input;
  const name = [{ text: elbow.description }, { text: weldsOf(facts, elbow) }];
  const od = outsideDiameterMm(facts, elbow.nps);
  if (elbow.angleRad === null || elbow.radiusMm === null || od === null) return { cells: [name, "not known", "", "", "", ""] };
  const arc = (radiusMm: number) => formatTerm(radiusMm * elbow.angleRad!, units);
  const takeOut = formatTerm(elbow.radiusMm * Math.tan(elbow.angleRad / 2), units);
  return {
    cells: [name, formatAngleDeg(elbow.angleRad), takeOut, arc(elbow.radiusMm - od / 2), arc(elbow.radiusMm), arc(elbow.radiusMm + od / 2)],
  };
}

/** Weight, contents and surface of the spool, each with what it leaves out; insulation is never guessed. */
export function weightTable(facts: SheetFacts): Table | null {
  const { spool } = facts;
  if (!spool) return null;
  return {
    title: "WEIGHT AND CONTENTS",
    lead: ["Weight is an empty estimate, centre of gravity off-centre. Insulation, lining and supports are not in it."],
    columns: [{ head: "", share: 0, minMm: 27 }, { head: "", share: 1, minMm: 40 }],
    rows: weightRows(facts, spool).map(([label, value]) => ({ cells: [label, [{ text: value, face: "bold" as const }]] })),
    foot: [],
  };
}

function weightRows(facts: SheetFacts, spool: Spool): (readonly [string, string])[] {
  const { units } = facts.input;
  const unweighed = facts.components.filter((c) => c.weightKg === null).map((c) => c.description);
  const leftOut = volumeLeftOut(facts.components, units).map((kind) => kind.replace(/^flange-(.*)$/, "$1 flange").replace(/-/g, " "));
  const shop = facts.components.filter((c) => c.weightSource === "weighed by the shop").length;
  const empty = [
    formatWeight(spool.weightKg, units), ...(shop === 0 ? [] : [`${shop} part${shop === 1 ? "" : "s"} by the shop's scale`]),
    ...(unweighed.length === 0 ? [] : [`not weighed: ${countedText(unweighed)}`]),
  ];
  const filled = spool.volumeL === undefined || spool.filledKg === undefined ? [] : [
    `${formatWeight(spool.filledKg, units)}, ${volumeText(spool.volumeL, units)}`, ...(leftOut.length === 0 ? [] : [`not filled: ${leftOut.join(", ")}`]),
  ];
  return [
    ["EMPTY", empty.join("; ")],
    ...(spool.centreOfGravity ? [["BALANCES AT", centreText(facts, spool.centreOfGravity)] as const] : []),
    ...(filled.length === 0 ? [] : [["WATER-FILLED", filled.join("; ")] as const]),
    ...(spool.paintM2 === undefined ? [] : [["BARE SURFACE", `${surfaceText(spool.paintM2, units)}, pipe and butt-weld fittings`] as const]),
  ];
}

/** "Gate valve, flanged (2), outlet": each once, with how many. */
function countedText(names: readonly string[]): string {
  const counts = new Map<string, number>();
  for (const name of names) counts.set(name, (counts.get(name) ?? 0) + 1);
  return [...counts].map(([name, count]) => (count === 1 ? name : `${name} (${count})`)).join("; ");
}

/** Where the weighed parts balance, from the spool's first working point: east, north, up. */
function centreText(facts: SheetFacts, at: Vec3): string {
  const first = facts.legs[0]?.from ?? facts.components[0]?.centre;
  if (!first) return "not known";
  const axes = [["E", "W"], ["N", "S"], ["UP", "DOWN"]] as const;
  const parts = axes.map(([plus, minus], i) => {
    const mm = at[i]! - first[i]!;
    return `${formatLength(Math.abs(mm), facts.input.units)} ${mm < 0 ? minus : plus}`;
  });
  return `${parts.join(", ")} of the first leg's start`;
}

const LITRES_PER_GALLON = 3.785411784;
const FEET2_PER_M2 = 10.76391041671;

function volumeText(litres: number, units: UnitSystem): string {
  return units === "metric" ? `${formatDecimal(litres, 1)} L` : `${formatDecimal(litres / LITRES_PER_GALLON, 1)} gal`;
}

function surfaceText(m2: number, units: UnitSystem): string {
  return units === "metric" ? `${formatDecimal(m2, 2)} m²` : `${formatDecimal(m2 * FEET2_PER_M2, 1)} sq ft`;
}
