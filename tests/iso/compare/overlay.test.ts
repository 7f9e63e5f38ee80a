/** The overlay: what did not change coincides, what did is marked, and equal inputs carry no mark at all. */
import { describe, expect, it } from "vitest";
import { buildModel, drawOverlay, type DisplayItem, type Model, type RunDocument } from "@/iso";
import { measureText } from "@/fonts/widths";
import { compareRows } from "@/lib/rules/compare-rows";
import { overlayFrame, overlaySides } from "../../../iso/compare/overlay";
import { placeAll } from "../../../iso/draw/place";
import { PROJECTIONS } from "../../../iso/draw/project";
import { GOLDEN_RUNS } from "../../fixtures/golden-runs";
import { sampleRuns } from "../../fixtures/sample-runs";
import { overlappingLabels, seeded } from "../draw/draw-helpers";
import { edited, newPointAt, sheetOf, type Editable } from "./compare-samples";

const ROOM = { widthMm: 380, heightMm: 230, measure: measureText, view: null } as const;
const modelOf = ({ document, marks, takeOuts }: ReturnType<typeof sheetOf>): Model => buildModel(document, marks, takeOuts);

function overlayOf(document: RunDocument, change: (copy: Editable) => void) {
  const before = sheetOf(document);
  const after = sheetOf(edited(document, change), before);
  const rows = compareRows(before, after);
  const models = [modelOf(before), modelOf(after)] as const;
  return { rows, models, drawing: drawOverlay(...models, rows, { ...ROOM, spools: [before.spool, after.spool] }) };
}

const isGone = (item: DisplayItem): boolean => item.layer === "pipe" && item.type === "line" && item.ink === "grey" && item.widthMm < 0.5;
const isHeavy = (item: DisplayItem): boolean => item.layer === "pipe" && item.type === "line" && item.widthMm > 1;
const texts = (items: readonly DisplayItem[]): string[] => items.flatMap((item) => (item.type === "text" ? [item.text] : []));

describe("equal inputs", () => {
  it("carry no difference mark, whatever is drawn", () => {
    for (const { name, document } of GOLDEN_RUNS) {
      const { drawing, rows } = overlayOf(document, () => undefined);
      expect([name, rows.length, drawing.differences]).toEqual([name, 0, 0]);
      expect(drawing.items.some((item) => isGone(item) || isHeavy(item)), name).toBe(false);
      expect(texts(drawing.items).filter((text) => /WAS|ADDED|REMOVED|MOVED|CHANGED/.test(text)), name).toEqual([]);
    }
  });
});

describe("marks of a difference", () => {
  it("a longer leg: nothing moves on paper, its number says what it was", () => {
    const { drawing } = overlayOf(sampleRuns.firstRun!, (d) => void (d.runs[0]!.points[1]!.offset = newPointAt("x", [1_200, 0, 0]).offset));
    expect(drawing.differences).toBe(0);
    expect(texts(drawing.items)).toContain(`3'-11 1/4" [WAS 3'-1 1/2"]`);
    expect(texts(drawing.items).filter((text) => /WAS/.test(text))).toHaveLength(1);
    expect(texts(drawing.items)).toContain("CHANGED 1, 2");
  });

  it("a leg turned another way: heavy where it is, dashed and crossed where it was, with words at both", () => {
    const { drawing, rows } = overlayOf(sampleRuns.branchWithReducer!, (d) => void (d.runs[0]!.points[4]!.offset = newPointAt("x", [0, 0, 1_000]).offset));
    const moved = rows.find((row) => row.kind === "moved")!.no;
    expect(drawing.items.some(isGone)).toBe(true);
    expect(drawing.items.some(isHeavy)).toBe(true);
    expect(texts(drawing.items).some((text) => text.startsWith(`MOVED ${moved}`))).toBe(true);
    expect(texts(drawing.items)).toContain(`WAS HERE ${moved}`);
  });

  it("what was carried along by a change elsewhere: a word where it stood, once", () => {
    const { drawing, rows } = overlayOf(sampleRuns.branchWithReducer!, (d) => void d.runs[1]!.points.splice(1, 0, newPointAt("j", [600, 0, 0]) as Editable["runs"][0]["points"][0]));
    expect(rows.some((row) => row.kind === "moved" || row.kind === "removed")).toBe(false);
    expect(drawing.items.some(isGone)).toBe(true);
    expect(texts(drawing.items).filter((text) => text.startsWith("WAS HERE"))).toEqual(["WAS HERE"]);
  });

  it("a fitting set into a leg: its pipe either side stays as it was", () => {
    const { drawing } = overlayOf(sampleRuns.planarOffset!, (d) => {
      const points = d.runs[0]!.points;
      points.splice(3, 0, newPointAt("x", [0, 781.05, 0], { kind: "valve", valve: "gate", ends: "flanged", ratingClass: null, mating: "weld-neck", stem: null, faceToFaceMm: null, tag: "V-9" }) as (typeof points)[0]);
      points[4]!.offset = newPointAt("y", [0, 800, 0]).offset;
    });
    expect(drawing.items.some(isHeavy)).toBe(false);
    expect(drawing.items.filter((item) => item.layer === "pipe" && item.type === "line" && item.ink === "ink").length).toBeGreaterThanOrEqual(4);
    // The symbol itself is heavy, and what is gone is the pipe under it alone.
    expect(drawing.items.some((item) => item.layer === "symbol" && item.type !== "text" && (item.type === "line" ? item.ink : item.stroke) === "dye")).toBe(true);
    const gone = drawing.items.filter(isGone).map((item) => (item.type === "line" ? Math.hypot(item.to[0] - item.from[0], item.to[1] - item.from[1]) : 0));
    expect(Math.max(...gone)).toBeLessThan(40);
  });

  it("a removed end: dashed, and the rest untouched", () => {
    const { drawing } = overlayOf(sampleRuns.firstRun!, (d) => void d.runs[0]!.points.pop());
    expect(drawing.items.some(isGone)).toBe(true);
    // All that came is the bit of pipe where the elbow's arm was.
    const fresh = drawing.items.filter(isHeavy).map((item) => (item.type === "line" ? Math.hypot(item.to[0] - item.from[0], item.to[1] - item.from[1]) : 0));
    expect(Math.max(0, ...fresh)).toBeLessThan(8);
    expect(texts(drawing.items).some((text) => text.startsWith("REMOVED"))).toBe(true);
  });
});

