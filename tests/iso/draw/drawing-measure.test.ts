/** The measure itself, on drawings of a few items whose faults are plain. */
import { describe, expect, it } from "vitest";
import type { DisplayItem, PaperPoint } from "@/iso";
import { measureDrawing } from "./drawing-measure";

const ref = (kind: "joint" | "leg" | "component" | "dimension", id: string) => ({ kind, id });
const line = (layer: "pipe" | "leader" | "dimension" | "symbol", id: string, from: PaperPoint, to: PaperPoint): DisplayItem => ({
  type: "line", layer, ref: ref(layer === "pipe" ? "leg" : layer === "dimension" ? "dimension" : "joint", id), from, to, widthMm: layer === "pipe" ? 0.7 : 0.2, ink: "ink",
});
const square = (id: string, [x, y]: PaperPoint, half = 3): DisplayItem => ({
  type: "path", layer: "balloon", ref: ref("joint", id), stroke: "ink", widthMm: 0.3, fill: "paper",
  segments: [{ op: "M", to: [x - half, y - half] }, { op: "L", to: [x + half, y - half] }, { op: "L", to: [x + half, y + half] }, { op: "L", to: [x - half, y + half] }, { op: "Z" }],
});

describe("measureDrawing", () => {
  const pipe = line("pipe", "p2", [0, 0], [100, 0]);

  it("finds a lone mark with its leader clean, and its leader's length", () => {
    const found = measureDrawing({ items: [pipe, line("leader", "p1:in", [20, 1.5], [20, 8]), square("p1:in", [20, 11])] });
    expect(found).toMatchObject({ labels: 1, clean: 1, onLabels: 0, onHeavy: 0, underLeaders: 0, leadersOnHeavy: 0 });
    expect(found.leaders).toEqual([6.5]);
  });

  it("finds two marks on each other, whole or in part, and not those that only stand edge to edge in a row", () => {
    expect(measureDrawing({ items: [square("a", [20, 20]), pipe, square("b", [25, 24])] }).labels).toBe(1);
    const apart = measureDrawing({ items: [square("a", [20, 20]), square("c", [60, 20]), square("b", [22, 20.5])] });
    expect(apart.onLabels).toBe(1);
    expect(measureDrawing({ items: [square("a", [20, 20]), square("b", [26, 20])] })).toMatchObject({ labels: 1, clean: 1 });
  });

  it("finds a mark on pipe", () => {
    expect(measureDrawing({ items: [pipe, square("a", [20, 3.2])] })).toMatchObject({ onHeavy: 1, clean: 0 });
    expect(measureDrawing({ items: [pipe, square("a", [20, 3.4])] })).toMatchObject({ onHeavy: 0, clean: 1 });
  });

  it("finds a mark under a foreign leader: both are unclean", () => {
    const items = [square("a", [20, 20]), square("b", [60, 50]), line("leader", "b", [20, 10], [57.5, 49]), line("leader", "b2", [10, 20], [40, 20.5]), square("b2", [43, 20.5])];
    expect(measureDrawing({ items: [...items] }).underLeaders).toBe(1);
  });

  it("finds a leader that runs over foreign pipe, and crossings of leaders and of dimension lines", () => {
    const over = measureDrawing({ items: [pipe, line("leader", "a", [20, -9], [20, 8]), square("a", [20, 11])] });
    expect(over).toMatchObject({ leadersOnHeavy: 1, clean: 0 });
    const items = [line("leader", "a", [10, 10], [30, 30]), line("leader", "b", [10, 30], [30, 10]), line("dimension", "d1", [0, 20], [50, 21]), line("dimension", "d2", [15, 0], [15, 40])];
    expect(measureDrawing({ items })).toMatchObject({ leaderCrossings: 1, dimensionCrossings: 1, leadersOverDimensions: 4 });
  });
});
