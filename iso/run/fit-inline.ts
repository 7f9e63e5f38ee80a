/** Reducers, couplings and caps. */
import { vecAddScaled, vecNegate, vecReject, vecUnit } from "../geometry/vec3";
import { capKey, reducerKey, socketKey } from "../catalogue/keys";
import { axisVector, axisWord } from "./axes";
import { sentenceStart, takeOutTerm, type BuildContext } from "./build-context";
import type { Fitting, PlacedPoint, Side } from "./build-types";
import { NPS_SIZES, type Item } from "./document";
import { bareSide, buttSide, fittingOf, flowAfter, flowAt, makeComponent, port, socketSide, straightPorts, unconfirmedOf } from "./fit-common";
import type { CutTerm } from "./model-types";
import { SOCKET_CLASS, sizePairText, sizeText } from "./words";

type ReducerItem = Extract<Item, { kind: "reducer" }>;

/** A reducer; the point is the weld plane of its large end, on the line that arrives. */
export function fitReducer(p: PlacedPoint, item: ReducerItem, ctx: BuildContext): Fitting {
  const where = { pointId: p.point.id, runId: p.runId };
  const down = NPS_SIZES.indexOf(p.pipeOut.nps) < NPS_SIZES.indexOf(p.pipeIn.nps);
  const [large, small] = down ? [p.pipeIn, p.pipeOut] : [p.pipeOut, p.pipeIn];
  if (large.nps === small.nps) {
    ctx.report("reducer-same-size", "stop", `${sentenceStart(p.label)} reduces NPS ${large.nps} to itself: give the size after it.`, where);
  }
  const flow = flowAt(p);
  const flat = item.shape === "eccentric" && item.flat ? vecUnit(vecReject(axisVector(item.flat), flow)) : null;
  if (item.shape === "eccentric" && !flat) {
    ctx.report("eccentric-flat", "stop", item.flat
      ? `${sentenceStart(p.label)}: the eccentric reducer's flat side cannot face ${axisWord(item.flat)}, along the pipe. Choose another side.`
      : `${sentenceStart(p.label)}: say which side of the eccentric reducer is flat; until then it is drawn without a shift.`, where);
  }
  const length = ctx.takeOut(reducerKey(large.nps, small.nps), `reducer length, ${sizePairText(large.nps, small.nps, ctx.units)}`, p);
  const term = takeOutTerm("reducer length", length, p.uid);
  const side = (name: "in" | "out", terms: readonly CutTerm[]): Side =>
    (name === "in" ? p.isFirst : p.isLast) ? bareSide(terms, p.uid) : buttSide(p, name, ctx, { terms, componentId: p.uid });
  const component = makeComponent(p, large, {
    kind: item.shape === "eccentric" ? "reducer-eccentric" : "reducer-concentric", ends: "butt", nps2: small.nps, schedule: large.schedule,
    ports: [port("in", p.position, vecNegate(flow), down ? 0 : length.mm, p.pipeIn.nps), port("out", p.departure, flowAfter(p), down ? length.mm : 0, p.pipeOut.nps)],
    aside: flat, asideName: flat ? item.flat : null, source: length.source, unconfirmedKey: unconfirmedOf(length),
    centre: down ? p.position : p.departure, description: `Reducer, ${item.shape}, butt-weld`,
  });
  return fittingOf({ components: [component], in: side("in", down ? [] : [term]), out: side("out", down ? [term] : []) });
}

/** A coupling about its middle; a half coupling with its far end at the point. */
export function fitCoupling(p: PlacedPoint, half: boolean, ctx: BuildContext): Fitting {
  const word = half ? "half coupling" : "coupling";
  const laying = ctx.takeOut(socketKey(half ? "half-coupling" : "coupling", SOCKET_CLASS, p.pipeIn.nps), `${word} length in ${sizeText(p.pipeIn.nps, ctx.units)}`, p);
  const flow = flowAt(p);
  const atOut = p.isFirst && half;
  const [before, after] = half ? (atOut ? [0, laying.mm] : [laying.mm, 0]) : [laying.mm / 2, laying.mm / 2];
  const term = takeOutTerm(half ? "half coupling length" : "half the coupling", laying, p.uid, half ? 1 : 0.5);
  const component = makeComponent(p, p.pipeIn, {
    kind: half ? "half-coupling" : "coupling", ends: "socket", ports: straightPorts(p.position, flow, before, after, p.pipeIn.nps),
    source: laying.source, unconfirmedKey: unconfirmedOf(laying), weightSource: "not known",
    description: `${sentenceStart(word)}, socket-weld, class ${SOCKET_CLASS}`,
  });
  const side = (name: "in" | "out"): Side => {
    const reach = name === "in" ? before : after;
    const terms = reach > 0 ? [term] : [];
    if (name === "in" ? p.isFirst : p.isLast) return bareSide(terms, p.uid);
    return (half && reach === 0 ? buttSide : socketSide)(p, name, ctx, { terms, componentId: p.uid });
  };
  return fittingOf({ components: [component], in: side("in"), out: side("out") });
}

/** A cap closing the run; the point is its outside end. */
export function fitCap(p: PlacedPoint, ctx: BuildContext): Fitting {
  const length = ctx.takeOut(capKey(p.pipeIn.nps), `cap length in ${sizeText(p.pipeIn.nps, ctx.units)}`, p);
  const terms = [takeOutTerm("cap length", length, p.uid)];
  if (!p.isFirst && !p.isLast) {
    ctx.report("cap-inside", "stop", `${sentenceStart(p.label)} is a cap inside the run: move it to the run's end.`, { pointId: p.point.id, runId: p.runId });
  }
  const toPipe = p.isFirst ? flowAfter(p) : vecNegate(flowAt(p));
  const component = makeComponent(p, p.pipeIn, {
    kind: "cap", ends: "butt", schedule: p.pipeIn.schedule, source: length.source, unconfirmedKey: unconfirmedOf(length),
    ports: [{ id: p.isFirst ? "out" : "in", position: vecAddScaled(p.position, toPipe, length.mm), direction: toPipe, nps: p.pipeIn.nps }],
    description: "Cap, butt-weld",
  });
  const side = (name: "in" | "out"): Side => buttSide(p, name, ctx, { terms, componentId: p.uid });
  return fittingOf({
    components: [component], in: p.isFirst ? bareSide([], p.uid) : side("in"),
    out: p.isLast ? bareSide([], p.uid) : p.isFirst ? side("out") : buttSide(p, "out", ctx, { terms: [], componentId: p.uid }),
  });
}
