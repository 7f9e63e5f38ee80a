/**
 * Random run documents.
 *
 * `randomLine(seed)` is what the thousand lines of the tests and of the bench are made of. Every seed counts: none is left
 * out for drawing badly. What a seed gives:
 * - 5 to 120 points in all, spread evenly by their logarithm (half the lines have under 25), 0 to 6 branches of 2 to 9
 *   points that leave square to their run from tees, reducing tees, outlets and stub-ins (no crosses: few shops weld them);
 * - habits of a shop's line, which goes from one place to another: it starts at a nozzle or a continued end, makes for two
 *   level ways and one of up and down (three turns in four are into these, the fourth goes anywhere but straight back), goes straight on through valves, flange pairs, reducers, joints, supports and instruments, and turns by elbows, now
 *   and then by a mitre or a bend (a return would lie nearer its own pipe than lines may here); legs of 0.35 to 9 m, most
 *   of them 0.6 to 2.5 m; 8 legs in a hundred are offsets
 *   in or across a plane, 4 are sloped; lines are metric or imperial, NPS 2, 3, 4 or 6;
 * - a line never runs through itself: a step whose centre line comes within CLEARANCE_MM of pipe already laid is drawn
 *   again (two pipes may not stand in one place), and a run that finds no free step after many tries ends where it is.
 *
 * `randomRun(seed, points)` is wilder: a walk that may run through itself and go back over itself. Nothing about it is
 * sensible but its shape; whatever is typed must still be drawn.
 */
import type { Item, RunDocument } from "@/iso";
import type { Nps, Offset } from "@/iso/run/document";
import { end, flange, joint, outlet, pipe, reducer, RunBuilder, support, tee, valve } from "../../fixtures/run-builder";
import { seeded } from "./draw-helpers";

const WAYS = ["E", "W", "N", "S", "U", "D"] as const;
type Way = (typeof WAYS)[number];
const BACK: Record<string, Way> = { E: "W", W: "E", N: "S", S: "N", U: "D", D: "U" };
const UNIT: Record<Way, Vec> = { E: [1, 0, 0], W: [-1, 0, 0], N: [0, 1, 0], S: [0, -1, 0], U: [0, 0, 1], D: [0, 0, -1] };

type Vec = readonly [number, number, number];

export const LEAST_POINTS = 5;
export const MOST_POINTS = 120;
export const MOST_BRANCHES = 6;
/** Centre lines of pipe that does not meet stay this far apart: a 6 in pipe with its flanges beside another. */
const CLEARANCE_MM = 380;
const STEP_TRIES = 60;
/** Share of turns into the ways a line makes for; the others go anywhere but back. */
const ON_MAIN_WAYS = 0.75;

interface Laid {
  readonly from: Vec;
  readonly to: Vec;
}

interface Stem {
  readonly point: number;
  readonly at: Vec;
  /** Ways a branch may not take: along the run. */
  readonly along: Way;
  readonly nps: Nps;
}

class Walk {
  readonly laid: Laid[] = [];
  readonly stems: Stem[] = [];
  readonly builder: RunBuilder;
  points = 0;

  constructor(readonly random: () => number, seed: number, readonly units: "metric" | "imperial", readonly nps: Nps, readonly main: readonly Way[]) {
    this.builder = new RunBuilder(`R-${seed}`, units, { pipe: pipe(nps) });
  }

  pick<T>(list: readonly T[]): T {
    return list[Math.floor(this.random() * list.length)]!;
  }

  /** A leg's length, mm: most between 0.6 and 2.5 m, some long, in steps a tape would show. */
  length(least = 350): number {
    const r = this.random();
    const mm = r < 0.12 ? 350 + this.random() * 300 : r < 0.88 ? 600 + this.random() * 1900 : 2500 + this.random() * 6500;
    return Math.max(least, Math.round(mm / 5) * 5);
  }

  text(mm: number): string {
    return this.units === "metric" ? String(mm) : `${Math.round((mm / 25.4) * 8) / 8}"`;
  }

  mm(mm: number): number {
    return this.units === "metric" ? mm : (Math.round((mm / 25.4) * 8) / 8) * 25.4;
  }

