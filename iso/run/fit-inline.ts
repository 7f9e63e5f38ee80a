/** Reducers. */
import { vecNegate, vecReject, vecUnit } from "../geometry/vec3";
import { reducerKey } from "../catalogue/keys";
import { axisVector, axisWord } from "./axes";
import { sentenceStart, takeOutTerm, type BuildContext } from "./build-context";
import type { Fitting, PlacedPoint, Side } from "./build-types";
import { NPS_SIZES, type Item } from "./document";
import { bareSide, buttSide, fittingOf, flowAfter, flowAt, makeComponent, port, unconfirmedOf } from "./fit-common";
import type { CutTerm } from "./model-types";
import { sizePairText } from "./words";

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
