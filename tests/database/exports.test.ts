/** Files that leave the house, through the routes: who gets which, under what name, saying what state. */
import { afterAll, beforeAll, describe, expect, test } from "vitest";
import * as lineExport from "@/app/api/lines/[lineId]/export/route";
import * as spoolExport from "@/app/api/spools/[spoolId]/export/route";
import { svgFault } from "./xml-check";
import { signed } from "./revision-support";
import { call, endOfFile, newLine, newShop, ROLES, type TestLine, type TestShop } from "./support";

let shop: TestShop;
let draft: TestLine;
let issued: Awaited<ReturnType<typeof signed>>;

beforeAll(async () => {
  shop = await newShop();
  draft = await newLine(shop);
  issued = await signed(shop);
});
afterAll(endOfFile);

const spool = (spoolId: string, query: string, role: (typeof ROLES)[number] = "owner") => call(spoolExport.GET, { as: shop[role], params: { spoolId }, query });
const line = (lineId: string, query: string, role: (typeof ROLES)[number] = "owner") => call(lineExport.GET, { as: shop[role], params: { lineId }, query });

describe("who", () => {
  test.each(ROLES)("%s takes an issued spool's files", async (role) => {
    for (const query of ["?what=materials", "?what=cuts&as=xlsx&of=issued", "?what=welds", "?what=drawing&as=dxf&of=issued"]) {
      const answer = await spool(issued.spoolId, query, role);
      expect(answer.status, answer.text.slice(0, 200)).toBe(200);
      expect(answer.headers.get("content-disposition")).toMatch(/^attachment; filename="[^"]*rev-A-FOR-FABRICATION\./);
    }
  });

  test("a fitter gets no draft, of a spool or a line", async () => {
    expect((await spool(issued.spoolId, "?what=cuts&of=draft", "fitter")).status).toBe(403);
    expect((await spool(draft.spoolIds[0]!, "?what=cuts", "fitter")).status).toBe(404);
    expect((await line(draft.lineId, "?what=points", "fitter")).status).toBe(403);
    expect((await line(issued.lineId, "?what=cuts&of=issued", "fitter")).status).toBe(403);
  });

  test.each(["detailer", "inspector"] as const)("%s takes drafts", async (role) => {
    expect((await spool(draft.spoolIds[0]!, "?what=drawing", role)).status).toBe(200);
    expect((await line(draft.lineId, "?what=points", role)).status).toBe(200);
  });
});

describe("what", () => {
  test("a draft says DRAFT in its name and in every row", async () => {
    const answer = await spool(draft.spoolIds[0]!, "?what=cuts&as=csv");
    expect(answer.headers.get("content-disposition")).toMatch(/spool-A-cut-list-DRAFT\.csv"/);
    const [head, ...rows] = answer.text.replace(/^\ufeff/, "").trim().split("\r\n");
    expect(head).toMatch(/^Mark,/);
    expect(rows.length).toBe(3);
    for (const row of rows) expect(row).toMatch(/,none,DRAFT$/);
  });

  test("files are never kept on the way and never guessed at", async () => {
    for (const answer of [await spool(draft.spoolIds[0]!, "?what=welds"), await line(draft.lineId, "?what=materials&as=xlsx")]) {
      expect(answer.headers.get("cache-control")).toBe("private, no-store");
      expect(answer.headers.get("x-content-type-options")).toBe("nosniff");
    }
  });

  test("the drawing is well-formed SVG of the sheet, in the size asked for, with its state on it", async () => {
    const answer = await spool(draft.spoolIds[0]!, "?what=drawing&as=svg&size=A3");
    expect(answer.headers.get("content-type")).toBe("image/svg+xml");
    expect(answer.text).toMatch(/^<svg [^>]*width="420mm" height="297mm"/);
    expect(await svgFault(answer.text)).toBeNull();
    expect(await svgFault(answer.text.replace("</svg>", ""))).not.toBeNull();
    expect(answer.text).toContain(">DRAFT<");
    expect((await spool(draft.spoolIds[0]!, "?what=drawing&as=dxf")).text).toContain("AC1009");
  });

  test("a line's lists hold every spool; the issued ones only when asked for", async () => {
    expect((await line(issued.lineId, "?what=cuts&of=issued")).text).toContain("FOR FABRICATION");
    expect((await line(issued.lineId, "?what=cuts")).text).not.toContain("FOR FABRICATION");
    const none = await line(draft.lineId, "?what=cuts&of=issued");
    expect([none.status, none.json.message]).toEqual([400, expect.stringMatching(/Nothing of this line is issued/)]);
  });

  test("what is not asked right is answered in words", async () => {
    for (const query of ["", "?what=everything", "?what=cuts&as=pdf", "?what=drawing&sheet=0", "?what=drawing&sheet=77", "?what=cuts&of=mine"]) {
      const answer = await spool(draft.spoolIds[0]!, query);
      expect([query, answer.status]).toEqual([query, 400]);
      expect(answer.json.message.length).toBeGreaterThan(10);
    }
  });
});
