/** One page for each golden run: the drawing in the room it has on A3, its legend under it, and what the picture must show. */
import { buildModel, drawModel, emptyMarks, itemMoved, legendItems, legendLayout, type DisplayItem, type SheetPage } from "@/iso";
import { measureText } from "@/fonts/widths";
import { GOLDEN_THEMES } from "@/tests/fixtures/golden-runs";
import type { GoldenRun } from "@/tests/fixtures/golden-runs/golden-run";

export interface GoldenPage {
  readonly theme: string;
  readonly run: GoldenRun;
  readonly page: SheetPage;
}

/** Room of an A3 spool sheet's drawing, mm. */
const ROOM = { widthMm: 285, heightMm: 200 } as const;
const EDGE = 6;
const TITLE_MM = 14;

export function goldenPages(): GoldenPage[] {
  return Object.entries(GOLDEN_THEMES).flatMap(([theme, runs]) => runs.map((run) => ({ theme, run, page: goldenPage(run) })));
}

export function goldenPage(run: GoldenRun): SheetPage {
  const model = buildModel(run.document, emptyMarks(), run.takeOuts ?? []);
  const drawing = drawModel(model, {
    ...ROOM, measure: measureText, view: run.view ?? null, spool: run.spool ?? null, changed: run.changed ?? null,
    show: { items: true, welds: true, pieces: true, dimensions: true },
  });
  const strip = legendLayout(drawing.legend, ROOM.widthMm, measureText).heightMm;
  const top = EDGE + ROOM.heightMm;
  const box = { minX: EDGE, minY: top, maxX: EDGE + ROOM.widthMm, maxY: top + strip };
  const { report } = drawing;
  const title = `${run.document.number}  ${run.name}: ${run.shows}`;
  const counts = `view ${drawing.view}, ${report.labels} labels, ${report.clean} clean, ${report.overlaps} overlaps, mean leader ${report.meanLeaderMm.toFixed(1)} mm, findings ${model.problems.length}`;
  return {
    widthMm: ROOM.widthMm + 2 * EDGE, heightMm: top + strip + TITLE_MM, logoBox: null, name: run.name,
    items: [...drawing.items.map((item) => itemMoved(item, [EDGE, EDGE])), ...legendItems(drawing.legend, box, measureText), text(title, top + strip + 6), text(counts, top + strip + 11)],
  };
}

const text = (words: string, y: number): DisplayItem =>
  ({ type: "text", layer: "title", ref: null, at: [EDGE, y], anchor: "start", text: words, capMm: 2.5, face: "regular", rotateRad: 0, ink: "ink" });
