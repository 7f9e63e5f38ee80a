/**
 * The trade's short words for what stands at a point, in the groups the list shows. Each row is one word the Item cell
 * offers: what it makes, what it is called in full, and what else may be typed for it. Common shop usage, no list of anyone's.
 */
import type { Item } from "@/iso";

export const ITEM_GROUPS = ["Flanges", "Valves and instruments", "Turns", "Branches", "Sizes and caps", "Welds", "Ends", "Supports"] as const;
export type ItemGroup = (typeof ITEM_GROUPS)[number];

export interface ItemWord {
  readonly word: string;
  readonly name: string;
  readonly group: ItemGroup;
  readonly also: readonly string[];
  /** The item the bare word makes; sizes and classes typed after it are read into it. */
  readonly item: Item;
  /** Weld place that comes with the word ("fw"). */
  readonly place?: "field" | "field-fit";
  /** What may follow, as an example. */
  readonly after?: string;
  /** What must follow, as a sentence names it: a size, a radius, a direction. */
  readonly needs?: string;
  /** True where a table's take-out is used, so that the caution of nominal take-outs belongs beside it. */
  readonly takeOut: boolean;
}

type Flange = Extract<Item, { kind: "flange" }>;
type Valve = Extract<Item, { kind: "valve" }>;

const flange = (kind: Flange["flange"], goes: Flange["goes"] = "open"): Item => ({
  kind: "flange", flange: kind, ratingClass: null, boltHoles: "straddle", gasketSide: "after", goes, text: "",
});
const valve = (kind: Valve["valve"]): Item => ({
  kind: "valve", valve: kind, ends: "flanged", ratingClass: null, mating: "weld-neck", stem: null, faceToFaceMm: null, tag: "",
});
const elbow = (kind: Extract<Item, { kind: "elbow" }>["elbow"]): Item => ({ kind: "elbow", elbow: kind });
const end = (goes: Extract<Item, { kind: "end" }>["goes"]): Item => ({ kind: "end", goes, text: "" });
/** Stands in for a size, a radius that is still to be typed. */
const SIZE_TO_COME = "2" as const;
const RADIUS_TO_COME_MM = 0;

function words(group: ItemGroup, rows: readonly Omit<ItemWord, "group">[]): readonly ItemWord[] {
  return rows.map((row) => ({ ...row, group }));
}

