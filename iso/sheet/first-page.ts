/** The first page: the isometric as large as the paper allows, and on tabloid and A3 the tables beside and under it. */
import type { DisplayItem, Drawing, LegendKey, MeasureText } from "../draw/drawing-types";
import { itemMoved } from "../draw/paths";
import type { PaperBox, PaperPoint } from "../geometry/types";
import { cutListTable } from "./cut-list";
import { dataTable } from "./data-table";
import { lineFrom, textAt } from "./items";
import { legendItems, legendLayout } from "./legend";
import { notesTable } from "./notes-table";
import type { PageFrame } from "./page-frame";
import { REVISION_ROWS_SHOWN, revisionTable } from "./revision-table";
import type { SheetFacts } from "./sheet-facts";
import { EDGE_LINE } from "./sheet-size";
import { materialsTable, trimmedElbowsTable, weldsTable } from "./spool-tables";
import { setTable, tableHeight, type Table } from "./table";
import { placeInRoom, TABLE_GAP, type FlowTable } from "./table-flow";

/** Draws the spool for a room, mm. */
export type DrawRoom = (widthMm: number, heightMm: number) => Drawing;

export interface FirstPage {
  readonly items: readonly DisplayItem[];
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
/** Between the frame and the drawing's room, mm. */
const INSET = 3;
/** The lists under the isometric take at most this share of the body. */
const UNDER_SHARE = 0.42;
/** The revision block takes at most this share of the side column. */
const REVISIONS_SHARE = 0.35;

export function firstPage(facts: SheetFacts, frame: PageFrame, draw: DrawRoom, measure: MeasureText): FirstPage {
  const { body, side } = frame;
  if (side === null) {
    const notes = notesTable(facts, frame.cut, (body.maxX - body.minX - 2 * PAD - TABLE_GAP) / 2, measure);
    const rest = [...restOf(facts, notes, new Map(), 0), { table: dataTable(facts), width: "half" as const, startRow: 0 }];
    return { items: drawingItems(facts, body, draw, measure), rest, continued: [] };
  }
  const notes = notesTable(facts, frame.cut, side.maxX - side.minX - 2 * PAD, measure);
  const beside = sideColumn(facts, notes, side, measure);
  const under = underDrawing(facts, body, measure);
  const items = [
    ...drawingItems(facts, { ...body, maxY: under.top }, draw, measure),
    ...under.items,
    lineFrom([side.minX, side.minY], [side.minX, side.maxY], EDGE_LINE, "frame"),
    ...beside.items,
  ];
  const rest = restOf(facts, notes, new Map([...beside.next, ...under.next]), beside.revisionsShown);
  return { items, rest, continued: [...beside.continued, ...under.continued] };
}

type NextRows = ReadonlyMap<string, number | null>;

/** Tables still to be placed: those not in the map at all, or from the row the map names. */
function restOf(facts: SheetFacts, notes: Table | null, next: NextRows, revisionsShown: number): FlowTable[] {
  const all: readonly (readonly [Table | null, "full" | "half"])[] = [
    [cutListTable(facts), "full"], [trimmedElbowsTable(facts), "full"], [materialsTable(facts), "half"], [weldsTable(facts), "half"], [notes, "half"],
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
  for (const table of [materialsTable(facts), weldsTable(facts), notes]) {
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
  for (const table of [cutListTable(facts), trimmedElbowsTable(facts)]) {
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

/** The isometric in its room, its legend in a strip under it. */
function drawingItems(facts: SheetFacts, room: PaperBox, draw: DrawRoom, measure: MeasureText): DisplayItem[] {
  const middle: PaperPoint = [(room.minX + room.maxX) / 2, (room.minY + room.maxY) / 2];
  if (facts.spool === null) return [textAt(middle, `No spool ${facts.input.spool} in this line yet.`, { layer: "label", anchor: "middle", capMm: 3.5 })];
  const widthMm = room.maxX - room.minX;
  const legendMm = (keys: readonly LegendKey[]) => legendLayout(keys, widthMm, measure).heightMm;
  const drawFor = (reserveMm: number) => draw(widthMm - 2 * INSET, room.maxY - room.minY - reserveMm - 2 * INSET);
  let reserveMm = legendMm(likelyLegend(facts));
  let drawing = drawFor(reserveMm);
  if (legendMm(drawing.legend) > reserveMm) {
    reserveMm = legendMm(drawing.legend);
    drawing = drawFor(reserveMm);
  }
  const legend = { ...room, minY: room.maxY - legendMm(drawing.legend) };
  return [
    ...drawing.items.map((item) => itemMoved(item, [room.minX + INSET, room.minY + INSET])),
    lineFrom([legend.minX, legend.minY], [legend.maxX, legend.minY], EDGE_LINE, "title"),
    ...legendItems(drawing.legend, legend, measure),
  ];
}

/** The most a drawing's legend can need, known before drawing. */
function likelyLegend(facts: SheetFacts): LegendKey[] {
  const has = (place: string) => facts.welds.some((joint) => joint.place === place);
  const keys: (LegendKey | false)[] = [
    "shop-weld", has("field") && "field-weld", has("field-fit") && "field-fit-weld", "material-item", "weld-number", "cut-piece", "spool", "flow",
    facts.components.some((component) => component.kind === "support") && "support",
    facts.input.revision.changedPointIds.length > 0 && "revision", "reference-dimension", facts.legs.some((leg) => leg.unverified) && "unverified",
  ];
  return keys.filter((key) => key !== false);
}
