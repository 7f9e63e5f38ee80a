/**
 * Puts another line's runs into this one: on from the end of a run, or as a branch from a fitting. The other line's first
 * point comes to stand on the point given (an offset of its own from its datum is kept); its branches and notes come
 * along, its ids are given anew. A little over 200 lines: what is checked, said anew and joined is one operation.
 */
import type { Vec3 } from "../geometry/types";
import { STRAIGHT_RAD, ZERO_LENGTH_MM } from "../geometry/tolerances";
import { VEC_ZERO, vecAngle, vecLength, vecSub } from "../geometry/vec3";
import { buildContext } from "./build-context";
import type { PlacedPoint } from "./build-types";
import { MAX_POINTS, type Entry, type Item, type LineSettings, type Offset, type Point, type Run, type RunDocument } from "./document";
import { isBranchFitting } from "./edit";
import { edited, refused, type EditResult } from "./edit-result";
import { exactEntry } from "./entry-words";
import { offsetPlace } from "./offset-place";
import { placeRuns } from "./place-runs";

/** Where the other line goes: on from the last point of a run, or as a branch from a tee, cross, outlet or stub-in. */
export interface InsertPlace {
  readonly as: "continue" | "branch";
  readonly pointId: string;
}

const MAX_RUNS = 200;
const MAX_NOTES = 40;
const ID_TRIES = 1_000;

/** The joined document, or a sentence that says why not. `makeId` gives candidate ids; those in use are passed over. */
export function lineInsert(document: RunDocument, other: RunDocument, at: InsertPlace, makeId: (oldId: string) => string): EditResult {
  const found = placedAt(document, at.pointId);
  if (!found) return refused("The point it should go to is not on this line.");
  const main = other.runs[0];
  if (!main || main.points.length === 0) return refused(`Line ${other.number} has no points to insert.`);
  const guest = withFreshIds(document, withSettingsOf(other, document.settings), makeId);
  if (!guest) return refused("No free ids were given for the inserted points.");
  const why = whyNot(document, guest, at, found);
  if (why !== null) return refused(why);
  const joined = at.as === "continue" ? continued(document, guest, found) : branched(document, guest, found);
  if (typeof joined === "string") return refused(joined);
  return edited({ ...joined, notes: joinedNotes(document, other) });
}

interface Found {
  readonly run: Run;
  readonly placed: PlacedPoint;
}

function placedAt(document: RunDocument, pointId: string): Found | null {
  for (const r of placeRuns(document, buildContext(document.settings, []))) {
    const placed = r.points.find((p) => p.point.id === pointId);
    if (placed) return { run: r.run, placed };
  }
  return null;
}

function whyNot(document: RunDocument, guest: RunDocument, at: InsertPlace, { run, placed }: Found): string | null {
  const points = [...document.runs, ...guest.runs].reduce((sum, r) => sum + r.points.length, 0);
  if (points > MAX_POINTS) return `Together the lines have ${points} points; one line may hold ${MAX_POINTS}.`;
  if (document.runs.length + guest.runs.length > MAX_RUNS) return `Together the lines have more than ${MAX_RUNS} runs.`;
  const size = (guest.runs[0]?.pipe ?? guest.settings.pipe).nps;
  if (at.as === "continue") {
    if (run.points[run.points.length - 1]?.id !== at.pointId) return "A line can be continued from the last point of a run only: choose the run's end, or insert it as a branch.";
    if (run.to !== undefined) return "This run ends in a fitting of the line: take the loop's end off first.";
    if (placed.pipeOut.nps !== size) return `The run ends in NPS ${placed.pipeOut.nps} and line ${guest.number} starts in NPS ${size}: put a reducer at the end first.`;
    return null;
  }
  const { item } = placed.point;
  if (!isBranchFitting(item)) return "No tee, cross, outlet or stub-in stands at this point: choose one first.";
  const room = item.kind === "cross" ? 2 : 1;
  const taken = document.runs.filter((r) => (r.from === at.pointId && r.points.length > 0) || r.to === at.pointId).length;
  if (taken >= room) return "The branch of this fitting is taken already: choose another point.";
  const branchNps = "branchNps" in item ? (item.branchNps ?? placed.pipeIn.nps) : placed.pipeIn.nps;
  return branchNps === size ? null : `The fitting's branch is NPS ${branchNps} and line ${guest.number} starts in NPS ${size}: change the branch size, or start that line with a reducer.`;
}

