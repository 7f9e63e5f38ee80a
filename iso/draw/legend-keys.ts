/** Which symbols and marks the legend has to explain: only those that are on the paper. */
import type { Item } from "../run/document";
import type { Component, ComponentKind, Joint } from "../run/model-types";
import type { DisplayItem, DrawOptions, LegendKey } from "./drawing-types";
import { isBend } from "./paper-model";
import type { Sketch } from "./sketch";
import { isSlope, typedSlopes } from "./slopes";
import { isWeldJoint } from "./weld-joint";

const BRACKETED = /^\(\d.*\)$/;

/** Order in which keys stand: welds, marks, fittings, ends. */
const ORDER: readonly LegendKey[] = [
  "shop-weld", "field-weld", "field-fit-weld", "typical-butt", "typical-fillet", "field-symbol", "threaded-joint",
  "weld-number", "material-item", "cut-piece", "spool", "revision", "reference-dimension", "unverified", "flow",
  "weld-neck", "slip-on", "socket-flange", "threaded-flange", "lap-joint", "blind", "bolt-turn",
  "gate", "globe", "check", "ball", "butterfly", "instrument",
  "reducer", "eccentric-reducer", "coupling", "union", "socket-end", "threaded-end", "cap", "socket-cap",
  "outlet", "stub-in", "pad", "set-in", "mitre", "bend", "slope", "offset", "break", "support", "vent", "drain", "goes-on",
];

const KIND_KEYS: Readonly<Partial<Record<ComponentKind, LegendKey>>> = {
  mitre: "mitre", outlet: "outlet", "stub-in": "stub-in", "reducer-concentric": "reducer", "reducer-eccentric": "eccentric-reducer",
  "flange-weld-neck": "weld-neck", "flange-slip-on": "slip-on", "flange-socket-weld": "socket-flange", "flange-threaded": "threaded-flange",
  "flange-lap-joint": "lap-joint", "flange-blind": "blind", instrument: "instrument", coupling: "coupling", "half-coupling": "coupling", union: "union",
  cap: "cap", "socket-cap": "socket-cap", support: "support",
};

/** Parts whose open end shows a socket's rim or a thread. */
const RIMMED: ReadonlySet<ComponentKind> = new Set(["socket-elbow", "socket-tee", "socket-cross", "valve"]);

/** Keys of the parts on paper. */
export function partKeys(components: readonly Component[], itemOf: (pointId: string) => Item | null): ReadonlySet<LegendKey> {
  const keys = new Set<LegendKey>();
  for (const component of components) {
    const { kind, ends, valve } = component;
    const item = itemOf(component.pointId);
    const own = isBend(component) ? "bend" : kind === "valve" ? valve : KIND_KEYS[kind];
    if (own) keys.add(own);
    if (RIMMED.has(kind) && ends === "socket") keys.add("socket-end");
    if (RIMMED.has(kind) && ends === "threaded" && kind !== "valve") keys.add("threaded-end");
    if (component.boltTurn) keys.add("bolt-turn");
    if ((kind === "outlet" || kind === "stub-in") && (item?.kind === "outlet" || item?.kind === "stub-in") && item.set === "in") keys.add("set-in");
    if (kind === "stub-in" && item?.kind === "stub-in" && item.padMm !== undefined) keys.add("pad");
  }
  return keys;
}

/** Keys of the joints on paper: dots, flags, and the one typical welding symbol (AWS A2.4) of each kind of weld. */
export function jointKeys(joints: readonly Joint[]): ReadonlySet<LegendKey> {
  const keys = new Set<LegendKey>();
  for (const joint of joints) {
    if (joint.kind === "threaded") keys.add("threaded-joint");
    if (!isWeldJoint(joint)) continue;
    keys.add(joint.place === "shop" ? "shop-weld" : joint.place === "field" ? "field-weld" : "field-fit-weld");
    keys.add(joint.kind === "socket" || joint.kind === "slip-on" ? "typical-fillet" : "typical-butt");
    if (joint.place !== "shop") keys.add("field-symbol");
  }
  return keys;
}

/** Keys of what stands at the open ends. */
export function endKeys(items: readonly Item[]): ReadonlySet<LegendKey> {
  return new Set(items.flatMap((item): LegendKey[] => {
    if (item.kind !== "end" || item.goes === "open") return [];
    return [item.goes === "vent" ? "vent" : item.goes === "drain" ? "drain" : "goes-on"];
  }));
}

/** Any keys, each once, in the order of the legend. */
export const inLegendOrder = (keys: ReadonlySet<LegendKey>): readonly LegendKey[] => ORDER.filter((key) => keys.has(key));

/** @param items what is drawn: a bracketed dimension is explained only where one stands */
export function legendOf(sketch: Sketch, options: DrawOptions, items: readonly DisplayItem[]): readonly LegendKey[] {
  const { show } = options;
  const { model } = sketch;
  const points = new Map(model.document.runs.flatMap((run) => run.points.map((point) => [point.id, point.item] as const)));
  const onPaper = [...sketch.vertices.keys()].flatMap((id) => sketch.componentsAt.get(id) ?? []);
  const ends = [...sketch.vertices.values()].filter(({ id }) => (sketch.edgesAt.get(id)?.length ?? 0) === 1 && sketch.isHome(id)).flatMap(({ id }) => points.get(id) ?? []);
  const typed = typedSlopes(model);
  const marks: readonly (readonly [LegendKey, boolean])[] = [
    ["material-item", show.items && sketch.components.length > 0], ["weld-number", show.welds && sketch.joints.some(isWeldJoint)],
    ["cut-piece", show.pieces && sketch.pieces.length > 0], ["spool", model.spools.length > 1], ["flow", items.some((item) => item.layer === "flow")],
    ["revision", Boolean(options.changed && options.changed.pointIds.length > 0)],
    ["reference-dimension", items.some((item) => item.type === "text" && BRACKETED.test(item.text))], ["unverified", sketch.edges.some((edge) => edge.leg.unverified)],
    ["slope", sketch.edges.some((edge) => isSlope(edge, typed))], ["offset", items.some((item) => item.layer === "hatch")],
    ["break", (model.breaks ?? []).some(({ pointId }) => sketch.vertices.has(sketch.vertexOf(pointId)) && sketch.isHome(pointId))],
  ];
  const used = marks.flatMap(([key, isUsed]) => (isUsed ? [key] : []));
  return inLegendOrder(new Set([...used, ...jointKeys(sketch.joints), ...partKeys(onPaper, (id) => points.get(id) ?? null), ...endKeys(ends)]));
}
