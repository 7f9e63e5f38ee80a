/** Pages of a spool's true-scale templates: each tile on a page of its own, at 100 %, with who the sheet is and a proof bar. */
import type { DisplayItem, MeasureText } from "../draw/drawing-types";
import { itemMoved } from "../draw/paths";
import type { PaperBox, PaperPoint } from "../geometry/types";
import { spoolTemplates } from "../layout/spool-templates";
import type { Template } from "../layout/template";
import { templateItems } from "../layout/template-items";
import { tilesOf, type Tile } from "../layout/tile";
import { PAPER_THICKNESS_MM } from "../layout/wrap";
import { buildModel } from "../run/build-model";
import { textAt } from "./items";
import { placePages, type PageDraft } from "./page-draft";
import { sheetFacts, type SheetFacts } from "./sheet-facts";
import type { SheetInput, SheetPage } from "./sheet-types";
import { templateFrame, type StripContent } from "./template-frame";
import { linesHeight, wrapText } from "./text-setting";

/** Between the frame and a tile, mm: room for the words that say what to join. */
const GUTTER = 6;

/** A tile on its page: where its window's origin lies on paper. */
export interface PlacedTile {
  readonly template: Template;
  readonly tile: Tile;
  /** Paper = template point - window's corner + at. */
  readonly at: PaperPoint;
}

export interface TemplatePages {
  readonly pages: readonly SheetPage[];
  /** Per page, in order; none on a page that only says there is nothing to print. */
  readonly tiles: readonly PlacedTile[];
}

/** Pages of the templates of a spool; one page that says so when it needs none. Never throws on user data. */
export function composeTemplatePages(input: SheetInput, measure: MeasureText, paperMm: number = PAPER_THICKNESS_MM): SheetPage[] {
  return [...placeTemplates(input, measure, paperMm).pages];
}

/** The pages with where each tile lies: what a test measures. */
export function placeTemplates(input: SheetInput, measure: MeasureText, paperMm: number): TemplatePages {
  const { drafts, tiles } = templateDrafts(sheetFacts(input, buildModel(input.document, input.marks, input.takeOuts)), measure, paperMm);
  return { pages: placePages(drafts), tiles };
}

export interface TemplateDrafts {
  readonly drafts: readonly PageDraft[];
  readonly tiles: readonly PlacedTile[];
}

/** The pages before they are numbered. A wish for wider margins gives smaller tiles, never a smaller template. */
export function templateDrafts(facts: SheetFacts, measure: MeasureText, paperMm: number = PAPER_THICKNESS_MM): TemplateDrafts {
  const { size, spool } = facts.input;
  const { templates, notes } = facts.spool ? spoolTemplates(facts.model, facts.spool, paperMm) : { templates: [], notes: [] };
  const whose = `Line ${facts.model.document.number}, spool ${spool}.`;
  const factsOf = (template: Template): readonly string[] => [`${whose} ${template.facts[0] ?? ""}`, ...template.facts.slice(1)];
  const frame = templateFrame(facts, templates.map((template) => ({ facts: factsOf(template) })), measure);
  const { body } = frame;
  const room = { widthMm: body.maxX - body.minX - 2 * GUTTER, heightMm: body.maxY - body.minY - 2 * GUTTER };
  const tiles = templates.flatMap((template) => tilesOf(template.widthMm, template.heightMm, room).map((tile): PlacedTile => ({ template, tile, at: placeOf(tile, body) })));
  const page = (items: readonly DisplayItem[], strip: StripContent, kind: string): PageDraft => ({
    size, items: [...frame.under, ...items], over: (place) => frame.over(strip, place), logoBox: null, kind,
  });
  const drafts = tiles.map(({ template, tile, at }) => {
    const moved = templateItems(template, tile, measure).map((item) => itemMoved(item, [at[0] - tile.shown.minX, at[1] - tile.shown.minY]));
    const strip = { title: template.title, facts: factsOf(template), rows: tile.rows, columns: tile.columns, row: tile.row, column: tile.column };
    return page([...moved, ...joinWords(tile, at)], strip, "template");
  });
  if (notes.length === 0 && tiles.length > 0) return { drafts, tiles };
  const said = notes.length > 0 ? notes : [`No end of spool ${spool} is cut at an angle and no elbow is trimmed: there is nothing to wrap.`];
  const strip = { title: "TEMPLATES: NOTES", facts: [whose], rows: 1, columns: 1, row: 1, column: 1 };
  return { drafts: [...drafts, page(noteItems(said, body, measure), strip, "notes")], tiles };
}

/** In the middle of the room across, at its top. */
function placeOf({ shown }: Tile, body: PaperBox): PaperPoint {
  return [(body.minX + body.maxX - (shown.maxX - shown.minX)) / 2, body.minY + GUTTER];
}

/** At the ends of each join line: which pages meet there. */
function joinWords({ joinsX, joinsY, shown, row, column }: Tile, at: PaperPoint): DisplayItem[] {
  const x = (of: number) => at[0] + of - shown.minX;
  const y = (of: number) => at[1] + of - shown.minY;
  const bottom = at[1] + shown.maxY - shown.minY;
  const upright = joinsX.map((join) => {
    const isLeft = join < (shown.minX + shown.maxX) / 2;
    const text = isLeft ? `join to column ${column - 1}` : `join to column ${column + 1}`;
    return textAt([isLeft ? Math.max(x(join) - 8, at[0]) : Math.min(x(join) + 8, at[0] + shown.maxX - shown.minX), at[1] - 1.4], text, { layer: "label", anchor: isLeft ? "start" : "end" });
  });
  const level = joinsY.map((join) => {
    const isTop = join < (shown.minY + shown.maxY) / 2;
    return textAt([at[0] - 1.6, isTop ? Math.max(y(join), at[1]) : Math.min(y(join), bottom)], isTop ? `join to row ${row - 1}` : `join to row ${row + 1}`, { layer: "label", anchor: isTop ? "end" : "start", rotateRad: -Math.PI / 2 });
  });
  return [...upright, ...level];
}

function noteItems(notes: readonly string[], body: PaperBox, measure: MeasureText): DisplayItem[] {
  const lines = notes.flatMap((note) => wrapText(note, body.maxX - body.minX - 2 * GUTTER, { capMm: 3, face: "regular" }, measure));
  return lines.map((line, i) => textAt([body.minX + GUTTER, body.minY + GUTTER + 3 + i * linesHeight(1, 3)], line, { layer: "label", capMm: 3 }));
}
