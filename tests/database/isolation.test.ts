/**
 * Shops apart. The routes are read from the folder itself, so a new one without a recipe fails here. Each request first
 * succeeds for its owner; the same request from another shop's owner answers 404 and leaves every table as it was.
 */
import { afterAll, beforeAll, describe, expect, test } from "vitest";
import { RECIPES } from "./isolation-recipes";
import { everyRoute } from "./routes";
import { call, endOfFile, newShop, tablePrints, type TestShop, withClient } from "./support";

/** Everything that belongs to one shop, for requests that may change the sender's own. */
async function shopPrints(shopId: string): Promise<Record<string, string>> {
  return withClient("super", async (client) => {
    const tables = await client.query<{ name: string }>(
      "SELECT table_name AS name FROM information_schema.columns WHERE table_schema = 'public' AND column_name = 'shop_id' AND table_name <> 'sessions' ORDER BY 1",
    );
    const prints: Record<string, string> = {};
    for (const { name } of tables.rows) {
      const print = await client.query<{ print: string }>(`SELECT coalesce(md5(string_agg(md5(t::text), '' ORDER BY md5(t::text))), '') AS print FROM ${name} t WHERE shop_id = $1`, [shopId]);
      prints[name] = print.rows[0]?.print ?? "";
    }
    return prints;
  });
}

/** Ids that only one shop's answers may show. */
async function shopIds(shopId: string): Promise<string[]> {
  return withClient("super", async (client) => {
    const ids = await client.query<{ id: string }>(
      `SELECT id FROM jobs WHERE shop_id = $1 UNION SELECT id FROM lines WHERE shop_id = $1 UNION SELECT id FROM spools WHERE shop_id = $1
       UNION SELECT id FROM revisions WHERE shop_id = $1 UNION SELECT id FROM memberships WHERE shop_id = $1 UNION SELECT id FROM invitations WHERE shop_id = $1`,
      [shopId],
    );
    return [shopId, ...ids.rows.map((row) => row.id)];
  });
}

const NO_ID = "00000000-0000-4000-8000-000000000000";
/** Ids of the right shape that nothing has. */
const NO_IDS = Object.fromEntries([...["jobId", "lineId", "spoolId", "revisionId", "uploadId", "membershipId", "invitationId", "sessionId"].map((name) => [name, NO_ID]), ["key", "0".repeat(64)]]);
/** What a fitter may write: their own entries, copies taken out of use, readings and photos of a survey, their own sessions, which of their shops they look at. */
const FITTER_WRITES = ["POST /jobs/[jobId]/packages", "POST /packages/[packageId]/cancel", "POST /packages/[packageId]/again", "POST /spools/[spoolId]/work", "POST /spools/[spoolId]/as-fitted", "POST /copies/withdraw", "PUT /lines/[lineId]/survey", "POST /lines/[lineId]/survey/photos", "DELETE /sessions/[sessionId]", "POST /viewer/shop"];

const routes = await everyRoute();
let first: TestShop;
let other: TestShop;

beforeAll(async () => {
  first = await newShop();
  other = await newShop();
});
afterAll(endOfFile);

describe("shops are apart", () => {
  test("every route and method has a recipe, and every recipe a route", () => {
    expect(routes.length).toBeGreaterThan(40);
    expect(routes.map((route) => route.name).sort()).toEqual(Object.keys(RECIPES).sort());
  });

  for (const route of routes) {
    const recipe = RECIPES[route.name];
    if (recipe === undefined || recipe.scope === "public") continue;
    test(`${route.name} (${recipe.scope})`, async () => {
      const sent = await recipe.make(first);
      const owners = await call(route.handler, { ...sent, as: first.owner, method: route.method });
      expect(owners.status, owners.text.slice(0, 400)).toBeGreaterThanOrEqual(200);
      expect(owners.status, owners.text.slice(0, 400)).toBeLessThan(300);
      if (recipe.scope === "foreign-id") {
        const before = await tablePrints();
        const others = await call(route.handler, { ...sent, as: other.owner, method: route.method });
        expect(others.status, others.text.slice(0, 400)).toBe(404);
        expect(others.json.code).toBe("not-found");
        expect(await tablePrints()).toEqual(before);
      } else {
        const before = await shopPrints(first.shopId);
        const others = await call(route.handler, { ...sent, as: other.owner, method: route.method });
        expect(others.status, others.text.slice(0, 400)).toBeLessThan(300);
        for (const id of await shopIds(first.shopId)) expect(others.text).not.toContain(id);
        expect(await shopPrints(first.shopId)).toEqual(before);
      }
    });
  }

  for (const route of routes) {
    const recipe = RECIPES[route.name];
    if (recipe === undefined || recipe.scope === "public") continue;
    test(`${route.name} answers 401 to nobody, and a write from another site 403`, async () => {
      const params = NO_IDS;
      const nobody = await call(route.handler, { params, method: route.method });
      expect(nobody.status).toBe(401);
      if (route.method === "GET") return;
      const foreignSite = await call(route.handler, { as: first.owner, params, method: route.method, headers: { origin: "https://elsewhere.example" } });
      expect(foreignSite.status).toBe(403);
    });
  }

  for (const route of routes.filter((one) => one.method !== "GET" && RECIPES[one.name]?.scope !== "public" && !FITTER_WRITES.includes(one.name))) {
    test(`${route.name} answers 403 to a fitter`, async () => {
      const answer = await call(route.handler, { as: first.fitter, params: NO_IDS, method: route.method });
      expect(answer.status).toBe(403);
      expect(answer.json.code).toBe("forbidden");
    });
  }

  for (const route of routes.filter((one) => RECIPES[one.name]?.scope === "foreign-id" && one.name.includes("["))) {
    test(`${route.name} answers 404 to what is no id`, async () => {
      const params = Object.fromEntries([...route.name.matchAll(/\[(\w+)\]/g)].map((match) => [match[1]!, "1' OR '1'='1"]));
      const answer = await call(route.handler, { as: first.owner, params, method: route.method });
      expect(answer.status).toBe(404);
    });
  }
});
