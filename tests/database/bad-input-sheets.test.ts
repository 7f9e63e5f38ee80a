/** Words and pipes a sheet has no room, no letter or no stock for, from the form to the paper; and the order of a title block. */
import { afterAll, beforeAll, describe, expect, test } from "vitest";
import * as benchRoute from "@/app/api/spools/[spoolId]/bench/route";
import * as jobNests from "@/app/api/jobs/[jobId]/nests/route";
import * as jobRoute from "@/app/api/jobs/[jobId]/route";
import * as jobsRoute from "@/app/api/jobs/route";
import * as nestRoute from "@/app/api/nests/[nestId]/route";
import * as shopRoute from "@/app/api/shop/route";
import * as sheetRoute from "@/app/api/spools/[spoolId]/sheet/route";
import { TITLE_KEYS, titleOrder } from "@/iso";
import { runNestJob } from "@/lib/jobs/nest-job";
import { endFlange, pointAt, sampleDocument } from "../factories";
import { pdfText } from "../pdf/poppler";
import { signed } from "./revision-support";
import { call, endOfFile, newLine, newShop, unique, type TestShop } from "./support";

let shop: TestShop;
beforeAll(async () => {
  shop = await newShop();
});
afterAll(endOfFile);

const bytesOf = async (handler: (request: Request, context: { params: Promise<Record<string, string>> }) => Promise<Response>, spoolId: string, query: string) => {
  const { settings } = await import("@/lib/server/settings");
  const answer = await handler(new Request(`${settings().BASE_URL}/api/test${query}`, { headers: { origin: settings().BASE_URL, cookie: shop.owner.cookie } }), { params: Promise.resolve({ spoolId }) });
  expect(answer.status).toBe(200);
  return new Uint8Array(await answer.arrayBuffer());
};
const sheetText = async (spoolId: string, size = "letter") => pdfText(await bytesOf(sheetRoute.GET as never, spoolId, `?size=${size}`));
const patchJob = (jobId: string, body: object) => call(jobRoute.PATCH, { as: shop.owner, method: "PATCH", params: { jobId }, body });

describe("texts", () => {
  test.each(["letter", "A3"])("a note of 2 000 characters stands on the %s sheet to its last word", async (size) => {
    const words = Array.from({ length: 285 }, (_, i) => `w${String(i).padStart(4, "0")}`);
    const note = words.join(" ").slice(0, 2_000);
    const { spoolIds } = await newLine(shop, { ...sampleDocument(unique("L")), notes: [note] });
    const text = await sheetText(spoolIds[0]!, size);
    for (const word of note.split(" ").slice(0, -1)) expect(text).toContain(word);
  });

  test("a title without a space, as long as the form takes, is cut where it has no room and stands whole among the notes", async () => {
    const { jobId, spoolIds } = await newLine(shop);
    const client = `${"ABCDEFGHIJ".repeat(11)}KLMNOPQRSZ`;
    expect((await patchJob(jobId, { client })).status).toBe(200);
    expect((await patchJob(jobId, { client: `${client}!` })).status).toBe(400);
    // Reading across the page mixes its lines with the tables beside them, so the pieces are counted.
    const text = await sheetText(spoolIds[0]!);
    expect(text).toContain("…");
    expect(text).toMatch(/CLIENT:/);
    expect(text).toContain("KLMNOPQRSZ");
    expect(text.split("NOTES")[1]!.match(/[A-J]{8,}[A-Z]*/g)!.join("").replace(/[^A-Z]/g, "").length).toBeGreaterThanOrEqual(client.length);
  });

  test("Chinese, Japanese and Hebrew letters are shown as missing, and the sheet says which; Greek and Cyrillic print", async () => {
    const { jobId, spoolIds } = await newLine(shop);
    await patchJob(jobId, { client: "東京配管", area: "צינור", title: "Завод Ωμέγα" });
    const text = await sheetText(spoolIds[0]!);
    expect(text).toContain("NOT PRINTED HERE");
    for (const code of ["U+6771", "U+4EAC", "U+914D", "U+7BA1"]) expect(text).toContain(code);
    expect(text).toMatch(/and \d more/);
    expect(text).toContain("Завод Ωμέγα");
    const plain = await newLine(shop);
    expect(await sheetText(plain.spoolIds[0]!)).not.toContain("NOT PRINTED");
  });
});

