/**
 * A comparison of two revisions as pages: the overlay with its legend, the list, and on large paper both drawings side by
 * side with clouds round what differs. In the later sheet's page furniture; nothing on them is to be worked from. Pure.
 */
import { drawModel } from "../draw/draw-model";
import { drawSheets } from "../draw/draw-sheets";
import type { DisplayItem, Drawing, DrawOptions, MeasureText } from "../draw/drawing-types";
import { proposeView } from "../draw/orient";
import { itemMoved } from "../draw/paths";
import type { PaperBox, PaperPoint } from "../geometry/types";
import { buildModel } from "../run/build-model";
import type { View } from "../run/document";
import type { Model } from "../run/model-types";
import { boxOutline, lineFrom, textAt } from "../sheet/items";
import { followingFrame } from "../sheet/page-frame";
import { sheetFacts } from "../sheet/sheet-facts";
import { EDGE_LINE, HEAD_CAP, isSmallSheet, sheetSizeMm } from "../sheet/sheet-size";
import type { SheetInput, SheetPage } from "../sheet/sheet-types";
import { acrossItems } from "../sheet/state-mark";
import { flowTables } from "../sheet/table-flow";
import { BOLD, baselineOf, linesHeight, PLAIN, wrapText } from "../sheet/text-setting";
import { compareTable, sideWords } from "./compare-table";
import type { CompareRow, CompareSide } from "./compare-types";
import { legendAtFoot } from "./overlay-legend";
import { overlaySheets } from "./overlay-sheets";

/** What is known of the comparison beside the two inputs. */
export interface CompareFacts {
  readonly rows: readonly CompareRow[];
}

const PAD = 2;
const CAUTION = "For information only. Cut, fit and weld from the sheet in force, never from a comparison.";

interface Desk {
  readonly from: SheetInput;
  readonly to: SheetInput;
  readonly models: readonly [Model, Model];
  readonly rows: readonly CompareRow[];
  readonly view: View;
  readonly body: PaperBox;
  readonly measure: MeasureText;
}

interface Content {
  readonly name: string;
  readonly items: readonly DisplayItem[];
}

/** Pages of the comparison, at least one. Never throws on user data. @param to the later one: its size and title block are used */
export function composeComparePages(from: SheetInput, to: SheetInput, { rows }: CompareFacts, measure: MeasureText): SheetPage[] {
  const models = [modelOf(from), modelOf(to)] as const;
  const compared = `${sideWords(sideOf(from))} with ${sideWords(sideOf(to))}`;
  const frame = followingFrame(sheetFacts(to, models[1]), measure, [{ label: "PAGES", value: "Comparison", maxLines: 1 }, { label: "COMPARES", value: compared, maxLines: 2 }]);
  const body = { minX: frame.body.minX + PAD, minY: frame.body.minY + PAD, maxX: frame.body.maxX - PAD, maxY: frame.body.maxY - PAD };
  const desk: Desk = { from, to, models, rows, body, measure, view: to.document.view ?? from.document.view ?? proposeView(models[1], measure) };
  // A sheet that may be worked to has no word across it; a comparison with it has, so that nobody takes it for the sheet.
  const across = frame.under.length > 0 ? frame.under : acrossItems("COMPARISON", frame.body, measure);
  const overlays = overlayContents(desk);
  const contents = [...overlays, ...listContents(desk, overlays.length + 1), ...(isSmallSheet(to.size) ? [] : sideContents(desk))];
  return contents.map(({ items, name }, i) => ({
    ...sheetSizeMm(to.size), items: [...across, ...items, ...frame.over({ sheet: i + 1, of: contents.length })], logoBox: frame.logoBox, name: `${i + 1} ${name}`,
  }));
}

const modelOf = (input: SheetInput): Model => buildModel(input.document, input.marks, input.takeOuts);

/** A revision as the words of a comparison name it. */
export function sideOf({ revision: { code, state, hold } }: SheetInput): CompareSide {
  return { code, state, hold };
}

/** Lines across the head of a page, and where the rest of it begins. */
function headOf(lines: readonly { readonly text: string; readonly bold: boolean }[], { body, measure }: Desk): { readonly items: readonly DisplayItem[]; readonly below: number } {
  const set = lines.flatMap(({ text, bold }) => wrapText(text, body.maxX - body.minX, bold ? BOLD : PLAIN, measure).map((line) => ({ line, bold })));
  return {
    items: set.map(({ line, bold }, i) => textAt([body.minX, body.minY + baselineOf(i)], line, { layer: "label", face: bold ? "bold" : "regular" })),
    below: body.minY + linesHeight(set.length) + 1,
  };
}

