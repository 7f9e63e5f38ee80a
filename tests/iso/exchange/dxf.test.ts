/**
 * The DXF writer, read back by `dxf-parser`, a reader that shares no code with it. Hand checks use lengths a person can
 * add up; the sheets of the sample runs are compared with their own display lists.
 */
import DxfParser from "dxf-parser";
import { describe, expect, test } from "vitest";
import { composeSheet, drawingDxf, dxfLayer, type DisplayItem, type PaperPoint, type TextItem } from "@/iso";
import { measureText } from "@/fonts/widths";
import { dxfText } from "@/iso/exchange/dxf-text";
import { cubicPoints, pathChains } from "@/iso/exchange/flatten";
import { circleSegments } from "@/iso/draw/paths";
import { sampleInput, sampleNames } from "../../pdf/sheet-inputs";

interface Read {
  readonly type: string;
  readonly layer: string;
  readonly vertices?: readonly { readonly x: number; readonly y: number }[];
  readonly points?: readonly { readonly x: number; readonly y: number }[];
  readonly startPoint?: { readonly x: number; readonly y: number };
  readonly endPoint?: { readonly x: number; readonly y: number };
  readonly text?: string;
  readonly textHeight?: number;
  readonly rotation?: number;
  readonly halign?: number;
  readonly shape?: boolean;
}

function readBack(dxf: string): { entities: Read[]; layers: string[]; header: Record<string, { x: number; y: number } | string> } {
  const read = new DxfParser().parseSync(dxf);
  if (read === null) throw new Error("the reader found no drawing");
  return { entities: read.entities as unknown as Read[], layers: Object.keys(read.tables.layer.layers), header: read.header as never };
}

const line = (layer: DisplayItem["layer"], from: PaperPoint, to: PaperPoint, widthMm = 0.3): DisplayItem => ({ type: "line", layer, ref: null, from, to, widthMm, ink: "ink" });
const text = (value: string, more: Partial<TextItem> = {}): TextItem => ({ type: "text", layer: "label", ref: null, at: [10, 10], anchor: "start", text: value, capMm: 2.5, face: "regular", rotateRad: 0, ink: "ink", ...more });
const square = (size: number, [x, y]: PaperPoint) => [{ op: "M" as const, to: [x, y] as PaperPoint }, { op: "L" as const, to: [x + size, y] as PaperPoint }, { op: "L" as const, to: [x + size, y + size] as PaperPoint }, { op: "L" as const, to: [x, y + size] as PaperPoint }, { op: "Z" as const }];

/** What the escapes mean (DXF reference: \U+XXXX is one UTF-16 unit). */
const decoded = (value: string): string => value.replace(/\\U\+([0-9A-F]{4})/g, (_, hex: string) => String.fromCharCode(parseInt(hex, 16)));

