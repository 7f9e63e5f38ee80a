/** Measurements of finished spools through their routes: who keeps them, what is refused, what is printed. */
import { afterAll, beforeAll, describe, expect, test } from "vitest";
import * as fittedRoute from "@/app/api/spools/[spoolId]/as-fitted/route";
import * as sheetRoute from "@/app/api/spools/[spoolId]/as-fitted/sheet/route";
import { AuditEvent } from "@/models";
import { sampleMeasurement } from "../measurements";
import { routeNamed } from "./routes";
import { signed } from "./revision-support";
import { call, endOfFile, newLine, newShop, ROLES, withClient, type TestPerson, type TestShop } from "./support";

let shop: TestShop;
let hold: unknown;
let asBuilt: unknown;
beforeAll(async () => {
  shop = await newShop();
  hold = await routeNamed("POST /revisions/[revisionId]/hold");
  asBuilt = await routeNamed("POST /revisions/[revisionId]/as-built");
});
afterAll(endOfFile);

const post = (as: TestPerson, spoolId: string, document: unknown) => call(fittedRoute.POST, { as, method: "POST", params: { spoolId }, body: { document } });
const get = (as: TestPerson, spoolId: string) => call(fittedRoute.GET, { as, params: { spoolId } });
const print = (as: TestPerson, spoolId: string, query = "") => call(sheetRoute.GET, { as, params: { spoolId }, query });

describe("a measurement", () => {
  test("is kept by every role with who, when, on which revision and what it came to; newest first", async () => {
    const { spoolId, revisionId } = await signed(shop);
    expect((await get(shop.fitter, spoolId)).json).toEqual([]);
    for (const role of ROLES) expect((await post(shop[role], spoolId, sampleMeasurement())).status).toBe(201);
    expect((await post(shop.fitter, spoolId, sampleMeasurement(19.05))).status).toBe(201);
    const { json } = await get(shop.fitter, spoolId);
    expect(json).toHaveLength(5);
    expect(json[0]).toMatchObject({ revisionId, revisionCode: "A", by: "Pat fitter", verdict: "trim", document: sampleMeasurement(19.05) });
    expect(json[0].headline).toContain("Trim 3/4 in at end 2");
    expect(json[4]).toMatchObject({ verdict: "go" });
    const events = await AuditEvent.findAll({ where: { shopId: shop.shopId, type: "spool.measured" } });
    expect(events).toHaveLength(5);
    expect(events.map((event) => JSON.parse(event.data).verdict as string).sort()).toEqual(["go", "go", "go", "go", "trim"]);
  });

  test("cannot be changed or taken away by the application", async () => {
    const { spoolId } = await signed(shop);
    await post(shop.fitter, spoolId, sampleMeasurement());
    await withClient("app", async (client) => {
      await expect(client.query("UPDATE spool_measurements SET verdict = 'go'")).rejects.toThrow("permission denied");
      await expect(client.query("DELETE FROM spool_measurements")).rejects.toThrow("permission denied");
    });
  });

  test("what is no measurement, or places nothing, is refused in words and keeps nothing", async () => {
    const { spoolId } = await signed(shop);
    const one = { ...sampleMeasurement(), points: sampleMeasurement().points.slice(0, 2) };
    const many = { ...sampleMeasurement(), points: Array.from({ length: 201 }, (_, i) => ({ ...one.points[0]!, id: `p${i}` })) };
    for (const document of [{}, { ...sampleMeasurement(), schema: 2 }, { ...sampleMeasurement(), hold: "x" }, many, one]) {
      const answer = await post(shop.fitter, spoolId, document);
      expect(answer.status).toBe(400);
      expect(answer.json.message).toMatch(/not a measurement|Two faces/);
    }
    expect((await get(shop.owner, spoolId)).json).toEqual([]);
  });

  test("is refused without a live revision, on HOLD, and after AS-BUILT", async () => {
    const draft = await newLine(shop);
    expect((await post(shop.fitter, draft.spoolIds[0]!, sampleMeasurement())).status).toBe(409);
    const held = await signed(shop);
    expect((await call(hold, { as: shop.inspector, method: "POST", params: { revisionId: held.revisionId }, body: { reason: "Wait for the vendor" } })).status).toBeLessThan(300);
    expect((await post(shop.fitter, held.spoolId, sampleMeasurement())).json.message).toContain("HOLD");
    const built = await signed(shop);
    expect((await call(asBuilt, { as: shop.inspector, method: "POST", params: { revisionId: built.revisionId }, body: { reason: "Built as drawn", verified: true } })).status).toBeLessThan(300);
    expect((await post(shop.fitter, built.spoolId, sampleMeasurement())).json.message).toContain("AS-BUILT");
  });
});

describe("the dimension record", () => {
  test("prints a kept measurement, and the blank form, in the size asked for", async () => {
    const { spoolId } = await signed(shop);
    const { id } = (await post(shop.fitter, spoolId, sampleMeasurement(2))).json as { id: string };
    const record = await print(shop.fitter, spoolId, `?record=${id}&size=A3`);
    expect(record.status, record.text.slice(0, 200)).toBe(200);
    expect(record.headers.get("content-disposition")).toMatch(/^inline; filename="[^"]*dimension-record-rev-A-FOR-FABRICATION\.pdf/);
    expect(record.text.slice(0, 5)).toBe("%PDF-");
    const form = await print(shop.fitter, spoolId);
    expect(form.headers.get("content-disposition")).toContain("dimension-record-form");
  });

  test("a record of another spool, of nobody, or asked for wrongly is refused", async () => {
    const first = await signed(shop);
    const second = await signed(shop);
    const { id } = (await post(shop.fitter, first.spoolId, sampleMeasurement())).json as { id: string };
    expect((await print(shop.fitter, second.spoolId, `?record=${id}`)).status).toBe(404);
    expect((await print(shop.fitter, first.spoolId, "?record=7")).status).toBe(400);
    const draft = await newLine(shop);
    expect((await print(shop.fitter, draft.spoolIds[0]!)).status).toBe(404);
    expect((await print(shop.detailer, draft.spoolIds[0]!)).status).toBe(200);
  });
});