  free(from: Vec, to: Vec): boolean {
    return this.laid.every((old) => {
      if (same(old.to, from) || same(old.from, from)) return opens(old, from, to);
      return segmentsGap(old.from, old.to, from, to) >= CLEARANCE_MM;
    });
  }
}

const same = (a: Vec, b: Vec): boolean => Math.hypot(a[0] - b[0], a[1] - b[1], a[2] - b[2]) < 1;
const minus = (a: Vec, b: Vec): Vec => [a[0] - b[0], a[1] - b[1], a[2] - b[2]];
const dot = (a: Vec, b: Vec): number => a[0] * b[0] + a[1] * b[1] + a[2] * b[2];

/** A leg that leaves a point of old pipe must turn away from it: at least square, or on in its line. */
function opens(old: Laid, from: Vec, to: Vec): boolean {
  const out = same(old.from, from) ? minus(old.to, old.from) : minus(old.from, old.to);
  const way = minus(to, from);
  return dot(out, way) <= 0.05 * Math.hypot(...out) * Math.hypot(...way);
}

/** Distance between two segments in space (sampled on one, exact to the other: within a few mm at these lengths). */
function segmentsGap(a: Vec, b: Vec, c: Vec, d: Vec): number {
  for (const k of [0, 1, 2] as const) {
    if (Math.min(a[k], b[k]) - CLEARANCE_MM > Math.max(c[k], d[k]) || Math.min(c[k], d[k]) - CLEARANCE_MM > Math.max(a[k], b[k])) return Infinity;
  }
  const way = minus(d, c);
  const steps = Math.max(1, Math.ceil(Math.hypot(...way) / 40));
  let least = Infinity;
  for (let i = 0; i <= steps; i++) least = Math.min(least, pointGap([c[0] + (way[0] * i) / steps, c[1] + (way[1] * i) / steps, c[2] + (way[2] * i) / steps], a, b));
  return least;
}

function pointGap(p: Vec, a: Vec, b: Vec): number {
  const way = minus(b, a);
  const t = Math.max(0, Math.min(1, dot(minus(p, a), way) / Math.max(1, dot(way, way))));
  return Math.hypot(p[0] - a[0] - way[0] * t, p[1] - a[1] - way[1] * t, p[2] - a[2] - way[2] * t);
}

const SMALLER: Record<string, Nps> = { "6": "4", "4": "3", "3": "2", "2": "1" };

/** What stands on straight pipe, as often as a shop's lines have it. */
function straightItem(walk: Walk, nps: Nps, mayBranch: boolean, upright: boolean): Item {
  const r = walk.random();
  if (r < 0.26) return valve({ valve: walk.pick(["gate", "gate", "globe", "check", "ball"] as const), tag: `V-${100 + walk.points}` });
  if (r < 0.34) return flange();
  if (r < 0.42 && SMALLER[nps]) return !upright && walk.random() < 0.4 ? reducer(SMALLER[nps], "eccentric", walk.random() < 0.5 ? "D" : "U") : reducer(SMALLER[nps]);
  if (r < 0.52) return joint;
  if (r < 0.62) return support("PS");
  if (r < 0.66) return { kind: "instrument", tag: `FE-${100 + walk.points}`, ends: "flanged", ratingClass: null, lengthMm: 250 };
  if (r < 0.7) return { kind: "none" };
  if (!mayBranch) return joint;
  if (r < 0.84) return tee(walk.random() < 0.5 ? (SMALLER[nps] ?? null) : null);
  return r < 0.95 ? outlet(walk.pick(["1", "3/4"] as const)) : { kind: "stub-in", branchNps: "1" };
}

const branchSize = (item: Item, nps: Nps): Nps | null =>
  item.kind === "tee" || item.kind === "cross" ? (item.branchNps ?? nps) : item.kind === "outlet" || item.kind === "stub-in" ? item.branchNps : null;

interface Step {
  readonly offset: Vec;
  readonly way: Way | null;
  readonly slope: boolean;
}

