/**
 * The model: what a run document means. Components placed in space with ports, joints, cut pieces, spools, materials,
 * weights and problems. Millimetres, radians, kilograms; x east, y north, z up. Built by buildModel(), never edited.
 */
import type { Vec3 } from "../geometry/types";
import type { AxisName, Nps, Place, Provenance, RatingClass, RunDocument } from "./document";

/** A document point placed in space, with the direction of flow before and after it (null at a run's ends). */
export interface Node {
  readonly pointId: string;
  readonly runId: string;
  readonly index: number;
  readonly position: Vec3;
  readonly arriving: Vec3 | null;
  readonly leaving: Vec3 | null;
  /** Angle between arriving and leaving, radians; 0 on straight pipe and at ends. */
  readonly turnRad: number;
}

/** The straight stretch between two consecutive working points of one run. `id` is the id of the point it ends at. */
export interface Leg {
  readonly id: string;
  readonly runId: string;
  readonly fromPointId: string;
  readonly toPointId: string;
  readonly from: Vec3;
  readonly to: Vec3;
  readonly lengthMm: number;
  /** Unit vector along flow. */
  readonly direction: Vec3;
  readonly nps: Nps;
  readonly provenance: Provenance;
  /** True when its number is assumed, or measured once only. */
  readonly unverified: boolean;
}

export interface Port {
  /** "in" upstream, "out" downstream, "branch" the third one. */
  readonly id: "in" | "out" | "branch" | "branch-2";
  readonly position: Vec3;
  /** Unit vector out of the component. */
  readonly direction: Vec3;
  readonly nps: Nps;
}

export type ComponentKind =
  | "elbow" | "trimmed-elbow" | "return" | "mitre" | "tee" | "reducing-tee" | "cross" | "outlet" | "stub-in" | "pad"
  | "reducer-concentric" | "reducer-eccentric"
  | "flange-weld-neck" | "flange-slip-on" | "flange-socket-weld" | "flange-threaded" | "flange-lap-joint" | "flange-blind" | "stub-end"
  | "gasket" | "bolt-set" | "valve" | "instrument" | "coupling" | "half-coupling" | "union" | "cap" | "support"
  /** Socket-weld or threaded forged fittings; `ends` says which. */
  | "socket-elbow" | "socket-tee" | "socket-cross" | "socket-cap";

export interface Component {
  /** Stable: built from the point's id and a role, e.g. "p7" or "p7.flange-in". */
  readonly id: string;
  readonly pointId: string;
  readonly runId: string;
  readonly kind: ComponentKind;
  readonly valve: "gate" | "globe" | "check" | "ball" | "butterfly" | null;
  readonly ends: "butt" | "socket" | "threaded" | "flanged" | null;
  readonly nps: Nps;
  /** Small end, branch size; null when there is one size. */
  readonly nps2: Nps | null;
  readonly schedule: string | null;
  readonly ratingClass: RatingClass | null;
  /** Working point: centre of an elbow, tee or valve; contact face of a flange; large end of a reducer. */
  readonly centre: Vec3;
  readonly ports: readonly Port[];
  /** Stem of a valve, or flat side of an eccentric reducer: unit vector; null otherwise. */
  readonly aside: Vec3 | null;
  readonly asideName: AxisName | null;
  /** Elbows only. */
  readonly angleRad: number | null;
  readonly radiusMm: number | null;
  /** Turned against the fitting before it on the same run, looking along flow, clockwise positive; null for the first and for what has no plane. */
  readonly roll?: Roll | null;
  /** Flanges whose holes do not straddle: degrees clockwise looked at from `from`. */
  readonly boltTurn?: { readonly turnDeg: number; readonly from: AxisName } | null;
  /** Bolt sets: studs (with two nuts each) of one bolted face. */
  readonly bolts?: { readonly count: number; readonly diameter: string; readonly lengthMm: number | null } | null;
  /** A take-out used here that is from memory and not yet confirmed by the shop; its catalogue key. */
  readonly unconfirmedKey: string | null;
  /** Equal descriptions make one row of the material list. */
  readonly description: string;
  readonly material: string;
  readonly weightKg: number | null;
  readonly weightSource: string;
  /** Table and standard its dimensions are from. */
  readonly source: string;
  /** Tag or name printed at it ("V-101", "NOZZLE N3"). */
  readonly text: string;
  readonly spool: string | null;
}

