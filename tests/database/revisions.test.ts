/** The revision desk on a real database: submit, sign, return, supersede, hold, void, as-built, and who may. */
import { afterAll, beforeAll, describe, expect, test } from "vitest";
import type { SheetInput } from "@/iso";
import * as bench from "@/app/api/bench/route";
import * as line from "@/app/api/lines/[lineId]/route";
import * as review from "@/app/api/revisions/[revisionId]/route";
import * as asBuilt from "@/app/api/revisions/[revisionId]/as-built/route";
import * as hold from "@/app/api/revisions/[revisionId]/hold/route";
import * as release from "@/app/api/revisions/[revisionId]/release/route";
import * as sendBack from "@/app/api/revisions/[revisionId]/return/route";
import * as sheet from "@/app/api/revisions/[revisionId]/sheet/route";
import * as sign from "@/app/api/revisions/[revisionId]/sign/route";
import * as kill from "@/app/api/revisions/[revisionId]/void/route";
import * as spool from "@/app/api/spools/[spoolId]/route";
import * as draft from "@/app/api/spools/[spoolId]/sheet/route";
import * as submit from "@/app/api/spools/[spoolId]/submit/route";
import * as status from "@/app/api/status/[token]/route";
import { verifyAudit } from "@/lib/server/audit";
import { sha256Hex } from "@/lib/server/storage";
import { chainDocument, pointAt, sampleDocument } from "../factories";
import { addMember, call, endOfFile, newLine, newShop, PASSWORD, type TestLine, type TestPerson, type TestShop, unique, withClient } from "./support";
import { routeNamed } from "./routes";

const work = { POST: await routeNamed("POST /spools/[spoolId]/work") };

let shop: TestShop;
beforeAll(async () => {
  shop = await newShop();
});
afterAll(endOfFile);

const submitAs = (as: TestPerson, spoolId: string, description = "Issued for review") =>
  call(submit.POST, { as, method: "POST", params: { spoolId }, body: { description, size: "tabloid" } });
const signAs = (as: TestPerson, revisionId: string, more: object = {}) =>
  call(sign.POST, { as, method: "POST", params: { revisionId }, body: { password: PASSWORD, accepted: [], verified: true, ...more } });
const decide = (handler: unknown, as: TestPerson, revisionId: string, reason = "A reason to act on") =>
  call(handler, { as, method: "POST", params: { revisionId }, body: { reason, verified: true } });
const spoolOf = async (made: TestLine, as: TestPerson = shop.owner) => (await call(spool.GET, { as, params: { spoolId: made.spoolIds[0]! } })).json;

async function submitted(made: TestLine, description?: string): Promise<string> {
  const answer = await submitAs(shop.detailer, made.spoolIds[0]!, description);
  expect(answer.text).toContain("revisionId");
  expect(answer.status).toBe(201);
  return answer.json.revisionId as string;
}

async function signed(made: TestLine): Promise<string> {
  const revisionId = await submitted(made);
  const answer = await signAs(shop.inspector, revisionId);
  expect([answer.status, answer.text]).toEqual([200, expect.stringContaining("for-fabrication")]);
  return revisionId;
}

/** Lengthens the first leg, so that the spool's content changes. */
async function lengthen(made: TestLine, mm: number): Promise<void> {
  const detail = (await call(line.GET, { as: shop.detailer, params: { lineId: made.lineId } })).json;
  const document = structuredClone(detail.document) as SheetInput["document"];
  document.runs[0]!.points[1]!.offset = pointAt("b", [mm, 0, 0]).offset;
  const answer = await call(line.PUT, { as: shop.detailer, method: "PUT", params: { lineId: made.lineId }, body: { version: detail.version, document } });
  expect([answer.status, answer.text]).toEqual([200, expect.stringContaining("savedAt")]);
}

