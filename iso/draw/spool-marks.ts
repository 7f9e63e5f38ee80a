/** Spool marks: on a drawing of the whole line each spool's letter in a heavy box, led to its longest pipe, or to a fitting where it has none. */
import type { PaperPoint } from "../geometry/types";
import type { Spool } from "../run/model-types";
import { edgePlace, edgePoint, type DrawnEdge } from "./drawn";
import type { MeasureText } from "./drawing-types";
import type { Label } from "./label-candidates";
import { marksLabel } from "./mark-labels";
import type { Placed } from "./place";

/** Places along the spool's longest pipe where its leader may start. */
const SHARES = [0.22, 0.78, 0.5] as const;

export function spoolLabels(placed: Placed, drawn: readonly DrawnEdge[], measure: MeasureText): readonly Label[] {
  const { model, spool: only } = placed.sketch;
  if (only !== null || model.spools.length < 2) return [];
  return model.spools.flatMap((spool) => {
    const place = spoolAnchors(placed, drawn, spool);
    if (place.anchors.length === 0) return [];
    return [marksLabel([{ shape: "box", text: spool.letter, ref: { kind: "spool", id: spool.letter } }], { id: `spool ${spool.letter}`, ...place, clear: 0.5 }, measure)];
  });
}

function spoolAnchors(placed: Placed, drawn: readonly DrawnEdge[], spool: Spool): { readonly anchors: readonly PaperPoint[]; readonly along: readonly PaperPoint[] } {
  const keys = new Set(spool.pieceKeys);
  const spans = drawn.flatMap((d) => d.edge.pieces.filter((piece) => keys.has(piece.key)).map((piece) => ({ d, from: edgePlace(d, piece.start), to: edgePlace(d, piece.end) })));
  const [longest] = [...spans].sort((p, q) => q.to - q.from - (p.to - p.from));
  if (longest) return { anchors: SHARES.map((k) => edgePoint(longest.d, longest.from + (longest.to - longest.from) * k)), along: [longest.d.direction] };
  const first = placed.sketch.components.find((component) => component.spool === spool.letter);
  const at = first && placed.paper.get(placed.sketch.vertexOf(first.pointId));
  return { anchors: at ? [at] : [], along: [] };
}
