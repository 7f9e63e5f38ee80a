/** Surveys: every role writes them, versions tell two savers apart, and what is no survey is refused. */
import { afterAll, beforeAll, describe, expect, test } from "vitest";
import * as photos from "@/app/api/lines/[lineId]/survey/photos/route";
import * as surveyRoute from "@/app/api/lines/[lineId]/survey/route";
import { emptySurvey, type SurveyDocument } from "@/iso";
import { AuditEvent, Survey } from "@/models";
import { pngFile } from "./files";
import { call, endOfFile, newLine, newShop, ROLES, type TestPerson, type TestShop } from "./support";

let shop: TestShop;
beforeAll(async () => {
  shop = await newShop();
});
afterAll(endOfFile);

const survey = (note: string): SurveyDocument => ({ ...emptySurvey("imperial"), note });
const put = (as: TestPerson, lineId: string, version: number, document: unknown) => call(surveyRoute.PUT, { as, method: "PUT", params: { lineId }, body: { version, document } });
const get = (as: TestPerson, lineId: string) => call(surveyRoute.GET, { as, params: { lineId } });

describe("a line's survey", () => {
  test("is empty in the line's unit until somebody saves one, and a fitter sees nothing of the run", async () => {
    const { lineId } = await newLine(shop);
    const { status, json } = await get(shop.fitter, lineId);
    expect(status).toBe(200);
    expect(json).toMatchObject({ version: 0, document: emptySurvey("imperial"), updatedBy: null, uploads: [] });
    expect(json.odMm).toBeCloseTo(114.3, 1);
    expect(JSON.stringify(json)).not.toContain("runs");
  });

  test("every role writes it, one version after the other, each in the log", async () => {
    const { lineId } = await newLine(shop);
    for (const [version, role] of ROLES.entries()) expect((await put(shop[role], lineId, version, survey(role))).json).toMatchObject({ version: version + 1 });
    const { json } = await get(shop.owner, lineId);
    expect(json).toMatchObject({ version: 4, document: { note: "fitter" }, updatedBy: "Pat fitter" });
    expect(await Survey.count({ where: { shopId: shop.shopId, lineId } })).toBe(1);
    const told = await AuditEvent.count({ where: { shopId: shop.shopId, type: "survey.saved" } });
    expect(told).toBe(4);
  });

  test("of two savers of one version the second is handed the first one's survey; saving the same twice is no conflict", async () => {
    const { lineId } = await newLine(shop);
    await put(shop.fitter, lineId, 0, survey("first"));
    const late = await put(shop.inspector, lineId, 0, survey("second"));
    expect(late.status).toBe(409);
    expect(late.json).toMatchObject({ code: "conflict", currentVersion: 1, by: "Pat fitter", document: { note: "first" } });
    expect((await put(shop.fitter, lineId, 0, survey("first"))).json).toMatchObject({ version: 1 });
    const both = await Promise.all([put(shop.fitter, lineId, 1, survey("a")), put(shop.owner, lineId, 1, survey("b"))]);
    expect(both.map((answer) => answer.status).sort()).toEqual([200, 409]);
  });

  test("what is no survey is refused and changes nothing", async () => {
    const { lineId } = await newLine(shop);
    for (const document of [{}, { ...survey(""), schema: 2 }, { ...survey(""), readings: [{ id: "x" }] }, { ...survey(""), note: "x".repeat(3_000) }]) {
      const answer = await put(shop.fitter, lineId, 0, document);
      expect(answer.status).toBe(400);
      expect(answer.json.message).toContain("not a survey");
    }
    expect((await get(shop.owner, lineId)).json.version).toBe(0);
  });

  test("a fitter's photo is kept with the line's sketches", async () => {
    const { lineId } = await newLine(shop);
    const answer = await call(photos.POST, { as: shop.fitter, method: "POST", params: { lineId }, file: { name: "face.png", bytes: pngFile() } });
    expect(answer.status).toBe(201);
    expect((await get(shop.fitter, lineId)).json.uploads).toMatchObject([{ name: "face.png", by: "Pat fitter" }]);
  });
});
