/** Jobs and lines: two savers, versions, numbers, copies, spools, touches; and what is not a run document. */
import { afterAll, beforeAll, describe, expect, test } from "vitest";
import * as jobRoute from "@/app/api/jobs/[jobId]/route";
import * as jobs from "@/app/api/jobs/route";
import * as lineCopy from "@/app/api/lines/[lineId]/copy/route";
import * as lineRoute from "@/app/api/lines/[lineId]/route";
import * as linesOfJob from "@/app/api/jobs/[jobId]/lines/route";
import * as shopRoute from "@/app/api/shop/route";
import { MAX_POINTS, type RunDocument } from "@/iso";
import { Line, LineTouch, Spool } from "@/models";
import { chainDocument, pointAt, sampleDocument } from "../factories";
import { submitted } from "./revision-support";
import { call, endOfFile, newLine, newShop, tablePrints, type TestPerson, type TestShop, unique } from "./support";

let shop: TestShop;
beforeAll(async () => {
  shop = await newShop();
});
afterAll(endOfFile);

const put = (as: TestPerson, lineId: string, body: unknown) => call(lineRoute.PUT, { as, method: "PUT", params: { lineId }, body });
const get = (lineId: string) => call(lineRoute.GET, { as: shop.detailer, params: { lineId } });

describe("saving a line", () => {
  test("what was saved comes back, digit for digit", async () => {
    const { lineId } = await newLine(shop);
    const { json: before } = await get(lineId);
    const document = { ...sampleDocument(before.document.number, 0.1 + 0.2), notes: ["3/16\" land, ± 0.5°, Ø 6 – “as found”"] };
    const saved = await put(shop.detailer, lineId, { version: 1, document });
    expect(saved.json).toMatchObject({ version: 2 });
    const { json: after } = await get(lineId);
    expect(after.document).toEqual(document);
    expect(after).toMatchObject({ version: 2, updatedBy: "Pat detailer", editable: true });
  });

  test("of two savers the second is told who was first, and nothing of the first is lost", async () => {
    const { lineId } = await newLine(shop);
    const number = (await get(lineId)).json.document.number as string;
    const both = await Promise.all([
      put(shop.detailer, lineId, { version: 1, document: sampleDocument(number, 1_111) }),
      put(shop.owner, lineId, { version: 1, document: sampleDocument(number, 2_222) }),
    ]);
    expect(both.map((answer) => answer.status).sort()).toEqual([200, 409]);
    const [won, lost] = both[0]!.status === 200 ? both : [both[1]!, both[0]!];
    expect(lost!.json).toMatchObject({ code: "conflict", currentVersion: 2, by: expect.stringMatching(/Pat detailer|Olive Owner/) });
    expect(Date.parse(lost!.json.at)).toBeGreaterThan(0);
    expect(lost!.json.message).toContain("was not saved over it");
    const { json } = await get(lineId);
    expect(json.version).toBe(won!.json.version);
    expect([1_111, 2_222]).toContain(json.document.runs[0].points[1].offset.e.mm);
  });

  test("twenty parallel savers of one version: one is kept", async () => {
    const { lineId } = await newLine(shop);
    const number = (await get(lineId)).json.document.number as string;
    const all = await Promise.all(Array.from({ length: 20 }, (_, index) => put(shop.detailer, lineId, { version: 1, document: sampleDocument(number, 900 + index) })));
    expect(all.filter((answer) => answer.status === 200)).toHaveLength(1);
    expect(all.filter((answer) => answer.status === 409)).toHaveLength(19);
  });

  test("saving the same again is no new version and no touch", async () => {
    const { lineId } = await newLine(shop);
    const { document } = (await get(lineId)).json;
    expect((await put(shop.owner, lineId, { version: 1, document })).json.version).toBe(1);
    const touches = await LineTouch.findAll({ where: { lineId } });
    expect(touches.map((touch) => touch.personId)).toEqual([shop.detailer.personId]);
  });

  test("who changed it is remembered", async () => {
    const { lineId } = await newLine(shop);
    const number = (await get(lineId)).json.document.number as string;
    await put(shop.owner, lineId, { version: 1, document: sampleDocument(number, 1_234) });
    const touches = await LineTouch.findAll({ where: { lineId }, order: [["version", "ASC"]] });
    expect(touches.map((touch) => [touch.personId, touch.version])).toEqual([[shop.detailer.personId, 1], [shop.owner.personId, 2]]);
  });

  test("marks are kept with it and spools follow the model", async () => {
    const { lineId, spoolIds } = await newLine(shop, chainDocument(unique("L"), 3));
    expect(spoolIds).toHaveLength(3);
    const { json } = await get(lineId);
    expect(Object.keys(json.marks.welds).length).toBeGreaterThan(0);
    expect(json.spools.map((spool: { letter: string }) => spool.letter)).toEqual(["A", "B", "C"]);
    await put(shop.detailer, lineId, { version: 1, document: chainDocument(json.document.number, 2) });
    expect((await get(lineId)).json.spools).toHaveLength(2);
  });

  test("a spool that was submitted keeps its row and letter when the run no longer has it", async () => {
    const number = unique("L");
    const { lineId, spoolId } = await submitted(shop, chainDocument(number, 3));
    const only = await put(shop.detailer, lineId, { version: 1, document: sampleDocument(number) });
    expect(only.status).toBe(200);
    const row = await Spool.findOne({ where: { id: spoolId } });
    expect(row?.letter).toBe("A");
  });
});

