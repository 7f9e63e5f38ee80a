/**
 * The whole main job in a real browser, one walk per role, on the stack its users start: the owner asks people in, the
 * detailer types the run by keyboard alone and submits it, the inspector signs it, the fitter opens and works from it.
 */
import { readdirSync, readFileSync } from "node:fs";
import path from "node:path";
import type { Browser, Page } from "playwright-core";
import { PDFParse } from "pdf-parse";
import { afterAll, beforeAll, describe, expect, test } from "vitest";
import type { JobDetail, LineDetail, SpoolDetail } from "@/lib/rules/api-types";
import { DEMO_PASSWORD } from "@/lib/rules/demo-people";
import { api, Keys, leave, openBrowser, PHONE, site, visit, visitAs } from "./support";

const MOST_KEYSTROKES = 120;
const LINE = '4"-TST-9001';
let browser: Browser;
let lineId = "";
let spoolId = "";
let revisionId = "";

beforeAll(async () => {
  browser = await openBrowser();
});
afterAll(() => browser?.close());

async function pdfText(page: Page, address: string): Promise<string> {
  const answer = await page.context().request.get(site(address));
  expect(answer.headers()["content-type"]).toBe("application/pdf");
  const parser = new PDFParse({ data: new Uint8Array(await answer.body()) });
  const { text } = await parser.getText();
  await parser.destroy();
  return text;
}

