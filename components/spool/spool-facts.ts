/** What the tables beside a sheet show, read from the same input and core as the sheet itself. */
import { buildModel, type Component, type Joint, type Model, type Piece, type SheetInput } from "@/iso";

export interface SpoolFacts {
  readonly model: Model;
  readonly pieces: readonly Piece[];
  /** Welds that carry a number and belong to this spool. */
  readonly welds: readonly Joint[];
  /** Legs whose number is unverified, by id. */
  readonly unverifiedLegs: ReadonlySet<string>;
  /** Words for a component or piece on one side of a weld; "field" for what is outside the line. */
  readonly nameOf: (id: string | null) => string;
}

/** Facts of the spool a sheet input names, or null when its model cannot be built. */
export function spoolFacts(input: SheetInput): SpoolFacts | null {
  const model = tryModel(input);
  if (!model) return null;
  const pieces = model.pieces.filter((piece) => piece.spool === input.spool);
  const welds = model.joints.filter((joint) => joint.number !== null && joint.spool === input.spool);
  const components = new Map<string, Component>(
    model.components.map((component) => [component.id, component]),
  );
  const marks = new Map<string, string>(model.pieces.map((piece) => [piece.key, piece.mark]));
  return {
    model,
    pieces,
    welds,
    unverifiedLegs: new Set(model.legs.filter((leg) => leg.unverified).map((leg) => leg.id)),
    nameOf: (id) => (id === null ? "field" : (components.get(id)?.description ?? marks.get(id) ?? "part")),
  };
}

function tryModel(input: SheetInput): Model | null {
  try {
    return buildModel(input.document, input.marks, input.takeOuts);
  } catch {
    return null;
  }
}
