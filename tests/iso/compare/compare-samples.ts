/** Pairs of sheets to compare: a frozen one and the same after planted edits. */
import { buildModel, emptyMarks, nextMarks, type Item, type Point, type RunDocument, type SheetInput, type SheetSize } from "@/iso";

/** A sheet input of a document's first spool; marks follow those of the sheet before, so that numbers stick. */
export function sheetOf(document: RunDocument, before: SheetInput | null = null, more: Partial<SheetInput["revision"]> & { readonly size?: SheetSize; readonly spool?: string } = {}): SheetInput {
  const { size = "tabloid", spool, ...revision } = more;
  const marks = before === null ? { ...nextMarks(document, emptyMarks(), []), sticky: true } : nextMarks(document, before.marks, []);
  return {
    version: 1, document, marks, takeOuts: [], spool: spool ?? before?.spool ?? buildModel(document, marks, []).spools[0]?.letter ?? "A", size, units: document.settings.units,
    titleBlock: { shopName: "Copper Bay Pipe Works", client: "Harbor Utilities", project: "Pump house", jobNumber: "26-114", area: "2", fields: [], logo: null },
    revision: {
      sheetNumber: "CB-0107", code: before === null ? "A" : "B", state: before === null ? "superseded" : "for-fabrication", hold: false, rows: [],
      drawnBy: "Miles Hart", checkedBy: "Ingrid Solberg", issuedAt: "2026-11-20T15:04:00.000Z", statusUrl: "https://shop.example/status/abc", auditHead: "0011223344556677",
      changedPointIds: [], accepted: [], ...revision,
    },
  };
}

/** The document after a change of a copy of it. */
export function edited(document: RunDocument, change: (copy: Editable) => void): RunDocument {
  const copy = structuredClone(document) as Editable;
  change(copy);
  return copy as RunDocument;
}

type Deep<T> = T extends object ? { -readonly [K in keyof T]: Deep<T[K]> } : T;
export type Editable = Deep<RunDocument>;

/** A point of the main run made anew at an offset, mm. */
export function newPointAt(id: string, [e, n, u]: readonly [number, number, number], item: Item = { kind: "none" }): Point {
  const entry = (mm: number) => ({ text: `${mm}mm`, mm });
  return {
    id, offset: { kind: "enu", e: entry(e), n: entry(n), u: entry(u) }, item, places: {}, trimMm: null,
    provenance: { kind: "from-drawing", toleranceMm: null, by: null, at: null, second: null }, note: "",
  };
}
