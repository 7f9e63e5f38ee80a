/** Bench pages and templates through their route: who gets which, in what size, saying what state. */
import { afterAll, beforeAll, describe, expect, test } from "vitest";
import * as bench from "@/app/api/spools/[spoolId]/bench/route";
import { signed } from "./revision-support";
import { routeNamed } from "./routes";
import { call, endOfFile, newLine, newShop, ROLES, type TestLine, type TestShop } from "./support";

const work = { POST: await routeNamed("POST /spools/[spoolId]/work") };
let shop: TestShop;
let draft: TestLine;
let issued: Awaited<ReturnType<typeof signed>>;

beforeAll(async () => {
  shop = await newShop();
  draft = await newLine(shop);
  issued = await signed(shop);
});
afterAll(endOfFile);

const get = (spoolId: string, query: string, role: (typeof ROLES)[number] = "owner") => call(bench.GET, { as: shop[role], params: { spoolId }, query });

describe("who", () => {
  test.each(ROLES)("%s prints both of an issued spool", async (role) => {
    for (const kind of ["layout", "templates"]) {
      const answer = await get(issued.spoolId, `?kind=${kind}`, role);
      expect(answer.status, answer.text.slice(0, 200)).toBe(200);
      expect(answer.headers.get("content-type")).toBe("application/pdf");
      expect(answer.headers.get("content-disposition")).toMatch(/^inline; filename="[^"]*rev-A-FOR-FABRICATION\.pdf/);
    }
  });

  test("a fitter gets nothing of a draft; a detailer gets it, named DRAFT", async () => {
    expect((await get(issued.spoolId, "?kind=layout&of=draft", "fitter")).status).toBe(403);
    expect((await get(draft.spoolIds[0]!, "?kind=templates", "fitter")).status).toBe(404);
    const answer = await get(draft.spoolIds[0]!, "?kind=layout&size=A3", "detailer");
    expect([answer.status, answer.headers.get("content-disposition")]).toEqual([200, expect.stringMatching(/bench-DRAFT\.pdf/)]);
  });
});

describe("what", () => {
  test("the size asked for is the size of the paper, also of an issued sheet", async () => {
    const boxes = async (query: string) => /\/MediaBox \[0 0 ([\d.]+) ([\d.]+)\]/.exec((await get(issued.spoolId, query)).text)!.slice(1).map((points) => Math.round((Number(points) * 25.4) / 72));
    expect(await boxes("?kind=templates&size=A3")).toEqual([420, 297]);
    expect(await boxes("?kind=layout&size=letter")).toEqual([279, 216]);
  });

  test("thicker paper makes a longer template: the question is heard", async () => {
    const answer = await get(issued.spoolId, "?kind=templates&paper=0.25");
    expect(answer.status).toBe(200);
  });

  test("a question asked wrong is answered in words", async () => {
    for (const query of ["", "?kind=all", "?kind=layout&size=A0", "?kind=layout&of=mine", "?kind=templates&paper=5"]) {
      const answer = await get(issued.spoolId, query);
      expect([query, answer.status]).toEqual([query, 400]);
    }
  });

  test("what was measured at a check is kept with its answer", async () => {
    const body = { kind: "actual", mark: "C1 E", key: "check:ends:1-2:e", values: { actual: `3' 1 1/2"`, remarks: "go: within 1/8 in" } };
    expect((await call(work.POST, { as: shop.fitter, method: "POST", params: { spoolId: issued.spoolId }, body })).status).toBeLessThan(300);
  });
});
