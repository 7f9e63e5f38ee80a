/**
 * The DXF writer: one sheet page as a drawing in the open DXF ASCII format, version AC1009 (release 12), which every
 * reader still takes (format: the published DXF reference of release 12). One drawing unit is one millimetre on paper,
 * y up; nothing is to scale. Thin lines are LINE; wide lines and paths are POLYLINE with their width, curves flattened
 * within 0.02 mm; filled convex shapes are SOLID fans; text is TEXT at its capital height. Layers bear our layer names in
 * capitals, since release 12 knows no small letters. Paper ink hides on paper; here the strokes it hides are cut away.
 */
import type { DisplayItem, Face, Ink, PathItem, TextItem } from "../draw/drawing-types";
import type { PaperPoint } from "../geometry/types";
import { dxfNumber, dxfText } from "./dxf-text";
import type { Chain } from "./flatten";
import { visibleParts, type Visible } from "./visible-strokes";

/** A line at least this wide on paper keeps its width, mm: the pipe and the symbols. */
export const WIDE_LINE_MM = 0.45;

/** Colour numbers of the format's fixed list: 7 is black on white, 8 dark grey, 254 pale grey. */
const COLOURS: Readonly<Record<Ink, number>> = { ink: 7, dye: 5, grey: 8, paper: 7, alert: 1, pale: 254 };
const STYLES: Readonly<Record<Face, string>> = { regular: "PLAIN", bold: "BOLD", mono: "MONO" };
const STYLE_FONTS: Readonly<Record<Face, string>> = { regular: "arial.ttf", bold: "arialbd.ttf", mono: "cour.ttf" };
const ALIGN: Readonly<Record<TextItem["anchor"], number>> = { start: 0, middle: 1, end: 2 };

type Pair = readonly [number, string];

const integer = (code: number, value: number): Pair => [code, String(value)];
const real = (code: number, value: number): Pair => [code, dxfNumber(value)];
const place = (code: number, [x, y]: PaperPoint): Pair[] => [real(code, x), real(code + 10, y), real(code + 20, 0)];

/** Name of a layer in the file. */
export function dxfLayer(layer: DisplayItem["layer"]): string {
  return layer.toUpperCase();
}

/** A whole DXF file of `widthMm` by `heightMm`; ASCII only. Equal items give equal text. `remark` is one line for who opens it as text. */
export function drawingDxf(items: readonly DisplayItem[], widthMm: number, heightMm: number, remark = ""): string {
  const seen = visibleParts(items);
  const up = ([x, y]: PaperPoint): PaperPoint => [x, heightMm - y];
  const entities = items.flatMap((item, index) => itemEntities(item, seen[index]!, up));
  const pairs = [
    ...(remark === "" ? [] : [[999, dxfText(remark)] as Pair]),
    ...headerSection(entities, widthMm, heightMm), ...tablesSection(items), ...section("BLOCKS", []), ...section("ENTITIES", entities), [0, "EOF"] as Pair,
  ];
  return `${pairs.map(([code, value]) => `${String(code).padStart(3)}\r\n${value}`).join("\r\n")}\r\n`;
}

function section(name: string, content: readonly Pair[]): Pair[] {
  return [[0, "SECTION"], [2, name], ...content, [0, "ENDSEC"]];
}

function headerSection(entities: readonly Pair[], widthMm: number, heightMm: number): Pair[] {
  const xs = coordinates(entities, 10, 13);
  const ys = coordinates(entities, 20, 23);
  const corner = (pick: (...values: number[]) => number, otherwise: PaperPoint): PaperPoint =>
    xs.length === 0 ? otherwise : [xs.reduce((a, b) => pick(a, b)), ys.reduce((a, b) => pick(a, b))];
  return section("HEADER", [
    [9, "$ACADVER"], [1, "AC1009"],
    [9, "$INSBASE"], ...place(10, [0, 0]),
    [9, "$EXTMIN"], ...place(10, corner(Math.min, [0, 0])),
    [9, "$EXTMAX"], ...place(10, corner(Math.max, [widthMm, heightMm])),
    [9, "$LIMMIN"], real(10, 0), real(20, 0),
    [9, "$LIMMAX"], real(10, widthMm), real(20, heightMm),
  ]);
}

/** Coordinates of everything drawn; a POLYLINE's own point is a placeholder and comes before its layer's vertices. */
function coordinates(entities: readonly Pair[], from: number, to: number): number[] {
  let kind = "";
  return entities.flatMap(([code, value]) => {
    if (code === 0) kind = value;
    return kind !== "POLYLINE" && code >= from && code <= to ? [Number(value)] : [];
  });
}

