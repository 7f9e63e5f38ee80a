/**
 * Packages end to end: asked for, made by the queue's own job in threads, resumed, cancelled, taken, out of date, kept to the shop.
 * Files are read by programs that share nothing with what wrote them: qpdf, pdf-parse, pdfsig (poppler), unzip (Info-ZIP).
 */
import { createHash } from "node:crypto";
import { ListObjectsV2Command } from "@aws-sdk/client-s3";
import { afterAll, beforeAll, describe, expect, test } from "vitest";
import * as jobPackages from "@/app/api/jobs/[jobId]/packages/route";
import * as againRoute from "@/app/api/packages/[packageId]/again/route";
import * as cancelRoute from "@/app/api/packages/[packageId]/cancel/route";
import * as fileRoute from "@/app/api/packages/[packageId]/file/route";
import * as packageRoute from "@/app/api/packages/[packageId]/route";
import * as receiptRoute from "@/app/api/packages/[packageId]/receipt/route";
import * as holdRoute from "@/app/api/revisions/[revisionId]/hold/route";
import * as copiesRoute from "@/app/api/spools/[spoolId]/copies/route";
import { announcePart, confirmPart, finishPackage, storedParts, takeUpPackage } from "@/lib/commands/finish-package";
import { runPackageJob } from "@/lib/jobs/package-job";
import { settings } from "@/lib/server/settings";
import { putObject, storageClient } from "@/lib/server/storage";
import { PackagePart, SheetCopy } from "@/models";
import { qpdfFindings, pdfsig } from "../pdf/pdf-tools";
import { pagesText } from "../pdf/pdf-text";
import { qpdfJson, unzipped } from "../pdf/package-readers";
import { askPackage, issuedJob, madePackage, packageOf, resultBytes, revisionsOfJob, type IssuedJob } from "./package-support";
import { submitted } from "./revision-support";
import { call, endOfFile, newShop, ROLES, withClient, type TestPerson, type TestShop } from "./support";

const SHEETS = 5;
let shop: TestShop;
let job: IssuedJob;

beforeAll(async () => {
  shop = await newShop();
  job = await issuedJob(shop, SHEETS);
}, 180_000);
afterAll(endOfFile);

const take = (packageId: string, as: TestPerson, query = "", headers: Record<string, string> = {}) => call(fileRoute.GET, { as, params: { packageId }, query, headers });
const bodyOf = (more: object = {}) => ({ revisionIds: revisionsOfJob(job), form: "pdf", ...more });
const ask = (as: TestPerson, body: object, jobId = job.jobId) => call(jobPackages.POST, { as, method: "POST", params: { jobId }, body });

async function objects(): Promise<number> {
  const found = await storageClient().send(new ListObjectsV2Command({ Bucket: settings().S3_BUCKET, Prefix: `${shop.shopId}/` }));
  return found.KeyCount ?? 0;
}

