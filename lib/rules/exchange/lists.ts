/** Materials, cut list and weld list of one or more sheets as values: the same rows the sheet prints, numbers as numbers. */
import { buildModel, formatAngleDeg, formatInches, formatLength, formatTerm, formatWeight, INCH_MM, pipeSizeText, sheetFacts } from "@/iso";
import type { CutTerm, Joint, MaterialRow, Model, Piece, SheetFacts, SheetInput, UnitSystem } from "@/iso";
import type { Cell } from "./csv-cells";
import { LAYOUT_CAUTION, ORIGIN_COLUMNS, originCells, originFacts, type ListColumn, type ListTable } from "./list-table";

export type ListName = "materials" | "cuts" | "welds";

export const LIST_TITLES: Readonly<Record<ListName, string>> = { materials: "Materials", cuts: "Cut list", welds: "Weld list" };

const CAUTIONS: Readonly<Record<ListName, readonly string[]>> = {
  materials: ["Confirm heat number or PMI of every part: look-alike elbows get swapped. Weights are empty estimates."],
  cuts: ["VERIFY BY TAPE, TWO READINGS, BEFORE CUTTING. Take-outs are nominal: measure the fitting in hand. Gap, land and bevel as the WPS says."],
  welds: ["FW field weld, FFW field-fit weld: do not pull, jack or heat pipe to fit. Hot work: permit, isolate, gas test, fire watch."],
};

/** The list of these sheets, in their order; all of one line, so of one unit system. */
export function listTable(name: ListName, inputs: readonly SheetInput[]): ListTable {
  const units = inputs[0]?.units ?? "imperial";
  const facts = factsOfAll(inputs);
  const { columns, rows } = LISTS[name];
  return {
    title: LIST_TITLES[name],
    columns: [...columns(units), ...ORIGIN_COLUMNS],
    rows: facts.flatMap((of) => rows(of).map((row) => [...row, ...originCells(of.input)])),
    facts: originFacts(inputs),
    cautions: [...CAUTIONS[name], LAYOUT_CAUTION],
  };
}

/** One model for all sheets that share their document, marks and take-outs. */
function factsOfAll(inputs: readonly SheetInput[]): SheetFacts[] {
  const models = new Map<SheetInput["document"], Model>();
  return inputs.map((input) => {
    const model = models.get(input.document) ?? buildModel(input.document, input.marks, input.takeOuts);
    models.set(input.document, model);
    return sheetFacts(input, model);
  });
}

interface ListKind {
  readonly columns: (units: UnitSystem) => readonly ListColumn[];
  readonly rows: (facts: SheetFacts) => (readonly Cell[])[];
}

const lengthUnit = (units: UnitSystem): string => (units === "metric" ? "mm" : "in");

const LISTS: Readonly<Record<ListName, ListKind>> = {
  materials: {
    columns: (units) => [
      { head: "Item", width: 7 }, { head: "Quantity", width: 11 }, { head: `Unit`, width: 7 }, { head: "Quantity as printed", width: 20 }, { head: "Size", width: 16 },
      { head: "Description", width: 40 }, { head: "Material", width: 20 }, { head: `Weight, ${units === "metric" ? "kg" : "lb"}`, width: 12 },
    ],
    rows: (facts) => (facts.spool?.materials ?? []).map((row) => materialCells(row, facts.input.units)),
  },
  cuts: {
    columns: (units) => [
      { head: "Mark", width: 8 }, { head: "Size", width: 16 }, { head: "Material", width: 16 }, { head: "Arithmetic", width: 60 },
      { head: `Cut length, ${lengthUnit(units)}: verify by tape, two readings`, width: 22 }, { head: "Cut length as printed", width: 20 }, { head: "Ends", width: 16 }, { head: "Remarks", width: 34 },
    ],
    rows: (facts) => facts.pieces.map((piece) => pieceCells(piece, facts)),
  },
  welds: {
    columns: () => [
      { head: "Weld", width: 8 }, { head: "Type", width: 18 }, { head: "Place", width: 9 }, { head: "Size", width: 12 }, { head: "Between", width: 34 }, { head: "And", width: 34 },
      { head: "Mismatch, degrees", width: 12 }, { head: "Remarks", width: 34 },
    ],
    rows: (facts) => [...facts.welds.map((weld) => weldCells(weld, facts)), ...voidCells(facts.input)],
  },
};

