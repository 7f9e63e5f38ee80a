/** 1 000 seeded random lines: pieces, fittings and gaps laid end to end (tests/oracle/walk-line.ts) land on every working point. */
import { expect, it } from "vitest";
import { buildModel } from "../../../iso/run/build-model";
import { emptyMarks } from "../../../iso/run/marks";
import { BUTT, SOCKET, walkLine, type Cuts, type LineRun, type Stand, type Triple } from "../../oracle/walk-line";
import { lineDocument, randomLine } from "./walk-line-lines";

const INCH = 25.4;
const LANDS_MM = 1e-6;
const LINES = 1_000;

interface Bench {
  readonly cuts: Cuts;
  /** Where the model says each point lies, in. */
  readonly places: ReadonlyMap<string, Triple>;
}

/** What the bench gets: cut lengths by the point a pipe ends at, bend starts, and the segments of mitres; and the model's places, to be met. */
function benchOf(runs: readonly LineRun[]): Bench {
  const pipes = new Map<string, { length: number; bendStarts: number[] }>();
  const segments = new Map<string, number[]>();
  const model = buildModel(lineDocument(runs), emptyMarks(), []);
  for (const p of model.pieces) {
    const length = p.cutLengthMm / INCH;
    if (p.key.includes(":segment-")) segments.set(p.legId, [...(segments.get(p.legId) ?? []), length]);
    else pipes.set(p.legId, { length, bendStarts: (p.bends ?? []).map((b) => b.startMm / INCH) });
  }
  const places = new Map(model.nodes.map((n) => [n.pointId, [n.position[0] / INCH, n.position[1] / INCH, n.position[2] / INCH] as Triple]));
  return { cuts: { pipes, segments }, places };
}

/** Where the typed numbers put each point, walking the steps alone; shifts of returns and eccentric reducers from the walk's own tables. */
function wanted(runs: readonly LineRun[]): Map<string, Triple> {
  const out = new Map<string, Triple>();
  const add = (a: Triple, b: Triple, k = 1): Triple => [a[0] + b[0] * k, a[1] + b[1] * k, a[2] + b[2] * k];
  for (const run of runs) {
    let at: Triple = run.from === null ? [0, 0, 0] : out.get(run.from)!;
    for (const p of run.points) {
      at = add(at, p.step);
      out.set(p.id, at);
      if (!p.side) continue;
      const along = p.step.map((c) => c / Math.hypot(...p.step)) as unknown as Triple;
      const raw = add(p.side, along, -(p.side[0] * along[0] + p.side[1] * along[1] + p.side[2] * along[2]));
      const od = (size: string) => BUTT[size as "2"].od;
      const by = p.stand === "return" ? BUTT[p.size as "2"].returnCentres : (od(p.size) - od(p.size2!)) / 2;
      at = add(at, raw, by / Math.hypot(...raw));
    }
  }
  return out;
}

/** Largest miss of a line, mm, and how many points were landed on. */
function missOf(runs: readonly LineRun[]): { readonly mm: number; readonly at: string; readonly points: number } {
  const { cuts, places } = benchOf(runs);
  const [landed, want] = [walkLine(runs, cuts), wanted(runs)];
  let worst = { mm: 0, at: "" };
  for (const [id, p] of landed) {
    const off = (w: Triple) => Math.hypot(p[0] - w[0], p[1] - w[1], p[2] - w[2]) * INCH;
    const mm = Math.max(off(want.get(id)!), off(places.get(id)!));
    if (!(mm <= worst.mm)) worst = { mm, at: id };
  }
  return { ...worst, points: landed.size };
}

it("lands on every working point of 1 000 random lines within 1e-6 mm", () => {
  const seen = new Map<Stand, number>();
  let [points, branches] = [0, 0];
  for (let seed = 1; seed <= LINES; seed++) {
    const runs = randomLine(seed);
    const miss = missOf(runs);
    if (!(miss.mm < LANDS_MM)) {
      const p = runs.flatMap((r) => r.points).find((q) => q.id === miss.at);
      throw new Error(`seed ${seed}: ${miss.at} lands ${miss.mm} mm off\n${JSON.stringify(p)}\n${JSON.stringify(runs)}`);
    }
    points += miss.points;
    branches += runs.length - 1;
    for (const p of runs.flatMap((r) => r.points)) seen.set(p.stand, (seen.get(p.stand) ?? 0) + 1);
  }
  expect(points).toBeGreaterThan(5_000);
  expect(branches).toBeGreaterThan(600);
  expect(seen.size).toBe(19);
  expect(Math.min(...seen.values())).toBeGreaterThan(50);
});

it("can fail: a take-out wrong by a thirty-second of an inch is caught, fitting by fitting", () => {
  const off = (table: Record<string, number>, key: string, stand: Stand, size: string): void => {
    const right = table[key]!;
    const line = Array.from({ length: 400 }, (_, i) => randomLine(i + 1)).find((runs) => runs.some((r) => r.points.slice(0, -1).some((p) => p.stand === stand && p.size === size)))!;
    expect(missOf(line).mm).toBeLessThan(LANDS_MM);
    table[key] = right + 1 / 32;
    try {
      expect(missOf(line).mm).toBeGreaterThan(0.1);
    } finally {
      table[key] = right;
    }
  };
  for (const [key, stand] of [["gate", "gate"], ["globe", "globe"], ["tee", "tee"], ["sr90", "sr"], ["hub", "pair"], ["returnCentres", "return"]] as const) off(BUTT["4"] as Record<string, number>, key, stand, "4");
  off(SOCKET, "sw90", "sw90", "1");
  off(SOCKET, "coupling", "coupling", "1");
});
