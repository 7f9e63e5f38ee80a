/** Points that cut no fitting into the line: nothing named, plain welds, pipe ends, supports. */
import { WELD_MISMATCH_RAD } from "../geometry/tolerances";
import { vecNegate } from "../geometry/vec3";
import { formatAngleDeg } from "../units/format";
import { sentenceStart, type BuildContext } from "./build-context";
import type { Fitting, PlacedPoint, Rider, Side } from "./build-types";
import type { Item, Place } from "./document";
import { endSide, fittingOf, flowAt, makeComponent, makeJoint, sideTrim } from "./fit-common";

/** A weld between two pipes at the point itself; each pipe gives half the root gap. */
export function fitPlainWeld(p: PlacedPoint, ctx: BuildContext, forced: Place | null = null): Fitting {
  const { places } = p.point;
  const place = forced ?? places.in ?? places.out ?? "shop";
  const halfGap = ctx.settings.allowances.rootGapMm / 2;
  const trim = sideTrim(p, place, ctx);
  const atOut = places.in === undefined && places.out === "field-fit";
  if (p.turnRad > WELD_MISMATCH_RAD) {
    ctx.report("turn-at-weld", "stop", `${sentenceStart(p.label)} turns ${formatAngleDeg(p.turnRad)} at a plain weld: put an elbow there, or correct the offsets.`, { pointId: p.point.id, runId: p.runId });
  } else if (p.turnRad > 0) {
    ctx.report("weld-mismatch", "note", `${sentenceStart(p.label)} turns ${formatAngleDeg(p.turnRad)}, taken up at the weld.`, { pointId: p.point.id, runId: p.runId });
  }
  const side = (trimMm: number): Side => ({
    through: false, terms: [], componentId: null, trimMm, bolted: null,
    weld: { key: `${p.uid}:weld`, kind: "butt", place, mismatchRad: p.turnRad },
    gap: { kind: "root-gap", mm: halfGap, label: "half the root gap" },
  });
  return fittingOf({ in: side(atOut ? 0 : trim), out: side(atOut ? trim : 0) });
}

/** The end of a run's pipe. A field weld, or a place named for it, makes it a joint to what lies outside. */
export function fitEnd(p: PlacedPoint, item: Extract<Item, { kind: "end" | "none" | "joint" | "support" }>, ctx: BuildContext): Fitting {
  const { places } = p.point;
  const goes = item.kind === "end" ? item.goes : "open";
  const named = places.in ?? places.out ?? null;
  const place = named ?? (goes === "field-weld" ? "field" : item.kind === "joint" ? "shop" : null);
  const silent = item.kind !== "end" || (item.goes === "open" && item.text.trim() === "");
  if (silent && place === null) {
    ctx.report("open-end", "warning", `${sentenceStart(p.label)} is an open end: say where it goes (field weld, continued, existing), or close it with a flange or a cap.`, { pointId: p.point.id, runId: p.runId });
  }
  const gapMm = item.kind === "end" && item.gapped === true && place !== null ? ctx.settings.allowances.rootGapMm : 0;
  const plain = endSide(place === null ? null : { key: `${p.uid}:end`, kind: "butt", place, mismatchRad: 0 }, place === null ? 0 : sideTrim(p, place, ctx));
  const side: Side = gapMm > 0 ? { ...plain, gap: { kind: "root-gap", mm: gapMm, label: "root gap to what stands there" } } : plain;
  const riders = item.kind === "support" ? [supportRider(p)] : [];
  return fittingOf({ in: side, out: side, riders, components: item.kind === "support" ? [supportPart(p, item.text)] : [] });
}

/** A pipe end typed inside a run is taken as a weld there. */
export function fitEndInside(p: PlacedPoint, item: Extract<Item, { kind: "end" }>, ctx: BuildContext): Fitting {
  ctx.report("end-inside", "warning", `${sentenceStart(p.label)} is an end inside the run: make it a plain joint, or take out the points after it.`, { pointId: p.point.id, runId: p.runId });
  return fitPlainWeld(p, ctx, item.goes === "field-weld" ? (p.point.places.in ?? "field") : null);
}

/** A support on the pipe: marked, never numbered, no cut. */
export function fitSupport(p: PlacedPoint, text: string): Fitting {
  return fittingOf({ components: [supportPart(p, text)], riders: [supportRider(p)] });
}

function supportPart(p: PlacedPoint, text: string) {
  const side = vecNegate([0, 0, 1]);
  return makeComponent(p, p.pipeIn, {
    kind: "support", description: text === "" ? "Pipe support" : `Pipe support ${text}`, text, aside: side, asideName: "D",
    weightSource: "not known", material: "as specified",
  });
}

function supportRider(p: PlacedPoint): Rider {
  return { componentId: p.uid, joint: makeJoint(p, { key: `${p.uid}:support`, kind: "attachment", a: null, b: p.uid, position: p.position, direction: flowAt(p) }) };
}
