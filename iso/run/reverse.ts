/**
 * A run turned round: described from its other end, everything standing where it stood. The offset of each point becomes
 * the opposite of its follower's, with the provenance that goes with that number; the first point is absolute. A fitting
 * whose working point lies on the arriving line (reducer, return) is then named by where it lay on the leaving one.
 * `flipped` remembers the turn, so that joints keep their keys and with them their marks.
 */
import type { Vec3 } from "../geometry/types";
import { SAME_POINT_MM, SQUARE_RAD } from "../geometry/tolerances";
import { vecDistance, vecSub } from "../geometry/vec3";
import { buildContext } from "./build-context";
import type { PlacedPoint, PlacedRun } from "./build-types";
import type { Item, LineSettings, Offset, Pipe, Point, Provenance, Run, RunDocument } from "./document";
import { edited, refused, type EditResult } from "./edit-result";
import { TURNED_ROUND, axisSigned, exactEntries, offsetSigned } from "./entry-words";
import type { TakeOutWord } from "./model-types";
import { placeRuns } from "./place-runs";

const CALCULATED: Provenance = { kind: "calculated", toleranceMm: null, by: null, at: null, second: null };

/** The document with one run turned round, or a sentence that says why it cannot be. Working points stay within float noise. */
export function runReverse(document: RunDocument, runId: string, takeOuts: readonly TakeOutWord[] = []): EditResult {
  const run = document.runs.find((r) => r.id === runId);
  if (!run) return refused("This run is not on the line any more.");
  if (run.points.length < 2) return edited(document);
  const why = whyNot(run);
  if (why !== null) return refused(why);
  const all = placeRuns(document, buildContext(document.settings, takeOuts));
  const placed = all.find((r) => r.run.id === runId);
  const target = all.flatMap((r) => r.points).find((p) => p.point.id === run.to);
  if (!placed || (run.to !== undefined && !target)) return refused("This run could not be placed: correct its points first.");
  const next = target ? reversedLoop(run, target, placed, document.settings) : reversedRun(run, placed, document.settings);
  return edited({ ...document, runs: document.runs.map((r) => (r.id === runId ? next : r)) });
}

function whyNot(run: Run): string | null {
  const name = run.name.trim() === "" ? "This branch" : run.name;
  if (run.from !== null && run.to === undefined) return `${name} starts at a fitting of another run and must leave from there: turn the run it leaves from round instead.`;
  if (run.from === null && run.to !== undefined) return "The main run ends in a fitting of the line and cannot start there: take the loop's end off first.";
  const half = run.points.findIndex((p, i) => i > 0 && i < run.points.length - 1 && p.item.kind === "coupling" && p.item.half);
  if (half >= 0) return `Point ${half + 1} is a half coupling, which stands on one side of its point only: make it a whole coupling, or take it out, before turning the run round.`;
  return null;
}

/** A run that starts and ends by itself. */
function reversedRun(run: Run, placed: PlacedRun, settings: LineSettings): Run {
  const points = placed.points;
  const starts = reversedStarts(run, settings);
  const turned = points.map((p, i): Point => {
    const follower = points[i + 1];
    const offset = follower ? oppositeLeg(p, follower, settings) : absoluteAt(p.departure, settings);
    return turnedPoint(p, offset, follower?.point.provenance ?? CALCULATED, starts[i], settings);
  });
  return { ...run, pipe: pipeFromEnd(run, points, settings), points: turned.reverse() };
}

/** A run between two fittings: its last point stands for the fitting it meets, and afterwards for the one it left from. */
function reversedLoop(run: Run, target: PlacedPoint, placed: PlacedRun, settings: LineSettings): Run {
  const starts = reversedStarts(run, settings);
  const points = placed.points;
  const lastIndex = points.length - 1;
  const turned = points.slice(0, lastIndex).map((p, i): Point => {
    const follower = points[i + 1]!;
    const isMissed = i === lastIndex - 1 && vecDistance(follower.position, target.position) > SAME_POINT_MM;
    const offset: Offset = isMissed ? { kind: "enu", ...exactEntries(vecSub(p.departure, target.position), settings.units) } : oppositeLeg(p, follower, settings);
    return turnedPoint(p, offset, follower.point.provenance, starts[i], settings);
  });
  const [first, last] = [points[0]!, points[lastIndex]!];
  const home = turnedPoint(last, homeLeg(first, placed, settings), first.point.provenance, starts[lastIndex], settings);
  return { ...run, from: target.point.id, ...(run.from === null ? {} : { to: run.from }), pipe: run.points.some((p) => p.item.kind === "reducer") ? last.pipeOut : run.pipe, points: [...turned.reverse(), home] };
}