/** Four decimals: a sixteenth of an inch is 0.0625. */
const DECIMALS = 10_000;
const rounded = (value: number, per: number): number => Math.round(value * per) / per;

function materialCells(row: MaterialRow, units: UnitSystem): readonly Cell[] {
  const pipe = row.unit === "mm";
  const quantity = !pipe ? row.quantity : units === "metric" ? Math.round(row.quantity) : rounded(row.quantity / INCH_MM, 16);
  const printed = !pipe ? `${row.quantity} ea` : units === "metric" ? `${formatLength(row.quantity, units)} mm` : formatLength(row.quantity, units);
  const weight = row.weightKg === null ? null : weightNumber(row.weightKg, units);
  return [row.item, quantity, pipe ? lengthUnit(units) : "ea", printed, row.size, row.description, row.material, weight];
}

/** The number of the weight as printed, so that file and sheet agree. */
function weightNumber(kg: number, units: UnitSystem): number | null {
  const value = Number.parseFloat(formatWeight(kg, units));
  return Number.isFinite(value) ? value : null;
}

function pieceCells(piece: Piece, { input, legs }: SheetFacts): readonly Cell[] {
  const { units } = input;
  const fits = piece.cutLengthMm > 0;
  const length = units === "metric" ? Math.round(piece.cutLengthMm) : rounded(piece.cutLengthMm / INCH_MM, 16);
  const printed = units === "metric" ? formatLength(piece.cutLengthMm, units) : formatInches(piece.cutLengthMm);
  const unverified = legs.some((leg) => (piece.legIds ?? [piece.legId]).includes(leg.id) && leg.unverified);
  const remarks = [unverified ? "VIF: dimension not verified" : "", piece.terms.some((term) => term.unconfirmed) ? "* take-out from memory, not confirmed by the shop" : "", piece.terms.some((term) => term.kind === "trim") ? "trim included" : ""];
  const [a, b] = piece.ends;
  return [
    piece.mark, pipeSizeText(piece.nps, piece.schedule, units), piece.material, piece.terms.map((term, index) => termText(term, index, units)).join(" "),
    fits ? rounded(length, DECIMALS) : null, fits ? printed : "DOES NOT FIT", a.prep === b.prep ? a.prep : `${a.prep}, ${b.prep}`, remarks.filter((each) => each !== "").join("; "),
  ];
}

/** "37 1/2 face to centre", "- 6 LR 90 take-out", "+ 6 trim": one after the other they read as the sum. */
function termText(term: CutTerm, index: number, units: UnitSystem): string {
  const sign = term.valueMm < 0 ? "- " : index === 0 ? "" : "+ ";
  const words = term.label.replace(/^[\d\s/.'"-]+(?=[A-Za-z])/, "");
  return `${sign}${formatTerm(Math.abs(term.valueMm), units)}${term.unconfirmed ? "*" : ""} ${words}`;
}

const TYPES: Readonly<Record<Joint["kind"], string>> = {
  butt: "butt", socket: "socket fillet", "slip-on": "slip-on fillets", branch: "branch", mitre: "mitre butt", attachment: "attachment", threaded: "threaded", bolted: "bolted",
};
const PLACES: Readonly<Record<Joint["place"], string>> = { shop: "SHOP", field: "FW", "field-fit": "FFW" };

function weldCells(weld: Joint, facts: SheetFacts): readonly Cell[] {
  const names = new Map<string, string>([
    ...facts.model.components.map((component) => [component.id, component.description] as const),
    ...facts.model.pieces.map((piece) => [piece.key, `pipe ${piece.mark}`] as const),
  ]);
  const name = (id: string | null): string => (id === null ? "field" : (names.get(id) ?? "part"));
  const degrees = Number.parseFloat(formatAngleDeg(weld.mismatchRad));
  return [weld.number, TYPES[weld.kind], PLACES[weld.place], pipeSizeText(weld.nps, null, facts.input.units), name(weld.a), name(weld.b), Number.isFinite(degrees) ? degrees : null, ""];
}

/** Numbers of welds that are gone stay listed, for ever. */
function voidCells(input: SheetInput): (readonly Cell[])[] {
  return input.marks.voided.filter((mark) => mark.kind === "weld").map((mark) => [mark.mark, "", "", "", "", "", null, "VOID"]);
}
