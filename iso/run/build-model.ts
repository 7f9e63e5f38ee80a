/**
 * From what was typed to what it means. The passes, in order: place runs · join faces · fit points · cut stretches ·
 * check · group spools · mark · assemble. Pure, same input same model; never throws on what a user can type.
 */
import { isWeightKey } from "../catalogue/key-words";
import { buildContext, type BuildContext } from "./build-context";
import type { Fitting, JointDraft, PieceDraft, PlacedPoint, PlacedRun } from "./build-types";
import { assembleSpools } from "./assemble-spools";
import { checkRuns } from "./check-line";
import { fillStretch, runStretches } from "./cut-stretches";
import type { RunDocument } from "./document";
import { fitPoint } from "./fit-point";
import { groupSpools, type Parts, type SpoolGroup } from "./group-spools";
import { fittingOf } from "./fit-common";
import { joinFaces } from "./join-faces";
import { closeLoops } from "./loops";
import { advanceMarks, givenMarks, type Markable } from "./marks";
import type { Component, Joint, Leg, Loop, MarksRegister, Model, Node, Piece, Problem, TakeOutWord } from "./model-types";
import { placeRuns } from "./place-runs";
import { rolledPieces, rollsOf, type Rolls } from "./rolls";
import { carriedServices, lineBreaks } from "./service";
import { componentWeight } from "./weights";

/** A line before its marks are given. */
interface Structure {
  readonly runs: readonly PlacedRun[];
  readonly legs: readonly Leg[];
  readonly parts: Parts;
  /** How each part is turned against the one before it. */
  readonly rolls: Rolls;
  readonly groups: readonly SpoolGroup[];
  readonly loops: readonly Loop[];
  readonly ctx: BuildContext;
}

/** The last point of a loop stands for the fitting it meets, which is fitted there already. */
const NOTHING_FITTED = fittingOf({});

/** The model of a document, with marks as the register will give them. Lengths in mm, angles in radians. */
export function buildModel(document: RunDocument, marks: MarksRegister, takeOuts: readonly TakeOutWord[]): Model {
  const line = buildStructure(document, takeOuts);
  const given = givenMarks(markable(line), marks, document.settings.marks);
  const letters = line.groups.map((g) => given.spools.get(g.anchor) ?? "?");
  const letterOf = new Map<string, string>();
  line.groups.forEach((g, i) => {
    for (const ids of [g.componentIds, g.pieceKeys]) for (const id of ids) letterOf.set(id, letters[i] ?? "?");
  });
  const spoolOf = (id: string | null) => (id === null ? null : (letterOf.get(id) ?? null));
  const components = finishedComponents(line, spoolOf, takeOuts);
  const spools = assembleSpools({ ...line.parts, components }, line.groups, letters, line.legs, document, line.ctx, carriedServices(line.runs.flatMap((run) => run.points)));
  const breaks = lineBreaks(line.runs.flatMap((run) => run.points));
  return {
    document,
    nodes: line.runs.flatMap((run) => run.points.map(nodeOf)),
    legs: line.legs,
    components,
    joints: line.parts.joints.map((j) => jointOf(j, given.welds.get(j.key) ?? null, spoolOf(j.a) ?? spoolOf(j.b))),
    pieces: line.parts.pieces.map((p) => finished<Piece>(p, { mark: given.pieces.get(p.key) ?? "", spool: spoolOf(p.key) })),
    spools,
    ...(breaks.length > 0 ? { breaks } : {}),
    problems: inFlowOrder(line.ctx.problems, line.runs),
    ...(line.loops.length === 0 ? {} : { loops: line.loops }),
  };
}

/** The register after this document: what a save stores. */
export function nextMarks(document: RunDocument, marks: MarksRegister, takeOuts: readonly TakeOutWord[]): MarksRegister {
  return advanceMarks(markable(buildStructure(document, takeOuts)), marks, document.settings.marks);
}

/** Components with roll, weight and spool. */
function finishedComponents({ parts, rolls, ctx }: Structure, spoolOf: (id: string) => string | null, takeOuts: readonly TakeOutWord[]): Component[] {
  // The tables have no weight under a part's own key: without a word of the shop's none need be put together.
  const shop = takeOuts.some(({ key }) => isWeightKey(key)) ? ctx.peek : null;
  return parts.components.map((c): Component => {
    const { weightKg, weightSource } = componentWeight(c, ctx.units, shop);
    const roll = rolls.components.get(c.id);
    return finished<Component>(c, { weightKg, weightSource, spool: spoolOf(c.id), ...(roll === undefined ? {} : { roll }) });
  });
}

/** Fills in what is known last. The draft was made for this model alone, so it is completed rather than copied. */
function finished<Part extends object>(draft: Partial<Part>, last: Partial<Part>): Part {
  return Object.assign(draft, last) as Part;
}

