/**
 * One spool sheet from its frozen input to PDF bytes, against two other ways to the same page.
 * Chromium: a warm headless one with the page open, its fonts loaded and the SVG made beforehand from the same display
 * items, so that only its printing counts, against painting the same items: the same page from the same start. Told beside it:
 * Chromium with the SVG put into the page each time, and our side composing and drawing the sheet as well, which
 * Chromium's SVG needs too. Replay: the calls painting makes on pdfkit, made again on a fresh document, which
 * gives the same bytes and has nothing to decide. The logo is left out on all sides: it is no display item.
 * Bytes a page: of this sheet alone, and of all demo sheets painted into one file, as a package would be, whose pages share
 * their fonts; the budget is the package's.
 */
import { PDFDocument } from "pdf-lib";
import { measureText } from "../../fonts/widths";
import { composeSheet, type SheetPage } from "../../iso";
import { paintSheet } from "../../pdf/paint-sheet";
import { demoSheetInput, demoSpools, type DemoSpool } from "../../scripts/gallery/demo-sheets";
import { openWarmPage, svgsOf, type WarmPage } from "./chromium-page";
import { recordCalls, replayCalls } from "./pdf-calls";
import { medianTimesUs, timeText, type BenchLine } from "./stopwatch";

/** The demo line with the most on its sheet. */
const LINE = "chillerHeader";
const REPLAY_ROUNDS = 25;
const PRINT_ROUNDS = 9;
const KILOBYTE = 1000;

const paint = (pages: readonly SheetPage[]): Promise<Uint8Array> => paintSheet({ pages, issuedAt: "2026-11-16T15:20:00Z", title: "Bench", logo: null });

const composed = (spool: DemoSpool): SheetPage[] => composeSheet(demoSheetInput(spool, "tabloid", "for-fabrication"), measureText);

function compose(): SheetPage[] {
  const spool = demoSpools().find(({ name }) => name === LINE);
  if (spool === undefined) throw new Error(`There is no demo line ${LINE} any longer.`);
  return composed(spool);
}

async function bytesRow(name: string, pages: readonly SheetPage[], budget?: number): Promise<BenchLine> {
  const { length } = await paint(pages);
  return { name, figure: length / pages.length / KILOBYTE, unit: "KB", budget, detail: `${length} bytes, ${pages.length} pages, fonts within` };
}

async function againstReplay(pages: readonly SheetPage[]): Promise<BenchLine[]> {
  const log = await recordCalls(() => paint(pages));
  const [painted, replayed] = [await paint(pages), await replayCalls(log)];
  if (!Buffer.from(painted).equals(Buffer.from(replayed))) throw new Error("The replay of the calls gives other bytes than painting: the two cannot be compared.");
  const [paintUs = NaN, replayUs = NaN] = await medianTimesUs(
    [
      { name: "paint", times: 2, work: () => paint(pages) },
      { name: "replay", times: 2, work: () => replayCalls(log) },
    ],
    REPLAY_ROUNDS,
  );
  return [
    { name: "paint a sheet : replay its pdfkit calls", figure: paintUs / replayUs, budget: 1.3, detail: `${timeText(paintUs)} : ${timeText(replayUs)}, ${log.calls} calls, same bytes` },
    await bytesRow("bytes a page of that sheet alone", pages),
    await bytesRow("bytes a page, all demo sheets in one file", demoSpools().flatMap(composed), 20),
  ];
}

async function againstChromium(pages: readonly SheetPage[]): Promise<BenchLine[]> {
  const name = "print by Chromium : paint the same pages";
  let warm: WarmPage;
  try {
    warm = await openWarmPage(pages);
  } catch (error) {
    return [{ name, skipped: `Chromium does not start: ${String(error).split("\n")[0]}` }];
  }
  try {
    return await timed(warm, pages, name);
  } finally {
    await warm.close();
  }
}

async function timed(warm: WarmPage, pages: readonly SheetPage[], name: string): Promise<BenchLine[]> {
  const svgs = svgsOf(pages);
  const printed = await warm.print();
  const count = (await PDFDocument.load(printed)).getPageCount();
  if (count !== pages.length) throw new Error(`Chromium printed ${count} pages of ${pages.length}: the two cannot be compared.`);
  const [oursUs = NaN, paintUs = NaN, printUs = NaN, loadUs = NaN] = await medianTimesUs(
    [
      { name: "compose and paint", times: 1, work: async () => paint(compose()) },
      { name: "paint", times: 5, work: () => paint(pages) },
      { name: "print", times: 1, work: () => warm.print() },
      { name: "load and print", times: 1, work: () => warm.load(svgs).then(() => warm.print()) },
    ],
    PRINT_ROUNDS,
  );
  return [
    { name, figure: printUs / paintUs, budget: 4, atLeast: true, detail: `${timeText(printUs)} : ${timeText(paintUs)}, Chromium's file ${Math.round(printed.length / KILOBYTE)} KB` },
    { name: "put in and print by Chromium : paint", figure: loadUs / paintUs, detail: `${timeText(loadUs)} : ${timeText(paintUs)}` },
    { name: "put in and print by Chromium : compose and paint", figure: loadUs / oursUs, detail: `${timeText(loadUs)} : ${timeText(oursUs)}` },
  ];
}

export async function measure(): Promise<BenchLine[]> {
  const pages = compose();
  return [...(await againstChromium(pages)), ...(await againstReplay(pages))];
}
