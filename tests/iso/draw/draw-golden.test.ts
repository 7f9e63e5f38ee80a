/**
 * Sixty golden runs: every kind of item and every rule of the drawing. Numbers rounded to 2 digits. UPDATE_GOLDEN=1 accepts; a
 * failure leaves a -changed file beside the golden. What a picture must show is asserted too, so that accepting a new
 * golden can't lose it.
 */
import { existsSync, mkdirSync, readdirSync, readFileSync, rmSync, writeFileSync } from "node:fs";
import path from "node:path";
import { describe, expect, it } from "vitest";
import { buildModel, drawingSvg, emptyMarks, LEGEND_WORDS, legendPicture, type Component, type Drawing, type LegendKey, type Model } from "@/iso";
import { GOLDEN_RUNS } from "../../fixtures/golden-runs";
import type { GoldenRun } from "../../fixtures/golden-runs/golden-run";
import { drawn, everyNumber, overlappingLabels, ROOM } from "./draw-helpers";

const FOLDER = path.resolve(import.meta.dirname, "../../golden/drawings");

interface Picture {
  readonly run: GoldenRun;
  readonly model: Model;
  readonly drawing: Drawing;
}

function pictureOf(run: GoldenRun): Picture {
  const model = buildModel(run.document, emptyMarks(), run.takeOuts ?? []);
  return { run, model, drawing: drawn(model, { view: run.view ?? null, spool: run.spool ?? null, changed: run.changed ?? null }) };
}

const pictures = GOLDEN_RUNS.map((run) => [run.name, pictureOf(run)] as const);

const rounded = (svg: string): string => svg.replace(/-?\d+\.\d{3,}/g, (n) => String(Math.round(Number(n) * 100) / 100 + 0));

const textsOf = (drawing: Drawing): string[] => drawing.items.flatMap((item) => (item.type === "text" ? [item.text] : []));

/** The symbol of each kind of part, said here once more and apart from the drawing's own table. */
const SYMBOL_OF: Readonly<Partial<Record<Component["kind"], LegendKey>>> = {
  mitre: "mitre", outlet: "outlet", "stub-in": "stub-in", "reducer-concentric": "reducer", "reducer-eccentric": "eccentric-reducer",
  "flange-weld-neck": "weld-neck", "flange-slip-on": "slip-on", "flange-socket-weld": "socket-flange", "flange-threaded": "threaded-flange",
  "flange-lap-joint": "lap-joint", "flange-blind": "blind", instrument: "instrument", coupling: "coupling", "half-coupling": "coupling",
  union: "union", cap: "cap", "socket-cap": "socket-cap", support: "support",
};

/** Parts that are drawn as pipe between weld dots, or stand within another symbol. */
const PLAIN: ReadonlySet<Component["kind"]> = new Set([
  "elbow", "trimmed-elbow", "return", "tee", "reducing-tee", "cross", "pad", "stub-end", "gasket", "bolt-set", "valve", "socket-elbow", "socket-tee", "socket-cross",
]);

describe("golden runs", () => {
  it("are sixty, each with a name of its own and a line on what it shows", () => {
    expect(GOLDEN_RUNS).toHaveLength(60);
    expect(new Set(GOLDEN_RUNS.map((run) => run.name)).size).toBe(60);
    expect(GOLDEN_RUNS.filter((run) => run.shows.length < 20)).toEqual([]);
  });

  it("hold every kind of item, of valve, of flange, of end and of joint", () => {
    const items = GOLDEN_RUNS.flatMap((run) => run.document.runs.flatMap((r) => r.points.map((point) => point.item)));
    const kinds = new Set<string>(items.map((item) => item.kind));
    for (const kind of ["none", "end", "elbow", "return", "mitre", "bend", "tee", "cross", "outlet", "stub-in", "reducer", "flange", "valve", "coupling", "union", "cap", "instrument", "support", "joint"]) expect(kinds).toContain(kind);
    expect(new Set(items.flatMap((item) => (item.kind === "valve" ? [item.valve] : []))).size).toBe(5);
    expect(new Set(items.flatMap((item) => (item.kind === "flange" ? [item.flange] : []))).size).toBe(6);
    expect(new Set(items.flatMap((item) => (item.kind === "end" ? [item.goes] : []))).size).toBe(6);
    expect(new Set(pictures.flatMap(([, { model }]) => model.joints.map((joint) => joint.kind)))).toEqual(new Set(["butt", "socket", "slip-on", "branch", "mitre", "attachment", "threaded", "bolted"]));
  });

  it("use every key of the legend, and each key has a picture", () => {
    const used = new Set(pictures.flatMap(([, { drawing }]) => drawing.legend));
    expect(Object.keys(LEGEND_WORDS).filter((key) => !used.has(key as LegendKey))).toEqual([]);
    for (const key of used) expect(legendPicture(key, [0, 0]).length, key).toBeGreaterThan(0);
  });

  it("leave no picture behind that no run makes", () => {
    const names = new Set(GOLDEN_RUNS.map((run) => `${run.name}.svg`));
    expect(readdirSync(FOLDER).filter((file) => !names.has(file) && !file.endsWith("-changed.svg"))).toEqual([]);
  });
});

