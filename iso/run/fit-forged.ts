/** Couplings, unions and caps: socket-weld, threaded, and the butt-weld cap. */
import { vecAddScaled, vecNegate } from "../geometry/vec3";
import { capKeyFor } from "../catalogue/catalogue";
import { socketKey, threadedKey } from "../catalogue/keys";
import { pipeWall } from "../catalogue/pipe";
import { sentenceStart, takeOutTerm, type BuildContext } from "./build-context";
import type { Fitting, PlacedPoint, Side } from "./build-types";
import { bareSide, buttSide, endedSide, fittingOf, flowAfter, flowAt, makeComponent, straightPorts, unconfirmedOf, type FittingEnds } from "./fit-common";
import { forgedClass, sizeText } from "./words";

type Ends = "socket" | "threaded";
const ENDS_WORDS: Readonly<Record<FittingEnds, string>> = { butt: "butt-weld", socket: "socket-weld", threaded: "threaded" };

function forgedKey(fitting: "coupling" | "half-coupling" | "union" | "cap", ends: Ends, p: PlacedPoint, ctx: BuildContext): string {
  const c = forgedClass(ctx.settings, ends);
  return ends === "socket" ? socketKey(fitting, c, p.pipeIn.nps) : threadedKey(fitting, c, p.pipeIn.nps);
}

function forgedWords(word: string, ends: Ends, ctx: BuildContext): string {
  return `${sentenceStart(word)}, ${ENDS_WORDS[ends]}, class ${forgedClass(ctx.settings, ends)}`;
}

/** A coupling about its middle; a half coupling with its far end at the point. */
export function fitCoupling(p: PlacedPoint, half: boolean, ends: Ends, ctx: BuildContext): Fitting {
  const word = half ? "half coupling" : "coupling";
  const what = `${ends === "threaded" ? "threaded " : ""}${word} length in ${sizeText(p.pipeIn.nps, ctx.units)}`;
  const laying = ctx.takeOut(forgedKey(half ? "half-coupling" : "coupling", ends, p, ctx), what, p);
  const flow = flowAt(p);
  const atOut = p.isFirst && half;
  const [before, after] = half ? (atOut ? [0, laying.mm] : [laying.mm, 0]) : [laying.mm / 2, laying.mm / 2];
  const term = takeOutTerm(half ? "half coupling length" : "half the coupling", laying, p.uid, half ? 1 : 0.5);
  const component = makeComponent(p, p.pipeIn, {
    kind: half ? "half-coupling" : "coupling", ends, ports: straightPorts(p.position, flow, before, after, p.pipeIn.nps),
    source: laying.source, unconfirmedKey: unconfirmedOf(laying), weightSource: "not known", description: forgedWords(word, ends, ctx),
  });
  const side = (name: "in" | "out"): Side => {
    const reach = name === "in" ? before : after;
    const terms = reach > 0 ? [term] : [];
    if (name === "in" ? p.isFirst : p.isLast) return bareSide(terms, p.uid);
    return endedSide(half && reach === 0 ? "butt" : ends, p, name, ctx, { terms, componentId: p.uid });
  };
  return fittingOf({ components: [component], in: side("in"), out: side("out") });
}

/** A union about its middle. */
export function fitUnion(p: PlacedPoint, ends: Ends, ctx: BuildContext): Fitting {
  const laying = ctx.takeOut(forgedKey("union", ends, p, ctx), `${ENDS_WORDS[ends]} union length in ${sizeText(p.pipeIn.nps, ctx.units)}`, p);
  const term = takeOutTerm("half the union", laying, p.uid, 0.5);
  const component = makeComponent(p, p.pipeIn, {
    kind: "union", ends, ports: straightPorts(p.position, flowAt(p), laying.mm / 2, laying.mm / 2, p.pipeIn.nps),
    source: laying.source, unconfirmedKey: unconfirmedOf(laying), weightSource: "not known", description: forgedWords("union", ends, ctx),
  });
  const side = (name: "in" | "out"): Side =>
    (name === "in" ? p.isFirst : p.isLast) ? bareSide([term], p.uid) : endedSide(ends, p, name, ctx, { terms: [term], componentId: p.uid });
  return fittingOf({ components: [component], in: side("in"), out: side("out") });
}

/** A cap closing the run; the point is its outside end. */
export function fitCap(p: PlacedPoint, ends: FittingEnds, ctx: BuildContext): Fitting {
  const wall = pipeWall(p.pipeIn.nps, p.pipeIn.schedule, ctx.units);
  const key = ends === "butt" ? capKeyFor(p.pipeIn.nps, wall?.wallMm ?? null) : forgedKey("cap", ends, p, ctx);
  const length = ctx.takeOut(key, `${ends === "butt" ? "" : `${ENDS_WORDS[ends]} `}cap length in ${sizeText(p.pipeIn.nps, ctx.units)}`, p);
  const terms = [takeOutTerm("cap length", length, p.uid)];
  if (!p.isFirst && !p.isLast) {
    ctx.report("cap-inside", "stop", `${sentenceStart(p.label)} is a cap inside the run: move it to the run's end.`, { pointId: p.point.id, runId: p.runId });
  }
  const toPipe = p.isFirst ? flowAfter(p) : vecNegate(flowAt(p));
  const component = makeComponent(p, p.pipeIn, {
    kind: ends === "butt" ? "cap" : "socket-cap", ends, schedule: ends === "butt" ? p.pipeIn.schedule : null, source: length.source, unconfirmedKey: unconfirmedOf(length),
    ports: [{ id: p.isFirst ? "out" : "in", position: vecAddScaled(p.position, toPipe, length.mm), direction: toPipe, nps: p.pipeIn.nps }],
    description: ends === "butt" ? "Cap, butt-weld" : forgedWords("cap", ends, ctx), ...(ends === "butt" ? {} : { weightSource: "not known" }),
  });
  const side = (name: "in" | "out"): Side => endedSide(ends, p, name, ctx, { terms, componentId: p.uid });
  return fittingOf({
    components: [component], in: p.isFirst ? bareSide([], p.uid) : side("in"),
    out: p.isLast ? bareSide([], p.uid) : p.isFirst ? side("out") : buttSide(p, "out", ctx, { terms: [], componentId: p.uid }),
  });
}
