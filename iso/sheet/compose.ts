/**
 * Composing a spool sheet: from one frozen value to pages of display items, which both painters understand. Pure: equal
 * input and measure give equal pages, in the browser and on the server.
 */
import { drawModel } from "../draw/draw-model";
import type { MeasureText } from "../draw/drawing-types";
import type { PaperBox } from "../geometry/types";
import { buildModel } from "../run/build-model";
import type { Model } from "../run/model-types";
import { firstPage, type DrawRoom } from "./first-page";
import { firstFrame, followingFrame, type PageFrame } from "./page-frame";
import { sheetFacts } from "./sheet-facts";
import { sheetSizeMm } from "./sheet-size";
import type { SheetInput, SheetPage } from "./sheet-types";
import { flowTables } from "./table-flow";
import { continuedItem } from "./table-placing";

const PAD = 2;

/**
 * Pages of the spool sheet: the first with the isometric, further ones for lists that find no room there. Never throws on
 * user data: a line or spool that is not ready yet gives a sheet that says so.
 */
export function composeSheet(input: SheetInput, measure: MeasureText): SheetPage[] {
  const model = buildModel(input.document, input.marks, input.takeOuts);
  const { code, changedPointIds } = input.revision;
  const draw: DrawRoom = (widthMm, heightMm) =>
    drawModel(model, {
      widthMm, heightMm, measure, view: input.document.view, spool: input.spool,
      show: { items: true, welds: true, pieces: true, dimensions: true },
      changed: changedPointIds.length > 0 ? { code, pointIds: changedPointIds } : null,
    });
  return composePages(input, model, draw, measure);
}

/** Pages of a sheet from a model and a way to draw it: the part of composing that a test can feed by hand. */
export function composePages(input: SheetInput, model: Model, draw: DrawRoom, measure: MeasureText): SheetPage[] {
  const facts = sheetFacts(input, model);
  const frame = firstFrame(facts, measure);
  const first = firstPage(facts, frame, draw, measure);
  const following = followingFrame(facts, measure);
  const { pages: lists, sheetOf } = flowTables(first.rest, inside(following.body), 2, measure);
  const continued = first.continued.map(({ title, at }) => continuedItem(at, `on sheet ${sheetOf.get(title) ?? 2}`));
  const of = 1 + lists.length;
  const page = (content: readonly SheetPage["items"][number][], around: PageFrame, sheet: number): SheetPage => ({
    ...sheetSizeMm(input.size),
    items: [...around.under, ...content, ...around.over({ sheet, of })],
    logoBox: around.logoBox,
    name: sheet === 1 ? "1 isometric" : `${sheet} lists`,
  });
  return [page([...first.items, ...continued], frame, 1), ...lists.map((items, index) => page(items, following, index + 2))];
}

function inside(body: PaperBox): PaperBox {
  return { minX: body.minX + PAD, minY: body.minY + PAD, maxX: body.maxX - PAD, maxY: body.maxY - PAD };
}
