/**
 * Composing a spool sheet: from one frozen value to pages of display items, which both painters understand. Pure: equal
 * input and measure give equal pages, in the browser and on the server.
 */
import { drawSheets } from "../draw/draw-sheets";
import type { MeasureText } from "../draw/drawing-types";
import type { PaperBox } from "../geometry/types";
import { buildModel } from "../run/build-model";
import type { Model } from "../run/model-types";
import { firstPage } from "./first-page";
import type { DrawRoom } from "./isometric-sheets";
import { pageDraft, placePages, type PageDraft } from "./page-draft";
import { firstFrame, followingFrame } from "./page-frame";
import { sheetFacts, type SheetFacts } from "./sheet-facts";
import type { SheetInput, SheetPage } from "./sheet-types";
import { flowTables } from "./table-flow";
import { continuedItem } from "./table-placing";

const PAD = 2;

/**
 * Pages of the spool sheet: the first with the isometric, then its further sheets where one would be crowded, then lists that
 * find no room on the first. Never throws on user data: a line or spool that is not ready yet gives a sheet that says so.
 */
export function composeSheet(input: SheetInput, measure: MeasureText): SheetPage[] {
  return placePages(spoolSheetDrafts(sheetFacts(input, buildModel(input.document, input.marks, input.takeOuts)), measure));
}

/** Pages of the spool sheet before they are numbered; they count from 1, as the sheet is always the first of its set. */
export function spoolSheetDrafts(facts: SheetFacts, measure: MeasureText): PageDraft[] {
  const { document, spool, revision } = facts.input;
  const { code, changedPointIds } = revision;
  const draw: DrawRoom = (first, later) =>
    drawSheets(facts.model, {
      ...first, later, measure, view: document.view, spool,
      show: { items: true, welds: true, pieces: true, dimensions: true },
      changed: changedPointIds.length > 0 ? { code, pointIds: changedPointIds } : null,
    });
  return draftPages(facts, draw, measure);
}

/** Pages of a sheet from a model and a way to draw it: the part of composing that a test can feed by hand. */
export function composePages(input: SheetInput, model: Model, draw: DrawRoom, measure: MeasureText): SheetPage[] {
  return placePages(draftPages(sheetFacts(input, model), draw, measure));
}

function draftPages(facts: SheetFacts, draw: DrawRoom, measure: MeasureText): PageDraft[] {
  const { size } = facts.input;
  const frame = firstFrame(facts, measure);
  const following = followingFrame(facts, measure);
  const first = firstPage(facts, frame, following.body, draw, measure);
  const isometrics = 1 + first.sheets.length;
  const { pages: lists, sheetOf } = flowTables(first.rest, inside(following.body), isometrics + 1, measure);
  const continued = first.continued.map(({ title, at }) => continuedItem(at, `on sheet ${sheetOf.get(title) ?? isometrics + 1}`));
  return [
    pageDraft(size, frame, [...first.items, ...continued], "isometric"),
    ...first.sheets.map((items) => pageDraft(size, following, items, "isometric")),
    ...lists.map((items) => pageDraft(size, following, items, "lists")),
  ];
}

function inside(body: PaperBox): PaperBox {
  return { minX: body.minX + PAD, minY: body.minY + PAD, maxX: body.maxX - PAD, maxY: body.maxY - PAD };
}
