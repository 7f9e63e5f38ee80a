/**
 * Bench pages of a spool: check dimensions with blanks for what was measured, then each turn laid out in its own plane with
 * every mark a fitter snaps on a table. Blocks of a picture and its tables fill columns, then pages.
 */
import { drawModel } from "../draw/draw-model";
import type { DisplayItem, MeasureText } from "../draw/drawing-types";
import { itemMoved } from "../draw/paths";
import type { PaperBox } from "../geometry/types";
import { fittingShape, legsShape, rollItems, shapeItems } from "../layout/turn-picture";
import { spoolTurns, type Turn } from "../layout/turns";
import { buildModel } from "../run/build-model";
import type { UnitSystem } from "../run/document";
import { checksTable, endsTable, stationsTable, turnTable } from "./bench-tables";
import { boxOutline, lineFrom, textAt } from "./items";
import { pageDraft, placePages, type PageDraft } from "./page-draft";
import { followingFrame } from "./page-frame";
import { sheetFacts, type SheetFacts } from "./sheet-facts";
import { EDGE_LINE, RULE_LINE } from "./sheet-size";
import type { SheetInput, SheetPage } from "./sheet-types";
import { setTable, tableHeight, type Table } from "./table";
import { flowTables, TABLE_GAP, type FlowTable } from "./table-flow";
import { placeTable } from "./table-placing";

const PAD = 2;
/** Least width of a column of turns, mm. */
const COLUMN_LEAST = 116;
const PICTURE_HEIGHT = 62;
const PICTURE_LEAST = 44;
const ROLL_WIDTH = 34;

interface Block {
  readonly heightMm: number;
  readonly items: (box: PaperBox) => DisplayItem[];
}

/** Pages of the lay-out, at least one. Never throws on user data. */
export function composeBenchPages(input: SheetInput, measure: MeasureText): SheetPage[] {
  return placePages(benchDrafts(sheetFacts(input, buildModel(input.document, input.marks, input.takeOuts)), 1, measure));
}

/** Pages of the lay-out before they are numbered. @param first number of the first of them */
export function benchDrafts(facts: SheetFacts, first: number, measure: MeasureText): PageDraft[] {
  const frame = followingFrame(facts, measure, [{ label: "PAGES", value: "Bench lay-out", maxLines: 1 }]);
  const room = { minX: frame.body.minX + PAD, minY: frame.body.minY + PAD, maxX: frame.body.maxX - PAD, maxY: frame.body.maxY - PAD };
  const tables = checkTables(facts);
  const checks = withKey(flowTables(tables, room, first, measure).pages, tables, facts, room, measure);
  const turns = facts.spool ? turnPages(spoolTurns(facts.model, facts.spool), facts.input.units, room, measure) : [];
  const contents: readonly (readonly DisplayItem[])[] = checks.length + turns.length > 0 ? [...checks, ...turns] : [nothing(facts, room)];
  return contents.map((items, i) => pageDraft(facts.input.size, frame, items, i < checks.length ? "checks" : "turns"));
}

function checkTables(facts: SheetFacts): FlowTable[] {
  return [endsTable(facts), checksTable(facts)].flatMap((table): FlowTable[] => (table ? [{ table, width: "full", startRow: 0 }] : []));
}

/** Least height of a picture that says which weld is which, mm. */
const KEY_LEAST = 60;

/** The isometric with weld numbers and ends under the checks, where one page of them leaves room. */
function withKey(pages: Drawn, tables: readonly FlowTable[], facts: SheetFacts, room: PaperBox, measure: MeasureText): Drawn {
  const used = tables.reduce((sum, { table }) => sum + tableHeight(setTable(table, room.maxX - room.minX, measure)) + TABLE_GAP, 0);
  const box = { ...room, minY: room.minY + used };
  const heightMm = box.maxY - box.minY;
  if (pages.length !== 1 || heightMm < KEY_LEAST) return pages;
  const show = { items: false, welds: true, pieces: true, dimensions: false };
  const size = { widthMm: box.maxX - box.minX - 2 * PAD, heightMm: heightMm - 2 * PAD };
  const { items, bounds } = drawModel(facts.model, { ...size, measure, view: facts.input.document.view, spool: facts.input.spool, show });
  // A spool too long for the room is drawn past it: then the spool sheet alone shows the welds.
  if (bounds.minX < -PAD || bounds.minY < -PAD || bounds.maxX > size.widthMm + PAD || bounds.maxY > size.heightMm + PAD) return pages;
  return [[...pages[0]!, boxOutline(box, { widthMm: EDGE_LINE }), ...items.map((item) => itemMoved(item, [box.minX + PAD, box.minY + PAD]))]];
}

type Drawn = readonly (readonly DisplayItem[])[];

