/** Screens of a running demo: every page of every demo person at desk and phone width, by a headless Chromium. */
import { mkdir } from "node:fs/promises";
import path from "node:path";
import { chromium, type Browser, type Page } from "playwright-core";
import type { JobDetail, JobRow, Role, SpoolDetail } from "@/lib/rules/api-types";
import { DEMO_PASSWORD, DEMO_PEOPLE } from "@/lib/rules/demo-people";
import type { Picture } from "./picture";

const WIDTHS = [["desk", { width: 1440, height: 900 }], ["phone", { width: 390, height: 844 }]] as const;
const FLAGS = ["--no-sandbox", "--disable-gpu", "--disable-quic", "--no-first-run", "--disable-background-networking"];
/** A page that is still busy after this is taken as it is, ms. */
const SETTLED_MS = 15_000;

interface Stop {
  readonly name: string;
  readonly path: string;
}

const SIGNED_OUT: readonly Stop[] = [
  { name: "sign-in", path: "/sign-in" }, { name: "sign-up", path: "/sign-up" }, { name: "reset", path: "/reset" },
  { name: "invitation-unknown", path: "/invitation/unknown-invitation-link" }, { name: "reset-unknown", path: "/reset/unknown-reset-link" },
];

/**
 * Takes the screens into a folder, one after another.
 * @param site address of a running demo, e.g. http://127.0.0.1:3000
 * @throws when the demo cannot be reached or a demo person cannot sign in.
 */
export async function takeScreens(folder: string, site: string, chromiumPath: string, say: (text: string) => void): Promise<Picture[]> {
  await mkdir(folder, { recursive: true });
  const browser = await chromium.launch({ executablePath: chromiumPath, args: FLAGS });
  const pictures: Picture[] = [];
  try {
    for (const [width, viewport] of WIDTHS) {
      for (const role of [null, ...DEMO_PEOPLE.map((person) => person.role)]) {
        pictures.push(...(await screensOf(browser, { folder, site, role, width, viewport }, say)));
      }
    }
  } finally {
    await browser.close();
  }
  return pictures;
}

interface Round {
  readonly folder: string;
  readonly site: string;
  readonly role: Role | null;
  readonly width: string;
  readonly viewport: { readonly width: number; readonly height: number };
}

async function screensOf(browser: Browser, round: Round, say: (text: string) => void): Promise<Picture[]> {
  const { folder, site, role, width, viewport } = round;
  const context = await browser.newContext({ viewport });
  const page = await context.newPage();
  if (role !== null) await signIn(page, site, role);
  const stops = role === null ? SIGNED_OUT : await stopsOf(page, site, role);
  const pictures: Picture[] = [];
  for (const stop of stops) {
    const name = `${width}-${role ?? "visitor"}-${stop.name}`;
    say(`screen ${name}`);
    const file = path.join(folder, `${name}.png`);
    await page.goto(new URL(stop.path, site).href);
    await page.locator("h1").first().waitFor({ timeout: SETTLED_MS }).catch(() => undefined);
    await page.waitForLoadState("networkidle", { timeout: SETTLED_MS }).catch(() => undefined);
    await page.screenshot({ path: file, fullPage: true });
    pictures.push({ group: `Screens, ${width}, ${role ?? "not signed in"}`, file, link: file });
  }
  await context.close();
  return pictures;
}

async function signIn(page: Page, site: string, role: Role): Promise<void> {
  const person = DEMO_PEOPLE.find((one) => one.role === role);
  await page.goto(new URL("/sign-in", site).href);
  await page.getByLabel("E-mail address").fill(person?.email ?? "");
  await page.getByLabel("Password", { exact: true }).fill(DEMO_PASSWORD);
  await page.getByRole("button", { name: "Sign in", exact: true }).click();
  await page.waitForURL((url) => !url.pathname.startsWith("/sign-in"));
}

/** Pages a role works on; lines, spools and revisions as the demo has them, one of each state. */
async function stopsOf(page: Page, site: string, role: Role): Promise<Stop[]> {
  const lists: Stop[] = ["jobs", "bench", "shop", "outbox"].map((name) => ({ name, path: `/${name}` }));
  const read = async <T>(address: string): Promise<T | null> => {
    const answer = await page.context().request.get(new URL(address, site).href);
    return answer.ok() ? ((await answer.json()) as T) : null;
  };
  const [job] = (await read<JobRow[]>("/api/jobs")) ?? [];
  const detail = job ? await read<JobDetail>(`/api/jobs/${job.id}`) : null;
  if (!detail) return lists;
  const stops: Stop[] = [...lists, { name: "job", path: `/jobs/${detail.id}` }];
  const lines = role === "detailer" ? detail.lines : detail.lines.slice(0, 1);
  stops.push(...lines.map((line) => ({ name: `line-${plain(line.number)}`, path: `/lines/${line.id}` })));
  const seen = new Set<string>();
  for (const row of detail.lines.flatMap((line) => line.spools)) {
    const state = row.hold ? "hold" : row.state;
    if (seen.has(state)) continue;
    seen.add(state);
    stops.push({ name: `spool-${state}`, path: `/spools/${row.id}` });
    const newest = (await read<SpoolDetail>(`/api/spools/${row.id}`))?.revisions.at(-1);
    if (newest && role !== "fitter") stops.push({ name: `review-${state}`, path: `/review/${newest.id}` });
    if (newest && role === "owner") stops.push({ name: `status-${state}`, path: newest.statusPath });
  }
  return stops;
}

const plain = (text: string): string => text.toLowerCase().replace(/[^a-z0-9]+/g, "-").replace(/^-|-$/g, "");
