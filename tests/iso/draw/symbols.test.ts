/** Symbols and words at the fittings, each by itself: what stands on paper for a given part. Facts of the trade are common practice. */
import { describe, expect, it } from "vitest";
import { buildModel, drawModel, emptyMarks, type Drawing, type PaperPoint, type RunDocument } from "@/iso";
import { measureText } from "@/fonts/widths";
import { breakWords } from "@/iso/draw/break-flags";
import { isSquareRoll } from "@/iso/draw/fitting-notes";
import { tagRows } from "@/iso/draw/instrument-bubble";
import { mitreCuts } from "@/iso/draw/turns";
import { shortAngle } from "@/iso/draw/words";
import { convexHull } from "@/iso/geometry/paper-hull";
import { end, flange, joint, valve } from "../../fixtures/run-builder";
import { metric } from "../../fixtures/golden-runs/golden-run";
import { ROOM, SHOW_ALL } from "./draw-helpers";

const drawn = (document: RunDocument, more: object = {}): Drawing =>
  drawModel(buildModel(document, emptyMarks(), []), { ...ROOM, measure: measureText, view: null, spool: null, show: SHOW_ALL, ...more });
const texts = (drawing: Drawing): string[] => drawing.items.flatMap((item) => (item.type === "text" ? [item.text] : []));
const straight = (item = valve()): RunDocument => metric("T-1", "4", "").start(flange({ text: "A" })).go("E", "1200", item).go("E", "1200", end("continued", "T-2")).done();

describe("words at a fitting", () => {
  it("splits a tag into letters over number", () => {
    expect(tagRows("pi-101")).toEqual(["PI", "101"]);
    expect(tagRows("FE 301A")).toEqual(["FE", "301A"]);
    expect(tagRows("gauge")).toEqual(["GAUGE"]);
  });

  it("prints an angle without noughts after the point", () => {
    expect(shortAngle(Math.PI / 4)).toBe("45°");
    expect(shortAngle((22.5 * Math.PI) / 180)).toBe("22.5°");
    expect(shortAngle((100 * Math.PI) / 180)).toBe("100°");
    expect(shortAngle(0)).toBe("0°");
  });

  it("takes quarter turns as square and nothing else", () => {
    for (const deg of [0, 90, -90, 180, 270, 89.9]) expect(isSquareRoll((deg * Math.PI) / 180)).toBe(true);
    for (const deg of [22.5, 45, 89, 181]) expect(isSquareRoll((deg * Math.PI) / 180)).toBe(false);
  });

  it("says what changes across the pipe, or starts, or ends", () => {
    const at = { pointId: "p1", position: [0, 0, 0] as const };
    expect(breakWords({ ...at, what: "specification", before: "cs1", after: "ss2" }).text).toBe("SPEC CS1 | SS2");
    expect(breakWords({ ...at, what: "insulation", before: "", after: "50 mm" }).text).toBe("INSULATION 50 MM STARTS");
    expect(breakWords({ ...at, what: "tracing", before: "electric", after: "" }).text).toBe("TRACING ELECTRIC ENDS");
  });
});

describe("mitres and clouds", () => {
  it.each([2, 3, 4, 5])("cuts a turn of %i pieces one time fewer, in flow order", (pieces) => {
    const turn = { component: undefined as never, start: [0, 0] as PaperPoint, corner: [10, 0] as PaperPoint, end: [10, 10] as PaperPoint, neighbour: false };
    const cuts = mitreCuts(turn, pieces);
    expect(cuts).toHaveLength(pieces - 1);
    expect(cuts.map((cut) => cut.at[1])).toEqual([...cuts.map((cut) => cut.at[1])].sort((a, b) => a - b));
    for (const { direction } of cuts) expect(Math.hypot(direction[0], direction[1])).toBeCloseTo(1, 9);
  });

  it("finds the hull of a square with points on its sides and inside", () => {
    const hull = convexHull([[0, 0], [4, 0], [4, 4], [0, 4], [2, 0], [2, 2], [4, 1]]);
    expect([...hull].sort((a, b) => a[0] - b[0] || a[1] - b[1])).toEqual([[0, 0], [0, 4], [4, 0], [4, 4]]);
  });

  it("draws one cloud and one triangle for changes that a leg joins, two for changes apart", () => {
    const document = metric("T-3", "4", "").start(flange({ text: "A" })).go("E", "1500").go("N", "1500").go("U", "1500").go("E", "1500", end("continued", "T-4")).done();
    const count = (pointIds: string[]): [number, number] => {
      const drawing = drawn(document, { changed: { code: "C", pointIds } });
      const clouds = drawing.items.filter((item) => item.type === "path" && item.layer === "box" && item.stroke === "alert").length;
      return [clouds, texts(drawing).filter((text) => text === "C").length];
    };
    expect(count(["p2", "p3"])).toEqual([1, 1]);
    expect(count(["p2", "p4"])).toEqual([2, 2]);
    expect(count([])).toEqual([0, 0]);
  });
});

describe("legend", () => {
  it("has the key of a valve only where one stands", () => {
    expect(drawn(straight(valve({ valve: "check" }))).legend).toContain("check");
    expect(drawn(straight(valve({ valve: "check" }))).legend).not.toContain("gate");
    expect(drawn(straight(joint)).legend).not.toContain("check");
  });

  it("never names the same key twice", () => {
    const { legend } = drawn(straight());
    expect(new Set(legend).size).toBe(legend.length);
  });
});
