/** The page in front of a package: what it is and who it goes to, room to acknowledge it, and what its copies are worth. */
import type { MeasureText } from "../draw/drawing-types";
import { indexFrame, type IndexInput } from "./index-pages";
import { pageDraft, placePages } from "./page-draft";
import type { SheetPage } from "./sheet-types";
import type { Table } from "./table";
import { flowTables } from "./table-flow";

export interface CoverInput extends Omit<IndexInput, "entries"> {
  /** "TRANSMITTAL" or "PACKAGE", large. */
  readonly word: string;
  /** What it is, a label and its words a row. */
  readonly facts: readonly { readonly label: string; readonly value: string }[];
  /** Sentences on what is in it and what a copy is worth. */
  readonly notes: readonly string[];
  /** Whether the recipient is asked to acknowledge it by hand. */
  readonly acknowledge: boolean;
}

const PAD = 2;
/** Room to write a name or a date by hand, mm. */
const TO_WRITE = 11;

/** At least one page. */
export function composeCoverPages(input: CoverInput, measure: MeasureText): SheetPage[] {
  const frame = indexFrame(input, measure, input.word);
  const { body } = frame;
  const room = { minX: body.minX + PAD, minY: body.minY + PAD, maxX: body.maxX - PAD, maxY: body.maxY - PAD };
  const tables = [factsTable(input), ...(input.acknowledge ? [acknowledgeTable()] : []), notesTable(input.notes)];
  const { pages } = flowTables(tables.map((table) => ({ table, width: "full" as const, startRow: 0 })), room, input.place?.first ?? 1, measure);
  return placePages(pages.map((items) => pageDraft(input.size, frame, items, "cover")), input.place?.first, input.place?.of);
}

function factsTable({ word, facts }: CoverInput): Table {
  return {
    title: word, lead: [], foot: [],
    columns: [{ head: "", share: 0, minMm: 46 }, { head: "", share: 1, minMm: 70 }],
    rows: facts.map(({ label, value }) => ({ cells: [[{ text: label }], [{ text: value, face: "bold" as const }]] })),
  };
}

function acknowledgeTable(): Table {
  const blank = { cells: ["", "", ""], leastMm: TO_WRITE };
  return {
    title: "RECEIVED", lead: ["Sign and send this page back, or answer in writing with the number above."], foot: [],
    columns: [{ head: "NAME", share: 2, minMm: 50 }, { head: "SIGNATURE", share: 2, minMm: 50 }, { head: "DATE", share: 1, minMm: 30 }],
    rows: [blank],
  };
}

function notesTable(notes: readonly string[]): Table {
  return { title: "ABOUT THESE SHEETS", lead: [], foot: [], columns: [{ head: "", share: 1, minMm: 70 }], rows: notes.map((note) => ({ cells: [note] })) };
}
