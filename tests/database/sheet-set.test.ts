/** Sheet sets through their route: who gets which, what is in the file, what the record and the cutting plans put on it, and that prints are noted. */
import { randomUUID } from "node:crypto";
import { afterAll, beforeAll, describe, expect, test } from "vitest";
import { PDFDocument } from "pdf-lib";
import { PDFParse } from "pdf-parse";
import * as setRoute from "@/app/api/spools/[spoolId]/sheet-set/route";
import * as copiesRoute from "@/app/api/spools/[spoolId]/copies/route";
import * as holdRoute from "@/app/api/revisions/[revisionId]/hold/route";
import { buildModel, formatInches, SHEET_PARTS } from "@/iso";
import { storedDocument, storedMarks } from "@/lib/queries/stored-line";
import { AuditEvent, Line, Nest } from "@/models";
import { qpdfFindings } from "../pdf/pdf-tools";
import { marksOf, signed } from "./revision-support";
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

type Role = (typeof ROLES)[number];
const ask = (spoolId: string, query: string, role: Role = "owner") => call(setRoute.GET, { as: shop[role], params: { spoolId }, query });
const ALL = SHEET_PARTS.join(",");

/** Text of each page, and the file's bytes. */
async function bound(spoolId: string, query: string, role: Role = "owner") {
  const answer = await ask(spoolId, query, role);
  expect(answer.status, answer.text.slice(0, 300)).toBe(200);
  const parser = new PDFParse({ data: new Uint8Array(answer.bytes) });
  const { pages } = await parser.getText();
  await parser.destroy();
  return { bytes: new Uint8Array(answer.bytes), texts: pages.map((page) => page.text), answer };
}

describe("who", () => {
  test.each(ROLES)("%s prints a set of an issued spool", async (role) => {
    const answer = await ask(issued.spoolId, "?parts=sheet,cuts,welds", role);
    expect(answer.status, answer.text.slice(0, 200)).toBe(200);
    expect(answer.headers.get("content-type")).toBe("application/pdf");
    expect(answer.headers.get("content-disposition")).toMatch(/^inline; filename="[^"]*sheet-set-rev-A-FOR-FABRICATION\.pdf/);
  });

  test("a fitter gets nothing of a draft; a detailer gets it, DRAFT on every page and nothing noted", async () => {
    expect((await ask(draft.spoolIds[0]!, `?parts=${ALL}`, "fitter")).status).toBe(404);
    expect((await ask(issued.spoolId, "?parts=cuts&of=draft", "fitter")).status).toBe(403);
    const { texts, answer } = await bound(draft.spoolIds[0]!, `?parts=${ALL}&size=A3`, "detailer");
    for (const text of texts) expect(text).toContain("DRAFT");
    expect(answer.headers.get("content-disposition")).toMatch(/sheet-set-DRAFT\.pdf/);
    expect((await call(copiesRoute.GET, { as: shop.owner, params: { spoolId: draft.spoolIds[0]! } })).json).toEqual([]);
  });
});