describe("entities", () => {
  test("a thin line is a LINE with y turned up, a wide one a POLYLINE of its width", () => {
    const { entities } = readBack(drawingDxf([line("dimension", [10, 20], [40, 20]), line("pipe", [10, 30], [40, 50], 0.7)], 100, 80));
    expect(entities.map((entity) => entity.type)).toEqual(["LINE", "POLYLINE"]);
    expect(entities[0]!.vertices!.map(({ x, y }) => [x, y])).toEqual([[10, 60], [40, 60]]);
    expect(entities[1]!.vertices!.map(({ x, y }) => [x, y])).toEqual([[10, 50], [40, 30]]);
    expect(entities.map((entity) => entity.layer)).toEqual(["DIMENSION", "PIPE"]);
  });

  test("a dot is filled: its fan of solids has the area of the flattened circle", () => {
    const dxf = drawingDxf([{ type: "path", layer: "weld", ref: null, segments: circleSegments([50, 50], 1.5), stroke: null, widthMm: 0, fill: "ink" }], 100, 100);
    const { entities } = readBack(dxf);
    expect(entities.every((entity) => entity.type === "SOLID")).toBe(true);
    const area = entities.reduce((sum, { points }) => sum + quadArea([points![0]!, points![1]!, points![3]!, points![2]!]), 0);
    expect(area).toBeGreaterThan(Math.PI * 2.25 * 0.97);
    expect(area).toBeLessThan(Math.PI * 2.25);
  });

  test("curves stay within 0.02 mm of the cubic", () => {
    const cubic: [PaperPoint, PaperPoint, PaperPoint, PaperPoint] = [[0, 0], [0, 40], [60, 40], [60, 0]];
    const chain = [cubic[0], ...cubicPoints(cubic)];
    for (let step = 0; step <= 2_000; step += 1) {
      const t = step / 2_000;
      const s = 1 - t;
      const at = (axis: 0 | 1) => s ** 3 * cubic[0][axis] + 3 * s * s * t * cubic[1][axis] + 3 * s * t * t * cubic[2][axis] + t ** 3 * cubic[3][axis];
      const nearest = Math.min(...chain.slice(1).map((end, index) => distance([at(0), at(1)], chain[index]!, end)));
      expect(nearest).toBeLessThan(0.02);
    }
  });

  test("text keeps height, turn and alignment", () => {
    const { entities } = readBack(drawingDxf([text("37 1/2", { anchor: "middle", capMm: 3.5, rotateRad: Math.PI / 6 })], 100, 100));
    expect(entities[0]).toMatchObject({ type: "TEXT", text: "37 1/2", textHeight: 3.5, rotation: -30, halign: 1 });
    expect(entities[0]!.endPoint).toMatchObject({ x: 10, y: 90 });
  });
});

describe("what paper hides", () => {
  test("a rear pipe breaks where the front one's knock-out lies", () => {
    const rear = line("pipe", [0, 50], [100, 50], 0.3);
    const knockOut: DisplayItem = { type: "line", layer: "halo", ref: null, from: [50, 30], to: [50, 70], widthMm: 4, ink: "paper" };
    const { entities } = readBack(drawingDxf([rear, knockOut, line("pipe", [50, 0], [50, 100], 0.3)], 100, 100));
    const spans = entities.map(({ vertices }) => vertices!.map(({ x, y }) => [x, y]));
    expect(spans).toEqual([[[0, 50], [48, 50]], [[52, 50], [100, 50]], [[50, 100], [50, 0]]]);
  });

  test("an arrowhead under a balloon is not drawn over it", () => {
    const arrow: DisplayItem = { type: "path", layer: "dimension", ref: null, segments: square(1, [50, 50]), stroke: null, widthMm: 0, fill: "ink" };
    const balloon: DisplayItem = { type: "path", layer: "balloon", ref: null, segments: circleSegments([50, 50], 3.5), stroke: "ink", widthMm: 0.3, fill: "paper" };
    expect(readBack(drawingDxf([arrow, balloon], 100, 100)).entities.map((entity) => entity.type)).toEqual(["POLYLINE"]);
    expect(readBack(drawingDxf([balloon, arrow], 100, 100)).entities.map((entity) => entity.type)).toEqual(["POLYLINE", "SOLID"]);
  });

  test("a symbol filled with paper hides the pipe under it, not the one over it", () => {
    const body: DisplayItem = { type: "path", layer: "symbol", ref: null, segments: square(20, [40, 40]), stroke: "ink", widthMm: 0.5, fill: "paper" };
    const { entities } = readBack(drawingDxf([line("pipe", [0, 50], [100, 50]), body, line("flow", [45, 45], [55, 45])], 100, 100));
    expect(entities.map((entity) => entity.type)).toEqual(["LINE", "LINE", "POLYLINE", "LINE"]);
    expect(entities[2]!.shape).toBe(true);
  });
});

