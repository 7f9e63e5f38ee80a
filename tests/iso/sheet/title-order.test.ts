/** The order of the title block: every field once whatever was stored, and the usual order printed as it always was. */
import { describe, expect, test } from "vitest";
import { composeSheet, TITLE_KEYS, titleOrder, type SheetSize } from "@/iso";
import { measureText } from "@/fonts/widths";
import { changeOf, MOST_OWN, rowName, rowsOf } from "@/components/jobs/title-rows";
import { seededRandom } from "../../oracle/random";
import { sampleDocument } from "../../factories";
import { benchInput } from "../layout/bench-inputs";
import { overlappingTexts, textsOf } from "./text-boxes";

const fields = [{ label: "PO", value: "4711" }, { label: "Work order", value: "W-2" }];
const labels = (order: readonly string[] | undefined, size: SheetSize) => {
  const input = benchInput(sampleDocument("L-1"), size);
  return composeSheet({ ...input, titleBlock: { ...input.titleBlock, fields, ...(order ? { order } : {}) } }, measureText);
};

describe("titleOrder", () => {
  test("absent and empty are the usual order; what is not named follows what usually goes before it", () => {
    expect(titleOrder(undefined)).toEqual(TITLE_KEYS);
    expect(titleOrder([])).toEqual(TITLE_KEYS);
    const moved = titleOrder(["weight", "client"]);
    expect(moved.slice(0, 3)).toEqual(["weight", "drawn", "sign-off"]);
    expect([...moved].sort()).toEqual([...TITLE_KEYS].sort());
  });

  test("500 shuffles and parts of them keep every field once", () => {
    const random = seededRandom(5);
    for (let k = 0; k < 500; k++) {
      const some = [...TITLE_KEYS].sort(() => random() - 0.5).slice(0, Math.floor(random() * 28));
      const order = titleOrder(some);
      expect([...order].sort()).toEqual([...TITLE_KEYS].sort());
      expect(order.filter((key) => some.includes(key))).toEqual(some);
    }
  });
});

describe("on paper", () => {
  test.each<SheetSize>(["letter", "tabloid", "A4", "A3"])("%s: the usual order named is the page of none; another has the same words with no overlap", (size) => {
    expect(JSON.stringify(labels([...TITLE_KEYS], size))).toBe(JSON.stringify(labels(undefined, size)));
    const words = (pages: ReturnType<typeof labels>) => pages.flatMap((page) => textsOf(page).map((item) => item.text)).sort();
    const turned = labels([...TITLE_KEYS].reverse(), size);
    const has = new Set(words(turned));
    for (const word of ["CLIENT", "PO", "WORK ORDER", "4711", "SIZE", "TOLERANCE", "INSULATION"]) expect(has.has(word)).toBe(true);
    for (const page of turned) expect(overlappingTexts(page)).toEqual([]);
  });
});

describe("rows of the form", () => {
  test("come back as what was stored, moved, added and removed", () => {
    expect(changeOf(rowsOf(fields, undefined))).toEqual({ fields, titleOrder: [] });
    const rows = rowsOf(fields, undefined);
    const own = rows.findIndex((row) => row.label === "PO");
    const swapped = [...rows.slice(0, own), rows[own + 1]!, rows[own]!, ...rows.slice(own + 2)];
    expect(changeOf(swapped)).toEqual({ fields: [fields[1], fields[0]], titleOrder: [] });
    const first = [rows[own + 1]!, ...rows.filter((_, at) => at !== own + 1)];
    const change = changeOf(first);
    expect(change.fields).toEqual([fields[1], fields[0]]);
    expect(change.titleOrder[0]).toBe("own-1");
    expect(rowsOf(change.fields, change.titleOrder).map(rowName)).toEqual(first.map(rowName));
    expect(changeOf(rows.filter((row) => row.label !== "PO"))).toEqual({ fields: [fields[1]], titleOrder: [] });
    expect(MOST_OWN).toBe(TITLE_KEYS.filter((key) => key.startsWith("own-")).length);
  });
});
