/**
 * The dimension record of a spool: verdict, pictures with measured against drawn, every face and every distance with its
 * deviation, the points as they were typed, and sign-off blanks. Without a measurement it is the form to fill in by hand.
 */
import type { DisplayItem, MeasureText } from "../draw/drawing-types";
import { proposeView } from "../draw/orient";
import type { PaperBox } from "../geometry/types";
import { compareWith } from "../layout/as-fitted";
import { FITTED_VIEWS, fittedPicture } from "../layout/as-fitted-picture";
import type { AsFittedResult, FittedRecord } from "../layout/as-fitted-types";
import { fittedWanted, type Wanted } from "../layout/as-fitted-wanted";
import { buildModel } from "../run/build-model";
import { factsTable, facesTable, pairsTable, pointsTable, signTable } from "./as-fitted-tables";
import { boxOutline, textAt } from "./items";
import { followingFrame } from "./page-frame";
import { npsInches, sheetFacts, type SheetFacts } from "./sheet-facts";
import { EDGE_LINE, sheetSizeMm } from "./sheet-size";
import type { SheetInput, SheetPage } from "./sheet-types";
import { setTable, tableHeight, type Table } from "./table";
import { flowTables, TABLE_GAP, type FlowTable } from "./table-flow";

const PAD = 2;
/** Least size of a picture, mm. */
const PICTURE_LEAST = { widthMm: 92, heightMm: 64 };
const PICTURE_MOST = 120;

/** Largest nominal size of the sheet's spool, inches, which the usual tolerance goes by. */
export function spoolNominalInches(facts: SheetFacts): number {
  return Math.max(0, ...[...facts.pieces, ...facts.components].map((part) => npsInches(part.nps)));
}

/** Pages of a record, or of the blank form; at least one. Never throws on user data. */
export function composeAsFittedPages(input: SheetInput, record: FittedRecord | null, measure: MeasureText): SheetPage[] {
  const facts = sheetFacts(input, buildModel(input.document, input.marks, input.takeOuts));
  const frame = followingFrame(facts, measure, [{ label: "PAGES", value: "Dimension record", maxLines: 1 }]);
  const room = { minX: frame.body.minX + PAD, minY: frame.body.minY + PAD, maxX: frame.body.maxX - PAD, maxY: frame.body.maxY - PAD };
  const wanted = facts.spool && fittedWanted(facts.model, facts.spool);
  const contents = wanted && wanted.faces.length > 0 ? pagesOf(facts, wanted, record, room, measure) : [nothing(room)];
  return contents.map((items, i) => ({
    ...sheetSizeMm(input.size), items: [...frame.under, ...items, ...frame.over({ sheet: i + 1, of: contents.length })], logoBox: frame.logoBox, name: `${i + 1} dimension record`,
  }));
}

type Drawn = readonly DisplayItem[];

function pagesOf(facts: SheetFacts, wanted: Wanted, record: FittedRecord | null, room: PaperBox, measure: MeasureText): Drawn[] {
  const { units } = facts.input;
  const result = record && compareWith(wanted, record.document, spoolNominalInches(facts), units);
  const head = factsTable(record, result, units);
  const short = [facesTable(wanted, result, units), ...pairsTable(wanted, result, units), signTable(record)];
  const tables = [...short, ...pointsTable(record)];
  const heightOf = (some: readonly Table[]) => some.reduce((sum, table) => sum + tableHeight(setTable(table, room.maxX - room.minX, measure)) + TABLE_GAP, 0);
  const top = heightOf([head]);
  // Pictures take what the tables leave of one page, the points as typed going on to the next if they must; where even
  // that is too little, the pictures fill the first page and the tables follow.
  const under = room.maxY - room.minY - top;
  const spare = [tables, short].map((some) => under - heightOf(some)).find((mm) => mm >= PICTURE_LEAST.heightMm) ?? under;
  const heightMm = Math.max(Math.min(spare, PICTURE_MOST), Math.min(under, PICTURE_LEAST.heightMm));
  const pictures = { ...room, minY: room.minY + top, maxY: room.minY + top + heightMm };
  const first = flowTables([flow(head)], room, 1, measure).pages[0] ?? [];
  const below = { ...room, minY: pictures.maxY + TABLE_GAP };
  const [onFirst, rest] = split(tables, below, measure);
  const firstPage = [...first, ...pictureItems(facts, wanted, result, pictures, measure), ...(flowTables(onFirst.map(flow), below, 1, measure).pages[0] ?? [])];
  return [firstPage, ...flowTables(rest.map(flow), room, 2, measure).pages];
}

const flow = (table: Table): FlowTable => ({ table, width: "full", startRow: 0 });

/** Whole tables that fit under the pictures, and those that go on to further pages. */
function split(tables: readonly Table[], room: PaperBox, measure: MeasureText): readonly [readonly Table[], readonly Table[]] {
  let y = room.minY;
  const count = tables.findIndex((table) => {
    y += tableHeight(setTable(table, room.maxX - room.minX, measure));
    const isOver = y > room.maxY;
    y += TABLE_GAP;
    return isOver;
  });
  return count < 0 ? [tables, []] : [tables.slice(0, count), tables.slice(count)];
}

/** As many views side by side as the width carries. */
function pictureItems(facts: SheetFacts, wanted: Wanted, result: AsFittedResult | null, box: PaperBox, measure: MeasureText): DisplayItem[] {
  const count = Math.max(1, Math.min(FITTED_VIEWS.length, Math.floor((box.maxX - box.minX) / PICTURE_LEAST.widthMm)));
  const widthMm = (box.maxX - box.minX) / count;
  const view = facts.input.document.view ?? proposeView(facts.model);
  return FITTED_VIEWS.slice(0, count).flatMap((name, i) => {
    const part = { ...box, minX: box.minX + i * widthMm, maxX: box.minX + (i + 1) * widthMm };
    return [boxOutline(part, { widthMm: EDGE_LINE }), ...fittedPicture(wanted, result, name, view, part, measure)];
  });
}

function nothing(room: PaperBox): DisplayItem[] {
  return [textAt([(room.minX + room.maxX) / 2, (room.minY + room.maxY) / 2], "This spool has no open end to measure.", { layer: "label", anchor: "middle", capMm: 3.5 })];
}
