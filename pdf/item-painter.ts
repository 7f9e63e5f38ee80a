/**
 * Paints a display list with pdfkit, straight: lines, cubics and text only. Pen and colours are set when they change,
 * since a sheet has thousands of items and few pens.
 */
import { INK_COLOURS, type DisplayItem, type Ink, type PathSegment, type TextItem } from "@/iso";
import { measureText } from "@/fonts/widths";
import { TextPainter } from "./text-painter";

export class ItemPainter {
  readonly #document: PDFKit.PDFDocument;
  readonly #text: TextPainter;
  #stroke: Ink | null = null;
  #fill: Ink | null = null;
  #widthMm = -1;
  #dash = "";

  constructor(document: PDFKit.PDFDocument) {
    this.#document = document;
    this.#text = new TextPainter(document);
  }

  /** A new page has a fresh graphics state: forget the pen. Line ends are round, as a pen's. */
  startPage(): void {
    this.#stroke = null;
    this.#fill = null;
    this.#widthMm = -1;
    this.#dash = "";
    this.#document.lineCap("round").lineJoin("round");
  }

  paint(item: DisplayItem): void {
    if (item.type === "text") this.#paintText(item);
    else if (item.type === "line") {
      this.#pen(item.ink, item.widthMm, item.dash);
      this.#document.moveTo(item.from[0], item.from[1]).lineTo(item.to[0], item.to[1]).stroke();
    } else {
      if (item.stroke === null && item.fill === null) return;
      if (item.stroke !== null) this.#pen(item.stroke, item.widthMm, item.dash);
      if (item.fill !== null) this.#fillWith(item.fill);
      for (const segment of item.segments) this.#segment(segment);
      if (item.stroke === null) this.#document.fill();
      else if (item.fill === null) this.#document.stroke();
      else this.#document.fillAndStroke();
    }
  }

  #segment(segment: PathSegment): void {
    if (segment.op === "Z") this.#document.closePath();
    else if (segment.op === "C") {
      this.#document.bezierCurveTo(segment.c1[0], segment.c1[1], segment.c2[0], segment.c2[1], segment.to[0], segment.to[1]);
    } else if (segment.op === "M") this.#document.moveTo(segment.to[0], segment.to[1]);
    else this.#document.lineTo(segment.to[0], segment.to[1]);
  }

  #paintText(item: TextItem): void {
    if (item.text === "") return;
    this.#fillWith(item.ink);
    const back = item.anchor === "start" ? 0 : measureText(item.text, item.capMm, item.face) * (item.anchor === "end" ? 1 : 0.5);
    this.#text.paint(item, item.at[0] - back * Math.cos(item.rotateRad), item.at[1] - back * Math.sin(item.rotateRad));
  }

  #pen(ink: Ink, widthMm: number, dash: readonly number[] | undefined): void {
    if (ink !== this.#stroke) this.#document.strokeColor(INK_COLOURS[ink]);
    if (widthMm !== this.#widthMm) this.#document.lineWidth(widthMm);
    const wanted = dash?.join(" ") ?? "";
    if (wanted !== this.#dash) {
      // All of it: a chain line's short dash is what tells it from a dashed one. pdfkit takes a list, its types one number.
      if (dash && dash.length > 0) this.#document.dash([...dash] as unknown as number, {});
      else this.#document.undash();
    }
    this.#stroke = ink;
    this.#widthMm = widthMm;
    this.#dash = wanted;
  }

  #fillWith(ink: Ink): void {
    if (ink !== this.#fill) this.#document.fillColor(INK_COLOURS[ink]);
    this.#fill = ink;
  }
}
