/** A template, or the part of it within a window, as display items in the template's own frame. Never scaled. */
import type { DisplayItem, MeasureText } from "../draw/drawing-types";
import { lineItem, pathItem, polygonSegments, textItem } from "../draw/paths";
import { SAME_PAPER_MM } from "../geometry/tolerances";
import type { PaperBox, PaperPoint } from "../geometry/types";
import { clipPolyline, clipSegment } from "./clip";
import { FOOT_MM, HEAD_MM, type Template } from "./template";
import { OVERLAP_MM, type Tile } from "./tile";
import type { WrapLine } from "./wrap";

const CUT_WIDTH = 0.35;
const LINE_WIDTH = { station: 0.15, quarter: 0.3, top: 0.3 } as const;
const CAP = 2.5;
/** Hatching on the side cut away: how deep, and how far apart. */
const HATCH_DEPTH = 5;
const HATCH_STEP = 3;
/** Half a cross on a join line. */
const CROSS = 3;
const TOP_DASH = [4, 1, 0.8, 1] as const;
const SLIT_DASH = [1.2, 1.2] as const;
const JOIN_DASH = [5, 2] as const;
const READ_UP = -Math.PI / 2;

/** Items of one tile: outline, cut, hatching, lines with numbers and names, join lines. */
export function templateItems(template: Template, tile: Tile, measure: MeasureText): DisplayItem[] {
  const { shown } = tile;
  return [
    ...outline(template, shown), ...hatch(template, shown), ...lengthwise(template, shown), ...acrossItems(template, shown),
    ...clipPolyline(closedCut(template), shown).map((part) => pathItem("symbol", null, polygonSegments(part, false), { stroke: "ink", widthMm: CUT_WIDTH })),
    ...joins(template, tile),
    ...lineNames(template, shown, measure), ...words(template, tile, measure),
  ];
}

function closedCut({ cut, isClosed }: Template): readonly PaperPoint[] {
  return isClosed ? [...cut, cut[0]!] : cut;
}

function drawn(from: PaperPoint, to: PaperPoint, shown: PaperBox, widthMm: number, ink: "ink" | "dye" | "grey", dash?: readonly number[]): DisplayItem[] {
  const kept = clipSegment(from, to, shown);
  return kept ? [lineItem("box", null, kept[0], kept[1], widthMm, ink, dash)] : [];
}

/** Where the paper is cut out, and the base line. */
function outline({ widthMm, heightMm, baseY }: Template, shown: PaperBox): DisplayItem[] {
  const corners: readonly PaperPoint[] = [[0, 0], [widthMm, 0], [widthMm, heightMm], [0, heightMm], [0, 0]];
  return [
    ...corners.slice(1).flatMap((to, i) => drawn(corners[i]!, to, shown, 0.18, "ink")),
    ...drawn([0, baseY], [widthMm, baseY], shown, CUT_WIDTH, "ink"),
  ];
}

/** y of the cut at x; the middle of the paper for a closed cut. */
export function cutY({ cut, widthMm }: Template, x: number): number {
  const at = (Math.max(0, Math.min(widthMm, x)) / widthMm) * (cut.length - 1);
  const i = Math.min(cut.length - 2, Math.floor(at));
  return cut[i]![1] + (cut[i + 1]![1] - cut[i]![1]) * (at - i);
}

function hatch(template: Template, shown: PaperBox): DisplayItem[] {
  const cut = closedCut(template);
  const middle = template.isClosed ? middleOf(template.cut) : null;
  const items: DisplayItem[] = [];
  let gone = 0;
  for (let i = 1; i < cut.length; i++) {
    const [a, b] = [cut[i - 1]!, cut[i]!];
    gone += Math.hypot(b[0] - a[0], b[1] - a[1]);
    if (gone < HATCH_STEP) continue;
    gone = 0;
    items.push(...drawn(b, middle ? inward(b, middle) : [Math.min(b[0] + HATCH_DEPTH * 0.7, template.widthMm), b[1] - HATCH_DEPTH], shown, 0.18, "ink"));
  }
  return items;
}

function middleOf(points: readonly PaperPoint[]): PaperPoint {
  const xs = points.map(([x]) => x);
  const ys = points.map(([, y]) => y);
  return [(Math.min(...xs) + Math.max(...xs)) / 2, (Math.min(...ys) + Math.max(...ys)) / 2];
}

