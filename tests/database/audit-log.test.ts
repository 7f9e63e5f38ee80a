/** The log in the database: written with the change, whole under parallel writes, closed to the application's role. */
import { afterAll, beforeAll, describe, expect, test } from "vitest";
import * as auditRoute from "@/app/api/shop/audit/route";
import * as jobsRoute from "@/app/api/jobs/route";
import * as shopRoute from "@/app/api/shop/route";
import { auditHead, verifyAudit } from "@/lib/server/audit";
import { runCommand } from "@/lib/server/command";
import { Job, Shop } from "@/models";
import { signed } from "./revision-support";
import { call, endOfFile, newLine, newShop, tablePrints, type TestShop, unique, withClient } from "./support";

let shop: TestShop;
beforeAll(async () => {
  shop = await newShop();
});
afterAll(endOfFile);

const INSERT_ONLY = ["audit_events", "revision_inputs", "revision_sheets", "sheet_copies", "sign_offs", "work_entries", "spool_measurements", "line_touches", "take_out_words"];

async function refusal(sql: string): Promise<string> {
  return withClient("app", async (client) => client.query(sql).then(() => "done", (error: { code: string }) => error.code));
}

describe("what the application's database role may not do", () => {
  test.each(INSERT_ONLY)("change or remove rows of %s", async (table) => {
    const column = table === "audit_events" ? "data" : "id";
    expect(await refusal(`UPDATE ${table} SET ${column} = ${column}`)).toBe("42501");
    expect(await refusal(`DELETE FROM ${table}`)).toBe("42501");
    expect(await refusal(`TRUNCATE ${table}`)).toBe("42501");
  });

  test("change what a revision was submitted as, or remove one", async () => {
    for (const column of ["code", "spool_id", "status_token", "content_sha256", "submitted_by", "description"]) {
      expect(await refusal(`UPDATE revisions SET ${column} = ${column}`)).toBe("42501");
    }
    expect(await refusal("DELETE FROM revisions")).toBe("42501");
  });

  test("change the structure of the database", async () => {
    for (const sql of ["CREATE TABLE mine (id int)", "ALTER TABLE revisions DISABLE TRIGGER ALL", "DROP TABLE audit_events", "SET ROLE quarterline_owner"]) {
      expect(await refusal(sql)).toBe("42501");
    }
    // PostgreSQL answers a grant of what one does not own with a warning; what counts is that nothing was granted.
    await refusal("GRANT ALL ON audit_events TO quarterline_app");
    expect(await refusal("DELETE FROM audit_events")).toBe("42501");
  });

  test("remove people, shops, jobs or lines", async () => {
    for (const table of ["people", "shops", "memberships", "jobs", "lines", "uploads", "counters"]) expect(await refusal(`DELETE FROM ${table}`)).toBe("42501");
  });
});

describe("a revision's state, also past the application", () => {
  test("only the permitted changes of state go through, and what was submitted stays", async () => {
    const { revisionId } = await signed(shop);
    const attempt = (set: string) =>
      withClient("super", (client) => client.query(`UPDATE revisions SET ${set} WHERE id = $1`, [revisionId]).then(() => "done", (error: { code: string }) => error.code));
    expect(await attempt("state = 'for-review'")).toBe("23514");
    expect(await attempt("state = 'draft'")).toBe("23514");
    expect(await attempt("code = 'Z'")).toBe("23514");
    expect(await attempt("signed_by = submitted_by")).toBe("23514");
    expect(await attempt("state = 'superseded'")).toBe("done");
    expect(await attempt("hold = true, hold_reason = 'x'")).toBe("23514");
    expect(await attempt("state = 'for-fabrication'")).toBe("23514");
  });
});

describe("the log", () => {
  test("100 parallel writes of one shop make one chain", async () => {
    const before = (await auditHead(shop.shopId)).seq;
    const answers = await Promise.all(
      Array.from({ length: 100 }, (_, index) => call(jobsRoute.POST, { as: shop.detailer, method: "POST", body: { number: unique(`P${index}`), title: "t", client: "", area: "", units: "metric" } })),
    );
    expect(answers.filter((answer) => answer.status !== 201).map((answer) => answer.text)).toEqual([]);
    expect((await auditHead(shop.shopId)).seq).toBe(before + 100);
    expect(await verifyAudit(shop.shopId)).toBeNull();
  });

  test("a command that tells the log nothing is undone", async () => {
    const rename = runCommand(shop.owner, "logged", async ({ tx }) => {
      await Shop.update({ name: "Renamed in silence" }, { where: { id: shop.shopId }, transaction: tx });
    });
    await expect(rename).rejects.toThrow("without telling the log");
    expect((await call(shopRoute.GET, { as: shop.owner })).json.name).not.toBe("Renamed in silence");
  });

  test("a command that fails leaves neither its change nor its entry", async () => {
    const { jobId } = await newLine(shop);
    const before = await tablePrints();
    const failing = runCommand(shop.owner, "logged", async (context) => {
      await Job.update({ title: "half done" }, { where: { id: jobId }, transaction: context.tx });
      context.audit({ type: "job.changed", data: { jobId, number: "1", what: ["title"] } });
      await context.auditNow();
      throw new Error("fails after all");
    });
    await expect(failing).rejects.toThrow("fails after all");
    expect(await tablePrints()).toEqual(before);
  });

  test("its page shows sentences by name, page by page, and says that it is whole", async () => {
    const page = await call(auditRoute.GET, { as: shop.inspector });
    expect(page.json.broken).toBeNull();
    expect(page.json.rows).toHaveLength(50);
    expect(page.json.rows[0]).toMatchObject({ actor: expect.stringMatching(/^(Pat|Olive)/), text: expect.stringMatching(/\.$/) });
    const next = await call(auditRoute.GET, { as: shop.inspector, query: `?before=${page.json.nextBefore}` });
    expect(next.json.rows[0].seq).toBe(page.json.nextBefore - 1);
    expect((await call(auditRoute.GET, { as: shop.inspector, query: "?before=abc" })).status).toBe(400);
    expect((await call(auditRoute.GET, { as: shop.fitter })).status).toBe(403);
  });

  test("an entry changed beneath the application is found", async () => {
    const victim = await newShop();
    await withClient("super", (client) => client.query(`UPDATE audit_events SET data = '{"name":"Other"}' WHERE shop_id = $1 AND seq = 1`, [victim.shopId]));
    expect(await verifyAudit(victim.shopId)).toBe("Entry 1 was changed after it was written.");
    expect((await call(auditRoute.GET, { as: victim.owner })).json.broken).toMatch(/Entry 1 was changed/);
  });

  test("removing the newest entries is found against the head in a stored sheet", async () => {
    const victim = await newShop();
    await signed(victim);
    expect(await verifyAudit(victim.shopId)).toBeNull();
    await withClient("super", (client) => client.query("DELETE FROM audit_events WHERE shop_id = $1 AND seq >= (SELECT max(audit_seq) FROM revision_sheets WHERE shop_id = $1)", [victim.shopId]));
    expect(await verifyAudit(victim.shopId)).toMatch(/its newest entries were removed/);
  });

  test("removing entries written after the last sheet is found against a head noted in a mail or the server's log", async () => {
    const victim = await newShop();
    const head = await auditHead(victim.shopId);
    await withClient("super", (client) => client.query("DELETE FROM audit_events WHERE shop_id = $1 AND seq = $2", [victim.shopId, head.seq]));
    expect(await verifyAudit(victim.shopId, [head])).toMatch(/its newest entries were removed/);
  });
});
