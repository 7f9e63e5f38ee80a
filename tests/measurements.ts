/** Measurements of the spool of sampleDocument, in millimetres of a measurer's own frame. */
import type { AsFittedDocument, FittedPoint } from "@/iso";

const point = (id: string, of: string, what: FittedPoint["what"], at: readonly [number, number, number]): FittedPoint => ({ id, of, what, at: at.map(String), leftOut: false });

/** Face 1 at the origin and face 2 as drawn, or that much further out along its axis (north). */
export function sampleMeasurement(longMm = 0): AsFittedDocument {
  return {
    schema: 1, readAs: "millimetres", hold: "", tolerances: { position: "", square: "", holes: "" }, tool: "total station", note: "",
    points: [point("p1", "1", "centre", [0, 0, 0]), point("p2", "1", "axis", [400, 0, 0]), point("p3", "2", "centre", [1000, 600 + longMm, 800]), point("p4", "2", "axis", [1000, 300, 800])],
  };
}
