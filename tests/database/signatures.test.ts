/** Sheets signed by the shop's certificate, from the first signing on, and the certificate kept where nobody reads it. */
import { afterAll, beforeAll, describe, expect, test } from "vitest";
import * as certificateRoute from "@/app/api/shop/certificate/route";
import * as sheetRoute from "@/app/api/revisions/[revisionId]/sheet/route";
import * as signRoute from "@/app/api/revisions/[revisionId]/sign/route";
import * as statusRoute from "@/app/api/status/[token]/route";
import { runCommand, type Actor } from "@/lib/server/command";
import { signingCertificate } from "@/lib/commands/keep-certificate";
import { openSecret, sealSecret } from "@/lib/server/sealing";
import { forgetSettings } from "@/lib/server/settings";
import { sha256Hex } from "@/lib/server/storage";
import { Revision, RevisionSheet, ShopCertificate } from "@/models";
import { pdfsig, qpdfFindings } from "../pdf/pdf-tools";
import { uploadedP12 } from "../p12-files";
import { signBody, signed, submitted } from "./revision-support";
import { call, endOfFile, newShop, type Call, type TestShop, withClient } from "./support";

const PASSWORD = "correct horse, wrong stable";
let shop: TestShop;

beforeAll(async () => {
  shop = await newShop();
});
afterAll(endOfFile);

const certificate = (method: "GET" | "PUT" | "POST", more: Omit<Call, "method"> = {}) => call(certificateRoute[method], { as: shop.owner, method, ...more });
const upload = (p12: Buffer, password: string) => certificate("PUT", { body: { p12: p12.toString("base64"), password } });

/** The stored bytes of a revision's sheet. */
async function storedBytes(of: TestShop, revisionId: string, query = ""): Promise<Uint8Array> {
  const { settings } = await import("@/lib/server/settings");
  const request = new Request(`${settings().BASE_URL}/api/test${query}`, { headers: { cookie: of.owner.cookie } });
  const answer = await sheetRoute.GET(request, { params: Promise.resolve({ revisionId }) });
  return new Uint8Array(await answer.arrayBuffer());
}

describe("a signed revision", () => {
  test("is signed by a certificate made at first need, once for the shop", async () => {
    expect((await certificate("GET")).json).toEqual([]);
    const first = await signed(shop);
    const bytes = await storedBytes(shop, first.revisionId);
    const said = pdfsig(bytes);
    expect(said).toContain("Signature is Valid");
    expect(qpdfFindings(bytes)).toBe("");
    const altered = Uint8Array.from(bytes);
    altered[bytes.length - 3_000] = altered[bytes.length - 3_000]! ^ 4;
    expect(pdfsig(altered)).not.toContain("Signature is Valid");
    await signed(shop);
    const kept = await certificate("GET");
    expect(kept.json).toHaveLength(1);
    expect(kept.json[0]).toMatchObject({ origin: "made", by: "Pat inspector" });
    expect(said).toContain(`Signer Certificate Common Name: ${kept.json[0].subject as string}`);
  });

  test("keeps the hash of the signed bytes, with the log's head in them; a review sheet is not signed", async () => {
    const { revisionId } = await signed(shop);
    const sheets = await RevisionSheet.findAll({ where: { revisionId } });
    const fabrication = sheets.find((sheet) => sheet.kind === "fabrication")!;
    const review = sheets.find((sheet) => sheet.kind === "review")!;
    const bytes = await storedBytes(shop, revisionId);
    expect(sha256Hex(bytes)).toBe(fabrication.sha256);
    expect(Buffer.from(bytes).includes(`${fabrication.auditSeq}:${fabrication.auditHash}`)).toBe(true);
    expect(fabrication.certificateId).not.toBeNull();
    expect(review.certificateId).toBeNull();
    expect(pdfsig(await storedBytes(shop, revisionId, "?kind=review"))).toContain("does not contain any signatures");
  });

  test("is told by its status page: signed original, marked copy, whose signature", async () => {
    const { revisionId } = await signed(shop);
    const original = sha256Hex(await storedBytes(shop, revisionId));
    const copy = await storedBytes(shop, revisionId, "?copy=1");
    expect(pdfsig(copy)).toContain("does not contain any signatures");
    const revision = await Revision.findOne({ where: { id: revisionId }, rejectOnEmpty: true });
    const status = (await call(statusRoute.GET, { params: { token: revision.statusToken } })).json;
    const of = (sha256: string) => status.sheets.filter((sheet: { sha256: string }) => sheet.sha256 === sha256);
    expect(of(original)).toMatchObject([{ kind: "fabrication", marked: null }]);
    expect(of(sha256Hex(copy))).toMatchObject([{ kind: "fabrication", marked: "UNCONTROLLED COPY" }]);
    const altered = Uint8Array.from(copy);
    altered[200] = altered[200]! ^ 1;
    expect(of(sha256Hex(altered))).toEqual([]);
    const [inUse] = (await certificate("GET")).json;
    expect(status.signature).toEqual({ sha256: original, subject: inUse.subject, fingerprint: inUse.fingerprint });
    expect(JSON.stringify(status)).not.toContain("Pat inspector");
  });

  test("two first signings at once make one certificate", async () => {
    const fresh = await newShop();
    const revisions = [await submitted(fresh), await submitted(fresh)];
    const answers = await Promise.all(revisions.map(({ revisionId }) => call(signRoute.POST, { as: fresh.inspector, method: "POST", params: { revisionId }, body: signBody })));
    expect(answers.map((answer) => answer.status)).toEqual([200, 200]);
    expect(await ShopCertificate.count({ where: { shopId: fresh.shopId } })).toBe(1);
  });
});

