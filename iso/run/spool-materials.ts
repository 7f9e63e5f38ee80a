/** The material list of one spool: pipe by the summed cut length, everything else by the piece. */
import { formatInches } from "../units/format";
import type { UnitSystem } from "./document";
import type { Component, MaterialRow } from "./model-types";
import type { PieceDraft } from "./piece-draft";
import { scheduleText, sizePairText, sizeText } from "./words";

type Row = Omit<MaterialRow, "item">;

/** Lists read pipe first, then fittings, flanges, valves, and what bolts them. */
const ORDER: readonly (readonly Component["kind"][])[] = [
  ["elbow", "trimmed-elbow", "socket-elbow"], ["return"], ["tee", "reducing-tee", "socket-tee"], ["cross", "socket-cross"], ["outlet"], ["pad"],
  ["reducer-concentric", "reducer-eccentric"], ["coupling", "half-coupling"], ["union"], ["cap", "socket-cap"], ["stub-end"],
  ["flange-weld-neck", "flange-slip-on", "flange-socket-weld", "flange-threaded", "flange-lap-joint"], ["flange-blind"], ["valve"], ["instrument"],
  ["gasket"], ["bolt-set"], ["support"],
];

export interface SpoolParts {
  readonly components: readonly Component[];
  readonly pieces: readonly PieceDraft[];
  readonly loose: ReadonlySet<string>;
}

/** The rows of one spool. A stub-in and a mitre are cut from pipe: the pipe's row counts them. */
export function spoolMaterials(parts: SpoolParts, units: UnitSystem): MaterialRow[] {
  const rows: Row[] = [...parts.pieces.map((p) => pipeRow(p, units))];
  for (const kinds of ORDER) {
    rows.push(...parts.components.filter((c) => kinds.includes(c.kind)).map((c) => (c.kind === "bolt-set" ? boltRow : partRow)(c, parts.loose.has(c.id), units)));
  }
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

/** Studs of a bolted face: the number, the size and the length. */
function boltRow(c: Component, isLoose: boolean, units: UnitSystem): Row {
  const { count, diameter, lengthMm } = c.bolts ?? { count: 0, diameter: "", lengthMm: null };
  const length = lengthMm === null ? "" : units === "metric" ? ` x ${Math.round(lengthMm)} mm` : ` x ${formatInches(lengthMm)} in`;
  return {
    quantity: count, unit: "ea", size: `${diameter}${length}`, description: `${c.description}${isLoose ? ", field" : ""}`,
    material: partMaterial(c), weightKg: c.weightKg, source: c.source, refs: [c.id],
  };
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