type Change = (copy: Editable, random: () => number) => void;
const pick = (d: Editable, random: () => number) => {
  const run = d.runs[Math.floor(random() * d.runs.length)]!;
  return { run, at: 1 + Math.floor(random() * Math.max(1, run.points.length - 1)) };
};
const CHANGES: Readonly<Record<string, Change>> = {
  "another length": (d, random) => {
    const { run, at } = pick(d, random);
    const point = run.points[at];
    if (point?.offset.kind === "polar") point.offset.length.mm *= 1 + random();
    else if (point?.offset.kind === "enu") for (const axis of ["e", "n", "u"] as const) point.offset[axis].mm *= 1 + random();
  },
  "another way": (d, random) => {
    const { run, at } = pick(d, random);
    const ways = [[900, 0, 0], [0, 900, 0], [0, 0, 900], [0, -900, 0], [600, 600, 0]] as const;
    if (run.points[at]) run.points[at].offset = newPointAt("w", ways[Math.floor(random() * ways.length)]!).offset;
  },
  "a point less": (d, random) => {
    const { run, at } = pick(d, random);
    const id = run.points[at]?.id;
    if (run.points.length > 2 && !d.runs.some((other) => other.from === id || other.to === id)) run.points.splice(at, 1);
  },
  "a jog": (d, random) => {
    const { run, at } = pick(d, random);
    run.points.splice(at, 0, newPointAt("j1", [0, 0, 500]) as (typeof run.points)[0], newPointAt("j2", [0, 700, 0]) as (typeof run.points)[0]);
  },
};

describe("one frame for both", () => {
  it("shared points coincide within 1e-9 mm, and legs run their way in both", () => {
    const random = seeded(20261201);
    let [shared, moved] = [0, 0];
    for (const { name, document } of GOLDEN_RUNS.filter((_, i) => i % 2 === 0)) {
      for (const [kind, change] of Object.entries(CHANGES)) {
        const before = sheetOf(document);
        const after = sheetOf(edited(document, (copy) => change(copy, random)), before);
        const [then, now] = [modelOf(before), modelOf(after)];
        const frame = overlayFrame(then, now, [null, null], measureText);
        const { a, b } = overlaySides(frame, placeAll(frame.plan, PROJECTIONS[1], 1.2));
        for (const id of frame.united) {
          const [p, q] = [a.placed.paper.get(id)!, b.placed.paper.get(id)!];
          expect(Math.hypot(p[0] - q[0], p[1] - q[1]), `${name}, ${kind}, ${id}`).toBeLessThan(1e-9);
        }
        shared += frame.united.size;
        moved += frame.before.vertices.size - frame.united.size;
        for (const side of [a, b]) expect(backwards(side), `${name}, ${kind}`).toEqual([]);
      }
    }
    // The edits are not so wild that nothing is shared, nor so tame that nothing stands apart.
    expect(shared).toBeGreaterThan(moved);
    expect(moved).toBeGreaterThan(50);
  });

  it("labels of overlays never overlap", () => {
    const random = seeded(7);
    for (const { name, document } of GOLDEN_RUNS.filter((_, i) => i % 6 === 1)) {
      for (const [kind, change] of Object.entries(CHANGES)) {
        const { drawing } = overlayOf(document, (copy) => change(copy, random));
        expect(overlappingLabels(drawing.items), `${name}, ${kind}`).toEqual([]);
        expect(drawing.report.overlaps, `${name}, ${kind}`).toBe(0);
      }
    }
  });
});

/** Legs drawn against the way they run along any axis: found from drawn coordinates alone. */
function backwards({ placed, drawn }: ReturnType<typeof overlaySides>["a"]): string[] {
  return drawn.filter(({ edge }) => {
    const [from, to] = [placed.at.get(edge.from)!, placed.at.get(edge.to)!];
    return ([0, 1, 2] as const).some((axis) => edge.real[axis] !== 0 && Math.sign(to[axis] - from[axis]) !== Math.sign(edge.real[axis]));
  }).map(({ edge }) => edge.id);
}
