import { describe, expect, it } from "vitest";
import { parseLength, type RunDocument } from "@/iso";
import { editorReducer, initialState } from "@/components/run-editor/editor-state";
import { withUnits } from "@/components/run-editor/unit-change";
import { emptyDocument, testStamp } from "./fixtures";

function typed(...moves: readonly string[]): RunDocument {
  return moves.reduce(
    (state, text, row) => editorReducer(state, { type: "commit", target: { runId: "main", row, column: "move" }, text, step: "stay", stamp: testStamp() }),
    initialState(emptyDocument(), testStamp()),
  ).document;
}

function lengths(document: RunDocument): readonly (readonly [string, number])[] {
  return (document.runs[0]?.points ?? []).flatMap(({ offset }) => (offset.kind === "polar" || offset.kind === "slope" ? [[offset.length.text, offset.length.mm] as const] : [offset.e, offset.n, offset.u].filter((entry) => entry.mm !== 0).map((entry) => [entry.text, entry.mm] as const)));
}

describe("changing a line's units", () => {
  const document = typed("e 37.5", "u 2-8", "n 1-9 3/4", "w 2-0 n 1 d 775mm");

  it("keeps every length, and each text still reads as it", () => {
    const result = withUnits(document, "metric", "same-lengths");
    if (!result.ok) throw new Error(result.message);
    const before = lengths(document);
    lengths(result.value).forEach(([text, mm], i) => {
      expect(mm).toBe(before[i]?.[1]);
      const read = parseLength(text, "metric");
      expect(read.ok && read.mm).toBeCloseTo(mm, 4);
    });
    expect(result.value.settings.units).toBe("metric");
  });

  it("reads the same numbers again in the other unit", () => {
    const result = withUnits(typed("e 775", "u 300"), "metric", "same-numbers");
    if (!result.ok) throw new Error(result.message);
    expect(lengths(result.value)).toEqual([["775", 775], ["300", 300]]);
  });

  it("names the row whose text has no meaning there and changes nothing", () => {
    expect(withUnits(document, "metric", "same-numbers")).toMatchObject({ ok: false, message: expect.stringContaining("Row 2") });
  });
});
