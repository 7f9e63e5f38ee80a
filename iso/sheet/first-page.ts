/** The first page: the isometric as large as the paper allows, and on tabloid and A3 the tables beside and under it; and the isometric's further sheets, which hold nothing else. */
import type { DisplayItem, MeasureText } from "../draw/drawing-types";
import { itemMoved } from "../draw/paths";
import type { PaperBox, PaperPoint } from "../geometry/types";
import { cutListTable } from "./cut-list";
import { dataTable } from "./data-table";
import { lineFrom } from "./items";
import { isometricSheets, type DrawRoom } from "./isometric-sheets";
import { notesTable } from "./notes-table";
import type { PageFrame } from "./page-frame";
import { REVISION_ROWS_SHOWN, revisionTable } from "./revision-table";
import type { SheetFacts } from "./sheet-facts";
import { EDGE_LINE } from "./sheet-size";
import { pipeWorkTables } from "./pipe-work-tables";
import { materialsTable, trimmedElbowsTable, weightTable, weldsTable } from "./spool-tables";
import { setTable, tableHeight, type Table } from "./table";
import { placeInRoom, TABLE_GAP, type FlowTable } from "./table-flow";

export interface FirstPage {
  readonly items: readonly DisplayItem[];
  /** Further sheets of the isometric, in order. */
  readonly sheets: readonly (readonly DisplayItem[])[];
  /** Tables, or the rows of them, that go on further pages. */
  readonly rest: readonly FlowTable[];
  /** Where it stays to be said on which sheet a table goes on. */
  readonly continued: readonly Continued[];
}

interface Continued {
  readonly title: string;
  readonly at: PaperPoint;
}

const PAD = 2;
/** The lists under the isometric take at most this share of the body. */
const UNDER_SHARE = 0.42;
/** The revision block takes at most this share of the side column. */
const REVISIONS_SHARE = 0.35;

/** @param later body of a following page, for further sheets of the isometric */
export function firstPage(facts: SheetFacts, frame: PageFrame, later: PaperBox, draw: DrawRoom, measure: MeasureText): FirstPage {
  const { body, side } = frame;
  if (side === null) {
    const notes = notesTable(facts, frame.cut, (body.maxX - body.minX - 2 * PAD - TABLE_GAP) / 2, measure);
    const rest = [...restOf(facts, notes, new Map(), 0), { table: dataTable(facts), width: "half" as const, startRow: 0 }];
    const [items = [], ...sheets] = isometricSheets(facts, body, later, draw, measure);
    return { items, sheets, rest, continued: [] };
  }
  const notes = notesTable(facts, frame.cut, side.maxX - side.minX - 2 * PAD, measure);
  const beside = sideColumn(facts, notes, side, measure);
  let under = underDrawing(facts, body, measure);
  let drawn = isometricSheets(facts, { ...body, maxY: under.top }, later, draw, measure);
  // An isometric that takes several sheets gets the whole height of the first: its lists go on pages of their own.
  if (drawn.length > 1 && under.items.length > 0) {
    under = { items: [], next: new Map(), continued: [], top: body.maxY };
    drawn = isometricSheets(facts, body, later, draw, measure);
  }
  const [first = [], ...sheets] = drawn;
  const items = [
    ...first,
    ...under.items,
    lineFrom([side.minX, side.minY], [side.minX, side.maxY], EDGE_LINE, "frame"),
    ...beside.items,
  ];
  const rest = restOf(facts, notes, new Map([...beside.next, ...under.next]), beside.revisionsShown);
  return { items, sheets, rest, continued: [...beside.continued, ...under.continued] };
}

type NextRows = ReadonlyMap<string, number | null>;

/** Tables still to be placed: those not in the map at all, or from the row the map names. */
function restOf(facts: SheetFacts, notes: Table | null, next: NextRows, revisionsShown: number): FlowTable[] {
  const all: readonly (readonly [Table | null, "full" | "half"])[] = [
    [cutListTable(facts), "full"], ...pipeWorkTables(facts).map((table) => [table, "full"] as const), [trimmedElbowsTable(facts), "full"], [materialsTable(facts), "half"], [weldsTable(facts), "half"], [notes, "half"],
    [weightTable(facts), "half"],
  ];
  const rest = all.flatMap(([table, width]): FlowTable[] => {
    if (table === null) return [];
    const startRow = next.has(table.title) ? next.get(table.title)! : 0;
    return startRow === null ? [] : [{ table, width, startRow }];
  });
  const history = revisionTable(facts.input, null);
  return history === null || facts.input.revision.rows.length <= revisionsShown ? rest : [...rest, { table: history, width: "half", startRow: 0 }];
}

