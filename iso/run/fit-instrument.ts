/**
 * Measuring instruments. Within a run one takes its given length between flanges or welds, about its centre; at a run's
 * end it closes the run, and the point is its face. Its length comes from the maker, never from a table.
 */
import { vecAddScaled, vecNegate } from "../geometry/vec3";
import { sentenceStart, type BuildContext } from "./build-context";
import type { Fitting, PlacedPoint, Side } from "./build-types";
import type { Item } from "./document";
import { bareSide, endedSide, fittingOf, flowAfter, flowAt, makeComponent } from "./fit-common";
import { fitFlange } from "./fit-flange";
import { fitValve } from "./fit-valve";
import type { Component } from "./model-types";

type InstrumentItem = Extract<Item, { kind: "instrument" }>;

const END_WORDS: Readonly<Record<InstrumentItem["ends"], string>> = { flanged: "flanged", butt: "butt-weld", socket: "socket-weld", threaded: "threaded" };
const SOURCE = "given with the instrument";

export function fitInstrument(p: PlacedPoint, item: InstrumentItem, ctx: BuildContext): Fitting {
  if (p.isFirst || p.isLast) return item.ends === "flanged" ? flangedAtEnd(p, item, ctx) : atEnd(p, item, item.ends, ctx);
  if (item.lengthMm === 0) {
    ctx.report("instrument-length", "stop", `${sentenceStart(p.label)}: give the instrument's length, end to end.`, { pointId: p.point.id, runId: p.runId });
  }
  const { ends, lengthMm } = item;
  const inline = fitValve(p, { kind: "valve", valve: "gate", ends, ratingClass: item.ratingClass, mating: "weld-neck", stem: null, faceToFaceMm: lengthMm, tag: item.tag }, ctx);
  return asInstrument(inline, p, item);
}

/** The same parts and joints with an instrument where the stand-in body was. */
function asInstrument(fitting: Fitting, p: PlacedPoint, item: InstrumentItem): Fitting {
  const named = (side: Side): Side => ({
    ...side, terms: side.terms.map((term) => (term.componentId === p.uid && term.kind === "take-out" ? { ...term, label: "half the instrument", source: SOURCE } : term)),
  });
  return {
    ...fitting, components: fitting.components.map((c) => (c.id === p.uid ? { ...c, ...instrumentFacts(item) } : c)), in: named(fitting.in), out: named(fitting.out),
  };
}

function instrumentFacts(item: InstrumentItem): Pick<Component, "kind" | "valve" | "ends" | "schedule" | "aside" | "asideName" | "unconfirmedKey" | "description" | "material" | "weightKg" | "weightSource" | "source" | "text"> {
  return {
    kind: "instrument", valve: null, ends: item.ends, schedule: null, aside: null, asideName: null, unconfirmedKey: null, description: `Instrument, ${END_WORDS[item.ends]}`,
    material: "as specified", weightKg: null, weightSource: "not known", source: SOURCE, text: item.tag,
  };
}

/** Bolted to a flange at the point, as a blind would be. */
function flangedAtEnd(p: PlacedPoint, item: InstrumentItem, ctx: BuildContext): Fitting {
  const flange = fitFlange(p, {
    kind: "flange", flange: "blind", ratingClass: item.ratingClass, boltHoles: "straddle", gasketSide: "after", goes: "open", text: item.tag,
  }, ctx);
  return asInstrument(flange, p, item);
}

/** Screwed or welded to the pipe's end. */
function atEnd(p: PlacedPoint, item: InstrumentItem, ends: Exclude<InstrumentItem["ends"], "flanged">, ctx: BuildContext): Fitting {
  const name = p.isFirst ? "out" : "in";
  const pipe = p.isFirst ? p.pipeOut : p.pipeIn;
  const toPipe = p.isFirst ? flowAfter(p) : vecNegate(flowAt(p));
  const component = makeComponent(p, pipe, {
    ...instrumentFacts(item), ports: [{ id: name, position: vecAddScaled(p.position, toPipe, 0), direction: toPipe, nps: pipe.nps }],
  });
  const side = p.isFirst && p.isLast ? bareSide([], p.uid) : endedSide(ends, p, name, ctx, { terms: [], componentId: p.uid }, pipe.nps);
  return fittingOf({ components: [component], [name]: side, [name === "in" ? "out" : "in"]: bareSide([], p.uid) });
}