/** A fitting's plane against the plane of the fitting before it. */
export interface Roll {
  readonly againstId: string;
  /** -pi to pi, radians. */
  readonly angleRad: number;
  /** Arc on the pipe's outside, mm. */
  readonly arcMm: number;
}

/** `mitre` is the oblique butt weld within a mitred turn. Threaded and bolted joints carry no weld number. */
export type JointKind = "butt" | "socket" | "slip-on" | "branch" | "mitre" | "attachment" | "threaded" | "bolted";

export interface Joint {
  /** `${pointId}:${role}` - what the marks register is keyed by; a moved point keeps its joints' keys. */
  readonly key: string;
  readonly pointId: string;
  readonly kind: JointKind;
  readonly place: Place;
  /** Weld number ("5", "5A"); null for bolted joints and supports. */
  readonly number: string | null;
  readonly position: Vec3;
  /** Unit vector along flow at the joint. */
  readonly direction: Vec3;
  /** Ids of the component or piece on either side; null = outside the line (field side of an end). */
  readonly a: string | null;
  readonly b: string | null;
  readonly nps: Nps;
  /** Angle between the two sides at the weld, radians; 0 when square. */
  readonly mismatchRad: number;
  /** Gap left for it in the arithmetic, mm (root gap, gasket; a socket's pull-back); negative where the pipe goes in: a thread's make-up. */
  readonly gapMm: number;
  /** Spool that carries it: the one on its upstream side when the two differ. */
  readonly spool: string | null;
}

/** One line of a cut length's arithmetic; the signed values sum to the exact cut length. */
export interface CutTerm {
  readonly kind: "centre-to-centre" | "take-out" | "root-gap" | "pull-back" | "make-up" | "setting" | "gasket" | "bend" | "trim";
  /** Reader's words: "37 1/2 face to centre", "weld-neck hub", "LR 90 take-out". */
  readonly label: string;
  readonly valueMm: number;
  readonly componentId: string | null;
  readonly source: string | null;
  readonly unconfirmed: boolean;
}

export interface Piece {
  /** `${legId}:${n}`: n-th piece of its leg. */
  readonly key: string;
  /** Piece mark ("P3"). */
  readonly mark: string;
  readonly legId: string;
  /** All legs it runs through in flow order, legId last: more than one where a support or an outlet sits on it. */
  readonly legIds?: readonly string[];
  readonly runId: string;
  readonly nps: Nps;
  readonly schedule: string;
  readonly material: string;
  readonly odMm: number;
  readonly wallMm: number;
  readonly start: Vec3;
  readonly end: Vec3;
  /** Unit vector along flow. */
  readonly direction: Vec3;
  /** Bends of the pipe itself, in flow order; absent = straight. `start`, `end` and `direction` are then those of its first and last straight. */
  readonly bends?: readonly PieceBend[];
  readonly terms: readonly CutTerm[];
  /** Exact sum of the terms, mm; negative when it does not fit (a problem says so). */
  readonly cutLengthMm: number;
  readonly ends: readonly [PieceEnd, PieceEnd];
  readonly weightKg: number | null;
  readonly weightSource: string;
  readonly spool: string | null;
}

/** One bend of a piece: where along the cut pipe it begins, and its developed length along the centre line, mm. */
export interface PieceBend {
  readonly pointId: string;
  readonly angleRad: number;
  readonly radiusMm: number;
  readonly startMm: number;
  readonly developedMm: number;
  /** Turned against the fitting or bend before it on the same run; absent for the first. */
  readonly roll?: Roll;
}

export interface PieceEnd {
  readonly prep: "bevel" | "square" | "thread" | "mitre" | "saddle";
  /** Angle of a mitred end off square, degrees; absent = square. */
  readonly cutAngleDeg?: number;
  readonly jointKey: string | null;
}

