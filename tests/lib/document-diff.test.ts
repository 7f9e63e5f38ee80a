import { describe, expect, it } from "vitest";
import { emptyMarks, nextMarks, type SheetInput } from "@/iso";
import { changedPointIds, sheetChanges } from "@/lib/rules/document-diff";
import { unverifiedDimensions } from "@/lib/rules/unverified";
import { pointAt, sampleDocument } from "../factories";

function input(change: (document: SheetInput["document"]) => void = () => undefined, titleBlock: Partial<SheetInput["titleBlock"]> = {}): SheetInput {
  const document = structuredClone(sampleDocument("L-1"));
  change(document);
  return {
    version: 1, document, marks: nextMarks(document, emptyMarks(), []), takeOuts: [], spool: "A", size: "A3", units: "imperial",
    titleBlock: { shopName: "Shop", client: "", project: "", jobNumber: "1", area: "", fields: [], logo: null, ...titleBlock },
    revision: {
      sheetNumber: "0001", code: "A", state: "for-review", hold: false, rows: [], drawnBy: "", checkedBy: "", issuedAt: "2026-01-01T00:00:00.000Z",
      statusUrl: "", auditHead: "", changedPointIds: [], accepted: [],
    },
  };
}

describe("what changed between two revisions", () => {
  it("is nothing for the first and for an equal one", () => {
    expect(sheetChanges(null, input())).toEqual([]);
    expect(sheetChanges(input(), input())).toEqual([]);
  });
  it("names the point and the piece a longer leg changes, before and after", () => {
    const changes = sheetChanges(input(), input((d) => void (d.runs[0]!.points[1]!.offset = pointAt("b", [1_200, 0, 0]).offset)));
    expect(changes.map((c) => `${c.kind} ${c.what} ${c.mark}`)).toEqual(["changed point 2", "changed piece P1", expect.stringContaining("changed material")]);
    expect(changes[1]).toMatchObject({ before: `2'-6 1/8"`, after: `3'-2"` });
    expect(changedPointIds(changes)).toEqual(["b"]);
  });
  it("lists settings, notes and the title block in words", () => {
    const after = input(
      (d) => {
        d.notes = ["Prime only."];
        d.settings = { ...d.settings, fieldTrimMm: 100 };
      },
      { client: "Client", fields: [{ label: "ORDER", value: "7" }], plantNorthDeg: 14 },
    );
    const texts = sheetChanges(input(), after).map((c) => c.text);
    expect(texts).toEqual(expect.arrayContaining([
      "field trim (mm): 152.4 is now 100", "Note added: Prime only.", "client: none is now Client",
      "plant north (deg): none is now 14", "fields: none is now ORDER 7",
    ]));
  });
});

describe("the words of newer items", () => {
  const textsAfter = (change: (document: SheetInput["document"]) => void): string[] => sheetChanges(input(), input(change)).map((c) => c.text);

  it("say radius, pieces, side and class of what stands at a point", () => {
    const said = (item: SheetInput["document"]["runs"][0]["points"][0]["item"]) => textsAfter((d) => void (d.runs[0]!.points[1]!.item = item)).find((text) => text.startsWith("Point 2"))!;
    expect(said({ kind: "mitre", pieces: 3, radiusMm: 304.8 })).toContain(`mitre of 3 pieces radius 1'-0"`);
    expect(said({ kind: "return", radius: "LR", toward: "N" })).toContain("return LR toward N");
    expect(said({ kind: "stub-in", branchNps: "2", set: "in", padMm: 152.4 })).toContain(`stub-in 2 set in pad 6"`);
    expect(said({ kind: "flange", flange: "lap-joint", stubEnd: "short", gasketMm: 6.35, ratingClass: 300, boltHoles: { turnDeg: 22.5, from: "E" }, gasketSide: "after", goes: "open", text: "" }))
      .toContain(`flange lap-joint short stub end gasket 1/4" class 300 holes turned 22.50° from E gasket after open`);
  });

  it("say slopes, what starts at a point, notes of this sheet only, and the fitting a run comes back to", () => {
    const texts = textsAfter((d) => {
      const point = d.runs[0]!.points[1]!;
      point.offset = { kind: "slope", direction: { text: "E", e: 1, n: 0, u: 0 }, length: { text: "3'", mm: 914.4 }, slope: { text: "1:100", ratio: 0.01 } };
      point.starts = { insulation: "50 mm", tracing: "" };
      d.runs[0]!.to = "b";
      d.sheetNotes = [{ spool: "A", text: "Ship plugged." }, { spool: "B", text: "Not here." }];
    });
    expect(texts.find((text) => text.startsWith("Point 2"))).toMatch(/3'-0" E at 1:100.*insulation "50 mm" starts, tracing ends/);
    expect(texts).toContain("main run, comes back to: none is now point 2");
    expect(texts.filter((text) => text.startsWith("Note"))).toEqual(["Note added: Ship plugged."]);
  });
});

describe("unverified dimensions", () => {
  it("are the assumed ones, by point and length", () => {
    const assumed = input((d) => void (d.runs[0]!.points[2]!.provenance = { kind: "assumed", toleranceMm: null, by: null, at: null, second: null }));
    expect(unverifiedDimensions(assumed)).toEqual([{ pointId: "c", text: expect.stringMatching(/^point 3, 2'-7 1\/2" \(assumed\)$/) }]);
    expect(unverifiedDimensions(input())).toEqual([]);
  });
});
