/**
 * The labels of random lines near 60 and near 120 labels, drawn in the room of an A3 spool sheet: how many touch no
 * label, pipe or foreign leader, how long their leaders are against the height of a dimension's number, and whether
 * any lies on another. The lines come from the same seeded walks as in the drawing tests (random-runs.ts), whose shapes
 * are wilder than any shop's. They are taken in the order of their seeds by the number of their labels alone, so
 * none is left out for drawing badly. Overlaps are counted twice: by the drawing and by the tests' own check, which
 * shares no code with it.
 */
import type { Drawing } from "../../iso";
import { DIMENSION_CAP } from "../../iso/draw/sizes";
import { drawn, modelOf, overlappingLabels } from "../iso/draw/draw-helpers";
import { randomRun } from "../iso/draw/random-runs";
import { median, type BenchRow } from "./stopwatch";

const RUNS = 6;
const SEEDS = 30;
/** How far from the wanted number of labels a line may be. */
const NEAR = 0.08;

interface Group {
  readonly labels: number;
  /** Points in a run that give about as many labels. */
  readonly points: number;
  readonly cleanShare: number;
}

const GROUPS: readonly Group[] = [
  { labels: 60, points: 11, cleanShare: 0.98 },
  { labels: 120, points: 21, cleanShare: 0.93 },
];

const MEAN_LEADER_HEIGHTS = 2;

interface Measured {
  readonly drawing: Drawing;
  /** Welds of the model that the drawing does not show. */
  readonly missing: number;
}

/** The first runs of a group whose number of labels is near enough. */
function runsOf({ labels, points }: Group): Measured[] {
  const found: Measured[] = [];
  for (let seed = 1; seed <= SEEDS && found.length < RUNS; seed += 1) {
    const model = modelOf(randomRun(seed, points));
    const drawing = drawn(model);
    if (Math.abs(drawing.report.labels - labels) > labels * NEAR) continue;
    const shown = new Set(drawing.shown.map(({ kind, id }) => `${kind} ${id}`));
    found.push({ drawing, missing: model.joints.filter(({ key }) => !shown.has(`joint ${key}`)).length });
  }
  if (found.length === 0) throw new Error(`No random line of ${points} points has about ${labels} labels any longer.`);
  return found;
}

function rowsOf(group: Group): BenchRow[] {
  const runs = runsOf(group);
  const reports = runs.map(({ drawing }) => drawing.report);
  const sum = (pick: (report: Drawing["report"]) => number): number => reports.reduce((total, report) => total + pick(report), 0);
  const heights = (mm: number): number => mm / DIMENSION_CAP;
  const shares = reports.map((report) => report.clean / report.labels).sort((a, b) => a - b);
  const p95 = reports.map((report) => report.p95LeaderMm);
  const again = runs.reduce((total, { drawing }) => total + overlappingLabels(drawing.items).length, 0);
  const near = `near ${group.labels}`;
  return [
    { name: `${near} labels: clean : all`, figure: sum((r) => r.clean) / sum((r) => r.labels), budget: group.cleanShare, atLeast: true, detail: `${sum((r) => r.clean)} : ${sum((r) => r.labels)} in ${runs.length} lines, worst ${shares[0]?.toFixed(2)}` },
    { name: `${near}: mean leader : number's height`, figure: heights(sum((r) => r.meanLeaderMm) / runs.length), budget: MEAN_LEADER_HEIGHTS, detail: `${(sum((r) => r.meanLeaderMm) / runs.length).toFixed(1)} mm : ${DIMENSION_CAP} mm` },
    { name: `${near}: 95th percentile leader : the same`, figure: heights(median(p95)), detail: `${median(p95)} mm at the median line, ${Math.max(...p95)} mm at the worst` },
    { name: `${near}: labels on labels`, figure: Math.max(sum((r) => r.overlaps), again), unit: "pairs", budget: 0, detail: `${sum((r) => r.overlaps)} by the drawing's count, ${again} by the tests'` },
    { name: `${near}: welds not shown`, figure: runs.reduce((total, { missing }) => total + missing, 0), unit: "welds", budget: 0, detail: "each weld of the model looked for among what the drawing shows" },
  ];
}

export async function measure(): Promise<BenchRow[]> {
  return GROUPS.flatMap(rowsOf);
}