/** The way from a loop's first point back to the fitting it left from. */
function homeLeg(first: PlacedPoint, placed: PlacedRun, settings: LineSettings): Offset {
  const leg = placed.legs[0];
  if (first.point.offset.kind !== "absolute" || !leg) return offsetSigned(first.point.offset, TURNED_ROUND, settings.units);
  return { kind: "enu", ...exactEntries(vecSub(leg.from, leg.to), settings.units) };
}

/** The offset from `follower` back to `p`. Typed words stay where the leg still is what was typed. */
function oppositeLeg(p: PlacedPoint, follower: PlacedPoint, settings: LineSettings): Offset {
  if (follower.point.offset.kind === "absolute") return absoluteAt(p.departure, settings);
  return offsetSigned(follower.point.offset, TURNED_ROUND, settings.units);
}

function absoluteAt(position: Vec3, settings: LineSettings): Offset {
  return { kind: "absolute", ...exactEntries(position, settings.units) };
}

function turnedPoint(p: PlacedPoint, offset: Offset, provenance: Provenance, starts: Point["starts"], settings: LineSettings): Point {
  const turned: Point = { ...p.point, offset, provenance, item: turnedItem(p), places: turnedPlaces(p, settings), flipped: true };
  delete turned.starts;
  if (p.point.flipped) delete turned.flipped;
  return starts ? { ...turned, starts } : turned;
}

/** The item as it reads from the other end. */
function turnedItem({ point: { item }, pipeIn, pipeOut }: PlacedPoint): Item {
  switch (item.kind) {
    case "reducer":
      return { ...item, toNps: pipeIn.nps, toSchedule: pipeIn.schedule === pipeOut.schedule ? null : pipeIn.schedule };
    case "return":
      return { ...item, toward: axisSigned(item.toward, TURNED_ROUND) };
    case "flange":
      return { ...item, gasketSide: item.gasketSide === "before" ? "after" : "before" };
    case "valve": {
      if (item.valve !== "check") return item;
      const { against, ...rest } = item;
      return against ? rest : { ...rest, against: true };
    }
    default:
      return item;
  }
}

/** `in` and `out` change sides. Where there is one weld only the named place is the one that counts, so it alone is kept. */
function turnedPlaces(p: PlacedPoint, settings: LineSettings): Point["places"] {
  const { in: before, out: after, ...rest } = p.point.places;
  if (p.point.item.kind === "end" && !p.isFirst && !p.isLast) return p.point.places;
  const isTaken = after !== undefined && !(hasOneWeld(p, settings) && before !== undefined);
  return { ...rest, ...(isTaken ? { in: after } : {}), ...(before === undefined ? {} : { out: before }) };
}

/** A plain weld or the end of a pipe: one joint, whichever side its place was named for. */
function hasOneWeld({ point, turnRad, isFirst, isLast }: PlacedPoint, settings: LineSettings): boolean {
  const { kind } = point.item;
  if (kind === "joint" || kind === "end") return true;
  const isStraight = turnRad <= (settings.standardElbowWithinDeg * Math.PI) / 180 + SQUARE_RAD;
  return (kind === "none" || kind === "support") && (isFirst || isLast || isStraight);
}

/** The pipe the run now starts with: size and schedule of its old end; material and specification follow from `starts`. */
function pipeFromEnd(run: Run, points: readonly PlacedPoint[], settings: LineSettings): Pipe | null {
  const end = points[points.length - 1]?.pipeOut;
  const own = run.pipe ?? settings.pipe;
  if (!end || (end.nps === own.nps && end.schedule === own.schedule)) return run.pipe;
  const pipe = { ...own, nps: end.nps, schedule: end.schedule };
  return JSON.stringify(pipe) === JSON.stringify(settings.pipe) ? null : pipe;
}

type Started = NonNullable<Point["starts"]>;
const STARTED = ["specification", "material", "insulation", "tracing"] as const;

/**
 * Per point of the run as it was: what starts there when it is walked from the other end. A change at a point goes back
 * to what was before it; what held at the end starts at the end. A change at the end itself changed nothing and is dropped.
 */
function reversedStarts(run: Run, settings: LineSettings): (Started | undefined)[] {
  const { material, specification } = run.pipe ?? settings.pipe;
  const first: Required<Started> = { material, specification, insulation: settings.asEntered.insulation, tracing: "" };
  const out = run.points.map((): Started => ({}));
  const lastIndex = run.points.length - 1;
  for (const field of STARTED) {
    let holds = first[field];
    run.points.forEach((p, i) => {
      const starts = p.starts?.[field];
      if (starts === undefined || i === lastIndex) return;
      out[i]![field] = holds;
      holds = starts;
    });
    if (holds !== first[field]) out[lastIndex]![field] = holds;
  }
  return out.map((s) => (Object.keys(s).length === 0 ? undefined : s));
}