describe("an uploaded certificate", () => {
  test("is refused with the wrong password, and nothing of it is kept", async () => {
    const before = await ShopCertificate.count({ where: { shopId: shop.shopId } });
    const answer = await upload(uploadedP12({ password: PASSWORD }), "correct horse");
    expect(answer.status).toBe(400);
    expect(answer.json).toMatchObject({ message: "That password does not open the .p12.", fields: { password: "That password does not open the .p12." } });
    for (const [p12, words] of [
      [Buffer.from("no keystore"), "That is not a .p12 file."],
      [uploadedP12({ password: PASSWORD, to: new Date("2024-02-01") }), "That certificate ended on 2024-02-01. Upload one that is in force."],
    ] as const) {
      const refused = await upload(p12, PASSWORD);
      expect([refused.status, refused.json.fields.p12]).toEqual([400, words]);
    }
    expect((await certificate("PUT", { body: { p12: "A".repeat(99_000), password: "x" } })).status).toBeGreaterThanOrEqual(400);
    expect(await ShopCertificate.count({ where: { shopId: shop.shopId } })).toBe(before);
  });

  test("signs from then on; the one before stays listed; its sheets stay valid", async () => {
    const before = await signed(shop);
    expect((await upload(uploadedP12({ password: PASSWORD, commonName: "Öst Kaj Rör AB" }), PASSWORD)).status).toBe(200);
    const { revisionId } = await signed(shop);
    const said = pdfsig(await storedBytes(shop, revisionId));
    expect(said).toContain("Signature is Valid");
    expect(said).toContain("Signer Certificate Common Name: Öst Kaj Rör AB");
    const listed = (await certificate("GET")).json;
    expect(listed.map((one: { origin: string }) => one.origin)).toEqual(["uploaded", "made"]);
    expect(pdfsig(await storedBytes(shop, before.revisionId))).toContain("Signature is Valid");
    expect((await certificate("POST")).status).toBe(201);
    expect((await certificate("GET")).json.map((one: { origin: string }) => one.origin)).toEqual(["made", "uploaded", "made"]);
  });

  test("lies encrypted: neither password, key nor file stands in any table, and no answer has it", async () => {
    const p12 = uploadedP12({ password: PASSWORD });
    await upload(p12, PASSWORD);
    const everything = await withClient("super", async (client) => {
      const tables = await client.query<{ name: string }>("SELECT table_schema || '.' || table_name AS name FROM information_schema.tables WHERE table_schema IN ('public', 'pgboss') AND table_type = 'BASE TABLE'");
      const dumps = await Promise.all(tables.rows.map(({ name }) => client.query<{ row: string }>(`SELECT t::text AS row FROM ${name} t`)));
      return dumps.flatMap((dump) => dump.rows.map(({ row }) => row)).join("\n");
    });
    const row = await ShopCertificate.findOne({ where: { shopId: shop.shopId }, order: [["ordinal", "DESC"]], rejectOnEmpty: true });
    expect(everything).toContain(row.sealedPassword);
    for (const secret of [PASSWORD, Buffer.from(PASSWORD).toString("base64url").slice(0, 20), Buffer.from(PASSWORD).toString("hex"), p12.toString("base64url").slice(0, 60), p12.toString("hex").slice(0, 60), "PRIVATE KEY"]) {
      expect(everything).not.toContain(secret);
    }
    const listed = await certificate("GET");
    expect(listed.text).not.toMatch(/sealed|PRIVATE|v1\./);
    expect(Buffer.from(openSecret(row.sealedPassword, `${shop.shopId}:certificate-password`)!).toString()).toBe(PASSWORD);
  });

  test("that cannot be opened any more stops signing with words for the owner, until it is replaced", async () => {
    const { revisionId } = await submitted(shop);
    const before = process.env.SEALING_KEY;
    process.env.SEALING_KEY = "another key of at least thirty-two characters";
    forgetSettings();
    try {
      const answer = await call(signRoute.POST, { as: shop.inspector, method: "POST", params: { revisionId }, body: signBody });
      expect(answer.status).toBe(409);
      expect(answer.json.message).toBe("The shop's certificate cannot be opened with this server's key, so nothing can be signed. The owner uploads another, or makes one, on the Shop page.");
    } finally {
      process.env.SEALING_KEY = before;
      forgetSettings();
    }
    await certificate("POST");
    expect((await call(signRoute.POST, { as: shop.inspector, method: "POST", params: { revisionId }, body: signBody })).status).toBe(200);
  });

  test("of the shop's own that has ended is replaced by itself", async () => {
    const fresh = await newShop();
    const at = (now: Date) => runCommand<Actor, { id: string }>(fresh.owner, "unlogged", (context) => signingCertificate({ ...context, now }));
    const one = await at(new Date("2026-01-01"));
    expect((await at(new Date("2035-12-01"))).id).toBe(one.id);
    expect((await at(new Date("2036-01-02"))).id).not.toBe(one.id);
  });

  test("is the owner's to replace; everyone of the shop reads it; rows stay", async () => {
    const body = { p12: uploadedP12({ password: "x" }).toString("base64"), password: "x" };
    for (const role of ["detailer", "inspector", "fitter"] as const) {
      expect((await certificate("PUT", { as: shop[role], body })).status).toBe(403);
      expect((await certificate("POST", { as: shop[role] })).status).toBe(403);
      expect((await certificate("GET", { as: shop[role] })).status).toBe(200);
    }
    await withClient("app", async (client) => {
      for (const change of ["UPDATE shop_certificates SET origin = 'made'", "DELETE FROM shop_certificates", "UPDATE copy_withdrawals SET at = now()", "DELETE FROM copy_withdrawals"]) {
        await expect(client.query(change)).rejects.toThrow(/permission denied/);
      }
    });
  });
});

describe("sealing", () => {
  test("opens only in its place and whole", () => {
    const sealed = sealSecret(Buffer.from("a secret"), "shop:one");
    expect(sealed).not.toContain(Buffer.from("a secret").toString("base64url"));
    expect(sealSecret(Buffer.from("a secret"), "shop:one")).not.toBe(sealed);
    expect(Buffer.from(openSecret(sealed, "shop:one")!).toString()).toBe("a secret");
    expect(openSecret(sealed, "shop:two")).toBeNull();
    expect(openSecret(`${sealed.slice(0, -2)}${sealed.endsWith("AA") ? "BB" : "AA"}`, "shop:one")).toBeNull();
    for (const broken of ["", "v1.", "v2.AAAA", sealed.slice(0, 20)]) expect(openSecret(broken, "shop:one")).toBeNull();
  });
});