describe("pipes", () => {
  test("a spool of no cut pipe at all prints its sheet and its bench page", async () => {
    const document = sampleDocument(unique("L"));
    const points = [pointAt("a", [0, 0, 0], endFlange), pointAt("b", [76.2 + 3.175 + 152.4, 0, 0]), pointAt("c", [0, 76.2 + 3.175 + 152.4, 0], { ...endFlange, gasketSide: "before", text: "N2" } as typeof endFlange)];
    const { spoolIds } = await newLine(shop, { ...document, runs: [{ ...document.runs[0]!, points }] });
    const text = await sheetText(spoolIds[0]!);
    expect(text).toContain("DRAFT");
    expect(text).not.toMatch(/NaN|undefined|Infinity/);
    expect(pdfText(await bytesOf(benchRoute.GET as never, spoolIds[0]!, "?kind=layout"))).not.toMatch(/NaN|undefined|Infinity/);
  });

  test("a piece longer than every length on the rack is named as not placed, the others are cut", async () => {
    const { spoolId, jobId } = await signed(shop, sampleDocument(unique("L"), 9_000));
    const asked = await call(jobNests.POST, { as: shop.detailer, method: "POST", params: { jobId }, body: { spoolIds: [spoolId], saw: "Band saw", seconds: 1 } });
    const first = (await call(nestRoute.GET, { as: shop.detailer, params: { nestId: asked.json.id } })).json.source.groups[0];
    const stock = [{ nps: first.nps, schedule: first.schedule, material: first.material, lengthMm: 6_096, quantity: null, cost: 200 }];
    expect((await call(shopRoute.PATCH, { as: shop.owner, method: "PATCH", body: { stock } })).status).toBe(200);
    const { id } = (await call(jobNests.POST, { as: shop.detailer, method: "POST", params: { jobId }, body: { spoolIds: [spoolId], saw: "Band saw", seconds: 1 } })).json as { id: string };
    await runNestJob({ shopId: shop.shopId, nestId: id });
    const [group] = (await call(nestRoute.GET, { as: shop.detailer, params: { nestId: id } })).json.result.groups;
    expect(group.unplaced).toHaveLength(1);
    expect(group.bars.length).toBeGreaterThan(0);
  });
});

describe("the order of a title block", () => {
  const order = ["own-1", "sign-off", "client"];

  test("set by the shop, it is a new job's, and prints in that order; the usual one leaves no trace in a sheet's input", async () => {
    const fields = [{ label: "Work order", value: "WO-77" }];
    expect((await call(shopRoute.PATCH, { as: shop.owner, method: "PATCH", body: { fields, titleOrder: order } })).status).toBe(200);
    const { spoolIds, jobId } = await newLine(shop);
    expect((await call(jobRoute.GET, { as: shop.owner, params: { jobId } })).json.titleOrder).toEqual(order);
    const at = (text: string) => (word: string) => text.indexOf(word);
    const ordered = at(await sheetText(spoolIds[0]!, "tabloid"));
    expect(ordered("WORK ORDER")).toBeGreaterThan(0);
    expect(ordered("WORK ORDER")).toBeLessThan(ordered("CLIENT"));
    expect(ordered("CHECKED")).toBeLessThan(ordered("CLIENT"));
    expect((await patchJob(jobId, { titleOrder: [] })).status).toBe(200);
    const usual = at(await sheetText(spoolIds[0]!, "tabloid"));
    expect(usual("CLIENT")).toBeLessThan(usual("WORK ORDER"));
    await call(shopRoute.PATCH, { as: shop.owner, method: "PATCH", body: { fields: [], titleOrder: [] } });
    const created = await call(jobsRoute.POST, { as: shop.owner, method: "POST", body: { number: unique("J"), title: "T", client: "", area: "", units: "imperial" } });
    expect(created.status).toBe(201);
  });

  test("a field that is none, or one twice too many, is refused or counted once", async () => {
    const { jobId } = await newLine(shop);
    expect((await patchJob(jobId, { titleOrder: ["client", "shoe size"] })).status).toBe(400);
    expect((await patchJob(jobId, { titleOrder: Array.from({ length: TITLE_KEYS.length + 1 }, () => "client") })).status).toBe(400);
    expect(titleOrder(["client", "client", "nothing"])).toEqual(TITLE_KEYS);
  });
});
