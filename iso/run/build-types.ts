/** Shapes that travel between the passes of buildModel(); nothing outside iso/run needs them. */
import type { Vec3 } from "../geometry/types";
import type { Nps, Pipe, Place, Point, Run } from "./document";
import type { Component, CutTerm, JointKind, Leg, Piece } from "./model-types";

/** A piece before its mark and spool are known. */
export type PieceDraft = Omit<Piece, "mark" | "spool">;

/** A document point in space, with everything its item needs to be fitted there. */
export interface PlacedPoint {
  /** The point's id, made unique when a document repeats one. */
  readonly uid: string;
  readonly point: Point;
  readonly runId: string;
  readonly index: number;
  /** Reader's name: "point 4", or "point 2 of branch B1". */
  readonly label: string;
  readonly position: Vec3;
  /** Where the leaving leg starts: the position, but for the shift of an eccentric reducer. */
  readonly departure: Vec3;
  readonly arriving: Vec3 | null;
  readonly leaving: Vec3 | null;
  readonly turnRad: number;
  readonly isFirst: boolean;
  readonly isLast: boolean;
  /** The leg before (after) is two flanged parts bolted face to face: no pipe, no mating flanges there. */
  readonly boltedIn: boolean;
  readonly boltedOut: boolean;
  /** Pipe that arrives and pipe that leaves; they differ at a reducer, and where another material starts. */
  readonly pipeIn: Pipe;
  readonly pipeOut: Pipe;
  /** What the line carries before and after the point. */
  readonly serviceIn: Service;
  readonly serviceOut: Service;
  /** The last point of a run that comes back: it stands for the fitting met there and puts nothing in itself. */
  readonly closesLoop?: boolean;
  /** Branch runs that leave from here, in document order; then those that come back to here. */
  readonly branches: readonly BranchHead[];
}

/** What changes at a break besides the pipe itself; "" = none said. */
export interface Service {
  readonly specification: string;
  readonly material: string;
  readonly insulation: string;
  readonly tracing: string;
}

/** The first direction of a branch run at the fitting it leaves from. */
export interface BranchHead {
  readonly runId: string;
  readonly direction: Vec3 | null;
  readonly pipe: Pipe;
}

export interface PlacedRun {
  readonly run: Run;
  readonly label: string;
  readonly points: readonly PlacedPoint[];
  /** legs[i] ends at points[i]; null where a run starts without a leg. */
  readonly legs: readonly (Leg | null)[];
  /** The point it branches from; null for the main run and for a branch whose start is missing. */
  readonly parentUid: string | null;
  /** Which branch of that point this is: 0 for the first. */
  readonly branchIndex: number;
  /** Set when the run comes back to a fitting of the line. */
  readonly loop?: LoopEnd;
}

/** Where a run that comes back ends: a branch port, or the open side of another run's end. */
export interface LoopEnd {
  readonly targetUid: string;
  readonly port: "branch" | "in" | "out";
  readonly branchIndex: number;
  readonly closes: boolean;
}

/** A weld (or an open end) as one side of a fitting offers it to the pipe that comes there. */
export interface SideWeld {
  readonly key: string;
  readonly kind: Exclude<JointKind, "bolted" | "attachment">;
  readonly place: Place;
  readonly mismatchRad: number;
  /** Angle of the pipe's cut off square, radians; absent = square. */
  readonly cutRad?: number;
}

/** What a leg meets at one of its ends. */
export interface Side {
  /** The pipe runs through: nothing is cut here. */
  readonly through: boolean;
  /** Take-outs from the working point to the part's weld face or socket bottom (values are negative), gap not included. */
  readonly terms: readonly CutTerm[];
  readonly componentId: string | null;
  /** The piece on the other side of the weld where that is no component (a mitre's segment); absent = the component. */
  readonly neighbourKey?: string;
  /** null at an end that nobody welds. */
  readonly weld: SideWeld | null;
  readonly gap: SideGap | null;
  readonly trimMm: number;
  /** Set when this side is bolted face to face with the next part: the key, place and class of the bolting. */
  readonly bolted: BoltedFace | null;
}

/** What lies between the part's face and the pipe's end, mm; negative where the pipe goes in (a thread's make-up). */
export interface SideGap {
  readonly kind: "root-gap" | "pull-back" | "make-up";
  readonly mm: number;
  readonly label: string;
  readonly source?: string | null;
  readonly unconfirmed?: boolean;
}

export interface BoltedFace {
  readonly componentId: string;
  readonly place: Place;
  readonly ratingClass: number;
  /** Gasket of this face where it differs from the line's, mm. */
  readonly gasketMm?: number;
  readonly studs?: StudShare;
}

/** What the studs of a bolted face take in on one side besides a flange, and why; `none`: its studs pass at another face. */
export interface StudShare {
  readonly extraMm: number;
  readonly because: string;
  readonly none?: boolean;
}

/** A joint before numbers, spools and the pipe on either side are known. */
export interface JointDraft {
  readonly key: string;
  readonly pointId: string;
  readonly runId: string;
  readonly kind: JointKind;
  readonly place: Place;
  readonly position: Vec3;
  readonly direction: Vec3;
  readonly a: string | null;
  readonly b: string | null;
  readonly nps: Nps;
  readonly mismatchRad: number;
  readonly gapMm: number;
  /** Gasket lying in a bolted joint. */
  readonly gasketId: string | null;
}

/** A part that sits on the pipe without cutting it; its joint, if it has one of its own, has that pipe on the other side. */
export interface Rider {
  readonly componentId: string;
  /** null for a stub-in, whose only weld is that of the branch pipe. */
  readonly joint: JointDraft | null;
  /** Where on the pipe it sits, for a part without a joint. */
  readonly at?: Vec3;
}

/** All that one point puts into the line. */
export interface Fitting {
  readonly components: readonly Component[];
  readonly joints: readonly JointDraft[];
  readonly riders: readonly Rider[];
  readonly in: Side;
  readonly out: Side;
  /** One per branch run of the point, same order. */
  readonly branches: readonly Side[];
  /** Pieces cut for the fitting itself (segments of a mitre), in flow order; absent = none. */
  readonly pieces?: readonly PieceDraft[];
  /** Parts that hang together without a joint of their own; absent = none. */
  readonly held?: readonly (readonly [string, string])[];
}

/** Everything between two points where the pipe is cut. */
export interface Stretch {
  readonly from: PlacedPoint;
  readonly to: PlacedPoint;
  readonly legs: readonly Leg[];
  readonly start: Side;
  readonly end: Side;
  readonly riders: readonly Rider[];
  /** Points passed without a cut. */
  readonly passed: readonly PlacedPoint[];
}