describe.each(pictures)("%s", (name, { run, model, drawing }) => {
  it("shows its symbols and words", () => {
    for (const key of run.keys) expect(drawing.legend).toContain(key);
    const texts = textsOf(drawing);
    for (const text of run.texts) expect(texts.some((one) => one.includes(text)), `${text} among ${texts.join(" / ")}`).toBe(true);
  });

  it("explains every symbol it uses and no other", () => {
    const parts = run.spool === undefined ? model.components : model.components.filter((component) => component.spool === run.spool);
    const owed = new Set(parts.flatMap((part) => SYMBOL_OF[part.kind] ?? (part.kind === "valve" && part.valve ? [part.valve] : [])));
    for (const part of parts) expect(SYMBOL_OF[part.kind] !== undefined || PLAIN.has(part.kind), part.kind).toBe(true);
    const symbols = new Set<LegendKey>([...Object.values(SYMBOL_OF), "gate", "globe", "check", "ball", "butterfly"]);
    const explained = new Set(drawing.legend.filter((key) => symbols.has(key)));
    expect([...owed].filter((key) => !explained.has(key))).toEqual([]);
    if (run.spool === undefined) expect([...explained].filter((key) => !owed.has(key))).toEqual([]);
  });

  it("keeps every label off every other, in letters of 2.5 mm and more, inside its room", () => {
    expect(overlappingLabels(drawing.items)).toEqual([]);
    expect(drawing.report.overlaps).toBe(0);
    expect(everyNumber(drawing.items).every(Number.isFinite)).toBe(true);
    for (const item of drawing.items) if (item.type === "text") expect(item.capMm).toBeGreaterThanOrEqual(2.5);
    expect(drawing.bounds.minX).toBeGreaterThanOrEqual(0);
    expect(drawing.bounds.minY).toBeGreaterThanOrEqual(0);
    expect(drawing.bounds.maxX).toBeLessThanOrEqual(ROOM.widthMm);
    expect(drawing.bounds.maxY).toBeLessThanOrEqual(ROOM.heightMm);
  });

  it("has flow at its ends, dots at its welds only, and no finding that stops a release", () => {
    expect(drawing.items.some((item) => item.layer === "flow")).toBe(true);
    const dots = drawing.items.filter((item) => item.type === "path" && item.layer === "weld" && item.fill === "ink" && item.segments.length === 6).length;
    const welds = model.joints.filter((joint) => joint.number !== null && drawing.shown.some((ref) => ref.kind === "joint" && ref.id === joint.key)).length;
    expect(dots).toBe(welds);
    expect(model.problems.filter((problem) => problem.severity === "stop").map((problem) => problem.text)).toEqual([]);
  });

  it("looks as it did", () => {
    const svg = rounded(drawingSvg(drawing.items, ROOM.widthMm, ROOM.heightMm));
    const golden = path.join(FOLDER, `${name}.svg`);
    const changed = path.join(FOLDER, `${name}-changed.svg`);
    if (process.env.UPDATE_GOLDEN === "1") {
      mkdirSync(FOLDER, { recursive: true });
      writeFileSync(golden, svg);
    }
    const same = existsSync(golden) && readFileSync(golden, "utf8") === svg;
    if (same) rmSync(changed, { force: true });
    else writeFileSync(changed, svg);
    expect(same, `${name}.svg differs; compare it with ${name}-changed.svg, accept with UPDATE_GOLDEN=1`).toBe(true);
  });
});
