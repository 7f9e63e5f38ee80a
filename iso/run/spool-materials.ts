/** The material list of one spool: pipe by the summed cut length, everything else by the piece. */
import { flangeBolts } from "../catalogue/catalogue";
import { formatInches } from "../units/format";
import type { JointDraft } from "./build-types";
import type { RatingClass, UnitSystem } from "./document";
import type { Component, MaterialRow } from "./model-types";
import type { PieceDraft } from "./piece-draft";
import { scheduleText, sizePairText, sizeText } from "./words";

type Row = Omit<MaterialRow, "item">;

/** Lists read pipe first, then fittings, flanges, valves, and what bolts them. */
const ORDER: readonly (readonly Component["kind"][])[] = [
  ["elbow", "trimmed-elbow", "socket-elbow"], ["tee", "reducing-tee", "socket-tee"], ["outlet"], ["reducer-concentric", "reducer-eccentric"],
  ["coupling", "half-coupling"], ["cap"], ["flange-weld-neck", "flange-slip-on", "flange-socket-weld"], ["flange-blind"], ["valve"], ["gasket"],
];

export interface SpoolParts {
  readonly components: readonly Component[];
  readonly pieces: readonly PieceDraft[];
  /** Bolted joints whose bolts this spool brings. */
  readonly bolted: readonly JointDraft[];
  readonly loose: ReadonlySet<string>;
  /** Class of a bolted joint. */
  readonly classOf: (joint: JointDraft) => RatingClass | null;
}

export function spoolMaterials(parts: SpoolParts, units: UnitSystem): MaterialRow[] {
  const rows: Row[] = [...parts.pieces.map((p) => pipeRow(p, units))];
  for (const kinds of ORDER) rows.push(...parts.components.filter((c) => kinds.includes(c.kind)).map((c) => partRow(c, parts.loose.has(c.id), units)));
  rows.push(...parts.bolted.flatMap((j) => boltRow(j, parts.classOf(j), units)));
  rows.push(...parts.components.filter((c) => c.kind === "support").map((c) => partRow(c, false, units)));
  return mergedRows(rows).map((row, i) => ({ item: i + 1, ...row }));
}

function pipeRow(p: PieceDraft, units: UnitSystem): Row {
  return {
    quantity: Math.max(p.cutLengthMm, 0), unit: "mm", size: sizeText(p.nps, units), description: `Pipe, ${scheduleText(p.schedule)}`, material: p.material,
    weightKg: p.weightKg, source: p.weightSource, refs: [p.key],
  };
}

function partRow(c: Component, isLoose: boolean, units: UnitSystem): Row {
  const schedule = c.schedule === null ? "" : `, ${scheduleText(c.schedule)}`;
  return {
    quantity: 1, unit: "ea", size: sizePairText(c.nps, c.nps2, units), description: `${c.description}${schedule}${isLoose ? ", field" : ""}`,
    material: partMaterial(c), weightKg: c.weightKg, source: c.source, refs: [c.id],
  };
}

/** Fittings and flanges are ordered in the grade that goes with the pipe, which is not the pipe's own: the list names the pipe they are for. */
function partMaterial({ material }: Component): string {
  return material === "" || material === "as specified" ? material : `for ${material}`;
}

/** Stud bolts of a bolted face by the flange table: the number, the size, the length for a joint of two flanges. */
function boltRow(j: JointDraft, ratingClass: RatingClass | null, units: UnitSystem): Row[] {
  const bolts = ratingClass === null ? null : flangeBolts(ratingClass, j.nps);
  if (!bolts) return [];
  const length = units === "metric" ? `${Math.round(bolts.studLengthMm)} mm` : `${formatInches(bolts.studLengthMm)} in`;
  return [{
    quantity: bolts.count, unit: "ea", size: `${bolts.size} x ${length}`, description: `Stud bolt with two nuts${j.place === "shop" ? "" : ", field"}`,
    material: "as specified", weightKg: null, source: bolts.source, refs: [j.key],
  }];
}

/** Equal size, description and material make one row. */
function mergedRows(rows: readonly Row[]): Row[] {
  const groups = new Map<string, Row[]>();
  for (const row of rows) {
    const key = `${row.unit}\n${row.size}\n${row.description}\n${row.material}`;
    const group = groups.get(key);
    if (group) group.push(row);
    else groups.set(key, [row]);
  }
  return [...groups.values()].map((group) => ({
    ...group[0]!,
    quantity: group.reduce((sum, row) => sum + row.quantity, 0),
    refs: group.flatMap((row) => row.refs),
    weightKg: group.every((row) => row.weightKg === null) ? null : group.reduce((sum, row) => sum + (row.weightKg ?? 0), 0),
  }));
}
