/** Pages of display items as one web page in a warm headless Chromium, to be printed by it. */
import { readFileSync } from "node:fs";
import path from "node:path";
import { chromium, type Browser, type Page } from "playwright-core";
import { FACES, FACE_NAMES } from "../../fonts/families";
import { drawingSvg, type SheetPage } from "../../iso";

const CHROMIUM = process.env.CHROMIUM_PATH ?? "/usr/bin/chromium";
const FLAGS = ["--no-sandbox", "--disable-gpu", "--disable-quic", "--no-first-run", "--disable-background-networking", "--disable-component-update", "--disable-sync"];

export interface WarmPage {
  /** Puts other content into the page that stays open. */
  load(svgs: string): Promise<void>;
  print(): Promise<Uint8Array>;
  close(): Promise<void>;
}

/** The pages as SVG, one after another; made once, so that Chromium's time has no share of it. */
export function svgsOf(pages: readonly SheetPage[]): string {
  return pages.map(({ items, widthMm, heightMm }) => drawingSvg(items, widthMm, heightMm)).join("");
}

/** The same faces as on paper, within the page, so that nothing is fetched. */
function faces(): string {
  return FACE_NAMES.map((name) => {
    const { file, family, weight } = FACES[name];
    const bytes = readFileSync(path.resolve(import.meta.dirname, "../../fonts", file)).toString("base64");
    return `@font-face{font-family:"${family}";font-weight:${weight};src:url(data:font/ttf;base64,${bytes})}`;
  }).join("");
}

/** Opens Chromium with the pages loaded and their fonts ready. @throws when there is no Chromium that starts. */
export async function openWarmPage(pages: readonly SheetPage[]): Promise<WarmPage> {
  const browser: Browser = await chromium.launch({ executablePath: CHROMIUM, args: FLAGS });
  const page: Page = await browser.newPage();
  const [{ widthMm, heightMm } = { widthMm: 279.4, heightMm: 215.9 }] = pages;
  const style = `${faces()}@page{size:${widthMm}mm ${heightMm}mm;margin:0}body{margin:0}svg{display:block;break-after:page}svg:last-child{break-after:auto}`;
  await page.setContent(`<!doctype html><style>${style}</style><body>${svgsOf(pages)}</body>`);
  await page.evaluate(() => document.fonts.ready.then(() => null));
  return {
    load: (svgs) => page.evaluate((text) => void (document.body.innerHTML = text), svgs),
    print: () => page.pdf({ preferCSSPageSize: true, printBackground: true }),
    close: () => browser.close(),
  };
}