/** The next step: on in its line, a turn, an offset to one side and back into line, or a slope. */
function nextStep(walk: Walk, way: Way, straight: boolean): Step {
  const on = UNIT[way];
  const r = walk.random();
  if (!straight && r < 0.16) {
    const sides = WAYS.filter((w) => dot(UNIT[w], on) === 0);
    const run = walk.mm(Math.round((450 + walk.random() * 700) / 25) * 25);
    const roll = UNIT[walk.pick(sides)];
    const rise = walk.random() < 0.5 ? UNIT[walk.pick(sides)] : null;
    const side = rise && Math.abs(dot(rise, roll)) < 0.5 ? walk.mm(Math.round((300 + walk.random() * 500) / 25) * 25) : 0;
    const add = (k: 0 | 1 | 2): number => on[k] * run + roll[k] * run + (rise ? rise[k] * side : 0);
    return { offset: [add(0), add(1), add(2)], way: null, slope: false };
  }
  const turned = straight ? way : walk.pick(walk.random() < ON_MAIN_WAYS ? walk.main.filter((w) => w !== way && w !== BACK[way]) : WAYS.filter((w) => w !== way && w !== BACK[way]));
  const length = walk.mm(walk.length(straight ? 500 : 400));
  const unit = UNIT[turned];
  return { offset: [unit[0] * length, unit[1] * length, unit[2] * length], way: turned, slope: !straight && unit[2] === 0 && walk.random() < 0.04 };
}

/** One run of so many points from a place, the first leg given or free. */
function walkRun(walk: Walk, from: Vec, first: Way, count: number, nps: Nps, branchesWanted: number, last: Item): void {
  let at = from;
  let way: Way = first;
  let size = nps;
  let wanted = branchesWanted;
  let straightOn = true;
  for (let i = 0; i < count; i++) {
    let step: Step | null = null;
    for (let tries = 0; tries < STEP_TRIES && !step; tries++) {
      const trial: Step = i === 0 ? { ...nextStep(walk, first, true), way: first } : nextStep(walk, way, straightOn);
      const to: Vec = [at[0] + trial.offset[0], at[1] + trial.offset[1], at[2] + trial.offset[2]];
      if (walk.free(at, to)) step = trial;
    }
    // Nowhere to go: the run ends at the point before.
    if (!step) return;
    const to: Vec = [at[0] + step.offset[0], at[1] + step.offset[1], at[2] + step.offset[2]];
    // A slope ends at an elbow, which takes its small mismatch.
    const straight: boolean = step.way !== null && !step.slope && i < count - 1 && walk.random() < 0.52;
    let item: Item = i === count - 1 ? last : straight ? straightItem(walk, size, wanted > 0, step.way === "U" || step.way === "D") : { kind: "none" };
    if (!straight && i < count - 1 && step.way !== null) item = turnItem(walk);
    lay(walk, step, item);
    walk.laid.push({ from: at, to });
    const branch = branchSize(item, size);
    if (branch && step.way) {
      walk.stems.push({ point: walk.points, at: to, along: step.way, nps: branch });
      wanted--;
    }
    if (item.kind === "reducer") size = item.toNps;
    at = to;
    // After an offset the line goes on as before it.
    way = step.way ?? way;
    straightOn = straight || step.way === null;
  }
}

function turnItem(walk: Walk): Item {
  const r = walk.random();
  if (r < 0.02) return { kind: "mitre", pieces: 3, radiusMm: null };
  return r < 0.05 ? { kind: "bend", radiusMm: 300 } : { kind: "none" };
}

function lay(walk: Walk, { offset, way, slope }: Step, item: Item): void {
  walk.points += 1;
  const text = (mm: number): string => walk.text(mm);
  if (way && slope) walk.builder.at(slopeOffset(walk, way, offset), item);
  else if (way) walk.builder.go(way, text(Math.abs(offset[0] + offset[1] + offset[2])), item);
  else walk.builder.enu(text(offset[0]), text(offset[1]), text(offset[2]), item);
}

