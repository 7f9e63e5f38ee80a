/** Cutting plans end to end: asked for, searched in a thread, cancelled, locked once, kept to the shop. */
import { afterAll, beforeAll, describe, expect, test } from "vitest";
import * as lineRoute from "@/app/api/lines/[lineId]/route";
import * as jobNests from "@/app/api/jobs/[jobId]/nests/route";
import * as cancelRoute from "@/app/api/nests/[nestId]/cancel/route";
import * as cutRoute from "@/app/api/nests/[nestId]/cut/route";
import * as exportRoute from "@/app/api/nests/[nestId]/export/route";
import * as nestRoute from "@/app/api/nests/[nestId]/route";
import * as offcuts from "@/app/api/shop/offcuts/route";
import * as shopRoute from "@/app/api/shop/route";
import { runNestJob } from "@/lib/jobs/nest-job";
import type { NestDetail } from "@/lib/rules/nest-plans";
import { groupInput } from "@/lib/rules/nest-input";
import { sampleDocument } from "../factories";
import { nestFaults } from "../oracle/check-nest";
import { signed, type TestRevision } from "./revision-support";
import { call, endOfFile, newLine, newShop, unique, withClient, type TestShop } from "./support";

let shop: TestShop;
let issued: TestRevision;
const body = (spoolId: string) => ({ spoolIds: [spoolId], saw: "Band saw", seconds: 1 });

beforeAll(async () => {
  shop = await newShop();
  issued = await signed(shop);
});
afterAll(endOfFile);

async function ask(of: TestRevision, as = shop.detailer): Promise<string> {
  const answer = await call(jobNests.POST, { as, method: "POST", params: { jobId: of.jobId }, body: body(of.spoolId) });
  expect(answer.status, answer.text).toBe(201);
  return answer.json.id as string;
}
async function detail(nestId: string, as = shop.detailer): Promise<NestDetail> {
  const answer = await call(nestRoute.GET, { as, params: { nestId } });
  expect(answer.status, answer.text).toBe(200);
  return answer.json as NestDetail;
}
/** A rack that holds what the sample line is made of, with one offcut of a known heat. */
async function fillRack(quantity: number | null): Promise<void> {
  const source = (await detail(await ask(issued))).source;
  const { nps, schedule, material } = source.groups[0]!;
  const stock = [{ nps, schedule, material, lengthMm: 6096, quantity, cost: 200 }];
  expect((await call(shopRoute.PATCH, { as: shop.owner, method: "PATCH", body: { stock } })).status).toBe(200);
  const offcut = { nps, schedule, material, lengthMm: 1500, heat: "H-77" };
  expect((await call(offcuts.POST, { as: shop.owner, method: "POST", body: offcut })).status).toBe(201);
}
const rack = async () => (await call(offcuts.GET, { as: shop.fitter })).json as { id: string; heat: string; lengthMm: number }[];

