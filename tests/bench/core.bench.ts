/** Building and drawing a run of 100 points, on the sheets it takes as composing does, against the time it takes to paint it as a PDF. */
import { measureText } from "../../fonts/widths";
import { buildModel, composeSheet, drawSheets, emptyMarks, nextMarks, type RunDocument, type SheetInput } from "../../iso";
import { paintSheet } from "../../pdf/paint-sheet";
import { flange, outlet, RunBuilder, valve } from "../fixtures/run-builder";
import { medianTimesUs, timeText, type BenchRow } from "./stopwatch";

const POINTS = 100;
const ROUNDS = 12;
const ROOM = { widthMm: 400, heightMm: 260 };

/** A run that climbs, turns and comes back, with a valve or an outlet here and there: 100 points, no leg without a turn near. */
function longRun(): RunDocument {
  const turns = ["E", "U", "N", "E", "D", "N", "W", "U", "N", "E"] as const;
  const builder = new RunBuilder("LONG-100").start(flange());
  for (let index = 1; index < POINTS - 1; index += 1) {
    const item = index % 12 === 0 ? valve({ tag: `V-${index}` }) : index % 17 === 0 ? outlet("1") : { kind: "none" as const };
    builder.go(turns[Math.floor(index / 2) % turns.length] ?? "E", `${3 + (index % 4)}' ${index % 11}"`, item);
  }
  return builder.go("E", "4'", flange()).done();
}

function sheetInput(document: RunDocument, spool: string): SheetInput {
  return {
    version: 1, document, marks: nextMarks(document, emptyMarks(), []), takeOuts: [], spool, size: "A3", units: "imperial",
    titleBlock: { shopName: "Bench", client: "", project: "", jobNumber: "", area: "", fields: [], logo: null },
    revision: {
      sheetNumber: "S-0001", code: "A", state: "draft", hold: false, rows: [], drawnBy: "", checkedBy: "",
      issuedAt: "2026-01-01T00:00:00.000Z", statusUrl: "", auditHead: "", changedPointIds: [], accepted: [],
    },
  };
}

export async function measure(): Promise<BenchRow[]> {
  const document = longRun();
  const model = buildModel(document, emptyMarks(), []);
  const spool = model.spools[0]?.letter ?? "A";
  const pages = composeSheet(sheetInput(document, spool), measureText);
  const options = { ...ROOM, measure: measureText, view: null, spool: null, show: { items: true, welds: true, pieces: true, dimensions: true } };
  const paint = () => paintSheet({ pages, issuedAt: "2026-01-01T00:00:00.000Z", title: "Bench", logo: null });
  const [buildUs = NaN, bothUs = NaN, paintUs = NaN] = await medianTimesUs(
    [
      { name: "build", times: 40, work: () => buildModel(document, emptyMarks(), []) },
      { name: "build and draw", times: 1, work: () => drawSheets(buildModel(document, emptyMarks(), []), options) },
      { name: "paint", times: 5, work: paint },
    ],
    ROUNDS,
  );
  const count = `${POINTS} points, ${pages.length} ${pages.length === 1 ? "page" : "pages"}`;
  return [
    { name: "build the model : paint it", figure: buildUs / paintUs, budget: 0.2, detail: `${timeText(buildUs)} : ${timeText(paintUs)}, ${count}` },
    { name: "build and draw : paint it", figure: bothUs / paintUs, budget: 3, detail: `${timeText(bothUs)} : ${timeText(paintUs)}` },
  ];
}
