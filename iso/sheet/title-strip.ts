/** The title block: logo and shop, then labelled fields in columns as low as the fields allow. */
import type { DisplayItem, MeasureText } from "../draw/drawing-types";
import { SAME_PAPER_MM } from "../geometry/tolerances";
import type { PaperBox } from "../geometry/types";
import { boxOutline, lineFrom, textAt } from "./items";
import type { CutText } from "./notes-table";
import { EDGE_LINE, HEAD_CAP, RULE_LINE, TEXT_CAP } from "./sheet-size";
import type { TitleBlock } from "./sheet-types";
import { baselineOf, BOLD, fitText, linesHeight } from "./text-setting";
import type { Field, FieldHeading, TitleEntry } from "./title-fields";

const PAD_X = 1.4;
const PAD_Y = 0.4;
/** Between a label and its value, mm. */
const LABEL_GAP = 1.8;
const LONGEST_LABEL = 24;

interface SetField {
  /** null for a heading. */
  readonly label: string | null;
  /** Fields after this one that stay in its column. */
  readonly keeps: number;
  readonly lines: readonly string[];
  readonly heightMm: number;
}

export interface FieldColumns {
  readonly columns: readonly (readonly SetField[])[];
  /** Width of the label part in each column, mm. */
  readonly labelMm: readonly number[];
  readonly heightMm: number;
  readonly cut: readonly CutText[];
}

/**
 * Breaks fields into columns of equal width, as low as the fields allow; the first column starts under a block of the
 * given height (logo and shop).
 */
export function setFields(entries: readonly TitleEntry[], widthMm: number, columnCount: number, firstBlockMm: number, leastMm: number, measure: MeasureText): FieldColumns {
  const columnMm = widthMm / columnCount;
  const labelMm = Math.min(LONGEST_LABEL, Math.max(0, ...entries.map((entry) => ("label" in entry ? measure(entry.label, TEXT_CAP, "regular") : 0)))) + LABEL_GAP;
  const cut: CutText[] = [];
  const fields = entries.map((entry) => ("heading" in entry ? setHeading(entry, columnMm, measure) : setField(entry, columnMm, labelMm, cut, measure)));
  let heightMm = leastMm;
  let columns = breakColumns(fields, columnCount, heightMm, firstBlockMm);
  while (columns === null) {
    heightMm += linesHeight(1);
    columns = breakColumns(fields, columnCount, heightMm, firstBlockMm);
  }
  return { columns, labelMm: columns.map(() => labelMm), heightMm, cut };
}

function setHeading({ heading, keeps }: FieldHeading, columnMm: number, measure: MeasureText): SetField {
  const { lines } = fitText(heading, columnMm - 2 * PAD_X, 2, { capMm: TEXT_CAP, face: "regular" }, measure);
  return { label: null, keeps, lines, heightMm: linesHeight(lines.length) + 2 * PAD_Y };
}

function setField(field: Field, columnMm: number, labelMm: number, cut: CutText[], measure: MeasureText): SetField {
  const label = fitText(field.label, labelMm - LABEL_GAP + SAME_PAPER_MM, 1, { capMm: TEXT_CAP, face: "regular" }, measure);
  const value = fitText(field.value, columnMm - 2 * PAD_X - labelMm, field.maxLines, BOLD, measure);
  if (label.cut || value.cut) cut.push({ label: field.label, text: field.value });
  return { label: label.lines[0] ?? "", keeps: 0, lines: value.lines, heightMm: linesHeight(value.lines.length) + 2 * PAD_Y };
}

/** Fields in order into columns of a height, or null when they need more; a heading keeps its fields. */
function breakColumns(fields: readonly SetField[], columnCount: number, heightMm: number, firstBlockMm: number): SetField[][] | null {
  const columns: SetField[][] = [[]];
  let used = firstBlockMm;
  for (const [index, field] of fields.entries()) {
    const needs = fields.slice(index, index + 1 + field.keeps).reduce((sum, one) => sum + one.heightMm, 0);
    if (used + needs > heightMm) {
      if (columns.length === columnCount || needs > heightMm) return null;
      columns.push([]);
      used = 0;
    }
    columns.at(-1)!.push(field);
    used += field.heightMm;
  }
  while (columns.length < columnCount) columns.push([]);
  return columns;
}

/** Draws the columns into a box of their width. */
export function fieldItems(set: FieldColumns, box: PaperBox, firstBlockMm: number): DisplayItem[] {
  const columnMm = (box.maxX - box.minX) / set.columns.length;
  return set.columns.flatMap((fields, column) => {
    const x = box.minX + column * columnMm;
    let y = box.minY + (column === 0 ? firstBlockMm : 0);
    const items: DisplayItem[] = column === 0 ? [] : [lineFrom([x, box.minY], [x, box.maxY], EDGE_LINE, "title")];
    for (const [index, field] of fields.entries()) {
      items.push(...oneField(field, x, y, set.labelMm[column]!));
      y += field.heightMm;
      if (index < fields.length - 1) items.push(lineFrom([x, y], [x + columnMm, y], RULE_LINE, "title"));
    }
    return items;
  });
}

function oneField(field: SetField, x: number, y: number, labelMm: number): DisplayItem[] {
  const valueX = field.label === null ? x + PAD_X : x + PAD_X + labelMm;
  const face = field.label === null ? "regular" : "bold";
  const values = field.lines.map((text, line) => textAt([valueX, y + PAD_Y + baselineOf(line)], text, { layer: "title", face }));
  return field.label === null ? values : [textAt([x + PAD_X, y + PAD_Y + baselineOf(0)], field.label, { layer: "title" }), ...values];
}

/** Height of the logo's room, mm. */
const LOGO_HEIGHT = 12;

export interface ShopBlock {
  readonly heightMm: number;
  readonly logoBox: (box: PaperBox) => PaperBox | null;
  readonly items: (box: PaperBox) => DisplayItem[];
  readonly cut: readonly CutText[];
}

/** Logo above the shop's name, at the head of the first column. */
export function shopBlock({ shopName, logo }: TitleBlock, columnMm: number, measure: MeasureText): ShopBlock {
  const hasLogo = logo !== null;
  const name = fitText(shopName, columnMm - 2 * PAD_X, 2, { capMm: HEAD_CAP, face: "bold" }, measure);
  const logoMm = hasLogo ? LOGO_HEIGHT + 1 : 0;
  const heightMm = logoMm + linesHeight(name.lines.length, HEAD_CAP) + 2 * PAD_Y + 0.6;
  return {
    heightMm,
    cut: name.cut ? [{ label: "SHOP", text: shopName }] : [],
    logoBox: (box) => (hasLogo ? { minX: box.minX + PAD_X, minY: box.minY + 1, maxX: box.minX + columnMm - PAD_X, maxY: box.minY + 1 + LOGO_HEIGHT } : null),
    items: (box) => [
      ...name.lines.map((text, line) => textAt([box.minX + PAD_X, box.minY + logoMm + PAD_Y + 0.3 + baselineOf(line, HEAD_CAP)], text, { layer: "title", capMm: HEAD_CAP, face: "bold" })),
      lineFrom([box.minX, box.minY + heightMm], [box.minX + columnMm, box.minY + heightMm], EDGE_LINE, "title"),
    ],
  };
}

/** Outline of a block of the strip. */
export function blockOutline(box: PaperBox): DisplayItem {
  return boxOutline(box, { layer: "frame", widthMm: EDGE_LINE });
}