/** The other line said in this line's units and defaults, so that each of its parts stays what it was. */
function withSettingsOf(other: RunDocument, settings: LineSettings): RunDocument {
  const foreignUnits = other.settings.units !== settings.units;
  const foreignClass = other.settings.ratingClass !== settings.ratingClass;
  const point = (p: Point): Point => ({
    ...p, offset: foreignUnits ? offsetRetyped(p.offset, settings) : p.offset, item: foreignClass ? classNamed(p.item, other.settings) : p.item,
  });
  return { ...other, runs: other.runs.map((run) => ({ ...run, points: run.points.map(point) })) };
}

function classNamed(item: Item, settings: LineSettings): Item {
  const takesClass = item.kind === "flange" || item.kind === "valve" || item.kind === "instrument";
  return takesClass && item.ratingClass === null ? { ...item, ratingClass: settings.ratingClass } : item;
}

function offsetRetyped(offset: Offset, settings: LineSettings): Offset {
  const retyped = (entry: Entry) => exactEntry(entry.mm, settings.units);
  if (offset.kind === "polar" || offset.kind === "slope") return { ...offset, length: retyped(offset.length) };
  return { ...offset, e: retyped(offset.e), n: retyped(offset.n), u: retyped(offset.u) };
}

/** The other line with ids this one does not have; null when `makeId` keeps giving used ones. */
function withFreshIds(document: RunDocument, other: RunDocument, makeId: (oldId: string) => string): RunDocument | null {
  const used = new Set(document.runs.flatMap((r) => [r.id, ...r.points.map((p) => p.id)]));
  let short = false;
  const fresh = (old: string): string => {
    for (let i = 0; i < ID_TRIES; i++) {
      const id = makeId(old);
      if (used.has(id)) continue;
      used.add(id);
      return id;
    }
    short = true;
    return old;
  };
  const points = new Map(other.runs.flatMap((r) => r.points.map((p) => [p.id, fresh(p.id)] as const)));
  const named = (id: string) => points.get(id) ?? id;
  const runs = other.runs.map((run): Run => ({
    ...run, id: fresh(run.id), from: run.from === null ? null : named(run.from), ...(run.to === undefined ? {} : { to: named(run.to) }),
    points: run.points.map((p) => ({ ...p, id: named(p.id) })),
  }));
  return short ? null : { ...other, runs };
}

/** The other main run's points as they stand from `host`; the first one is left out when it falls on it. */
interface Landed {
  readonly shift: Vec3;
  readonly points: Point[];
  /** The first point, standing on the host itself. */
  readonly merged: Point | null;
}

function landedOn(host: Vec3, main: Run, guest: RunDocument, settings: LineSettings): Landed {
  const first = main.points[0]!;
  const isAbsolute = first.offset.kind === "absolute";
  const datum = offsetPlace(VEC_ZERO, first.offset).position;
  const falls = isAbsolute || vecLength(datum) <= ZERO_LENGTH_MM;
  const shift = vecSub(host, isAbsolute ? datum : VEC_ZERO);
  const points = main.points.map((p) => ({ ...p, offset: shifted(p.offset, shift, settings) }));
  return falls ? { shift, points: points.slice(1), merged: first } : { shift, points, merged: null };
}

function shifted(offset: Offset, by: Vec3, settings: LineSettings): Offset {
  if (offset.kind !== "absolute") return offset;
  const at = (entry: Entry, mm: number) => (mm === 0 ? entry : exactEntry(entry.mm + mm, settings.units));
  return { kind: "absolute", e: at(offset.e, by[0]), n: at(offset.n, by[1]), u: at(offset.u, by[2]) };
}