function buildStructure(document: RunDocument, takeOuts: readonly TakeOutWord[]): Structure {
  const ctx = buildContext(document.settings, takeOuts);
  const closed = closeLoops(placeRuns(document, ctx), ctx);
  const runs = joinFaces(closed.runs, ctx);
  const points = new Map<string, PlacedPoint>(runs.flatMap((r) => r.points.map((p) => [p.uid, p] as const)));
  checkRuns(runs, ctx);
  const fittings = new Map<string, Fitting>([...points].map(([uid, p]) => [uid, p.closesLoop ? NOTHING_FITTED : fitPoint(p, ctx)]));
  const collected = collectParts(runs, fittings, points, ctx);
  const rolls = rollsOf(runs, collected.components, ctx.units);
  const parts = { ...collected, pieces: rolledPieces(collected.pieces, rolls) };
  return { runs, legs: runs.flatMap((r) => r.legs.flatMap((l) => l ?? [])), parts, rolls, groups: groupSpools(parts), loops: closed.loops, ctx };
}

/** Puts fittings and what lies between them in one flow order: along the main run, then along each branch. */
function collectParts(runs: readonly PlacedRun[], fittings: ReadonlyMap<string, Fitting>, points: ReadonlyMap<string, PlacedPoint>, ctx: BuildContext): Parts {
  const order: string[] = [];
  const components: Component[] = [];
  const joints: JointDraft[] = [];
  const pieces: Parts["pieces"][number][] = [];
  const held: (readonly [string, string])[] = [];
  const put = (list: readonly Component[]) => {
    for (const c of list) {
      order.push(c.id);
      components.push(c);
    }
  };
  const putPieces = (list: readonly PieceDraft[]) => {
    order.push(...list.map((piece) => piece.key));
    pieces.push(...list);
  };
  for (const run of runs) {
    const endingAt = new Map(runStretches(run, fittings, points).map((s) => [s.to.uid, s]));
    for (const p of run.points) {
      const stretch = endingAt.get(p.uid);
      const between = stretch ? fillStretch(stretch, ctx) : null;
      if (between) {
        put(between.components);
        putPieces(between.pieces);
        joints.push(...between.joints);
        held.push(...between.held);
      }
      const fitting = fittings.get(p.uid);
      put(fitting?.components ?? []);
      putPieces(fitting?.pieces ?? []);
      joints.push(...(fitting?.joints ?? []));
      held.push(...(fitting?.held ?? []));
    }
  }
  return { order, components, joints: uniqueJoints(joints), pieces, held };
}

/** A plain weld is offered by the pipes on both sides of it; the two halves become one joint. */
function uniqueJoints(joints: readonly JointDraft[]): JointDraft[] {
  const byKey = new Map<string, JointDraft>();
  for (const j of joints) {
    const seen = byKey.get(j.key);
    byKey.set(j.key, seen ? { ...seen, a: seen.a ?? j.a, b: seen.b ?? j.b, gapMm: seen.gapMm + j.gapMm } : j);
  }
  return [...byKey.values()];
}

function markable(line: Structure): Markable {
  const legs = new Map(line.legs.map((leg) => [leg.id, leg]));
  return {
    welds: line.parts.joints.filter((j) => j.kind !== "bolted" && j.kind !== "attachment" && j.kind !== "threaded").map((j) => ({ key: j.key, runId: j.runId })),
    pieces: line.parts.pieces.map((p) => ({ key: p.key, runId: p.runId, ends: pieceEnds(p, legs) })),
    spools: line.groups.map((g) => ({ anchor: g.anchor, parts: [...g.componentIds, ...g.pieceKeys] })),
  };
}

/** What stands at a piece's ends, by names that a reversal leaves: the joints, or the points where nobody welds. */
function pieceEnds(piece: Parts["pieces"][number], legs: ReadonlyMap<string, Leg>): [string, string] {
  const first = legs.get(piece.legIds?.[0] ?? piece.legId);
  const last = legs.get(piece.legId);
  return [piece.ends[0].jointKey ?? `${first?.fromPointId ?? ""}|`, piece.ends[1].jointKey ?? `${last?.toPointId ?? ""}|`];
}

function jointOf(j: JointDraft, number: string | null, spool: string | null): Joint {
  return {
    key: j.key, pointId: j.pointId, kind: j.kind, place: j.place, number,
    position: j.position, direction: j.direction, a: j.a, b: j.b, nps: j.nps, mismatchRad: j.mismatchRad, gapMm: j.gapMm, spool,
  };
}

/** Findings by the row they belong to, in flow order; those of no row last. */
function inFlowOrder(problems: readonly Problem[], runs: readonly PlacedRun[]): Problem[] {
  const rows = new Map<string, number>();
  for (const run of runs) for (const p of run.points) if (!rows.has(p.point.id)) rows.set(p.point.id, rows.size);
  const row = (problem: Problem) => (problem.pointId === null ? rows.size : (rows.get(problem.pointId) ?? rows.size));
  return [...problems].sort((a, b) => row(a) - row(b));
}

function nodeOf(p: PlacedPoint): Node {
  return {
    pointId: p.point.id, runId: p.runId, index: p.index, position: p.position, arriving: p.arriving, leaving: p.leaving, turnRad: p.turnRad,
  };
}
