/**
 * Binds a sheet set into one PDF with bookmarks and page labels: composed pages painted, and where a sheet is issued its
 * stored bytes as a marked copy in front. The stored bytes themselves never change.
 */
import { PDFDocument, rgb, type PDFFont, type PDFPage } from "pdf-lib";
import { SAFE_MARGIN_MM, type SheetSet } from "@/iso";
import { FACES } from "@/fonts/families";
import { EM_PER_CAPITAL } from "@/fonts/widths";
import { copyFontkit } from "./copy-fontkit";
import { faceBytes } from "./faces";
import { makePart } from "./join-part";
import { joinParts } from "./join-parts";
import { markCopy, type CopyMark } from "./mark-copy";
import { paintSheet } from "./paint-sheet";

export interface BindInput {
  readonly set: SheetSet;
  /** The stored sheet that leads the set, and what its copy carries; null where the sheet is composed or not asked for. */
  readonly stored: { readonly bytes: Uint8Array; readonly mark: CopyMark } | null;
  readonly logo: Uint8Array | null;
  /** Fits the stored sheet's pages inside printers' margins; composed pages are laid out so already. */
  readonly safeMargins: boolean;
  readonly title: string;
  readonly author: string;
  readonly subject: string;
  readonly keywords: string;
  /** ISO time of printing. */
  readonly at: string;
}

const POINTS_PER_MM = 72 / 25.4;
const INK = rgb(0.07, 0.07, 0.07);
/** Capital height of what is stamped over the frame, and its baseline under the paper's upper edge, mm. */
const STAMP_CAP = 2.5;
const STAMP_DROP = 8.6;
const RIGHT_MARGIN = 10;
/** What a marked copy inks, from the paper's edges, mm: margin lines left, foot line below, the stamp above, the frame right. */
const INKED = { left: 11, bottom: 4, top: 5.6, right: 9.6 } as const;

/** Pages of a stored PDF. */
export async function countPages(bytes: Uint8Array): Promise<number> {
  return (await PDFDocument.load(bytes, { updateMetadata: false })).getPageCount();
}

/** Equal input gives equal bytes. @throws when the set has no page at all. */
export async function bindSheetSet(input: BindInput): Promise<Uint8Array> {
  const { set, stored } = input;
  if (set.of === 0) throw new Error("A set needs at least one page");
  const before = set.of - set.pages.length;
  const sheets = await Promise.all(set.bookmarks.map(async ({ page, pages }, sheet) => {
    const isStored = page <= before;
    const bytes = isStored ? await preparedCopy(stored!.bytes, stored!.mark, set.of, input.safeMargins) : await painted(input, page - before - 1, pages);
    return { bytes, mark: null, sheet, name: "" };
  }));
  const { bytes } = await makePart(sheets, input.title);
  const bookmarks = set.bookmarks.map(({ title }, sheet) => ({ title, sheet, within: [] }));
  const joined = await joinParts({ title: input.title, author: input.author, subject: input.subject, keywords: input.keywords, at: input.at, parts: [bytes], front: null, bookmarks });
  return joined.bytes;
}

function painted({ set, logo, title, author, at }: BindInput, from: number, count: number): Promise<Uint8Array> {
  return paintSheet({ pages: set.pages.slice(from, from + count), issuedAt: at, title, logo, author });
}

/** A marked copy that says which sheets of the set its pages are. */
async function preparedCopy(bytes: Uint8Array, mark: CopyMark, of: number, safeMargins: boolean): Promise<Uint8Array> {
  const document = await PDFDocument.load(await markCopy(bytes, mark), { updateMetadata: false });
  document.registerFontkit(copyFontkit);
  const bold = await document.embedFont(faceBytes("bold"), { subset: true, customName: FACES.bold.family });
  for (const [index, page] of document.getPages().entries()) {
    const scale = safeMargins ? fitScale(page) : 1;
    const fitted = scale < 1 ? `, fitted to margins at ${Math.floor(scale * 100)} %` : "";
    stampPlace(page, `SHEET ${index + 1} OF ${of} OF THIS SET${fitted}`, bold);
    if (safeMargins) fitInside(page, scale);
  }
  return document.save({ useObjectStreams: false });
}

function stampPlace(page: PDFPage, text: string, font: PDFFont): void {
  const { width, height } = page.getSize();
  const size = STAMP_CAP * EM_PER_CAPITAL * POINTS_PER_MM;
  page.drawText(text, { x: width - RIGHT_MARGIN * POINTS_PER_MM - font.widthOfTextAtSize(text, size), y: height - STAMP_DROP * POINTS_PER_MM, size, font, color: INK });
}

/** How much a copy's ink shrinks to stand inside the safe margins; 1 where it only moves. */
function fitScale(page: PDFPage): number {
  const { width, height } = page.getSize();
  const [across, up] = [width / POINTS_PER_MM, height / POINTS_PER_MM];
  const room = (size: number) => size - 2 * SAFE_MARGIN_MM;
  return Math.min(1, room(across) / (across - INKED.left - INKED.right), room(up) / (up - INKED.bottom - INKED.top));
}

/** Moves the ink's middle to the paper's. */
function fitInside(page: PDFPage, scale: number): void {
  const { width, height } = page.getSize();
  const middle = [(INKED.left * POINTS_PER_MM + width - INKED.right * POINTS_PER_MM) / 2, (INKED.bottom * POINTS_PER_MM + height - INKED.top * POINTS_PER_MM) / 2] as const;
  page.scaleContent(scale, scale);
  page.translateContent(width / 2 - middle[0] * scale, height / 2 - middle[1] * scale);
}