function inward(point: PaperPoint, middle: PaperPoint): PaperPoint {
  const [dx, dy] = [middle[0] - point[0], middle[1] - point[1]];
  const share = Math.min(0.6, HATCH_DEPTH / Math.max(SAME_PAPER_MM, Math.hypot(dx, dy)));
  return [point[0] + dx * share, point[1] + dy * share];
}

/** Station lines from the names down to the base line, the top's line, and slits from the cut to just above the base. */
function lengthwise(template: Template, shown: PaperBox): DisplayItem[] {
  const { baseY, isClosed } = template;
  const top = (x: number) => (isClosed ? 0 : cutY(template, x) - HATCH_DEPTH);
  return [
    ...template.lines.flatMap((line) => drawn([line.xMm, top(line.xMm)], [line.xMm, baseY], shown, LINE_WIDTH[line.kind], line.kind === "station" ? "ink" : "dye", line.kind === "top" ? TOP_DASH : undefined)),
    ...template.slits.flatMap((x) => drawn([x, cutY(template, x)], [x, baseY - SLIT_END], shown, 0.18, "grey", SLIT_DASH)),
  ];
}

/** Slits stop short of the base line, so that the paper stays in one piece. */
const SLIT_END = 5;

function acrossItems({ across, widthMm, lines }: Template, shown: PaperBox): DisplayItem[] {
  const clear = (lines[0]?.xMm ?? 0) + 2;
  return across.flatMap(({ y, name }) => [
    ...drawn([0, y], [widthMm, y], shown, LINE_WIDTH.quarter, "dye"),
    ...(y > shown.minY + 4 && y < shown.maxY && clear > shown.minX && clear < shown.maxX ? [textItem("label", null, [clear, y - 1], name, { capMm: CAP })] : []),
  ]);
}

function joins({ widthMm, heightMm }: Template, { joinsX, joinsY, shown }: Tile): DisplayItem[] {
  const cross = ([x, y]: PaperPoint) => [
    ...drawn([x - CROSS, y], [x + CROSS, y], shown, 0.25, "ink"), ...drawn([x, y - CROSS], [x, y + CROSS], shown, 0.25, "ink"),
  ];
  const upright = joinsX.flatMap((x) => [
    ...drawn([x, 0], [x, heightMm], shown, 0.2, "grey", JOIN_DASH),
    ...crossesAt(shown.maxY - shown.minY).flatMap((t) => cross([x, shown.minY + (shown.maxY - shown.minY) * t])),
  ]);
  const level = joinsY.flatMap((y) => [
    ...drawn([0, y], [widthMm, y], shown, 0.2, "grey", JOIN_DASH),
    ...crossesAt(shown.maxX - shown.minX).flatMap((t) => cross([shown.minX + (shown.maxX - shown.minX) * t, y])),
  ]);
  return [...upright, ...level];
}

/** Where crosses stand along a join, as shares of it. */
function crossesAt(length: number): readonly number[] {
  return length < SHORT_JOIN ? [0.5] : [0.25, 0.75];
}

const SHORT_JOIN = 60;

/** Numbers under the base line, and names of the quarters up the side that is cut away. */
function lineNames(template: Template, shown: PaperBox, measure: MeasureText): DisplayItem[] {
  return template.lines.flatMap((line) => {
    if (line.xMm < shown.minX || line.xMm > shown.maxX) return [];
    return [...numberItems(template, line, shown, measure), ...nameItems(template, line, shown, measure)];
  });
}

function numberItems({ baseY, widthMm }: Template, line: WrapLine, shown: PaperBox, measure: MeasureText): DisplayItem[] {
  const y = baseY + 1.2 + CAP;
  if (line.number === "" || y > shown.maxY || y - CAP < shown.minY) return [];
  const half = measure(line.number, CAP, "bold") / 2;
  const x = Math.min(Math.max(line.xMm, Math.max(0, shown.minX) + half + 0.3), Math.min(widthMm, shown.maxX) - half - 0.3);
  return [textItem("label", null, [x, y], line.number, { capMm: CAP, face: "bold", anchor: "middle" })];
}