describe("what is no run document", () => {
  const broken: readonly (readonly [string, (good: RunDocument) => unknown])[] = [
    ["no object", () => "text"],
    ["nothing", () => null],
    ["a list", () => []],
    ["no runs", (good) => ({ ...good, runs: [] })],
    ["a length that is text", (good) => edit(good, { e: { text: "x", mm: "12" } })],
    ["a huge length", (good) => edit(good, { e: { text: "1e30", mm: 1e30 } })],
    ["a length that is no number", (good) => edit(good, { e: { text: "NaN", mm: null } })],
    ["an unknown item", (good) => ({ ...good, runs: [{ ...good.runs[0], points: [{ ...good.runs[0]!.points[0], item: { kind: "flux" } }] }] })],
    ["two points of one id", (good) => ({ ...good, runs: [{ ...good.runs[0], points: [good.runs[0]!.points[0], good.runs[0]!.points[0]] }] })],
    ["a branch from nowhere", (good) => ({ ...good, runs: [...good.runs, { ...good.runs[0], id: "br", from: "gone", points: [] }] })],
    ["10 000 points", (good) => ({ ...good, runs: [{ ...good.runs[0], points: Array.from({ length: 10_000 }, (_, index) => pointAt(`q${index}`, [10, 0, 0])) }] })],
    ["another version of the shape", (good) => ({ ...good, version: 2 })],
    ["an empty number", (good) => ({ ...good, number: "" })],
  ];

  function edit(good: RunDocument, offset: object): unknown {
    const [first, ...rest] = good.runs[0]!.points;
    return { ...good, runs: [{ ...good.runs[0], points: [{ ...first, offset: { ...first!.offset, ...offset } }, ...rest] }] };
  }

  test.each(broken)("%s: 400 in a sentence, nothing changed", async (_name, breakIt) => {
    const { lineId } = await newLine(shop);
    const before = await tablePrints();
    const answer = await put(shop.detailer, lineId, { version: 1, document: breakIt(sampleDocument("L-1")) });
    expect(answer.status).toBe(400);
    expect(answer.json.message).toMatch(/^[A-Z].*[.]$/);
    expect(answer.text).not.toMatch(/\bat .*\.ts|node_modules|Zod/);
    expect(await tablePrints()).toEqual(before);
  });

  test("the most points a line may hold are saved and come back", async () => {
    const { lineId } = await newLine(shop);
    const number = (await get(lineId)).json.document.number as string;
    const good = sampleDocument(number);
    const points = Array.from({ length: MAX_POINTS }, (_, index) => pointAt(`q${index}`, index % 2 ? [300, 0, 0] : [0, 300, 0]));
    const answer = await put(shop.detailer, lineId, { version: 1, document: { ...good, runs: [{ ...good.runs[0]!, points }] } });
    expect(answer.status, answer.text.slice(0, 300)).toBe(200);
    expect((await get(lineId)).json.document.runs[0].points).toHaveLength(MAX_POINTS);
  });

  test.each([[0], [-1], [1.5], ["1"], [null], [1e300]])("version %s: 400", async (version) => {
    const { lineId } = await newLine(shop);
    expect((await put(shop.detailer, lineId, { version, document: sampleDocument("L-1") })).status).toBe(400);
  });
});

