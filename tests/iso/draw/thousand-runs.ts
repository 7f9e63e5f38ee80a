/**
 * The thousand random lines (random-runs.ts says how they are made) in four views each. Every seed of the share asked for
 * is drawn and counted. A line of up to MOST_ON_ONE labels is drawn on one A3, not split; a longer one on as many sheets as
 * drawSheets takes. Of each is counted what its model holds against what its sheets show; of those on one sheet also what a
 * reader would find wrong (drawing-measure.ts, which shares no code with the passes).
 */
import { drawModel, drawSheets, type Drawing, type DrawOptions, type Model, type View } from "@/iso";
import { measureText } from "@/fonts/widths";
import { modelOf, SHOW_ALL } from "./draw-helpers";
import { measureDrawing, type DrawingMeasure } from "./drawing-measure";
import { greedyClean } from "./greedy-peer";
import { randomLine } from "./random-runs";

export const SEEDS = 1000;
export const VIEWS: readonly View[] = [1, 2, 3, 4];
/** A page of its own for the isometric on A3: the frame less title strip, as sheets after the first have it, mm. */
export const A3_PAGE = { widthMm: 390, heightMm: 245 } as const;
export const MOST_ON_ONE = 200;
/** Buckets by labels on one sheet. */
export const BUCKETS = [60, 120, 200] as const;
const NEAR = 0.12;
/** Labels of a model before it is drawn, for choosing how: about what a point brings. */
const LABELS_PER_POINT = 5.4;
const LEAST_LEG_MM = 2;
/** Less than this past its room is float dust, mm. */
const DUST_MM = 0.001;

export interface Bucket {
  readonly near: number;
  drawings: number;
  labels: number;
  clean: number;
  /** Labels placed freely (all but numbers on their lines), how many of them are clean, and how many the greedy peer leaves clean. */
  free: number;
  cleanFree: number;
  leaderCrossings: number;
  dimensionCrossings: number;
  leadersOverDimensions: number;
  greedy: number;
  greedyCorners: number;
  readonly leaders: number[];
}

export interface ThousandReport {
  lines: number;
  drawings: number;
  sheets: number;
  labels: number;
  clean: number;
  overlaps: number;
  /** Names of what a model holds and its sheets do not show. */
  readonly missing: string[];
  readonly overlapping: string[];
  /** Drawings on one sheet that stand out of its room, and sheets of lines that took more than one. */
  outOfRoom: number;
  splitLines: number;
  degenerate: number;
  drawMs: number;
  readonly buckets: readonly Bucket[];
}

const optionsFor = (view: View): DrawOptions => ({ ...A3_PAGE, measure: measureText, view, spool: null, show: SHOW_ALL });

/** Names of joints, pieces, dimensions and items of a model that none of its sheets shows. */
export function missingOn(model: Model, sheets: readonly Drawing[]): string[] {
  const shown = new Set(sheets.flatMap((drawing) => drawing.shown.map((ref) => `${ref.kind} ${ref.id}`)));
  const components = new Set(model.components.map(({ id }) => id));
  const owed = [
    ...model.joints.map((joint) => `joint ${joint.key}`),
    ...model.pieces.map((piece) => `piece ${piece.key}`),
    ...model.legs.filter((leg) => leg.lengthMm > LEAST_LEG_MM).map((leg) => `dimension ${leg.id}`),
    ...model.spools.flatMap((spool) => spool.materials.flatMap((row) => row.refs)).filter((id) => components.has(id)).map((id) => `component ${id}`),
  ];
  return owed.filter((name) => !shown.has(name));
}

const emptyBucket = (near: number): Bucket => ({ near, drawings: 0, labels: 0, clean: 0, free: 0, cleanFree: 0, leaderCrossings: 0, dimensionCrossings: 0, leadersOverDimensions: 0, greedy: 0, greedyCorners: 0, leaders: [] });

function addTo(bucket: Bucket, measure: DrawingMeasure, drawing: Drawing): void {
  bucket.drawings += 1;
  bucket.labels += measure.labels;
  bucket.clean += measure.clean;
  bucket.free += measure.free;
  bucket.cleanFree += measure.cleanFree;
  bucket.leaderCrossings += measure.leaderCrossings;
  bucket.dimensionCrossings += measure.dimensionCrossings;
  bucket.leadersOverDimensions += measure.leadersOverDimensions;
  bucket.leaders.push(...measure.leaders);
  if (bucket.near !== 120) return;
  bucket.greedy += greedyClean(drawing, 1);
  bucket.greedyCorners += greedyClean(drawing, 4);
}