function nameItems(template: Template, line: WrapLine, shown: PaperBox, measure: MeasureText): DisplayItem[] {
  const cut = template.isClosed ? Math.min(...template.cut.map(([, y]) => y)) : cutY(template, line.xMm);
  const above = cut - HATCH_DEPTH - 1.5;
  if (line.name === "") return aboveNumber(template, line, above, shown, measure);
  const tops = above <= shown.maxY && !template.isClosed ? above - shown.minY : 0;
  const start = Math.max(cut + (template.isClosed ? HATCH_DEPTH : 0) + 2, shown.minY + 1);
  const below = Math.min(template.across[0]?.y ?? template.baseY, shown.maxY) - 1 - start;
  const room = Math.max(tops, below);
  const text = [line.name, line.name.split(" / ")[0] ?? ""].map((name) => [line.number, name].filter(Boolean).join(" ")).find((one) => measure(one, CAP, "bold") <= room);
  if (text === undefined) return [];
  const tall = measure(text, CAP, "bold");
  const foot = tall <= tops ? above : start + tall;
  const crowded = template.lines.some((other) => other.name !== "" && other.xMm > line.xMm && other.xMm - line.xMm < NAMES_APART);
  const right = !crowded && line.xMm + 1 + CAP <= Math.min(shown.maxX, template.widthMm);
  return [textItem("label", null, [right ? line.xMm + 1 + CAP : line.xMm - 1, foot], text, { capMm: CAP, face: "bold", rotateRad: READ_UP })];
}

/** The number of a plain station at the cut too, where the stations leave room for it. */
function aboveNumber({ lines, widthMm }: Template, line: WrapLine, y: number, shown: PaperBox, measure: MeasureText): DisplayItem[] {
  const half = measure(line.number, CAP, "bold") / 2 + 0.3;
  const isRoom = widthMm / Math.max(1, lines.length) > NUMBERS_FROM && y - CAP >= shown.minY && y <= shown.maxY && line.xMm - half >= shown.minX && line.xMm + half <= shown.maxX;
  const crowded = lines.some((other) => other.name !== "" && Math.abs(other.xMm - line.xMm) < NAMES_APART);
  return line.number !== "" && isRoom && !crowded ? [textItem("label", null, [line.xMm, y], line.number, { capMm: CAP, face: "bold", anchor: "middle" })] : [];
}

/** Stations closer than this have their numbers under the base line only, mm. */
const NUMBERS_FROM = 8;

/** Two names side by side between their lines take this much, mm. */
const NAMES_APART = 2 * CAP + 3;

/** What to keep and what to cut away, where each is whole within the window. */
function words(template: Template, { shown, column }: Tile, measure: MeasureText): DisplayItem[] {
  const { baseY, heightMm, widthMm, isClosed } = template;
  const left = Math.max(0, shown.minX) + (column > 1 ? OVERLAP_MM : 0) + 2;
  const room = Math.min(widthMm, shown.maxX) - left - 2;
  const footY = heightMm - 1.6;
  const items: DisplayItem[] = [];
  if (footY <= shown.maxY && baseY >= shown.minY) {
    const text = [template.keep && `KEEP: ${template.keep}`, template.base].filter(Boolean).join(". ");
    items.push(...whole(text, [template.keep && `KEEP: ${template.keep}`, template.base], [left, footY], room, measure));
  }
  if (isClosed) {
    const [x, y] = middleOf(template.cut);
    if (inside([x - 8, y + 8], shown) && inside([x + 8, y + 12], shown)) items.push(textItem("label", null, [x - 12, y + 10], template.waste, { capMm: CAP, face: "bold", anchor: "middle" }));
    return items;
  }
  if (shown.minY <= 0 && HEAD_MM > FOOT_MM) items.push(...whole(template.waste, [template.waste], [left + wordIndent(template, left, measure), CAP + 1.2], room, measure));
  return items;
}

/** To the right of the first line's name. */
function wordIndent({ lines }: Template, left: number, measure: MeasureText): number {
  return lines.some((line) => line.name !== "" && Math.abs(line.xMm + 2 - left) < measure("00", CAP, "bold")) ? 5 : 0;
}

/** The longest wording that fits the room. */
function whole(text: string, shorter: readonly string[], at: PaperPoint, room: number, measure: MeasureText): DisplayItem[] {
  const fitting = [text, ...shorter].find((one) => one !== "" && measure(one, CAP, "bold") <= room);
  return fitting ? [textItem("label", null, at, fitting, { capMm: CAP, face: "bold" })] : [];
}

function inside([x, y]: PaperPoint, box: PaperBox): boolean {
  return x >= box.minX && x <= box.maxX && y >= box.minY && y <= box.maxY;
}