describe("a cutting plan", () => {
  test("says what is missing when the rack is empty", async () => {
    const nestId = await ask(issued);
    await runNestJob({ shopId: shop.shopId, nestId });
    const { state, result } = await detail(nestId);
    expect(state).toBe("done");
    expect(result!.groups[0]!.bars).toEqual([]);
    expect(result!.groups[0]!.unplaced.length).toBeGreaterThan(0);
  });

  test("is found in a thread; the same job run twice, also at once, leaves one result", async () => {
    await fillRack(3);
    const nestId = await ask(issued);
    await Promise.all([runNestJob({ shopId: shop.shopId, nestId }), runNestJob({ shopId: shop.shopId, nestId })]);
    const first = await detail(nestId);
    await runNestJob({ shopId: shop.shopId, nestId });
    expect(await detail(nestId)).toEqual(first);
    expect(first.state).toBe("done");
    expect(first.stale).toEqual([]);
    const made = await withClient("super", (client) => client.query("SELECT 1 FROM audit_events WHERE type = 'nest.made' AND data::text LIKE $1", [`%${nestId}%`]));
    expect(made.rowCount).toBe(1);
    first.result!.groups.forEach((plan, g) => {
      expect(nestFaults(groupInput(first.source, first.source.groups[g]!, new Map()).input, plan)).toEqual([]);
      expect(plan.unplaced).toEqual([]);
    });
    const csv = await call(exportRoute.GET, { as: shop.fitter, params: { nestId } });
    expect(csv.status).toBe(200);
    for (const piece of first.source.groups[0]!.pieces) expect(csv.text).toContain(piece.mark);
  });

  test("is searched by no one once cancelled", async () => {
    const nestId = await ask(issued);
    expect((await call(cancelRoute.POST, { as: shop.detailer, method: "POST", params: { nestId } })).status).toBe(200);
    await runNestJob({ shopId: shop.shopId, nestId });
    expect(await detail(nestId)).toMatchObject({ state: "cancelled", result: null });
    expect((await call(cancelRoute.POST, { as: shop.detailer, method: "POST", params: { nestId } })).status).toBe(409);
  });

  test("ends early when cancelled while it searches", async () => {
    const nestId = await ask(issued);
    const job = runNestJob({ shopId: shop.shopId, nestId });
    await call(cancelRoute.POST, { as: shop.detailer, method: "POST", params: { nestId } });
    await job;
    expect((await detail(nestId)).state).toBe("cancelled");
  });

  test("of a draft is not cut from, and a fitter does not see it", async () => {
    const draft = await newLine(shop);
    const answer = await call(jobNests.POST, { as: shop.owner, method: "POST", params: { jobId: draft.jobId }, body: body(draft.spoolIds[0]!) });
    const nestId = answer.json.id as string;
    await runNestJob({ shopId: shop.shopId, nestId });
    const cut = await call(cutRoute.POST, { as: shop.owner, method: "POST", params: { nestId }, body: { verified: true } });
    expect(cut.status).toBe(409);
    expect(cut.json.message).toContain("FOR FABRICATION");
    expect((await call(nestRoute.GET, { as: shop.fitter, params: { nestId } })).status).toBe(404);
  });

  test("is called out of date once a spool of it has changed", async () => {
    const number = unique("L");
    const draft = await newLine(shop, sampleDocument(number));
    const answer = await call(jobNests.POST, { as: shop.detailer, method: "POST", params: { jobId: draft.jobId }, body: body(draft.spoolIds[0]!) });
    const nestId = answer.json.id as string;
    await runNestJob({ shopId: shop.shopId, nestId });
    expect((await detail(nestId)).stale).toEqual([]);
    const saved = await call(lineRoute.PUT, { as: shop.detailer, method: "PUT", params: { lineId: draft.lineId }, body: { version: 1, document: sampleDocument(number, 1_500) } });
    expect(saved.status, saved.text).toBe(200);
    expect((await detail(nestId)).stale[0]).toContain("has changed since");
  });

  test("takes the stock when it is locked, returns rests with their heat, and is not changed after", async () => {
    const nestId = await ask(issued);
    const rival = await ask(issued);
    await runNestJob({ shopId: shop.shopId, nestId });
    await runNestJob({ shopId: shop.shopId, nestId: rival });
    const { result, source } = await detail(nestId);
    const bars = result!.groups[0]!.bars;
    const heats = Object.fromEntries(bars.flatMap((bar, b) => (bar.heat === null ? [[`0:${b}`, `NEW-${b}`]] : [])));
    const before = await rack();
    const cut = () => call(cutRoute.POST, { as: shop.detailer, method: "POST", params: { nestId }, body: { verified: true, heats } });
    expect((await cut()).status).toBe(200);
    expect((await cut()).status).toBe(409);
    const lengths = bars.filter((bar) => source.stock.find((s) => s.id === bar.stockId)!.kind === "length").length;
    const settings = (await call(shopRoute.GET, { as: shop.owner })).json;
    expect(settings.stock[0].quantity).toBe(3 - lengths);
    const now = await rack();
    for (const bar of bars) expect(now.some((o) => o.id === bar.stockId)).toBe(false);
    const taken = bars.length - lengths;
    expect(now).toHaveLength(before.length - taken + bars.filter((bar) => bar.returned).length);
    for (const bar of bars.filter((one) => one.returned)) expect(now.some((o) => !before.some((old) => old.id === o.id) && o.heat === (bar.heat ?? heats[`0:${bars.indexOf(bar)}`]))).toBe(true);
    expect((await detail(rival)).stale.length).toBeGreaterThan(0);
    expect((await call(cutRoute.POST, { as: shop.detailer, method: "POST", params: { nestId: rival }, body: { verified: true } })).status).toBe(409);
    await expect(withClient("app", (client) => client.query("UPDATE nests SET progress = 'x' WHERE id = $1", [nestId]))).rejects.toThrow(/does not change/);
    const again = await call(jobNests.POST, { as: shop.detailer, method: "POST", params: { jobId: issued.jobId }, body: body(issued.spoolId) });
    expect(again.status).toBe(400);
    expect(again.json.message).toContain("cut already");
  });

  test("is made and locked by the owner and the detailer only", async () => {
    for (const role of ["inspector", "fitter"] as const) {
      expect((await call(jobNests.POST, { as: shop[role], method: "POST", params: { jobId: issued.jobId }, body: body(issued.spoolId) })).status).toBe(403);
      expect((await call(jobNests.GET, { as: shop[role], params: { jobId: issued.jobId } })).status).toBe(200);
    }
  });

  test("does not take another shop's spool, nor a spool of another job", async () => {
    const other = await newShop();
    const theirs = await newLine(other);
    const elsewhere = await newLine(shop);
    for (const spoolId of [theirs.spoolIds[0]!, elsewhere.spoolIds[0]!]) {
      expect((await call(jobNests.POST, { as: shop.detailer, method: "POST", params: { jobId: issued.jobId }, body: body(spoolId) })).status).toBe(404);
    }
  });
});