/** The other line's branches, those of a left-out point taken over by the host, absolute points moved with it. */
function guestBranches(guest: RunDocument, landed: Landed, hostId: string, settings: LineSettings): Run[] {
  const named = (id: string) => (landed.merged?.id === id ? hostId : id);
  return guest.runs.slice(1).map((run) => ({
    ...run, from: run.from === null ? null : named(run.from), ...(run.to === undefined ? {} : { to: named(run.to) }),
    points: run.points.map((p) => ({ ...p, offset: shifted(p.offset, landed.shift, settings) })),
  }));
}

function continued(document: RunDocument, guest: RunDocument, { run, placed }: Found): RunDocument | string {
  const main = guest.runs[0]!;
  const host = placed.point;
  const landed = landedOn(placed.departure, main, guest, document.settings);
  const onward = landed.points[0] ? offsetPlace(placed.departure, landed.points[0].offset).direction : null;
  const turns = onward !== null && placed.arriving !== null && vecAngle(onward, placed.arriving) > STRAIGHT_RAD;
  const item = joinedItem(host.item, landed.merged?.item ?? null, turns);
  if (item === null) return `This run and line ${guest.number} both have a fitting at the joining point: take one of them out first.`;
  const starts = startsOf(document, run, guest);
  const joint: Point = { ...host, item, ...(starts ? { starts: { ...starts, ...host.starts } } : {}) };
  const grown: Run = { ...run, points: [...run.points.slice(0, -1), joint, ...landed.points], ...(main.to === undefined ? {} : { to: main.to }) };
  const runs = document.runs.map((r) => (r.id === run.id ? grown : r));
  return { ...document, runs: [...runs, ...guestBranches(guest, landed, host.id, document.settings)] };
}

/** What stands where two ends meet: a weld between two plain ends (an elbow where it turns), a pair of two flanges, else the one fitting there is. */
function joinedItem(host: Item, guest: Item | null, turns: boolean): Item | null {
  const isPlain = (item: Item) => item.kind === "none" || item.kind === "end" || item.kind === "joint" || item.kind === "support";
  if (guest === null) return host.kind === "end" ? { kind: "none" } : host;
  if (isPlain(guest)) return isPlain(host) ? { kind: turns ? "none" : "joint" } : host;
  if (isPlain(host)) return guest;
  return host.kind === "flange" && guest.kind === "flange" && host.flange === guest.flange ? host : null;
}

/** Material and specification of the other line, where they differ from the run's it continues. */
function startsOf(document: RunDocument, run: Run, guest: RunDocument): Point["starts"] {
  const [own, theirs] = [run.pipe ?? document.settings.pipe, guest.runs[0]?.pipe ?? guest.settings.pipe];
  const starts = {
    ...(own.material === theirs.material ? {} : { material: theirs.material }), ...(own.specification === theirs.specification ? {} : { specification: theirs.specification }),
  };
  return Object.keys(starts).length === 0 ? undefined : starts;
}

function branched(document: RunDocument, guest: RunDocument, { placed }: Found): RunDocument | string {
  const main = guest.runs[0]!;
  const host = placed.point;
  const landed = landedOn(placed.position, main, guest, document.settings);
  const first = landed.merged?.item.kind;
  if (first !== undefined && first !== "none" && first !== "end" && first !== "joint") {
    return `Line ${guest.number} starts with a fitting on its first point, which would stand on the centre of the branch: start that line with an open end.`;
  }
  const branch: Run = { ...main, name: main.name.trim() === "" ? guest.number.slice(0, 120) : main.name, from: host.id, pipe: main.pipe ?? guest.settings.pipe, points: landed.points };
  const kept = document.runs.filter((r) => !(r.from === host.id && r.points.length === 0));
  return { ...document, runs: [...kept, branch, ...guestBranches(guest, landed, host.id, document.settings)] };
}

/** Notes of both, each once; notes of single sheets of the other line become notes of the line. */
function joinedNotes(document: RunDocument, other: RunDocument): string[] {
  const all = [...document.notes, ...other.notes, ...(other.sheetNotes ?? []).map((n) => n.text)];
  return [...new Set(all)].slice(0, MAX_NOTES);
}
