/** Comparisons through their route: which two, for whom, and as what. */
import { afterAll, beforeAll, describe, expect, test } from "vitest";
import * as compare from "@/app/api/spools/[spoolId]/compare/route";
import * as line from "@/app/api/lines/[lineId]/route";
import * as sign from "@/app/api/revisions/[revisionId]/sign/route";
import * as submit from "@/app/api/spools/[spoolId]/submit/route";
import { PDFParse } from "pdf-parse";
import type { RunDocument } from "@/iso";
import type { CompareDetail } from "@/lib/rules/compare-types";
import { signBody, signed, submitted, type TestRevision } from "./revision-support";
import { call, endOfFile, newLine, newShop, ROLES, type TestShop } from "./support";

let shop: TestShop;
let first: TestRevision;
/** Revision B of the same spool: its second leg is longer. */
let second: string;

beforeAll(async () => {
  shop = await newShop();
  first = await signed(shop);
  await lengthen(700);
  const answer = await call(submit.POST, { as: shop.detailer, method: "POST", params: { spoolId: first.spoolId }, body: { description: "Moved the riser", size: "tabloid" } });
  second = answer.json.revisionId as string;
  expect((await call(sign.POST, { as: shop.inspector, method: "POST", params: { revisionId: second }, body: signBody })).status).toBe(200);
  await lengthen(900);
});
afterAll(endOfFile);

async function lengthen(mm: number): Promise<void> {
  const detail = (await call(line.GET, { as: shop.detailer, params: { lineId: first.lineId } })).json as { version: number; document: RunDocument };
  const document = structuredClone(detail.document) as { runs: { points: { offset: unknown }[] }[] };
  const entry = (length: number) => ({ text: `${length}mm`, mm: length });
  document.runs[0]!.points[2]!.offset = { kind: "enu", e: entry(0), n: entry(0), u: entry(mm) };
  expect((await call(line.PUT, { as: shop.detailer, method: "PUT", params: { lineId: first.lineId }, body: { version: detail.version, document } })).status).toBe(200);
}

const get = (query: string, role: (typeof ROLES)[number] = "owner", spoolId = first.spoolId) => call(compare.GET, { as: shop[role], params: { spoolId }, query });
const detail = async (query: string, role: (typeof ROLES)[number] = "owner") => (await get(`?as=data${query}`, role)).json as CompareDetail;

describe("which two", () => {
  test("left open: the draft against what is in force; fitters the revision in force against the one before", async () => {
    const own = await detail("");
    expect(own.choices.map(({ code, state }) => `${code} ${state}`)).toEqual(["A superseded", "B for-fabrication", "C draft"]);
    expect([own.pair!.from, own.pair!.to]).toEqual([second, "draft"]);
    const fitters = await detail("", "fitter");
    expect(fitters.choices.map(({ id }) => id)).toEqual([first.revisionId, second]);
    expect([fitters.pair!.from, fitters.pair!.to]).toEqual([first.revisionId, second]);
  });

  test("each side carries the state of today on the content of then", async () => {
    const { pair } = await detail(`&from=${first.revisionId}&to=${second}`);
    expect([pair!.before.revision.state, pair!.after.revision.state]).toEqual(["superseded", "for-fabrication"]);
    expect(pair!.before.document).not.toEqual(pair!.after.document);
  });

  test("one that is not there, one twice, and what is no revision are refused in words", async () => {
    expect((await get(`?from=${crypto.randomUUID()}`)).status).toBe(404);
    const twice = await get(`?from=${second}&to=${second}`);
    expect([twice.status, twice.json.message]).toEqual([400, "Choose two different revisions: a revision does not differ from itself."]);
    for (const query of ["?from=A", "?to=newest", "?as=html", "?size=A0"]) expect([query, (await get(query)).status]).toEqual([query, 400]);
  });

  test("a revision of another spool is none of this one's", async () => {
    const other = await signed(shop);
    expect((await get(`?from=${other.revisionId}`)).status).toBe(404);
  });
});

describe("for whom", () => {
  test.each(ROLES)("%s gets pages of two issued revisions", async (role) => {
    const answer = await get(`?from=${first.revisionId}&to=${second}`, role);
    expect([answer.status, answer.headers.get("content-type")]).toEqual([200, "application/pdf"]);
    expect(answer.headers.get("content-disposition")).toMatch(/^inline; filename="[^"]*spool-A-comparison-rev-A-rev-B\.pdf/);
    expect(answer.headers.get("cache-control")).toContain("no-store");
  });

  test("a fitter gets neither a draft nor one for review", async () => {
    expect((await get("?to=draft", "fitter")).status).toBe(403);
    const open = await submitted(shop);
    expect((await get("?as=data", "fitter", open.spoolId)).status).toBe(404);
    expect((await get(`?from=${open.revisionId}`, "fitter", open.spoolId)).status).toBe(404);
    expect(((await get("?as=data", "detailer", open.spoolId)).json as CompareDetail).pair).toMatchObject({ from: open.revisionId, to: "draft" });
  });

  test("with one to choose from there is nothing to compare yet", async () => {
    const fresh = await newLine(shop);
    expect(((await get("?as=data", "owner", fresh.spoolIds[0]!)).json as CompareDetail).pair).toBeNull();
    const pages = await get("", "owner", fresh.spoolIds[0]!);
    expect([pages.status, pages.json.message]).toEqual([400, "There are no two revisions of this spool to compare yet."]);
  });
});

describe("the pages", () => {
  test("name both, list what differs with both numbers, and are of the size asked for", async () => {
    const answer = await get(`?from=${first.revisionId}&to=${second}&size=A4`);
    const parser = new PDFParse({ data: new Uint8Array(answer.bytes) });
    const { text, total } = await parser.getText();
    await parser.destroy();
    expect(total).toBe(2);
    for (const words of ["from rev A, SUPERSEDED to rev B, FOR FABRICATION", "2'-7 1/2\"", "2'-3 9/16\"", "WAS", "Cut, fit and weld from the sheet in force"]) expect(text.replace(/\s+/g, " ")).toContain(words);
    const [width, height] = /\/MediaBox \[0 0 ([\d.]+) ([\d.]+)\]/.exec(answer.text)!.slice(1).map((points) => Math.round((Number(points) * 25.4) / 72));
    expect([width, height]).toEqual([297, 210]);
  });
});
