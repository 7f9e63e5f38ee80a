import { describe, expect, it } from "vitest";
import { fitViewport, panViewport, viewportCentre, zoomViewport } from "@/components/run-editor/viewport";
import { saveWords, retryDelayMs } from "@/components/run-editor/save-state";

describe("the window over the drawing", () => {
  const view = fitViewport({ minX: 10, minY: 20, maxX: 110, maxY: 80 });
  it("shows the whole drawing about its middle", () => {
    expect(viewportCentre(view)).toEqual([60, 50]);
    expect(view.width).toBeGreaterThan(100);
  });
  it("keeps the point under the pointer where it is", () => {
    const closer = zoomViewport(view, [30, 40], 0.5);
    const part = (box: typeof view) => [(30 - box.x) / box.width, (40 - box.y) / box.height];
    expect(part(closer)[0]).toBeCloseTo(part(view)[0] ?? NaN, 9);
    expect(part(closer)[1]).toBeCloseTo(part(view)[1] ?? NaN, 9);
  });
  it("stops at the closest look", () => {
    const closest = Array.from({ length: 40 }).reduce<typeof view>((now) => zoomViewport(now, [60, 50], 0.5), view);
    expect(closest.width).toBeGreaterThan(10);
  });
  it("moves by parts of itself", () => {
    expect(panViewport(view, 0.5, 0).x - view.x).toBeCloseTo(view.width / 2, 9);
  });
});

describe("words of saving", () => {
  it("says what is saved, what is not and why", () => {
    expect(saveWords({ kind: "failed", message: "no connection." })).toBe("Not saved: no connection.");
    expect(saveWords({ kind: "conflict", by: "M. Okafor", at: "", currentVersion: 3 })).toContain("M. Okafor");
    expect(saveWords({ kind: "saved", at: null })).toBe("Saved");
  });
  it("waits longer after each failure, a minute at most", () => {
    const waits = [1, 2, 3, 4, 9].map(retryDelayMs);
    expect(waits).toEqual([...waits].sort((a, b) => a - b));
    expect(waits[4]).toBe(60_000);
  });
});
