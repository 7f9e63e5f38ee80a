/** Tables of a dimension record. An empty result gives the blanks to fill in by hand. */
import type { UnitSystem } from "../run/document";
import { pointName } from "../layout/as-fitted-read";
import { FITTED_WORDS } from "../layout/as-fitted-picture";
import { wayWords } from "../layout/as-fitted-judge";
import type { AsFittedResult, FaceResult, FittedRecord } from "../layout/as-fitted-types";
import type { Wanted } from "../layout/as-fitted-wanted";
import { formatFraction, formatTapeLength } from "../layout/lengths";
import { formatAngleDeg } from "../units/format";
import { sizeText } from "./sheet-facts";
import type { Cell, Row, Table } from "./table";

const bold = (text: string): Cell => [{ text, face: "bold" }];
const signed = (mm: number | null, units: UnitSystem): string => (mm === null ? "-" : `${mm > 0 ? "+" : mm < 0 ? "-" : ""}${formatFraction(Math.abs(mm), units)}`.replace(/^[+-](0 )/, "$1"));
const row = (label: string, value: string): Row => ({ cells: [label, bold(value)] });

/** Verdict first, then how it was found. */
export function factsTable(record: FittedRecord | null, result: AsFittedResult | null, units: UnitSystem): Table {
  const tolerances = result && `position +/- ${formatFraction(result.tolerances.positionMm, units)} in any direction, faces square within ${squareText(result.tolerances.squareSlope, units)}, bolt holes ${formatFraction(result.tolerances.holesMm, units)} round their circle`;
  return {
    title: record ? "AS FITTED: MEASURED AGAINST THIS SHEET" : "DIMENSION RECORD, TO FILL IN",
    lead: ["Tolerances in the manner of PFI ES-3, shop work, not cumulative, values from memory unless the shop set its own. Two readings. A record of what was measured, no acceptance by itself."],
    columns: [{ head: "", share: 0, minMm: 30 }, { head: "", share: 1, minMm: 60 }],
    rows: record && result
      ? [
          row("VERDICT", result.headline),
          row("MEASURED", `by ${record.by}, ${record.at.slice(0, 16).replace("T", " ")} UTC${record.document.tool ? `, with ${record.document.tool}` : ""}`),
          row("LAID ON", record.document.hold === "" ? `the best fit of all points${result.spreadMm === null ? "" : `; ${formatFraction(result.spreadMm, units)} left over per free reading`}` : `end ${record.document.hold}, held exactly`),
          row("TOLERANCES", tolerances!),
          ...result.changes.map((change, i) => row(i === 0 ? "WOULD MEND IT" : "OR", change.words)),
          ...result.findings.map((finding) => row(finding.tone === "note" ? "NOTE" : "DOUBT", finding.sentence)),
          ...(record.document.note.trim() ? [row("REMARKS", record.document.note)] : []),
        ]
      : [row("MEASURE", "each face's centre, and a point a foot or more along its pipe, or three bolt holes, from any one origin with square directions. Three points off one line place a spool; corners count too."), row("TOOL", " "), row("FRAME", "origin, and which way E and N were taken:")],
    foot: ["Do not pull, jack or heat pipe to fit. Cutting out and welding again needs the inspector's word, and the engineer's where the code says so."],
  };
}

function squareText(slope: number, units: UnitSystem): string {
  return units === "metric" ? `${formatFraction(slope * 1000, units)} per m` : `${formatFraction(slope * 304.8, units)} per ft`;
}

/** Along, across, lean and holes of each face. */
export function facesTable(wanted: Wanted, result: AsFittedResult | null, units: UnitSystem): Table {
  const faces = wanted.faces.map((face): Row => faceRow(`END ${face.mark}`, `${face.name}, ${sizeText(face.nps, null, units)}`, result?.faces.find((one) => one.mark === face.mark) ?? null, units));
  const corners = wanted.corners.filter((corner) => !result || result.corners.find((one) => one.mark === corner.mark)?.at).map((corner): Row => faceRow(corner.mark, corner.name.toLowerCase(), result?.corners.find((one) => one.mark === corner.mark) ?? null, units));
  return {
    title: "FACES AND CORNERS", lead: [],
    columns: [
      { head: "AT", share: 0, minMm: 15 }, { head: "WHAT IT IS", share: 1, minMm: 34 },
      ...(result
        ? [{ head: "ALONG", share: 0, minMm: 20, align: "end" as const }, { head: "ACROSS", share: 0.7, minMm: 34 }, { head: "LEAN", share: 0.3, minMm: 27 }, { head: "HOLES", share: 0.4, minMm: 27 }, { head: "VERDICT", share: 0.2, minMm: 27, boxed: true }]
        : ["E", "N", "U"].map((head) => ({ head: `${head} MEASURED`, share: 0.3, minMm: 30 }))),
    ],
    rows: [...faces, ...corners],
    foot: result ? ["Measured less wanted. Along: + is long, out of the spool. Lean: across the pipe's OD. Holes: round the bolt circle, cw looking at the face."] : ["Write E, N and U of each centre; of points on axes and bolt holes on the back."],
  };
}