/** Pipe of no length or not a number on paper. */
const degenerateLegs = (drawing: Drawing): number =>
  drawing.items.filter((item) => item.type === "line" && item.layer === "pipe" && !(Math.hypot(item.to[0] - item.from[0], item.to[1] - item.from[1]) >= 0)).length;

function drawnOn(model: Model, points: number, view: View): readonly Drawing[] {
  if (points * LABELS_PER_POINT > MOST_ON_ONE) return drawSheets(model, optionsFor(view));
  return [drawModel(model, optionsFor(view))];
}

/** Draws every `step`-th seed from `first` on, in all views; `most` leaves longer lines to others, for a quick look. */
export function measureRuns(first: number, step: number, most = Infinity): ThousandReport {
  const report: ThousandReport = {
    lines: 0, drawings: 0, sheets: 0, labels: 0, clean: 0, overlaps: 0, missing: [], overlapping: [], outOfRoom: 0, splitLines: 0, degenerate: 0, drawMs: 0, buckets: BUCKETS.map(emptyBucket),
  };
  for (let seed = first; seed <= SEEDS; seed += step) {
    const document = randomLine(seed);
    const points = document.runs.reduce((sum, run) => sum + run.points.length, 0);
    if (points > most) continue;
    report.lines += 1;
    const model = modelOf(document);
    for (const view of VIEWS) addRun(report, model, points, seed, view);
  }
  return report;
}

function addRun(report: ThousandReport, model: Model, points: number, seed: number, view: View): void {
  const before = process.cpuUsage().user;
  const sheets = drawnOn(model, points, view);
  report.drawMs += (process.cpuUsage().user - before) / 1000;
  report.drawings += 1;
  report.sheets += sheets.length;
  if (sheets.length > 1) report.splitLines += 1;
  report.missing.push(...missingOn(model, sheets).map((name) => `seed ${seed}, view ${view}: ${name}`));
  for (const drawing of sheets) {
    const measure = measureDrawing(drawing);
    report.labels += measure.labels;
    report.clean += measure.clean;
    report.overlaps += Math.max(measure.onLabels, drawing.report.overlaps);
    if (measure.onLabels > 0) report.overlapping.push(`seed ${seed}, view ${view}`);
    report.degenerate += degenerateLegs(drawing);
    const { bounds } = drawing;
    const past = Math.max(-bounds.minX, -bounds.minY, bounds.maxX - drawing.widthMm, bounds.maxY - drawing.heightMm);
    if (past > DUST_MM) report.outOfRoom += 1;
    if (sheets.length > 1) continue;
    const bucket = report.buckets.find(({ near }) => Math.abs(measure.labels - near) <= near * NEAR);
    if (bucket) addTo(bucket, measure, drawing);
  }
}

export const share = (part: number, whole: number): number => (whole === 0 ? 1 : part / whole);

export function leaderMean({ leaders }: Bucket): number {
  return leaders.reduce((sum, mm) => sum + mm, 0) / Math.max(1, leaders.length);
}

/** The length 95 leaders in a hundred do not pass. */
export function leaderP95({ leaders }: Bucket): number {
  return [...leaders].sort((p, q) => p - q)[Math.floor(leaders.length * 0.95)] ?? 0;
}

/** The report as lines to print. */
export function reportLines(report: ThousandReport): readonly string[] {
  const percent = (value: number): string => `${(value * 100).toFixed(1)} %`;
  const each = (sum: number, { drawings }: Bucket): string => (sum / Math.max(1, drawings)).toFixed(2);
  return [
    `${report.lines} lines of random-runs.ts in ${VIEWS.length} views, ${report.sheets} sheets; ${report.labels} labels, ${percent(share(report.clean, report.labels))} clean; ${(report.drawMs / report.drawings).toFixed(0)} ms a drawing`,
    `${report.overlaps} labels on labels, ${report.missing.length} marks missing, ${report.degenerate} degenerate legs, ${report.outOfRoom} sheets out of their room, ${report.splitLines} drawings on several sheets`,
    ...report.buckets.map((bucket) =>
      `near ${bucket.near}: ${bucket.drawings} drawings, ${percent(share(bucket.clean, bucket.labels))} clean, leader mean ${leaderMean(bucket).toFixed(1)} mm, 95th percentile ${leaderP95(bucket).toFixed(1)} mm; each ${each(bucket.leaderCrossings, bucket)} leader crossings, ${each(bucket.leadersOverDimensions, bucket)} leaders over dimension lines, ${each(bucket.dimensionCrossings, bucket)} dimension lines across each other${bucket.near === 120 ? `; of labels placed freely ${percent(share(bucket.cleanFree, bucket.free))} clean, by labelgun 6.1 ${percent(share(bucket.greedy, bucket.free))}, offered four corners ${percent(share(bucket.greedyCorners, bucket.free))}` : ""}`),
  ];
}