describe("one PDF", () => {
  test("holds every sheet's pages in order, with bookmarks, labels, index and marks; qpdf finds nothing", async () => {
    const packageId = await madePackage(job, shop.fitter);
    const [one, bytes] = [await packageOf(packageId, shop.fitter), await resultBytes(packageId)];
    expect(one).toMatchObject({ state: "ready", sheets: SHEETS, prepared: SHEETS, bytes: bytes.length, outdated: 0 });
    expect(createHash("sha256").update(bytes).digest("hex")).toBe(one.sha256);
    expect(qpdfFindings(bytes)).toBe("");
    const texts = await pagesText(bytes);
    expect(texts).toHaveLength(one.pages ?? -1);
    const numbers = texts.map((text) => /^(\d{4})$/m.exec(text)?.[1] ?? "");
    const front = numbers.filter((number) => number === "").length;
    const wanted = one.rows.map((row) => row.sheetNumber);
    expect([...new Set(numbers.slice(front))]).toEqual(wanted);
    for (const text of texts.slice(front)) expect(text).toContain("UNCONTROLLED COPY, printed");
    expect(texts.slice(0, front).join("\n")).toContain("the shop's signature covers the bytes of each sheet's own file");
    for (const row of one.rows) expect(texts.slice(0, front).join("\n")).toContain(`Line ${row.line} spool ${row.letter}`);
    const { outlines, pagelabels, pages } = qpdfJson(bytes);
    expect(pages).toHaveLength(one.pages ?? -1);
    expect(outlines.map((outline) => outline.title)).toEqual(["Cover and index", ...one.rows.map((row) => `Line ${row.line}`)]);
    outlines.slice(1).forEach((outline, index) => {
      expect(outline.kids[0]!.title).toBe(`Spool A, sheet ${wanted[index]} rev A`);
      expect(numbers[outline.destpageposfrom1 - 1]).toBe(wanted[index]);
      expect(numbers.indexOf(wanted[index]!)).toBe(outline.destpageposfrom1 - 1);
    });
    expect(pagelabels).toHaveLength(one.pages ?? -1);
    expect(JSON.stringify(pagelabels[front]!.label)).toContain(`${wanted[0]} rev A, 1 `);
    expect(pdfsig(bytes)).toMatch(/does not contain any signatures/);
  });

  test("takes in the parts asked for, bookmarked under their spool", async () => {
    const packageId = await madePackage(job, shop.detailer, { revisionIds: [job.spools[0]!.revisionId], extras: ["legend", "cuts"], paper: "A4" });
    const bytes = await resultBytes(packageId);
    expect(qpdfFindings(bytes)).toBe("");
    expect(qpdfJson(bytes).outlines[1]!.kids[0]!.kids.map((kid) => kid.title)).toEqual(["Cut map", "Legend"]);
  });

  test("is the same file when it is made again from the same request", async () => {
    const packageId = await askPackage(job, shop.owner);
    await Promise.all([runPackageJob({ shopId: shop.shopId, packageId }), runPackageJob({ shopId: shop.shopId, packageId })]);
    const first = await packageOf(packageId, shop.owner);
    await runPackageJob({ shopId: shop.shopId, packageId });
    expect(await packageOf(packageId, shop.owner)).toEqual(first);
    const made = await withClient("super", (client) => client.query("SELECT 1 FROM audit_events WHERE type = 'package.made' AND data::text LIKE $1", [`%${packageId}%`]));
    expect(made.rowCount).toBe(1);
    await expect(withClient("app", (client) => client.query("UPDATE packages SET takes = 0 WHERE id = $1", [packageId]))).rejects.toThrow(/does not change/);
  });
});

describe("one zip", () => {
  test("of originals holds the stored bytes unaltered, their signatures valid, with a list of hashes", async () => {
    const files = unzipped(await resultBytes(await madePackage(job, shop.inspector, { form: "zip", copies: "originals" })));
    const sheets = [...files].filter(([name]) => name.startsWith("sheets/"));
    expect(sheets).toHaveLength(SHEETS);
    const stored = await withClient("app", (client) => client.query<{ sha256: string }>("SELECT sha256 FROM revision_sheets WHERE shop_id = $1 AND kind = 'fabrication'", [shop.shopId]));
    const known = new Set(stored.rows.map((row) => row.sha256));
    for (const [name, bytes] of sheets) {
      const sha256 = createHash("sha256").update(bytes).digest("hex");
      expect(known.has(sha256)).toBe(true);
      expect(files.get("SHA256SUMS")!.toString()).toContain(`${sha256}  ${name}\n`);
    }
    expect(pdfsig(sheets[0]![1])).toContain("Signature is Valid");
    expect(qpdfFindings(files.get("index.pdf")!)).toBe("");
  });

  test("of marked copies holds one marked file a sheet", async () => {
    const files = unzipped(await resultBytes(await madePackage(job, shop.fitter, { form: "zip" })));
    const sheets = [...files].filter(([name]) => name.startsWith("sheets/"));
    expect(sheets).toHaveLength(SHEETS);
    for (const [, bytes] of sheets.slice(0, 2)) expect((await pagesText(bytes))[0]).toContain("UNCONTROLLED COPY");
  });
});