describe("from draft to the bench", () => {
  test("a spool is submitted, reviewed, signed by another, and stands on the bench with its stored PDF", async () => {
    const made = await newLine(shop);
    const revisionId = await submitted(made);
    const detail = (await call(review.GET, { as: shop.inspector, params: { revisionId } })).json;
    expect(detail.revision).toMatchObject({ code: "A", state: "for-review" });
    expect(detail.input.revision.statusUrl).toMatch(/\/status\/[A-Za-z0-9_-]{20,}$/);
    expect(detail.can).toMatchObject({ sign: true, return: true });
    expect((await signAs(shop.inspector, revisionId)).status).toBe(200);
    const rows = (await call(bench.GET, { as: shop.fitter })).json as { revisionId: string; pieces: number }[];
    expect(rows.find((row) => row.revisionId === revisionId)).toMatchObject({ code: "A", pieces: 3, cut: 0 });
    const detailAfter = await spoolOf(made, shop.fitter);
    expect(detailAfter.draft).toBeNull();
    expect(detailAfter.revisions[0].sheets.map((s: { kind: string }) => s.kind)).toEqual(["review", "fabrication"]);
  });

  test("the stored PDF is handed out byte for byte, a printed copy is another file and known to the log", async () => {
    const made = await newLine(shop);
    const revisionId = await signed(made);
    const fetchPdf = (query: string) => sheet.GET(new Request(`http://x/api${query}`, { headers: { cookie: shop.fitter.cookie } }), { params: Promise.resolve({ revisionId }) });
    const first = new Uint8Array(await (await fetchPdf("")).arrayBuffer());
    const copy = new Uint8Array(await (await fetchPdf("?copy=1")).arrayBuffer());
    const again = new Uint8Array(await (await fetchPdf("")).arrayBuffer());
    const known = (await spoolOf(made)).revisions[0].sheets.find((s: { kind: string }) => s.kind === "fabrication").sha256;
    expect(sha256Hex(first)).toBe(known);
    expect(sha256Hex(again)).toBe(known);
    expect(sha256Hex(copy)).not.toBe(known);
    const token = (await spoolOf(made)).revisions[0].statusPath.split("/").pop() as string;
    const shown = (await call(status.GET, { params: { token } })).json;
    expect(shown.sheets.map((s: { sha256: string }) => s.sha256)).toEqual(expect.arrayContaining([known, sha256Hex(copy)]));
    expect((await call(sheet.GET, { as: shop.fitter, params: { revisionId }, query: "?kind=review" })).status).toBe(404);
  });

  test("a new revision supersedes the one before; the status page says so; marks stay", async () => {
    const made = await newLine(shop);
    await signed(made);
    const before = await spoolOf(made);
    await lengthen(made, 1_200);
    const second = await submitted(made, "Leg 1 is longer");
    const detail = (await call(review.GET, { as: shop.inspector, params: { revisionId: second } })).json;
    expect(detail.revision.code).toBe("B");
    expect(detail.changes.map((c: { what: string; kind: string }) => `${c.what} ${c.kind}`)).toEqual(expect.arrayContaining(["point changed", "piece changed"]));
    expect((await signAs(shop.inspector, second)).status).toBe(200);
    const after = await spoolOf(made);
    expect(after.revisions.map((r: { state: string }) => r.state)).toEqual(["superseded", "for-fabrication"]);
    expect(after.sheetNumber).toBe(before.sheetNumber);
    expect(after.live.input.marks.welds).toEqual(before.live.input.marks.welds);
    const token = after.revisions[0].statusPath.split("/").pop();
    expect((await call(status.GET, { params: { token } })).json).toMatchObject({ current: false, state: "superseded", liveCode: "B" });
  });

  test("the view is chosen at the first issue and stays, whatever a later save says", async () => {
    const made = await newLine(shop);
    const detailOf = async () => (await call(line.GET, { as: shop.detailer, params: { lineId: made.lineId } })).json;
    expect((await detailOf()).document.view).toBeNull();
    await signed(made);
    const { view } = (await detailOf()).document as SheetInput["document"];
    expect([1, 2, 3, 4]).toContain(view);
    expect((await spoolOf(made)).live.input.document.view).toBe(view);
    const { version, document } = await detailOf();
    const turned = { ...document, view: view === 3 ? 4 : 3, title: "Turned round" };
    expect((await call(line.PUT, { as: shop.detailer, method: "PUT", params: { lineId: made.lineId }, body: { version, document: turned } })).status).toBe(200);
    expect((await detailOf()).document).toMatchObject({ view, title: "Turned round" });
  });

  test("nothing is submitted twice, and an unchanged spool gets no new revision", async () => {
    const made = await newLine(shop);
    const revisionId = await submitted(made);
    expect((await submitAs(shop.detailer, made.spoolIds[0]!)).status).toBe(409);
    expect((await signAs(shop.inspector, revisionId)).status).toBe(200);
    const again = await submitAs(shop.detailer, made.spoolIds[0]!);
    expect([again.status, again.json.message]).toEqual([409, expect.stringContaining("Nothing of this spool changed")]);
  });

  test("a returned revision carries its reason and the next one its own letter", async () => {
    const made = await newLine(shop);
    const revisionId = await submitted(made);
    expect((await decide(sendBack.POST, shop.inspector, revisionId, "Show the second reading.")).status).toBe(200);
    expect((await spoolOf(made)).revisions[0]).toMatchObject({ state: "returned", returnReason: "Show the second reading." });
    await submitted(made);
    expect((await spoolOf(made)).revisions[1]).toMatchObject({ state: "for-review", code: "B" });
  });
});

