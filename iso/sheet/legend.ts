/** Legend of the marks a drawing uses, as one strip of symbol and word. Marks differ between firms, so each sheet says its own. */
import type { DisplayItem, Ink, LegendKey, MeasureText } from "../draw/drawing-types";
import { circleSegments, hexagonSegments, itemMoved, stadiumSegments } from "../draw/paths";
import type { PaperBox, PaperPoint } from "../geometry/types";
import { lineFrom, pathOf, polygonOf, textAt } from "./items";
import { TEXT_CAP } from "./sheet-size";

const WORDS: Readonly<Record<LegendKey, string>> = {
  "shop-weld": "shop weld", "field-weld": "FW field weld", "field-fit-weld": "FFW field-fit weld", "material-item": "material item",
  "weld-number": "weld number", "cut-piece": "cut piece", spool: "next spool", flow: "flow", support: "support", revision: "changed here",
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

/** Small pictures of the marks, made of the drawing's own shapes. */
function symbolOf(key: LegendKey, [x, y]: PaperPoint): DisplayItem[] {
  const pipe = lineFrom([x - 4, y], [x + 4, y], 0.7, "title");
  const dot = pathOf(circleSegments([x, y], 1.5), { layer: "title", stroke: null, fill: "ink" });
  const letter = (text: string, ink: Ink = "ink") => textAt([x, y + TEXT_CAP / 2], text, { layer: "title", anchor: "middle", ink });
  switch (key) {
    case "shop-weld": return [pipe, dot];
    case "field-weld": case "field-fit-weld": return [pipe, dot, ...flag([x, y])].map((item) => itemMoved(item, [0, 1.3]));
    case "material-item": return [pathOf(circleSegments([x, y], 3.3), THIN), letter("1")];
    case "weld-number": return [pathOf(hexagonSegments([x, y], 7.2), { ...THIN, stroke: "dye" }), letter("1", "dye")];
    case "cut-piece": return [pathOf(stadiumSegments([x, y], 8.2, 5.2), THIN), letter("P1")];
    case "spool": return [lineFrom([x - 4, y], [x + 4, y], 0.7, "title", "grey", [2, 1])];
    case "flow": return [pipe, polygonOf([[x - 2, y - 1.5], [x + 2.4, y], [x - 2, y + 1.5]], { layer: "title", stroke: null, fill: "ink" })];
    case "support": return [pipe, ...shoe([x, y])].map((item) => itemMoved(item, [0, -1.6]));
    case "revision": return [polygonOf([[x, y - 3.5], [x + 3.7, y + 2.7], [x - 3.7, y + 2.7]], THIN), textAt([x, y + 2], "A", { layer: "title", anchor: "middle" })];
    case "reference-dimension": return [letter("( )")];
    case "unverified": return [letter("VIF")];
  }
}

function shoe([x, y]: PaperPoint): DisplayItem[] {
  const leg = (dx: number) => lineFrom([x + dx, y], [x + dx, y + 3.4], 0.35, "title");
  return [leg(-1.6), leg(1.6), lineFrom([x - 3, y + 3.4], [x + 3, y + 3.4], 0.5, "title")];
}

function flag([x, y]: PaperPoint): DisplayItem[] {
  const pole = lineFrom([x, y], [x, y - 4.4], 0.3, "title");
  return [pole, polygonOf([[x, y - 4.4], [x + 2.6, y - 3.4], [x, y - 2.4]], { layer: "title", stroke: null, fill: "ink" })];
}