describe("what", () => {
  test("every part in one file: numbered through, bookmarked, labelled, sound", async () => {
    const { bytes, texts } = await bound(issued.spoolId, `?parts=${ALL}&size=tabloid`);
    expect(qpdfFindings(bytes)).toBe("");
    const file = await PDFDocument.load(bytes);
    expect(file.getPageCount()).toBe(texts.length);
    const stored = texts.filter((text) => text.includes("OF THIS SET")).length;
    expect(stored).toBeGreaterThan(0);
    texts.forEach((text, i) => expect(text).toMatch(new RegExp(i < stored ? `SHEET ${i + 1} OF ${texts.length} OF THIS SET` : `SHEET ${i + 1} OF ${texts.length}`)));
    for (const word of ["SHEET INDEX", "CUT MAP", "WELD MAP", "CHECK DIMENSIONS", "WELD LOG", "ABBREVIATIONS"]) expect(texts.join("\n"), word).toContain(word);
    const raw = Buffer.from(await file.save({ useObjectStreams: false })).toString("latin1");
    expect(raw.match(/\/Title /g)?.length).toBeGreaterThanOrEqual(SHEET_PARTS.length);
  });

  test("the signed sheet keeps its size; what is composed has the one asked for", async () => {
    const { bytes } = await bound(issued.spoolId, "?parts=sheet,legend&size=A4");
    const sizes = (await PDFDocument.load(bytes)).getPages().map((page) => Math.round((page.getSize().width * 25.4) / 72));
    expect([sizes[0], sizes.at(-1)]).toEqual([279, 297]);
  });

  test("fitted to margins, the copy says by how much and the rest keeps its lettering", async () => {
    const { texts, bytes } = await bound(issued.spoolId, "?parts=sheet,cuts&fit=1");
    expect(texts[0]).toMatch(/OF THIS SET, fitted to margins at 9\d %/);
    expect(texts.at(-1)).not.toMatch(/fitted to margins/);
    expect(qpdfFindings(bytes)).toBe("");
  });

  test("the record of the bench stands on cut map and weld log, as of the time of printing", async () => {
    const { piece, weld } = await marksOf(issued.lineId);
    const record = async (role: Role, body: object) => expect((await call(work.POST, { as: shop[role], method: "POST", params: { spoolId: issued.spoolId }, body })).status).toBeLessThan(300);
    await record("fitter", { kind: "cut", ...piece, values: { heat: "HX-4471", length: "11 1/2", remarks: "" } });
    await record("fitter", { kind: "weld", ...weld, values: { welder: "W-07", procedure: "BW-1 r2", heatA: "HX-4471", heatB: "F-220", remarks: "" } });
    const { texts } = await bound(issued.spoolId, "?parts=cuts,welds");
    const text = texts.join("\n");
    for (const word of ["HX-4471", "11 1/2", "W-07", "BW-1 r2", "F-220"]) expect(text, word).toContain(word);
    expect(text).toMatch(/As recorded \d{4}-\d\d-\d\d \d\d:\d\d UTC/);
  });

  test("a locked cutting plan says out of which length a piece comes; an open one says nothing", async () => {
    const line = await Line.findOne({ where: { id: issued.lineId }, rejectOnEmpty: true });
    const model = buildModel(storedDocument(line), storedMarks(line), []);
    const piece = model.pieces[0]!;
    const unit = 25.4 / 16;
    const id = `${issued.spoolId}|${piece.key}`;
    const length = Math.round(piece.cutLengthMm / unit);
    const source = {
      version: 1, saw: { name: "Band saw", kerfMm: 1.5875 }, endTrimMm: 0, leastOffcutMm: 300, offcutShare: 0.5, heat: null, seconds: 1, leftOut: [],
      groups: [{ nps: piece.nps, schedule: piece.schedule, material: piece.material, specification: "", units: "imperial", pieces: [{ id, mark: piece.mark, line: line.number, spool: "A", length }] }],
      stock: [{ id: "length-1", kind: "length", nps: piece.nps, schedule: piece.schedule, material: piece.material, lengthMm: 6096, quantity: null, cost: null, heat: "" }],
      spools: [{ spoolId: issued.spoolId, line: line.number, letter: "A", revisionId: issued.revisionId, code: "A", contentSha256: "" }],
    };
    const plan = { bars: [{ stockId: "length-1", stockLength: 3840, heat: "MILL-9", pieces: [{ mark: id, length }], rest: 100, returned: false }], unplaced: [], cost: 1, bound: 1, proven: true, method: "best-fit", patterns: 1, costed: false };
    const nest = await Nest.create({ shopId: shop.shopId, id: randomUUID(), jobId: line.jobId, title: "Plan of March", state: "done", source: JSON.stringify(source), sourceSha256: "x".repeat(64), result: JSON.stringify({ groups: [plan] }), askedBy: shop.owner.personId, askedAt: new Date() });
    expect((await bound(issued.spoolId, "?parts=cuts")).texts.join(" ")).not.toContain("Plan of March");
    await nest.update({ state: "cut", cutAt: new Date(), cutBy: shop.owner.personId });
    const text = (await bound(issued.spoolId, "?parts=cuts")).texts.join(" ").replace(/\s+/g, " ");
    expect(text).toContain(`FROM no. 1, length of 20'-0", heat MILL-9: cut 1 of 1, begins at 0. Plan: Plan of March.`);
    expect(text).toContain(formatInches(piece.cutLengthMm));
  });

  test("a question asked wrong is answered in words", async () => {
    for (const query of ["", "?parts=", "?parts=all", "?parts=cuts,nothing", "?parts=cuts&size=A0", "?parts=cuts&of=mine", "?parts=cuts&fit=yes", "?parts=templates&paper=5"]) {
      const answer = await ask(issued.spoolId, query);
      expect([query, answer.status]).toEqual([query, 400]);
    }
  });
});

describe("what is kept", () => {
  test("a set of an issued sheet is a copy out, told in the log; a held one carries HOLD on every page", async () => {
    const before = (await call(copiesRoute.GET, { as: shop.owner, params: { spoolId: issued.spoolId } })).json.length as number;
    await bound(issued.spoolId, "?parts=cuts,templates", "fitter");
    const copies = (await call(copiesRoute.GET, { as: shop.owner, params: { spoolId: issued.spoolId } })).json as { marked: string }[];
    expect([copies.length, copies[0]!.marked]).toEqual([before + 1, "UNCONTROLLED COPY"]);
    const told = await AuditEvent.findAll({ where: { shopId: shop.shopId, type: "set.printed" }, order: [["seq", "DESC"]], limit: 1 });
    expect(JSON.parse(told[0]!.data)).toMatchObject({ parts: ["Cut map", "Templates, print at 100 %"], marked: "UNCONTROLLED COPY" });
    expect((await call(holdRoute.POST, { as: shop.inspector, method: "POST", params: { revisionId: issued.revisionId }, body: { reason: "Nozzle moved" } })).status).toBeLessThan(300);
    const { texts } = await bound(issued.spoolId, `?parts=${ALL}`, "fitter");
    for (const text of texts) expect(text).toContain("HOLD");
  });
});