describe("who may", () => {
  test("nobody signs what they touched; a detailer and a fitter never sign", async () => {
    const made = await newLine(shop);
    const own = await submitAs(shop.owner, made.spoolIds[0]!);
    const revisionId = own.json.revisionId as string;
    const refused = await signAs(shop.owner, revisionId);
    expect([refused.status, refused.json.message]).toEqual([403, expect.stringContaining("second person")]);
    expect((await signAs(shop.detailer, revisionId)).status).toBe(403);
    expect((await signAs(shop.fitter, revisionId)).status).toBe(403);
    expect((await signAs(shop.inspector, revisionId)).status).toBe(200);
  });

  test("an owner who saved the line since the last signed revision does not sign it", async () => {
    const made = await newLine(shop);
    const detail = (await call(line.GET, { as: shop.owner, params: { lineId: made.lineId } })).json;
    const document = { ...detail.document, notes: ["Paint after test"] };
    const saved = await call(line.PUT, { as: shop.owner, method: "PUT", params: { lineId: made.lineId }, body: { version: detail.version, document } });
    expect(saved.status).toBe(200);
    const revisionId = await submitted(made);
    expect((await signAs(shop.owner, revisionId)).status).toBe(403);
    expect((await signAs(shop.inspector, revisionId)).status).toBe(200);
  });

  test("the password is asked again: a wrong one signs nothing, and tries are limited", async () => {
    const made = await newLine(shop);
    const revisionId = await submitted(made);
    const other = await addMember(shop.shopId, "inspector");
    for (let tries = 0; tries < 6; tries += 1) expect((await signAs(other, revisionId, { password: "not it" })).status).toBe(400);
    expect((await signAs(other, revisionId, { password: PASSWORD })).status).toBe(429);
    expect((await spoolOf(made)).revisions[0].state).toBe("for-review");
  });

  test("an unverified dimension blocks the signature until it is accepted by name", async () => {
    const document = sampleDocument(unique("L"));
    document.runs[0]!.points[2]!.provenance = { kind: "assumed", toleranceMm: null, by: null, at: null, second: null };
    const made = await newLine(shop, document);
    const revisionId = await submitted(made);
    const refused = await signAs(shop.inspector, revisionId);
    expect([refused.status, refused.json.message]).toEqual([409, expect.stringContaining("point 3")]);
    expect((await signAs(shop.inspector, revisionId, { accepted: ["c"] })).status).toBe(200);
    expect((await spoolOf(made)).live.input.revision.accepted).toEqual([{ pointId: "c", by: shop.inspector.name }]);
  });
});

describe("hold, void, as-built", () => {
  test("a held revision is not worked from until it is released", async () => {
    const made = await newLine(shop);
    const revisionId = await signed(made);
    expect((await decide(hold.POST, shop.inspector, revisionId)).status).toBe(200);
    expect((await decide(hold.POST, shop.inspector, revisionId)).status).toBe(409);
    const cut = { kind: "cut", ...(await firstPiece(made)), values: { heat: "H-1" } };
    const record = () => call(work.POST, { as: shop.fitter, method: "POST", params: { spoolId: made.spoolIds[0]! }, body: cut });
    expect((await record()).status).toBe(409);
    expect((await decide(release.POST, shop.inspector, revisionId)).status).toBe(200);
    expect((await record()).status).toBe(201);
    expect((await decide(hold.POST, shop.detailer, revisionId)).status).toBe(403);
  });

  test("a void revision is dead; an as-built one may still be superseded", async () => {
    const dead = await newLine(shop);
    const deadId = await signed(dead);
    expect((await decide(kill.POST, shop.inspector, deadId)).status).toBe(200);
    expect((await decide(asBuilt.POST, shop.inspector, deadId)).status).toBe(409);
    const built = await newLine(shop);
    expect((await decide(asBuilt.POST, shop.inspector, await signed(built))).status).toBe(200);
    const late = { kind: "cut", ...(await firstPiece(built)), values: {} };
    const refused = await call(work.POST, { as: shop.fitter, method: "POST", params: { spoolId: built.spoolIds[0]! }, body: late });
    expect([refused.status, refused.json.message]).toEqual([409, expect.stringContaining("AS-BUILT")]);
    await lengthen(built, 1_500);
    const next = await submitted(built);
    expect((await signAs(shop.inspector, next)).status).toBe(200);
    expect((await spoolOf(built)).revisions.map((r: { state: string }) => r.state)).toEqual(["superseded", "for-fabrication"]);
  });

  test("work is recorded for marks that are on the sheet, by those whose work it is", async () => {
    const made = await newLine(shop);
    await signed(made);
    const piece = await firstPiece(made);
    const record = (as: TestPerson, body: object) => call(work.POST, { as, method: "POST", params: { spoolId: made.spoolIds[0]! }, body });
    expect((await record(shop.fitter, { kind: "cut", mark: "P99", key: "nowhere:1", values: {} })).status).toBe(400);
    expect((await record(shop.detailer, { kind: "cut", ...piece, values: {} })).status).toBe(403);
    expect((await record(shop.fitter, { kind: "visual", mark: "1", key: "x", values: { result: "accepted" } })).status).toBe(403);
    expect((await record(shop.fitter, { kind: "cut", ...piece, values: { heat: "H-2" } })).status).toBe(201);
    expect((await spoolOf(made)).work).toMatchObject([{ kind: "cut", mark: piece.mark, values: { heat: "H-2" } }]);
  });
});