function nothing(facts: SheetFacts, room: PaperBox): DisplayItem[] {
  const text = facts.spool ? "This spool has no open end and no turn to lay out." : `No spool ${facts.input.spool} in this line yet.`;
  return [textAt([(room.minX + room.maxX) / 2, (room.minY + room.maxY) / 2], text, { layer: "label", anchor: "middle", capMm: 3.5 })];
}

function turnPages(turns: readonly Turn[], units: UnitSystem, room: PaperBox, measure: MeasureText): DisplayItem[][] {
  const count = Math.max(1, Math.floor((room.maxX - room.minX + TABLE_GAP) / (COLUMN_LEAST + TABLE_GAP)));
  const widthMm = (room.maxX - room.minX - (count - 1) * TABLE_GAP) / count;
  const pages: DisplayItem[][] = [];
  let [column, y] = [count, room.maxY];
  for (const turn of turns) {
    for (const block of blocksOf(turn, units, { widthMm, heightMm: room.maxY - room.minY }, measure)) {
      if (y + block.heightMm > room.maxY && y > room.minY) [column, y] = [column + 1, room.minY];
      if (column >= count) {
        pages.push([]);
        [column, y] = [0, room.minY];
      }
      const minX = room.minX + column * (widthMm + TABLE_GAP);
      pages.at(-1)!.push(...block.items({ minX, minY: y, maxX: minX + widthMm, maxY: y + block.heightMm }));
      y += block.heightMm + TABLE_GAP;
    }
  }
  return pages;
}

/** A turn's pictures stay with its numbers; the marks at the stations may stand apart. */
function blocksOf(turn: Turn, units: UnitSystem, { widthMm, heightMm }: { readonly widthMm: number; readonly heightMm: number }, measure: MeasureText): Block[] {
  const numbers = tableBlock(turnTable(turn, units), widthMm, measure);
  const given = stationsTable(turn, units);
  const stations = given && tableBlock({ ...given, title: `${turn.name}, 16 STATIONS` }, widthMm, measure);
  // A little less picture keeps all of a trimmed elbow in one column of small paper.
  const spare = heightMm - numbers.heightMm - (stations ? stations.heightMm + TABLE_GAP : 0) - EDGE_LINE;
  const pictureMm = spare >= PICTURE_LEAST ? Math.min(PICTURE_HEIGHT, spare) : PICTURE_HEIGHT;
  const picture: Block = {
    heightMm: pictureMm + numbers.heightMm,
    items: (box) => [...pictureItems(turn, units, { ...box, minY: box.minY + numbers.heightMm }, measure), ...numbers.items({ ...box, maxY: box.minY + numbers.heightMm })],
  };
  return stations ? [picture, stations] : [picture];
}

function tableBlock(table: Table, widthMm: number, measure: MeasureText): Block {
  const set = setTable(table, widthMm, measure);
  return { heightMm: tableHeight(set), items: (box) => [...placeTable(set, [box.minX, box.minY], box.maxY - box.minY + EDGE_LINE, 0).items] };
}

/** Legs on the left, the fitting on the right, the roll between them where there is one. */
function pictureItems(turn: Turn, units: UnitSystem, box: PaperBox, measure: MeasureText): DisplayItem[] {
  const hasRoll = turn.roll !== null && turn.roll.angleRad !== 0;
  const widthMm = box.maxX - box.minX - (hasRoll ? ROLL_WIDTH : 0);
  const middle = box.minX + widthMm * 0.48;
  const [legs, fitting] = [{ ...box, maxX: middle }, { ...box, minX: middle, maxX: box.minX + widthMm }];
  const head = (x: number, text: string) => textAt([x + 1.2, box.minY + 4], text, { layer: "label" });
  const under = (part: PaperBox): PaperBox => ({ minX: part.minX + 1, minY: part.minY + 6, maxX: part.maxX - 1, maxY: part.maxY - 1 });
  const roll = { ...box, minX: fitting.maxX };
  return [
    boxOutline(box, { widthMm: EDGE_LINE }), lineFrom([middle, box.minY], [middle, box.maxY], RULE_LINE),
    head(legs.minX, "LEGS, diagonal dashed"), head(fitting.minX, turn.kind === "trimmed" ? "KEEP the solid part" : turn.kind === "mitre" ? "CUTS" : "FITTING"),
    ...shapeItems(legsShape(turn, units), under(legs), measure), ...shapeItems(fittingShape(turn, units), under(fitting), measure),
    ...(hasRoll ? [lineFrom([roll.minX, box.minY], [roll.minX, box.maxY], RULE_LINE), head(roll.minX, "ROLL, along flow"), ...rollItems(turn.roll!.angleRad, under(roll), measure)] : []),
  ];
}
