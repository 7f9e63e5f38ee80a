/**
 * Every page at desk and phone width, as the role that uses it: axe finds nothing, nothing runs wider than the screen,
 * and no script fails. Rules of WCAG 2.2 A and AA as axe-core checks them.
 */
import AxeBuilder from "@axe-core/playwright";
import type { Browser } from "playwright-core";
import { afterAll, beforeAll, describe, expect, test } from "vitest";
import type { BenchRow, JobDetail, JobRow, Role, SpoolDetail } from "@/lib/rules/api-types";
import { api, DESK, leave, openBrowser, PHONE, site, visit, visitAs, type Visit } from "./support";

let browser: Browser;
const pages: { role: Role | null; path: string }[] = [
  { role: null, path: "/sign-in" }, { role: null, path: "/sign-up" }, { role: null, path: "/reset" },
  { role: null, path: "/reset/not-a-real-token-but-long-enough" }, { role: null, path: "/invitation/not-a-real-token-but-long-enough" },
  { role: "owner", path: "/jobs" }, { role: "owner", path: "/shop" }, { role: "owner", path: "/outbox" }, { role: "fitter", path: "/bench" },
];

beforeAll(async () => {
  browser = await openBrowser();
  const seen = await visitAs(browser, "owner");
  const [job] = await api<JobRow[]>(seen.page, "/api/jobs");
  const detail = await api<JobDetail>(seen.page, `/api/jobs/${job?.id}`);
  const [bench] = await api<BenchRow[]>(seen.page, "/api/bench");
  const spool = await api<SpoolDetail>(seen.page, `/api/spools/${bench?.spoolId}`);
  const underReview = detail.lines.flatMap((line) => line.spools).find((row) => row.state === "for-review");
  const review = await api<SpoolDetail>(seen.page, `/api/spools/${underReview?.id}`);
  pages.push(
    { role: "detailer", path: `/jobs/${job?.id}` },
    ...detail.lines.slice(0, 3).map((line) => ({ role: "detailer" as const, path: `/lines/${line.id}` })),
    { role: "inspector", path: `/lines/${detail.lines[0]?.id}` },
    { role: "fitter", path: `/lines/${detail.lines[0]?.id}/survey` },
    { role: "detailer", path: `/spools/${spool.id}` },
    { role: "fitter", path: `/spools/${spool.id}` },
    { role: "detailer", path: `/spools/${spool.id}/compare` },
    { role: "owner", path: `/jobs/${job?.id}/withdrawals` },
    { role: "fitter", path: `/spools/${spool.id}/withdrawals` },
    { role: "inspector", path: `/review/${review.revisions.at(-1)?.id}` },
    { role: null, path: spool.revisions[0]?.statusPath ?? "" },
  );
  await leave(seen);
});
afterAll(() => browser?.close());

async function look(seen: Visit, path: string): Promise<string[]> {
  await seen.page.goto(site(path));
  await seen.page.locator("h1").first().waitFor();
  await seen.page.waitForLoadState("networkidle");
  const found = await new AxeBuilder({ page: seen.page }).withTags(["wcag2a", "wcag2aa", "wcag21a", "wcag21aa", "wcag22aa"]).analyze();
  const problems = found.violations.map((v) => `${path}: ${v.id} (${v.nodes.length}) ${v.nodes[0]?.html.slice(0, 160)}`);
  const [wide, width] = await seen.page.evaluate(() => [document.documentElement.scrollWidth, window.innerWidth]);
  if ((wide ?? 0) > (width ?? 0) + 1) problems.push(`${path}: ${wide} px wide on a screen of ${width}`);
  return problems;
}

describe.each([["desk", DESK], ["phone", PHONE]] as const)("at %s width", (_name, viewport) => {
  test.each([null, "owner", "detailer", "inspector", "fitter"] as const)("the pages of %s are clean", async (role) => {
    const seen = role === null ? await visit(browser, viewport) : await visitAs(browser, role, viewport);
    const problems: string[] = [];
    for (const page of pages.filter((p) => p.role === role)) problems.push(...(await look(seen, page.path)));
    expect(problems).toEqual([]);
    await leave(seen);
  });
});
