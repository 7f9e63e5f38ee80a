/**
 * The survey on a phone with the network cut: readings typed without a signal, the tab closed, opened again still without
 * one, sent when it returns; and a row somebody else changed meanwhile, asked about with both values.
 */
import type { Browser, Page } from "playwright-core";
import { afterAll, beforeAll, expect, test } from "vitest";
import type { JobDetail, JobRow } from "@/lib/rules/api-types";
import type { SurveyDetail } from "@/lib/rules/survey-api-types";
import { api, leave, openBrowser, PHONE, site, visitAs, type Visit } from "./support";

let browser: Browser;
let lineId: string;
let fitter: Visit;

beforeAll(async () => {
  browser = await openBrowser();
  const owner = await visitAs(browser, "owner");
  const [job] = await api<JobRow[]>(owner.page, "/api/jobs");
  const detail = await api<JobDetail>(owner.page, `/api/jobs/${job?.id}`);
  lineId = detail.lines[0]?.id ?? "";
  await leave(owner);
  fitter = await visitAs(browser, "fitter", PHONE);
});
afterAll(() => browser?.close());

const path = () => site(`/lines/${lineId}/survey`);
const stored = (page: Page) => api<SurveyDetail>(page, `/api/lines/${lineId}/survey`);
const readings = (page: Page) => page.getByRole("list").filter({ has: page.getByRole("heading", { name: /^1\. / }) });
const card = (page: Page, number: number) => page.getByRole("listitem", { name: new RegExp(`^Reading ${number},`) });

async function addTape(page: Page, number: number, from: string, to: string, length: string): Promise<void> {
  await page.getByRole("button", { name: "Add tape" }).click();
  const row = card(page, number);
  await row.getByLabel("From mark").fill(from);
  await row.getByLabel("To mark").fill(to);
  await row.getByLabel("Reading", { exact: true }).fill(length);
}

test("readings taken without a signal outlive a closed tab and go out when the signal returns", async () => {
  const { context, page } = fitter;
  await page.goto(path());
  await page.getByRole("heading", { name: "Readings" }).waitFor();
  await addTape(page, 1, "A", "B", "96");
  await page.getByText("Saved on the server").waitFor();
  // The worker has the page once its cache holds it.
  await page.waitForFunction(async (at) => !!(await (await caches.open("survey-page-1")).match(new URL(at).pathname)), path());

  await context.setOffline(true);
  await addTape(page, 2, "A", "C", "72 1/2");
  await page.getByText("Kept on this device").waitFor();
  expect((await stored(page).catch(() => null))?.document.readings ?? []).not.toHaveLength(2);
  await page.close();

  const again = await context.newPage();
  await again.goto(path());
  await readings(again).waitFor();
  expect(await card(again, 2).getByLabel("Reading", { exact: true }).inputValue()).toBe("72 1/2");
  await addTape(again, 3, "B", "C", "104");

  await context.setOffline(false);
  await again.getByText("Saved on the server").waitFor({ timeout: 30_000 });
  expect((await stored(again)).document.readings.map((reading) => reading.first[0])).toEqual(["96", "72 1/2", "104"]);
  await again.close();
});

test("a row changed on two devices is shown with both values, and the chosen one is kept", async () => {
  const { context } = fitter;
  const phone = await context.newPage();
  await phone.goto(path());
  await readings(phone).waitFor();
  const desk = await visitAs(browser, "detailer");
  await desk.page.goto(path());
  await readings(desk.page).waitFor();

  await context.setOffline(true);
  await card(phone, 1).getByLabel("Reading", { exact: true }).fill("96 1/4");
  await phone.getByText("Kept on this device").waitFor();
  await card(desk.page, 1).getByLabel("Reading", { exact: true }).fill("95 3/4");
  await card(desk.page, 2).getByLabel("Again", { exact: true }).fill("72 5/8");
  await desk.page.getByText("Kept on this device").waitFor();
  await desk.page.getByText("Saved on the server").waitFor();

  await context.setOffline(false);
  const question = phone.getByRole("region", { name: "Changed by two" });
  await question.waitFor({ timeout: 30_000 });
  expect(await question.innerText()).toMatch(/96 1\/4[\s\S]*95 3\/4/);
  await phone.reload();
  await question.waitFor();
  await question.getByRole("button", { name: "Keep mine" }).click();
  await phone.getByText("Saved on the server").waitFor();
  const { document } = await stored(phone);
  expect(document.readings[0]?.first).toEqual(["96 1/4"]);
  expect(document.readings[1]?.again).toEqual(["72 5/8"]);
  await phone.close();
  await leave(desk);
});

test("a photo taken without a signal waits on the device and is sent after", async () => {
  const { context } = fitter;
  const page = await context.newPage();
  await page.goto(path());
  await readings(page).waitFor();
  await context.setOffline(true);
  const png = Buffer.from("iVBORw0KGgoAAAANSUhEUgAAAAEAAAABCAYAAAAfFcSJAAAADUlEQVR42mNk+M9QDwADhgGAWjR9awAAAABJRU5ErkJggg==", "base64");
  await page.getByLabel("Add a photo").setInputFiles({ name: "face.png", mimeType: "image/png", buffer: png });
  await page.getByText("waits for a signal").waitFor();
  await context.setOffline(false);
  await page.getByText("waits for a signal").waitFor({ state: "detached", timeout: 30_000 });
  expect((await stored(page)).uploads.map((upload) => upload.name)).toContain("face.png");
  await page.close();
  await context.close();
});