describe("resuming", () => {
  test("goes on from the parts that are stored when a worker fell silent, and writes nothing for the silent one", async () => {
    const before = await objects();
    const packageId = await askPackage(job, shop.owner);
    const silent = { shopId: shop.shopId, packageId, worker: "silent" };
    expect((await takeUpPackage(silent)).kind).toBe("mine");
    expect((await takeUpPackage({ ...silent, worker: "other" })).kind).toBe("busy");
    // A part that is no part: had it been made anew, the package would not fail on it.
    const { key } = await putObject(shop.shopId, new TextEncoder().encode(`no part of ${packageId}`), "text/plain");
    const partId = await announcePart(silent, { ordinal: 0, sheets: 2, pages: 1, objectKey: key });
    expect(await confirmPart(silent, partId ?? "")).toBe(true);
    await withClient("super", (client) => client.query("UPDATE packages SET worker_until = now() - interval '1 second' WHERE id = $1", [packageId]));
    await expect(runPackageJob({ shopId: shop.shopId, packageId })).rejects.toThrow();
    expect((await storedParts({ shopId: shop.shopId, packageId })).map((part) => part.ordinal)).toEqual([0, 1, 2]);
    await PackagePart.destroy({ where: { id: partId ?? "" } });
    await runPackageJob({ shopId: shop.shopId, packageId });
    expect(await packageOf(packageId, shop.owner)).toMatchObject({ state: "ready", prepared: SHEETS });
    expect(await finishPackage(silent, { key, sha256: "0".repeat(64), bytes: 1 }, 1)).toBe(false);
    expect(await PackagePart.count({ where: { packageId } })).toBe(0);
    // The result, and the text that was no part.
    expect(await objects()).toBe(before + 2);
  });

  test("ends with a sentence when it cannot be made", async () => {
    const packageId = await askPackage(job, shop.owner);
    const hold = { shopId: shop.shopId, packageId, worker: "first" };
    await takeUpPackage(hold);
    const { key } = await putObject(shop.shopId, new TextEncoder().encode(`damaged ${packageId}`), "text/plain");
    await confirmPart(hold, (await announcePart(hold, { ordinal: 0, sheets: 2, pages: 1, objectKey: key })) ?? "");
    await withClient("super", (client) => client.query("UPDATE packages SET worker_until = now() - interval '1 second', takes = 8 WHERE id = $1", [packageId]));
    await runPackageJob({ shopId: shop.shopId, packageId });
    const one = await packageOf(packageId, shop.owner);
    expect(one.state).toBe("failed");
    expect(one.problem).toMatch(/could not be put together/);
    expect(await PackagePart.count({ where: { packageId } })).toBe(0);
  });
});

describe("cancelling", () => {
  test("before and while it is made leaves nothing behind", async () => {
    const before = await objects();
    const waiting = await askPackage(job, shop.owner);
    expect((await call(cancelRoute.POST, { as: shop.fitter, method: "POST", params: { packageId: waiting } })).status).toBe(200);
    await runPackageJob({ shopId: shop.shopId, packageId: waiting });
    const making = await askPackage(job, shop.owner);
    const run = runPackageJob({ shopId: shop.shopId, packageId: making });
    await new Promise((resolve) => setTimeout(resolve, 60));
    expect((await call(cancelRoute.POST, { as: shop.owner, method: "POST", params: { packageId: making } })).status).toBe(200);
    await run.catch(() => undefined);
    for (const packageId of [waiting, making]) {
      expect((await packageOf(packageId, shop.owner)).state).toBe("cancelled");
      expect(await PackagePart.count({ where: { packageId } })).toBe(0);
      expect((await call(cancelRoute.POST, { as: shop.owner, method: "POST", params: { packageId } })).status).toBe(409);
      expect((await take(packageId, shop.owner)).status).toBe(409);
    }
    expect(await objects()).toBe(before);
  });
});

describe("taking", () => {
  test("streams the file, in parts too, and counts every sheet as printed once", async () => {
    const packageId = await madePackage(job, shop.owner);
    const whole = await take(packageId, shop.fitter);
    expect(whole.status).toBe(200);
    expect(whole.headers.get("content-disposition")).toMatch(/^attachment; filename="J-.*\.pdf"/);
    const { bytes, sha256 } = await packageOf(packageId, shop.owner);
    expect(Number(whole.headers.get("content-length"))).toBe(bytes);
    const copies = () => SheetCopy.findAll({ where: { packageId, by: shop.fitter.personId } });
    expect(await copies()).toHaveLength(SHEETS);
    expect(new Set((await copies()).map((copy) => copy.sha256))).toEqual(new Set([sha256]));
    const part = await take(packageId, shop.fitter, "", { range: "bytes=10-19" });
    expect([part.status, part.headers.get("content-range"), part.headers.get("content-length")]).toEqual([206, `bytes 10-19/${bytes}`, "10"]);
    expect((await take(packageId, shop.fitter, "", { range: `bytes=${(bytes ?? 0) + 5}-` })).status).toBe(416);
    expect((await call(fileRoute.GET, { as: shop.owner, method: "HEAD", params: { packageId } })).headers.get("content-length")).toBe(String(bytes));
    expect(await copies()).toHaveLength(SHEETS);
    const rows = (await call(copiesRoute.GET, { as: shop.fitter, params: { spoolId: job.spools[0]!.spoolId } })).json as { mine: boolean }[];
    expect(rows.some((row) => row.mine)).toBe(true);
    const holders = (await packageOf(packageId, shop.owner)).holders;
    expect(holders).toHaveLength(1);
    expect(holders[0]).toMatchObject({ name: "Pat fitter", out: SHEETS });
  });

  test("a part from the middle counts as well for who has none of it", async () => {
    const packageId = await madePackage(job, shop.owner);
    await take(packageId, shop.inspector, "", { range: "bytes=100-" });
    expect(await SheetCopy.count({ where: { packageId, by: shop.inspector.personId } })).toBe(SHEETS);
  });
});