function tablesSection(items: readonly DisplayItem[]): Pair[] {
  const layers = [...new Set(items.map((item) => dxfLayer(item.layer)))].sort();
  const dashes = [...new Map(items.flatMap((item) => (item.type !== "text" && item.dash ? [[dashName(item.dash), item.dash] as const] : []))).entries()];
  return section("TABLES", [
    ...table("LTYPE", [lineType("CONTINUOUS", "Solid line", []), ...dashes.map(([name, dash]) => lineType(name, "Dashed", dash))]),
    ...table("LAYER", ["0", ...layers].map((name): Pair[] => [[0, "LAYER"], [2, name], integer(70, 0), integer(62, 7), [6, "CONTINUOUS"]])),
    ...table("STYLE", (Object.keys(STYLES) as Face[]).map((face): Pair[] => [
      [0, "STYLE"], [2, STYLES[face]], integer(70, 0), real(40, 0), real(41, 1), real(50, 0), integer(71, 0), real(42, 2.5), [3, STYLE_FONTS[face]], [4, ""],
    ])),
  ]);
}

function table(name: string, rows: readonly (readonly Pair[])[]): Pair[] {
  return [[0, "TABLE"], [2, name], integer(70, rows.length), ...rows.flat(), [0, "ENDTAB"]];
}

function lineType(name: string, words: string, dash: readonly number[]): Pair[] {
  const total = dash.reduce((sum, part) => sum + part, 0);
  return [
    [0, "LTYPE"], [2, name], integer(70, 0), [3, words], integer(72, 65), integer(73, dash.length), real(40, total),
    ...dash.map((part, index) => real(49, index % 2 === 0 ? part : -part)),
  ];
}

function dashName(dash: readonly number[]): string {
  return `DASH_${dash.map((part) => String(Math.round(part * 100))).join("_")}`;
}

function itemEntities(item: DisplayItem, { strokes, fills: outlines }: Visible, up: (p: PaperPoint) => PaperPoint): Pair[] {
  if (item.type === "text") return textEntity(item, up);
  const ink = item.type === "line" ? item.ink : item.stroke;
  const fills = item.type === "path" ? fillEntities(item, outlines, up) : [];
  if (ink === null) return fills;
  const head = entityHead(item, ink);
  return [...fills, ...strokes.flatMap((chain) => strokeEntity(chain, item.widthMm, item.type === "line", head, up))];
}

/** Layer, colour and line type, shared by everything drawn of an item. */
function entityHead(item: DisplayItem, ink: Ink): Pair[] {
  const dash: Pair[] = item.type !== "text" && item.dash ? [[6, dashName(item.dash)]] : [];
  return [[8, dxfLayer(item.layer)], integer(62, COLOURS[ink]), ...dash];
}

function strokeEntity({ points, closed }: Chain, widthMm: number, isLine: boolean, head: readonly Pair[], up: (p: PaperPoint) => PaperPoint): Pair[] {
  if (isLine && widthMm < WIDE_LINE_MM) return [[0, "LINE"], ...head, ...place(10, up(points[0]!)), ...place(11, up(points[1]!))];
  return [
    [0, "POLYLINE"], ...head, integer(66, 1), ...place(10, [0, 0]), integer(70, closed ? 1 : 0), real(40, widthMm), real(41, widthMm),
    ...points.flatMap((point): Pair[] => [[0, "VERTEX"], head[0]!, ...place(10, up(point))]),
    [0, "SEQEND"], head[0]!,
  ];
}

/** Filled convex outlines as fans of SOLID. */
function fillEntities(item: PathItem, outlines: readonly Chain[], up: (p: PaperPoint) => PaperPoint): Pair[] {
  if (item.fill === null) return [];
  const head: Pair[] = [[8, dxfLayer(item.layer)], integer(62, COLOURS[item.fill])];
  return outlines.filter(({ points }) => isConvex(points)).flatMap(({ points }) => fan(points.map(up), head));
}

/** Quads of a convex outline. SOLID takes its last two corners crosswise; a triangle repeats its third. */
function fan(points: readonly PaperPoint[], head: readonly Pair[]): Pair[] {
  const pairs: Pair[] = [];
  for (let at = 1; at + 1 < points.length; at += 2) {
    const [a, b, c] = [points[0]!, points[at]!, points[at + 1]!];
    const d = points[at + 2] ?? c;
    pairs.push([0, "SOLID"], ...head, ...place(10, a), ...place(11, b), ...place(12, d), ...place(13, c));
  }
  return pairs;
}

function isConvex(points: readonly PaperPoint[]): boolean {
  const turns = points.map((a, index) => {
    const [b, c] = [points[(index + 1) % points.length]!, points[(index + 2) % points.length]!];
    return (b[0] - a[0]) * (c[1] - b[1]) - (b[1] - a[1]) * (c[0] - b[0]);
  });
  return turns.every((turn) => turn >= 0) || turns.every((turn) => turn <= 0);
}

function textEntity(item: TextItem, up: (p: PaperPoint) => PaperPoint): Pair[] {
  const text = dxfText(item.text);
  if (text.trim() === "") return [];
  const at = up(item.at);
  const aligned: Pair[] = item.anchor === "start" ? [] : [integer(72, ALIGN[item.anchor]), ...place(11, at)];
  return [
    [0, "TEXT"], ...entityHead(item, item.ink), ...place(10, at), real(40, item.capMm), [1, text], real(50, (-item.rotateRad * 180) / Math.PI),
    [7, STYLES[item.face]], ...aligned,
  ];
}