interface Placed {
  readonly items: readonly DisplayItem[];
  readonly next: NextRows;
  readonly continued: readonly Continued[];
}

/** The newest revisions at the foot of the side column: as many as a share of it holds, none when there are none. */
function revisionBlock(facts: SheetFacts, room: PaperBox, measure: MeasureText): { readonly items: readonly DisplayItem[]; readonly top: number; readonly shown: number } {
  const most = Math.min(REVISION_ROWS_SHOWN, facts.input.revision.rows.length);
  for (let shown = most; shown > 0; shown -= 1) {
    const table = revisionTable(facts.input, shown)!;
    const heightMm = tableHeight(setTable(table, room.maxX - room.minX, measure));
    if (heightMm > (room.maxY - room.minY) * REVISIONS_SHARE && shown > 1) continue;
    if (heightMm > room.maxY - room.minY) break;
    return { items: placeInRoom(table, { ...room, minY: room.maxY - heightMm }, measure).items, top: room.maxY - heightMm - TABLE_GAP, shown };
  }
  return { items: [], top: room.maxY, shown: 0 };
}

/** Materials and welds from the top, notes under them, the revision block at the foot. */
function sideColumn(facts: SheetFacts, notes: Table | null, column: PaperBox, measure: MeasureText): Placed & { readonly revisionsShown: number } {
  const room = { minX: column.minX + PAD, minY: column.minY + PAD, maxX: column.maxX - PAD, maxY: column.maxY - PAD };
  const items: DisplayItem[] = [];
  const next = new Map<string, number | null>();
  const continued: Continued[] = [];
  const revisions = revisionBlock(facts, room, measure);
  items.push(...revisions.items);
  let y = room.minY;
  for (const table of [materialsTable(facts), weldsTable(facts), notes, weightTable(facts)]) {
    if (table === null) continue;
    const placed = placeInRoom(table, { ...room, minY: y, maxY: revisions.top }, measure);
    items.push(...placed.items);
    next.set(table.title, placed.nextRow);
    if (placed.continuedAt) continued.push({ title: table.title, at: placed.continuedAt });
    y += placed.heightMm + (placed.heightMm > 0 ? TABLE_GAP : 0);
  }
  return { items, next, continued, revisionsShown: revisions.shown };
}

/** Cut list and trimmed elbows under the isometric, standing on the strip. */
function underDrawing(facts: SheetFacts, left: PaperBox, measure: MeasureText): Placed & { readonly top: number } {
  const most = (left.maxY - left.minY) * UNDER_SHARE;
  const widthMm = left.maxX - left.minX - 2 * PAD;
  const room = { minX: left.minX + PAD, maxX: left.minX + PAD + widthMm };
  const next = new Map<string, number | null>();
  let used = 0;
  const open: Continued[] = [];
  const placedItems: DisplayItem[] = [];
  for (const table of [cutListTable(facts), ...pipeWorkTables(facts), trimmedElbowsTable(facts)]) {
    if (table === null) continue;
    const placed = placeInRoom(table, { ...room, minY: used, maxY: most - PAD }, measure);
    next.set(table.title, placed.nextRow);
    if (placed.heightMm === 0) continue;
    placedItems.push(...placed.items);
    if (placed.continuedAt) open.push({ title: table.title, at: placed.continuedAt });
    used += placed.heightMm + TABLE_GAP;
  }
  const heightMm = Math.max(0, used - TABLE_GAP);
  const top = left.maxY - heightMm - (heightMm > 0 ? PAD : 0);
  const items = placedItems.map((item) => itemMoved(item, [0, top]));
  const continued = open.map(({ title, at }): Continued => ({ title, at: [at[0], at[1] + top] }));
  return { items, next, continued, top };
}
