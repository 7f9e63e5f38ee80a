/** What browser tests share: one Chromium, pages that fail the test when a script does, and the demo people's sign-in. */
import { chromium, type Browser, type BrowserContext, type Page } from "playwright-core";
import { expect } from "vitest";
import { DEMO_PASSWORD, DEMO_PEOPLE } from "@/lib/rules/demo-people";
import type { Role } from "@/lib/rules/api-types";

const CHROMIUM = process.env.CHROMIUM_PATH ?? "/usr/bin/chromium";
const FLAGS = ["--no-sandbox", "--disable-gpu", "--disable-quic", "--no-first-run", "--disable-background-networking", "--disable-component-update", "--disable-sync"];

export const DESK = { width: 1440, height: 900 };
export const PHONE = { width: 390, height: 844 };

/** Address of the running stack. @throws when the tests run without their set-up. */
export function site(path = ""): string {
  const base = process.env.QUARTERLINE_TEST_BASE_URL;
  if (!base) throw new Error("The browser tests have no stack to look at.");
  return `${base}${path}`;
}

export function openBrowser(): Promise<Browser> {
  return chromium.launch({ executablePath: CHROMIUM, args: FLAGS });
}

export interface Visit {
  readonly context: BrowserContext;
  readonly page: Page;
  /** What went wrong in the page: script errors, refused scripts, failed requests of our own. */
  readonly trouble: string[];
}

/** A fresh browser context with one page that notes every trouble. */
export async function visit(browser: Browser, viewport = DESK): Promise<Visit> {
  const context = await browser.newContext({ viewport, acceptDownloads: true });
  const page = await context.newPage();
  const trouble: string[] = [];
  page.on("pageerror", (error) => trouble.push(`script: ${error.message}`));
  page.on("console", (message) => {
    if (message.type() === "error" && !/status of (400|401|403|404|409|410)/.test(message.text())) trouble.push(`console: ${message.text()}`);
  });
  page.on("response", (response) => {
    if (response.status() >= 500) trouble.push(`${response.status()} ${response.url()}`);
  });
  return { context, page, trouble };
}

/** Signs a person in through the page. */
export async function signIn(page: Page, email: string, password: string): Promise<void> {
  await page.goto(site("/sign-in"));
  await page.getByLabel("E-mail address").fill(email);
  await page.getByLabel("Password", { exact: true }).fill(password);
  await page.getByRole("button", { name: "Sign in", exact: true }).click();
  await page.waitForURL((url) => url.pathname !== "/" && !url.pathname.startsWith("/sign-in"));
}

/** A visit signed in as the demo person of a role. */
export async function visitAs(browser: Browser, role: Role, viewport = DESK): Promise<Visit> {
  const made = await visit(browser, viewport);
  const person = DEMO_PEOPLE.find((p) => p.role === role);
  if (person === undefined) throw new Error(`No demo ${role}`);
  await signIn(made.page, person.email, DEMO_PASSWORD);
  return made;
}

/** Ends a visit; anything that went wrong in it fails the test. */
export async function leave({ context, trouble }: Visit): Promise<void> {
  await context.close();
  expect(trouble).toEqual([]);
}

/** JSON of an own address, as the page's person. */
export async function api<T>(page: Page, path: string): Promise<T> {
  const answer = await page.context().request.get(site(path));
  expect(answer.ok(), `${path}: ${answer.status()}`).toBe(true);
  return (await answer.json()) as T;
}

/** One key at a time into whatever has the focus, counted. */
export class Keys {
  count = 0;
  constructor(private readonly page: Page) {}

  async type(text: string): Promise<void> {
    for (const key of text) {
      await this.page.keyboard.type(key);
      this.count += 1;
    }
  }

  async press(key: string): Promise<void> {
    await this.page.keyboard.press(key);
    this.count += 1;
  }
}
