/**
 * The placing of random lines, in all four views: what must hold whatever is typed. The lines are those of the thousand runs
 * (random-runs.ts). Sizes and angles are those of DRAWING practice: 12 degrees from every axis, 20 from the axis of a pipe
 * that is met; the arithmetic here shares no code with the placing.
 */
import { describe, expect, it } from "vitest";
import { measureText } from "@/fonts/widths";
import { proposeView, type Model, type PaperPoint, type RunDocument, type View } from "@/iso";
import { standingOf } from "@/iso/draw/draw-model";
import { placeAll, placePlan, type Placed } from "@/iso/draw/place";
import { PROJECTIONS } from "@/iso/draw/project";
import { sketchOf, type SketchEdge } from "@/iso/draw/sketch";
import { modelOf, ROOM, seeded, SHOW_ALL } from "./draw-helpers";
import { randomLine } from "./random-runs";
import { RunBuilder, tee } from "../../fixtures/run-builder";

const RUNS = 200;
const GROUP = 20;
const VIEWS: readonly View[] = [1, 2, 3, 4];
const groups = Array.from({ length: RUNS / GROUP }, (_, group) => Array.from({ length: GROUP }, (_, i) => group * GROUP + i + 1));

interface Stand {
  readonly name: string;
  readonly model: Model;
  readonly placed: Placed;
  readonly edges: readonly SketchEdge[];
}

function standings(document: RunDocument, name: string): Stand[] {
  const model = modelOf(document);
  const plan = placePlan(sketchOf(model, null), measureText);
  return VIEWS.map((view) => {
    const { stretch, rows } = standingOf(plan, view, { ...ROOM, measure: measureText, view, spool: null, show: SHOW_ALL });
    const placed = placeAll(plan, PROJECTIONS[view], stretch, rows);
    return { name: `${name}, view ${view}`, model, placed, edges: placed.sketch.edges.filter((edge) => edge.kind !== "none") };
  });
}

const paperWay = ({ placed }: Stand, edge: SketchEdge): PaperPoint => {
  const [a, b] = [placed.paper.get(edge.from)!, placed.paper.get(edge.to)!];
  return [b[0] - a[0], b[1] - a[1]];
};

/** Degrees between a paper direction and the line of an axis, 0 to 90. */
function degreesFrom(way: PaperPoint, axis: PaperPoint): number {
  const [a, b] = [Math.atan2(way[1], way[0]), Math.atan2(axis[1], axis[0])];
  const turn = Math.abs(((a - b) * 180) / Math.PI) % 180;
  return Math.min(turn, 180 - turn);
}

/** Off-axis legs that read as an axis, or as a point. */
function degenerate(stand: Stand): string[] {
  return stand.edges.filter((edge) => edge.kind === "offset").flatMap((edge) => {
    const way = paperWay(stand, edge);
    const met = stand.edges.filter((other) => other !== edge && other.kind !== "offset" && [other.from, other.to].some((id) => id === edge.from || id === edge.to));
    const poor = stand.placed.projection.axes.some((axis, k) => {
      const least = met.some((other) => other.real[k] !== 0) ? 20 : 12;
      return degreesFrom(way, axis) < least;
    });
    return poor || Math.hypot(way[0], way[1]) < 6 ? [`${stand.name} leg ${edge.id}`] : [];
  });
}

/** Legs whose ends are drawn in the wrong order along an axis, or apart on one they share. */
function disordered(stand: Stand): string[] {
  return stand.edges.flatMap((edge) => {
    const [from, to] = [stand.placed.at.get(edge.from)!, stand.placed.at.get(edge.to)!];
    const wrong = ([0, 1, 2] as const).some((k) => (edge.real[k] === 0 ? Math.abs(to[k] - from[k]) > 1e-9 : (to[k] - from[k]) * Math.sign(edge.real[k]) <= 0));
    return wrong ? [`${stand.name} leg ${edge.id}`] : [];
  });
}

/** Axis legs whose paper direction is not exactly their axis: then all legs along one axis are parallel. */
function skewed(stand: Stand): string[] {
  return stand.edges.filter((edge) => edge.kind !== "offset").flatMap((edge) => {
    const k = edge.real.findIndex((c) => c !== 0) as 0 | 1 | 2;
    return degreesFrom(paperWay(stand, edge), stand.placed.projection.axes[k]) > 1e-6 ? [`${stand.name} leg ${edge.id}`] : [];
  });
}

/** Length of pipe drawn on other pipe, mm, of legs that share no point. */
function laidOn(stand: Stand): { name: string; mm: number }[] {
  const found: { name: string; mm: number }[] = [];
  stand.edges.forEach((a, i) => stand.edges.slice(i + 1).forEach((b) => {
    if ([a.from, a.to].some((id) => id === b.from || id === b.to)) return;
    const [va, vb] = [paperWay(stand, a), paperWay(stand, b)];
    if (degreesFrom(va, vb) > 1) return;
    const length = Math.hypot(va[0], va[1]);
    const origin = stand.placed.paper.get(a.from)!;
    const spots = [b.from, b.to].map((id) => {
      const p = stand.placed.paper.get(id)!;
      const [x, y] = [p[0] - origin[0], p[1] - origin[1]];
      return { along: (x * va[0] + y * va[1]) / length, beside: Math.abs(x * va[1] - y * va[0]) / length };
    });
    if (Math.max(...spots.map((s) => s.beside)) > 1.5) return;
    const mm = Math.min(length, Math.max(...spots.map((s) => s.along))) - Math.max(0, Math.min(...spots.map((s) => s.along)));
    if (mm > 0.5) found.push({ name: `${stand.name} ${a.id} on ${b.id}`, mm });
  }));
  return found;
}

