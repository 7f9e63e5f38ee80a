/** The label search on made-up crowds, and the bitmap it asks, each against a slow and obvious second answer. */
import { describe, expect, it } from "vitest";
import type { PaperPoint } from "@/iso";
import { boxMap, inkMap } from "@/iso/draw/ink-map";
import type { Label } from "@/iso/draw/label-candidates";
import { placeLabels } from "@/iso/draw/labels";
import { boxesMeet, segmentsCross, type Segment, type TurnedBox } from "@/iso/draw/plane";
import { seeded } from "./draw-helpers";

const ROOM = { minX: 0, minY: 0, maxX: 200, maxY: 150 };
const mark = (id: string, at: PaperPoint, halfWidth = 3.1, along: readonly PaperPoint[] = [[1, 0]]): Label => ({
  id, anchors: [at], clear: 1.5, halfWidth, halfHeight: 3.1, hubs: [{ offset: [0, 0], radius: 3.1 }], along, leaderFrom: 0, draw: () => [],
});

function crowd(seed: number, count: number): { labels: Label[]; pipe: Segment[]; fixed: TurnedBox[] } {
  const random = seeded(seed);
  const pipe: Segment[] = Array.from({ length: 5 }, () => ({ from: [20 + random() * 160, 20 + random() * 110], to: [20 + random() * 160, 20 + random() * 110] }));
  const labels = Array.from({ length: count }, (_, i) => {
    const { from, to } = pipe[i % pipe.length]!;
    const t = random();
    return mark(`m${i}`, [from[0] + (to[0] - from[0]) * t, from[1] + (to[1] - from[1]) * t], 3.1 + 5 * (i % 3));
  });
  const fixed = Array.from({ length: 8 }, (): TurnedBox => ({ centre: [20 + random() * 160, 20 + random() * 110], halfWidth: 8, halfHeight: 1.75, angle: (random() - 0.5) * Math.PI }));
  return { labels, pipe, fixed };
}

describe("placeLabels", () => {
  it.each([1, 2, 3, 4, 5, 6])("seats every label on no other and on no number, however crowded: seed %i", (seed) => {
    const { labels, pipe, fixed } = crowd(seed, 20 + seed * 15);
    const { boxes, report } = placeLabels(labels, fixed, { heavy: inkMap(pipe, 1.2), light: inkMap([], 0.5), room: ROOM });
    expect(boxes).toHaveLength(labels.length);
    const all = [...boxes, ...fixed];
    boxes.forEach((a, i) => all.forEach((b, j) => {
      if (j > i) expect(boxesMeet(a, b, 0)).toBe(false);
    }));
    expect(report.overlaps).toBe(0);
    expect(report.labels).toBe(all.length);
  });

  it("gives the same seats for the same labels", () => {
    const { labels, pipe, fixed } = crowd(9, 70);
    const once = (): readonly TurnedBox[] => placeLabels(labels, fixed, { heavy: inkMap(pipe, 1.2), light: inkMap([], 0.5), room: ROOM }).boxes;
    expect(once()).toEqual(once());
  });

  it("keeps a few marks clean and beside their anchors", () => {
    const pipe: Segment[] = [{ from: [30, 75], to: [170, 75] }];
    const labels = Array.from({ length: 12 }, (_, i) => mark(`m${i}`, [40 + i * 11, 75]));
    const { report } = placeLabels(labels, [], { heavy: inkMap(pipe, 1.2), light: inkMap([], 0.5), room: ROOM });
    expect(report.clean).toBe(12);
    expect(report.meanLeaderMm).toBeLessThanOrEqual(3);
  });

  it("puts one aside to make room: two marks in a nook with room for one near each", () => {
    const pipe: Segment[] = [{ from: [50, 50], to: [50, 64] }, { from: [50, 64], to: [64, 64] }];
    const labels = [mark("a", [50, 57], 3.1, [[0, 1]]), mark("b", [57, 64]), mark("c", [50, 62], 3.1, [[0, 1]]), mark("d", [52, 64])];
    const { report } = placeLabels(labels, [], { heavy: inkMap(pipe, 1.2), light: inkMap([], 0.5), room: ROOM });
    expect(report.clean).toBe(4);
    expect(report.p95LeaderMm).toBeLessThanOrEqual(6.5);
  });

  it("takes no labels at all", () => {
    expect(placeLabels([], [], { heavy: inkMap([], 1.2), light: inkMap([], 0.5), room: ROOM }).report).toMatchObject({ labels: 0, clean: 0, meanLeaderMm: 0 });
  });
});

