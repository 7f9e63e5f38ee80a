/**
 * What every page has: frame, foot line, title block, and the room left for content. On tabloid and A3 the title block
 * stands at the foot of a side column, so that the isometric keeps the height; small and following pages carry a strip.
 */
import type { DisplayItem, MeasureText } from "../draw/drawing-types";
import type { PaperBox } from "../geometry/types";
import { IDENTITY_HEIGHT, IDENTITY_NARROW, identityItems, type SheetPlace } from "./identity-block";
import { boxOutline, textAt } from "./items";
import type { CutText } from "./notes-table";
import type { PrintWish, SheetFacts } from "./sheet-facts";
import { EDGE_LINE, FRAME_LINE, frameBox, isSmallSheet, sheetSizeMm } from "./sheet-size";
import type { SheetSize } from "./sheet-types";
import { stateAcross } from "./state-mark";
import { baselineOf, linesHeight, PLAIN, wrapText } from "./text-setting";
import { shortEntries, stripEntries, titleEntries, type Field } from "./title-fields";
import { blockOutline, fieldItems, setFields, shopBlock, type FieldColumns, type ShopBlock } from "./title-strip";

/** At the foot of every sheet (TRADE.md, cautions). */
const FOOT =
  "A layout and records aid: code, WPS, design and acceptance come from the engineer, the owner and local law. Printed copies are uncontrolled.";
/** Width of the side column on tabloid and A3. */
const SIDE_WIDTH = 148;

/** A page before its number of pages is known. */
export interface PageFrame {
  readonly body: PaperBox;
  /** Side column above the title block; null on small and following pages. */
  readonly side: PaperBox | null;
  readonly logoBox: PaperBox | null;
  readonly cut: readonly CutText[];
  /** Under the content: the state across the page. */
  readonly under: readonly DisplayItem[];
  /** Over it: frame, title block, foot. */
  readonly over: (place: SheetPlace) => DisplayItem[];
}

export interface Paper {
  readonly frame: PaperBox;
  /** Frame above the foot line. */
  readonly inner: PaperBox;
  readonly items: readonly DisplayItem[];
}

/** The frame of the first page. */
export function firstFrame(facts: SheetFacts, measure: MeasureText): PageFrame {
  return isSmallSheet(facts.input.size) ? smallFrame(facts, measure) : sideFrame(facts, measure);
}

function sideFrame(facts: SheetFacts, measure: MeasureText): PageFrame {
  const paper = paperOf(facts.input.size, facts.print, measure);
  const { inner } = paper;
  const side = { ...inner, minX: inner.maxX - SIDE_WIDTH };
  const shop = shopBlock(facts.input.titleBlock, SIDE_WIDTH / 2, measure);
  const set = setFields(titleEntries(facts), SIDE_WIDTH, 2, shop.heightMm, 0, measure);
  const identity = { ...side, minY: inner.maxY - IDENTITY_HEIGHT };
  const fields = { ...side, minY: identity.minY - set.heightMm, maxY: identity.minY };
  return {
    ...titleParts(facts, paper, { set, shop, fields, identity }, measure),
    body: { ...inner, maxX: side.minX }, side: { ...side, maxY: fields.minY },
  };
}

function smallFrame(facts: SheetFacts, measure: MeasureText): PageFrame {
  const paper = paperOf(facts.input.size, facts.print, measure);
  const { inner } = paper;
  const widthMm = inner.maxX - inner.minX - IDENTITY_NARROW;
  const shop = shopBlock(facts.input.titleBlock, widthMm / 3, measure);
  const set = setFields(stripEntries(facts), widthMm, 3, shop.heightMm, IDENTITY_HEIGHT, measure);
  const strip = { ...inner, minY: inner.maxY - set.heightMm };
  const fields = { ...strip, maxX: strip.maxX - IDENTITY_NARROW };
  return {
    ...titleParts(facts, paper, { set, shop, fields, identity: { ...strip, minX: fields.maxX } }, measure),
    body: { ...inner, maxY: strip.minY }, side: null,
  };
}

/** The low strip of a following page. @param extra fields of a page that is no part of the spool sheet. */
export function followingFrame(facts: SheetFacts, measure: MeasureText, extra: readonly Field[] = []): PageFrame {
  const paper = paperOf(facts.input.size, facts.print, measure);
  const { inner } = paper;
  const set = setFields([...shortEntries(facts), ...extra], inner.maxX - inner.minX - IDENTITY_NARROW, isSmallSheet(facts.input.size) ? 2 : 3, 0, IDENTITY_HEIGHT, measure);
  const strip = { ...inner, minY: inner.maxY - set.heightMm };
  const fields = { ...strip, maxX: strip.maxX - IDENTITY_NARROW };
  return {
    ...titleParts(facts, paper, { set, shop: null, fields, identity: { ...strip, minX: fields.maxX } }, measure),
    body: { ...inner, maxY: strip.minY }, side: null,
  };
}

interface TitleParts {
  readonly set: FieldColumns;
  readonly shop: ShopBlock | null;
  readonly fields: PaperBox;
  readonly identity: PaperBox;
}

function titleParts(facts: SheetFacts, paper: Paper, parts: TitleParts, measure: MeasureText): Pick<PageFrame, "logoBox" | "cut" | "under" | "over"> {
  const { set, shop, fields, identity } = parts;
  return {
    logoBox: shop?.logoBox(fields) ?? null,
    cut: [...(shop?.cut ?? []), ...set.cut],
    under: stateAcross(facts.input.revision, paper.inner, measure),
    over: (place) => [
      ...paper.items, blockOutline(fields), blockOutline(identity),
      ...(shop?.items(fields) ?? []), ...fieldItems(set, fields, shop?.heightMm ?? 0), ...identityItems(facts.input, place, identity, measure),
    ],
  };
}

/** Frame and foot lines. */
export function paperOf(size: SheetSize, print: PrintWish | undefined, measure: MeasureText): Paper {
  const { widthMm, heightMm } = sheetSizeMm(size);
  const frame = frameBox(widthMm, heightMm, print?.leastMarginMm);
  const lines = [FOOT, ...(print?.foot ?? [])].flatMap((text) => wrapText(text, frame.maxX - frame.minX - 3, PLAIN, measure));
  const top = frame.maxY - linesHeight(lines.length) - 1;
  return {
    frame, inner: { ...frame, maxY: top },
    items: [
      boxOutline(frame, { layer: "frame", widthMm: FRAME_LINE }),
      boxOutline({ ...frame, minY: top }, { layer: "frame", widthMm: EDGE_LINE }),
      ...lines.map((line, index) => textAt([frame.minX + 1.5, top + 0.4 + baselineOf(index)], line, { layer: "caution" })),
    ],
  };
}