function faceRow(at: string, what: string, one: FaceResult | null, units: UnitSystem): Row {
  if (!one) return { cells: [[{ text: at, face: "bold", capMm: 3.5 }], what, "", "", ""] };
  const isCorner = at.startsWith("W");
  const across = one.acrossMm === null || !one.off ? "-" : isCorner ? wayWords(one.off, units) : acrossText(one, units);
  return {
    cells: [
      bold(at), what, isCorner ? "" : signed(one.alongMm, units), across,
      one.leanRad === null ? (isCorner ? "" : "not measured") : `${formatFraction(one.gapMm!, units)}, ${formatAngleDeg(one.leanRad)}`,
      one.holesRad === null ? "" : `${formatFraction(Math.abs(one.holesMm!), units)} ${one.holesRad > 0 ? "cw" : "ccw"}, ${formatAngleDeg(Math.abs(one.holesRad))}`,
      bold(FITTED_WORDS[one.verdict]),
    ],
  };
}

function acrossText(one: FaceResult, units: UnitSystem): string {
  return `${formatFraction(one.acrossMm!, units)}: ${one.words.find((words) => words.startsWith("off its line"))?.slice(14) ?? "within"}`;
}

/** Distances between faces; none with one face. */
export function pairsTable(wanted: Wanted, result: AsFittedResult | null, units: UnitSystem): Table[] {
  const { faces } = wanted;
  const pairs = result?.pairs ?? faces.flatMap((a, i) => faces.slice(i + 1).map((b) => ({ a: a.mark, b: b.mark, wantedMm: Math.hypot(...a.position.map((x, k) => x - b.position[k]!)), actualMm: null, off: null, verdict: "none" as const })));
  if (pairs.length === 0) return [];
  return [{
    title: "FACE TO FACE", lead: [],
    columns: [{ head: "ENDS", share: 0, minMm: 20 }, { head: "STRAIGHT, WANTED", share: 0.5, minMm: 32, align: "end" }, { head: "ACTUAL", share: 0.5, minMm: 30, align: "end" }, { head: "OFF", share: 0, minMm: 20, align: "end" }, { head: "EAST, NORTH, UP, OFF", share: 1, minMm: 50 }, { head: "VERDICT", share: 0.2, minMm: 27, boxed: true }],
    rows: pairs.map((pair): Row => ({
      cells: [bold(`${pair.a} TO ${pair.b}`), formatTapeLength(pair.wantedMm, units), pair.actualMm === null ? "" : formatTapeLength(pair.actualMm, units), pair.actualMm === null ? "" : signed(pair.actualMm - pair.wantedMm, units), pair.off ? pair.off.map((mm) => signed(mm, units)).join(", ") : "", result ? bold(FITTED_WORDS[pair.verdict]) : ""],
    })),
    foot: [],
  }];
}

/** The points as typed, so that anybody can work the record again. */
export function pointsTable(record: FittedRecord | null): Table[] {
  const points = record?.document.points.filter((point) => point.at.some((text) => text.trim() !== "")) ?? [];
  if (points.length === 0) return [];
  const half = Math.ceil(points.length / 2);
  const cells = (point: (typeof points)[number] | undefined): Cell[] => (point ? [`${pointName(point)}${point.leftOut ? " (left out)" : ""}`, ...point.at] : ["", "", "", ""]);
  const columns = [{ head: "POINT", share: 1, minMm: 30 }, ...["E", "N", "U"].map((head) => ({ head, share: 0.3, minMm: 20, align: "end" as const }))];
  return [{
    title: "POINTS AS MEASURED", lead: [`In the measurer's own frame; a number without a unit is in ${record!.document.readAs}.`], columns: [...columns, ...columns],
    rows: points.slice(0, half).map((point, i): Row => ({ cells: [...cells(point), ...cells(points[half + i])] })), foot: [],
  }];
}

/** Name, signature and date of who measured, checked and accepted. */
export function signTable(record: FittedRecord | null): Table {
  const line = (role: string, name: string): Row => ({ cells: [[{ text: role, face: "bold", capMm: 4.5 }], name, "", ""] });
  return {
    title: "SIGN-OFF", lead: [],
    columns: [{ head: "", share: 0, minMm: 50 }, { head: "NAME", share: 1, minMm: 40 }, { head: "SIGNATURE", share: 1, minMm: 40 }, { head: "DATE", share: 0, minMm: 30 }],
    rows: [line("MEASURED", record?.by ?? ""), line("CHECKED", ""), line("ACCEPTED", "")],
    foot: [],
  };
}