export interface MaterialRow {
  readonly item: number;
  readonly quantity: number;
  /** "ea", or "mm" for pipe (quantity is the summed cut length). */
  readonly unit: "ea" | "mm";
  readonly size: string;
  readonly description: string;
  readonly material: string;
  readonly weightKg: number | null;
  readonly source: string;
  /** Component ids and piece keys it counts. */
  readonly refs: readonly string[];
}

export interface Spool {
  readonly letter: string;
  /** Stable anchor for the register: the smallest-in-flow point id or joint it started from. */
  readonly anchor: string;
  readonly componentIds: readonly string[];
  readonly pieceKeys: readonly string[];
  readonly jointKeys: readonly string[];
  readonly materials: readonly MaterialRow[];
  /** Sum of the known weights, kg, and how many parts have none. */
  readonly weightKg: number;
  readonly unweighed: number;
  readonly centreOfGravity: Vec3 | null;
  /** Water that fills it, litres, and what it then weighs, kg: pipe and butt-weld fittings at their inside; the rest is named as left out. */
  readonly volumeL?: number;
  readonly filledKg?: number;
  /** Outside surface of pipe and butt-weld fittings, square metres. */
  readonly paintM2?: number;
  /** Axis-parallel outer box, mm. */
  readonly boxMm: Vec3;
  /** What is held against the shipping box, mm, longest first: the box as it lies where that ships, else the best over rotations. */
  readonly shippingMm?: Vec3;
  /** sha-free content key: canonical JSON of everything a bench would notice; equal strings = same spool. */
  readonly content: string;
}

export type Severity = "stop" | "warning" | "note";

export interface Problem {
  readonly code: string;
  readonly severity: Severity;
  /** One plain sentence that says what is wrong and what to do. */
  readonly text: string;
  readonly pointId: string | null;
  readonly runId: string | null;
  /** Key of the take-out it speaks of, so that the shop's own value can be entered there and then. */
  readonly catalogueKey?: string;
}

/** A run that comes back to its line: how far its dimensions miss the fitting it meets. */
export interface Loop {
  readonly runId: string;
  readonly toPointId: string;
  readonly missMm: Vec3;
  readonly closes: boolean;
}

/** Where the specification, material, insulation or tracing changes; an empty text = none before, or none after. */
export interface LineBreak {
  readonly pointId: string;
  readonly position: Vec3;
  readonly what: "specification" | "material" | "insulation" | "tracing";
  readonly before: string;
  readonly after: string;
}

export interface Model {
  readonly loops?: readonly Loop[];
  /** absent = none. */
  readonly breaks?: readonly LineBreak[];
  readonly document: RunDocument;
  readonly nodes: readonly Node[];
  readonly legs: readonly Leg[];
  readonly components: readonly Component[];
  readonly joints: readonly Joint[];
  readonly pieces: readonly Piece[];
  readonly spools: readonly Spool[];
  readonly problems: readonly Problem[];
}

/** Weld numbers, piece marks and spool letters that stick. */
export interface MarksRegister {
  readonly version: 1;
  /** False while a draft renumbers along flow; true from the first submission or recorded work on. */
  readonly sticky: boolean;
  readonly welds: Readonly<Record<string, string>>;
  readonly pieces: Readonly<Record<string, string>>;
  readonly spools: Readonly<Record<string, string>>;
  /** Per piece key, the joints at its ends when last marked: tells a piece whose leg was renamed by a reversal or a reorder. */
  readonly pieceJoints?: Readonly<Record<string, readonly string[]>>;
  /** Per spool anchor, the parts it held when last marked: tells a spool that moved from one that was split or merged. */
  readonly spoolParts?: Readonly<Record<string, readonly string[]>>;
  /** Marks whose joint, piece or spool is gone: listed for ever, never reused. */
  readonly voided: readonly { readonly kind: "weld" | "piece" | "spool"; readonly mark: string; readonly key: string }[];
}

/** The shop's own word on a catalogue value: confirmed as tabulated (valueMm null) or replaced by what it measured. */
export interface TakeOutWord {
  readonly key: string;
  readonly valueMm: number | null;
  readonly by: string;
  readonly at: string;
}
