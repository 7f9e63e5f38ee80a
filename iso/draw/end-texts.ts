/** End texts: where every end of the line goes, with its coordinates and level; where a stub leads. */
import type { PaperPoint } from "../geometry/types";
import type { Item } from "../run/document";
import type { Joint, Node } from "../run/model-types";
import { formatLength } from "../units/format";
import type { DrawnEdge } from "./drawn";
import type { MeasureText } from "./drawing-types";
import { boltLines, fittingLabels } from "./fitting-notes";
import type { Label } from "./label-candidates";
import { blockLabel, marksLabel, type BlockLine } from "./mark-labels";
import type { Placed } from "./place";
import type { Sketch } from "./sketch";

export function endLabels(placed: Placed, drawn: readonly DrawnEdge[], measure: MeasureText): readonly Label[] {
  const { sketch } = placed;
  const items = new Map(sketch.model.document.runs.flatMap((run) => run.points.map((point) => [point.id, point.item] as const)));
  const labels: Label[] = [];
  for (const vertex of sketch.vertices.values()) {
    const { node } = vertex;
    const edges = sketch.edgesAt.get(vertex.id) ?? [];
    const at = placed.paper.get(vertex.id);
    const item = items.get(vertex.id);
    if (!node || !at || edges.length !== 1 || !item || (node.arriving !== null && node.leaving !== null)) continue;
    if (node.arriving === null && branchesFrom(sketch, node.pointId)) continue;
    const holes = (sketch.componentsAt.get(vertex.id) ?? []).flatMap((component) => boltLines(component));
    const lines = [...goesWords(item), ...coordinates(sketch, node, item), ...holes];
    labels.push(blockLabel(lines, { id: `end ${vertex.id}`, anchors: [at], clear: item.kind === "flange" ? 3.8 : 2, along: pipeAt(drawn, vertex.id) }, { kind: "point", id: vertex.id }, measure));
  }
  return [...labels, ...stubLabels(placed, drawn, measure), ...fittingLabels(placed, drawn, measure)];
}

function branchesFrom(sketch: Sketch, pointId: string): boolean {
  return sketch.model.document.runs.some((run) => run.from === pointId);
}

function pipeAt(drawn: readonly DrawnEdge[], id: string): readonly PaperPoint[] {
  return drawn.filter((d) => d.edge.from === id || d.edge.to === id).map((d) => d.direction);
}

/** Words of an end; its own text in capitals after them. */
export function goesWords(item: Item): readonly BlockLine[] {
  const bold = (text: string): BlockLine => ({ text: text.toUpperCase().trim(), bold: true });
  const text = "text" in item ? item.text : "";
  if (item.kind === "cap") return [bold("CAPPED END")];
  if (item.kind === "coupling") return [bold(item.half ? "HALF COUPLING END" : "COUPLING END")];
  if (item.kind === "flange" && item.flange === "blind" && item.goes === "open") return [bold(`BLIND END ${text}`)];
  if (item.kind !== "end" && item.kind !== "flange") return [];
  switch (item.goes) {
    case "nozzle": return [bold(/^nozzle\b/i.test(text) ? text : `NOZZLE ${text}`)];
    case "continued": return [bold(/^continued\b/i.test(text) ? text : `CONTINUED ON ${text}`.replace(/ ON $/, ""))];
    case "existing": return [bold(`EXISTING ${text} - VERIFY`.replace("  ", " "))];
    case "field-weld": return [bold(`FIELD WELD ${text ? `TO ${text}` : ""}`)];
    case "vent": return [bold(/vent/i.test(text) ? text : `VENT ${text}`)];
    case "drain": return [bold(/drain/i.test(text) ? text : `DRAIN ${text}`)];
    case "open": return text ? [bold(text)] : [bold(item.kind === "flange" ? "FLANGED END" : "OPEN END")];
  }
}

function coordinates(sketch: Sketch, node: Node, item: Item): readonly BlockLine[] {
  const { units } = sketch.model.document.settings;
  const [e, n, u] = node.position;
  const level = item.kind === "flange" ? "FOF EL" : "CL EL";
  const side = (value: number, plus: string, minus: string): string => `${value < 0 ? minus : plus} ${formatLength(Math.abs(value), units)}`;
  return [side(e, "E", "W"), side(n, "N", "S"), `${level} ${formatLength(u, units)}`].map((text) => ({ text, bold: false }));
}

/** A stub says which spool goes on there and how it is joined. */
function stubLabels(placed: Placed, drawn: readonly DrawnEdge[], measure: MeasureText): readonly Label[] {
  const { sketch } = placed;
  if (sketch.spool === null) return [];
  return drawn.filter((d) => d.edge.stub !== null && !d.edge.beyond).flatMap((d) => {
    const near = d.edge.stub === "to" ? d.edge.from : d.edge.to;
    const loose = d.edge.stub === "to" ? d.to : d.from;
    const letter = neighbourLetter(sketch, d, near);
    if (letter === null) return [];
    const joint = sketch.joints.find((j) => j.pointId === near && touches(sketch, j, letter)) ?? sketch.joints.find((j) => touches(sketch, j, letter));
    const text = joint?.kind === "bolted" ? `BOLT TO SPOOL ${letter}` : `FIELD WELD TO SPOOL ${letter}`;
    const ref = { kind: "spool" as const, id: letter };
    return [marksLabel([{ shape: "box", text: letter, ref }, { shape: "none", text, ref }], { id: `stub ${d.edge.id}`, anchors: [loose], clear: 1, along: [d.direction] }, measure)];
  });
}

function neighbourLetter(sketch: Sketch, d: DrawnEdge, near: string): string | null {
  const spools = [...d.edge.pieces.map((piece) => piece.spool), ...(sketch.componentsAt.get(near) ?? []).map((c) => c.spool),
    ...(sketch.componentsAt.get(d.edge.stub === "to" ? d.edge.leg.toPointId : d.edge.leg.fromPointId) ?? []).map((c) => c.spool)];
  return spools.find((letter) => letter !== null && letter !== sketch.spool) ?? null;
}

function touches(sketch: Sketch, joint: Joint, letter: string): boolean {
  const spoolOf = (id: string | null): string | null =>
    id === null ? null : (sketch.model.components.find((c) => c.id === id)?.spool ?? sketch.model.pieces.find((p) => p.key === id)?.spool ?? null);
  const sides = [spoolOf(joint.a), spoolOf(joint.b)];
  return sides.includes(letter) && sides.includes(sketch.spool);
}
