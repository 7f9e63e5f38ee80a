/** Legend of the marks a drawing uses, as one strip of symbol and word. Marks differ between firms, so each sheet says its own. */
import type { DisplayItem, LegendKey, MeasureText } from "../draw/drawing-types";
import type { PaperBox, PaperPoint } from "../geometry/types";
import { boxOutline, circleAt, itemMoved, lineFrom, polygonOf, textAt } from "./items";
import { TEXT_CAP } from "./sheet-size";

const WORDS: Readonly<Record<LegendKey, string>> = {
  "shop-weld": "shop weld", "field-weld": "field weld", "field-fit-weld": "field-fit weld", "material-item": "material item",
  "weld-number": "weld number", "cut-piece": "cut piece", spool: "spool", flow: "flow", support: "support", revision: "changed here",
  "reference-dimension": "reference only", unverified: "not verified",
};

const ROW_HEIGHT = 7.6;
const SYMBOL_ROOM = 9.5;
const GAP = 4;

interface Entry {
  readonly key: LegendKey;
  readonly row: number;
  readonly x: number;
}

/** Entries laid in rows of a width, and the height they take, mm. */
export function legendLayout(keys: readonly LegendKey[], widthMm: number, measure: MeasureText): { readonly entries: readonly Entry[]; readonly heightMm: number } {
  const entries: Entry[] = [];
  let row = 0;
  let x = 2;
  for (const key of keys) {
    const width = SYMBOL_ROOM + measure(WORDS[key], TEXT_CAP, "regular") + GAP;
    if (x > 2 && x + width - GAP > widthMm - 1) {
      row += 1;
      x = 2;
    }
    entries.push({ key, row, x });
    x += width;
  }
  return { entries, heightMm: keys.length === 0 ? 0 : (row + 1) * ROW_HEIGHT };
}

/** Draws the strip into a box as wide as it was laid out for. */
export function legendItems(keys: readonly LegendKey[], box: PaperBox, measure: MeasureText): DisplayItem[] {
  const { entries } = legendLayout(keys, box.maxX - box.minX, measure);
  return entries.flatMap(({ key, row, x }) => {
    const y = box.minY + (row + 0.5) * ROW_HEIGHT;
    const left = box.minX + x;
    return [...symbolOf(key, [left + SYMBOL_ROOM / 2 - 1, y]), textAt([left + SYMBOL_ROOM, y + TEXT_CAP / 2], WORDS[key], { layer: "title" })];
  });
}

const THIN = { layer: "title" as const, widthMm: 0.25 };

/** Small pictures of the marks; the drawing's own are the same shapes. */
function symbolOf(key: LegendKey, [x, y]: PaperPoint): DisplayItem[] {
  const pipe = lineFrom([x - 4, y], [x + 4, y], 0.7, "title");
  const dot = circleAt([x, y], 1.5, { layer: "title", stroke: null, fill: "ink" });
  const letter = (text: string, capMm = TEXT_CAP) => textAt([x, y + capMm / 2], text, { layer: "title", anchor: "middle", capMm });
  if (key === "shop-weld") return [pipe, dot];
  if (key === "field-weld" || key === "field-fit-weld") return [pipe, dot, ...flag([x, y], key === "field-fit-weld")].map((item) => itemMoved(item, [0, 1.3]));
  if (key === "material-item") return [circleAt([x, y], 3.3, THIN), letter("1")];
  if (key === "weld-number") return [polygonOf(hexagon([x, y], 3.6), { ...THIN, stroke: "dye" }), letter("1")];
  if (key === "cut-piece") return [boxOutline({ minX: x - 3.8, minY: y - 2.6, maxX: x + 3.8, maxY: y + 2.6 }, THIN), letter("P1")];
  if (key === "spool") return [boxOutline({ minX: x - 3, minY: y - 3, maxX: x + 3, maxY: y + 3 }, { ...THIN, widthMm: 0.5 }), letter("A")];
  if (key === "flow") return [pipe, polygonOf([[x - 2, y - 1.5], [x + 2.4, y], [x - 2, y + 1.5]], { layer: "title", stroke: null, fill: "ink" })];
  if (key === "support") return [pipe, polygonOf([[x, y + 0.4], [x + 1.8, y + 3.2], [x - 1.8, y + 3.2]], THIN)].map((item) => itemMoved(item, [0, -1.6]));
  if (key === "revision") return [polygonOf([[x, y - 3.4], [x + 3.7, y + 2.6], [x - 3.7, y + 2.6]], THIN), textAt([x, y + 1.9], "A", { layer: "title", anchor: "middle" })];
  if (key === "reference-dimension") return [letter("( )")];
  return [letter("VIF")];
}

function flag([x, y]: PaperPoint, fit: boolean): DisplayItem[] {
  const pole = lineFrom([x, y], [x, y - 3.4], 0.25, "title");
  return [pole, polygonOf([[x, y - 3.4], [x + 2.6, y - 2.6], [x, y - 1.8]], { ...THIN, fill: fit ? "paper" : "ink" })];
}

function hexagon([x, y]: PaperPoint, radius: number): PaperPoint[] {
  return [0, 1, 2, 3, 4, 5].map((k) => [x + radius * Math.cos((k * Math.PI) / 3), y + radius * Math.sin((k * Math.PI) / 3)] as const);
}