describe("jobs and their lines", () => {
  const newJob = (number: string) => call(jobs.POST, { as: shop.detailer, method: "POST", body: { number, title: "T", client: "C", area: "", units: "metric" } });

  test("a job number is one job's, however it is written", async () => {
    const number = unique("J");
    expect((await newJob(number)).status).toBe(201);
    const again = await newJob(number.toUpperCase());
    expect(again.status).toBe(409);
    expect(again.json.fields.number).toBeTruthy();
  });

  test("a new job takes the shop's settings in its own units, and hands them to its lines", async () => {
    const { json } = await call(shopRoute.GET, { as: shop.owner });
    const defaults = { ...json.defaults, pipe: { ...json.defaults.pipe, nps: "6", material: "ASTM A312 TP316L" } };
    expect((await call(shopRoute.PATCH, { as: shop.owner, method: "PATCH", body: { defaults, fields: [{ label: "Unit", value: "12" }] } })).status).toBe(200);
    const jobId = (await newJob(unique("J"))).json.id as string;
    const job = await call(jobRoute.GET, { as: shop.detailer, params: { jobId } });
    expect(job.json).toMatchObject({ client: "C", fields: [{ label: "Unit", value: "12" }], defaults: { units: "metric", pipe: { nps: "6" }, allowances: { rootGapMm: 3 } } });
    const line = await call(linesOfJob.POST, { as: shop.detailer, method: "POST", params: { jobId }, body: { number: "6-P-1", title: "Feed" } });
    const detail = await get(line.json.id as string);
    expect(detail.json.document).toMatchObject({ number: "6-P-1", title: "Feed", settings: { units: "metric", pipe: { material: "ASTM A312 TP316L" } } });
    expect(detail.json.titleBlock).toMatchObject({ client: "C", fields: [{ label: "Unit", value: "12" }] });
  });

  test("a line number is one line's within its job; an archived one frees it and cannot be saved", async () => {
    const { jobId, lineId } = await newLine(shop, sampleDocument("L-77"));
    const add = () => call(linesOfJob.POST, { as: shop.detailer, method: "POST", params: { jobId }, body: { number: "l-77", title: "" } });
    expect((await add()).status).toBe(409);
    const patch = (archived: boolean) => call(lineRoute.PATCH, { as: shop.detailer, method: "PATCH", params: { lineId }, body: { archived } });
    expect((await patch(true)).status).toBe(200);
    expect((await put(shop.detailer, lineId, { version: 1, document: sampleDocument("L-77", 5) })).status).toBe(409);
    expect((await call(jobRoute.GET, { as: shop.detailer, params: { jobId } })).json.lines).toHaveLength(0);
    expect((await add()).status).toBe(201);
    expect((await patch(false)).status).toBe(409);
  });

  test("a line with a sheet for review is not archived", async () => {
    const { lineId } = await submitted(shop);
    const answer = await call(lineRoute.PATCH, { as: shop.detailer, method: "PATCH", params: { lineId }, body: { archived: true } });
    expect(answer.status).toBe(409);
    expect(answer.json.message).toMatch(/Void or return/);
  });

  test("renaming is a new version, so that an open editor is told", async () => {
    const { lineId } = await newLine(shop);
    const renamed = await call(lineRoute.PATCH, { as: shop.owner, method: "PATCH", params: { lineId }, body: { title: "New title" } });
    expect(renamed.json.version).toBe(2);
    const late = await put(shop.detailer, lineId, { version: 1, document: sampleDocument("whatever") });
    expect(late.json).toMatchObject({ currentVersion: 2, by: "Olive Owner" });
    expect((await get(lineId)).json.document.title).toBe("New title");
  });

  test("a copy has the run and fresh marks, and its own number", async () => {
    const number = unique("L");
    const { lineId } = await newLine(shop, sampleDocument(number));
    const copied = await call(lineCopy.POST, { as: shop.detailer, method: "POST", params: { lineId }, body: { number: `${number}-B`, title: "Second" } });
    expect(copied.status).toBe(201);
    const [source, copy] = [(await get(lineId)).json, (await get(copied.json.id as string)).json];
    expect(copy.document.runs).toEqual(source.document.runs);
    expect(copy.document.number).toBe(`${number}-B`);
    expect(copy.marks.sticky).toBe(false);
    expect((await call(lineCopy.POST, { as: shop.detailer, method: "POST", params: { lineId }, body: { number, title: "" } })).status).toBe(409);
    expect(await Line.count({ where: { jobId: source.job.id } })).toBe(2);
  });
});