test("one with a sheet that is not current says which, is kept from the bench, and is made again without it", async () => {
  const own = await issuedJob(shop, 2);
  const packageId = await madePackage(own, shop.fitter);
  const held = own.spools[1]!;
  const hold = await call(holdRoute.POST, { as: shop.inspector, method: "POST", params: { revisionId: held.revisionId }, body: { reason: "Nozzle moved", verified: true } });
  expect(hold.status, hold.text).toBe(200);
  const one = await packageOf(packageId, shop.fitter);
  expect(one.outdated).toBe(1);
  expect(one.rows.map((row) => row.outdated)).toEqual([null, "It is on HOLD since."]);
  const refused = await take(packageId, shop.fitter);
  expect(refused.status).toBe(409);
  expect(refused.json.message).toBe("1 of 2 sheets is not current any more. Make the package again.");
  expect((await take(packageId, shop.fitter, "?outdated=1")).status).toBe(403);
  expect((await take(packageId, shop.inspector, "?outdated=1")).status).toBe(200);
  const again = await call(againRoute.POST, { as: shop.fitter, method: "POST", params: { packageId } });
  expect(again.status).toBe(201);
  await runPackageJob({ shopId: shop.shopId, packageId: again.json.id as string });
  const texts = await pagesText(await resultBytes(again.json.id as string));
  const dead = texts.filter((text) => text.includes("HOLD: do not work to this sheet."));
  const ofHeld = texts.filter((text) => new RegExp(`^${one.rows[1]!.sheetNumber}$`, "m").test(text));
  expect(dead.length).toBeGreaterThan(0);
  expect(dead).toHaveLength(ofHeld.length);
});

describe("who may", () => {
  test("everyone makes and takes packages of issued sheets; of sheets for review the bench does not", async () => {
    for (const role of ROLES) expect((await ask(shop[role], bodyOf())).status).toBe(201);
    const review = await submitted(shop);
    const body = { revisionIds: [review.revisionId], form: "pdf" };
    expect((await ask(shop.fitter, body, review.jobId)).status).toBe(404);
    const made = await ask(shop.inspector, body, review.jobId);
    expect(made.status).toBe(201);
    expect((await call(packageRoute.GET, { as: shop.fitter, params: { packageId: made.json.id as string } })).status).toBe(404);
    expect((await call(jobPackages.GET, { as: shop.fitter, params: { jobId: review.jobId } })).json).toEqual([]);
  });

  test("no sheet of another job or shop, nor a dead one, is packed", async () => {
    const elsewhere = await issuedJob(shop, 1);
    expect((await ask(shop.owner, { ...bodyOf(), revisionIds: revisionsOfJob(elsewhere) })).status).toBe(404);
    const theirs = await newShop();
    expect((await ask(theirs.owner, bodyOf())).status).toBe(404);
    expect((await ask(shop.owner, { ...bodyOf(), revisionIds: [] })).json.message).toMatch(/at least one sheet/);
  });

  test("a transmittal's number is used once, its acknowledgement noted once and not by the bench", async () => {
    const transmittal = { number: "T-1", date: "2026-12-01", purpose: "For fabrication", recipient: "Cannery", replyBy: "", remark: "" };
    const packageId = await madePackage(job, shop.owner, { transmittal });
    const twice = await ask(shop.owner, bodyOf({ transmittal }));
    expect(twice.status).toBe(400);
    expect(twice.json.fields["transmittal.number"]).toMatch(/exists already/);
    expect((await pagesText(await resultBytes(packageId)))[0]).toContain("Cannery");
    const note = (as: TestPerson) => call(receiptRoute.POST, { as, method: "POST", params: { packageId }, body: { receivedBy: "J. Cole", receivedOn: "2026-12-03", remark: "" } });
    expect((await note(shop.fitter)).status).toBe(403);
    expect((await note(shop.detailer)).status).toBe(200);
    expect((await note(shop.owner)).status).toBe(409);
    expect((await packageOf(packageId, shop.fitter)).receipt).toMatchObject({ receivedBy: "J. Cole", receivedOn: "2026-12-03" });
  });
});
