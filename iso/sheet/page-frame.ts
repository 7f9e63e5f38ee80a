/** What every page has: frame, foot line, strip with identity, and the body left for content. */
import type { DisplayItem, MeasureText } from "../draw/drawing-types";
import type { PaperBox } from "../geometry/types";
import { IDENTITY_HEIGHT, IDENTITY_WIDE_HEIGHT, IDENTITY_WIDE_WIDTH, IDENTITY_WIDTH, identityItems, identityWideItems, type SheetPlace } from "./identity-block";
import { boxOutline, textAt } from "./items";
import type { CutText } from "./notes-table";
import type { SheetFacts } from "./sheet-facts";
import { EDGE_LINE, FRAME_LINE, frameBox, isSmallSheet, sheetSizeMm, TEXT_CAP } from "./sheet-size";
import { stateAcross } from "./state-mark";
import { baselineOf, linesHeight, wrapText } from "./text-setting";
import { shortEntries, titleEntries } from "./title-fields";
import { blockOutline, fieldItems, setFields, shopBlock } from "./title-strip";

/** At the foot of every sheet (TRADE.md, cautions). */
const FOOT = [
  "A layout and records aid: code, WPS, design and acceptance come from the engineer, the owner and local law.",
  "Printed copies are uncontrolled.",
];

/** A page before its number of pages is known. */
export interface PageFrame {
  readonly body: PaperBox;
  readonly logoBox: PaperBox | null;
  readonly cut: readonly CutText[];
  /** Under the content: the state across the page. */
  readonly under: readonly DisplayItem[];
  /** Over it: frame, strip, foot. */
  readonly over: (place: SheetPlace) => DisplayItem[];
}

interface Foot {
  readonly items: readonly DisplayItem[];
  readonly top: number;
}

/** The strip of a first page, with all fields. */
export function firstFrame(facts: SheetFacts, measure: MeasureText): PageFrame {
  const { frame, foot } = paper(facts, measure);
  const columnCount = isSmallSheet(facts.input.size) ? 3 : 5;
  const fieldsMm = frame.maxX - frame.minX - IDENTITY_WIDTH;
  const shop = shopBlock(facts.input.titleBlock.shopName, facts.input.titleBlock.logo !== null, fieldsMm / columnCount, measure);
  const set = setFields(titleEntries(facts), fieldsMm, columnCount, shop.heightMm, IDENTITY_HEIGHT, measure);
  const strip = { minX: frame.minX, minY: foot.top - set.heightMm, maxX: frame.maxX, maxY: foot.top };
  const fields = { ...strip, maxX: strip.maxX - IDENTITY_WIDTH };
  const identity = { ...strip, minX: fields.maxX };
  const body = { ...frame, maxY: strip.minY };
  return {
    body, logoBox: shop.logoBox(fields), cut: [...shop.cut, ...set.cut], under: stateAcross(facts.input.revision, body, measure),
    over: (place) => [
      ...frameItems(frame, foot), blockOutline(fields), blockOutline(identity),
      ...shop.items(fields), ...fieldItems(set, fields, shop.heightMm), ...identityItems(facts.input, place, identity, measure),
    ],
  };
}

/** The low strip of a following page. */
export function followingFrame(facts: SheetFacts, measure: MeasureText): PageFrame {
  const { frame, foot } = paper(facts, measure);
  const columnCount = isSmallSheet(facts.input.size) ? 2 : 3;
  const set = setFields(shortEntries(facts), frame.maxX - frame.minX - IDENTITY_WIDE_WIDTH, columnCount, 0, IDENTITY_WIDE_HEIGHT, measure);
  const strip = { minX: frame.minX, minY: foot.top - set.heightMm, maxX: frame.maxX, maxY: foot.top };
  const fields = { ...strip, maxX: strip.maxX - IDENTITY_WIDE_WIDTH };
  const identity = { ...strip, minX: fields.maxX };
  const body = { ...frame, maxY: strip.minY };
  return {
    body, logoBox: null, cut: [], under: stateAcross(facts.input.revision, body, measure),
    over: (place) => [
      ...frameItems(frame, foot), blockOutline(fields), blockOutline(identity),
      ...fieldItems(set, fields, 0), ...identityWideItems(facts.input, place, identity, measure),
    ],
  };
}

function paper(facts: SheetFacts, measure: MeasureText): { readonly frame: PaperBox; readonly foot: Foot } {
  const { widthMm, heightMm } = sheetSizeMm(facts.input.size);
  const frame = frameBox(widthMm, heightMm);
  return { frame, foot: footLine(facts, frame, measure) };
}

/** Cautions of every sheet, and the head of the audit chain it was issued under. */
function footLine(facts: SheetFacts, frame: PaperBox, measure: MeasureText): Foot {
  const head = facts.input.revision.auditHead;
  const text = [...FOOT, ...(head === "" ? [] : [`Record ${head.slice(0, 16)}`])].join(" ");
  const lines = wrapText(text, frame.maxX - frame.minX - 3, { capMm: TEXT_CAP, face: "regular" }, measure);
  const top = frame.maxY - linesHeight(lines.length) - 1;
  return { top, items: lines.map((line, index) => textAt([frame.minX + 1.5, top + 0.4 + baselineOf(index)], line, { layer: "caution" })) };
}

function frameItems(frame: PaperBox, foot: Foot): DisplayItem[] {
  return [
    boxOutline(frame, { layer: "frame", widthMm: FRAME_LINE }),
    boxOutline({ ...frame, minY: foot.top }, { layer: "frame", widthMm: EDGE_LINE }),
    ...foot.items,
  ];
}
