/** The SVG painter of the display list: static text for export, tests and the gallery; the screen uses its helpers. */
import type { PaperPoint } from "../geometry/types";
import type { DisplayItem, Ink, MeasureText, PathSegment, TextItem } from "./drawing-types";

/** Paint of each ink; the PDF painter uses the same. Dark enough to print grey. */
export const INK_COLOURS: Readonly<Record<Ink, string>> = { ink: "#16181d", dye: "#1d4e9e", grey: "#7a7d85", paper: "#ffffff", alert: "#a3201c", pale: "#dedede" };

/** Roboto's font size over its capital height (1456 of 2048 units). */
export const FONT_SIZE_PER_CAP = 2048 / 1456;

const round = (value: number): string => String(Math.round(value * 1000) / 1000 + 0);
const pair = (p: PaperPoint): string => `${round(p[0])} ${round(p[1])}`;

/** Path data of a path item, in paper millimetres. */
export function pathData(segments: readonly PathSegment[]): string {
  return segments.map((s) => (s.op === "Z" ? "Z" : s.op === "C" ? `C${pair(s.c1)} ${pair(s.c2)} ${pair(s.to)}` : `${s.op}${pair(s.to)}`)).join("");
}

export function escapeXml(text: string): string {
  return text.replace(/[<>&"']/g, (c) => `&#${c.charCodeAt(0)};`).replace(/[\u0000-\u0008\u000b\u000c\u000e-\u001f\ufffe\uffff]/g, "");
}

/** SVG attributes of a text item's face: family, size in mm, weight. */
export function textFace(item: TextItem): { readonly fontFamily: string; readonly fontSizeMm: number; readonly fontWeight: 400 | 700 } {
  return { fontFamily: item.face === "mono" ? "'Roboto Mono', monospace" : "Roboto, sans-serif", fontSizeMm: item.capMm * FONT_SIZE_PER_CAP, fontWeight: item.face === "bold" ? 700 : 400 };
}

const dashes = (dash: readonly number[] | undefined): string => (dash ? ` stroke-dasharray="${dash.map(round).join(" ")}"` : "");

function itemSvg(item: DisplayItem, interactive: boolean, measure: MeasureText | undefined): string {
  const ref = interactive && item.ref ? ` data-kind="${item.ref.kind}" data-id="${escapeXml(item.ref.id)}"` : "";
  const layer = interactive ? ` data-layer="${item.layer}"` : "";
  const colour = (ink: Ink | null): string => (ink === null ? "none" : INK_COLOURS[ink]);
  switch (item.type) {
    case "line":
      return `<path d="M${pair(item.from)}L${pair(item.to)}" fill="none" stroke="${colour(item.ink)}" stroke-width="${round(item.widthMm)}"${dashes(item.dash)}${layer}${ref}/>`;
    case "path":
      return `<path d="${pathData(item.segments)}" fill="${colour(item.fill)}" stroke="${colour(item.stroke)}"${item.stroke ? ` stroke-width="${round(item.widthMm)}"` : ""}${dashes(item.dash)}${layer}${ref}/>`;
    case "text": {
      const face = textFace(item);
      const turn = item.rotateRad === 0 ? "" : ` transform="rotate(${round((item.rotateRad * 180) / Math.PI)} ${pair(item.at)})"`;
      const fit = measure && item.text.trim() !== "" ? ` textLength="${round(measure(item.text, item.capMm, item.face))}" lengthAdjust="spacingAndGlyphs"` : "";
      const weight = face.fontWeight === 700 ? ' font-weight="700"' : "";
      return `<text x="${round(item.at[0])}" y="${round(item.at[1])}" font-family="${face.fontFamily}" font-size="${round(face.fontSizeMm)}"${weight} text-anchor="${item.anchor}" fill="${colour(item.ink)}"${fit}${turn}${layer}${ref}>${escapeXml(item.text)}</text>`;
    }
  }
}

export interface SvgOptions {
  /** Adds what each item shows as data-kind, data-id and data-layer. */
  readonly interactive?: boolean;
  /** Gives each text its own width, so that it keeps its room where the reader's machine has another face. */
  readonly measure?: MeasureText;
}

/** A whole SVG document of `widthMm` by `heightMm`; one unit is one millimetre. Equal items give equal text. */
export function drawingSvg(items: readonly DisplayItem[], widthMm: number, heightMm: number, options: SvgOptions = {}): string {
  const body = items.map((item) => itemSvg(item, options.interactive === true, options.measure)).join("\n");
  const [w, h] = [round(widthMm), round(heightMm)];
  return `<svg xmlns="http://www.w3.org/2000/svg" width="${w}mm" height="${h}mm" viewBox="0 0 ${w} ${h}" stroke-linecap="round" stroke-linejoin="round">\n<rect width="${w}" height="${h}" fill="#ffffff"/>\n${body}\n</svg>\n`;
}