function crossings(stand: Stand): number {
  const side = (a: PaperPoint, b: PaperPoint, p: PaperPoint): number => (b[0] - a[0]) * (p[1] - a[1]) - (b[1] - a[1]) * (p[0] - a[0]);
  let count = 0;
  stand.edges.forEach((a, i) => stand.edges.slice(i + 1).forEach((b) => {
    if ([a.from, a.to].some((id) => id === b.from || id === b.to)) return;
    const [p, q, r, s] = [a.from, a.to, b.from, b.to].map((id) => stand.placed.paper.get(id)!) as [PaperPoint, PaperPoint, PaperPoint, PaperPoint];
    if (side(p, q, r) * side(p, q, s) < 0 && side(r, s, p) * side(r, s, q) < 0) count++;
  }));
  return count;
}

describe("200 random lines in four views", () => {
  it.each(groups)("seeds from %i on: no degenerate leg, order kept, parallels parallel, no pipe on another, few crossings", (...seeds) => {
    const stands = seeds.flatMap((seed) => standings(randomLine(seed), `seed ${seed}`));
    expect(stands.flatMap(degenerate)).toEqual([]);
    expect(stands.flatMap(disordered)).toEqual([]);
    expect(stands.flatMap(skewed)).toEqual([]);
    expect(stands.flatMap(laidOn)).toEqual([]);
    const legs = stands.reduce((sum, { edges }) => sum + edges.length, 0);
    const all = stands.reduce((sum, stand) => sum + crossings(stand), 0);
    expect(all).toBeLessThan(legs * 0.1);
    // The proposed view is chosen by more than crossings, and still has fewer of them than the four on average.
    const proposed = stands.filter((stand) => stand.placed.projection.view === proposeView(stand.model));
    expect(proposed.reduce((sum, stand) => sum + crossings(stand), 0)).toBeLessThanOrEqual(all / 4);
  });
});

describe("level legs at 45 degrees", () => {
  it("are drawn level across the paper in the views that look along the corner they cut", () => {
    const document = new RunBuilder("LEVEL-45", "metric").start({ kind: "none" }).go("E", "3000").enu("900", "900", "0").go("E", "1500").done();
    const levels = standings(document, "level 45").map((stand) => {
      const edge = stand.edges.find(({ kind }) => kind === "offset")!;
      return Math.abs(paperWay(stand, edge)[1]) < 1e-6;
    });
    expect(levels).toEqual([false, true, false, true]);
  });
});

/** A line with a branch that comes back to it: out of one tee, across, and into another. */
function loopLine(seed: number): RunDocument {
  const random = seeded(seed);
  const mm = (least: number, most: number): number => Math.round((least + random() * (most - least)) / 5) * 5;
  const [run, out, over] = [mm(900, 4000), mm(700, 2500), mm(0, 1) > 0 ? mm(700, 1500) : 0];
  const [out1, back] = random() < 0.5 ? ["U", "D"] : ["N", "S"];
  const builder = new RunBuilder(`LOOP-${seed}`, "metric").start({ kind: "none" }).go("E", `${mm(800, 3000)}`, tee()).go("E", `${run}`, tee()).go("E", `${mm(800, 3000)}`).go("U", `${mm(800, 2000)}`);
  builder.branch(2).go(out1!, `${out}`);
  if (over > 0) builder.go("W", `${over}`).go(out1!, "800").go("E", `${over + run}`).go(back!, `${out + 800}`);
  else builder.go("E", `${run}`).go(back!, `${out}`);
  const document = builder.done();
  return { ...document, runs: document.runs.map((r, i) => (i === 0 ? r : { ...r, to: "p3" })) };
}

describe("branches that come back", () => {
  it.each(Array.from({ length: 20 }, (_, i) => i + 1))("close on paper in every view: loop %i", (seed) => {
    for (const stand of standings(loopLine(seed), `loop ${seed}`)) {
      const { document } = stand.model;
      const last = document.runs[1]!.points.at(-1)!.id;
      const [end, met] = [stand.placed.paper.get(last)!, stand.placed.paper.get("p3")!];
      expect(Math.hypot(end[0] - met[0], end[1] - met[1])).toBeLessThan(1e-6);
      // And leg by leg: out along the branch and back along the run is no way at all.
      const around = (ids: readonly string[]): PaperPoint => ids.map((id) => paperWay(stand, stand.edges.find((edge) => edge.leg.id === id)!)).reduce((sum, way) => [sum[0] + way[0], sum[1] + way[1]], [0, 0]);
      const [branch, direct] = [around(document.runs[1]!.points.map(({ id }) => id)), around(["p3"])];
      expect(Math.hypot(branch[0] - direct[0], branch[1] - direct[1])).toBeLessThan(1e-6);
      expect(laidOn(stand)).toEqual([]);
    }
  });
});