function slopeOffset(walk: Walk, way: Way, offset: Vec): Offset {
  const [e, n] = UNIT[way];
  const mm = Math.abs(offset[0] + offset[1]);
  return { kind: "slope", direction: { text: way, e, n, u: 0 }, length: { text: walk.text(mm), mm }, slope: { text: "1:100", ratio: -0.01 } };
}

/** The line of a seed, as the head of this file tells. */
export function randomLine(seed: number): RunDocument {
  const random = seeded(seed * 7919 + 17);
  const aim = Math.round(LEAST_POINTS * Math.exp(random() * Math.log(MOST_POINTS / LEAST_POINTS)));
  const branches = Math.min(MOST_BRANCHES, Math.floor(random() * (1 + aim / 6)));
  const level: readonly Way[] = [random() < 0.5 ? "E" : "W", random() < 0.5 ? "N" : "S"];
  const nps = (["2", "3", "4", "6"] as const)[Math.floor(random() * 4)]!;
  const walk = new Walk(random, seed, random() < 0.5 ? "metric" : "imperial", nps, [...level, random() < 0.5 ? "U" : "D"]);
  const lengths = Array.from({ length: branches }, () => 2 + Math.floor(random() * 8));
  let left = aim - 1;
  const branchPoints = lengths.map((wanted) => {
    const given = Math.max(0, Math.min(wanted, Math.floor(left / 3)));
    left -= given;
    return given;
  });
  walk.builder.start(random() < 0.6 ? flange({ goes: "nozzle", text: `NOZZLE N${1 + Math.floor(random() * 9)}` }) : end("continued", `L-${seed + 1}`));
  walk.points = 1;
  walkRun(walk, [0, 0, 0], walk.pick(walk.main), Math.max(LEAST_POINTS - 1, left), nps, branches, random() < 0.5 ? flange({ goes: "nozzle", text: "NOZZLE N2" }) : end("continued", `L-${seed + 2}`));
  branchPoints.forEach((points, i) => {
    const stem = walk.stems[i];
    if (!stem) return;
    const ways = WAYS.filter((w) => dot(UNIT[w], UNIT[stem.along]) === 0 && walk.free(stem.at, [stem.at[0] + UNIT[w][0] * 1200, stem.at[1] + UNIT[w][1] * 1200, stem.at[2] + UNIT[w][2] * 1200]));
    if (ways.length === 0) return;
    walk.builder.branch(stem.point, null, `B${i + 1}`);
    walkRun(walk, stem.at, walk.pick(ways), Math.max(1, points), stem.nps, 0, walk.random() < 0.5 ? end("continued", `L-${seed + 10 + i}`) : end("drain", ""));
  });
  return walk.builder.done();
}

export function randomRun(seed: number, points: number): RunDocument {
  const random = seeded(seed);
  const pick = <T>(list: readonly T[]): T => list[Math.floor(random() * list.length)]!;
  const length = (): string => `${150 + Math.floor(random() * random() * 9000)}`;
  const builder = new RunBuilder(`R-${seed}`, "metric", { pipe: pipe(pick(["2", "4", "6"])) }).start(flange({ text: "NOZZLE N1" }));
  let way: string = pick(WAYS);
  const branches: number[] = [];
  for (let i = 1; i < points; i++) {
    const straight = random() < 0.45;
    if (!straight) way = pick(WAYS.filter((w) => w !== way && w !== BACK[way]));
    const item: Item = straight ? pick([valve({ tag: `V-${i}` }), joint, support("PS"), flange(), tee(), outlet("1"), { kind: "none" as const }, reducer("2")]) : { kind: "none" };
    if (item.kind === "tee" || item.kind === "outlet") branches.push(i);
    if (random() < 0.12) builder.enu(`${Math.floor(random() * 1600) - 800}`, `${Math.floor(random() * 1600) - 800}`, random() < 0.5 ? "0" : `${Math.floor(random() * 1600) - 800}`, item);
    else builder.go(way, length(), i === points - 1 ? end("continued", "R-NEXT") : item);
  }
  for (const at of branches) builder.branch(at).go(pick(WAYS), length()).go(pick(WAYS), length(), end("open", "DRAIN"));
  return builder.done();
}