export const ITEM_WORDS: readonly ItemWord[] = [
  ...words("Flanges", [
    { word: "wn", name: "weld-neck flange", also: ["weldneck", "weld-neck", "wnrf"], item: flange("weld-neck"), after: "wn 300, wn turn 22.5 s, wn gsk 3/32", takeOut: true },
    { word: "so", name: "slip-on flange", also: ["slipon", "slip-on", "sorf"], item: flange("slip-on"), after: "so 150", takeOut: true },
    { word: "swf", name: "socket-weld flange", also: ["sw-flange"], item: flange("socket-weld"), after: "swf 300", takeOut: true },
    { word: "thf", name: "threaded flange", also: ["th-flange", "scrf"], item: flange("threaded"), after: "thf 150", takeOut: true },
    { word: "lj", name: "lap-joint flange on a stub end", also: ["lap", "lapjoint", "lap-joint"], item: flange("lap-joint"), after: "lj 150, lj short", takeOut: true },
    { word: "blind", name: "blind flange", also: ["bl", "bf"], item: flange("blind"), after: "blind 150", takeOut: true },
    { word: "nozzle", name: "weld-neck flange on a nozzle", also: ["noz"], item: flange("weld-neck", "nozzle"), after: "nozzle N3", takeOut: true },
  ]),
  ...words("Valves and instruments", [
    { word: "gate", name: "gate valve", also: ["gv"], item: valve("gate"), after: "gate 300, gate bw, gate stem n", takeOut: true },
    { word: "globe", name: "globe valve", also: ["glv"], item: valve("globe"), after: "globe 300", takeOut: true },
    { word: "check", name: "check valve", also: ["chk", "cv"], item: valve("check"), after: "check 150", takeOut: true },
    { word: "ball", name: "ball valve", also: ["bv"], item: valve("ball"), after: "ball 150, ball th", takeOut: true },
    { word: "bfly", name: "butterfly valve", also: ["butterfly", "btfly"], item: valve("butterfly"), after: "bfly 150", takeOut: true },
    { word: "inst", name: "instrument", also: ["instrument", "gauge"], item: { kind: "instrument", tag: "", ends: "threaded", ratingClass: null, lengthMm: 0 }, after: "inst PI-101, inst flg 300 f2f 8 FE-7", takeOut: false },
  ]),
  ...words("Turns", [
    { word: "90", name: "long-radius 90 elbow", also: ["ell", "elbow", "lr", "lr90", "l90"], item: elbow("lr-90"), takeOut: true },
    { word: "sr", name: "short-radius 90 elbow", also: ["sr90", "s90"], item: elbow("sr-90"), takeOut: true },
    { word: "45", name: "long-radius 45 elbow", also: ["lr45", "l45"], item: elbow("lr-45"), takeOut: true },
    { word: "sr45", name: "short-radius 45 elbow", also: ["s45"], item: elbow("sr-45"), takeOut: true },
    { word: "trim", name: "trimmed long-radius elbow", also: ["cut", "trimmed"], item: elbow("trimmed-lr"), takeOut: true },
    { word: "trim sr", name: "trimmed short-radius elbow", also: ["cut sr", "trimmed sr"], item: elbow("trimmed-sr"), takeOut: true },
    { word: "sw90", name: "socket-weld 90 elbow", also: ["sw-90"], item: elbow("sw-90"), takeOut: true },
    { word: "sw45", name: "socket-weld 45 elbow", also: ["sw-45"], item: elbow("sw-45"), takeOut: true },
    { word: "th90", name: "threaded 90 elbow", also: ["th-90"], item: elbow("th-90"), takeOut: true },
    { word: "th45", name: "threaded 45 elbow", also: ["th-45"], item: elbow("th-45"), takeOut: true },
    { word: "ret", name: "long-radius 180 return", also: ["return", "180"], item: { kind: "return", radius: "LR", toward: "U" }, after: "ret u, ret sr n", needs: "the way its second leg lies", takeOut: true },
    { word: "miter", name: "mitered turn", also: ["mitre"], item: { kind: "mitre", pieces: 3, radiusMm: null }, after: "miter 3, miter 4 r 18", takeOut: false },
    { word: "bend", name: "bent pipe", also: ["pb"], item: { kind: "bend", radiusMm: RADIUS_TO_COME_MM }, after: "bend 20", needs: "its center-line radius", takeOut: false },
  ]),
  ...words("Branches", [
    { word: "tee", name: "tee", also: ["t"], item: { kind: "tee", ends: "butt", branchNps: null }, after: "tee 2, tee sw, tee th", takeOut: true },
    { word: "cross", name: "cross", also: ["x", "crs"], item: { kind: "cross", ends: "butt", branchNps: null }, after: "cross 2, cross sw", takeOut: true },
    { word: "outlet", name: "branch outlet", also: ["ol", "let"], item: { kind: "outlet", branchNps: SIZE_TO_COME }, after: "outlet 2, outlet 1 sw, outlet 2 in", needs: "the branch size", takeOut: true },
    { word: "stub", name: "stub-in branch", also: ["stubin", "stub-in"], item: { kind: "stub-in", branchNps: SIZE_TO_COME }, after: "stub 2, stub 2 in, stub 3 pad 7", needs: "the branch size", takeOut: false },
  ]),
  ...words("Sizes and caps", [
    { word: "red", name: "concentric reducer", also: ["conc", "reducer", "cred"], item: { kind: "reducer", shape: "concentric", toNps: SIZE_TO_COME, toSchedule: null, flat: null }, after: "red 3", needs: "the size it goes to", takeOut: true },
    { word: "ecc", name: "eccentric reducer", also: ["ered", "eccentric"], item: { kind: "reducer", shape: "eccentric", toNps: SIZE_TO_COME, toSchedule: null, flat: "D" }, after: "ecc 3 flat d", needs: "the size it goes to", takeOut: true },
    { word: "cap", name: "cap", also: ["c"], item: { kind: "cap" }, after: "cap, cap sw, cap th", takeOut: true },
    { word: "cpl", name: "coupling", also: ["coupling", "full"], item: { kind: "coupling", half: false }, after: "cpl, cpl th", takeOut: true },
    { word: "half", name: "half coupling", also: ["hcpl", "half-coupling"], item: { kind: "coupling", half: true }, after: "half, half th", takeOut: true },
    { word: "union", name: "union", also: ["un"], item: { kind: "union", ends: "socket" }, after: "union, union th", takeOut: true },
  ]),
  ...words("Welds", [
    { word: "weld", name: "weld on straight pipe", also: ["w", "joint", "bw"], item: { kind: "joint" }, takeOut: false },
    { word: "fw", name: "field weld on straight pipe", also: ["field"], item: { kind: "joint" }, place: "field", takeOut: false },
    { word: "ffw", name: "field-fit weld on straight pipe", also: ["fit"], item: { kind: "joint" }, place: "field-fit", takeOut: false },
  ]),
  ...words("Ends", [
    { word: "end", name: "open pipe end, beveled", also: ["open", "be"], item: end("open"), takeOut: false },
    { word: "end fw", name: "pipe end, field weld", also: ["end field"], item: end("field-weld"), after: "end fw to L-204", takeOut: false },
    { word: "cont", name: "continued on another line", also: ["continued", "to"], item: end("continued"), after: "cont L-204", takeOut: false },
    { word: "exist", name: "existing pipe, verify", also: ["existing", "ex"], item: end("existing"), after: "exist 4 in header", takeOut: false },
    { word: "vent", name: "vent, pipe end", also: ["vt"], item: end("vent"), after: "vent to roof", takeOut: false },
    { word: "drain", name: "drain, pipe end", also: ["dr"], item: end("drain"), after: "drain to funnel", takeOut: false },
  ]),
  ...words("Supports", [
    { word: "sup", name: "support", also: ["support", "ps"], item: { kind: "support", text: "" }, after: "sup shoe", takeOut: false },
  ]),
];
