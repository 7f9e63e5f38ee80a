/** The shop's word on take-outs: the newest counts, it reaches the line and its sheet, and whoever measured does not sign. */
import { afterAll, beforeAll, describe, expect, test } from "vitest";
import { elbowKey, INCH_MM } from "@/iso";
import * as lineRoute from "@/app/api/lines/[lineId]/route";
import * as sign from "@/app/api/revisions/[revisionId]/sign/route";
import * as takeOuts from "@/app/api/shop/take-outs/route";
import { signBody, submitted } from "./revision-support";
import { call, endOfFile, newLine, newShop, type TestShop } from "./support";

let shop: TestShop;
beforeAll(async () => {
  shop = await newShop();
});
afterAll(endOfFile);

const word = (key: string, valueMm: number | null) => call(takeOuts.POST, { as: shop.owner, method: "POST", body: { key, valueMm } });
const signAs = (who: "owner" | "inspector", revisionId: string) => call(sign.POST, { as: shop[who], method: "POST", params: { revisionId }, body: signBody });

describe("take-outs", () => {
  test("the newest word on a key counts, and goes with the line", async () => {
    const key = elbowKey("lr-90", "8");
    await word(key, 300);
    await word(key, null);
    expect((await word(key, 12.03 * INCH_MM)).status).toBe(201);
    const words = (await call(takeOuts.GET, { as: shop.fitter })).json as { key: string; valueMm: number; by: string }[];
    expect(words.filter((one) => one.key === key)).toMatchObject([{ valueMm: 12.03 * INCH_MM, by: "Olive Owner" }]);
    const { lineId } = await newLine(shop);
    expect((await call(lineRoute.GET, { as: shop.detailer, params: { lineId } })).json.takeOuts).toEqual(words);
  });

  test("a measured take-out that is in the spool keeps who measured it from signing; a confirmed or unused one does not", async () => {
    await word(elbowKey("lr-90", "12"), 460);
    await word(elbowKey("lr-90", "4"), null);
    const free = await submitted(shop);
    expect((await signAs("owner", free.revisionId)).status).toBe(200);
    await word(elbowKey("lr-90", "4"), 155);
    const bound = await submitted(shop);
    const refused = await signAs("owner", bound.revisionId);
    expect(refused.status).toBe(403);
    expect(refused.json.message).toMatch(/second person/);
    expect((await signAs("inspector", bound.revisionId)).status).toBe(200);
  });
});