function overlayContents(desk: Desk): Content[] {
  const { from, to, models, rows, body, measure, view } = desk;
  const compared = `OVERLAY: from ${sideWords(sideOf(from))} to ${sideWords(sideOf(to))}. ${countWords(rows.length)}.`;
  const legend = legendAtFoot(body, measure);
  const head = (part: string) => headOf([{ text: part === "" ? compared : `${compared} ${part}`, bold: true }, { text: CAUTION, bold: false }], desk);
  const box = { ...body, minY: head(PART_WORDS).below, maxY: body.maxY - legend.heightMm - 1 };
  const sheets = overlaySheets(models[0], models[1], rows, { ...roomOf(box), measure, view, spools: [letterOf(from, models[0]), letterOf(to, models[1])] });
  const line = lineFrom([body.minX, box.maxY + 0.5], [body.maxX, box.maxY + 0.5], EDGE_LINE);
  if (sheets.length === 0) return [{ name: "overlay", items: [...head("").items, textAt([body.minX, box.minY + 6], "The spool is too large for one overlay, and nothing that shows on a drawing differs. The list says what does.", { layer: "label" })] }];
  return sheets.map(({ drawing, part }) => ({ name: "overlay", items: [...head(part ? PART_WORDS : "").items, line, ...placedAt(drawing, box), ...legend.items] }));
}

const PART_WORDS = "The spool is too large for one sheet: this is the part round some of the differences.";

function countWords(count: number): string {
  return count === 0 ? "Nothing differs" : count === 1 ? "One difference" : `${count} differences`;
}

/** null where the spool is not in the line (any more): the whole line is drawn then. */
function letterOf({ spool }: SheetInput, model: Model): string | null {
  return model.spools.some(({ letter }) => letter === spool) ? spool : null;
}

const roomOf = (box: PaperBox) => ({ widthMm: box.maxX - box.minX, heightMm: box.maxY - box.minY });
const placedAt = ({ items }: Drawing, box: PaperBox): DisplayItem[] => items.map((item) => itemMoved(item, [box.minX, box.minY]));

function listContents({ from, to, rows, body, measure }: Desk, firstSheet: number): Content[] {
  if (rows.length === 0) return [];
  const table = compareTable(rows, sideOf(from), sideOf(to));
  return flowTables([{ table: { ...table, lead: [...table.lead, CAUTION] }, width: "full", startRow: 0 }], body, firstSheet, measure).pages.map((items) => ({ name: "list", items }));
}

/** Both drawings in one view: beside each other where that holds them, else one after the other. */
function sideContents(desk: Desk): Content[] {
  const { body, models } = desk;
  const head = headOf([{ text: `SIDE BY SIDE, in one view. Clouds stand round what differs. ${CAUTION}`, bold: false }], desk);
  const middle = (body.minX + body.maxX) / 2;
  const top = head.below + linesHeight(1, HEAD_CAP) + 1;
  const boxes: readonly [PaperBox, PaperBox] = [{ ...body, minY: top, maxX: middle - 1 }, { ...body, minY: top, minX: middle + 1 }];
  const inner = boxes.map((box) => ({ minX: box.minX + PAD, minY: box.minY + PAD, maxX: box.maxX - PAD, maxY: box.maxY - PAD }));
  const drawings = ([0, 1] as const).map((side) => drawModel(models[side], drawOptions(desk, side, inner[side]!)));
  const caption = (side: 0 | 1, at: PaperPoint) => textAt([at[0], at[1] - 1 - linesHeight(1, HEAD_CAP) + baselineOf(0, HEAD_CAP)], captionOf(desk, side), { layer: "label", capMm: HEAD_CAP, face: "bold" });
  if (drawings.every(isInside)) {
    const items = ([0, 1] as const).flatMap((side) => [caption(side, [boxes[side].minX + 1, top]), boxOutline(boxes[side], { widthMm: EDGE_LINE }), ...placedAt(drawings[side]!, inner[side]!)]);
    return [{ name: "side by side", items: [...head.items, ...items] }];
  }
  const full = { ...body, minY: top };
  return ([0, 1] as const).flatMap((side) => drawSheets(models[side], drawOptions(desk, side, full)).map((drawing) => ({
    name: side === 0 ? "before" : "after", items: [...head.items, caption(side, [full.minX + 1, top]), ...placedAt(drawing, full)],
  })));
}

/** Paper a drawing may stand out of its half and still keep off the line round it, mm. */
const OUT = 1;
const isInside = ({ bounds, widthMm, heightMm }: Drawing): boolean => bounds.minX >= -OUT && bounds.minY >= -OUT && bounds.maxX <= widthMm + OUT && bounds.maxY <= heightMm + OUT;

function captionOf({ from, to }: Desk, side: 0 | 1): string {
  const words = sideWords(sideOf(side === 0 ? from : to));
  return words.charAt(0).toUpperCase() + words.slice(1);
}

function drawOptions({ from, to, models, rows, view, measure }: Desk, side: 0 | 1, box: PaperBox): DrawOptions {
  const pointIds = clouded(rows, models[side], side);
  return {
    ...roomOf(box), measure, view, spool: letterOf(side === 0 ? from : to, models[side]), show: { items: false, welds: true, pieces: true, dimensions: true },
    changed: pointIds.length === 0 ? null : { code: to.revision.code, pointIds },
  };
}

/** Points of one side's drawing that differ. */
export function clouded(rows: readonly CompareRow[], model: Model, side: 0 | 1): string[] {
  const own = rows.filter((row) => row.kind !== (side === 0 ? "added" : "removed"));
  const ids = own.flatMap(({ at }) => (at === null ? [] : at.kind === "joint" ? [model.joints.find((joint) => joint.key === at.id)?.pointId ?? ""] : [at.id]));
  const known = new Set(model.nodes.map((node) => node.pointId));
  return [...new Set(ids)].filter((id) => known.has(id));
}