async function firstPiece(made: TestLine): Promise<{ mark: string; key: string }> {
  const { buildModel } = await import("@/iso");
  const { input } = (await spoolOf(made)).live as { input: SheetInput };
  const piece = buildModel(input.document, input.marks, input.takeOuts).pieces[0]!;
  return { mark: piece.mark, key: piece.key };
}

describe("at the same time", () => {
  test("50 submissions at once give 50 different consecutive numbers", async () => {
    const fresh = await newShop();
    const made = await newLine(fresh, chainDocument(unique("CHAIN"), 50));
    expect(made.spoolIds).toHaveLength(50);
    const answers = await Promise.all(made.spoolIds.map((spoolId) => submitAs(fresh.detailer, spoolId)));
    expect(answers.map((answer) => answer.status)).toEqual(answers.map(() => 201));
    const numbers = answers.map((answer) => Number(answer.json.sheetNumber)).sort((a, b) => a - b);
    expect(numbers).toEqual(Array.from({ length: 50 }, (_, index) => index + 1));
    expect(await verifyAudit(fresh.shopId)).toBeNull();
  }, 120_000);

  test("two inspectors sign the same revision: one signature", async () => {
    const other = await addMember(shop.shopId, "inspector");
    const made = await newLine(shop);
    const revisionId = await submitted(made);
    const answers = await Promise.all([signAs(shop.inspector, revisionId), signAs(other, revisionId)]);
    expect(answers.map((answer) => answer.status).sort()).toEqual([200, 409]);
    const count = await withClient("super", (client) => client.query("SELECT count(*)::int AS n FROM sign_offs WHERE revision_id = $1", [revisionId]));
    expect(count.rows[0].n).toBe(1);
  });
});

describe("bad input", () => {
  test("is refused in a sentence with the right status and changes nothing", async () => {
    const made = await newLine(shop);
    const post = (body: unknown) => call(submit.POST, { as: shop.detailer, method: "POST", params: { spoolId: made.spoolIds[0]! }, body });
    for (const body of [{}, { description: "", size: "A3" }, { description: "x", size: "A0" }, { description: 7, size: "A3" }, "{", "null", { description: "x".repeat(300), size: "A3" }]) {
      const answer = await post(body);
      expect([body, answer.status]).toEqual([body, 400]);
      expect(answer.json.message).not.toMatch(/zod|stack|undefined|Expected/i);
    }
    expect((await call(submit.POST, { as: shop.detailer, method: "POST", params: { spoolId: "1" }, body: {} })).status).toBe(404);
    expect((await call(status.GET, { params: { token: "x".repeat(24) } })).status).toBe(404);
    expect((await call(draft.GET, { as: shop.detailer, params: { spoolId: made.spoolIds[0]! }, query: "?size=A9" })).status).toBe(400);
    expect((await spoolOf(made)).revisions).toEqual([]);
  });

  test("a spool with a problem that stops it is not submitted", async () => {
    const made = await newLine(shop, sampleDocument(unique("L"), 20));
    const answer = await submitAs(shop.detailer, made.spoolIds[0]!);
    expect([answer.status, answer.json.message]).toEqual([409, expect.stringContaining("Mend this first")]);
  });
});

test("the draft sheet is a PDF the fitter does not get", async () => {
  const made = await newLine(shop);
  const answer = await call(draft.GET, { as: shop.detailer, params: { spoolId: made.spoolIds[0]! }, query: "?size=A4" });
  expect(answer.headers.get("content-type")).toBe("application/pdf");
  expect(answer.text.startsWith("%PDF-")).toBe(true);
  expect((await call(draft.GET, { as: shop.fitter, params: { spoolId: made.spoolIds[0]! } })).status).toBe(403);
  expect((await call(spool.GET, { as: shop.fitter, params: { spoolId: made.spoolIds[0]! } })).status).toBe(404);
});