describe("detailer", () => {
  test("types the run in at most 120 keystrokes by keyboard alone and gets the sheet", async () => {
    const seen = await visitAs(browser, "detailer");
    const { page } = seen;
    await page.getByRole("link", { name: /2614/ }).first().click();
    await page.getByRole("button", { name: "New line" }).click();
    await page.getByLabel("Line number").fill(LINE);
    await page.getByRole("dialog").getByLabel("Title").fill("Trial run");
    await page.keyboard.press("Enter");
    await page.waitForURL(/\/lines\//);
    lineId = new URL(page.url()).pathname.split("/")[2] ?? "";
    await page.getByRole("gridcell").first().waitFor();
    await page.waitForFunction(() => document.activeElement instanceof HTMLInputElement);
    const keys = new Keys(page);
    await keys.type("wn");
    await keys.press("Enter");
    for (const move of ["e 3-1 1/2", "u 2-8", "n 1-9 3/4"]) {
      await keys.type(move);
      await keys.press("Enter");
    }
    await keys.type("un 3-0");
    await keys.press("Tab");
    await keys.type("gate");
    await keys.press("Enter");
    expect(keys.count).toBeLessThanOrEqual(MOST_KEYSTROKES);
    await expect.poll(() => page.locator("[data-cut]").allTextContents(), { timeout: 20_000 }).toEqual(["28 1/4 in", "19 3/4 in", "13 in", "25 5/8 in"]);
    await expect.poll(async () => (await api<LineDetail>(page, `/api/lines/${lineId}`)).document.runs[0]?.points.length, { timeout: 20_000 }).toBe(5);
    const { spools } = await api<LineDetail>(page, `/api/lines/${lineId}`);
    spoolId = spools[0]?.id ?? "";
    const text = await pdfText(page, `/api/spools/${spoolId}/sheet?size=tabloid`);
    for (const word of ["DRAFT", "28 1/4", "19 3/4", "25 5/8", "Verify", LINE]) expect(text.toLowerCase()).toContain(word.toLowerCase());
    await leave(seen);
  });

  test("submits the spool for review with what it is for", async () => {
    const seen = await visitAs(browser, "detailer");
    const { page } = seen;
    await page.goto(site(`/spools/${spoolId}`));
    await page.getByRole("button", { name: /Submit/ }).first().click();
    await page.getByLabel("What this revision is for").fill("Issued for fabrication");
    await page.getByRole("dialog").getByRole("button", { name: "Submit for review" }).click();
    await expect.poll(async () => (await api<SpoolDetail>(page, `/api/spools/${spoolId}`)).revisions[0]?.state, { timeout: 20_000 }).toBe("for-review");
    revisionId = (await api<SpoolDetail>(page, `/api/spools/${spoolId}`)).revisions[0]?.id ?? "";
    await page.goto(site(`/review/${revisionId}`));
    await page.getByText("Not for you to sign").or(page.getByText("Only an inspector")).first().waitFor();
    expect(await page.getByRole("button", { name: "Sign for fabrication" }).count()).toBe(0);
    await leave(seen);
  });

  test("is told when somebody else saved the line, and nothing is overwritten", async () => {
    const first = await visitAs(browser, "detailer");
    const second = await visitAs(browser, "owner");
    await first.page.goto(site(`/lines/${lineId}`));
    await second.page.goto(site(`/lines/${lineId}`));
    for (const { page } of [first, second]) await page.getByRole("gridcell").first().waitFor();
    const note = (page: Page) => page.getByLabel("Note, row 2");
    await note(second.page).fill("Owner's note");
    await note(second.page).press("Enter");
    const stored = async () => (await api<LineDetail>(first.page, `/api/lines/${lineId}`)).document.runs[0]?.points[1]?.note;
    await expect.poll(stored, { timeout: 20_000 }).toBe("Owner's note");
    await note(first.page).fill("Detailer's note");
    await note(first.page).press("Enter");
    await first.page.getByText(/Ruth Alvarado saved/).first().waitFor();
    expect(await stored()).toBe("Owner's note");
    await leave(second);
    await leave(first);
  });
});

describe("inspector", () => {
  test("reviews the sheet and signs with the password again", async () => {
    const seen = await visitAs(browser, "inspector");
    const { page } = seen;
    await page.goto(site(`/review/${revisionId}`));
    await page.getByRole("button", { name: "Sign for fabrication" }).click();
    const dialog = page.getByRole("dialog");
    await dialog.getByRole("checkbox").check();
    await dialog.getByLabel("Your password, again").fill("not the password");
    await dialog.getByRole("button", { name: "Sign", exact: true }).click();
    await dialog.getByText("That is not your password").first().waitFor();
    await dialog.getByLabel("Your password, again").fill(DEMO_PASSWORD);
    await dialog.getByRole("button", { name: "Sign", exact: true }).click();
    await expect.poll(async () => (await api<SpoolDetail>(page, `/api/spools/${spoolId}`)).revisions[0]?.state, { timeout: 20_000 }).toBe("for-fabrication");
    await leave(seen);
  });

  test("reads a line but finds nothing to type into", async () => {
    const seen = await visitAs(browser, "inspector");
    const { page } = seen;
    await page.goto(site(`/lines/${lineId}`));
    await page.getByRole("gridcell").first().waitFor();
    expect(await page.locator("[data-cell]:not([readonly]):not([disabled])").count()).toBe(0);
    await leave(seen);
  });
});

describe("fitter", () => {
  test("finds the sheet on a phone, opens the PDF and records a cut", async () => {
    const seen = await visitAs(browser, "fitter", PHONE);
    const { page } = seen;
    expect(new URL(page.url()).pathname).toBe("/bench");
    const card = page.getByRole("listitem").filter({ hasText: LINE });
    const address = (await card.getByRole("link", { name: "Open the sheet" }).getAttribute("href")) ?? "";
    const text = await pdfText(page, address);
    for (const word of ["FOR FABRICATION", "28 1/4", "UNCONTROLLED COPY"]) expect(text).toContain(word);
    await card.getByRole("button", { name: "Record work" }).click();
    await card.getByRole("button", { name: /^Record cut of P1$/i }).click();
    const dialog = page.getByRole("dialog");
    await dialog.getByLabel(/Heat/).fill("H-5150");
    await dialog.getByRole("button", { name: "Record", exact: true }).click();
    await expect.poll(async () => (await api<SpoolDetail>(page, `/api/spools/${spoolId}`)).work.length, { timeout: 20_000 }).toBe(1);
    await leave(seen);
  });

  test("is refused what is a detailer's, on the page and at the route", async () => {
    const seen = await visitAs(browser, "fitter", PHONE);
    const { page } = seen;
    const answer = await page.context().request.get(site(`/api/lines/${lineId}`));
    expect(answer.status()).toBe(403);
    await page.goto(site(`/lines/${lineId}`));
    await page.getByText("Fitters see issued sheets only.").first().waitFor();
    await leave(seen);
  });
});

describe("anybody with the sheet", () => {
  test("sees at its QR address that it is the one to work from, and has a PDF recognised", async () => {
    const signedIn = await visitAs(browser, "fitter");
    const spool = await api<SpoolDetail>(signedIn.page, `/api/spools/${spoolId}`);
    const pdf = await (await signedIn.context.request.get(site(`/api/revisions/${revisionId}/sheet?kind=fabrication`))).body();
    await leave(signedIn);
    const seen = await visit(browser, PHONE);
    await seen.page.goto(site(spool.revisions[0]?.statusPath ?? ""));
    await seen.page.getByText("CURRENT", { exact: true }).first().waitFor();
    await seen.page.locator("input[type=file]").setInputFiles({ name: "sheet.pdf", mimeType: "application/pdf", buffer: pdf });
    await seen.page.getByText(/recogni[sz]ed|this revision/i).first().waitFor();
    await leave(seen);
  });
});

describe("owner", () => {
  test("asks somebody in by mail; the link works once; the person works and is out at once when removed", async () => {
    const owner = await visitAs(browser, "owner");
    await owner.page.goto(site("/shop"));
    const email = "nadia@copperbay.example";
    await owner.page.getByLabel("E-mail address").fill(email);
    await owner.page.getByLabel("Role").last().selectOption("detailer");
    await owner.page.getByRole("button", { name: /invit/i }).first().click();
    const token = await expect.poll(() => invitationToken(email), { timeout: 30_000 }).toBeTruthy().then(() => invitationToken(email));
    const guest = await visit(browser);
    await guest.page.goto(site(`/invitation/${token}`));
    await guest.page.getByLabel(/Your name/).fill("Nadia Brandt");
    await guest.page.getByLabel(/Password/).first().fill("five words in a row");
    await guest.page.getByRole("button", { name: /Join/ }).click();
    await guest.page.waitForURL(/\/(sign-in|jobs)/);
    if (guest.page.url().includes("/sign-in")) {
      await guest.page.getByLabel("E-mail address").fill(email);
      await guest.page.getByLabel("Password", { exact: true }).fill("five words in a row");
      await guest.page.getByRole("button", { name: "Sign in", exact: true }).click();
      await guest.page.waitForURL(/\/jobs/);
    }
    const jobs = await api<{ id: string }[]>(guest.page, "/api/jobs");
    expect((await api<JobDetail>(guest.page, `/api/jobs/${jobs[0]?.id}`)).lines.length).toBeGreaterThan(5);
    const people = await api<{ id: string; email: string }[]>(owner.page, "/api/shop/people");
    const member = people.find((person) => person.email === email);
    const removed = await owner.context.request.delete(site(`/api/shop/people/${member?.id}`), { headers: { origin: site() } });
    expect(removed.ok()).toBe(true);
    expect((await guest.context.request.get(site("/api/jobs"))).status()).toBe(401);
    await guest.page.goto(site("/jobs"));
    await guest.page.waitForURL(/\/sign-in/);
    guest.trouble.length = 0;
    await leave(guest);
    await leave(owner);
  });

  test("sees the log whole, with the signature in it", async () => {
    const seen = await visitAs(browser, "owner");
    const audit = await api<{ broken: string | null; rows: { text: string }[] }>(seen.page, "/api/shop/audit");
    expect(audit.broken).toBeNull();
    expect(audit.rows.map((row) => row.text).join("\n")).toMatch(/Signed sheet \d{4} revision A for fabrication/);
    await leave(seen);
  });
});

/** The link in the newest mail to somebody, from the outbox the demo keeps. */
function invitationToken(email: string): string | null {
  const folder = process.env.OUTBOX_DIR ?? "";
  const mails = readdirSync(folder)
    .filter((name) => name.endsWith(".json"))
    .map((name) => JSON.parse(readFileSync(path.join(folder, name), "utf8")) as { to: string[]; text: string })
    .filter((mail) => mail.to.includes(email));
  return /\/invitation\/([A-Za-z0-9_-]+)/.exec(mails[mails.length - 1]?.text ?? "")?.[1] ?? null;
}