describe("the ink map", () => {
  const random = seeded(77);
  const segments: Segment[] = Array.from({ length: 30 }, () => ({ from: [random() * 90, random() * 90], to: [random() * 90, random() * 90] }));
  const map = inkMap(segments, 1.2);

  it("finds ink in a box wherever a line passes through it, and counts as it finds", () => {
    for (let i = 0; i < 400; i++) {
      const [x, y, w, h] = [random() * 110 - 10, random() * 110 - 10, random() * 40, random() * 12];
      const box: TurnedBox = { centre: [x + w / 2, y + h / 2], halfWidth: w / 2, halfHeight: h / 2, angle: 0 };
      const crossed = segments.some((s) => [0, 0.2, 0.4, 0.6, 0.8, 1].some((t) => {
        const p: PaperPoint = [s.from[0] + (s.to[0] - s.from[0]) * t, s.from[1] + (s.to[1] - s.from[1]) * t];
        return Math.abs(p[0] - box.centre[0]) < box.halfWidth && Math.abs(p[1] - box.centre[1]) < box.halfHeight;
      }));
      const count = map.inBox(x, y, x + w, y + h);
      if (crossed) expect(count).toBeGreaterThan(0);
      expect(map.anyCells(Math.floor(x * 2), Math.floor(y * 2), Math.ceil((x + w) * 2), Math.ceil((y + h) * 2))).toBe(count > 0);
    }
  });

  it("counts nothing far from all ink, and adds up over the parts of a box", () => {
    expect(map.inBox(300, 300, 320, 320)).toBe(0);
    expect(map.inBox(10, 10, 30, 40) + map.inBox(30, 10, 77, 40)).toBe(map.inBox(10, 10, 77, 40));
  });

  it("fills turned boxes to their corners", () => {
    const box: TurnedBox = { centre: [40, 40], halfWidth: 12, halfHeight: 2, angle: Math.PI / 6 };
    const filled = boxMap([box]);
    for (const [i, j] of [[1, 1], [1, -1], [-1, 1], [-1, -1], [0, 0], [0.5, 0.9]] as const) {
      const p: PaperPoint = [40 + Math.cos(box.angle) * 11.9 * i - Math.sin(box.angle) * 1.9 * j, 40 + Math.sin(box.angle) * 11.9 * i + Math.cos(box.angle) * 1.9 * j];
      expect(filled.inBox(p[0] - 0.01, p[1] - 0.01, p[0] + 0.01, p[1] + 0.01)).toBeGreaterThan(0);
    }
    expect(filled.inBox(40, 50, 41, 51)).toBe(0);
  });
});

describe("segmentsCross", () => {
  it("agrees with solving for the place along both", () => {
    const random = seeded(5);
    const point = (): PaperPoint => [random() * 10, random() * 10];
    for (let i = 0; i < 2000; i++) {
      const [a, b, c, d] = [point(), point(), point(), point()];
      const det = (b[0] - a[0]) * (d[1] - c[1]) - (b[1] - a[1]) * (d[0] - c[0]);
      const t = ((c[0] - a[0]) * (d[1] - c[1]) - (c[1] - a[1]) * (d[0] - c[0])) / det;
      const s = ((c[0] - a[0]) * (b[1] - a[1]) - (c[1] - a[1]) * (b[0] - a[0])) / det;
      expect(segmentsCross({ from: a, to: b }, { from: c, to: d })).toBe(t > 0 && t < 1 && s > 0 && s < 1);
    }
  });
});
