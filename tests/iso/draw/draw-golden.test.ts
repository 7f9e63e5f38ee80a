/** Golden drawings: numbers rounded to 3 digits. UPDATE_GOLDEN=1 accepts; a failure leaves a -changed file beside the golden. */
import { existsSync, mkdirSync, readFileSync, rmSync, writeFileSync } from "node:fs";
import path from "node:path";
import { describe, expect, it } from "vitest";
import { drawingSvg } from "@/iso";
import { sampleRuns } from "../../fixtures/sample-runs";
import { drawn, modelOf, ROOM } from "./draw-helpers";

const FOLDER = path.resolve(import.meta.dirname, "../../golden/drawings");

/** Ids in order of appearance become #1, #2 ..., so that renaming them changes nothing. */
function renumbered(svg: string): string {
  const ids = new Map<string, string>();
  return svg.replace(/data-id="([^"]*)"/g, (_, id: string) => {
    if (!ids.has(id)) ids.set(id, `#${ids.size + 1}`);
    return `data-id="${ids.get(id)}"`;
  });
}

describe("golden drawings", () => {
  it.each(Object.keys(sampleRuns))("%s", (name) => {
    const drawing = drawn(modelOf(sampleRuns[name]!));
    const svg = renumbered(drawingSvg(drawing.items, ROOM.widthMm, ROOM.heightMm, { interactive: true }));
    const golden = path.join(FOLDER, `${name}.svg`);
    const changed = path.join(FOLDER, `${name}-changed.svg`);
    if (process.env.UPDATE_GOLDEN === "1") {
      mkdirSync(FOLDER, { recursive: true });
      writeFileSync(golden, svg);
      rmSync(changed, { force: true });
    }
    const same = existsSync(golden) && readFileSync(golden, "utf8") === svg;
    if (!same) writeFileSync(changed, svg);
    else rmSync(changed, { force: true });
    expect(same, `${name}.svg differs; compare it with ${name}-changed.svg, accept with UPDATE_GOLDEN=1`).toBe(true);
  });
});
