/** Pages of display items to PDF bytes. No clock, no query: the same pages give the same bytes. */
import PDFDocument from "pdfkit";
import type { PaperBox, SheetPage } from "@/iso";
import { escapeMetadata } from "./document-metadata";
import { ItemPainter } from "./item-painter";
import { logoKind, paintLogo } from "./logo";
import { unprintableNote } from "./unprintable";
import { addSignatureField, withoutRoomWord, type SignatureFacts } from "./signature-field";

/** Points (1/72 in) in a millimetre. */
const POINTS_PER_MM = 72 / 25.4;

export interface PaintInput {
  readonly pages: readonly SheetPage[];
  /** ISO time written into the document's dates. An unreadable one counts as the start of 2000. */
  readonly issuedAt: string;
  readonly title: string;
  /** Picture for the pages' logo box, PNG, JPEG or SVG; null = none. */
  readonly logo: Uint8Array | null;
  readonly author?: string;
  readonly subject?: string;
  readonly keywords?: string;
  /** Leaves room for a signature on the first page, to be filled by signSheet; absent = none. */
  readonly signature?: SignatureFacts;
}

/**
 * Paints a sheet. A logo that cannot be read leaves its box with a note in it (ask logoProblem before storing one).
 * Never throws on user data; throws on an empty list of pages.
 */
export function paintSheet(input: PaintInput): Promise<Uint8Array> {
  if (input.pages.length === 0) throw new Error("A sheet needs at least one page");
  const document = new PDFDocument(optionsOf(input));
  escapeMetadata(document);
  const bytes = collectBytes(document);
  const painter = new ItemPainter(document);
  const sections = input.pages.map((page, index) => {
    const section = paintPage(document, painter, page, input.logo);
    if (index === 0 && input.signature) addSignatureField(document, input.signature);
    return section;
  });
  document.addStructure(document.struct("Document", {}, sections));
  labelPages(document, input.pages);
  document.end();
  return bytes;
}

function optionsOf(input: PaintInput): PDFKit.PDFDocumentOptions {
  const issued = new Date(input.issuedAt);
  const date = Number.isNaN(issued.getTime()) ? new Date("2000-01-01T00:00:00Z") : issued;
  const info = {
    Title: input.title, Author: input.author ?? "", Subject: input.subject ?? "Spool sheet", Keywords: input.keywords ?? "",
    Producer: "Quarterline", Creator: "Quarterline", CreationDate: date, ModDate: date,
  };
  // The default font is one of pdfkit's own; null keeps it out of the file. Its types know strings only.
  return { autoFirstPage: false, margin: 0, pdfVersion: "1.7", lang: "en-US", tagged: true, displayTitle: true, info: plainInfo(info), font: null as unknown as string, ...archival(input) };
}

/**
 * Laid out as ISO 19005-2 level B asks: faces embedded, colours defined, metadata inside. A JPEG logo may be in printing
 * inks, which the defined colours leave open; a sheet with one says nothing of archives.
 */
function archival({ logo }: PaintInput): { subset?: "PDF/A-2b" } {
  return logo !== null && logoKind(logo) === "jpeg" ? {} : { subset: "PDF/A-2b" };
}

function plainInfo<Info extends Record<string, string | Date>>(info: Info): Info {
  const entries = Object.entries(info).map(([name, value]) => [name, typeof value === "string" ? withoutRoomWord(value) : value]);
  return Object.fromEntries(entries) as Info;
}

function collectBytes(document: PDFKit.PDFDocument): Promise<Uint8Array> {
  return new Promise((resolve, reject) => {
    const chunks: Buffer[] = [];
    document.on("data", (chunk: Buffer) => chunks.push(chunk));
    document.on("end", () => resolve(new Uint8Array(Buffer.concat(chunks))));
    document.on("error", reject);
  });
}

/** One section a page, named as its label: readers that speak a page aloud find where each begins. */
function paintPage(document: PDFKit.PDFDocument, painter: ItemPainter, page: SheetPage, logo: Uint8Array | null): PDFKit.PDFStructureElement {
  document.addPage({ size: [page.widthMm * POINTS_PER_MM, page.heightMm * POINTS_PER_MM], margin: 0 });
  document.scale(POINTS_PER_MM);
  const content = document.markStructureContent("Sect");
  painter.startPage();
  for (const item of page.items) painter.paint(item);
  const note = unprintableNote(page);
  if (note) painter.paint(note);
  if (logo !== null && page.logoBox !== null) paintLogoBox(document, painter, logo, page.logoBox);
  document.endMarkedContent();
  return document.struct("Sect", { title: page.name }, [content]);
}

function paintLogoBox(document: PDFKit.PDFDocument, painter: ItemPainter, logo: Uint8Array, box: PaperBox): void {
  if (paintLogo(document, logo, box) === null) return;
  painter.startPage();
  painter.paint({ type: "text", layer: "logo", ref: null, at: [box.minX, (box.minY + box.maxY) / 2], anchor: "start", text: "Logo not readable", capMm: 2.5, face: "regular", rotateRad: 0, ink: "ink" });
}

interface Labelled {
  readonly _root: { readonly data: Record<string, unknown> };
}

/** Page labels, so that a viewer's page list shows the pages' names. */
function labelPages(document: PDFKit.PDFDocument, pages: readonly SheetPage[]): void {
  const numbers = pages.flatMap((page, index) => [index, { P: new String(page.name) }]);
  (document as unknown as Labelled)._root.data.PageLabels = { Nums: numbers };
}
