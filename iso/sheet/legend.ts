/** Legend of the symbols and marks a drawing uses, as one strip of picture and word. Marks differ between firms, so each sheet says its own. */
import type { DisplayItem, LegendKey, MeasureText } from "../draw/drawing-types";
import type { PaperBox } from "../geometry/types";
import { textAt } from "./items";
import { legendPicture, pictureRoom } from "./legend-pictures";
import { TEXT_CAP } from "./sheet-size";

export const LEGEND_WORDS: Readonly<Record<LegendKey, string>> = {
  "shop-weld": "shop weld", "field-weld": "FW field weld", "field-fit-weld": "FFW field-fit weld, + trim",
  "typical-butt": "typical butt weld", "typical-fillet": "typical fillet weld", "field-symbol": "made in the field", "threaded-joint": "threaded joint",
  "material-item": "material item", "weld-number": "weld number", "cut-piece": "cut piece", spool: "spool", flow: "flow", support: "support", revision: "changed here",
  "reference-dimension": "reference only", unverified: "not verified",
  "weld-neck": "weld-neck flange", "slip-on": "slip-on flange", "socket-flange": "socket-weld flange", "threaded-flange": "threaded flange", "lap-joint": "lap-joint flange, stub end",
  blind: "blind flange", "bolt-turn": "holes turned",
  gate: "gate valve", globe: "globe valve", check: "check valve", ball: "ball valve", butterfly: "butterfly valve", instrument: "instrument",
  reducer: "reducer", "eccentric-reducer": "eccentric, flat side heavy", "socket-end": "socket end", "threaded-end": "threaded end", coupling: "coupling", union: "union", cap: "cap",
  "socket-cap": "cap, socket or thread", outlet: "outlet", "stub-in": "stub-in", pad: "reinforcing pad", "set-in": "set in", mitre: "mitre", bend: "bend, ticks at tangents",
  vent: "vent", drain: "drain", "goes-on": "goes on", break: "change across the pipe", slope: "slope, low end thin", offset: "offset, true lengths",
};

const ROW_HEIGHT = 7.6;
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
    const width = pictureRoom(key) + measure(LEGEND_WORDS[key], TEXT_CAP, "regular") + GAP;
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
    const room = pictureRoom(key);
    return [...legendPicture(key, [left + room / 2 - 1, y]), textAt([left + room, y + TEXT_CAP / 2], LEGEND_WORDS[key], { layer: "title" })];
  });
}
