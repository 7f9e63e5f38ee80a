/**
 * The thousand random lines of tests/iso/draw/random-runs.ts (its head says how they are made; every seed counts) in four
 * views each, drawn on an A3 page: lines of up to about 200 labels on one sheet, longer ones on as many as they take. Counted from
 * the finished drawings by tests/iso/draw/drawing-measure.ts, which shares no code with the passes: clean labels, labels on
 * labels, leaders, crossings, and everything the models hold looked for among what the sheets show. Beside it labelgun 6.1, a
 * greedy placer from npm, fed the same anchors, boxes and obstacles in the same run. `STEP=n` draws every n-th seed only.
 */
import { DIMENSION_CAP } from "../../iso/draw/sizes";
import { leaderMean, leaderP95, measureRuns, reportLines, share, type Bucket, type ThousandReport } from "../iso/draw/thousand-runs";
import type { BenchLine, BenchRow } from "./stopwatch";

/** Least share of clean labels by labels on the sheet. */
const CLEAN_SHARE: Readonly<Record<number, number>> = { 60: 0.98, 120: 0.93, 200: 0.85 };
const MEAN_LEADER_HEIGHTS = 2;
/** At 120 labels: our clean share against the peer's. */
const TIMES_THE_PEER = 2.5;

function bucketRows(bucket: Bucket): BenchLine[] {
  const near = `near ${bucket.near}`;
  if (bucket.drawings === 0) return [{ name: `${near} labels`, skipped: "No line of this share has about so many labels on one sheet." }];
  const heights = (mm: number): number => mm / DIMENSION_CAP;
  return [
    { name: `${near} labels: clean : all`, figure: share(bucket.clean, bucket.labels), budget: CLEAN_SHARE[bucket.near], atLeast: true, detail: `${bucket.clean} : ${bucket.labels} in ${bucket.drawings} drawings` },
    { name: `${near}: mean leader : number's height`, figure: heights(leaderMean(bucket)), budget: MEAN_LEADER_HEIGHTS, detail: `${leaderMean(bucket).toFixed(1)} mm : ${DIMENSION_CAP} mm` },
    { name: `${near}: 95th percentile leader : the same`, figure: heights(leaderP95(bucket)), detail: `${leaderP95(bucket).toFixed(1)} mm` },
    { name: `${near}: leader crossings in a drawing`, figure: bucket.leaderCrossings / Math.max(1, bucket.drawings), unit: "pairs", detail: `and ${(bucket.leadersOverDimensions / Math.max(1, bucket.drawings)).toFixed(1)} leaders over dimension lines` },
  ];
}

function peerRow(bucket: Bucket): BenchRow {
  const [ours, theirs, corners] = [share(bucket.cleanFree, bucket.free), share(bucket.greedy, bucket.free), share(bucket.greedyCorners, bucket.free)];
  return {
    name: `near ${bucket.near} labels: clean share : labelgun's`, figure: ours / Math.max(theirs, Number.EPSILON), budget: TIMES_THE_PEER, atLeast: true,
    detail: `${ours.toFixed(3)} : ${theirs.toFixed(3)} of the labels placed freely; ${corners.toFixed(3)} when it is offered four corners`,
  };
}

function wholeRows(report: ThousandReport): BenchRow[] {
  return [
    { name: "labels on labels", figure: report.overlaps, unit: "pairs", budget: 0, detail: `in ${report.sheets} sheets of ${report.lines} lines, ${report.drawings} drawings` },
    { name: "marks of the models on no sheet", figure: report.missing.length, unit: "marks", budget: 0, detail: report.missing[0] ?? "dimensions, welds, pieces and items looked for on all sheets" },
    { name: "degenerate legs", figure: report.degenerate, unit: "legs", budget: 0, detail: "pipe without a length on paper" },
    { name: "sheets out of their room : all", figure: report.outOfRoom / report.sheets, detail: `${report.outOfRoom} : ${report.sheets}; ${report.splitLines} drawings took more than one sheet` },
    { name: "clean labels on all sheets : all", figure: share(report.clean, report.labels), detail: `${report.clean} : ${report.labels}` },
  ];
}

export async function measure(): Promise<BenchLine[]> {
  const report = measureRuns(1, Math.max(1, Number(process.env.STEP ?? 1)));
  for (const line of reportLines(report)) console.log(`  ${line}`);
  const peer = report.buckets.find(({ near }) => near === 120);
  return [...report.buckets.flatMap(bucketRows), ...(peer && peer.drawings > 0 ? [peerRow(peer)] : []), ...wholeRows(report)];
}
