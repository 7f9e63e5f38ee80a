/** Dimensions nobody has verified: each must be accepted by name before a sheet is released. Pure. */
import { buildModel, formatLength, type SheetInput } from "@/iso";
import { spoolPointIds } from "./spool-points";

export interface UnverifiedDimension {
  readonly pointId: string;
  /** "point 3, 12'-0 3/8\" (assumed)". */
  readonly text: string;
}

/** The spool's unverified dimensions, in the order of the run. */
export function unverifiedDimensions(input: SheetInput): UnverifiedDimension[] {
  const model = buildModel(input.document, input.marks, input.takeOuts);
  const spool = model.spools.find((s) => s.letter === input.spool);
  if (spool === undefined) return [];
  const points = spoolPointIds(model, spool);
  const order = input.document.runs.flatMap((run) => run.points.map((point) => point.id));
  return model.legs
    .filter((leg) => leg.unverified && points.has(leg.id))
    .map((leg) => {
      const number = order.indexOf(leg.toPointId) + 1;
      return { pointId: leg.toPointId, text: `point ${number}, ${formatLength(leg.lengthMm, input.units)} (${leg.provenance.kind.replace("-", " ")})` };
    });
}