describe("characters", () => {
  test.each([
    ["37\u00bd", "37 1/2"], ["\u00bc", "1/4"], ["3\u20441" + "6", "3/16"], ["two\nlines", "two lines"],
  ])("%s reads as plain text", (value, plain) => expect(dxfText(value)).toBe(plain));

  test.each(["\u00d8 219", "45\u00b0", "\u2264 3 mm \u00d7 2", "C:\\U+0041", "50%%d up", "100%", "^M^J", "\u65e5\u672c", "caf\u00e9", "\ud83d\ude00"])("%s is ASCII in the file and itself when decoded", (value) => {
    const dxf = drawingDxf([text(value)], 100, 100);
    expect(/^[\r\n -~]*$/.test(dxf)).toBe(true);
    const written = dxfText(value);
    expect(written.replace(/\\U\+[0-9A-F]{4}/g, "")).not.toMatch(/[\\^]|%%/);
    expect(decoded(written)).toBe(value);
  });
});

describe.each(sampleNames)("the sheet of %s", (name) => {
  const pages = composeSheet(sampleInput(name, "A3", "for-fabrication"), measureText);

  test("is read back with every text, layer and stroke", () => {
    for (const page of pages) {
      const { entities, layers, header } = readBack(drawingDxf(page.items, page.widthMm, page.heightMm, "one sheet"));
      const texts = page.items.filter((item): item is TextItem => item.type === "text" && item.text.trim() !== "");
      expect(entities.filter((entity) => entity.type === "TEXT").map((entity) => `${entity.layer} ${entity.textHeight!.toFixed(3)} ${decoded(entity.text!)}`).sort()).toEqual(
        texts.map((item) => `${dxfLayer(item.layer)} ${item.capMm.toFixed(3)} ${decoded(dxfText(item.text))}`).sort(),
      );
      expect(new Set(layers)).toEqual(new Set(["0", ...page.items.map((item) => dxfLayer(item.layer))]));
      expect(header.$ACADVER).toBe("AC1009");
      // The frame is drawn first to last on top: its lines come through whole.
      const frame = page.items.filter((item) => item.layer === "frame" && item.type === "line" && item.widthMm < 0.45);
      expect(entities.filter((entity) => entity.layer === "FRAME" && entity.type === "LINE").length).toBe(frame.length);
    }
  });

  test("has the extents of its display list", () => {
    for (const page of pages) {
      const { header } = readBack(drawingDxf(page.items, page.widthMm, page.heightMm));
      const points = page.items.flatMap((item): readonly PaperPoint[] => {
        if (item.type === "text") return item.text.trim() === "" ? [] : [item.at];
        if (item.type === "line") return item.ink === "paper" ? [] : [item.from, item.to];
        return item.stroke === null && (item.fill === "paper" || item.fill === "pale") ? [] : pathChains(item.segments).flatMap((chain) => chain.points);
      });
      const [min, max] = [header.$EXTMIN as { x: number; y: number }, header.$EXTMAX as { x: number; y: number }];
      expect(min.x).toBeCloseTo(Math.min(...points.map((p) => p[0])), 4);
      expect(max.x).toBeCloseTo(Math.max(...points.map((p) => p[0])), 4);
      expect(min.y).toBeCloseTo(page.heightMm - Math.max(...points.map((p) => p[1])), 4);
      expect(max.y).toBeCloseTo(page.heightMm - Math.min(...points.map((p) => p[1])), 4);
    }
  });
});

function quadArea(corners: readonly { readonly x: number; readonly y: number }[]): number {
  const twice = corners.reduce((sum, a, index) => {
    const b = corners[(index + 1) % corners.length]!;
    return sum + a.x * b.y - b.x * a.y;
  }, 0);
  return Math.abs(twice) / 2;
}

function distance([x, y]: PaperPoint, [ax, ay]: PaperPoint, [bx, by]: PaperPoint): number {
  const length = Math.hypot(bx - ax, by - ay);
  const t = Math.max(0, Math.min(1, ((x - ax) * (bx - ax) + (y - ay) * (by - ay)) / (length * length)));
  return Math.hypot(x - ax - t * (bx - ax), y - ay - t * (by - ay));
}
