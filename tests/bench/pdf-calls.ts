/**
 * The calls that painting makes on pdfkit's document, written down once and made again on fresh documents: what is
 * left of painting's time when nothing has to be decided any more. Three things the text painter does beside calls are
 * written down too (the page's font table, the glyphs of each embedded subset, the page labels), and what one call gives
 * to a later one (a page's section) is handed on within each replay, so that a replay gives the same bytes.
 */
import PDFDocument from "pdfkit";
import { escapeMetadata } from "@/pdf/document-metadata";

interface EmbeddedFont {
  readonly id: string;
  readonly subset: { readonly glyphs: readonly number[]; includeGlyph(glyph: number): number };
  widths: (number | undefined)[];
  unicode: (number[] | undefined)[];
  ref(): unknown;
}

/** The parts of pdfkit's document (0.20) that recording and replaying look at. */
interface Inner {
  readonly options: PDFKit.PDFDocumentOptions;
  readonly page: { readonly fonts: Record<string, unknown> } | null;
  readonly _fontFamilies: Readonly<Record<string, EmbeddedFont>>;
  readonly _root: { readonly data: Record<string, unknown> };
  end(): void;
}

type Method = (this: Inner, ...args: unknown[]) => unknown;
/** What calls gave when they were written down, and what the same calls gave in this replay. */
type Made = Map<unknown, unknown>;
type Step = (document: Inner, made: Made) => void;

export interface CallLog {
  readonly options: PDFKit.PDFDocumentOptions;
  readonly steps: readonly Step[];
  readonly calls: number;
}

/** A font asks the document for its reference by itself, see besideCalls. */
const NOT_CALLS = new Set(["constructor", "ref"]);

/** Runs `paint`, which paints one document, and writes down the outermost calls made on it once it was made. */
export async function recordCalls(paint: () => Promise<unknown>): Promise<CallLog> {
  const methods = PDFDocument.prototype as unknown as Record<string, Method>;
  const names = Object.getOwnPropertyNames(methods).filter((name) => !NOT_CALLS.has(name) && typeof methods[name] === "function");
  const originals = new Map(names.map((name) => [name, methods[name]!]));
  const steps: Step[] = [];
  let [depth, calls, ended, options] = [0, 0, false, null as PDFKit.PDFDocumentOptions | null];
  for (const [name, original] of originals) {
    methods[name] = function (...args) {
      // The document makes calls of its own while it is made; painting's begin with the faces it registers.
      if (depth === 0 && options === null && name === "registerFont") options = this.options;
      // What the document writes by itself after end() follows from it.
      const written = depth === 0 && options !== null && !ended;
      const given: { made?: unknown } = {};
      if (written) {
        ended = name === "end";
        if (name === "addPage" || name === "struct" || name === "end") steps.push(...besideCalls(this, name));
        steps.push((document, made) => {
          const result = (document as unknown as Record<string, Method>)[name]!.apply(document, args.map((arg) => handedOn(arg, made)));
          if (given.made !== undefined) made.set(given.made, result);
        });
        calls += 1;
      }
      depth += 1;
      try {
        const result = original.apply(this, args);
        if (written && typeof result === "object" && result !== (this as unknown)) given.made = result;
        return result;
      } finally {
        depth -= 1;
      }
    };
  }
  await paint().finally(() => originals.forEach((original, name) => (methods[name] = original)));
  if (options === null || !ended) throw new Error("Nothing was painted");
  return { options, steps, calls };
}

/** An argument, or a list of them, with what earlier calls made replaced by what this replay made. */
function handedOn(arg: unknown, made: Made): unknown {
  return Array.isArray(arg) ? arg.map((one) => made.get(one) ?? (one as unknown)) : (made.get(arg) ?? arg);
}

/** What was done to the document beside calls since the page before: fonts of the page (a section takes its number after them) and, at the end, of the file. */
function besideCalls(document: Inner, next: "addPage" | "struct" | "end"): Step[] {
  const used = Object.keys(document.page?.fonts ?? {});
  const steps: Step[] = used.map((id) => (replayed) => {
    replayed.page!.fonts[id] ??= fontOf(replayed, id).ref();
  });
  if (next !== "end") return steps;
  const labels = document._root.data.PageLabels;
  const fonts = Object.values(document._fontFamilies).map((font) => ({ id: font.id, glyphs: [...font.subset.glyphs], widths: [...font.widths], unicode: [...font.unicode] }));
  return [...steps, (replayed) => {
    replayed._root.data.PageLabels = labels;
    for (const { id, glyphs, widths, unicode } of fonts) {
      const font = fontOf(replayed, id);
      for (const glyph of glyphs) font.subset.includeGlyph(glyph);
      font.widths = [...widths];
      font.unicode = [...unicode];
    }
  }];
}

function fontOf(document: Inner, id: string): EmbeddedFont {
  const font = Object.values(document._fontFamilies).find((one) => one.id === id);
  if (font === undefined) throw new Error(`The replay has no font ${id}`);
  return font;
}

/** Makes the calls again on a fresh document; its bytes. */
export function replayCalls({ options, steps }: CallLog): Promise<Uint8Array> {
  const document = new PDFDocument(options);
  escapeMetadata(document);
  const made: Made = new Map();
  return new Promise((resolve, reject) => {
    const chunks: Buffer[] = [];
    document.on("data", (chunk: Buffer) => chunks.push(chunk));
    document.on("end", () => resolve(new Uint8Array(Buffer.concat(chunks))));
    document.on("error", reject);
    for (const step of steps) step(document as unknown as Inner, made);
  });
}
