/**
 * Shapes of "every sensible way to close". Millimetres, radians (degrees where a name says Deg), kilograms; x east,
 * y north, z up. An end's direction points out of the pipe that stands there, towards the gap to be closed.
 */
import type { Nps, UnitSystem } from "../run/document";
import type { TakeOutWord } from "../run/model-types";
import type { Vec3 } from "../geometry/types";

/** Angles of whole elbows a shop may keep. 90 and 45 stand in the tables; the others are what a shop buys or keeps. */
export const STOCK_ANGLES = [90, 60, 45, 30, 22.5] as const;
export type StockAngle = (typeof STOCK_ANGLES)[number];
export type ElbowRadius = "LR" | "SR";

export interface WaysEnd {
  readonly position: Vec3;
  readonly direction: Vec3;
  readonly nps: Nps;
  /** Least straight between the end (less its gap) and the first elbow; 0 = an elbow may be welded to the end itself. */
  readonly straightMm: number;
  /** A flange, a fitting, a nozzle: nothing can be cut back or lengthened here. */
  readonly fixed?: boolean;
}

/** What the pipe must keep clear of: its centre line less OD/2 keeps `clearMm` away. Lengths in mm. */
export type KeepOut =
  /** The half space behind a plane; `normal` points to the free side. */
  | { readonly kind: "plane"; readonly name: string; readonly point: Vec3; readonly normal: Vec3; readonly clearMm: number }
  | { readonly kind: "sphere"; readonly name: string; readonly centre: Vec3; readonly radiusMm: number; readonly clearMm: number }
  | { readonly kind: "box"; readonly name: string; readonly low: Vec3; readonly high: Vec3; readonly clearMm: number };

export interface WaysInput {
  readonly end0: WaysEnd;
  readonly end1: WaysEnd;
  readonly schedule: string;
  /** Schedule of end 1's pipe; that of end 0 when left out. */
  readonly schedule1?: string;
  readonly rootGapMm: number;
  /** Whole elbows the shop has. */
  readonly angles: readonly StockAngle[];
  readonly radii: readonly ElbowRadius[];
  /** Largest angle an elbow may be trimmed to, degrees; 0 = nothing is trimmed. */
  readonly trimMaxDeg: number;
  /** Shortest pipe between two welds, mm; null = 1.5 OD, at least 50 (common practice). */
  readonly minimumPupMm: number | null;
  readonly keepOuts: readonly KeepOut[];
  readonly units: UnitSystem;
  readonly takeOuts: readonly TakeOutWord[];
  /** What the measurements of the ends may be off by; 1/16 in when left out. */
  readonly toleranceMm?: number;
}

/** An elbow as it is welded in. */
export interface WayElbow {
  readonly make: "elbow";
  /** `LR 90`, `SR 45`, `LR cut to 37.25°`. */
  readonly name: string;
  readonly radius: ElbowRadius;
  /** Whole elbow of the stock, or cut from a 90. */
  readonly whole: boolean;
  /** Whether the tables give this angle; else its take-out is R·tan(θ/2). */
  readonly tabulated: boolean;
}

/** A turn of pieces of pipe, the two pipes counted in. */
export interface WayMitre {
  readonly make: "mitre";
  readonly name: string;
  readonly pieces: number;
}

/** One change of direction. */
export interface WayTurn {
  readonly fitting: WayElbow | WayMitre;
  readonly nps: Nps;
  readonly angleRad: number;
  readonly radiusMm: number;
  /** Corner to face (to the first cut of a mitre). */
  readonly takeOutMm: number;
  /** Where the two centre lines meet. */
  readonly corner: Vec3;
  readonly source: string;
  /** The take-out is from memory and the shop has not confirmed it. */
  readonly unverified: boolean;
}

export interface WayReducer {
  readonly largeNps: Nps;
  readonly smallNps: Nps;
  readonly lengthMm: number;
  /** Weld plane of the large end. */
  readonly largeEnd: Vec3;
  readonly source: string;
  readonly unverified: boolean;
}

/** The straight stretch between two corners, or between an end and a corner. */
export interface WayStraight {
  readonly from: Vec3;
  readonly to: Vec3;
  readonly direction: Vec3;
  /** Corner to corner. */
  readonly lengthMm: number;
  /** Pipe to cut, both gaps taken off; null = no pipe, the fittings are welded face to face. */
  readonly cutMm: number | null;
  readonly nps: Nps;
  readonly reducer: WayReducer | null;
}

export interface WaySensitivity {
  /** Largest turn of a bend or a roll for `perMm` of error in an end's position, degrees. */
  readonly bendDeg: number;
  /** Largest change of a cut length for `perMm` of error, mm. */
  readonly lengthMm: number;
  readonly perMm: number;
  /** What takes an error up: cut lengths alone, bends or rolls too, or nothing: then it stays at a weld. */
  readonly takenBy: "lengths" | "bends" | "nothing";
  readonly words: string;
}

export interface WayKeepOut {
  readonly clear: boolean;
  /** Least clearance over all keep-outs beyond what each asks; null when there is none to keep clear of. */
  readonly spareMm: number | null;
  /** Name of the nearest one. */
  readonly nearest: string | null;
}

export type WayKind = "trimmed-pair" | "straight" | "one-standard" | "two-standard" | "three-standard" | "one-trimmed" | "mitre" | "field-trim";

export interface Way {
  /** The same for the same way whatever the order of the search. */
  readonly id: string;
  readonly kind: WayKind;
  /** `LR 90, LR 45` */
  readonly title: string;
  readonly turns: readonly WayTurn[];
  /** One more than turns. */
  readonly straights: readonly WayStraight[];
  /** What each end is cut back by (negative: lengthened) before it closes; zero but for field trims. */
  readonly trims: { readonly end0Mm: number; readonly end1Mm: number };
  readonly welds: number;
  readonly trimmedCuts: number;
  /** End to end along the centre line. */
  readonly lengthMm: number;
  /** Pipe cut lengths from end 0 to end 1. */
  readonly cuts: readonly number[];
  /** null when a wall is not known. */
  readonly weightKg: number | null;
  readonly weightSource: string;
  /** Shortest cut piece of pipe; null when there is none. */
  readonly minimumPupMm: number | null;
  readonly sensitivity: WaySensitivity;
  readonly keepOut: WayKeepOut;
  /** The centre line as points, arcs as chords. */
  readonly path: readonly Vec3[];
  /** Largest distance between where the last corner's straight arrives and end 1, mm. */
  readonly closesWithinMm: number;
  readonly warnings: readonly string[];
  readonly sources: readonly string[];
}

export type WayPreference = "fewest-welds" | "least-trimmed" | "shortest" | "standard-first";

/** What was looked for and not found, with the reason and what would open one. */
export interface WayRefusal {
  readonly about: "trimmed-pair" | "two-standard" | "three-standard" | "one-trimmed" | "mitre";
  readonly sentence: string;
  readonly whatWouldWork: string | null;
}

export type WaysResult =
  | { readonly ok: true; readonly ways: readonly Way[]; readonly refusals: readonly WayRefusal[]; readonly notes: readonly string[] }
  | { readonly ok: false; readonly sentence: string };

/** Called between steps of a long search; true stops it. */
export type WaysTick = (done: number, total: number) => boolean;
